"""The bench view: one perspective picture with wedges, lone pairs and the key angles."""

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.angle_arcs import angle_marks, key_angles
from shapeshelf.figures.canvas import render
from shapeshelf.figures.describing import describe
from shapeshelf.figures.framing import framed
from shapeshelf.figures.model import Drawing, Lettering, Mark, Point, Role, Style, Svg
from shapeshelf.figures.numbered import numbered_drawing
from shapeshelf.figures.outlines import electron_dots, lobe, ring
from shapeshelf.figures.palette import element_colour
from shapeshelf.figures.projection import (
    VIEWPOINT_RADII,
    choose_direction,
    looking_along,
    perspective,
)
from shapeshelf.figures.scene import LOBE_RADIUS_ANGSTROM, Scene, Stick, build_scene, lobe_ends
from shapeshelf.figures.sticks import lines, rim, trimmed, wedge_or_hash
from shapeshelf.report.model import CompoundReport

Array = NDArray[np.float64]

MOST_ATOMS = 12
WIDTH = 480.0
_ROOM = (400.0, 330.0)
_LARGEST_SCALE = 108.0
_SLOPE = 0.26
"""Sine of the angle to the paper, about 15 degrees, from which a bond is wedged or hashed."""
_NEAR_GROWTH = 1.14
"""How much larger perspective draws what is near, allowed for when gaps are judged."""
_SYMBOL_SHARE = 0.78
_LARGEST_SYMBOL = 26.0


def bench_view(report: CompoundReport) -> Svg:
    """Return the bench view; for many atoms a numbered drawing without angles."""
    return render(bench_drawing(report))


def bench_drawing(report: CompoundReport) -> Drawing:
    """Return the bench view as data."""
    many = len(report.molecule.atoms) > MOST_ATOMS
    numbered = numbered_drawing(report) if many else None
    if numbered:
        return numbered
    scene = build_scene(report)
    stage = Stage(scene)
    body = painted(stage)
    angles = angle_marks(stage, () if many else key_angles(report))
    marks, height = framed([*angles.arcs, *body, *angles.labels], WIDTH)
    return Drawing(
        "bench", WIDTH, height, tuple(marks), f"{report.name}, bench view", describe(report)
    )


class Stage:
    """A scene in perspective, fitted to the paper."""

    def __init__(self, scene: Scene) -> None:
        self.scene = scene
        ends = lobe_ends(scene)
        everything = np.concatenate([scene.points, ends])
        self._middle = everything.mean(axis=0)
        span = np.linalg.norm(everything - self._middle, axis=1).max() + 0.3
        self._eye = VIEWPOINT_RADII * span
        self.view = choose_view(scene)
        drawn = perspective(everything - self._middle, self.view, self._eye)
        size = np.ptp(drawn[:, :2], axis=0)
        self.scale = float(min(_LARGEST_SCALE, *(np.array(_ROOM) / (size + 0.7))))
        self.atoms = self.project(scene.points)
        self.lobes = self.project(ends)
        self.radii = scene.radii * self.scale * self._growth(self.atoms[:, 2])

    def project(self, points: Array) -> Array:
        """Return (n, 3): x and y in pixels, depth in ångström."""
        drawn = perspective(points - self._middle, self.view, self._eye)
        return np.column_stack([drawn[:, 0] * self.scale, -drawn[:, 1] * self.scale, drawn[:, 2]])

    def lobe_radius(self, depth: float) -> float:
        """Return the drawn radius of a lobe's round end in pixels."""
        return LOBE_RADIUS_ANGSTROM * self.scale * float(self._growth(np.array([depth]))[0])

    def at(self, atom: int) -> Point:
        """Return where an atom is drawn."""
        return (float(self.atoms[atom, 0]), float(self.atoms[atom, 1]))

    def _growth(self, depth: Array) -> Array:
        grown: Array = self._eye / (self._eye - depth)
        return grown


