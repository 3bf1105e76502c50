"""The Lewis structure accounts for every electron."""

import pytest

from shapeshelf.domains.lewis import count_electrons
from shapeshelf.figures.lewis import lewis_drawing, nonbonding
from shapeshelf.figures.model import Lettering, Role
from shapeshelf.structure.reading import read_smiles

VALENCE = {"H": 1, "C": 4, "N": 5, "O": 6, "F": 7, "S": 6, "Xe": 8, "B": 3, "Cl": 7, "P": 5}
"""Electrons of the outer shell: the last digit of the group (a law of the table)."""


@pytest.mark.parametrize(
    ("smiles", "electrons"),
    [
        ("O", 8),
        ("FS(F)(F)F", 34),
        ("[O-][N+](=O)[O-]", 24),
        ("[O-][O+]=O", 18),
        ("O=[N]=O", 17),
        ("F[Xe]F", 22),
        ("[C-]#[O+]", 10),
        ("C[N+](C)(C)C", 32),
        ("FB(F)F", 24),
    ],
)
def test_bonds_and_dots_hold_all_valence_electrons(smiles, electrons):
    """Two for each bond order, what is left as dots; the sum is the textbook count."""
    molecule = read_smiles(smiles)
    shells = sum(VALENCE[atom.element] for atom in molecule.atoms) - molecule.charge
    assert shells == electrons
    for form in count_electrons(molecule).forms:
        dots = sum(nonbonding(molecule, form, k) for k in range(len(molecule.atoms)))
        assert dots + 2 * sum(form.bond_orders) == electrons
        assert sum(form.formal_charges) == molecule.charge


def test_dots_are_drawn_for_all_of_them(reports):
    """Water shows four dots, sulfur tetrafluoride 2 + 4 x 6."""
    for name, dots in (("h2o", 4), ("sf4", 26)):
        marks = lewis_drawing(reports[name]).marks
        assert sum(mark.role is Role.ELECTRON for mark in marks) == dots


def test_every_atom_carries_its_symbol(reports):
    """One symbol an atom in the drawing of a small molecule."""
    for report in reports.values():
        marks = lewis_drawing(report).marks
        drawn = [m.text for m in marks if isinstance(m, Lettering) and m.role is Role.SYMBOL]
        assert sorted(drawn) == sorted(atom.element for atom in report.molecule.atoms)
