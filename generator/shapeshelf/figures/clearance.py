"""How much room a label has: boxes against everything already drawn.

While a figure is laid out, all that is drawn is a crowd of discs, an array (n, 3) of x, y and
radius in pixels: lines are sampled along their length. Boxes are rows (x, y, width, height,
angle in degrees anticlockwise) about their centre, y downwards.
"""

from collections.abc import Sequence
from itertools import pairwise

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

STEP = 4.0
"""Pixels between samples of a line."""
EMPTY: Array = np.empty((0, 3))


def discs_along(points: Sequence[Sequence[float]] | Array, radius: float) -> Array:
    """Return discs (n, 3) along a polyline (m, 2)."""
    corners = np.asarray(points, dtype=float)
    pieces = [corners[-1:]]
    for start, end in pairwise(corners):
        count = max(1, int(np.hypot(*(end - start)) / STEP))
        pieces.append(start + (np.arange(count) / count)[:, None] * (end - start))
    along = np.concatenate(pieces)
    return np.column_stack([along, np.full(len(along), radius)])


def discs_in_box(box: Sequence[float] | Array) -> Array:
    """Return discs (n, 3) that fill a box, a row of its height in diameter."""
    x, y, width, height, angle = box
    reach = max(0.0, (width - height) / 2)
    count = max(2, int(2 * reach / STEP) + 1)
    turn = np.radians(angle)
    offsets = np.linspace(-reach, reach, count)
    across = np.column_stack([x + offsets * np.cos(turn), y - offsets * np.sin(turn)])
    return np.column_stack([across, np.full(count, height / 2)])


def room_around(boxes: Array, crowd: Array) -> Array:
    """Return for each box (c, 5) the smallest gap to the crowd (n, 3), negative if it overlaps."""
    if not len(crowd):
        return np.full(len(boxes), np.inf)
    turn = np.radians(boxes[:, 4])[:, None]
    dx = crowd[None, :, 0] - boxes[:, 0, None]
    dy = crowd[None, :, 1] - boxes[:, 1, None]
    along = np.abs(dx * np.cos(turn) - dy * np.sin(turn)) - boxes[:, 2, None] / 2
    across = np.abs(dx * np.sin(turn) + dy * np.cos(turn)) - boxes[:, 3, None] / 2
    outside = np.hypot(np.maximum(along, 0), np.maximum(across, 0))
    inside = np.minimum(np.maximum(along, across), 0)
    gap: Array = (outside + inside - crowd[None, :, 2]).min(axis=1)
    return gap


def room_along(points: Array, crowd: Array) -> float:
    """Return the smallest gap between sampled points (m, 2) and the crowd (n, 3)."""
    if not len(crowd) or not len(points):
        return float("inf")
    apart = np.hypot(*(points[:, None, :] - crowd[None, :, :2]).transpose(2, 0, 1))
    return float((apart - crowd[None, :, 2]).min())
