"""Vectors in space: distances, angles, rotations, best superposition."""

from math import atan2, degrees, hypot

import numpy as np
from numpy.typing import ArrayLike, NDArray

Array = NDArray[np.float64]


def distance(first: ArrayLike, second: ArrayLike) -> float:
    """Return the distance of two points (3,), in their own unit."""
    return float(np.linalg.norm(np.asarray(first, float) - np.asarray(second, float)))


def angle_degrees(first: ArrayLike, vertex: ArrayLike, last: ArrayLike) -> float:
    """Return the angle first-vertex-last of three points (3,), 0 to 180 degrees.

    From the arctangent of cross and dot product, which stays exact near 0 and 180.
    """
    # Plain floats: numpy takes several times as long over three numbers.
    (ax, ay, az), (bx, by, bz), (cx, cy, cz) = (
        (float(x), float(y), float(z))
        for x, y, z in (np.asarray(first), np.asarray(vertex), np.asarray(last))
    )
    ux, uy, uz, vx, vy, vz = ax - bx, ay - by, az - bz, cx - bx, cy - by, cz - bz
    across = hypot(uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx)
    return degrees(atan2(across, ux * vx + uy * vy + uz * vz))


def torsion_degrees(a: ArrayLike, b: ArrayLike, c: ArrayLike, d: ArrayLike) -> float:
    """Return the torsion a-b-c-d of four points (3,), -180 to 180 degrees.

    Positive where, seen from b to c, the far bond is turned clockwise from the near one.
    """
    points = [np.asarray(point, float) for point in (a, b, c, d)]
    first, axis, last = (points[k + 1] - points[k] for k in range(3))
    normal, next_normal = np.cross(first, axis), np.cross(axis, last)
    sine = np.dot(np.cross(normal, next_normal), unit(axis))
    return float(np.degrees(np.arctan2(sine, np.dot(normal, next_normal))))


def unit(vector: ArrayLike) -> Array:
    """Return ``vector`` (3,) scaled to length one; a zero vector is returned unchanged."""
    given = np.asarray(vector, float)
    length = float(np.linalg.norm(given))
    return given / length if length else given


def perpendicular(vector: ArrayLike) -> Array:
    """Return one unit vector (3,) at a right angle to ``vector`` (3,)."""
    given = unit(vector)
    return unit(np.cross(given, np.eye(3)[int(np.argmin(np.abs(given)))]))


def rotation_about(axis: ArrayLike, turn_degrees: float) -> Array:
    """Return the matrix (3, 3) of a turn about ``axis`` (3,), anticlockwise seen from its tip.

    Rodrigues' rotation formula.
    """
    x, y, z = unit(axis)
    cross = np.array([[0, -z, y], [z, 0, -x], [-y, x, 0]])
    turn = np.radians(turn_degrees)
    return np.asarray(np.eye(3) + np.sin(turn) * cross + (1 - np.cos(turn)) * (cross @ cross))


def rotation_between(start: ArrayLike, end: ArrayLike) -> Array:
    """Return the matrix (3, 3) of the shortest turn that brings ``start`` (3,) onto ``end``."""
    u, v = unit(start), unit(end)
    axis = np.cross(u, v)
    if np.linalg.norm(axis) < 1e-12:
        axis = perpendicular(u)
    return rotation_about(
        axis, float(np.degrees(np.arctan2(np.linalg.norm(np.cross(u, v)), u @ v)))
    )


def best_orthogonal(covariance: Array, proper: NDArray[np.bool_] | bool = True) -> Array:
    """Return the orthogonal matrices (..., 3, 3) nearest to ``covariance`` (..., 3, 3).

    Rotations where ``proper``, rotation-reflections elsewhere. The orthogonal Procrustes
    problem: P. H. Schönemann, Psychometrika 31 (1966) 1; with the determinant fixed:
    W. Kabsch, Acta Cryst. A 32 (1976) 922 (both recalled from memory).
    """
    left, _, right = np.linalg.svd(covariance)
    wanted = np.where(proper, 1.0, -1.0)
    left = left.copy()
    left[..., :, 2] *= (wanted * np.sign(np.linalg.det(left @ right)))[..., None]
    return np.asarray(left @ right)


def superpose(moving: ArrayLike, fixed: ArrayLike) -> Array:
    """Return ``moving`` (n, 3) turned and shifted by rotation alone onto ``fixed`` (n, 3)."""
    start, end = np.asarray(moving, float), np.asarray(fixed, float)
    shifted, target = start - start.mean(0), end - end.mean(0)
    return np.asarray(shifted @ best_orthogonal(target.T @ shifted).T + end.mean(0))
