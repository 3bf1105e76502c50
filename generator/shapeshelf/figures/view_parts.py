"""One orthographic view on paper: bonds, rings, lobes, and what lies behind in dashes."""

from dataclasses import dataclass, field

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.clearance import EMPTY, discs_along
from shapeshelf.figures.layout import View
from shapeshelf.figures.model import Lettering, Mark, Point, Role, Style
from shapeshelf.figures.outlines import electron_dots, lobe, ring
from shapeshelf.figures.palette import element_colour
from shapeshelf.figures.scene import LOBE_RADIUS_ANGSTROM, Scene, Stick, lobe_ends
from shapeshelf.figures.sticks import Segment, lines, trimmed

Array = NDArray[np.float64]

SYMBOL_SHARE = 0.8
_LARGEST_SYMBOL = 24.0
_BOND_WIDTH = 2.6
_RING_WIDTH = 2.3
_SAME_PLACE = 1.5
_LOBES, _BONDS, _RINGS = range(3)
_END_ON_RIM = 5.0
"""Pixels by which a lobe that points at the viewer shows around the ring of its atom."""
_HIDDEN_DASH = (3.5, 3.0)
_LEVEL_ANGSTROM = 0.05
"""Atoms whose depths differ by less stand level: neither hides the other."""


@dataclass(frozen=True, slots=True)
class Painted:
    """A view as marks, what it occupies, and which symbols found no place of their own."""

    view: View
    radii: Array
    marks: tuple[Mark, ...]
    crowd: Array
    """Discs (n, 3) of rings, bonds and lobes."""
    rings: Array
    """Discs (k, 3) of the rings alone, one for each shown atom."""
    covered: tuple[tuple[int, tuple[int, ...]], ...] = field(default=())
    """(atom in front, atoms whose symbols it hides, nearest first)."""


def paint(scene: Scene, view: View) -> Painted:
    """Return a view with the farthest atoms drawn first and hidden outlines dashed on top."""
    radii = scene.radii * view.scale
    hidden = _hiding(scene, view, radii)
    marks: list[Mark] = []
    for _, _, drawn in sorted(_items(scene, view, radii, hidden), key=lambda item: item[:2]):
        marks += drawn
    for atom, front in hidden.items():
        if _outline_differs(view, radii, atom, front):
            marks.append(_dashed(view, radii, atom))
    shown = list(view.shown)
    rings = np.column_stack([view.points[shown], radii[shown] + 1.5])
    crowd = np.concatenate([rings, _occupied(scene, view)])
    return Painted(view, radii, tuple(marks), crowd, rings, _covered(view, hidden))


def _items(
    scene: Scene, view: View, radii: Array, hidden: dict[int, int]
) -> list[tuple[int, float, list[Mark]]]:
    """Return (layer, depth, marks): lobes lie under bonds, bonds under rings, so that no symbol
    is struck through; what hides what is told by the rings."""
    items: list[tuple[int, float, list[Mark]]] = []
    for atom in view.shown:
        items.append(
            (_RINGS, float(view.depth[atom]), _atom(scene, view, radii, atom, atom in hidden))
        )
    for stick in scene.sticks:
        if {stick.begin, stick.end} <= set(view.shown):
            depth = float(min(view.depth[stick.begin], view.depth[stick.end]))
            items.append((_BONDS, depth, _bond(view, radii, stick)))
    if view.lobes:
        ends, depths = view.place(lobe_ends(scene)), lobe_ends(scene) @ view.frame[2]
        for index, one in enumerate(scene.lobes):
            depth = float(depths[index])
            items.append((_LOBES, depth, _lobe(view, radii, one.atom, ends[index], one.electrons)))
    return items


