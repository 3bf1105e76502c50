"""How far methods are off: what counts, what is averaged over what, and how molecules are named."""

import csv
from importlib.resources import files

import numpy as np
import pytest

from shapeshelf.calculation.parity import (
    QUANTITIES,
    Method,
    ParityPoint,
    averages_of,
    charge_in,
    deviations_of,
    furthest,
    is_formula,
    known_to_all,
    methods_in,
    parity_points,
    spoken_name,
)

ROUNDING = 1e-9
"""Sums of a few doubles."""


def point(measured, model=None, xtb=None, dft=None, smiles="O", counts=True, **given):
    fields = {"quantity": "angle", "name": "H2O", "of": "H-O-H", "atoms": 3, "source": "a book"}
    return ParityPoint(
        smiles=smiles,
        measured=measured,
        model=model,
        xtb=xtb,
        dft=dft,
        counts=counts,
        **{**fields, **given},
    )


POINTS = [
    point(100.0, model=101.0, xtb=97.0),
    point(110.0, model=108.0, xtb=111.0, smiles="S", atoms=4),
    point(120.0, model=120.0, smiles="S", atoms=4),
    point(90.0, model=130.0, xtb=90.0, smiles="[Cl-]", atoms=9, counts=False),
    point(1.5, model=1.0, quantity="dipole", of=""),
]


def test_what_does_not_count_is_in_no_average():
    """Off by 1, 2 and 0 degrees; the 40 of a crystal are left out."""
    found = averages_of(POINTS, "angle", Method.MODEL)
    assert (found.values, found.molecules, found.most_atoms) == (3, 2, 4)
    assert found.mean == pytest.approx(1.0)
    assert found.largest == pytest.approx(2.0)
    assert found.half_width == pytest.approx(1.36)  # 0.68 of the way over 0, 1, 2
    assert averages_of(POINTS[3:], "angle", Method.MODEL) is None


def test_a_method_without_values_is_none():
    """PBE0 has no value here, and GFN2-xTB none of a dipole moment."""
    assert methods_in(POINTS, "angle") == (Method.MODEL, Method.XTB)
    assert methods_in(POINTS, "dipole") == (Method.MODEL,)
    assert averages_of(POINTS, "angle", Method.DFT) is None


def test_values_that_every_method_has():
    """A method without any value does not make the others' empty."""
    assert [one.measured for one in known_to_all(POINTS, "angle")] == [100.0, 110.0, 90.0]
    assert known_to_all(POINTS, "dipole") == (POINTS[4],)


def test_the_furthest_come_first_whatever_their_sign():
    """Values that do not count are named too."""
    worst = furthest(deviations_of(POINTS, "angle", Method.MODEL), 2)
    assert [one.off for one in worst] == [40.0, -2.0]


@pytest.mark.parametrize(
    ("name", "spoken", "formula", "charge"),
    [
        ("Methane, nitro-", "nitromethane", False, 0),
        ("1-Propene, 2-methyl-", "2-methyl-1-propene", False, 0),
        ("Ethene, 1,2-dichloro-, (Z)-", "(Z)-1,2-dichloroethene", False, 0),
        ("2H-Pyran, tetrahydro-", "tetrahydro-2H-pyran", False, 0),
        ("(E)-2-Butenenitrile", "(E)-2-butenenitrile", False, 0),
        ("Phosphine", "phosphine", False, 0),
        ("Urea", "urea", False, 0),
        ("N2H2t", "trans-N2H2", True, 0),
        ("CHF_1A", "CHF", True, 0),
        ("S(CN)2", "S(CN)2", True, 0),
        ("XeF5+", "XeF5+", True, 1),
        ("NO2-", "NO2-", True, -1),
    ],
)
def test_molecules_are_named_as_one_says_them(name, spoken, formula, charge):
    """Names of registers are turned round, marks of spin and side are dropped or spelled out."""
    assert spoken_name(name) == spoken
    assert is_formula(spoken) is formula
    assert charge_in(spoken) == charge


def test_the_table_is_read_whole():
    """Every line below its head is a point, with every number in it."""
    text = (files("shapeshelf.calculation") / "parity.csv").read_text("utf-8")
    rows = list(csv.DictReader(line for line in text.splitlines() if line[:1] != "#"))
    points = parity_points()
    assert [one.measured for one in points] == [float(row["measured"]) for row in rows]
    assert {one.quantity for one in points} == set(QUANTITIES)
    for method in Method:
        found = [one.found for q in QUANTITIES for one in deviations_of(points, q, method)]
        written = [float(row[method.value]) for row in rows if row[method.value]]
        assert np.allclose(sorted(found), sorted(written), atol=ROUNDING)
