"""Glyphs: every shape that the reference names has one."""

import pytest

from shapeshelf.figures.glyph import SIZE, glyph, shape_drawing
from shapeshelf.reference.shapes import SHAPES

NAMES = sorted({entry.shape for entry in SHAPES.values()})


@pytest.mark.parametrize("name", NAMES)
def test_every_named_shape_has_a_glyph_of_its_own(name):
    """Not the empty ring, and not that of another shape."""
    one = glyph(name)
    assert (one.width, one.height) == (SIZE, SIZE)
    assert "stroke-dasharray" not in one.markup
    assert (
        sum(
            glyph(other).markup.split("</desc>")[1] == one.markup.split("</desc>")[1]
            for other in NAMES
        )
        == 1
    )


@pytest.mark.parametrize("name", NAMES)
def test_every_named_shape_has_a_drawing(name):
    """The larger drawing exists and names its shape."""
    assert name in shape_drawing(name).description


def test_an_unnamed_shape_is_an_empty_ring():
    """What has no name is not drawn as something else."""
    assert "stroke-dasharray" in glyph(None).markup
    assert glyph("no such shape").markup.count("<path") == 1
    assert shape_drawing("no such shape") is None
