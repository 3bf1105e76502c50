"""Scripts, minus signs and numbers as figures print them."""

import pytest

from shapeshelf.figures.lettering import charge_script, formula, markup, plain, point_group
from shapeshelf.figures.numbers import (
    angstrom_text,
    debye_text,
    degrees_text,
    plus_minus_text,
)
from shapeshelf.report.model import AngleRow, Basis, Value


def make_value(number, basis, plus_minus):
    return Value(number, plus_minus, basis, number, plus_minus, None, None, None, None, None)


def make_row(number, basis, plus_minus, ideal):
    return AngleRow("F-S-F", (1, 0, 2), (), ideal, make_value(number, basis, plus_minus), ())


@pytest.mark.parametrize(
    ("text", "charge", "expected"),
    [
        ("SF4", 0, "SF_{4}"),
        ("C10H8N2", 0, "C_{10}H_{8}N_{2}"),
        ("NO3-", -1, "NO_{3}^{−}"),
        ("SO42-", -2, "SO_{4}^{2−}"),
        ("SO4^2-", -2, "SO_{4}^{2−}"),
        ("NH4+", 1, "NH_{4}^{+}"),
        ("Co(NH3)63+", 3, "Co(NH_{3})_{6}^{3+}"),
    ],
)
def test_formulas_get_their_scripts(text, charge, expected):
    """Counts go down, the charge goes up, the minus is a true minus."""
    assert formula(text, charge) == expected


@pytest.mark.parametrize(
    ("symbol", "expected"),
    [
        ("C2v", "C_{2v}"),
        ("D3h", "D_{3h}"),
        ("Td", "T_{d}"),
        ("Oh", "O_{h}"),
        ("Cinfv", "C_{∞v}"),
        ("Dinfh", "D_{∞h}"),
        ("Cs", "C_{s}"),
        ("S4", "S_{4}"),
        ("C1", "C_{1}"),
    ],
)
def test_point_groups_get_their_subscripts(symbol, expected):
    """Schoenflies symbols carry everything after the letter as a subscript."""
    assert point_group(symbol) == expected


def test_markup_escapes_what_it_sets():
    """Text from an entry cannot become markup."""
    assert markup('<b onload="x">&') == '&lt;b onload="x"&gt;&amp;'
    assert markup("A_{<}") == 'A<tspan dy="0.34em" font-size="70%">&lt;</tspan>'


def test_the_baseline_comes_back_after_a_script():
    """What follows a subscript stands on the old baseline."""
    shifts = [float(part.split("em")[0]) for part in markup("H_{2}O").split('dy="')[1:]]
    assert shifts[0] * 0.7 + shifts[1] == pytest.approx(0.0, abs=0.01)  # printed to 0.01 em


def test_plain_text_drops_the_marks():
    """Text alternatives carry no script marks."""
    assert plain("SO_{4}^{2−}") == "SO42−"
    assert charge_script(0) == ""


@pytest.mark.parametrize(
    ("number", "basis", "plus_minus", "ideal", "expected"),
    [
        (173.1, Basis.MEASURED, 0.5, 180.0, "173.1°"),
        (120.0, Basis.MEASURED, None, 120.0, "120.0°"),
        (102.04, Basis.CALCULATED, 0.3, 120.0, "102.0°"),
        (101.62, Basis.MODEL, 2.1, 120.0, "≈102°"),
        (101.62, Basis.MODEL, 0.2, 120.0, "101.6°"),
        (120.0, Basis.MODEL, 2.1, 120.0, "120°"),
        (109.471, Basis.MODEL, 2.1, 109.471, "109.5°"),
        (98.0, Basis.MODEL, None, None, "≈98°"),
    ],
)
def test_angles_say_how_well_they_are_known(number, basis, plus_minus, ideal, expected):
    """A model value is rounded to its own ± and marked, unless symmetry fixes it."""
    assert degrees_text(make_row(number, basis, plus_minus, ideal)) == expected


def test_lengths_and_moments():
    """Lengths to a thousandth of an ångström where measured, model values marked."""
    assert angstrom_text(make_value(1.6456, Basis.MEASURED, 0.003)) == "1.646"
    assert angstrom_text(make_value(1.6456, Basis.MODEL, 0.03)) == "≈1.65"
    assert debye_text(make_value(0.632, Basis.MEASURED, 0.003)) == "0.63 D"
    assert debye_text(make_value(0.91, Basis.MODEL, 0.3)) == "≈0.9 D"


@pytest.mark.parametrize(
    ("plus_minus", "expected"),
    [
        (None, ""),
        (0.5, " ± 0.5"),
        (2.13, " ± 2"),
        (0.04, " ± 0.04"),
        (12.0, " ± 12"),
        (1.2, " ± 1.2"),
    ],
)
def test_plus_minus(plus_minus, expected):
    """± has one significant digit, two where it begins with a 1, and no decimals from ten up."""
    assert plus_minus_text(plus_minus) == expected
