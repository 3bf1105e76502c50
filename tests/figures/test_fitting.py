"""Drawn coordinates meet the values that a figure prints."""

from dataclasses import replace

import numpy as np
import pytest

from shapeshelf.figures.fitting import drawn_coordinates
from shapeshelf.figures.frames import angle
from shapeshelf.report.model import Basis

DEGREES, ANGSTROM = 0.05, 0.0025
"""Half of what the sheet promises."""


def with_values(report, degrees, lengths, basis=Basis.MEASURED):
    """Return the report with other best values, by row."""
    centre = report.centres[0]
    angles = tuple(
        replace(row, degrees=replace(row.degrees, value=degrees[k], basis=basis))
        if k in degrees
        else row
        for k, row in enumerate(centre.angles)
    )
    rows = tuple(
        replace(row, angstrom=replace(row.angstrom, value=lengths[k], basis=basis))
        if k in lengths
        else row
        for k, row in enumerate(report.lengths)
    )
    return replace(report, centres=(replace(centre, angles=angles),), lengths=rows)


def test_measured_values_move_the_atoms(reports):
    """SF4 drawn with other angles and lengths shows exactly those; the model's row gives way."""
    report = with_values(reports["sf4"], {0: 171.0, 2: 104.0}, {0: 1.70, 1: 1.50})
    points = drawn_coordinates(report)
    rows = report.centres[0].angles
    for index, expected in ((0, 171.0), (2, 104.0)):
        assert angle(points, rows[index].atoms) == pytest.approx(expected, abs=DEGREES)
    for row, expected in zip(report.lengths, (1.70, 1.50), strict=True):
        for a, b in row.members:
            drawn = np.linalg.norm(points[a] - points[b])
            assert drawn == pytest.approx(expected, abs=ANGSTROM)


def test_nothing_moves_where_nothing_is_asked(reports):
    """A structure that already shows its values stays where it is."""
    report = reports["brf5"]
    moved = drawn_coordinates(report) - np.array(report.symmetry.coordinates_angstrom)
    assert np.abs(moved).max() < 1e-6


def test_a_planar_centre_stays_planar_when_angles_add_up_to_too_much(reports):
    """Three angles of 122 degrees cannot be drawn in a plane, and no atom leaves it."""
    report = with_values(reports["bf3"], {0: 122.0}, {})
    symmetry = report.symmetry
    points = (drawn_coordinates(report) - symmetry.centre_angstrom) @ np.array(symmetry.axes).T
    assert np.abs(points[:, 2]).max() < 1e-6
