"""The scale of a shape: one line a compound, its angles as points on a common degree scale.

Points differ by what they rest on as in the deviation strip; dashed lines run down from the
ideal angles.
"""

import math
from collections.abc import Sequence
from dataclasses import dataclass

from shapeshelf.figures.canvas import render, text_width
from shapeshelf.figures.model import Drawing, Lettering, Mark, Role, Stroke, Style, Svg
from shapeshelf.figures.strip import symbol

WIDTH = 900.0
_RIGHT, _GAP = 884.0, 18.0
_ROW, _TOP, _BOTTOM, _LEGEND = 24.0, 26.0, 26.0, 24.0
_LABEL_SIZE, _TICK_SIZE = 14.0, 12.5
_MARGIN_DEGREES = 4.0
_STEPS = (1.0, 2.0, 5.0, 10.0, 20.0, 30.0)
_MOST_TICKS = 12
_LARGEST_DEGREES = 180.0
_KINDS = ("measured", "calculated", "supplied", "model")


@dataclass(frozen=True, slots=True)
class ScaleRow:
    """One compound on the scale."""

    label: str
    """Its formula as lettering, ``SF_{4}``."""
    points: tuple[tuple[float, str], ...]
    """(degrees, what the value rests on)."""


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
    foot = _TOP + len(held) * _ROW
    marks = [*_ideal_marks(scale, ideals, foot), *_tick_marks(scale, foot)]
    for index, row in enumerate(held):
        marks += _row_marks(scale, row, _TOP + (index + 0.5) * _ROW)
    marks += _legend(held, left, foot + _BOTTOM + 14)
    title = f"Angles of our {shape} compounds"
    height = foot + _BOTTOM + _LEGEND
    return Drawing("scale", WIDTH, height, tuple(marks), title, _in_words(held, ideals))


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


def _ideal_marks(scale: _Scale, ideals: Sequence[float], foot: float) -> list[Mark]:
    marks: list[Mark] = []
    for degrees in ideals:
        if not scale.least <= degrees <= scale.most:
            continue
        x = scale.at(degrees)
        marks.append(
            Stroke(((x, _TOP - 4), (x, foot)), Style("soft", None, 1.4, (5, 3)), Role.AXIS)
        )
        marks.append(Lettering(x, _TOP - 10, f"ideal {degrees:g}°", _TICK_SIZE, colour="soft"))
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
    return [*marks, *(symbol(kind, scale.at(degrees), y) for degrees, kind in row.points)]


def _legend(rows: Sequence[ScaleRow], left: float, y: float) -> list[Mark]:
    shown = {kind for row in rows for _, kind in row.points}
    marks: list[Mark] = []
    x = left + 6
    for kind in (kind for kind in _KINDS if kind in shown):
        marks.append(symbol(kind, x, y))
        marks.append(Lettering(x + 11, y + 4.5, kind, _TICK_SIZE, anchor="start", colour="soft"))
        x += 11 + text_width(kind, _TICK_SIZE) + 26
    return marks


def _in_words(rows: Sequence[ScaleRow], ideals: Sequence[float]) -> str:
    values = [degrees for row in rows for degrees, _ in row.points]
    ideal = ", ".join(f"{degrees:g}°" for degrees in ideals)
    told = f" Ideal: {ideal}." if ideal else ""
    return f"{len(rows)} compounds, angles from {min(values):.1f}° to {max(values):.1f}°.{told}"
