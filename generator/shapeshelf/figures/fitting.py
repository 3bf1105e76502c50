"""Coordinates that show the values a figure prints.

A structure may come from the model while the best known angles and lengths are measured. A
drawing to scale must show what it says, so the atoms are moved as little as it takes: damped
Gauss-Newton on all angle and length rows, members of a row alike, so symmetry is kept.
"""

import numpy as np
from numpy.typing import NDArray

from shapeshelf.report.model import Basis, CompoundReport, Value

Array = NDArray[np.float64]

LARGEST_MOLECULE = 14
_ROUNDS = 12
_SETTLED_ANGSTROM = 1e-6
_HOLD = 1e-3
"""Weight of staying where an atom is, against 1 for a measured value."""
_MODEL_WEIGHT = 0.1
"""Of a model value where others are measured or calculated: it gives way to them."""
_NEARLY_STRAIGHT = 1e-4


def drawn_coordinates(report: CompoundReport) -> Array:
    """Return coordinates (n, 3) in ångström that meet the report's best values."""
    start = np.array(report.symmetry.coordinates_angstrom, dtype=float)
    if len(start) > LARGEST_MOLECULE:
        return start
    lengths = [(*pair, row.angstrom) for row in report.lengths for pair in row.members]
    angles = [
        (*trio, row.degrees)
        for centre in report.centres
        for row in centre.angles
        for trio in row.members
    ]
    now = start.copy()
    moves = [(np.array(one.matrix), list(one.permutation)) for one in report.symmetry.operations]
    for _ in range(_ROUNDS):
        residuals, slopes = _linearised(now, lengths, angles)
        if not len(residuals) or np.abs(residuals).max() < 1e-6:
            break
        hold = _HOLD * np.eye(now.size)
        system = slopes.T @ slopes + hold**2
        step: Array = np.asarray(np.linalg.solve(system, slopes.T @ residuals), dtype=float)
        moved = _kept_symmetric(step.reshape(now.shape), moves)
        now = now + moved
        if np.abs(moved).max() < _SETTLED_ANGSTROM:
            break
    return now


def _kept_symmetric(step: Array, moves: list[tuple[Array, list[int]]]) -> Array:
    """Return the part of a step (n, 3) that every symmetry operation leaves as it is.

    Without this a planar centre whose values add up to more than 360 degrees would be pushed
    out of its plane by rounding alone.
    """
    kept = np.zeros_like(step)
    for matrix, permutation in moves:
        kept[permutation] += step @ matrix.T
    return kept / max(1, len(moves))


def _linearised(
    xyz: Array, lengths: list[tuple[int, int, Value]], angles: list[tuple[int, int, int, Value]]
) -> tuple[Array, Array]:
    """Return weighted residuals (m,) and their slopes (m, 3n) in the coordinates."""
    rows = [_length_row(xyz, *item) for item in lengths] + [
        _angle_row(xyz, *item) for item in angles
    ]
    if not rows:
        return np.empty(0), np.empty((0, xyz.size))
    return np.array([row[0] for row in rows]), np.array([row[1] for row in rows])


def _length_row(xyz: Array, a: int, b: int, value: Value) -> tuple[float, Array]:
    bond = xyz[b] - xyz[a]
    length = float(np.linalg.norm(bond))
    slope = np.zeros_like(xyz)
    slope[b], slope[a] = bond / length, -bond / length
    return _weigh(value.value - length, slope, value)


def _angle_row(xyz: Array, a: int, centre: int, b: int, value: Value) -> tuple[float, Array]:
    one, other = xyz[a] - xyz[centre], xyz[b] - xyz[centre]
    long_one, long_other = float(np.linalg.norm(one)), float(np.linalg.norm(other))
    u, v = one / long_one, other / long_other
    cosine = float(np.clip(u @ v, -1, 1))
    sine = float(np.sqrt(1 - cosine**2))
    slope = np.zeros_like(xyz)
    if sine > _NEARLY_STRAIGHT:
        slope[a] = (cosine * u - v) / (long_one * sine)
        slope[b] = (cosine * v - u) / (long_other * sine)
        slope[centre] = -slope[a] - slope[b]
    return _weigh(float(np.radians(value.value) - np.arccos(cosine)), slope, value)


def _weigh(residual: float, slope: Array, value: Value) -> tuple[float, Array]:
    weight = _MODEL_WEIGHT if value.basis is Basis.MODEL else 1.0
    return weight * residual, weight * slope.ravel()
