"""The scale of a shape: one line a compound, its angles as points on a common degree scale.

Points differ by what they rest on as in the deviation strip; dashed lines run down from the
ideal angles. The whole line of a compound leads to it, so that points which coincide are no
harder to reach than others.
"""

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass

from shapeshelf.figures.canvas import render, text_width
from shapeshelf.figures.model import Drawing, Lettering, Link, Mark, Role, Stroke, Style, Svg
from shapeshelf.figures.strip import symbol

WIDTH = 900.0
_RIGHT, _GAP = 884.0, 18.0
_ROW, _TOP, _BOTTOM, _LEGEND = 26.0, 26.0, 26.0, 24.0
_LABEL_SIZE, _TICK_SIZE = 14.0, 12.5
_LEVEL, _APART, _INSET = 17.0, 6.0, 1.0
_DOWN = {"calculated": 5.0, "ideal": 4.0}
"""Pixels by which what the strip draws above its line is let down."""
_MARGIN_DEGREES = 4.0
_STEPS = (1.0, 2.0, 5.0, 10.0, 20.0, 30.0)
_MOST_TICKS = 12
_LARGEST_DEGREES = 180.0
_KINDS = ("ideal", "measured", "calculated", "supplied", "model")


@dataclass(frozen=True, slots=True)
class ScaleRow:
    """One compound on the scale."""

    label: str
    """Its formula as lettering, ``SF_{4}``."""
    points: tuple[tuple[float, str], ...]
    """(degrees, what the value rests on)."""
    name: str = ""
    address: str = ""
    """Of its page, seen from the page the scale stands on; empty for a line without a link."""


def angle_scale(shape: str, rows: Sequence[ScaleRow], ideals: Sequence[float]) -> Svg | None:
    """Return the scale; ``None`` where no compound has an angle. Angles in degrees."""
    drawing = scale_drawing(shape, rows, ideals)
    return render(drawing) if drawing else None


def scale_drawing(shape: str, rows: Sequence[ScaleRow], ideals: Sequence[float]) -> Drawing | None:
    """Return the scale as data."""
    held = [row for row in rows if row.points]
    if not held:
        return None
    left = max(text_width(row.label, _LABEL_SIZE, bold=True) for row in held) + _GAP
    scale = _Scale(left, *_span(held, ideals))
    levels = _levels(scale, ideals)
    top = _TOP + max(levels.values(), default=0) * _LEVEL
    foot = top + len(held) * _ROW
    marks = [*_ideal_marks(scale, levels, top, foot), *_tick_marks(scale, foot)]
    for index, row in enumerate(held):
        marks += _row_marks(scale, row, top + (index + 0.5) * _ROW)
    marks += _legend(held, bool(levels), left, foot + _BOTTOM + 14)
    title = f"Angles of our {shape} compounds"
    height = foot + _BOTTOM + _LEGEND
    links = _links(held, top)
    return Drawing("scale", WIDTH, height, tuple(marks), title, _in_words(held, ideals), links)


@dataclass(frozen=True, slots=True)
class _Scale:
    left: float
    least: float
    most: float

    def at(self, degrees: float) -> float:
        """Return x in pixels."""
        share = (degrees - self.least) / (self.most - self.least)
        return self.left + share * (_RIGHT - self.left)


def _span(rows: Sequence[ScaleRow], ideals: Sequence[float]) -> tuple[float, float]:
    values = [degrees for row in rows for degrees, _ in row.points]
    near = [ideal for ideal in ideals if min(values) - 15 <= ideal <= max(values) + 15]
    everything = [*values, *near]
    least = math.floor((min(everything) - _MARGIN_DEGREES) / 5) * 5
    most = math.ceil((max(everything) + _MARGIN_DEGREES) / 5) * 5
    return float(least), float(most)


