"""Which atoms the bond graph cannot tell apart."""

import pytest

from shapeshelf.structure.reading import read_smiles

# Groups of atoms, by number in the SMILES, that share a class; atoms of different groups do not.
GROUPS = [
    ("[O-][N+](=O)[O-]", [(0, 2, 3), (1,)]),
    ("CC(=O)[O-]", [(0,), (1,), (2, 3)]),
    ("O[N+](=O)[O-]", [(0,), (1,), (2, 3)]),
    ("O=S(=O)([O-])[O-]", [(0, 2, 3, 4), (1,)]),
    ("OS(=O)(=O)O", [(0, 4), (2, 3), (1,)]),
    ("[O-][O+]=O", [(0, 2), (1,)]),
    ("c1ccncc1", [(0,), (1, 5), (2, 4), (3,)]),
    ("CC([2H])C", [(0, 3), (1,), (2,)]),
    ("FP(F)(F)(Cl)Cl", [(0, 2, 3), (1,), (4, 5)]),
]


@pytest.mark.parametrize(("smiles", "groups"), GROUPS)
def test_classes_follow_the_bond_graph(smiles: str, groups: list[tuple[int, ...]]) -> None:
    """Resonance partners share a class; isotopes and hydrogens set atoms apart."""
    classes = read_smiles(smiles).classes
    numbers = [{classes[atom] for atom in group} for group in groups]
    assert all(len(number) == 1 for number in numbers)
    assert len(set.union(*numbers)) == len(groups)


def test_classes_do_not_depend_on_atom_order() -> None:
    """The same molecule written backwards has the same numbers, backwards."""
    forward, backward = read_smiles("[H]OCF").classes, read_smiles("FCO[H]").classes
    assert forward[:4] == backward[3::-1]
