"""Bonds on paper: lines by order, wedges and hashes by depth.

Wedged and hashed bonds follow "Graphical representation of stereochemical configuration
(IUPAC Recommendations 2006)", Pure Appl. Chem. 78 (2006) 1897: the narrow end at the atom
that is described, a solid wedge towards the viewer, a hashed one away; none on double bonds.
"""

import math
from dataclasses import dataclass

from shapeshelf.figures.model import Point, Role, Stroke, Style
from shapeshelf.figures.outlines import arrowhead

LINE_WIDTH = 3.0
_GAP = 3.4
"""Pixels between the middle of a bond and each line of a double bond."""
_WEDGE_HALF = 5.2
_HASH_STEP = 5.0
_SHORT_DASH = (5.0, 4.0)
_THINNER, _SHORTER = 0.8, 0.13
_WHOLE = 0.2
"""A bond order this near a whole number is drawn as that number."""


@dataclass(frozen=True, slots=True)
class Segment:
    """The visible part of a bond, from the described atom to the other one."""

    start: Point
    end: Point
    width: float = LINE_WIDTH

    @property
    def length(self) -> float:
        """Length in pixels."""
        return math.dist(self.start, self.end)


def trimmed(start: Point, end: Point, start_radius: float, end_radius: float) -> Segment | None:
    """Return the part of a bond between the rings of its atoms, ``None`` where none shows."""
    length = math.dist(start, end)
    if length <= start_radius + end_radius + 1:
        return None
    ux, uy = (end[0] - start[0]) / length, (end[1] - start[1]) / length
    return Segment(
        (start[0] + ux * start_radius, start[1] + uy * start_radius),
        (end[0] - ux * end_radius, end[1] - uy * end_radius),
    )


def lines(
    segment: Segment, order: float, dative: bool = False, inside: Point | None = None
) -> list[Stroke]:
    """Return one, two or three lines; a broken line for the part of a bond that is shared.

    In a ring, ``inside`` is its middle: the second line of a double bond lies there, shorter.
    """
    if dative:
        return _arrow(segment)
    whole = max(1, min(3, round(order) if _is_whole(order) else math.ceil(order)))
    last = () if _is_whole(order) else _SHORT_DASH
    if whole == 2 and inside is not None:
        return _double_in_ring(segment, inside, last)
    offsets = {1: [0.0], 2: [-1.0, 1.0], 3: [-1.9, 0.0, 1.9]}[whole]
    width = segment.width if whole == 1 else segment.width * _THINNER
    dashes = [()] * (whole - 1) + [last]
    return [
        _line(segment, offset * _GAP, Style("ink", None, width, dash))
        for offset, dash in zip(offsets, dashes, strict=True)
    ]


def wedge(segment: Segment) -> list[Stroke]:
    """Return a solid wedge, wide at the end nearer to the viewer."""
    left, right = _sides(segment, 1.0)
    return [Stroke((segment.start, left, right), Style(None, "ink"), Role.BOND, closed=True)]


def hashes(segment: Segment) -> list[Stroke]:
    """Return short bars, wider towards the far end."""
    count = max(3, round(segment.length / _HASH_STEP))
    fractions = [(index + 0.5) / count for index in range(count)]
    return [
        Stroke(_sides(segment, fraction), Style("ink", None, 1.9), Role.BOND)
        for fraction in fractions
    ]


def wedge_or_hash(segment: Segment, towards_viewer: bool) -> list[Stroke]:
    """Return a solid wedge towards the viewer, a hashed one away."""
    return wedge(segment) if towards_viewer else hashes(segment)


def rim(segment: Segment) -> Stroke:
    """Return a broad line of paper to set a nearer bond off from what it crosses."""
    short = 0.14
    points = (_along(segment, short), _along(segment, 1 - short))
    return Stroke(points, Style("paper", None, segment.width + 6), Role.FRAME)


def _is_whole(order: float) -> bool:
    return abs(order - round(order)) <= _WHOLE


def _double_in_ring(segment: Segment, inside: Point, dash: tuple[float, ...]) -> list[Stroke]:
    """Return a line from corner to corner and a shorter one on the side of ``inside``."""
    (nx, ny), (x, y) = _normal(segment), _along(segment, 0.5)
    side = math.copysign(2 * _GAP, (inside[0] - x) * nx + (inside[1] - y) * ny)
    short = Segment(_along(segment, _SHORTER), _along(segment, 1 - _SHORTER), segment.width)
    return [
        _line(segment, 0.0, Style("ink", None, segment.width)),
        _line(short, side, Style("ink", None, segment.width * _THINNER, dash)),
    ]


def _arrow(segment: Segment) -> list[Stroke]:
    heading = math.atan2(segment.end[1] - segment.start[1], segment.end[0] - segment.start[0])
    shaft = Segment(segment.start, _along(segment, 1 - 8 / max(segment.length, 16)))
    head = arrowhead(segment.end, heading, 13, "ink", Role.BOND)
    return [_line(shaft, 0.0, Style("ink", None, segment.width * _THINNER)), head]


def _line(segment: Segment, offset: float, style: Style) -> Stroke:
    nx, ny = _normal(segment)
    points = tuple((x + nx * offset, y + ny * offset) for x, y in (segment.start, segment.end))
    return Stroke(points, style, Role.BOND)


def _sides(segment: Segment, fraction: float) -> tuple[Point, Point]:
    x, y = _along(segment, fraction)
    nx, ny = _normal(segment)
    half = _WEDGE_HALF * max(fraction, 0.18)
    return (x + nx * half, y + ny * half), (x - nx * half, y - ny * half)


def _along(segment: Segment, fraction: float) -> Point:
    (x0, y0), (x1, y1) = segment.start, segment.end
    return (x0 + fraction * (x1 - x0), y0 + fraction * (y1 - y0))


def _normal(segment: Segment) -> Point:
    length = segment.length or 1.0
    (x0, y0), (x1, y1) = segment.start, segment.end
    return ((y0 - y1) / length, (x1 - x0) / length)
