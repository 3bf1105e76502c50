"""The drawing sheet shows true what it dimensions, aligned and to one scale."""

import re
from dataclasses import replace

import numpy as np
import pytest

from shapeshelf.figures.canvas import render
from shapeshelf.figures.dimensions import to_scale
from shapeshelf.figures.frames import angle
from shapeshelf.figures.scene import build_scene
from shapeshelf.figures.sheet import sheet, sheet_data
from shapeshelf.report.model import Basis

NAMES = (
    "sf4",
    "h2o",
    "nh3",
    "clf3",
    "sf6",
    "pf5",
    "brf5",
    "bf3",
    "nitrate",
    "cf4",
    "xef4",
    "xef2",
    "if7",
)
DEGREES, ANGSTROM = 0.1, 0.005
"""What the sheet promises to be read off it."""
PIXEL = 0.02
"""Coordinates are written to a hundredth of a pixel."""


def rings_of(markup):
    """Return the middles of all rings in an SVG: closed paths of four curves, as written."""
    middles = []
    for path in re.findall(r'<path d="([^"]+)"', markup):
        for piece in re.findall(r"M[^M]+", path):
            numbers = [float(n) for n in re.findall(r"-?\d+(?:\.\d+)?", piece)]
            if piece.count("C") == 4 or (piece.count("C") == 1 and len(numbers) == 26):
                points = np.array(numbers[:26]).reshape(-1, 2)[::3]
                middles.append((points.min(axis=0) + points.max(axis=0)) / 2)
    return np.array(middles)


def read_off(middles, view, atoms):
    """Return the drawn middles of atoms in a view, as the SVG has them."""
    found = []
    for atom in atoms:
        apart = np.hypot(*(middles - view.points[atom]).T)
        assert apart.min() <= PIXEL
        found.append(middles[int(np.argmin(apart))])
    return np.array(found)


@pytest.mark.parametrize("name", NAMES)
def test_what_is_read_off_the_svg_agrees_with_the_report(reports, name):
    """Every dimension, measured with ruler and protractor on the SVG, is what it says."""
    report = reports[name]
    data = sheet_data(report)
    middles = rings_of(render(data.drawing).markup)
    views = {view.name: view for view in data.layout.views}
    rows = [*report.centres[0].angles, *report.lengths]
    for placed in data.placed:
        drawn = read_off(middles, views[placed.view], placed.atoms)
        row = next(row for row in rows if placed.atoms in row.members)
        if len(placed.atoms) == 3:
            assert angle(drawn, (0, 1, 2)) == pytest.approx(row.degrees.value, abs=DEGREES)
        else:
            length = np.hypot(*(drawn[1] - drawn[0])) / data.layout.scale
            assert length == pytest.approx(row.angstrom.value, abs=ANGSTROM)


@pytest.mark.parametrize("name", NAMES)
def test_every_row_is_dimensioned_once(reports, name):
    """All angles and lengths of one-centre molecules find a place, equivalent ones once."""
    report = reports[name]
    data = sheet_data(report)
    assert data.left_out == ()
    assert len(data.placed) == len(report.centres[0].angles) + len(report.lengths)


@pytest.mark.parametrize("name", NAMES)
def test_views_are_aligned_and_to_one_scale(reports, name):
    """Front over top, front beside side: every atom in line, all lengths alike (ISO 5456-2)."""
    views = {view.name: view for view in sheet_data(reports[name]).layout.views}
    front, top, side = views["front"], views["top"], views["side"]
    assert np.allclose(front.points[:, 0], top.points[:, 0], atol=1e-6)
    assert np.allclose(front.points[:, 1], side.points[:, 1], atol=1e-6)
    assert top.points[:, 1].min() > front.points[:, 1].max()
    assert side.points[:, 0].min() > front.points[:, 0].max()
    assert len({view.scale for view in views.values()}) == 1


def test_the_side_view_is_the_one_from_the_left(reports):
    """First angle: what is nearer in front lies to the right in the side view, lower in the top."""
    views = {view.name: view for view in sheet_data(reports["sf4"]).layout.views}
    nearer = int(np.argmax(views["front"].depth))
    assert views["side"].points[nearer, 0] == pytest.approx(views["side"].points[:, 0].max())
    assert views["top"].points[nearer, 1] == pytest.approx(views["top"].points[:, 1].max())


@pytest.mark.parametrize(("name", "auxiliary"), [("nh3", 1), ("sf4", 1), ("pf5", 0), ("h2o", 0)])
def test_auxiliary_views_stand_where_they_are_needed(reports, name, auxiliary):
    """NH3 needs one for its only angle, PF5 none."""
    names = [view.name for view in sheet_data(reports[name]).layout.views]
    assert sum(one.startswith("view") for one in names) == auxiliary


def test_everything_stays_on_the_sheet(reports):
    """No mark leaves the frame."""
    for name, report in reports.items():
        drawing = sheet_data(report).drawing
        for mark in drawing.marks:
            points = getattr(mark, "points", None) or ((mark.x, mark.y),)
            for x, y in points:
                assert 0 <= x <= drawing.width, name
                assert 0 <= y <= drawing.height, name


def test_a_value_the_drawing_cannot_show_is_not_to_scale(reports):
    """Two measured angles that exclude one another: what is not shown is known not to be."""
    report = reports["bf3"]
    row = report.centres[0].angles[0]
    measured = replace(row.degrees, value=122.0, basis=Basis.MEASURED)
    centre = replace(report.centres[0], angles=(replace(row, degrees=measured),))
    impossible = replace(report, centres=(centre,))
    assert not to_scale(build_scene(impossible), centre.angles[0], row.atoms)
    assert to_scale(build_scene(report), row, row.atoms)


def test_the_title_block_tells_what_it_must(reports):
    """Name, shape with symbol, point group, basis, method, id and a revision without a clock."""
    text = re.sub(r"<[^>]+>", " ", sheet(reports["sf4"]).markup)
    for told in ("Sulfur tetrafluoride", "see-saw", "SS-4", "electron-domain model", "model"):
        assert told in text
    assert re.search(r"sulfur-tetrafluoride · [0-9a-f]{8}", text)


def test_the_revision_follows_the_content(reports):
    """Another value gives another revision, the same report the same bytes."""
    report = reports["sf4"]
    other = replace(report, name="Another name")
    assert sheet(report).markup == sheet(report).markup
    pattern = r"· ([0-9a-f]{8})<"
    assert re.search(pattern, sheet(report).markup)[1] != re.search(pattern, sheet(other).markup)[1]


def test_molecules_of_many_atoms_have_no_sheet(reports):
    """Past a dozen atoms a sheet would say less than the numbered drawing."""
    report = reports["sf6"]
    atoms = report.molecule.atoms * 2
    assert sheet(replace(report, molecule=replace(report.molecule, atoms=atoms))) is None
