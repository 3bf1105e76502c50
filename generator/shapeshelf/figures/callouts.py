"""What a sheet says beside its dimensions: axes, captions, hidden atoms, arrows."""

import math

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.clearance import EMPTY, discs_along, discs_in_box, room_along, room_around
from shapeshelf.figures.dimensions import Ground
from shapeshelf.figures.layout import View
from shapeshelf.figures.model import Lettering, Mark, Role, Stroke, Style
from shapeshelf.figures.outlines import arrowhead
from shapeshelf.figures.scene import Scene
from shapeshelf.figures.view_parts import Painted
from shapeshelf.geometry.model import Symmetry

Array = NDArray[np.float64]
Drawn = tuple[list[Mark], Array]

CHAIN = Style("line", None, 0.9, (12.0, 3.0, 2.0, 3.0))
_PAST = 16.0
"""Pixels a symmetry axis runs past what it divides."""
_AXIS_SIZE, _NOTE_SIZE, _CAPTION_SIZE = 13.0, 13.0, 12.5
_ON_AN_AXIS = 6.0
"""Cost of a level or upright leader: symmetry axes run there."""
_NOTE_PUSHES = (14.0, 22.0, 32.0, 44.0, 58.0)


def axis_orders(symmetry: Symmetry) -> dict[int, int]:
    """Return the order of the rotation axis along each principal direction that has one."""
    frame = np.array(symmetry.axes)
    orders: dict[int, int] = {}
    for operation in symmetry.operations:
        matrix = frame @ np.array(operation.matrix) @ frame.T
        turn = (np.trace(matrix) - 1) / 2
        if np.linalg.det(matrix) < 0 or turn > 0.999:
            continue
        order = round(2 * math.pi / math.acos(max(-1.0, min(1.0, turn))))
        for axis in range(3):
            if abs(matrix[axis, axis] - 1) < 1e-3:
                orders[axis] = max(order, orders.get(axis, 1))
    return orders


def symmetry_axes(one: Painted, orders: dict[int, int], linear: bool) -> Drawn:
    """Return chain lines for the rotation axes in the paper, the highest named at its end."""
    view = one.view
    lying = {k: n for k, n in orders.items() if abs(view.frame[2][k]) < 1e-6}
    if not lying or not view.lobes:
        return [], EMPTY
    main = max(lying, key=lambda k: (lying[k], k))
    marks: list[Mark] = []
    crowd = EMPTY
    for axis in lying:
        start, end = _through(one, view.place(np.array([np.zeros(3), np.eye(3)[axis]])))
        marks.append(Stroke((_point(start), _point(end)), CHAIN, Role.AXIS))
        if axis == main:
            name = "C_{∞}" if linear and axis == 2 else f"C_{{{lying[axis]}}}"
            lettering, box = _axis_name(start, end, name, one.crowd)
            marks.append(lettering)
            crowd = discs_in_box(box)
    return marks, crowd


def caption(one: Painted, base: float) -> Drawn:
    """Return the view's name below it, its baseline at ``base``."""
    text = one.view.name.upper()
    if one.view.auxiliary:
        text += "  " + one.view.auxiliary.row.of.replace("-", "–")
    x = float((one.rings[:, 0].min() + one.rings[:, 0].max()) / 2)
    width = text_width(text, _CAPTION_SIZE)
    box = (x, base - 0.3 * _CAPTION_SIZE, width, _CAPTION_SIZE, 0.0)
    return [Lettering(x, base, text, _CAPTION_SIZE, colour="soft")], discs_in_box(box)


def hidden_notes(scene: Scene, ground: Ground) -> Drawn:
    """Return a leader for each stack of atoms, naming those behind the one in front."""
    marks: list[Mark] = []
    added = EMPTY
    for front, behind in ground.painted.covered:
        text = ", ".join(scene.elements[atom] for atom in behind) + " behind"
        crowd = np.concatenate([ground.crowd, added])
        drawn = _note(ground.painted, front, behind, text, crowd)
        marks += drawn[0]
        added = np.concatenate([added, drawn[1]])
    return marks, added


def looking_arrow(view: View, grounds: list[Ground]) -> Drawn:
    """Return the arrow that says where an auxiliary view is taken from, in a view that has
    its plane edge on; nothing for a principal view."""
    if view.auxiliary is None:
        return [], EMPTY
    normal = view.auxiliary.frame[2]
    for other in grounds:
        seen = other.painted.view
        if seen.lobes and abs(float(seen.frame[2] @ normal)) < 0.02:
            drawn = _arrow_at_edge(other, -(seen.frame[:2] @ normal) * (1, -1), view)
            if drawn[0]:
                return drawn
    return [], EMPTY


def _through(one: Painted, line: Array) -> tuple[Array, Array]:
    """Return the ends of a line that crosses all that a view holds and a little more."""
    way = line[1] - line[0]
    way = way / np.linalg.norm(way)
    along = (one.crowd[:, :2] - line[0]) @ way
    low = float((along - one.crowd[:, 2]).min()) - _PAST
    high = float((along + one.crowd[:, 2]).max()) + _PAST
    return line[0] + way * low, line[0] + way * high


