"""Dimensions of a sheet: every length and angle once, in a view that shows it true.

Candidates (view, member, distance, side) are costed against everything already drawn and the
cheapest that touches no ring, label or lobe wins. Lines, arrowheads and lettering follow the
customs of engineering drawing (ISO 129-1, recalled from memory): text above its line, readable
from below or from the right, underlined where the drawing is not to scale for it.
"""

import math
from collections.abc import Callable, Iterator
from dataclasses import dataclass
from functools import partial

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.clearance import (
    EMPTY,
    discs_along,
    discs_in_box,
    gaps_along,
    room_along,
    room_around,
)
from shapeshelf.figures.frames import angle, shown_true
from shapeshelf.figures.model import Lettering, Role, Stroke, Style
from shapeshelf.figures.numbers import angstrom_text, degrees_text
from shapeshelf.figures.outlines import arc, arrowhead
from shapeshelf.figures.scene import Scene
from shapeshelf.figures.view_parts import Painted
from shapeshelf.report.model import AngleRow, LengthRow

Array = NDArray[np.float64]

TEXT_SIZE = 15.0
NOT_TO_SCALE_DEGREES, NOT_TO_SCALE_ANGSTROM = 0.1, 0.005
_ROUNDED_DEGREES = 0.5
"""Half of the last digit of an angle that is printed as approximate."""
ROOM = 2.5
_LINE = Style("soft", None, 1.0)
_ARROW = 9.0
_OFFSETS = (34.0, 42.0, 51.0, 60.0, 74.0, 90.0)
_ARC_GAPS = (14.0, 22.0, 31.0, 41.0)
"""Radii of arcs inside a bond, beyond the ring of the centre."""
_OUTER_GAP = 9.0
_FRACTIONS = (0.5, 0.4, 0.6, 0.28, 0.72, 0.16, 0.84)
_OVER_SOMETHING, _MEETS_DIMENSION = 0.8, 12.0
_WITHOUT_LINES = 26.0
_USED_VIEW = 3.0
_MOST_MEMBERS = 24


@dataclass(frozen=True, slots=True)
class Placed:
    """A dimension that found its place."""

    view: str
    atoms: tuple[int, ...]
    text: str
    cost: float
    lines: tuple[Stroke, ...]
    lettering: Lettering
    crowd: Array
    """Discs (n, 3) of lines and text."""
    letters: Array
    """Discs (k, 3) of the text alone."""
    path: Array
    """Discs (m, 3) of the lines alone."""


@dataclass(frozen=True, slots=True)
class _Candidate:
    lines: tuple[Stroke, ...]
    path: Array
    boxes: Array
    box_costs: Array


_Offer = tuple[float, Callable[[], _Candidate]]
"""What a candidate costs before anything else is known, and how to draw it."""


@dataclass(frozen=True, slots=True)
class Ground:
    """A view and what it already holds: everything; lettering alone, which no line may cross;
    the lines of dimensions alone."""

    painted: Painted
    crowd: Array
    letters: Array
    lines: Array
    dimensions: int = 0

    def with_more(
        self, crowd: Array, letters: Array, lines: Array, dimensions: int = 0
    ) -> "Ground":
        """Return the ground with more on it."""
        return Ground(
            self.painted,
            np.concatenate([self.crowd, crowd]),
            np.concatenate([self.letters, letters]),
            np.concatenate([self.lines, lines]),
            self.dimensions + dimensions,
        )


def place_dimension(
    scene: Scene, row: LengthRow | AngleRow, grounds: list[Ground]
) -> Placed | None:
    """Return the row's dimension at its best place, ``None`` where it finds none."""
    offers = [
        (_USED_VIEW * ground.dimensions + cost, index, atoms, build)
        for index, ground in enumerate(grounds)
        for atoms in _members(scene, row, ground.painted)
        for cost, build in _candidates(row, ground.painted, atoms)
    ]
    best: Placed | None = None
    for start, index, atoms, build in sorted(offers, key=lambda offer: offer[0]):
        if best is not None and start >= best.cost:
            break
        found = _settle(scene, row, grounds[index], atoms, build(), start)
        if found is not None and (best is None or found.cost < best.cost - 1e-6):
            best = found
    return best


