"""What a dimension may look like before it is known whether it has room."""

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.clearance import discs_along
from shapeshelf.figures.model import Role, Stroke, Style

Array = NDArray[np.float64]

TEXT_SIZE = 15.0
LINE = Style("soft", None, 1.0)
ARROW = 9.0
"""Length of an arrowhead in pixels."""


@dataclass(frozen=True, slots=True)
class Candidate:
    """Lines, the points they run over, and boxes for the text with what each costs."""

    lines: tuple[Stroke, ...]
    path: Array
    boxes: Array
    box_costs: Array


Offer = tuple[float, Callable[[], Candidate]]
"""What a candidate costs before anything else is known, and how to draw it."""


def straight(a: Array, b: Array) -> Stroke:
    """Return a thin line from ``a`` to ``b``."""
    points = ((float(a[0]), float(a[1])), (float(b[0]), float(b[1])))
    return Stroke(points, LINE, Role.DIMENSION)


def sampled(a: Array, b: Array) -> Array:
    """Return points (n, 2) along a line."""
    return discs_along(np.array([a, b]), 1.0)[:, :2]
