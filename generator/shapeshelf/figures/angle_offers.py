"""Ways to dimension an angle: arcs at several radii, text outside or inside them."""

import math
from collections.abc import Iterator
from dataclasses import dataclass
from functools import partial

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.model import Role, Stroke
from shapeshelf.figures.offers import ARROW, LINE, TEXT_SIZE, Candidate, Offer, straight
from shapeshelf.figures.outlines import arc, arrowhead
from shapeshelf.figures.view_parts import Painted

Array = NDArray[np.float64]

_ARC_GAPS = (14.0, 22.0, 31.0, 41.0)
"""Radii of arcs inside a bond, beyond the ring of the centre."""
_OUTER_GAP = 9.0
_FRACTIONS = (0.5, 0.4, 0.6, 0.28, 0.72, 0.16, 0.84)


def angle_offers(one: Painted, atoms: tuple[int, ...], text: str) -> Iterator[Offer]:
    """Yield the ways to dimension an angle (centre second) of a view, with their costs."""
    centre = one.view.points[atoms[1]]
    ends = one.view.points[[atoms[0], atoms[2]]] - centre
    bonds = np.hypot(*ends.T)
    first, last = (math.atan2(end[1], end[0]) for end in ends)
    sweep = math.remainder(last - first, 2 * math.pi)
    sweeps = [sweep] if abs(abs(sweep) - math.pi) > 1e-3 else [math.pi, -math.pi]
    for rank, (radius, outer) in enumerate(_radii(one, atoms, bonds)):
        for turn in sweeps:
            sector = _Sector(centre, bonds, radius, outer, first, turn)
            yield 2.0 + 2.0 * rank + 9.0 * outer, partial(_arc_candidate, one, atoms, sector, text)


@dataclass(frozen=True, slots=True)
class _Sector:
    """An arc about a centre: pixels, radians clockwise on paper."""

    centre: Array
    bonds: Array
    """Drawn lengths of the two bonds."""
    radius: float
    outer: bool
    """Beyond the ligands, on extension lines."""
    first: float
    sweep: float


def _radii(one: Painted, atoms: tuple[int, ...], bonds: Array) -> list[tuple[float, bool]]:
    """Return radii between the rings of centre and ligands, then one beyond the ligands."""
    inner = float(one.radii[atoms[1]])
    limit = min(float(bond - one.radii[atom]) for bond, atom in zip(bonds, atoms[::2], strict=True))
    inside = [(inner + gap, False) for gap in _ARC_GAPS if inner + gap <= limit - 5]
    beyond = max(float(b + one.radii[atom]) for b, atom in zip(bonds, atoms[::2], strict=True))
    return [*inside, (beyond + _OUTER_GAP, True)]


def _arc_candidate(one: Painted, atoms: tuple[int, ...], sector: _Sector, text: str) -> Candidate:
    centre, radius, first, sweep = sector.centre, sector.radius, sector.first, sector.sweep
    turns = first + np.linspace(0, sweep, max(6, int(abs(sweep) * radius / 4)))
    path = centre + radius * np.column_stack([np.cos(turns), np.sin(turns)])
    chain = arc((float(centre[0]), float(centre[1])), radius, first, sweep, _pieces(sweep))
    lines = [Stroke(tuple(chain), LINE, Role.DIMENSION, curved=True)]
    lines += _arc_heads(path, radius, first, sweep)
    if sector.outer:
        lines += _extensions(one, atoms, sector)
    boxes, costs = _around_arc(centre, radius, first, sweep, text)
    return Candidate(tuple(lines), path[1:-1], boxes, costs)


def _pieces(sweep: float) -> int:
    return max(1, math.ceil(abs(sweep) / 1.6))


def _extensions(one: Painted, atoms: tuple[int, ...], sector: _Sector) -> list[Stroke]:
    """Return short lines that carry two bonds on, past their ligands, to an outer arc."""
    lines = []
    ways = (sector.first, sector.first + sector.sweep)
    for atom, bond, way in zip(atoms[::2], sector.bonds, ways, strict=True):
        heading = np.array([math.cos(way), math.sin(way)])
        foot = sector.centre + heading * (bond + float(one.radii[atom]) + 2)
        lines.append(straight(foot, sector.centre + heading * (sector.radius + 4)))
    return lines


def _arc_heads(path: Array, radius: float, first: float, sweep: float) -> list[Stroke]:
    if abs(sweep) * radius < 3.2 * ARROW:
        return []
    sign = math.copysign(1.0, sweep)
    lean = sign * ARROW / radius / 2
    start, end = first - sign * math.pi / 2 + lean, first + sweep + sign * math.pi / 2 - lean
    tips = ((float(x), float(y)) for x, y in path[[0, -1]])
    return [
        arrowhead(tip, heading, ARROW, "soft", Role.DIMENSION)
        for tip, heading in zip(tips, (start, end), strict=True)
    ]


def _around_arc(
    centre: Array, radius: float, first: float, sweep: float, text: str
) -> tuple[Array, Array]:
    """Level text outside the arc, or inside it where that has room."""
    width, height = text_width(text, TEXT_SIZE), TEXT_SIZE * 0.78
    rows = []
    for fraction in _FRACTIONS:
        way = first + fraction * sweep
        heading = np.array([math.cos(way), math.sin(way)])
        half = abs(heading[0]) * width / 2 + abs(heading[1]) * height / 2
        for gap, side, cost in ((4, 1, 0.0), (9, 1, 2.0), (4, -1, 3.0), (16, 1, 5.0)):
            spot = centre + heading * (radius + side * (half + gap))
            rows.append((*spot, width, height, 0.0, cost + 6 * abs(fraction - 0.5)))
    table = np.array(rows)
    return table[:, :5], table[:, 5]
