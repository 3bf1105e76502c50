"""Half-widths follow the residuals of their class, and lean on wider classes when few."""

import numpy as np
import pytest

from shapeshelf.domains.uncertainty import (
    COVERED,
    CROSS_VALIDATED,
    SHRINKAGE,
    class_uncertainty_degrees,
    half_widths_degrees,
)

DEGREES = 0.006
"""Half-widths are rounded to hundredths."""


def test_a_large_class_keeps_its_own_quantile():
    """With thousands of residuals the class's own 68 % quantile is what counts."""
    sizes = np.abs(np.random.default_rng(0).normal(scale=2.0, size=20000))
    table = half_widths_degrees([(("C", 4, 0), float(size)) for size in sizes])
    own = float(np.quantile(sizes, COVERED))
    assert table.of("C", 4, 0) == pytest.approx(own, abs=DEGREES)


def test_a_small_class_is_drawn_to_its_period():
    """One residual of its own weighs one against the shrinkage."""
    many = [(("S", 2, 2), 1.0)] * 4000
    table = half_widths_degrees([*many, (("S", 5, 1), 10.0)])
    expected = (10.0 + SHRINKAGE * table.by_period[True]) / (1 + SHRINKAGE)
    assert table.of("S", 5, 1) == pytest.approx(expected, abs=DEGREES)


def test_a_class_never_seen_takes_its_periods():
    """Eight bonds at iodine were never measured, so the heavy centres' half-width stands."""
    assert class_uncertainty_degrees("I", 8, 0) == CROSS_VALIDATED.by_period[True]
    assert class_uncertainty_degrees("C", 2, 0) == CROSS_VALIDATED.by_period[False]


def test_half_widths_differ_between_classes():
    """Saturated carbon is better known than pyramidal nitrogen."""
    assert class_uncertainty_degrees("C", 4, 0) < class_uncertainty_degrees("N", 3, 1)
