from shapeshelf.figures.angle_scale import ScaleRow, angle_scale, scale_drawing
from shapeshelf.figures.model import Lettering, Role, Stroke

ROWS = [
    ScaleRow("SF_{4}", ((173.1, "measured"), (101.6, "measured"))),
    ScaleRow("TeCl_{4}", ((176.8, "measured"),)),
]
SAME_PIXEL = 0.01
"""Far below what can be seen."""


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
    drawing = scale_drawing("see-saw", ROWS, (20.0, 120.0))
    texts = [mark.text for mark in drawing.marks if isinstance(mark, Lettering)]
    assert {"SF_{4}", "TeCl_{4}", "ideal 120°"} <= set(texts)
    assert "ideal 20°" not in texts


def test_without_an_angle_there_is_no_scale():
    """Two-atom molecules have a shape and no angle."""
    assert angle_scale("linear", [ScaleRow("HCl", ())], (180.0,)) is None
