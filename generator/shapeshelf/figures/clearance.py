"""How much room a label has: boxes against everything already drawn.

While a figure is laid out, all that is drawn is a crowd of discs, an array (n, 3) of x, y and
radius in pixels: lines are sampled along their length. Boxes are rows (x, y, width, height,
angle in degrees anticlockwise) about their centre, y downwards.
"""

from collections.abc import Sequence

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

STEP = 4.0
"""Pixels between samples of a line."""
NEAR = 10.0
"""Gaps are not told apart beyond this many pixels."""
EMPTY: Array = np.empty((0, 3))


def discs_along(points: Sequence[Sequence[float]] | Array, radius: float) -> Array:
    """Return discs (n, 3) along a polyline (m, 2), a few pixels apart."""
    corners = np.asarray(points, dtype=float)
    steps = np.diff(corners, axis=0)
    lengths = np.sqrt((steps**2).sum(axis=1))
    reached = np.concatenate([[0.0], np.cumsum(lengths)])
    count = max(2, int(reached[-1] / STEP) + 2)
    at = np.arange(count) * (reached[-1] / (count - 1))
    discs = np.empty((count, 3))
    discs[:, 0] = np.interp(at, reached, corners[:, 0])
    discs[:, 1] = np.interp(at, reached, corners[:, 1])
    discs[:, 2] = radius
    return discs


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
    crowd = _within(crowd, boxes[:, :2], float(np.hypot(boxes[:, 2], boxes[:, 3]).max()) / 2)
    if not len(crowd):
        return np.full(len(boxes), NEAR)
    turn = np.radians(boxes[:, 4])[:, None]
    cosine, sine = np.cos(turn), np.sin(turn)
    dx = crowd[None, :, 0] - boxes[:, 0, None]
    dy = crowd[None, :, 1] - boxes[:, 1, None]
    along = np.abs(dx * cosine - dy * sine) - boxes[:, 2, None] / 2
    across = np.abs(dx * sine + dy * cosine) - boxes[:, 3, None] / 2
    outside = np.sqrt(np.maximum(along, 0) ** 2 + np.maximum(across, 0) ** 2)
    inside = np.minimum(np.maximum(along, across), 0)
    gap: Array = (outside + inside - crowd[None, :, 2]).min(axis=1)
    return gap


def room_along(points: Array, crowd: Array) -> float:
    """Return the smallest gap between sampled points (m, 2) and the crowd (n, 3)."""
    gaps = gaps_along(points, crowd)
    return float(gaps.min()) if len(gaps) else float("inf")


def gaps_along(points: Array, crowd: Array) -> Array:
    """Return for each sampled point (m, 2) its gap to the crowd (n, 3)."""
    if not len(points):
        return np.empty(0)
    crowd = _within(crowd, points, 0.0)
    if not len(crowd):
        return np.full(len(points), NEAR)
    dx = points[:, 0, None] - crowd[None, :, 0]
    dy = points[:, 1, None] - crowd[None, :, 1]
    gaps: Array = (np.sqrt(dx * dx + dy * dy) - crowd[None, :, 2]).min(axis=1)
    return gaps


def _within(crowd: Array, points: Array, reach: float) -> Array:
    """Keep the discs that come near the rectangle around points (m, 2)."""
    low, high = points.min(axis=0) - reach - NEAR, points.max(axis=0) + reach + NEAR
    x, y, radius = crowd[:, 0], crowd[:, 1], crowd[:, 2]
    near = (x + radius > low[0]) & (x - radius < high[0])
    near &= (y + radius > low[1]) & (y - radius < high[1])
    return np.asarray(crowd[near])
