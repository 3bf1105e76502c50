"""Point groups: built from generators, read from published geometries, under noise."""

import re

import numpy as np
import pytest
from ase.build import molecule as ase_molecule
from ase.data.g2 import data as g2_data

from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.geometry.vectors import rotation_about

EXACT_ANGSTROM = 1e-9
"""Rounding of a few hundred floating-point operations on coordinates of some ångström."""

PUBLISHED_ANGSTROM = 0.02
"""Geometries of the G2 set are printed to five decimals but were not symmetrised."""

NOISE_ANGSTROM = 0.01
"""Two atoms moved against each other miss by up to twice this: within the default tolerance."""

Z = (0.0, 0.0, 1.0)
X = (1.0, 0.0, 0.0)
GOLDEN = (1 + 5**0.5) / 2


def turn(axis: tuple[float, float, float], order: int) -> np.ndarray:
    return rotation_about(axis, 360.0 / order)


def mirror(normal: tuple[float, float, float]) -> np.ndarray:
    unit = np.array(normal) / np.linalg.norm(normal)
    return np.eye(3) - 2.0 * np.outer(unit, unit)


def improper(order: int) -> np.ndarray:
    return turn(Z, order) @ mirror(Z)


INVERSION = -np.eye(3)
CUBE_DIAGONAL = (1.0, 1.0, 1.0)
ICOSAHEDRAL = [turn((0.0, 1.0, GOLDEN), 5), turn(CUBE_DIAGONAL, 3)]


def axial_groups() -> list[tuple[str, list[np.ndarray], int]]:
    """Symbol, generators and order of every axial group with n from 2 to 9."""
    groups = []
    for n in range(2, 10):
        groups += [
            (f"C{n}", [turn(Z, n)], n),
            (f"C{n}v", [turn(Z, n), mirror(X)], 2 * n),
            (f"C{n}h", [turn(Z, n), mirror(Z)], 2 * n),
            (f"D{n}", [turn(Z, n), turn(X, 2)], 2 * n),
            (f"D{n}h", [turn(Z, n), turn(X, 2), mirror(Z)], 4 * n),
            (f"D{n}d", [improper(2 * n), turn(X, 2)], 4 * n),
            (f"S{2 * n}", [improper(2 * n)], 2 * n),
        ]
    return groups


GROUPS = [
    ("C1", [np.eye(3)], 1),
    ("Cs", [mirror(Z)], 2),
    ("Ci", [INVERSION], 2),
    *axial_groups(),
    ("T", [turn(CUBE_DIAGONAL, 3), turn(Z, 2)], 12),
    ("Td", [turn(CUBE_DIAGONAL, 3), improper(4)], 24),
    ("Th", [turn(CUBE_DIAGONAL, 3), turn(Z, 2), INVERSION], 24),
    ("O", [turn(CUBE_DIAGONAL, 3), turn(Z, 4)], 24),
    ("Oh", [turn(CUBE_DIAGONAL, 3), turn(Z, 4), INVERSION], 48),
    ("I", ICOSAHEDRAL, 60),
    ("Ih", [*ICOSAHEDRAL, INVERSION], 120),
]


def closure(generators: list[np.ndarray]) -> list[np.ndarray]:
    """All products of the generators."""
    group = [np.eye(3)]
    for known in group:
        for generator in generators:
            product = generator @ known
            if not any(np.abs(product - old).max() < 1e-6 for old in group):
                group.append(product)
    return group


def general_orbits(group: list[np.ndarray]) -> tuple[list[str], np.ndarray]:
    """Four unlike atoms in general positions, spread by the group: no more symmetry than it."""
    cylindrical = {"C": (16.0, 8.1, 4.1), "N": (17.0, 13.6, -5.3), "O": (18.0, 3.3, 7.1)}
    cylindrical["S"] = (19.0, 6.7, 10.3)
    tilt = rotation_about((0.3, -0.8, 0.5), 41.0)
    elements, points = [], []
    for symbol, (radius, azimuth_degrees, height) in cylindrical.items():
        seed = rotation_about(Z, azimuth_degrees) @ np.array([radius, 0.0, height])
        for matrix in group:
            elements.append(symbol)
            points.append(tilt @ matrix @ seed)
    return elements, np.array(points) + np.array([1.0, -2.0, 0.5])


