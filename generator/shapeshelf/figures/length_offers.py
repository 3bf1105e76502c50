"""Ways to dimension a bond length: a line beside the bond, or text along the bond itself."""

import math
from collections.abc import Iterator
from functools import partial

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.model import Role, Stroke
from shapeshelf.figures.offers import ARROW, TEXT_SIZE, Candidate, Offer, sampled, straight
from shapeshelf.figures.outlines import arrowhead
from shapeshelf.figures.view_parts import Painted

Array = NDArray[np.float64]

_OFFSETS = (34.0, 42.0, 51.0, 60.0, 74.0, 90.0)
_WITHOUT_LINES = 26.0


def length_offers(one: Painted, atoms: tuple[int, ...], text: str) -> Iterator[Offer]:
    """Yield the ways to dimension the bond between two atoms of a view, with their costs."""
    for rank, offset in enumerate(_offsets(one, atoms)):
        for side in (1.0, -1.0):
            yield 4.0 + 3.0 * rank, partial(_length_candidate, one, atoms, side, offset, text)
    yield _WITHOUT_LINES, partial(_along_bond, one, atoms, text)


def _length_candidate(
    one: Painted, atoms: tuple[int, ...], side: float, offset: float, text: str
) -> Candidate:
    start, end = one.view.points[atoms[0]], one.view.points[atoms[1]]
    way = (end - start) / np.linalg.norm(end - start)
    normal = side * np.array([way[1], -way[0]])
    a, b = start + offset * normal, end + offset * normal
    feet = [
        (point + normal * (one.radii[atom] + 3), point + normal * (offset + 5))
        for point, atom in ((start, atoms[0]), (end, atoms[1]))
    ]
    path = np.concatenate([sampled(a, b), *(sampled(*foot) for foot in feet)])
    lines = (*(straight(*foot) for foot in feet), *_dimension_line(a, b))
    boxes, costs = _along_line(a, b, normal, text_width(text, TEXT_SIZE))
    return Candidate(lines, path, boxes, costs)


def _along_bond(one: Painted, atoms: tuple[int, ...], text: str) -> Candidate:
    """Return text beside the bond itself, for a bond that dimension lines cannot reach."""
    start, end = one.view.points[atoms[0]], one.view.points[atoms[1]]
    way = (end - start) / np.linalg.norm(end - start)
    width = text_width(text, TEXT_SIZE)
    tables = []
    for side in (1.0, -1.0):
        shift = side * 5.0 * np.array([way[1], -way[0]])
        tables.append(_along_line(start + shift, end + shift, shift, width))
        tables.append(_along_line(start + 0.4 * shift, end + 0.4 * shift, shift, width))
    boxes, costs = (np.concatenate(parts) for parts in zip(*tables, strict=True))
    return Candidate((), np.empty((0, 2)), boxes, costs)


def _offsets(one: Painted, atoms: tuple[int, ...]) -> list[float]:
    least = max(float(one.radii[atom]) for atom in atoms) + 8
    return [offset for offset in _OFFSETS if offset >= least]


def _along_line(a: Array, b: Array, normal: Array, width: float) -> tuple[Array, Array]:
    """Text above the line, readable from below or from the right, on either side of it."""
    turn = math.degrees(math.atan2(a[1] - b[1], b[0] - a[0]))
    if turn > 90.01:
        turn -= 180
    elif turn <= -89.99:
        turn += 180
    upward = np.array([-math.sin(math.radians(turn)), -math.cos(math.radians(turn))])
    height = TEXT_SIZE * 0.78
    spots = []
    for fraction, cost in ((0.5, 0.0), (0.42, 1.5), (0.58, 1.5)):
        middle = a + fraction * (b - a) + upward * (height / 2 + 4.0)
        spots.append((*middle, width, height, turn, cost))
    table = np.array(spots)
    return table[:, :5], table[:, 5] + (0.0 if upward @ normal > 0 else 1.0)


def _dimension_line(a: Array, b: Array) -> list[Stroke]:
    heading = math.atan2(b[1] - a[1], b[0] - a[0])
    ends = [(float(p[0]), float(p[1])) for p in (a, b)]
    return [
        straight(a, b),
        arrowhead(ends[0], heading + math.pi, ARROW, "soft", Role.DIMENSION),
        arrowhead(ends[1], heading, ARROW, "soft", Role.DIMENSION),
    ]
