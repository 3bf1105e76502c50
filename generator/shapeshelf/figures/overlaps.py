"""Does any lettering of a drawing lie on other lettering, an atom, a bond or a lobe?

An independent check of finished drawings: it knows nothing of how labels were placed. Boxes
are those of the widest face the figures may be shown in.
"""

import math
from dataclasses import dataclass
from itertools import pairwise

from shapeshelf.figures.framing import lettering_box
from shapeshelf.figures.model import Drawing, Lettering, Point, Role, Stroke

_TOUCHING = 0.5
"""Overlaps below half a pixel are not seen."""
_CURVE_PIECES = 8
_SOLID = (Role.ATOM, Role.BOND, Role.LOBE, Role.ELECTRON)


@dataclass(frozen=True, slots=True)
class Overlap:
    """A label and what it lies on."""

    label: str
    on: str
    depth: float
    """Pixels by which the two run into one another."""


def label_overlaps(drawing: Drawing) -> list[Overlap]:
    """Return every overlap of lettering with lettering, atoms, bonds or lobes.

    A symbol lies in the ring of its atom, and what is drawn before a ring is covered by it: a
    symbol is only struck by what is drawn after it.
    """
    letters = [mark for mark in drawing.marks if isinstance(mark, Lettering)]
    boxes = [_corners(mark) for mark in letters]
    found = _between_letters(letters, boxes)
    solids: list[Stroke] = []
    for mark in reversed(drawing.marks):
        if isinstance(mark, Stroke) and mark.role in _SOLID:
            solids.append(mark)
        elif isinstance(mark, Lettering) and mark.role is Role.SYMBOL:
            found += _on_solids(mark, _inner(_corners(mark)), solids)
    for mark, box in zip(letters, boxes, strict=True):
        if mark.role is not Role.SYMBOL:
            found += _on_solids(mark, box, solids)
    return found


def _inner(box: list[Point]) -> list[Point]:
    """Return the middle three quarters of a symbol's box: letters are narrower than it."""
    x, y = (sum(values) / 4 for values in zip(*box, strict=True))
    return [(x + 0.75 * (px - x), y + 0.75 * (py - y)) for px, py in box]


def _between_letters(letters: list[Lettering], boxes: list[list[Point]]) -> list[Overlap]:
    found = []
    for index, one in enumerate(letters):
        for other in range(index):
            depth = _common_depth(boxes[index], boxes[other])
            if depth > _TOUCHING:
                found.append(Overlap(one.text, letters[other].text, depth))
    return found


def _on_solids(mark: Lettering, box: list[Point], solids: list[Stroke]) -> list[Overlap]:
    found = []
    for solid in solids:
        depth = max(_common_depth(box, shape) for shape in _shapes(solid))
        if depth > _TOUCHING:
            found.append(Overlap(mark.text, solid.role.value, depth))
    return found


def _shapes(solid: Stroke) -> list[list[Point]]:
    """Return the convex outlines a stroke covers: itself where closed, else its pieces."""
    outline = _outline(solid)
    if solid.closed:
        return [outline]
    return [_thick(a, b, solid.style.width / 2) for a, b in pairwise(outline)]


def _thick(a: Point, b: Point, half: float) -> list[Point]:
    length = math.dist(a, b) or 1.0
    nx, ny = (a[1] - b[1]) / length * half, (b[0] - a[0]) / length * half
    return [
        (a[0] + nx, a[1] + ny),
        (b[0] + nx, b[1] + ny),
        (b[0] - nx, b[1] - ny),
        (a[0] - nx, a[1] - ny),
    ]


def _corners(mark: Lettering) -> list[Point]:
    x, y, width, height, angle = lettering_box(mark)
    turn = math.radians(angle)
    along = (math.cos(turn) * width / 2, -math.sin(turn) * width / 2)
    down = (math.sin(turn) * height / 2, math.cos(turn) * height / 2)
    return [
        (x + i * along[0] + j * down[0], y + i * along[1] + j * down[1])
        for i, j in ((-1, -1), (1, -1), (1, 1), (-1, 1))
    ]


def _outline(stroke: Stroke) -> list[Point]:
    """Return the stroke as a polyline; curves are followed in small steps."""
    if not stroke.curved:
        return list(stroke.points)
    points = [stroke.points[0]]
    for start in range(0, len(stroke.points) - 3, 3):
        points += _follow(stroke.points[start : start + 4])
    return points


def _follow(curve: tuple[Point, ...]) -> list[Point]:
    points = []
    for step in range(1, _CURVE_PIECES + 1):
        t = step / _CURVE_PIECES
        weights = ((1 - t) ** 3, 3 * t * (1 - t) ** 2, 3 * t * t * (1 - t), t**3)
        points.append(
            (
                sum(w * p[0] for w, p in zip(weights, curve, strict=True)),
                sum(w * p[1] for w, p in zip(weights, curve, strict=True)),
            )
        )
    return points


def _common_depth(one: list[Point], other: list[Point]) -> float:
    """Return how deep two convex outlines run into one another, negative where they are apart."""
    depth = math.inf
    for shape in (one, other):
        for (x0, y0), (x1, y1) in zip(shape, shape[1:] + shape[:1], strict=True):
            length = math.hypot(x1 - x0, y1 - y0)
            if length < 1e-9:
                continue
            normal = ((y1 - y0) / length, (x0 - x1) / length)
            low, high = _shadow(one, normal)
            other_low, other_high = _shadow(other, normal)
            depth = min(depth, high - other_low, other_high - low)
            if depth <= 0:
                return depth
    return depth


def _shadow(shape: list[Point], normal: Point) -> Point:
    along = [x * normal[0] + y * normal[1] for x, y in shape]
    return min(along), max(along)