def to_scale(scene: Scene, row: LengthRow | AngleRow, atoms: tuple[int, ...]) -> bool:
    """Tell whether the drawn atoms show the value that is printed, as exactly as it is printed."""
    if isinstance(row, AngleRow):
        printed = _ROUNDED_DEGREES if degrees_text(row).startswith("≈") else NOT_TO_SCALE_DEGREES
        return abs(angle(scene.points, atoms) - row.degrees.value) <= printed
    drawn = float(np.linalg.norm(scene.points[atoms[0]] - scene.points[atoms[1]]))
    return abs(drawn - row.angstrom.value) <= NOT_TO_SCALE_ANGSTROM


def _members(scene: Scene, row: LengthRow | AngleRow, one: Painted) -> Iterator[tuple[int, ...]]:
    """Yield the members a view shows true, one for each place on paper."""
    seen: set[tuple[float, ...]] = set()
    for atoms in row.members[:_MOST_MEMBERS]:
        if not set(atoms) <= set(one.view.shown):
            continue
        place = tuple(np.round(one.view.points[sorted(atoms)].ravel(), 0))
        if place not in seen and shown_true(scene.points, one.view.frame, atoms):
            seen.add(place)
            yield atoms


def _candidates(
    row: LengthRow | AngleRow, one: Painted, atoms: tuple[int, ...]
) -> Iterator[_Offer]:
    if isinstance(row, AngleRow):
        yield from _arcs(one, atoms, degrees_text(row))
    else:
        yield from _lengths(one, atoms, angstrom_text(row.angstrom))


def _settle(
    scene: Scene,
    row: LengthRow | AngleRow,
    ground: Ground,
    atoms: tuple[int, ...],
    candidate: _Candidate,
    cost: float,
) -> Placed | None:
    """Return the candidate with its text at the cheapest free spot, ``None`` if there is none."""
    one = ground.painted
    others = [index for index, atom in enumerate(one.view.shown) if atom not in atoms]
    if room_along(candidate.path, one.rings[others]) < ROOM:
        return None
    if room_along(candidate.path, ground.letters) < 1.0:
        return None
    costs = candidate.box_costs + np.where(
        room_around(candidate.boxes, ground.crowd) >= ROOM, 0.0, np.inf
    )
    pick = int(np.argmin(np.round(costs, 3)))
    if not np.isfinite(costs[pick]):
        return None
    box = candidate.boxes[pick]
    cost += float(costs[pick]) + _crossing_cost(candidate.path, ground)
    lines = candidate.lines if to_scale(scene, row, atoms) else (*candidate.lines, _underline(box))
    text = degrees_text(row) if isinstance(row, AngleRow) else angstrom_text(row.angstrom)
    line = discs_along(candidate.path, 1.0) if len(candidate.path) else EMPTY
    return Placed(
        one.view.name,
        atoms,
        text,
        cost,
        lines,
        _lettering(text, box),
        np.concatenate([line, discs_in_box(box)]),
        discs_in_box(box),
        line,
    )


def _crossing_cost(path: Array, ground: Ground) -> float:
    """Running over bonds and lobes costs by length, meeting another dimension more."""
    over = float((gaps_along(path, ground.crowd) < 0).sum())
    meets = room_along(path, ground.lines) < 3
    return _OVER_SOMETHING * min(over, 8.0) + _MEETS_DIMENSION * meets


def _lengths(one: Painted, atoms: tuple[int, ...], text: str) -> Iterator[_Offer]:
    for rank, offset in enumerate(_offsets(one, atoms)):
        for side in (1.0, -1.0):
            yield 4.0 + 3.0 * rank, partial(_length_candidate, one, atoms, side, offset, text)
    yield _WITHOUT_LINES, partial(_along_bond, one, atoms, text)


def _length_candidate(
    one: Painted, atoms: tuple[int, ...], side: float, offset: float, text: str
) -> _Candidate:
    start, end = one.view.points[atoms[0]], one.view.points[atoms[1]]
    way = (end - start) / np.linalg.norm(end - start)
    normal = side * np.array([way[1], -way[0]])
    a, b = start + offset * normal, end + offset * normal
    feet = [
        (point + normal * (one.radii[atom] + 3), point + normal * (offset + 5))
        for point, atom in ((start, atoms[0]), (end, atoms[1]))
    ]
    path = np.concatenate([_samples(a, b), *(_samples(*foot) for foot in feet)])
    lines = (*(_line(*foot) for foot in feet), *_dimension_line(a, b))
    boxes, costs = _along_line(a, b, normal, text_width(text, TEXT_SIZE))
    return _Candidate(lines, path, boxes, costs)


