"""A record's coordinates find their place in any drawing of the molecule."""

import numpy as np
import pytest

from shapeshelf.calculation.keys import settled
from shapeshelf.calculation.mapping import laid_onto
from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.vectors import rotation_about
from shapeshelf.structure.reading import read_smiles

ANGSTROM = 1e-6
"""Superposition of equal structures is exact but for rounding."""


def assembled(molecule):
    lewis, centres = analyse(molecule)
    return np.array(assemble(molecule, lewis, centres).coordinates_angstrom)


@pytest.mark.parametrize(
    "smiles",
    [
        "O",
        "FS(F)(F)F",
        "S(F)(F)(F)F",
        "ClP(F)(F)(F)Cl",
        "O=[Xe](F)(F)(F)F",
        "FI(F)(F)(F)(F)(F)F",
        "C[C@H](F)Cl",
        "NN",
        "CC(C)=O",
        "c1ccncc1",
    ],
)
def test_a_turned_structure_is_laid_back(smiles):
    """The settled structure, turned and shifted, comes to lie on the drawing's own."""
    molecule = read_smiles(smiles)
    fixed = assembled(molecule)
    recorded = assembled(settled(molecule)) @ rotation_about((1, 2, 3), 77.0).T + 1.5
    laid = laid_onto(molecule, recorded, fixed)
    assert np.abs(laid - fixed).max() < ANGSTROM


@pytest.mark.parametrize("seed", range(6))
def test_alike_ligands_may_be_numbered_otherwise(seed):
    """Axial and equatorial fluorines of SF4 are found by their angles, not their numbers."""
    molecule = read_smiles("FS(F)(F)F")
    fixed = assembled(molecule)
    recorded = assembled(settled(molecule))
    mixed = recorded.copy()
    order = np.random.default_rng(seed).permutation(4)
    mixed[:4] = recorded[order]
    assert np.abs(laid_onto(molecule, mixed, fixed) - fixed).max() < ANGSTROM


def test_a_mirror_image_serves_where_nothing_is_stereogenic():
    """SOF2's mirror image is itself; that of a drawn enantiomer is another compound."""
    for smiles, same in (("O=S(F)F", True), ("C[C@H](F)Cl", False)):
        molecule = read_smiles(smiles)
        fixed = assembled(molecule)
        mirrored = assembled(settled(molecule)) * np.array([-1.0, 1.0, 1.0])
        gap = np.abs(laid_onto(molecule, mirrored, fixed) - fixed).max()
        assert bool(gap < ANGSTROM) is same
