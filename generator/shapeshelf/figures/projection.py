"""From three dimensions to paper: orthographic and perspective, and where to look from.

A view is a rotation matrix (3, 3) whose rows are the directions that point right, up and
towards the viewer. Coordinates are arrays (n, 3) in ångström; numpy only.
"""

from functools import cache

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

VIEWPOINT_RADII = 5.0
"""Distance of the eye in perspective, in radii of the molecule: a mild foreshortening."""

_DIRECTIONS = 1200
_ENOUGH_GAP_ANGSTROM = 0.22
_OWN_LOBE_ANGSTROM = 0.9
_IN_PLANE = 0.24
"""Sine of the angle, about 14 degrees, below which a bond counts as lying in the paper."""
_LONG_ENOUGH = 0.62
_WELL_APART = np.radians(36.0)
_LOBE_SHOWN = 0.7
_UPRIGHT, _TILTED = 0.5, 0.36
"""Worth of a main axis that leans less than about 21 degrees to the paper."""


def orthographic(points: Array, view: Array) -> Array:
    """Return (n, 3): right, up, depth towards the viewer, all in ångström."""
    seen: Array = points @ view.T
    return seen


def perspective(points: Array, view: Array, eye_angstrom: float) -> Array:
    """Return (n, 3): right and up as drawn from ``eye_angstrom`` away, and the true depth."""
    seen = points @ view.T
    grow = eye_angstrom / (eye_angstrom - seen[:, 2])
    drawn: Array = np.column_stack([seen[:, 0] * grow, seen[:, 1] * grow, seen[:, 2]])
    return drawn


def looking_along(toward: Array, up: Array) -> Array:
    """Return the view seen against ``toward`` with ``up`` as upright as it can be drawn."""
    back = toward / np.linalg.norm(toward)
    upright = up - (up @ back) * back
    upright /= np.linalg.norm(upright)
    return np.array([np.cross(upright, back), upright, back])


def choose_direction(points: Array, radii: Array, bonds: Array, spokes: Array) -> Array:
    """Return the direction to the viewer that hides no atom and spreads the bonds.

    ``points`` (n, 3) and ``radii`` (n,) of atoms, then of the lobes of lone pairs; ``bonds``
    (m, 2) index pairs of atoms, ``spokes`` (k, 2) of an atom and its lobe. Wanted: a gap
    between every two discs (lobes may overlap one another a little), bonds and the main axis
    in the paper as far as that leaves them, the others not too short and well apart.
    """
    directions = sphere_directions()
    score = _gap_score(points, radii, directions, len(spokes))
    score += _UPRIGHT * (np.abs(directions[:, 2]) < _TILTED)
    if len(bonds):
        score += _bond_score(points, directions, bonds)
        score += 0.8 * _spread(points, directions, bonds, bonds)
    if len(spokes):
        _, shown = _slopes(points, directions, spokes)
        score += 3 * np.minimum(shown, _LOBE_SHOWN).min(axis=0)
        score += 0.6 * _spread(points, directions, bonds, spokes)
    return np.asarray(directions[int(np.argmax(np.round(score, 6)))])


def _gap_score(points: Array, radii: Array, directions: Array, lobes: int) -> Array:
    depth = points @ directions.T
    first, second = np.triu_indices(len(points), 1)
    apart2 = ((points[first] - points[second]) ** 2).sum(axis=1)[:, None]
    drawn = np.sqrt(np.maximum(apart2 - (depth[first] - depth[second]) ** 2, 0))
    gap = np.minimum(drawn - (radii[first] + radii[second])[:, None], _ENOUGH_GAP_ANGSTROM)
    atoms = len(points) - lobes
    score: Array = 5 * gap[second < atoms].min(axis=0, initial=_ENOUGH_GAP_ANGSTROM)
    mixed = (second >= atoms) & (first < atoms) & (apart2[:, 0] > _OWN_LOBE_ANGSTROM**2)
    score += 4 * np.minimum(gap[mixed], 0.03).min(axis=0, initial=0.03)
    score += 4 * np.minimum(gap[first >= atoms], -0.12).min(axis=0, initial=-0.12)
    return score


@cache
def sphere_directions() -> Array:
    """Return unit vectors (1200, 3) spread evenly over the sphere (golden-angle spiral)."""
    index = np.arange(_DIRECTIONS)
    height = 1 - (2 * index + 1) / _DIRECTIONS
    turn = np.pi * (3 - np.sqrt(5)) * index
    ring = np.sqrt(1 - height**2)
    return np.column_stack([ring * np.cos(turn), ring * np.sin(turn), height])


def _bond_score(points: Array, directions: Array, bonds: Array) -> Array:
    vectors, drawn = _slopes(points, directions, bonds)
    slope = np.abs(vectors @ directions.T)
    flat = (slope < _IN_PLANE).mean(axis=0)
    score: Array = 1.5 * np.minimum(drawn, _LONG_ENOUGH).min(axis=0) + 1.5 * flat
    score -= 0.05 * slope.mean(axis=0)
    return score


def _slopes(points: Array, directions: Array, pairs: Array) -> tuple[Array, Array]:
    """Return unit vectors (m, 3) of index pairs and the share of each that a view shows."""
    vectors = points[pairs[:, 1]] - points[pairs[:, 0]]
    vectors = vectors / np.linalg.norm(vectors, axis=1)[:, None]
    shown = np.sqrt(np.maximum(1 - (vectors @ directions.T) ** 2, 0))
    return vectors, shown


def _spread(points: Array, directions: Array, bonds: Array, others: Array) -> Array:
    """Return the smallest drawn angle between a bond and another line (a bond, a spoke) at one
    atom, as a share of what is wide enough, at most 1."""
    outward = [
        (points[_far(bond, shared)] - points[shared], points[_far(other, shared)] - points[shared])
        for index, bond in enumerate(bonds)
        for other in (others[:index] if others is bonds else others)
        for shared in set(bond.tolist()) & set(other.tolist())
    ]
    if not outward:
        return np.ones(len(directions))
    pairs = np.array(outward)
    pairs /= np.linalg.norm(pairs, axis=2)[:, :, None]
    depth = pairs @ directions.T
    inner = (pairs[:, 0] * pairs[:, 1]).sum(axis=1)[:, None] - depth[:, 0] * depth[:, 1]
    lengths = np.sqrt(np.maximum((1 - depth[:, 0] ** 2) * (1 - depth[:, 1] ** 2), 1e-12))
    angle = np.arccos(np.clip(inner / lengths, -1, 1))
    smallest: Array = np.minimum(angle / _WELL_APART, 1).min(axis=0)
    return smallest


def _far(pair: NDArray[np.int_], shared: int) -> int:
    return int(pair[1] if pair[0] == shared else pair[0])
