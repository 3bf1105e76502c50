"""A molecule taken as far as its symmetry, for the rooms that start from there."""

import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.structure.reading import read_smiles


@pytest.fixture
def worked_out():
    """Return a function: SMILES -> molecule, count, centres, symmetry."""

    def work_out(smiles):
        molecule = read_smiles(smiles)
        lewis, centres = analyse(molecule)
        structure = assemble(molecule, lewis, centres)
        elements = [atom.element for atom in molecule.atoms]
        return molecule, lewis, centres, find_symmetry(elements, structure.coordinates_angstrom)

    return work_out
