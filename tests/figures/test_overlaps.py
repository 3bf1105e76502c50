"""No label lies on a label, an atom, a bond or a lobe; and the check finds those that do."""

import pytest

from shapeshelf.figures.bench import bench_drawing
from shapeshelf.figures.lewis import lewis_drawing
from shapeshelf.figures.model import Drawing, Lettering, Role, Stroke, Style
from shapeshelf.figures.outlines import lobe, ring
from shapeshelf.figures.overlaps import label_overlaps
from shapeshelf.figures.sheet import sheet_data
from shapeshelf.figures.strip import strip_drawing

RING = ring(100, 100, 20, Style("ink", "paper", 2.0))
LINE = Stroke(((50, 150), (150, 150)), Style("ink", None, 3.0), Role.BOND)
LOBE = lobe((100, 50), (100, 20), 12, Style("line", "lobe"))


def drawn(*marks):
    return Drawing("bench", 200, 200, marks, "", "")


@pytest.mark.parametrize(
    ("mark", "hits"),
    [
        (Lettering(100, 105, "120°", 15), 1),
        (Lettering(100, 155, "120°", 15), 1),
        (Lettering(100, 25, "120°", 15), 1),
        (Lettering(100, 140, "120°", 15), 0),
        (Lettering(160, 105, "120°", 15), 0),
        (Lettering(100, 155, "120°", 15, angle_degrees=90), 1),
    ],
)
def test_a_planted_overlap_is_found(mark, hits):
    """A label on a ring, a bond or a lobe counts; one beside them does not."""
    assert len(label_overlaps(drawn(RING, LINE, LOBE, mark))) == hits


def test_labels_on_labels_are_found():
    """Turned boxes are compared as they lie."""
    level = Lettering(100, 100, "1.646 Å", 15)
    assert label_overlaps(drawn(level, Lettering(110, 104, "120°", 15)))
    assert not label_overlaps(drawn(level, Lettering(100, 125, "120°", 15)))
    assert not label_overlaps(drawn(level, Lettering(145, 120, "1.646", 15, angle_degrees=60)))


def test_a_symbol_may_lie_in_its_ring_but_not_under_a_bond():
    """What is drawn before the ring is covered by it, what is drawn after strikes the symbol."""
    symbol = Lettering(100, 106, "F", 18, Role.SYMBOL)
    through = Stroke(((60, 100), (140, 100)), Style("ink", None, 3.0), Role.BOND)
    assert not label_overlaps(drawn(through, RING, symbol))
    assert label_overlaps(drawn(RING, symbol, through))


@pytest.mark.parametrize("draw", [bench_drawing, lewis_drawing, strip_drawing])
def test_no_figure_overlaps(reports, draw):
    """Bench view, Lewis structure and strip of every hand-made report."""
    for name, report in reports.items():
        made = draw(report)
        assert made is None or label_overlaps(made) == [], name


def test_no_sheet_overlaps(reports):
    """The sheet of every hand-made report."""
    for name, report in reports.items():
        assert label_overlaps(sheet_data(report).drawing) == [], name
