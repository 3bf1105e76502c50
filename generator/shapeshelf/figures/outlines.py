"""Outlines the figures share: rings, lobes, arrowheads. Pixels, y downwards."""

import math

from shapeshelf.figures.model import Point, Role, Stroke, Style

_QUARTER = 0.5522847498
"""Handle length of a Bézier quarter circle, in radii."""


def ring(x: float, y: float, radius: float, style: Style, role: Role = Role.ATOM) -> Stroke:
    """Return a circle as one closed path of four curves."""
    r, k = radius, radius * _QUARTER
    points = (
        *((x + r, y), (x + r, y + k), (x + k, y + r)),
        *((x, y + r), (x - k, y + r), (x - r, y + k)),
        *((x - r, y), (x - r, y - k), (x - k, y - r)),
        *((x, y - r), (x + k, y - r), (x + r, y - k), (x + r, y)),
    )
    return Stroke(points, style, role, curved=True, closed=True)


def pill(x: float, y: float, width: float, height: float, style: Style) -> Stroke:
    """Return a lying outline with round ends about (x, y)."""
    r, reach = height / 2, max(0.0, (width - height) / 2)
    right = arc((x + reach, y), r, -math.pi / 2, math.pi, 2)
    left = arc((x - reach, y), r, math.pi / 2, math.pi, 2)
    over = _third_points(right[-1], left[0])
    back = _third_points(left[-1], right[0])
    points = (*right, *over, *left, *back, right[0])
    return Stroke(points, style, Role.ATOM, curved=True, closed=True)


def lobe(apex: Point, middle: Point, radius: float, style: Style) -> Stroke:
    """Return a lobe: tangents from ``apex`` to a circle about ``middle``; seen end on, a ring."""
    dx, dy = middle[0] - apex[0], middle[1] - apex[1]
    distance = math.hypot(dx, dy)
    if distance <= radius * 1.05:
        return ring(*middle, radius, style, Role.LOBE)
    heading, half = math.atan2(dy, dx), math.acos(radius / distance)
    sweep = 2 * (math.pi - half)
    round_end = arc(middle, radius, heading + math.pi + half, sweep, 3)
    line_in = _third_points(apex, round_end[0])
    line_out = _third_points(round_end[-1], apex)
    return Stroke(
        (apex, *line_in, *round_end, *line_out, apex), style, Role.LOBE, curved=True, closed=True
    )


def arc(middle: Point, radius: float, start: float, sweep: float, pieces: int) -> list[Point]:
    """Return a Bézier chain along a circle; angles in radians, growing clockwise on paper."""
    step = sweep / pieces
    handle = 4 / 3 * math.tan(step / 4) * radius
    points = [_on_circle(middle, radius, start)]
    for piece in range(pieces):
        one, other = start + piece * step, start + (piece + 1) * step
        (x0, y0), (x3, y3) = points[-1], _on_circle(middle, radius, other)
        points += [
            (x0 - handle * math.sin(one), y0 + handle * math.cos(one)),
            (x3 + handle * math.sin(other), y3 - handle * math.cos(other)),
            (x3, y3),
        ]
    return points


def arrowhead(tip: Point, heading: float, length: float, colour: str, role: Role) -> Stroke:
    """Return a slim filled arrowhead; ``heading`` in radians clockwise on paper."""
    half = length * 0.17
    back = (tip[0] - length * math.cos(heading), tip[1] - length * math.sin(heading))
    across = (-math.sin(heading) * half, math.cos(heading) * half)
    points = (
        tip,
        (back[0] + across[0], back[1] + across[1]),
        (back[0] - across[0], back[1] - across[1]),
    )
    return Stroke(points, Style(None, colour), role, closed=True)


def electron_dots(apex: Point, middle: Point, electrons: int, apart: float) -> list[Stroke]:
    """Return one dot or two, side by side across the direction from ``apex``."""
    heading = math.atan2(middle[1] - apex[1], middle[0] - apex[0])
    offsets = (0.0,) if electrons == 1 else (-apart, apart)
    return [
        ring(
            middle[0] - offset * math.sin(heading),
            middle[1] + offset * math.cos(heading),
            2.7,
            Style(None, "ink"),
            Role.ELECTRON,
        )
        for offset in offsets
    ]


def _on_circle(middle: Point, radius: float, angle: float) -> Point:
    return (middle[0] + radius * math.cos(angle), middle[1] + radius * math.sin(angle))


def _third_points(start: Point, end: Point) -> tuple[Point, Point]:
    (x0, y0), (x1, y1) = start, end
    return (
        ((2 * x0 + x1) / 3, (2 * y0 + y1) / 3),
        ((x0 + 2 * x1) / 3, (y0 + 2 * y1) / 3),
    )
