"""The settled order of atoms: the same molecule from every spelling."""

from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

from shapeshelf.geometry.ordering import renumbered, settled_order
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.reading import read_smiles

MOLECULES = ["CCO", "O[N+](=O)[O-]", "C1CC1C", "FS(F)(F)(F)F", "c1ccccc1O", "N#CC(=O)O"]


def drawn(molecule: Molecule) -> list[tuple[object, ...]]:
    """Elements, classes and bonds without orders, which resonance may place either way."""
    atoms = [
        (atom.element, kind) for atom, kind in zip(molecule.atoms, molecule.classes, strict=True)
    ]
    return [*atoms, *sorted((bond.begin, bond.end) for bond in molecule.bonds)]


@pytest.mark.parametrize("smiles", MOLECULES)
@given(data=st.data())
def test_any_numbering_settles_to_the_same_molecule(smiles, data):
    """Atoms shuffled at will come back in one order: same elements, classes and bonds."""
    molecule = read_smiles(smiles)
    shuffle = tuple(data.draw(st.permutations(range(len(molecule.atoms)))))
    shuffled = renumbered(molecule, shuffle)
    first = renumbered(molecule, settled_order(molecule))
    second = renumbered(shuffled, settled_order(shuffled))
    assert drawn(first) == drawn(second)


def test_stereochemistry_moves_with_its_atoms():
    """Renumbering moves stereo records along, and drops coordinates that no longer fit."""
    molecule = replace(read_smiles("F[C@H](Cl)Br"), coordinates_angstrom=((0.0, 0.0, 0.0),) * 5)
    order = (4, 3, 2, 1, 0)
    moved = renumbered(molecule, order)
    (before,), (after,) = molecule.tetrahedral_stereo, moved.tetrahedral_stereo
    assert order[after.atom] == before.atom
    assert tuple(order[k] for k in after.neighbours) == before.neighbours
    assert moved.coordinates_angstrom is None
