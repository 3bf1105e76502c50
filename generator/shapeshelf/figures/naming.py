"""Names beside the points of a crowded plot: as near as there is room, a thin line to the point.

Each name takes the best place that those before it left; a few orders are tried and the layout
with the shortest lines stands.
"""

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.clearance import (
    Array,
    discs_along,
    discs_in_box,
    room_along,
    room_around,
)
from shapeshelf.figures.framing import lettering_box
from shapeshelf.figures.model import Lettering, Mark, Point, Role, Stroke, Style

SIZE = 13.0
_GRID = 4.0
"""Pixels between the places that are tried."""
_GAP = 3.0
_SYMBOL = 6.0
"""Lines end this far from the middle of a point."""
_SHORTEST = 5.0
"""A name this near needs no line."""
_OVER = 150.0
"""Crossing the dividing line is as bad as being so many pixels further away."""
_UNNAMED = 1000.0
_INNER = 0.6
"""A line from above or below ends within this share of the name."""

Frame = tuple[float, float, float, float]
"""Left, top, right, bottom."""


@dataclass(frozen=True, slots=True)
class Named:
    """A point that is to be named, and its name as lettering."""

    text: str
    x: float
    y: float


@dataclass(frozen=True, slots=True)
class _Place:
    """One place for a name, the line that leads from its point to it, and how bad it is."""

    lettering: Lettering
    leader: tuple[Point, Point]
    cost: float


def names_beside(
    named: Sequence[Named], crowd: Array, frame: Frame, divider: tuple[Point, Point]
) -> list[Mark]:
    """Return names and their lines. A name for which the frame has no room is left out.

    The crowd (n, 3) is discs of x, y and radius that no name may touch, all points among them.
    Where it can, a name stands on the same side of the dividing line as its point.
    """
    places = [_free_places(one, crowd, frame, divider) for one in named]
    points = np.array([(one.x, one.y, _SYMBOL - 1.0) for one in named]).reshape(-1, 3)
    layouts = [_layout(order, places, points) for order in _orders(named)]
    best = min(layouts, key=lambda layout: sum(place.cost - _UNNAMED for place in layout))
    return [mark for place in best for mark in _marks(place)]


def _orders(named: Sequence[Named]) -> list[list[int]]:
    """Return orders in which names are worth placing: as given, and along each axis both ways."""
    given = list(range(len(named)))
    across = sorted(given, key=lambda k: named[k].x)
    down = sorted(given, key=lambda k: named[k].y)
    return [given, across, across[::-1], down, down[::-1]]


def _layout(
    order: Sequence[int], places: Sequence[Sequence[_Place]], points: Array
) -> list[_Place]:
    """Return the best place for each in turn, of those that keep off all earlier ones."""
    chosen: list[_Place] = []
    names = lines = np.empty((0, 3))
    for index in order:
        barred = np.concatenate([lines, np.delete(points, index, axis=0)])
        free = (one for one in places[index] if _keeps_off(one, names, lines, barred))
        place = next(free, None)
        if place is not None:
            chosen.append(place)
            names = np.concatenate([names, discs_in_box(lettering_box(place.lettering))])
            lines = np.concatenate([lines, discs_along(place.leader, 0.5)])
    return chosen


def _keeps_off(place: _Place, names: Array, lines: Array, barred: Array) -> bool:
    """Tell whether a name keeps off the earlier ones, and its line off what is barred to it."""
    box = np.array([lettering_box(place.lettering)])
    along = discs_along(place.leader, 0.0)[:, :2]
    return bool(
        room_around(box, np.concatenate([names, lines]))[0] >= _GAP
        and room_along(along, names) >= 1.0
        and room_along(along, barred) >= 0.0
    )


def _free_places(
    one: Named, crowd: Array, frame: Frame, divider: tuple[Point, Point]
) -> list[_Place]:
    """Return the places with room around them, the best first."""
    boxes = _boxes(text_width(one.text, SIZE), SIZE, frame)
    if len(boxes):
        boxes = boxes[room_around(boxes, crowd) >= _GAP]
    places = [_place(one, tuple(box[:4].tolist()), divider) for box in boxes]
    return sorted(places, key=lambda place: place.cost)


def _boxes(width: float, height: float, frame: Frame) -> Array:
    """Return boxes (n, 5) of one size all over the frame."""
    left, top, right, bottom = frame
    x, y = np.meshgrid(
        np.arange(left + width / 2, right - width / 2, _GRID),
        np.arange(top + height / 2, bottom - height / 2, _GRID),
    )
    sizes = np.broadcast_to([width, height, 0.0], (x.size, 3))
    return np.column_stack([x.ravel(), y.ravel(), sizes])


def _place(
    one: Named, box: tuple[float, float, float, float], divider: tuple[Point, Point]
) -> _Place:
    """Set the name towards its point, so that a narrower face leaves no hole before it."""
    x, y, width, height = box
    reach = width / 2
    inner = min(max(one.x, x - _INNER * reach), x + _INNER * reach)
    anchor, at, end = "middle", x, (inner, y + math.copysign(height / 2, one.y - y))
    if one.x < x - reach:
        anchor, at, end = "start", x - reach, (x - reach - 2, y)
    elif one.x > x + reach:
        anchor, at, end = "end", x + reach, (x + reach + 2, y)
    away = math.dist((one.x, one.y), end) or 1.0
    share = min(1.0, _SYMBOL / away)
    start = (one.x + share * (end[0] - one.x), one.y + share * (end[1] - one.y))
    lettering = Lettering(at, y + 0.27 * SIZE, one.text, SIZE, anchor=anchor)
    return _Place(lettering, (start, end), away + _OVER * _divided((one.x, one.y), (x, y), divider))


def _divided(one: Point, other: Point, divider: tuple[Point, Point]) -> bool:
    """Tell whether the line lies between two points."""
    (x0, y0), (x1, y1) = divider
    first, second = ((x1 - x0) * (y - y0) - (y1 - y0) * (x - x0) for x, y in (one, other))
    return first * second < 0


def _marks(place: _Place) -> list[Mark]:
    if math.dist(*place.leader) <= _SHORTEST:
        return [place.lettering]
    return [Stroke(place.leader, Style("soft", None, 1.0), Role.LEADER), place.lettering]
