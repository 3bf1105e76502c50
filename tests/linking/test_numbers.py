"""Numbers with units in running text."""

import pytest

from shapeshelf.linking.numbers import quoted_numbers

EXACT = 1e-9
"""Sums of decimal fractions in binary."""


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("173.1°", [("angle", 173.1, 173.1)]),
        ("173.1 °", [("angle", 173.1, 173.1)]),
        ("173.1\u202f°", [("angle", 173.1, 173.1)]),
        ("173,1 degrees", [("angle", 173.1, 173.1)]),
        ("104° 30′", [("angle", 104.5, 104.5)]),
        ("101–102°", [("angle", 101.0, 102.0)]),
        ("101° to 102°", [("angle", 101.0, 102.0)]),
        ("between 101 and 102°", [("angle", 101.0, 102.0)]),
        ("101 and 102°", [("angle", 101.0, 101.0), ("angle", 102.0, 102.0)]),
        ("1.646/1.545 Å", [("length", 1.646, 1.646), ("length", 1.545, 1.545)]),
        ("154.6 pm", [("length", 1.546, 1.546)]),
        ("0.1546 nm", [("length", 1.546, 1.546)]),
        ("0.63 D", [("dipole", 0.63, 0.63)]),
        ("0.63 debye", [("dipole", 0.63, 0.63)]),
        ("892 cm-1", [("frequency", 892.0, 892.0)]),
        ("892 cm\u207b\u00b9", [("frequency", 892.0, 892.0)]),
        ("20 °C", [("other", 20.0, 20.0)]),
        ("5 mbar", [("other", 5.0, 5.0)]),
        ("62.3 Å²", [("other", 62.3, 62.3)]),
        ("in 2019, 173.1°", [(None, 2019.0, 2019.0), ("angle", 173.1, 173.1)]),
        ("SF4 and TB-017 and a1.5", []),
        ("#angle-2-3, v1.2.3", []),
    ],
)
def test_unit_and_value_of_a_number(text: str, expected: list[tuple]) -> None:
    """In degrees, ångström, debye and 1/cm."""
    found = quoted_numbers(text)
    assert [item.quantity for item in found] == [quantity for quantity, _, _ in expected]
    for item, (_, low, high) in zip(found, expected, strict=True):
        assert (item.low, item.high) == pytest.approx((low, high), abs=EXACT)


@pytest.mark.parametrize(
    ("text", "half", "spread"),
    [
        ("173°", 0.5, None),
        ("173.10°", 0.005, None),
        ("173.1(5)°", 0.05, 0.5),
        ("173.1 ± 0.5°", 0.05, 0.5),
        ("173.1° ± 0.5°", 0.05, 0.5),
        ("1.545(30) Å", 0.0005, 0.03),
        ("154.5 ± 0.3 pm", 0.0005, 0.003),
        ("104°30'", 0.5 / 60, None),
    ],
)
def test_how_far_a_number_reaches(text: str, half: float, spread: float | None) -> None:
    """Half of its last digit, and the ± that comes with it."""
    (found,) = quoted_numbers(text)
    assert found.half == pytest.approx(half, abs=EXACT)
    assert found.spread == (None if spread is None else pytest.approx(spread, abs=EXACT))
    assert found.end == len(text)
