"""The deviation strip sets every value of an angle on one scale."""

from dataclasses import replace

import pytest

from shapeshelf.figures.model import Role
from shapeshelf.figures.strip import strip, strip_drawing
from shapeshelf.report.model import Basis

PIXEL = 0.01
"""Rounding of double precision at a few hundred pixels."""


def with_measured(report, index, measured, plus_minus):
    centre = report.centres[0]
    row = centre.angles[index]
    value = replace(
        row.degrees,
        value=measured,
        basis=Basis.MEASURED,
        measured=measured,
        measured_uncertainty=plus_minus,
        uncertainty=plus_minus,
    )
    angles = list(centre.angles)
    angles[index] = replace(row, degrees=value)
    return replace(report, centres=(replace(centre, angles=tuple(angles)),))


def middle(mark):
    xs = [x for x, _ in mark.points]
    return (min(xs) + max(xs)) / 2


def test_marks_stand_at_their_values(reports):
    """Distances on the strip are as the differences in degrees."""
    report = with_measured(reports["h2o"], 0, 106.0, 0.5)
    row = report.centres[0].angles[0]
    data = [m for m in strip_drawing(report).marks if m.role is Role.DATA][:5]
    ideal, _, model, _, measured = (middle(mark) for mark in data)
    scale = (measured - model) / (106.0 - row.degrees.model)
    assert scale > 10
    assert ideal == pytest.approx(
        model + (row.ideal_degrees - row.degrees.model) * scale, abs=PIXEL
    )


def test_the_line_is_as_long_as_the_uncertainty(reports):
    """± 0.5 measured beside ± 1.5 of the model: a third as long."""
    report = with_measured(reports["h2o"], 0, 106.0, 0.5)
    lines = [m for m in strip_drawing(report).marks if m.role is Role.DATA and not m.closed]
    lengths = sorted(
        abs(m.points[1][0] - m.points[0][0]) for m in lines if m.points[0][1] == m.points[1][1]
    )
    assert lengths[1] / lengths[0] == pytest.approx(3.0)


def test_kinds_of_value_differ_by_shape(reports):
    """Four corners standing, four corners lying, a bar: nothing is told by colour alone."""
    report = with_measured(reports["h2o"], 0, 106.0, 0.5)
    marks = [m for m in strip_drawing(report).marks if m.role is Role.DATA and m.closed]
    outlines = {
        tuple((round(x - middle(m), 1), round(y - m.points[0][1], 1)) for x, y in m.points)
        for m in marks
    }
    assert len(outlines) == 2


def test_words_say_the_same(reports):
    """The description carries every number with its ±."""
    told = strip(with_measured(reports["h2o"], 0, 106.0, 0.5)).description
    assert "measured 106.0° ± 0.5" in told
    assert "ideal" in told


def test_there_is_no_strip_where_nothing_departs(reports):
    """Symmetry fixes all of SF6's angles: a strip would say nothing."""
    assert strip(reports["sf6"]) is None
