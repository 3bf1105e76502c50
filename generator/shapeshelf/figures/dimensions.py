"""Dimensions of a sheet: every length and angle once, in a view that shows it true.

Candidates (view, member, distance, side) are costed against everything already drawn and the
cheapest that touches no ring, label or lobe wins. Lines, arrowheads and lettering follow the
customs of engineering drawing (ISO 129-1, recalled from memory): text above its line, readable
from below or from the right, underlined where the drawing is not to scale for it.
"""

import math
from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.angle_offers import angle_offers
from shapeshelf.figures.clearance import (
    EMPTY,
    discs_along,
    discs_in_box,
    gaps_along,
    room_along,
    room_around,
)
from shapeshelf.figures.frames import angle, shown_true
from shapeshelf.figures.length_offers import length_offers
from shapeshelf.figures.model import Lettering, Role, Stroke
from shapeshelf.figures.numbers import angstrom_text, degrees_text
from shapeshelf.figures.offers import TEXT_SIZE, Candidate, Offer, straight
from shapeshelf.figures.scene import Scene
from shapeshelf.figures.view_parts import Painted
from shapeshelf.report.model import AngleRow, LengthRow

Array = NDArray[np.float64]

NOT_TO_SCALE_DEGREES, NOT_TO_SCALE_ANGSTROM = 0.1, 0.005
_ROUNDED_DEGREES = 0.5
"""Half of the last digit of an angle that is printed as approximate."""
ROOM = 2.5
_USED_VIEW = 3.0
_OVER_SOMETHING, _MEETS_DIMENSION = 0.8, 12.0
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


def _candidates(row: LengthRow | AngleRow, one: Painted, atoms: tuple[int, ...]) -> Iterator[Offer]:
    if isinstance(row, AngleRow):
        yield from angle_offers(one, atoms, degrees_text(row))
    else:
        yield from length_offers(one, atoms, angstrom_text(row.angstrom))


def _settle(
    scene: Scene,
    row: LengthRow | AngleRow,
    ground: Ground,
    atoms: tuple[int, ...],
    candidate: Candidate,
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
    return straight(box[:2] - along + below, box[:2] + along + below)
