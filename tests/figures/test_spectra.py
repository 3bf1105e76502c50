"""NMR patterns follow the first-order rules; infrared sticks stand at their wavenumbers."""

import math
from dataclasses import replace

import pytest

from shapeshelf.figures.model import Lettering, Role
from shapeshelf.figures.overlaps import label_overlaps
from shapeshelf.figures.spectra import infrared_drawing, nmr_drawing, splitting
from shapeshelf.properties.model import NmrSignal

EXACT = 1e-6
"""Places are rounded to six decimals."""

WATER = ((1595.0, 62.0), (3657.0, 2.5), (3756.0, 44.0))
"""Fundamentals of water vapour, 1/cm: T. Shimanouchi, Tables of Molecular Vibrational
Frequencies (NSRDS-NBS 39, 1972), recalled from memory; intensities only plausible."""


@pytest.mark.parametrize(
    ("counts", "ratios"),
    [
        ((), [1]),
        ((1,), [1, 1]),
        ((2,), [1, 2, 1]),
        ((3,), [1, 3, 3, 1]),
        ((4,), [1, 4, 6, 4, 1]),
        ((1, 2), [1, 2, 1, 1, 2, 1]),
        ((2, 3), [1, 3, 3, 1, 2, 6, 6, 2, 1, 3, 3, 1]),
    ],
)
def test_lines_have_pascals_heights(counts, ratios):
    """n alike neighbours give n + 1 lines in the ratios of Pascal's triangle, sets multiply."""
    lines = splitting(counts)
    assert [round(height * sum(ratios)) for _, height in lines] == ratios
    assert math.fsum(height for _, height in lines) == pytest.approx(1.0)


def test_the_pattern_is_even():
    """First-order patterns mirror themselves."""
    lines = splitting((1, 3, 2))
    for (left, low), (right, high) in zip(lines, reversed(lines), strict=True):
        assert left == pytest.approx(-right, abs=EXACT)
        assert low == pytest.approx(high, abs=EXACT)


def test_a_diagram_shows_every_line(reports):
    """The triplet of one and the quintet of another nucleus: eight lines."""
    signals = (
        NmrSignal("19F", (1, 2), "triplet", ("2 F (2J)",)),
        NmrSignal("31P", (0,), "quintet", ("4 F (1J)",)),
    )
    report = reports["pf5"]
    drawing = nmr_drawing(replace(report, spectra=replace(report.spectra, nmr=signals)))
    assert sum(mark.role is Role.DATA for mark in drawing.marks) == 3 + 5
    assert "19F × 2: triplet through 2 F (2J)" in drawing.description.replace("  ", " ")
    assert label_overlaps(drawing) == []


def test_there_is_no_diagram_of_singlets(reports):
    """Where nothing splits a table says it all."""
    report = reports["nh3"]
    alone = (NmrSignal("1H", (1, 2, 3), "singlet", ()),)
    assert nmr_drawing(replace(report, spectra=replace(report.spectra, nmr=alone))) is None


def test_sticks_stand_in_proportion():
    """Places are linear in wavenumber and grow to the left, heights in intensity."""
    drawing = infrared_drawing(WATER, "Water", "a method")
    sticks = [mark.points for mark in drawing.marks if mark.role is Role.DATA]
    (x1, b1), (_, t1) = sticks[0]
    (x2, _), _ = sticks[1]
    (x3, b3), (_, t3) = sticks[2]
    assert x1 > x2 > x3
    assert (x1 - x3) / (x1 - x2) == pytest.approx((3756 - 1595) / (3657 - 1595))
    assert (b3 - t3) / (b1 - t1) == pytest.approx(44 / 62)
    labels = {mark.text for mark in drawing.marks if isinstance(mark, Lettering)}
    assert {"1595", "3657", "3756"} <= labels
    assert label_overlaps(drawing) == []


def test_degenerate_and_imaginary_modes():
    """Members of a degenerate band are one stick, an imaginary mode is none."""
    drawing = infrared_drawing(((948.0, 100.0), (948.4, 100.0), (-50.0, 3.0)), "X", "a method")
    assert sum(mark.role is Role.DATA for mark in drawing.marks) == 1
    assert "948 cm⁻¹ (200 km/mol)" in drawing.description
