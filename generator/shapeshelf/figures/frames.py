"""Which way a sheet looks at a molecule: principal views, and auxiliary ones where needed.

A frame is a rotation matrix (3, 3) with rows right, up, towards the viewer. The three
principal views share one orientation: front; top, seen from above; side, seen from the left.
"""

from dataclasses import dataclass
from functools import cache
from itertools import permutations, product

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.scene import Scene, lobe_ends
from shapeshelf.report.model import AngleRow

Array = NDArray[np.float64]
Trio = tuple[int, int, int]

TRUE_DEPTH_ANGSTROM = 0.02
"""A bond of 1 Å that rises this much is drawn 0.0002 Å short, an angle 0.03 degrees off: well
within the 0.005 Å and 0.1 degrees that the sheet promises."""

MOST_AUXILIARY = 2
_TURNED_COST = 0.4
_SAME_PLACE_ANGSTROM = 0.12
_TURN_45 = np.array([[1.0, 1.0, 0.0], [-1.0, 1.0, 0.0], [0.0, 0.0, np.sqrt(2)]]) / np.sqrt(2)


@dataclass(frozen=True, slots=True)
class Auxiliary:
    """A view onto the plane of one angle."""

    frame: Array
    row: AngleRow
    trio: Trio


def principal_frames(scene: Scene, rows: list[AngleRow], linear: bool) -> dict[str, Array]:
    """Return the frames of the front, top and side view that together tell most."""
    fronts, turned = _orientations()
    worth = _worth(scene, rows, linear, fronts) - _TURNED_COST * turned
    front = fronts[int(np.argmax(np.round(worth, 6)))]
    return {"front": front, "top": top_of(front), "side": left_of(front)}


def top_of(front: Array) -> Array:
    """Return the frame seen from above, drawn below the front view (first angle)."""
    return np.array([front[0], -front[2], front[1]])


def left_of(front: Array) -> Array:
    """Return the frame seen from the left, drawn to the right of the front view."""
    return np.array([front[2], front[1], -front[0]])


def shown_true(points: Array, frame: Array, atoms: tuple[int, ...]) -> bool:
    """Tell whether a bond (two atoms) or an angle (three, centre second) lies in the paper."""
    depth = points[list(atoms)] @ frame[2]
    return bool(np.abs(np.diff(depth)).max() <= TRUE_DEPTH_ANGSTROM)


def angle(points: Array, atoms: tuple[int, ...]) -> float:
    """Return the angle at the second of three atoms in degrees, in two or three dimensions."""
    one, other = points[atoms[0]] - points[atoms[1]], points[atoms[2]] - points[atoms[1]]
    cosine = one @ other / (np.linalg.norm(one) * np.linalg.norm(other))
    return float(np.degrees(np.arccos(np.clip(cosine, -1, 1))))


def auxiliary_frames(
    scene: Scene, rows: list[AngleRow], frames: dict[str, Array]
) -> list[Auxiliary]:
    """Return a view for each row that no principal view shows true, two at most."""
    found: list[Auxiliary] = []
    for row in rows:
        known = [*frames.values(), *(one.frame for one in found)]
        if any(shown_true(scene.points, f, trio) for f in known for trio in row.members):
            continue
        if len(found) < MOST_AUXILIARY:
            trio = max(row.members, key=lambda t: _edge_on(scene.points, frames, t))
            found.append(Auxiliary(_onto(scene.points, frames["front"], trio), row, trio))
    return found


def normal_of(points: Array, trio: Trio) -> Array:
    """Return the unit normal of the plane of an angle, any normal for a straight one."""
    one, other = points[trio[0]] - points[trio[1]], points[trio[2]] - points[trio[1]]
    normal = np.cross(one, other)
    if np.linalg.norm(normal) < 1e-4:
        normal = np.cross(one, np.eye(3)[int(np.argmin(np.abs(one)))])
    return np.asarray(normal / np.linalg.norm(normal))


