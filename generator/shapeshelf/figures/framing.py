"""The extent of marks, and a frame of paper around them."""

import math
from dataclasses import replace

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.model import Lettering, Mark, Stroke

MARGIN = 14.0
_ASCENT, _DESCENT = 0.75, 0.22
"""Of capitals and descenders, in em."""


def framed(marks: list[Mark], width: float | None = None) -> tuple[list[Mark], float]:
    """Return the marks centred on paper of ``width`` and the height they need."""
    left, top, right, bottom = extent(marks)
    x = ((width - left - right) / 2) if width else MARGIN - left
    return shifted(marks, x, MARGIN - top), math.ceil(bottom - top + 2 * MARGIN)


def shifted(marks: list[Mark], dx: float, dy: float) -> list[Mark]:
    """Return the marks moved by (dx, dy) pixels."""
    return [_moved(mark, dx, dy) for mark in marks]


def extent(marks: list[Mark]) -> tuple[float, float, float, float]:
    """Return left, top, right and bottom of all marks, lettering included."""
    corners = [corner for mark in marks for corner in _corners(mark)]
    xs, ys = zip(*corners, strict=True)
    return min(xs), min(ys), max(xs), max(ys)


def lettering_box(mark: Lettering) -> tuple[float, float, float, float, float]:
    """Return the box (x, y, width, height, angle in degrees) that a line of lettering fills."""
    width = text_width(mark.text, mark.size, mark.bold)
    shift = {"start": width / 2, "middle": 0.0, "end": -width / 2}[mark.anchor]
    rise = (_ASCENT - _DESCENT) / 2 * mark.size
    turn = math.radians(mark.angle_degrees)
    x = mark.x + shift * math.cos(turn) - rise * math.sin(turn)
    y = mark.y - shift * math.sin(turn) - rise * math.cos(turn)
    return (x, y, width, (_ASCENT + _DESCENT) * mark.size, mark.angle_degrees)


def _corners(mark: Mark) -> list[tuple[float, float]]:
    if isinstance(mark, Stroke):
        return list(mark.points)
    x, y, width, height, angle = lettering_box(mark)
    turn = math.radians(angle)
    reach_x = (width * abs(math.cos(turn)) + height * abs(math.sin(turn))) / 2
    reach_y = (width * abs(math.sin(turn)) + height * abs(math.cos(turn))) / 2
    return [(x - reach_x, y - reach_y), (x + reach_x, y + reach_y)]


def _moved(mark: Mark, dx: float, dy: float) -> Mark:
    if isinstance(mark, Stroke):
        return replace(mark, points=tuple((x + dx, y + dy) for x, y in mark.points))
    return replace(mark, x=mark.x + dx, y=mark.y + dy)
