"""NMR patterns follow the first-order rules."""

import math
from dataclasses import replace

import pytest

from shapeshelf.figures.model import Role
from shapeshelf.figures.nmr import nmr_drawing, splitting
from shapeshelf.figures.overlaps import label_overlaps
from shapeshelf.properties.model import NmrSignal

EXACT = 1e-6
"""Places are rounded to six decimals."""


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
