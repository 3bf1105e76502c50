"""Expected bond lengths against measured ones."""

import numpy as np
import pytest

from shapeshelf.domains.bond_lengths import bond_length_angstrom
from shapeshelf.reference.elements import ELEMENTS

EACH_ANGSTROM = 0.065
"""No single bond is off by more; the rule knows nothing of what else an atom is bonded to."""
MEAN_ANGSTROM = 0.03

# CRC Handbook of Chemistry and Physics, bond lengths of free molecules; recalled from memory.
MEASURED = [
    ("H", "O", 1.0, 0.958),
    ("H", "N", 1.0, 1.012),
    ("H", "C", 1.0, 1.087),
    ("H", "F", 1.0, 0.917),
    ("H", "Si", 1.0, 1.480),
    ("H", "S", 1.0, 1.336),
    ("C", "C", 1.0, 1.531),
    ("C", "C", 2.0, 1.339),
    ("C", "O", 1.0, 1.421),
    ("C", "O", 2.0, 1.205),
    ("C", "N", 1.0, 1.471),
    ("C", "Cl", 1.0, 1.767),
    ("O", "O", 1.0, 1.475),
    ("O", "F", 1.0, 1.405),
    ("N", "F", 1.0, 1.365),
    ("F", "F", 1.0, 1.412),
    ("P", "F", 1.0, 1.563),
    ("P", "Cl", 1.0, 2.040),
    ("P", "O", 2.0, 1.436),
    ("S", "F", 1.0, 1.561),
    ("S", "O", 2.0, 1.431),
    ("Si", "F", 1.0, 1.554),
    ("Si", "Cl", 1.0, 2.019),
    ("As", "F", 1.0, 1.706),
    ("Sb", "Cl", 1.0, 2.333),
    ("Br", "F", 1.0, 1.756),
    ("Xe", "F", 1.0, 1.940),
    ("Xe", "O", 2.0, 1.736),
]


@pytest.mark.parametrize(("first", "second", "order", "measured"), MEASURED)
def test_each_length_is_near_the_measured_one(first, second, order, measured):
    """Every bond of the table comes out close, whichever atom is named first."""
    domains = (3, 3) if order == 2.0 else (4, 4)
    length = bond_length_angstrom(first, second, order, *domains)
    assert length == pytest.approx(measured, abs=EACH_ANGSTROM)
    assert length == bond_length_angstrom(second, first, order, *domains)


def test_mean_error():
    """The mean error over the table is within what three-dimensional models need."""
    errors = [
        abs(bond_length_angstrom(a, b, n, *((3, 3) if n == 2.0 else (4, 4))) - measured)
        for a, b, n, measured in MEASURED
    ]
    assert np.mean(errors) < MEAN_ANGSTROM


@pytest.mark.parametrize("element", sorted(ELEMENTS))
def test_every_element_has_lengths_of_a_chemical_size(element):
    """No element lacks a length, not even those without tabulated radii or electronegativity."""
    for order in (1.0, 1.5, 2.0, 3.0):
        assert 0.8 < bond_length_angstrom(element, "C", order) < 3.2


@pytest.mark.parametrize("element", ["B", "C", "N", "O", "Si", "P", "S", "As", "Se", "Xe"])
def test_lengths_fall_with_bond_order(element):
    """A bond to oxygen is the shorter the higher its order."""
    lengths = [bond_length_angstrom(element, "O", order) for order in (1.0, 1.5, 2.0)]
    assert lengths == sorted(lengths, reverse=True)
