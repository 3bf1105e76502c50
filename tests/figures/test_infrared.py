"""Infrared sticks stand at their wavenumbers, as high as their bands are strong."""

from dataclasses import replace

import pytest

from shapeshelf.figures.infrared import infrared_drawing
from shapeshelf.figures.model import Lettering, Role
from shapeshelf.figures.overlaps import label_overlaps
from shapeshelf.report.model import Band, CalculatedVibrations

WATER = ((1595.0, 62.0), (3657.0, 2.5), (3756.0, 44.0))
"""Fundamentals of water vapour, 1/cm: T. Shimanouchi, Tables of Molecular Vibrational
Frequencies (NSRDS-NBS 39, 1972), recalled from memory; intensities only plausible."""


def with_bands(report, *bands):
    return replace(
        report, frequencies=CalculatedVibrations("a method", tuple(Band(*band) for band in bands))
    )


def sticks(drawing):
    return [mark.points for mark in drawing.marks if mark.role is Role.DATA]


def test_sticks_stand_in_proportion(reports):
    """Places are linear in wavenumber and grow to the left, heights in intensity."""
    drawing = infrared_drawing(with_bands(reports["h2o"], *WATER))
    ((x1, b1), (_, t1)), ((x2, _), _), ((x3, b3), (_, t3)) = sticks(drawing)
    assert x1 > x2 > x3
    assert (x1 - x3) / (x1 - x2) == pytest.approx((3756 - 1595) / (3657 - 1595))
    assert (b3 - t3) / (b1 - t1) == pytest.approx(44 / 62)
    labels = {mark.text for mark in drawing.marks if isinstance(mark, Lettering)}
    assert {"1595", "3657", "3756"} <= labels
    assert label_overlaps(drawing) == []


def test_an_imaginary_mode_is_not_drawn(reports):
    """Only what absorbs is a stick."""
    bands = ((948.0, 200.0, "T1u"), (-50.0, 3.0))
    drawing = infrared_drawing(with_bands(reports["sf6"], *bands))
    assert len(sticks(drawing)) == 1
    assert "948 cm⁻¹ (T1u, 200 km/mol)" in drawing.description


def test_a_mode_carries_its_species(reports):
    """The label stands behind the wavenumber, and labels of near bands do not collide."""
    bands = ((615.0, 20.0, "T1u"), (640.0, 30.0, "E''"), (948.0, 100.0, "Σg+"))
    drawing = infrared_drawing(with_bands(reports["sf6"], *bands))
    labels = {mark.text for mark in drawing.marks if isinstance(mark, Lettering)}
    assert {"615 T_{1u}", "640 E″", "948 Σ_{g}^{+}"} <= labels
    assert label_overlaps(drawing) == []


@pytest.mark.parametrize("bands", [(), ((500.0, 0.0),)])
def test_nothing_is_drawn_where_nothing_absorbs(reports, bands):
    """Without a band that has an intensity, and without a record, there is no diagram."""
    assert infrared_drawing(with_bands(reports["xef2"], *bands)) is None
    assert infrared_drawing(reports["xef2"]) is None
