"""The key angles of a bench view: arcs in perspective and labels that hit nothing."""

from dataclasses import dataclass
from typing import Protocol

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.clearance import EMPTY, discs_along, discs_in_box, room_along, room_around
from shapeshelf.figures.model import Lettering, Mark, Role, Stroke, Style
from shapeshelf.figures.numbers import degrees_text
from shapeshelf.figures.scene import Scene
from shapeshelf.report.model import AngleRow, Basis, CompoundReport

Array = NDArray[np.float64]

LABEL_SIZE = 19.0
MOST_ANGLES = 3
_STRAIGHT_DEGREES = 179.5
_ARC_SHARES = (0.44, 0.56, 0.68, 0.34)
"""Radius of an arc in shares of the shorter bond, best first."""
_PUSHES = (4.0, 11.0, 19.0, 28.0, 40.0)
_FRACTIONS = (0.5, 0.36, 0.64)
_ROOM = 3.0
_ARC_POINTS = 24
_MEMBERS_TRIED = 3
_FACE_ON_WORTH = 30.0
_CROSSING_BOND, _CROSSING_ATOM = 15.0, 60.0


class Paper(Protocol):
    """What arcs need of a bench view: where things are drawn."""

    scene: Scene
    atoms: Array
    lobes: Array
    radii: Array
    view: Array

    def project(self, points: Array) -> Array:
        """Return (n, 3): x and y in pixels, depth in ångström."""
        ...

    def lobe_radius(self, depth: float) -> float:
        """Return the drawn radius of a lobe's round end in pixels."""
        ...


@dataclass(frozen=True, slots=True)
class AngleMarks:
    """Arcs go under the atoms, labels over everything."""

    arcs: tuple[Mark, ...]
    labels: tuple[Mark, ...]


@dataclass(frozen=True, slots=True)
class _Choice:
    cost: float
    arc: Array
    box: Array
    hidden: bool
    """Whether the arc runs behind an atom that is none of its own."""


def key_angles(report: CompoundReport) -> tuple[AngleRow, ...]:
    """Return the few rows a picture should carry: those that are not plainly straight first,
    known ones before the model's, narrow before wide."""
    seen: set[int] = set()
    rows: list[AngleRow] = []
    for centre in report.centres:
        if centre.centre.atom not in seen:
            rows += centre.angles
        seen |= set(centre.equivalent)
    rows.sort(key=_importance)
    bent = [row for row in rows if row.degrees.value < _STRAIGHT_DEGREES]
    return tuple((bent or rows)[:MOST_ANGLES])


def angle_marks(stage: Paper, rows: tuple[AngleRow, ...]) -> AngleMarks:
    """Return an arc and a label for every row that finds room; an arc behind an atom says little
    and stands only where there would be none."""
    crowd = _crowd(stage)
    chosen: list[tuple[str, _Choice]] = []
    hidden: list[tuple[str, _Choice]] = []
    for row in rows:
        text = degrees_text(row)
        choice = _best(stage, row, text, crowd)
        if choice is None:
            continue
        if choice.hidden:
            hidden.append((text, choice))
            continue
        chosen.append((text, choice))
        crowd = np.concatenate([crowd, discs_along(choice.arc, 1.0), discs_in_box(choice.box)])
    shown = chosen or hidden[:1]
    return AngleMarks(
        tuple(_arc_stroke(choice.arc) for _, choice in shown),
        tuple(_label(text, choice.box) for text, choice in shown),
    )


def _importance(row: AngleRow) -> tuple[bool, bool, float]:
    value = row.degrees
    return (value.value >= _STRAIGHT_DEGREES, value.basis is Basis.MODEL, value.value)


def _crowd(stage: Paper) -> Array:
    parts = [np.column_stack([stage.atoms[:, :2], stage.radii + 2])]
    for stick in stage.scene.sticks:
        parts.append(discs_along(stage.atoms[[stick.begin, stick.end], :2], 5.0))
    for index, lobe in enumerate(stage.scene.lobes):
        radius = stage.lobe_radius(float(stage.lobes[index, 2]))
        line = np.array([stage.atoms[lobe.atom, :2], stage.lobes[index, :2]])
        parts += [discs_along(line[1:], radius), discs_along(line, radius / 2)]
    return np.concatenate(parts)


def _best(stage: Paper, row: AngleRow, text: str, crowd: Array) -> _Choice | None:
    best: _Choice | None = None
    for shown, trio in _most_face_on(stage, row):
        for rank, share in enumerate(_ARC_SHARES):
            cost = 3.0 * rank + _FACE_ON_WORTH * (1 - shown)
            for arc in _arcs(stage, trio, share):
                choice = _placed(stage, trio, arc, text, crowd, cost)
                if choice and (best is None or choice.cost < best.cost - 1e-6):
                    best = choice
    return best


