"""Bond lengths and angles of assembled structures against the geometries of the G2 set."""

import csv
from pathlib import Path

import numpy as np
import pytest
from ase.build import molecule as ase_molecule

from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.vectors import angle_degrees
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.reading import read_smiles

MEAN_LENGTH_ANGSTROM = 0.03
"""What single, double and triple covalent radii are good for, as asked of the model."""

MEAN_ANGLE_DEGREES = 2.0
"""What the domain model is held to on measured angles."""

DATA = Path(__file__).parents[1] / "data" / "g2_smiles.csv"
"""SMILES written for the molecules of ase.data.g2 (geometries MP2(full)/6-31G(d), L. A. Curtiss
et al., J. Chem. Phys. 106 (1997) 1063); atoms are left out."""


@pytest.fixture(scope="module")
def differences() -> tuple[np.ndarray, np.ndarray]:
    """Length differences in ångström and angle differences in degrees, all molecules together."""
    lengths: list[float] = []
    angles: list[float] = []
    with DATA.open(encoding="utf-8") as file:
        for row in csv.DictReader(file):
            stated = int(row["multiplicity"]) if row["multiplicity"] else None
            molecule = read_smiles(row["smiles"], multiplicity=stated)
            built = np.array(assemble(molecule, *analyse(molecule)).coordinates_angstrom)
            atoms = ase_molecule(row["name"])
            published = _matched(molecule, atoms.get_chemical_symbols(), atoms.positions, built)
            lengths += _length_differences(molecule, built, published)
            angles += _angle_differences(molecule, built, published)
    return np.array(lengths), np.array(angles)


def test_bond_lengths(differences):
    """The mean absolute error of all bond lengths stays within the limit."""
    lengths, _ = differences
    assert len(lengths) > 700
    assert np.abs(lengths).mean() <= MEAN_LENGTH_ANGSTROM


def test_bond_angles(differences):
    """So does that of all bond angles."""
    _, angles = differences
    assert len(angles) > 1000
    assert np.abs(angles).mean() <= MEAN_ANGLE_DEGREES


def _length_differences(
    molecule: Molecule, built: np.ndarray, published: np.ndarray
) -> list[float]:
    ends = np.array([(bond.begin, bond.end) for bond in molecule.bonds])
    found = [
        np.linalg.norm(points[ends[:, 0]] - points[ends[:, 1]], axis=1)
        for points in (built, published)
    ]
    return list(found[0] - found[1])


def _angle_differences(molecule: Molecule, built: np.ndarray, published: np.ndarray) -> list[float]:
    found = []
    for centre in range(len(built)):
        ends = molecule.neighbours(centre)
        for k, a in enumerate(ends):
            for b in ends[:k]:
                rows = [a, centre, b]
                found.append(angle_degrees(*built[rows]) - angle_degrees(*published[rows]))
    return found


def _matched(
    molecule: Molecule, elements: list[str], points: np.ndarray, built: np.ndarray
) -> np.ndarray:
    """The published coordinates in the molecule's order: same bonds, then nearest distances."""
    near = _bonded(elements, points, len(molecule.bonds))
    wanted = [set(molecule.neighbours(atom)) for atom in range(len(elements))]
    kinds = [atom.element for atom in molecule.atoms]
    orders: list[list[int]] = [[]]
    for atom, kind in enumerate(kinds):
        orders = [
            [*order, other]
            for order in orders
            for other in range(len(elements))
            if other not in order
            and elements[other] == kind
            and all((order[k] in near[other]) == (k in wanted[atom]) for k in range(atom))
        ]
    spread = np.linalg.norm(built[:, None] - built, axis=2)
    apart = np.linalg.norm(points[:, None] - points, axis=2)
    best = min(orders, key=lambda order: np.abs(spread - apart[np.ix_(order, order)]).sum())
    return points[best]


def _bonded(elements: list[str], points: np.ndarray, wanted: int) -> list[set[int]]:
    """Bonds by covalent radii, under the first stretch that gives the wanted number of them."""
    radii = np.array([ELEMENTS[symbol].single_radius_angstrom for symbol in elements])
    apart = np.linalg.norm(points[:, None] - points, axis=2) + 99 * np.eye(len(points))
    for stretch in (1.3, 1.2, 1.25, 1.4, 1.5, 1.15):
        bonded = apart < stretch * np.add.outer(radii, radii)
        if bonded.sum() == 2 * wanted:
            break
    assert bonded.sum() == 2 * wanted
    return [set(np.nonzero(row)[0]) for row in bonded]
