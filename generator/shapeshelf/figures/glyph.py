"""A shape without a molecule: a tiny glyph for lists, a larger drawing for the shape's page."""

import math
from dataclasses import dataclass
from functools import cache

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.bench import Stage
from shapeshelf.figures.canvas import render
from shapeshelf.figures.framing import MARGIN, extent, framed
from shapeshelf.figures.model import Drawing, Mark, Role, Stroke, Style, Svg
from shapeshelf.figures.outlines import electron_dots, lobe, ring
from shapeshelf.figures.scene import Lobe, Scene, Stick
from shapeshelf.figures.sticks import lines, rim, trimmed, wedge_or_hash
from shapeshelf.reference.polyhedra import POLYHEDRA

Array = NDArray[np.float64]

SIZE = 24.0
_BOND_ANGSTROM = 1.5
_SLOPE = 0.26
_DOT, _MIDDLE_DOT = 2.0, 2.7


@dataclass(frozen=True, slots=True)
class _Origin:
    """The polyhedron of all domains, and which of its vertices hold lone pairs."""

    symbol: str
    left_out: tuple[int, ...] = ()


_ORIGINS = {
    "linear": _Origin("L-2"),
    "bent": _Origin("T-4", (2, 3)),
    "trigonal planar": _Origin("TP-3"),
    "trigonal pyramidal": _Origin("T-4", (0,)),
    "T-shaped": _Origin("TBPY-5", (3, 4)),
    "tetrahedral": _Origin("T-4"),
    "square planar": _Origin("OC-6", (0, 1)),
    "see-saw": _Origin("TBPY-5", (4,)),
    "trigonal pyramid of four": _Origin("TBPY-5", (0,)),
    "trigonal bipyramidal": _Origin("TBPY-5"),
    "square pyramidal": _Origin("OC-6", (1,)),
    "pentagonal planar": _Origin("PBPY-7", (0, 1)),
    "octahedral": _Origin("OC-6"),
    "trigonal prismatic": _Origin("TPR-6"),
    "pentagonal pyramidal": _Origin("PBPY-7", (1,)),
    "distorted octahedral": _Origin("OCF-7", (0,)),
    "pentagonal bipyramidal": _Origin("PBPY-7"),
    "capped octahedral": _Origin("OCF-7"),
    "capped trigonal prismatic": _Origin("TPRS-7"),
    "square antiprismatic": _Origin("SAPR-8"),
    "cubic": _Origin("CU-8"),
    "dodecahedral": _Origin("DD-8"),
    "tricapped trigonal prismatic": _Origin("TPRS-9"),
}


@cache
def glyph(shape: str | None) -> Svg:
    """Return the shape in a square of 24 pixels; an unnamed shape is an empty ring."""
    stage = _stage(shape) if shape in _ORIGINS else None
    marks = _tiny(stage) if stage else [_unnamed()]
    title = shape or "no named shape"
    return render(Drawing("glyph", SIZE, SIZE, tuple(marks), title, f"Shape: {title}."))


@cache
def shape_drawing(shape: str) -> Svg | None:
    """Return the ideal shape in the bench view's manner, lone pairs as lobes, atoms unnamed.

    ``None`` where the shape has no ideal directions.
    """
    if shape not in _ORIGINS:
        return None
    stage = _stage(shape)
    marks, height = framed(_large(stage))
    width = math.ceil(extent(marks)[2] + MARGIN)
    bonds, pairs = len(stage.scene.sticks), len(stage.scene.lobes)
    words = f"{bonds} neighbours" + (
        f", {pairs} lone pair{'s' if pairs > 1 else ''}" if pairs else ""
    )
    return render(Drawing("shape", width, height, tuple(marks), shape, f"{shape}: {words}."))