def _most_face_on(stage: Paper, row: AngleRow) -> list[tuple[float, tuple[int, int, int]]]:
    """Return the members of a row whose plane turns most towards the viewer, with its cosine."""
    ranked = []
    for trio in row.members:
        end, middle, other = (stage.scene.points[atom] for atom in trio)
        normal = np.cross(end - middle, other - middle)
        size = float(np.linalg.norm(normal))
        ranked.append((abs(float(normal @ stage.view[2])) / size if size > 1e-3 else 1.0, trio))
    ranked.sort(key=lambda item: (-round(item[0], 3), item[1]))
    return ranked[:_MEMBERS_TRIED]


def _placed(
    stage: Paper, trio: tuple[int, int, int], arc: Array, text: str, crowd: Array, cost: float
) -> _Choice | None:
    """Return the cheapest free label on one arc: near it, the arc itself crossing little."""
    boxes, costs = _boxes(stage.atoms[trio[1], :2], arc, text)
    room = room_around(boxes, np.concatenate([crowd, discs_along(arc, 1.0)]))
    free = room >= _ROOM
    if not free.any():
        return None
    hidden = _behind_an_atom(stage, trio, arc)
    crossing = room_along(arc[4:-4], _foreign(crowd, arc)) < 0
    total = costs + cost + (_CROSSING_ATOM if hidden else _CROSSING_BOND * crossing)
    index = int(np.argmin(np.where(free, np.round(total, 3), np.inf)))
    return _Choice(float(total[index]), arc, boxes[index], hidden)


def _behind_an_atom(stage: Paper, trio: tuple[int, int, int], arc: Array) -> bool:
    others = np.setdiff1d(np.arange(len(stage.atoms)), trio)
    rings = np.column_stack([stage.atoms[others, :2], stage.radii[others] + 2])
    return room_along(arc, rings) < 0


def _foreign(crowd: Array, arc: Array) -> Array:
    """Leave out what lies at the ends of an arc: the two bonds it joins."""
    ends = arc[[0, -1]]
    apart = np.hypot(
        crowd[:, None, 0] - ends[None, :, 0], crowd[:, None, 1] - ends[None, :, 1]
    ).min(axis=1)
    return crowd[apart > 14] if len(crowd) else EMPTY


def _boxes(middle: Array, arc: Array, text: str) -> tuple[Array, Array]:
    width, height = text_width(text, LABEL_SIZE), LABEL_SIZE * 0.8
    rows, costs = [], []
    for fraction in _FRACTIONS:
        point = arc[int(fraction * (len(arc) - 1))]
        way = point - middle
        length = float(np.linalg.norm(way))
        if length < 1:
            continue
        way = way / length
        half = abs(way[0]) * width / 2 + abs(way[1]) * height / 2
        for push in _PUSHES:
            spot = point + way * (half + push)
            rows.append((*spot, width, height, 0.0))
            costs.append(push + 12 * abs(fraction - 0.5))
    return np.array(rows).reshape(-1, 5), np.array(costs)


def _arcs(stage: Paper, trio: tuple[int, int, int], share: float) -> list[Array]:
    """Return the arc between two bonds on paper; for a straight angle one on either side."""
    points = stage.scene.points
    one, other = points[trio[0]] - points[trio[1]], points[trio[2]] - points[trio[1]]
    radius = share * min(np.linalg.norm(one), np.linalg.norm(other))
    u, v = one / np.linalg.norm(one), other / np.linalg.norm(other)
    if u @ v > -0.999:
        side = v - (u @ v) * u
        sides = [side / np.linalg.norm(side)]
    else:
        across = np.cross(u, stage.view[2])
        sides = [across / np.linalg.norm(across), -across / np.linalg.norm(across)]
    turns = np.linspace(0, np.arccos(np.clip(u @ v, -1, 1)), _ARC_POINTS)
    return [
        stage.project(
            points[trio[1]] + radius * (np.cos(turns)[:, None] * u + np.sin(turns)[:, None] * side)
        )[:, :2]
        for side in sides
    ]


def _arc_stroke(arc: Array) -> Stroke:
    points = tuple((float(x), float(y)) for x, y in arc)
    return Stroke(points, Style("soft", None, 1.3), Role.DIMENSION)


def _label(text: str, box: Array) -> Lettering:
    return Lettering(float(box[0]), float(box[1]) + 0.36 * LABEL_SIZE, text, LABEL_SIZE, Role.LABEL)