@cache
def _orientations() -> tuple[Array, Array]:
    """Return proper turns of the principal axes (96, 3, 3) and whether each is turned by 45
    degrees about an axis besides (96,)."""
    turns = []
    for order in permutations(range(3)):
        for signs in product((1.0, -1.0), repeat=3):
            frame = np.array(signs)[:, None] * np.eye(3)[list(order)]
            if np.linalg.det(frame) > 0:
                turns.append(frame)
    turned = [frame @ _about(axis) for axis in range(3) for frame in turns]
    return np.array(turns + turned), np.array([0.0] * len(turns) + [1.0] * len(turned))


def _about(axis: int) -> Array:
    order = np.roll(np.arange(3), axis + 1)
    return np.asarray(_TURN_45[np.ix_(order, order)])


def _worth(scene: Scene, rows: list[AngleRow], linear: bool, fronts: Array) -> Array:
    """Return what each front view (c, 3, 3) and the two beside it tell."""
    worth = np.zeros(len(fronts))
    for row in rows:
        trues = _any_true(scene.points, row, fronts)
        worth += 2.0 * trues.any(axis=1) + 1.0 * trues[:, 0]
    worth -= 0.25 * _hidden_pairs(scene.points, fronts[:, 2])
    worth -= 0.02 * _hidden_pairs(scene.points, fronts[:, 0])
    worth += 0.6 * ((np.abs(fronts[:, 1, 2]) > 0.99) != linear)
    ends = lobe_ends(scene)
    size = np.ptp(np.concatenate([scene.points, ends]) @ fronts.transpose(0, 2, 1), axis=1)
    worth += 0.15 * (size[:, 0] >= size[:, 1] - 1e-3)
    if scene.lobes:
        worth += 0.2 * fronts[:, 1] @ np.mean([one.direction for one in scene.lobes], axis=0)
    worth += 0.01 * np.trace(fronts, axis1=1, axis2=2)
    return worth


def _any_true(points: Array, row: AngleRow, fronts: Array) -> NDArray[np.bool_]:
    """Return (c, 3): whether a front, side or top view shows a member of the row true."""
    trios = np.array(row.members)
    bonds = points[trios[:, [0, 2]]] - points[trios[:, [1]]]
    depth = np.abs(bonds @ fronts[:, None, [2, 0, 1]].transpose(0, 1, 3, 2))
    return np.asarray((depth.max(axis=2) <= TRUE_DEPTH_ANGSTROM).any(axis=1))


def _hidden_pairs(points: Array, toward: Array) -> Array:
    """Return for each direction (c, 3) how many pairs of atoms fall on one place of the paper."""
    first, second = np.triu_indices(len(points), 1)
    apart = points[first] - points[second]
    drawn2 = (apart**2).sum(axis=1) - (toward @ apart.T) ** 2
    return np.asarray((drawn2 < _SAME_PLACE_ANGSTROM**2).sum(axis=1), dtype=float)


def _edge_on(points: Array, frames: dict[str, Array], trio: Trio) -> tuple[float, int]:
    """Rank the members of a row: those whose plane a principal view shows edge on first."""
    normal = normal_of(points, trio)
    best = max(1 - abs(float(frame[2] @ normal)) for frame in frames.values())
    return (round(best, 3), -sum(trio))


def _onto(points: Array, front: Array, trio: Trio) -> Array:
    normal = normal_of(points, trio)
    if normal @ (front[2] + 0.1 * front[1] + 0.01 * front[0]) < 0:
        normal = -normal
    middle = (points[trio[0]] + points[trio[2]]) / 2 - points[trio[1]]
    if np.linalg.norm(middle) < 1e-3:
        middle = front[1]
    up = -middle if middle @ front[1] <= 1e-6 else middle
    up = up - (up @ normal) * normal
    up /= np.linalg.norm(up)
    return np.array([np.cross(up, normal), up, normal])