def _along_bond(one: Painted, atoms: tuple[int, ...], text: str) -> _Candidate:
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
    return _Candidate((), np.empty((0, 2)), boxes, costs)


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


def _arcs(one: Painted, atoms: tuple[int, ...], text: str) -> Iterator[_Offer]:
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


def _arc_candidate(one: Painted, atoms: tuple[int, ...], sector: _Sector, text: str) -> _Candidate:
    centre, radius, first, sweep = sector.centre, sector.radius, sector.first, sector.sweep
    turns = first + np.linspace(0, sweep, max(6, int(abs(sweep) * radius / 4)))
    path = centre + radius * np.column_stack([np.cos(turns), np.sin(turns)])
    chain = arc((float(centre[0]), float(centre[1])), radius, first, sweep, _pieces(sweep))
    lines = [Stroke(tuple(chain), _LINE, Role.DIMENSION, curved=True)]
    lines += _arc_heads(path, radius, first, sweep)
    if sector.outer:
        lines += _extensions(one, atoms, sector)
    boxes, costs = _around_arc(centre, radius, first, sweep, text)
    return _Candidate(tuple(lines), path[1:-1], boxes, costs)


def _pieces(sweep: float) -> int:
    return max(1, math.ceil(abs(sweep) / 1.6))


def _extensions(one: Painted, atoms: tuple[int, ...], sector: _Sector) -> list[Stroke]:
    """Return short lines that carry two bonds on, past their ligands, to an outer arc."""
    lines = []
    ways = (sector.first, sector.first + sector.sweep)
    for atom, bond, way in zip(atoms[::2], sector.bonds, ways, strict=True):
        heading = np.array([math.cos(way), math.sin(way)])
        foot = sector.centre + heading * (bond + float(one.radii[atom]) + 2)
        lines.append(_line(foot, sector.centre + heading * (sector.radius + 4)))
    return lines


def _arc_heads(path: Array, radius: float, first: float, sweep: float) -> list[Stroke]:
    if abs(sweep) * radius < 3.2 * _ARROW:
        return []
    sign = math.copysign(1.0, sweep)
    lean = sign * _ARROW / radius / 2
    start, end = first - sign * math.pi / 2 + lean, first + sweep + sign * math.pi / 2 - lean
    tips = ((float(x), float(y)) for x, y in path[[0, -1]])
    return [
        arrowhead(tip, heading, _ARROW, "soft", Role.DIMENSION)
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


def _dimension_line(a: Array, b: Array) -> list[Stroke]:
    heading = math.atan2(b[1] - a[1], b[0] - a[0])
    ends = [(float(p[0]), float(p[1])) for p in (a, b)]
    return [
        _line(a, b),
        arrowhead(ends[0], heading + math.pi, _ARROW, "soft", Role.DIMENSION),
        arrowhead(ends[1], heading, _ARROW, "soft", Role.DIMENSION),
    ]


def _line(a: Array, b: Array) -> Stroke:
    points = ((float(a[0]), float(a[1])), (float(b[0]), float(b[1])))
    return Stroke(points, _LINE, Role.DIMENSION)


def _samples(a: Array, b: Array) -> Array:
    return discs_along(np.array([a, b]), 1.0)[:, :2]


def _lettering(text: str, box: Array) -> Lettering:
    turn = math.radians(float(box[4]))
    drop = 0.27 * TEXT_SIZE + 0.1 * TEXT_SIZE
    return Lettering(
        float(box[0]) + drop * math.sin(turn),
        float(box[1]) + drop * math.cos(turn),
        text,
        TEXT_SIZE,
        Role.LABEL,
        angle_degrees=round(float(box[4]), 2),
        halo=True,
    )


def _underline(box: Array) -> Stroke:
    turn = math.radians(float(box[4]))
    along = np.array([math.cos(turn), -math.sin(turn)]) * box[2] / 2
    below = np.array([math.sin(turn), math.cos(turn)]) * (box[3] / 2 + 2)
    return _line(box[:2] - along + below, box[:2] + along + below)