@pytest.mark.parametrize(("symbol", "generators", "order"), GROUPS, ids=[g[0] for g in GROUPS])
def test_general_positions_have_the_group_that_made_them(symbol, generators, order):
    """Orbits of unlike atoms under a group have that group, all its operations, its turns."""
    group = closure(generators)
    assert len(group) == order
    elements, points = general_orbits(group)
    found = find_symmetry(elements, points)
    proper = sum(1 for matrix in group if np.linalg.det(matrix) > 0)
    assert (found.point_group, len(found.operations)) == (symbol, order)
    assert found.rotational_number == proper
    assert found.chiral == (proper == order)
    assert len(found.equivalent_atoms) == 4
    assert {len(orbit) for orbit in found.equivalent_atoms} == {order}


@pytest.mark.parametrize(("symbol", "generators", "order"), GROUPS, ids=[g[0] for g in GROUPS])
def test_noise_within_tolerance_changes_no_symbol(symbol, generators, order):
    """A structure shaken within the tolerance keeps its group and comes back symmetrised."""
    elements, points = general_orbits(closure(generators))
    shaken = points + np.random.default_rng(7).uniform(-1, 1, points.shape) * NOISE_ANGSTROM / 2
    found = find_symmetry(elements, shaken)
    assert found.point_group == symbol
    assert np.abs(np.array(found.coordinates_angstrom) - shaken).max() < 4 * NOISE_ANGSTROM
    again = find_symmetry(elements, found.coordinates_angstrom, 1e-6)
    assert again.point_group == symbol