def _hiding(scene: Scene, view: View, radii: Array) -> dict[int, int]:
    """Return, for each atom whose symbol is covered, the nearest atom that covers it."""
    hidden: dict[int, int] = {}
    for atom in view.shown:
        inner = 0.45 * radii[atom]
        fronts = [
            other
            for other in view.shown
            if view.depth[other] > view.depth[atom] + _LEVEL_ANGSTROM
            and _apart(view, atom, other) < radii[other] + inner
        ]
        if fronts:
            hidden[atom] = max(fronts, key=lambda k: (float(view.depth[k]), -k))
    return hidden


def _covered(view: View, hidden: dict[int, int]) -> tuple[tuple[int, tuple[int, ...]], ...]:
    nearest_first = sorted(hidden, key=lambda atom: -float(view.depth[atom]))
    return tuple(
        (front, tuple(atom for atom in nearest_first if hidden[atom] == front))
        for front in sorted(set(hidden.values()))
    )


def _apart(view: View, one: int, other: int) -> float:
    return float(np.hypot(*(view.points[one] - view.points[other])))


def _outline_differs(view: View, radii: Array, atom: int, front: int) -> bool:
    """Tell whether part of a hidden ring lies inside the ring in front and off its line."""
    apart, gap = _apart(view, atom, front), abs(radii[atom] - radii[front])
    if apart < _SAME_PLACE and radii[atom] > radii[front]:
        return False
    return not (apart < _SAME_PLACE and gap < _SAME_PLACE)


def _dashed(view: View, radii: Array, atom: int) -> Mark:
    style = Style("soft", None, 1.2, _HIDDEN_DASH)
    return ring(*_spot(view, atom), float(radii[atom]), style, Role.FRAME)


def _atom(scene: Scene, view: View, radii: Array, atom: int, hidden: bool) -> list[Mark]:
    element = scene.elements[atom]
    x, y = _spot(view, atom)
    radius = float(radii[atom])
    marks: list[Mark] = [ring(x, y, radius, Style(element_colour(element), "paper", _RING_WIDTH))]
    if not hidden:
        size = round(min(_LARGEST_SYMBOL, radius * SYMBOL_SHARE), 1)
        marks.append(Lettering(x, y + 0.36 * size, element, size, Role.SYMBOL, bold=True))
    return marks


def _bond(view: View, radii: Array, stick: Stick) -> list[Mark]:
    reach = (float(radii[stick.begin]), float(radii[stick.end]))
    segment = trimmed(_spot(view, stick.begin), _spot(view, stick.end), *reach)
    if segment is None:
        return []
    segment = Segment(segment.start, segment.end, _BOND_WIDTH)
    return list(lines(segment, stick.order, stick.dative))


def _lobe(view: View, radii: Array, atom: int, end: Array, electrons: int) -> list[Mark]:
    middle, apex = (float(end[0]), float(end[1])), _spot(view, atom)
    radius = LOBE_RADIUS_ANGSTROM * view.scale
    style = Style("line", "lobe", 1.0)
    if np.hypot(middle[0] - apex[0], middle[1] - apex[1]) < radius * 0.8:
        return [ring(*middle, max(radius, float(radii[atom]) + _END_ON_RIM), style, Role.LOBE)]
    outline = lobe(apex, middle, radius, style)
    return [outline, *electron_dots(apex, middle, electrons, radius * 0.32)]


def _spot(view: View, atom: int) -> Point:
    return (float(view.points[atom, 0]), float(view.points[atom, 1]))


def _occupied(scene: Scene, view: View) -> Array:
    parts = [EMPTY]
    for stick in scene.sticks:
        if {stick.begin, stick.end} <= set(view.shown):
            parts.append(discs_along(view.points[[stick.begin, stick.end]], 4.5))
    if view.lobes and scene.lobes:
        radius = LOBE_RADIUS_ANGSTROM * view.scale
        for one, end in zip(scene.lobes, view.place(lobe_ends(scene)), strict=True):
            line = np.array([view.points[one.atom], end])
            parts += [discs_along(line[1:], radius), discs_along(line, radius / 2)]
    return np.concatenate(parts)
