import pytest

from shapeshelf.figures.angle_scale import ScaleRow, angle_scale, scale_drawing
from shapeshelf.figures.model import Lettering, Role, Stroke
from shapeshelf.figures.overlaps import label_overlaps

ROWS = [
    ScaleRow(
        "SF_{4}",
        ((173.1, "measured"), (101.6, "measured")),
        "Sulfur tetrafluoride",
        "../../compounds/sf4/",
    ),
    ScaleRow(
        "TeCl_{4}",
        ((176.8, "measured"),),
        "Tellurium tetrachloride",
        "../../compounds/tecl4/",
    ),
]
SAME_PIXEL = 0.01
"""Far below what can be seen."""
LEAST_TARGET = 24
"""Pixels: WCAG 2.2, success criterion 2.5.8."""


def points(drawing):
    return [mark for mark in drawing.marks if isinstance(mark, Stroke) and mark.role is Role.DATA]


def test_points_stand_true_on_one_scale():
    """The same number of pixels a degree everywhere, read back from the marks."""
    marks = points(scale_drawing("see-saw", ROWS, (90.0, 120.0, 180.0)))
    middles = [sum(x for x, _ in mark.points) / len(mark.points) for mark in marks[:3]]
    first = (middles[0] - middles[1]) / (173.1 - 101.6)
    second = (middles[2] - middles[0]) / (176.8 - 173.1)
    assert abs(first - second) < SAME_PIXEL


def test_every_compound_and_ideal_is_lettered():
    """One line a compound, ideals within reach of the values only."""
    drawing = scale_drawing("see-saw", ROWS, (20.0, 121.3))
    texts = [mark.text for mark in drawing.marks if isinstance(mark, Lettering)]
    assert {"SF_{4}", "TeCl_{4}", "121.3°", "ideal"} <= set(texts)
    assert "20°" not in texts


@pytest.mark.parametrize("ideals", [(90.0, 120.0, 180.0), (101.1, 102.4, 103.6, 172.9, 173.0)])
def test_no_lettering_meets_another(ideals):
    """Ideals that lie close together are lettered on several lines."""
    drawing = scale_drawing("see-saw", ROWS, ideals)
    assert {f"{degrees:g}°" for degrees in ideals} <= {
        mark.text for mark in drawing.marks if isinstance(mark, Lettering)
    }
    assert label_overlaps(drawing) == []


def test_every_point_lies_on_the_link_to_its_compound():
    """One rectangle a line, side by side, as high as a finger's least target."""
    first, second = scale_drawing("see-saw", ROWS, (90.0,)).links
    assert (first.address, second.address) == ("../../compounds/sf4/", "../../compounds/tecl4/")
    assert first.name == "Sulfur tetrafluoride: 101.6° measured, 173.1° measured"
    assert first.y + first.height == second.y
    assert first.height >= LEAST_TARGET
    marks = points(scale_drawing("see-saw", ROWS, (90.0,)))[:3]
    for mark, link in zip(marks, (first, first, second), strict=True):
        assert all(link.x <= x <= link.x + link.width for x, _ in mark.points)
        assert all(link.y <= y <= link.y + link.height for _, y in mark.points)


def test_a_drawing_with_links_is_no_single_picture():
    """A screen reader enters it; addresses and names are escaped; marks let pointers through."""
    row = ScaleRow("X", ((90.0, "model"),), 'A & "B"', "../../compounds/a/?b&c")
    markup = angle_scale("bent", [row], ()).markup
    assert 'role="group"' in markup
    assert '<a href="../../compounds/a/?b&amp;c"><title>A &amp; "B": 90.0° model</title>' in markup
    assert '<g pointer-events="none">' in markup
    assert 'role="img"' in angle_scale("bent", [ScaleRow("X", row.points)], ()).markup


def test_without_an_angle_there_is_no_scale():
    """Two-atom molecules have a shape and no angle."""
    assert angle_scale("linear", [ScaleRow("HCl", ())], (180.0,)) is None