def choose_view(scene: Scene) -> Array:
    """Return the view (3, 3): nothing hidden, the lone pairs or the main axis upright."""
    ends = lobe_ends(scene)
    points = np.concatenate([scene.points, ends])
    radii = np.concatenate([scene.radii, np.full(len(ends), LOBE_RADIUS_ANGSTROM)])
    bonds = np.array([(stick.begin, stick.end) for stick in scene.sticks]).reshape(-1, 2)
    spokes = np.array(
        [(one.atom, len(scene.points) + k) for k, one in enumerate(scene.lobes)], dtype=int
    ).reshape(-1, 2)
    toward = choose_direction(points, _NEAR_GROWTH * radii, bonds, spokes)
    return looking_along(toward, _upright(scene, toward))


def _upright(scene: Scene, toward: Array) -> Array:
    """Return what should point up: the lone pairs together, the main axis, else a bond."""
    wishes = [np.sum([one.direction for one in scene.lobes], axis=0)] if scene.lobes else []
    wishes += list(np.eye(3)[::-1])
    for wish in wishes:
        drawn = wish - (wish @ toward) * toward
        if np.linalg.norm(drawn) > 0.55:
            return np.asarray(wish)
    return np.asarray(np.eye(3)[0])


def painted(stage: Stage) -> list[Mark]:
    """Return atoms, bonds and lobes, the farthest first."""
    items: list[tuple[float, list[Mark]]] = []
    for atom in range(len(stage.atoms)):
        items.append((float(stage.atoms[atom, 2]), _atom(stage, atom)))
    for stick in stage.scene.sticks:
        depth = float(stage.atoms[[stick.begin, stick.end], 2].mean())
        items.append((depth, _bond(stage, stick)))
    for index in range(len(stage.scene.lobes)):
        host = stage.scene.lobes[index].atom
        depth = min(float(stage.lobes[index, 2]), float(stage.atoms[host, 2]) - 0.01)
        items.append((depth, _lobe(stage, index)))
    items.sort(key=lambda item: item[0])
    return [mark for _, marks in items for mark in marks]


def _atom(stage: Stage, atom: int) -> list[Mark]:
    element = stage.scene.elements[atom]
    (x, y), radius = stage.at(atom), float(stage.radii[atom])
    style = Style(element_colour(element), "paper", 2.6)
    size = round(min(_LARGEST_SYMBOL, radius * _SYMBOL_SHARE), 1)
    symbol = Lettering(x, y + 0.36 * size, element, size, Role.SYMBOL, bold=True)
    return [ring(x, y, radius, style), symbol]


def _bond(stage: Stage, stick: Stick) -> list[Mark]:
    begin, end = _described_first(stage.scene, stick)
    segment = trimmed(
        stage.at(begin), stage.at(end), *(float(stage.radii[k]) + 1 for k in (begin, end))
    )
    if segment is None:
        return []
    rise = float(stage.atoms[end, 2] - stage.atoms[begin, 2])
    slope = rise / float(np.linalg.norm(stage.scene.points[end] - stage.scene.points[begin]))
    if stick.dative or stick.order > 1.2 or abs(slope) < _SLOPE:
        return [rim(segment), *lines(segment, stick.order, stick.dative)]
    return [rim(segment), *wedge_or_hash(segment, slope > 0)]


def _described_first(scene: Scene, stick: Stick) -> tuple[int, int]:
    """Return the bond's atoms, the one with more bonds first; a dative bond as it is given."""
    if stick.dative:
        return stick.begin, stick.end
    degree = [
        sum(atom in (s.begin, s.end) for s in scene.sticks) for atom in (stick.begin, stick.end)
    ]
    return (stick.begin, stick.end) if degree[0] >= degree[1] else (stick.end, stick.begin)


def _lobe(stage: Stage, index: int) -> list[Mark]:
    one = stage.scene.lobes[index]
    middle = (float(stage.lobes[index, 0]), float(stage.lobes[index, 1]))
    radius = stage.lobe_radius(float(stage.lobes[index, 2]))
    outline = lobe(stage.at(one.atom), middle, radius, Style("line", "lobe", 1.2))
    return [outline, *electron_dots(stage.at(one.atom), middle, one.electrons, radius * 0.34)]
