"""The dipole moment on a sheet: an arrow from positive to negative with its length in debye."""

import math

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.clearance import discs_along, room_along, room_around
from shapeshelf.figures.dimensions import Ground
from shapeshelf.figures.model import Lettering, Mark, Point, Role, Stroke, Style
from shapeshelf.figures.numbers import debye_text
from shapeshelf.figures.outlines import arrowhead
from shapeshelf.report.model import CompoundReport

Array = NDArray[np.float64]

_PIXELS_PER_DEBYE, _SHORTEST, _LONGEST = 24.0, 28.0, 74.0
_LEAST_DEBYE = 0.005
_DIPOLE_SIZE = 15.0


def dipole_arrow(report: CompoundReport, grounds: list[Ground]) -> list[Mark]:
    """Return the dipole beside the first view that shows it in the paper, if there is one."""
    value, vector = report.dipole_debye, report.dipole_model.vector_debye
    if value is None or vector is None or value.value < _LEAST_DEBYE:
        return []
    way = np.array(report.symmetry.axes) @ np.array(vector)
    if np.linalg.norm(way) < 1e-6:
        return []
    way = way / np.linalg.norm(way)
    length = min(_LONGEST, max(_SHORTEST, _PIXELS_PER_DEBYE * value.value))
    ranked = sorted(
        (ground for ground in grounds if ground.painted.view.lobes),
        key=lambda ground: round(abs(float(ground.painted.view.frame[2] @ way)), 2),
    )
    for ground in ranked:
        heading = ground.painted.view.frame[:2] @ way * (1, -1)
        if np.linalg.norm(heading) > 0.5:
            drawn = _dipole(ground, heading, length, debye_text(value))
            if drawn:
                return drawn
    return []


def _dipole(ground: Ground, heading: Array, length: float, text: str) -> list[Mark]:
    """Return the arrow to one side of a view: the crossed end is positive."""
    width, height = text_width(text, _DIPOLE_SIZE), _DIPOLE_SIZE * 0.8
    way = heading / np.linalg.norm(heading)
    held = ground.painted.crowd
    left, right = float(held[:, 0].min()), float(held[:, 0].max())
    top, bottom = float(held[:, 1].min()), float(held[:, 1].max())
    for out in (40.0, 52.0, 30.0, 66.0, 16.0, -10.0, -30.0):
        for x in (right + out, left - out):
            for share in (0.5, 0.3, 0.7, 0.1, 0.9):
                middle = np.array([x, top + share * (bottom - top)])
                a, b = middle - way * length / 2, middle + way * length / 2
                low = max(a[1], b[1]) + height / 2 + 9
                box = np.array([middle[0], low, width, height, 0.0])
                shaft = discs_along(np.array([a, b]), 6.0)[:, :2]
                free = room_around(box[None, :], ground.crowd)[0] >= 4
                if free and room_along(shaft, ground.crowd) > 8.5:
                    return _dipole_marks(a, b, way, text, box)
    return []


def _dipole_marks(a: Array, b: Array, way: Array, text: str, box: Array) -> list[Mark]:
    line = Style("dipole", None, 2.2)
    across = np.array([-way[1], way[0]]) * 6
    foot = a + way * 6
    return [
        Stroke((_point(a), _point(b - way * 6)), line, Role.DIMENSION),
        Stroke((_point(foot - across), _point(foot + across)), line, Role.DIMENSION),
        arrowhead(_point(b), math.atan2(way[1], way[0]), 13, "dipole", Role.DIMENSION),
        Lettering(
            float(box[0]), float(box[1]) + 0.36 * _DIPOLE_SIZE, text, _DIPOLE_SIZE, colour="dipole"
        ),
    ]


def _point(row: Array) -> Point:
    return (float(row[0]), float(row[1]))