def _levels(scale: _Scale, ideals: Sequence[float]) -> dict[float, int]:
    """Return on which line above the scale each ideal is lettered: the lowest with room."""
    levels: dict[float, int] = {}
    ends: list[float] = []
    for degrees in ideals:
        if not scale.least <= degrees <= scale.most:
            continue
        reach = (text_width(f"{degrees:g}°", _TICK_SIZE) + _APART) / 2
        x = scale.at(degrees)
        level = next((level for level, end in enumerate(ends) if end <= x - reach), len(ends))
        ends[level : level + 1] = [x + reach]
        levels[degrees] = level
    return levels


def _ideal_marks(scale: _Scale, levels: Mapping[float, int], top: float, foot: float) -> list[Mark]:
    marks: list[Mark] = []
    for degrees, level in levels.items():
        x, y = scale.at(degrees), top - 10 - level * _LEVEL
        line = Style("soft", None, 1.4, (5, 3))
        marks.append(Stroke(((x, top - 4), (x, foot)), line, Role.AXIS))
        marks.append(Lettering(x, y, f"{degrees:g}°", _TICK_SIZE, colour="soft"))
    return marks


def _tick_marks(scale: _Scale, foot: float) -> list[Mark]:
    span = scale.most - scale.least
    step = next(step for step in _STEPS if span / step <= _MOST_TICKS)
    marks: list[Mark] = [
        Stroke(((scale.left, foot), (_RIGHT, foot)), Style("line", None, 1.0), Role.AXIS)
    ]
    first = math.ceil(scale.least / step)
    for count in range(first, math.floor(scale.most / step) + 1):
        degrees = count * step
        if degrees > _LARGEST_DEGREES:
            continue
        x = scale.at(degrees)
        marks.append(Stroke(((x, foot), (x, foot + 5)), Style("line", None, 1.0), Role.AXIS))
        marks.append(Lettering(x, foot + 19, f"{degrees:g}°", _TICK_SIZE, colour="soft"))
    return marks


def _row_marks(scale: _Scale, row: ScaleRow, y: float) -> list[Mark]:
    marks: list[Mark] = [
        Stroke(((scale.left, y), (_RIGHT, y)), Style("band", None, 1.0), Role.AXIS),
        Lettering(scale.left - _GAP / 2, y + 5, row.label, _LABEL_SIZE, anchor="end", bold=True),
    ]
    return [*marks, *(_symbol(kind, scale.at(degrees), y) for degrees, kind in row.points)]


def _symbol(kind: str, x: float, y: float) -> Stroke:
    """Return the mark of the deviation strip with its middle on the line."""
    return symbol(kind, x, y + _DOWN.get(kind, 0.0))


def _links(rows: Sequence[ScaleRow], top: float) -> tuple[Link, ...]:
    return tuple(
        Link(row.address, _told(row), _INSET, top + index * _ROW, WIDTH - 2 * _INSET, _ROW)
        for index, row in enumerate(rows)
        if row.address
    )


def _told(row: ScaleRow) -> str:
    angles = ", ".join(f"{degrees:.1f}° {kind}" for degrees, kind in sorted(row.points))
    return f"{row.name}: {angles}"


def _legend(rows: Sequence[ScaleRow], ideal: bool, left: float, y: float) -> list[Mark]:
    shown = {kind for row in rows for _, kind in row.points} | ({"ideal"} if ideal else set())
    marks: list[Mark] = []
    x = left + 6
    for kind in (kind for kind in _KINDS if kind in shown):
        marks.append(_symbol(kind, x, y))
        marks.append(Lettering(x + 11, y + 4.5, kind, _TICK_SIZE, anchor="start", colour="soft"))
        x += 11 + text_width(kind, _TICK_SIZE) + 26
    return marks


def _in_words(rows: Sequence[ScaleRow], ideals: Sequence[float]) -> str:
    values = [degrees for row in rows for degrees, _ in row.points]
    ideal = ", ".join(f"{degrees:g}°" for degrees in ideals)
    told = f" Ideal: {ideal}." if ideal else ""
    return f"{len(rows)} compounds, angles from {min(values):.1f}° to {max(values):.1f}°.{told}"
