"""The bench view to a fixed scale, so that drawings of several compounds can be held together."""

import math
from dataclasses import replace

from shapeshelf.figures.bench import Stage, painted
from shapeshelf.figures.canvas import render
from shapeshelf.figures.describing import describe
from shapeshelf.figures.framing import MARGIN, extent, framed
from shapeshelf.figures.model import Drawing, Lettering, Mark, Svg
from shapeshelf.figures.scene import build_scene
from shapeshelf.report.model import CompoundReport

PIXELS_AN_ANGSTROM = 60.0


def scaled_view(report: CompoundReport) -> Svg:
    """Return the molecule without labels, ``PIXELS_AN_ANGSTROM`` to the ångström.

    True at the distance of the molecule's middle: what is nearer stands a little larger.
    """
    return render(scaled_drawing(report))


def scaled_drawing(report: CompoundReport) -> Drawing:
    """Return the view as data."""
    stage = Stage(build_scene(report))
    factor = PIXELS_AN_ANGSTROM / stage.scale
    marks, height = framed([_scaled(mark, factor) for mark in painted(stage)])
    width = math.ceil(extent(marks)[2] + MARGIN)
    return Drawing(
        "scaled", width, height, tuple(marks), f"{report.name}, to scale", describe(report)
    )


def _scaled(mark: Mark, factor: float) -> Mark:
    if isinstance(mark, Lettering):
        return replace(mark, x=mark.x * factor, y=mark.y * factor, size=mark.size * factor)
    points = tuple((x * factor, y * factor) for x, y in mark.points)
    return replace(mark, points=points)