@cache
def _stage(shape: str) -> Stage:
    origin = _ORIGINS[shape]
    vertices = next(kinds[origin.symbol] for kinds in POLYHEDRA.values() if origin.symbol in kinds)
    polar, azimuth = np.radians(np.array(vertices)).T
    ways = np.column_stack(
        [np.sin(polar) * np.cos(azimuth), np.sin(polar) * np.sin(azimuth), np.cos(polar)]
    )
    kept = [k for k in range(len(ways)) if k not in origin.left_out]
    points = np.concatenate([np.zeros((1, 3)), _BOND_ANGSTROM * ways[kept]])
    scene = Scene(
        elements=("",) * len(points),
        points=points,
        radii=np.full(len(points), 0.2),
        sticks=tuple(Stick(0, k + 1, 1.0) for k in range(len(kept))),
        lobes=tuple(
            Lobe(0, (float(ways[k][0]), float(ways[k][1]), float(ways[k][2])), 2)
            for k in origin.left_out
        ),
    )
    return Stage(scene)


def _tiny(stage: Stage) -> list[Mark]:
    flat = (
        stage.atoms[:, :2] - (stage.atoms[:, :2].max(axis=0) + stage.atoms[:, :2].min(axis=0)) / 2
    )
    reach = np.abs(flat).max()
    flat = flat * ((SIZE / 2 - _DOT - 1) / reach) + SIZE / 2
    depth = stage.atoms[:, 2]
    marks: list[Mark] = []
    for atom in sorted(range(1, len(flat)), key=lambda k: (float(depth[k]), k)):
        slope = float(depth[atom] - depth[0]) / _BOND_ANGSTROM
        width = 1.3 + 0.7 * slope
        line = tuple((float(x), float(y)) for x, y in flat[[0, atom]])
        marks.append(Stroke(line, Style("ink", None, round(width, 1)), Role.BOND))
        marks.append(
            ring(float(flat[atom, 0]), float(flat[atom, 1]), _DOT, Style("ink", "paper", 1.1))
        )
    at = sum(1 for k in range(1, len(flat)) if depth[k] < depth[0]) * 2
    middle = ring(float(flat[0, 0]), float(flat[0, 1]), _MIDDLE_DOT, Style(None, "ink"))
    return [*marks[:at], middle, *marks[at:]]


def _unnamed() -> Mark:
    return ring(SIZE / 2, SIZE / 2, 7.0, Style("soft", None, 1.4, (2.5, 2.5)))


def _large(stage: Stage) -> list[Mark]:
    items: list[tuple[float, list[Mark]]] = []
    for atom in range(len(stage.atoms)):
        fill = "ink" if atom == 0 else "paper"
        one = ring(*stage.at(atom), float(stage.radii[atom]), Style("ink", fill, 2.2))
        items.append((float(stage.atoms[atom, 2]), [one]))
    for stick in stage.scene.sticks:
        reach = [float(stage.radii[k]) + 1 for k in (stick.begin, stick.end)]
        segment = trimmed(stage.at(stick.begin), stage.at(stick.end), *reach)
        slope = float(stage.atoms[stick.end, 2] - stage.atoms[0, 2]) / _BOND_ANGSTROM
        if segment:
            drawn = wedge_or_hash(segment, slope > 0) if abs(slope) > _SLOPE else lines(segment, 1)
            items.append((float(stage.atoms[[0, stick.end], 2].mean()), [rim(segment), *drawn]))
    for index, one_lobe in enumerate(stage.scene.lobes):
        middle = (float(stage.lobes[index, 0]), float(stage.lobes[index, 1]))
        radius = stage.lobe_radius(float(stage.lobes[index, 2]))
        outline = lobe(stage.at(0), middle, radius, Style("line", "lobe", 1.2))
        dots = electron_dots(stage.at(0), middle, one_lobe.electrons, radius * 0.34)
        items.append(
            (min(float(stage.lobes[index, 2]), float(stage.atoms[0, 2]) - 0.01), [outline, *dots])
        )
    items.sort(key=lambda item: item[0])
    return [mark for _, marks in items for mark in marks]
