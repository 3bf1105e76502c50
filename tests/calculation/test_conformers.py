"""Which bonds turn, and what a Boltzmann average over conformers is."""

import numpy as np
import pytest

from shapeshelf.calculation.conformers import Conformer, averaged, conformers_of, turning_bonds
from shapeshelf.calculation.minimising import Minimum
from shapeshelf.calculation.model import System
from shapeshelf.calculation.units import BOHR_ANGSTROM
from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.assembly import assemble
from shapeshelf.structure.reading import read_smiles

HARTREE_OF_RT = 298.15 * 8.314462618 / 1000 / 2625.4996


def conformer(above_rt, debye, weight=1):
    place = np.zeros((2, 3))
    return Conformer(
        Minimum(place, above_rt * HARTREE_OF_RT, place, np.eye(6), 1, True), debye, weight
    )


@pytest.mark.parametrize(
    ("smiles", "count"),
    [
        ("CC", 0),
        ("CO", 0),
        ("COC", 0),
        ("FC(F)(F)C(F)(F)F", 0),
        ("C1CCCCC1", 0),
        ("C=CC=C", 1),
        ("OO", 1),
        ("NN", 1),
        ("FCCF", 1),
        ("OS(=O)(=O)O", 2),
        ("CN(C)CCN(C)C", 3),
        ("c1ccc(cc1)P(c1ccccc1)c1ccccc1", 3),
    ],
)
def test_turning_bonds(smiles, count):
    """Single bonds outside rings, but not those that spin a methyl or trifluoromethyl group."""
    assert len(turning_bonds(read_smiles(smiles))) == count


def test_average_of_two():
    """Weights 1 and 1/e: shares 0.731 and 0.269, root mean square of 1 D and 3 D, 1.775 D."""
    found = averaged([conformer(0.0, 1.0), conformer(1.0, 3.0)])
    assert found.lowest_share == pytest.approx(0.7311, abs=1e-4)
    assert found.mean_dipole_debye == pytest.approx(1.7753, abs=2e-4)
    assert (found.least_dipole_debye, found.most_dipole_debye, found.count) == (1.0, 3.0, 2)


def test_a_chiral_conformer_counts_twice():
    """A gauche form and its mirror image outweigh an anti form of the same energy two to one."""
    assert averaged([conformer(0.0, 0.0), conformer(0.0, 3.0, 2)]).lowest_share == pytest.approx(
        1 / 3
    )


def test_high_conformers_are_left_out():
    """Beyond the window a conformer neither counts nor widens the spread."""
    found = averaged([conformer(0.0, 1.0), conformer(20.0, 9.0)])
    assert (found.count, found.most_dipole_debye) == (1, 1.0)


def test_no_conformers_no_average():
    """A rigid molecule has none."""
    assert averaged(()) is None


def test_difluoroethane_has_an_anti_and_a_gauche_form():
    """Anti without a moment, gauche with one and with a mirror image (any textbook)."""
    molecule = read_smiles("FCCF")
    lewis, centres = analyse(molecule)
    start = np.array(assemble(molecule, lewis, centres).coordinates_angstrom) / BOHR_ANGSTROM
    system = System(tuple(atom.element for atom in molecule.atoms), 0, 1)
    found = sorted(conformers_of(molecule, system, start), key=lambda one: one.dipole_debye)
    assert [one.weight for one in found] == [1, 2]
    assert found[0].dipole_debye < 0.05
    assert found[1].dipole_debye > 2.0
