"""The two frames of a parity plot: their scales, ticks, diagonal, band and legend."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from shapeshelf.calculation.parity import Deviation
from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.model import Lettering, Mark, Point, Role, Stroke, Style
from shapeshelf.figures.numbers import MINUS

WIDTH = 360.0
_LEFT, _RIGHT, _TOP = 44.0, 343.0, 30.0
_SIDE = _RIGHT - _LEFT
_FOOT = _TOP + _SIDE
_LOWER_TOP, _LOWER_FOOT = _FOOT + 68.0, _FOOT + 168.0
_LEGEND = _LOWER_FOOT + 16.0
HEIGHT = _LEGEND + 16.0
UPPER = (_LEFT + 3.0, _TOP + 3.0, _RIGHT - 3.0, _FOOT - 3.0)
"""Left, top, right and bottom of the upper frame, within its line."""
_TITLE_SIZE, _SIZE = 16.0, 13.0
_TICK = 5.0
_STEPS = (0.1, 0.2, 0.5, 1.0, 2.0, 5.0, 10.0, 15.0, 30.0)
_MOST_TICKS = 7
_MARGIN = 0.03
"""Paper between the outermost value and the frame, as a share of the span."""
_SHOWN = 0.97
"""So many of the deviations lie within the lower frame; the rest point beyond it."""
_REACHES = (0.2, 0.5, 1.0, 1.5, 2.0, 3.0, 5.0, 10.0, 15.0, 20.0, 30.0)
_LARGEST = {"angle": 180.0, "dipole": math.inf}
_TICK_UNITS = {"angle": "°", "dipole": ""}
_MEASURED = {"angle": "measured", "dipole": "measured, D"}


@dataclass(frozen=True, slots=True)
class Scales:
    """What the drawings of one quantity share, in its unit."""

    quantity: str
    least: float
    most: float
    reach: float
    """The lower frame ends here, to either side."""

    def across(self, measured: float) -> float:
        """Return x in pixels."""
        return _LEFT + _SIDE * (measured - self.least) / (self.most - self.least)

    def up(self, found: float) -> float:
        """Return y in pixels in the upper frame."""
        return _FOOT - _SIDE * (found - self.least) / (self.most - self.least)

    def off(self, deviation: float) -> float:
        """Return y in pixels in the lower frame, at its edge for what lies beyond."""
        share = max(-1.0, min(1.0, deviation / self.reach))
        return (_LOWER_TOP + _LOWER_FOOT) / 2 - share * (_LOWER_FOOT - _LOWER_TOP) / 2


def scales_of(quantity: str, deviations: Sequence[Deviation]) -> Scales:
    """Return scales on which all of these values have their place."""
    values = [value for one in deviations for value in (one.point.measured, one.found)]
    margin = _MARGIN * ((max(values) - min(values)) or 1.0)
    shown = float(np.quantile([abs(one.off) for one in deviations], _SHOWN))
    reach = next((reach for reach in _REACHES if reach >= shown), float(math.ceil(shown)))
    return Scales(quantity, min(values) - margin, max(values) + margin, reach)


def title_marks(name: str, told: str) -> list[Mark]:
    """Return the name of the method and what its band tells; nothing where there is no band."""
    title = Lettering(_LEFT, 18.0, name, _TITLE_SIZE, anchor="start", bold=True)
    if not told:
        return [title]
    right = _RIGHT - text_width(told, _SIZE) - 7
    swatch = _rectangle(right - 18, 6.0, right, 20.0, Style(None, "band"))
    return [title, swatch, Lettering(right + 7, 18.0, told, _SIZE, anchor="start", colour="soft")]


def upper_marks(half_width: float, scales: Scales) -> list[Mark]:
    """Return the upper frame with band and diagonal; a half-width of zero draws no band."""
    marks: list[Mark] = [_band(half_width, scales)] if half_width else []
    marks.append(Stroke(diagonal(scales), Style("soft", None, 1.2), Role.AXIS))
    marks.append(_rectangle(_LEFT, _TOP, _RIGHT, _FOOT, Style("line")))
    for value in _ticks(scales):
        x, y = scales.across(value), scales.up(value)
        text = f"{value:g}{_TICK_UNITS[scales.quantity]}"
        marks += [_line((x, _FOOT), (x, _FOOT + _TICK)), _line((_LEFT - _TICK, y), (_LEFT, y))]
        marks += [
            Lettering(x, _FOOT + 19, text, _SIZE, colour="soft"),
            Lettering(_LEFT - 8, y + 4.5, text, _SIZE, colour="soft", anchor="end"),
        ]
    measured = _MEASURED[scales.quantity]
    return [*marks, Lettering((_LEFT + _RIGHT) / 2, _FOOT + 37, measured, _SIZE, colour="soft")]


def lower_marks(name: str, half_width: float, scales: Scales) -> list[Mark]:
    """Return the lower frame, its zero on the height of agreement."""
    marks: list[Mark] = [
        Lettering(_LEFT, _LOWER_TOP - 8, name, _SIZE, anchor="start", colour="soft")
    ]
    if half_width:
        ends = (scales.off(half_width), scales.off(-half_width))
        marks.append(_rectangle(_LEFT, ends[0], _RIGHT, ends[1], Style(None, "band")))
    middle = scales.off(0.0)
    marks.append(Stroke(((_LEFT, middle), (_RIGHT, middle)), Style("soft", None, 1.2), Role.AXIS))
    marks.append(_rectangle(_LEFT, _LOWER_TOP, _RIGHT, _LOWER_FOOT, Style("line")))
    for value in _ticks(scales):
        x = scales.across(value)
        marks.append(_line((x, _LOWER_TOP - _TICK), (x, _LOWER_TOP)))
    for value in (scales.reach, 0.0, -scales.reach):
        y = scales.off(value)
        sign = "+" if value > 0 else MINUS if value < 0 else ""
        text = f"{sign}{abs(value):g}{_TICK_UNITS[scales.quantity]}"
        marks.append(_line((_LEFT - _TICK, y), (_LEFT, y)))
        marks.append(Lettering(_LEFT - 8, y + 4.5, text, _SIZE, colour="soft", anchor="end"))
    return marks


def legend_marks(entries: Sequence[tuple[Stroke, str]]) -> list[Mark]:
    """Return symbols, drawn about the origin, with their meanings in one line at the foot."""
    marks: list[Mark] = []
    x, y = _LEFT + 6.0, _LEGEND
    for stroke, meaning in entries:
        points = tuple((x + px, y + py) for px, py in stroke.points)
        marks.append(Stroke(points, stroke.style, stroke.role, stroke.curved, stroke.closed))
        marks.append(Lettering(x + 10, y + 4.5, meaning, _SIZE, anchor="start", colour="soft"))
        x += 10 + text_width(meaning, _SIZE) + 18
    return marks


def diagonal(scales: Scales) -> tuple[Point, Point]:
    """Return the ends of the line of agreement, in pixels."""
    return (
        (scales.across(scales.least), scales.up(scales.least)),
        (scales.across(scales.most), scales.up(scales.most)),
    )


def _band(half_width: float, scales: Scales) -> Stroke:
    """Return the strip around the diagonal, cut off at the frame."""
    least, most = scales.least, scales.most
    width = min(half_width, most - least)
    corners = (
        *((least, least), (least, least + width), (most - width, most)),
        *((most, most), (most, most - width), (least + width, least)),
    )
    points = tuple((scales.across(measured), scales.up(found)) for measured, found in corners)
    return Stroke(points, Style(None, "band"), Role.AXIS, closed=True)


def _ticks(scales: Scales) -> list[float]:
    span = scales.most - scales.least
    step = next((step for step in _STEPS if span / step <= _MOST_TICKS), span / 2)
    counts = range(math.ceil(scales.least / step), math.floor(scales.most / step) + 1)
    ticks = [round(count * step, 6) for count in counts]
    return [tick for tick in ticks if 0.0 <= tick <= _LARGEST[scales.quantity]]


def _line(start: Point, end: Point) -> Stroke:
    return Stroke((start, end), Style("line"), Role.AXIS)


def _rectangle(left: float, top: float, right: float, foot: float, style: Style) -> Stroke:
    corners = ((left, top), (right, top), (right, foot), (left, foot))
    return Stroke(corners, style, Role.AXIS, closed=True)
