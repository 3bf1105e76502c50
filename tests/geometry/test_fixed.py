"""Angles that a point group fixes, and those it leaves free."""

from itertools import combinations

import pytest
from ase.build import molecule as ase_molecule

from shapeshelf.geometry.fixed import is_fixed
from shapeshelf.geometry.symmetry import find_symmetry

TETRAHEDRON = [(1.0, 1, 1), (1.0, -1, -1), (-1.0, 1, -1), (-1.0, -1, 1)]
OCTAHEDRON = [(2.0, 0, 0), (-2.0, 0, 0), (0, 2.0, 0), (0, -2.0, 0), (0, 0, 2.0), (0, 0, -2.0)]


@pytest.mark.parametrize(
    ("points", "fixed"),
    [
        (TETRAHEDRON, True),
        (OCTAHEDRON, True),
        (OCTAHEDRON[:4], True),
        (OCTAHEDRON[:2], True),
        (OCTAHEDRON[:5], False),
        (TETRAHEDRON[:3], False),
        (TETRAHEDRON[:2], False),
    ],
    ids=["Td", "Oh", "D4h", "Dinfh", "C4v", "C3v", "C2v"],
)
def test_ligands_of_one_kind(points: list[tuple[float, float, float]], fixed: bool) -> None:
    """By the groups: of a pyramid or a bent molecule the angle is free, of the whole body not."""
    elements = ["C", *["F"] * len(points)]
    symmetry = find_symmetry(elements, [(0.0, 0.0, 0.0), *points])
    angles = [(i, 0, j) for i, j in combinations(range(1, len(elements)), 2)]
    assert is_fixed(symmetry, angles) is fixed


@pytest.mark.parametrize(
    ("name", "angle", "fixed"),
    [
        ("BF3", (1, 0, 2), True),
        ("NH3", (1, 0, 2), False),
        ("C6H6", (0, 1, 2), True),
        ("C2H4", (1, 0, 2), False),
        ("HCN", (1, 0, 2), True),
        ("CH3Cl", (2, 0, 3), False),
        ("H2O", (1, 0, 2), False),
    ],
)
def test_published_structures(name: str, angle: tuple[int, int, int], fixed: bool) -> None:
    """Geometries of the G2 set (Curtiss et al. 1997, as carried by ASE)."""
    atoms = ase_molecule(name)
    symmetry = find_symmetry(atoms.get_chemical_symbols(), atoms.positions, 0.02)
    assert is_fixed(symmetry, [angle]) is fixed
