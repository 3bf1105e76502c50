"""Stereochemistry kept, and meaning in space what its record says."""

import numpy as np
import pytest

from shapeshelf.structure.embedding import embed
from shapeshelf.structure.reading import read_smiles

SEED = 11


@pytest.mark.parametrize(
    "smiles",
    ["N[C@@H](C)C(=O)O", "N[C@H](C)C(=O)O", "C[S@](=O)CC", "C[S@@+]([O-])CC", "F[C@](Cl)(Br)I"],
)
def test_clockwise_is_clockwise_in_space(smiles: str) -> None:
    """Seen from the first neighbour, the others turn the way the record says."""
    molecule = read_smiles(smiles)
    (centre,) = molecule.tetrahedral_stereo
    points = embed(molecule, 1, SEED)[0]
    around = [points[atom] - points[centre.atom] for atom in centre.neighbours]
    if len(around) == 3:
        around.append(-np.sum(around, axis=0))
    first, second, third, fourth = around
    turning = np.cross(second, third) + np.cross(third, fourth) + np.cross(fourth, second)
    assert (float(first @ turning) < 0) == centre.clockwise


SIDES = [("C/C=C/C", False), ("C/C=C\\C", True), ("F/N=N\\F", True), ("C/C(F)=N/O", False)]


@pytest.mark.parametrize(("smiles", "cis"), SIDES)
def test_sides_of_double_bonds_in_space(smiles: str, cis: bool) -> None:
    """Cis substituents come out on the same side; the carbon or fluorine is written first."""
    molecule = read_smiles(smiles)
    (stereo,) = molecule.double_bond_stereo
    points = embed(molecule, 1, SEED)[0]
    axis = points[stereo.end] - points[stereo.begin]
    sides = [
        np.cross(axis, points[stereo.first] - points[stereo.begin]),
        np.cross(axis, points[stereo.last] - points[stereo.end]),
    ]
    assert (float(sides[0] @ sides[1]) > 0) == stereo.cis
    if stereo.first == 0:
        assert stereo.cis == cis
    else:
        # The priority atom is the other one of the two at that end, so the sides swap.
        assert stereo.cis != cis


@pytest.mark.parametrize("smiles", ["C[C@H](C)O", "C/C=C(/C)C", "CC=CC", "[SiH3]O[SiH3]"])
def test_no_stereo_where_there_is_none(smiles: str) -> None:
    """Marks that distinguish nothing are dropped."""
    molecule = read_smiles(smiles)
    assert (molecule.tetrahedral_stereo, molecule.double_bond_stereo) == ((), ())
