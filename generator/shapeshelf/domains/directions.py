"""Angles between directions, and directions moved to a wanted angle."""

import math
from collections.abc import Sequence

import numpy as np
import numpy.typing as npt

from shapeshelf.structure.molecule import Vector

Array = npt.NDArray[np.float64]


def angle_degrees(first: Vector, second: Vector) -> float:
    """Return the angle between two unit vectors, in degrees."""
    cosine = sum(a * b for a, b in zip(first, second, strict=True))
    return math.degrees(math.acos(max(-1.0, min(1.0, cosine))))


def opened(directions: Sequence[Vector], wanted_degrees: float) -> tuple[Vector, ...]:
    """Set the first two directions at an angle, in their plane; the others stay."""
    first, second = np.array(directions[0]), np.array(directions[1])
    middle = first + second
    if np.linalg.norm(middle) < 1e-6:
        # Two opposite bonds have no plane of their own; any will do.
        middle = np.cross(first, np.eye(3)[int(np.argmin(np.abs(first)))])
    middle = middle / np.linalg.norm(middle)
    across = first - middle * (first @ middle)
    across = across / np.linalg.norm(across)
    half = math.radians(wanted_degrees) / 2
    arms = (
        middle * math.cos(half) + across * math.sin(half),
        middle * math.cos(half) - across * math.sin(half),
    )
    return (*(_vector(arm) for arm in arms), *directions[2:])


def flattened(directions: Sequence[Vector], mean_degrees: float) -> tuple[Vector, ...]:
    """Press a pyramid of three bonds towards its plane until its angles have the wanted mean.

    Its axis is the first direction after the three bonds, that of the lone pair; ``mean_degrees``
    lies below 120.
    """
    axis = np.array(directions[3])
    bonds = np.array(directions[:3])
    along = bonds @ axis
    across = bonds - np.outer(along, axis)
    low, high = 0.0, 1.0
    for _ in range(50):
        share = (low + high) / 2
        pressed = _unit(across + np.outer(share * along, axis))
        # More of the component along the axis means a steeper pyramid.
        if _mean_angle(pressed) > mean_degrees:
            low = share
        else:
            high = share
    return (*(_vector(bond) for bond in pressed), *directions[3:])


def _mean_angle(bonds: Array) -> float:
    cosines = np.clip(bonds @ bonds.T, -1, 1)[np.triu_indices(3, 1)]
    return float(np.degrees(np.arccos(cosines)).mean())


def _unit(vectors: Array) -> Array:
    return np.asarray(vectors / np.linalg.norm(vectors, axis=-1, keepdims=True))


def _vector(array: Array) -> Vector:
    return (float(array[0]), float(array[1]), float(array[2]))