@pytest.mark.parametrize("symbol", ["C4v", "D5h", "D4d", "S6", "Td", "Th", "Ih"])
def test_operations_are_an_exact_group(symbol):
    """Matrices carry the symmetrised atoms where the permutation says; products stay inside."""
    generators = next(g[1] for g in GROUPS if g[0] == symbol)
    found = find_symmetry(*general_orbits(closure(generators)))
    centred = np.array(found.coordinates_angstrom) - np.array(found.centre_angstrom)
    matrices = [np.array(operation.matrix) for operation in found.operations]
    for operation, matrix in zip(found.operations, matrices, strict=True):
        landed = centred[list(operation.permutation)]
        assert np.abs(centred @ matrix.T - landed).max() < EXACT_ANGSTROM
    for first in matrices[:: max(1, len(matrices) // 7)]:
        for second in matrices:
            miss = min(np.abs(first @ second - matrix).max() for matrix in matrices)
            assert miss < EXACT_ANGSTROM
    assert found.operations[0].label == "E"


# Where the description printed with the geometry states another symbol than the geometry has.
G2_EXCEPTIONS = {
    "BeH": ("Cinfv", "two unlike atoms cannot have Dinfh, which the description says"),
    "N2O": ("Cinfv", "linear in the set; Cs in the description is a subgroup of Cinfv"),
    "CH2NHCH2": ("Cs", "the hydrogen on nitrogen is out of the ring plane, so not C2v"),
}


def g2_stated() -> list[tuple[str, str]]:
    """Molecule and Schoenflies symbol wherever a description in the G2 set gives one.

    ASE's ase.data.g2, after L. A. Curtiss et al., J. Chem. Phys. 106 (1997) 1063.
    """
    stated = []
    for name, record in g2_data.items():
        found = re.search(r"\b([CDTOI](?:\*[vh]|\d*[vhdsHi]|\d))\s+symm", record["description"])
        if found:
            symbol = found.group(1).replace("*", "inf").replace("H", "h")
            stated.append((name, symbol))
    return stated


@pytest.mark.parametrize(("name", "stated"), g2_stated())
def test_g2_geometries_have_the_stated_group(name, stated):
    """Every geometry of the G2 set has the point group its description states, but for three."""
    atoms = ase_molecule(name)
    found = find_symmetry(atoms.get_chemical_symbols(), atoms.positions, PUBLISHED_ANGSTROM)
    if name in G2_EXCEPTIONS:
        assert found.point_group == G2_EXCEPTIONS[name][0] != stated
    else:
        assert found.point_group == stated


def test_the_descriptions_of_the_set_were_read():
    """All 148 molecules of the set state a symbol; its 14 single atoms state none."""
    single = [name for name, record in g2_data.items() if len(record["positions"]) == 1]
    assert (len(g2_stated()), len(single)) == (148, 14)
    assert len(g2_data) == 162


ROTATIONAL_NUMBERS = [
    # P. Atkins and J. de Paula, Physical Chemistry (recalled from memory): symmetry numbers.
    ("HCl", 1),
    ("H2O", 2),
    ("NH3", 3),
    ("CO2", 2),
    ("C2H4", 4),
    ("CH4", 12),
    ("C6H6", 12),
    ("BF3", 6),
]


@pytest.mark.parametrize(("name", "number"), ROTATIONAL_NUMBERS)
def test_rotational_symmetry_numbers(name, number):
    """The rotational symmetry number of textbook molecules."""
    atoms = ase_molecule(name)
    assert find_symmetry(atoms.get_chemical_symbols(), atoms.positions).rotational_number == number


def test_linear_molecules_carry_the_finite_subgroup():
    """CO2 has the sixteen operations of D4h, half of which exchange the oxygens; OCS eight."""
    carbon_dioxide, sulfide = ase_molecule("CO2"), ase_molecule("OCS")
    both = find_symmetry(carbon_dioxide.get_chemical_symbols(), carbon_dioxide.positions)
    assert len(both.operations) == 16
    assert sum(op.permutation != (0, 1, 2) for op in both.operations) == 8
    assert both.equivalent_atoms == ((0,), (1, 2))
    one = find_symmetry(sulfide.get_chemical_symbols(), sulfide.positions)
    assert len(one.operations) == 8
    assert {op.label for op in one.operations} == {"E", "C2", "C4", "C4^3", "sigma"}


def test_a_single_atom_has_the_full_group():
    """A lone atom is K, with the 48 operations of Oh to stand for it."""
    found = find_symmetry(["Ar"], [(1.0, 2.0, 3.0)])
    assert (found.point_group, len(found.operations), found.chiral) == ("K", 48, False)


def test_isotopes_do_not_lower_the_group():
    """Only the element counts, so equal symbols are equal atoms whatever the isotope."""
    atoms = ase_molecule("H2O")
    assert find_symmetry(["O", "H", "H"], atoms.positions).point_group == "C2v"


LABELS = [
    ("NH3", {"E": 1, "C3": 1, "C3^2": 1, "sigma": 3}),
    ("C2H6", {"E": 1, "C3": 1, "C3^2": 1, "C2": 3, "i": 1, "S6": 1, "S6^5": 1, "sigma": 3}),
    ("BF3", {"E": 1, "C3": 1, "C3^2": 1, "C2": 3, "S3": 1, "S3^5": 1, "sigma": 4}),
    ("C3H4_D2d", {"E": 1, "C2": 3, "S4": 1, "S4^3": 1, "sigma": 2}),
]


@pytest.mark.parametrize(("name", "counts"), LABELS)
def test_operations_are_named(name, counts):
    """Each operation carries its customary name, powers included."""
    atoms = ase_molecule(name)
    found = find_symmetry(atoms.get_chemical_symbols(), atoms.positions)
    labels = [operation.label for operation in found.operations]
    assert {label: labels.count(label) for label in labels} == counts


def test_planar_molecules_stand_upright():
    """Mulliken's axes: water lies in yz with z along C2; ethene has z along its C=C, x upright."""
    for name, pair in (("H2O", (1, 2)), ("C2H4", (0, 1))):
        atoms = ase_molecule(name)
        found = find_symmetry(atoms.get_chemical_symbols(), atoms.positions)
        x, y, z = np.array(found.axes)
        centred = np.array(found.coordinates_angstrom) - np.array(found.centre_angstrom)
        assert np.abs(centred @ x).max() < EXACT_ANGSTROM
        along = centred[pair[1]] - centred[pair[0]]
        sideways = y if name == "H2O" else z
        assert abs(abs(along @ sideways) - np.linalg.norm(along)) < EXACT_ANGSTROM
        assert np.linalg.det(np.array([x, y, z])) > 0


def test_only_a_closed_set_is_a_group():
    """A ring squeezed until one pair of operations fails falls back to a true subgroup."""
    angles = np.radians(np.arange(4) * 90.0)
    square = 1.5 * np.stack([np.cos(angles), np.sin(angles), 0 * angles], axis=1)
    squeezed = square * np.array([1.03, 1.0, 1.0])
    found = find_symmetry(["F"] * 4, squeezed, 0.03)
    assert found.point_group == "D2h"
    assert find_symmetry(["F"] * 4, squeezed, 0.2).point_group == "D4h"


REFUSED = [
    ([], np.zeros((0, 3)), "0 elements"),
    (["H", "H"], np.zeros((2, 3)), "coincide"),
    (["Xx"], np.zeros((1, 3)), "unknown element Xx"),
    (["H"], np.full((1, 3), np.nan), "finite"),
]


@pytest.mark.parametrize(("elements", "points", "message"), REFUSED)
def test_what_has_no_symmetry_is_refused(elements, points, message):
    """Empty, coinciding, unknown or infinite input gives one clear line."""
    with pytest.raises(AnalysisError, match=message):
        find_symmetry(elements, points)
