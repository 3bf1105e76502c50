"""Names stand near their points and keep off everything else."""

import numpy as np

from shapeshelf.figures.model import Drawing, Lettering, Stroke, Style
from shapeshelf.figures.naming import Named, names_beside
from shapeshelf.figures.outlines import ring
from shapeshelf.figures.overlaps import label_overlaps

FRAME = (0.0, 0.0, 300.0, 300.0)
DIAGONAL = ((0.0, 300.0), (300.0, 0.0))
RADIUS = 4.0
NEAR = 25.0
"""A name on open paper stands right beside its point; so many pixels hold point, gap and grid."""
CLOUD = [(60.0 + 9 * i, 90.0 + 9 * j) for i in range(8) for j in range(4)]


def placed(named, others=()):
    points = [*((one.x, one.y) for one in named), *others]
    crowd = np.array([(x, y, RADIUS) for x, y in points])
    return names_beside(named, crowd, FRAME, DIAGONAL)


def letters(marks):
    return [mark for mark in marks if isinstance(mark, Lettering)]


def overlaps(marks, points):
    rings = [ring(x, y, RADIUS - 1, Style("ink", "paper")) for x, y in points]
    return label_overlaps(Drawing("test", 300, 300, (*rings, *marks), "", ""))


def test_on_open_paper_a_name_needs_no_line():
    """It stands beside its point."""
    (name,) = placed([Named("SF_{4}", 100.0, 100.0)])
    assert abs(name.y - 100.0) < NEAR
    assert abs(name.x - 100.0) < NEAR


def test_in_a_cloud_a_line_leads_to_the_name():
    """No name lies on a point or on another name, and each has its line."""
    named = [Named("bromobenzene", 87.0, 108.0), Named("hydrazine", 105.0, 99.0)]
    marks = placed(named, CLOUD)
    assert {mark.text for mark in letters(marks)} == {"bromobenzene", "hydrazine"}
    assert sum(isinstance(mark, Stroke) for mark in marks) == 2
    assert overlaps(marks, CLOUD) == []


def test_a_name_stays_on_its_side_of_the_dividing_line():
    """Above the diagonal there is room only behind a thicket, below it close by."""
    grid = [(12.0 * i, 12.0 * j) for i in range(25) for j in range(25)]
    thicket = [(x, y) for x, y in grid if 200 < x + y < 290]
    (name,) = letters(placed([Named("azulene", 150.0, 147.0)], thicket))
    assert name.x + name.y < 200.0


def test_where_there_is_no_room_a_name_is_left_out():
    """Points everywhere, or a name wider than the frame."""
    everywhere = [(10.0 * i, 10.0 * j) for i in range(31) for j in range(31)]
    assert placed([Named("urea", 150.0, 150.0)], everywhere) == []
    assert placed([Named("urea" * 30, 150.0, 150.0)]) == []
