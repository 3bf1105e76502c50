"""A structure keeps its key however it is written, and loses it when it changes."""

import pytest

from shapeshelf.calculation.keys import settled, structure_key
from shapeshelf.structure.reading import read_smiles


@pytest.mark.parametrize(
    ("one", "other"),
    [
        ("FS(F)(F)F", "S(F)(F)(F)F"),
        ("ON=O", "O=NO"),
        ("C1=CC=NC=C1", "c1ccncc1"),
        ("[O-][N+](=O)O", "O[N+]([O-])=O"),
        ("CS(C)=O", "C[S+](C)[O-]"),
        ("ClP(Cl)(F)(F)F", "FP(F)(F)(Cl)Cl"),
    ],
)
def test_spellings_share_a_key(one, other):
    """The digest is of the structure, not of its spelling."""
    first, second = (structure_key(read_smiles(smiles), 1) for smiles in (one, other))
    assert first == second


@pytest.mark.parametrize(
    ("one", "other"),
    [
        (("FS(F)(F)F", 1), ("FS(F)F", 2)),
        (("[CH2]", 1), ("[CH2]", 3)),
        (("O", 1), ("[2H]O", 1)),
        (("C/C=C/C", 1), ("C/C=C\\C", 1)),
        (("C[C@H](F)Cl", 1), ("C[C@@H](F)Cl", 1)),
        (("CCO", 1), ("COC", 1)),
        (("[NH4+]", 1), ("[BH4-]", 1)),
    ],
)
def test_structures_that_differ_have_other_keys(one, other):
    """Atoms, isotopes, bonds, stereochemistry, charge and multiplicity all count."""
    first, second = (structure_key(read_smiles(s), m) for s, m in (one, other))
    assert first.digest != second.digest


def test_settling_twice_changes_nothing():
    """The settled order of a settled molecule is its own."""
    once = settled(read_smiles("FS(F)(F)F"))
    assert structure_key(once, 1) == structure_key(settled(once), 1)