def _axis_name(start: Array, end: Array, name: str, crowd: Array) -> tuple[Lettering, Array]:
    """Return the name at that end and on that side of an axis where it has most room."""
    width, height = text_width(name, _AXIS_SIZE), _AXIS_SIZE
    upright = abs(start[0] - end[0]) < abs(start[1] - end[1])
    low, high = sorted((start, end), key=lambda tip: (tip[1], -tip[0]))
    rows = []
    for tip, inward in ((low, 1), (high, -1)):
        for side in (1, -1):
            if upright:
                rows.append(
                    (tip[0] + side * (width / 2 + 4), tip[1] + inward * 6, width, height, 0)
                )
            else:
                turned = math.copysign(1, (end - start)[0]) * (1 if tip is end else -1)
                rows.append((tip[0] - turned * width / 2, tip[1] - side * 9, width, height, 0))
    boxes = np.array(rows, dtype=float)
    room = np.minimum(room_around(boxes, crowd), 2.0)
    box = boxes[int(np.argmax(np.round(room, 2)))]
    base = float(box[1]) + 0.32 * _AXIS_SIZE
    return Lettering(float(box[0]), base, name, _AXIS_SIZE, colour="soft"), box


def _note(one: Painted, front: int, behind: tuple[int, ...], text: str, crowd: Array) -> Drawn:
    stack = (front, *behind)
    middle = one.view.points[front]
    radius = max(float(one.radii[atom]) for atom in stack)
    others = one.rings[[atom not in stack for atom in one.view.shown]]
    ways, boxes, costs = _note_spots(middle, radius, text)
    costs = costs + 500.0 * (room_around(boxes, crowd) < 2)
    beyond = crowd[_beyond(crowd, middle, radius)]
    for index in np.argsort(np.round(costs, 3), kind="stable"):
        if costs[index] >= 500:
            break
        way, push = ways[index, :2], ways[index, 2]
        leader = np.array([middle + way * (radius + 2), middle + way * (radius + push)])
        path = discs_along(leader, 1.0)
        if room_along(path[:, :2], others) >= 1 and room_along(path[2:, :2], beyond) >= 0:
            return _noted(leader, boxes[index], text), np.concatenate(
                [discs_in_box(boxes[index]), path]
            )
    return [], EMPTY


def _note_spots(middle: Array, radius: float, text: str) -> tuple[Array, Array, Array]:
    """Return ways (c, 3: direction and push), text boxes (c, 5) and costs (c,)."""
    width, height = text_width(text, _NOTE_SIZE), _NOTE_SIZE * 0.9
    turns = np.repeat(np.arange(24) * math.pi / 12, len(_NOTE_PUSHES))
    pushes = np.tile(_NOTE_PUSHES, 24)
    cosine, sine = np.round(np.cos(turns), 9), np.sin(turns)
    side = np.where(cosine >= 0, 1.0, -1.0)
    x = middle[0] + cosine * (radius + pushes) + side * (width / 2 + 4)
    y = middle[1] + sine * (radius + pushes)
    flat = np.ones_like(x)
    boxes = np.column_stack([x, y, width * flat, height * flat, 0 * flat])
    straight = np.minimum(np.abs(cosine), np.abs(sine)) < 0.1
    costs = pushes - 3 * np.abs(cosine) + _ON_AN_AXIS * straight
    return np.column_stack([cosine, sine, pushes]), boxes, costs


def _noted(leader: Array, box: Array, text: str) -> list[Mark]:
    base = float(box[1]) + 0.34 * _NOTE_SIZE
    return [
        Stroke((_point(leader[0]), _point(leader[1])), Style("soft", None, 0.9), Role.LEADER),
        Lettering(float(box[0]), base, text, _NOTE_SIZE, Role.LABEL, "soft", halo=True),
    ]


def _beyond(crowd: Array, middle: Array, radius: float) -> NDArray[np.bool_]:
    return np.asarray(np.hypot(crowd[:, 0] - middle[0], crowd[:, 1] - middle[1]) > radius + 4)


def _arrow_at_edge(other: Ground, heading: Array, view: View) -> Drawn:
    """Return an arrow from outside a view towards the plane that the auxiliary view shows."""
    way = heading / np.linalg.norm(heading)
    side = np.array([-way[1], way[0]])
    target = other.painted.view.points[list(view.shown)].mean(axis=0)
    for back in (58.0, 70.0, 84.0, 46.0, 98.0):
        for shift in (0.0, 14.0, -14.0, 28.0, -28.0):
            tip = target - way * back + side * shift
            tail = tip - way * 24
            spot = tail - way * 10
            box = np.array([spot[0], spot[1], 12.0, 13.0, 0.0])
            shaft = discs_along(np.array([tail, tip]), 1.0)
            free = room_around(box[None, :], other.crowd)[0] >= 2
            if free and room_along(shaft[:, :2], other.crowd) > 2:
                marks = _arrow_marks(tail, tip, way, spot, view.name[-1])
                return marks, np.concatenate([shaft, discs_in_box(box)])
    return [], EMPTY


def _arrow_marks(tail: Array, tip: Array, way: Array, spot: Array, letter: str) -> list[Mark]:
    line = (_point(tail), _point(tip - way * 5))
    return [
        Stroke(line, Style("ink", None, 1.6), Role.LEADER),
        arrowhead(_point(tip), math.atan2(way[1], way[0]), 11, "ink", Role.LEADER),
        Lettering(float(spot[0]), float(spot[1]) + 5.0, letter, 14.0, bold=True),
    ]


def _point(row: Array) -> tuple[float, float]:
    return (float(row[0]), float(row[1]))
