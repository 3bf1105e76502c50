"""A numbered drawing for molecules of many atoms: flat, hydrogens on carbon left out."""

import math
from dataclasses import replace

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.clearance import EMPTY, discs_along, discs_in_box, room_around
from shapeshelf.figures.describing import describe
from shapeshelf.figures.flat import (
    Flat,
    bond_directions,
    crowded,
    free_directions,
    lay_flat,
    letter_reach,
)
from shapeshelf.figures.framing import MARGIN, extent, framed
from shapeshelf.figures.lettering import charge_script
from shapeshelf.figures.model import Drawing, Lettering, Mark, Point, Role, Style
from shapeshelf.figures.outlines import pill
from shapeshelf.figures.palette import element_colour
from shapeshelf.figures.rings import smallest_rings
from shapeshelf.figures.stereo import stereo_bonds
from shapeshelf.figures.sticks import Segment, lines, trimmed, wedge_or_hash
from shapeshelf.report.model import CompoundReport

Array = NDArray[np.float64]

_BOND = 46.0
_ROOM, _LARGEST = (320.0, 220.0), 1.5
"""Pixels for the atoms, the labels around them left aside, and the most that bonds grow to it."""
_SYMBOL, _NUMBER = 17.0, 13.0
_RING = 12.0
_NARROWEST = 400.0
_ENOUGH_ROOM = 3.0
_FEWEST_LEFT_OUT = 10
_BOND_WIDTH = 2.4
_INNER_SHARE = 0.16
"""How far towards the middle of its ring the second line of a bond is looked for."""


def numbered_drawing(report: CompoundReport) -> Drawing | None:
    """Return every heavy atom with its label, ``C1``, ``N2``, as tables name it; ``None`` where
    atoms would stand on one another."""
    flat = lay_flat(report.molecule, _BOND, _FEWEST_LEFT_OUT)
    if crowded(flat, _BOND):
        return None
    flat = replace(flat, points=flat.points * _enlarged(flat))
    body = [*_bonds(report, flat), *_symbols(report, flat)]
    everything = [*body, *_numbers(report, flat)]
    left, _, right, _ = extent(everything)
    width = max(_NARROWEST, math.ceil(right - left + 2 * MARGIN))
    marks, height = framed(everything, width)
    title = f"{report.name}, numbered drawing"
    return Drawing("bench", width, height, tuple(marks), title, describe(report))


def _enlarged(flat: Flat) -> float:
    """Return how much larger a small molecule is drawn, so that it fills the paper."""
    width, height = np.ptp(flat.points[sorted(flat.shown)], axis=0)
    return float(np.clip(min(_ROOM[0] / max(width, 1), _ROOM[1] / max(height, 1)), 1, _LARGEST))


def atom_labels(report: CompoundReport) -> tuple[str, ...]:
    """Return element and ordinal among that element for each atom."""
    counts: dict[str, int] = {}
    labels = []
    for atom in report.molecule.atoms:
        counts[atom.element] = counts.get(atom.element, 0) + 1
        labels.append(f"{atom.element}{counts[atom.element]}")
    return tuple(labels)


def _bonds(report: CompoundReport, flat: Flat) -> list[Mark]:
    marked = stereo_bonds(report.molecule, flat.points, flat.shown)
    rings = smallest_rings(report.molecule)
    marks: list[Mark] = []
    for bond, order in zip(report.molecule.bonds, report.lewis.bond_orders, strict=True):
        if not {bond.begin, bond.end} <= flat.shown:
            continue
        stereo = marked.get(frozenset((bond.begin, bond.end)))
        begin, end = (stereo.narrow, stereo.wide) if stereo else (bond.begin, bond.end)
        reach = (_reach(flat, begin, end), _reach(flat, end, begin))
        segment = trimmed(flat.at(begin), flat.at(end), *reach)
        if segment is None:
            continue
        if stereo:
            marks += wedge_or_hash(segment, stereo.towards_viewer)
        else:
            inside = _middle(flat, rings.get(frozenset((bond.begin, bond.end))))
            thin = Segment(segment.start, segment.end, _BOND_WIDTH)
            marks += lines(thin, order, bond.dative, inside)
    return marks


def _middle(flat: Flat, ring: tuple[int, ...] | None) -> Point | None:
    if not ring:
        return None
    x, y = flat.points[list(ring)].mean(axis=0)
    return (float(x), float(y))


def _reach(flat: Flat, atom: int, other: int) -> float:
    if atom in flat.lettered and _pill_width(flat, atom) <= 2 * _RING:
        return _RING + 1
    return letter_reach(flat, atom, other, _RING + 1, _SYMBOL)


def _pill_width(flat: Flat, atom: int) -> float:
    return max(2 * _RING, text_width(flat.letters[atom], _SYMBOL, True) + 9)


def _symbols(report: CompoundReport, flat: Flat) -> list[Mark]:
    marks: list[Mark] = []
    for atom in sorted(flat.lettered):
        (x, y), letters = flat.at(atom), flat.letters[atom]
        style = Style(element_colour(report.molecule.atoms[atom].element), "paper", 2.0)
        marks.append(pill(x, y, _pill_width(flat, atom), 2 * _RING, style))
        base = y + 0.36 * _SYMBOL
        marks.append(Lettering(x, base, letters, _SYMBOL, Role.SYMBOL, bold=True))
    return marks


def _numbers(report: CompoundReport, flat: Flat) -> list[Mark]:
    """Return the label of every heavy atom beside it, where it touches nothing."""
    labels, crowd = atom_labels(report), _crowd(flat)
    marks: list[Mark] = []
    for atom in sorted(flat.shown):
        one = report.molecule.atoms[atom]
        if one.element == "H":
            continue
        text = labels[atom] + charge_script(one.formal_charge)
        boxes = _spots(flat, atom, text)
        room = np.minimum(room_around(boxes, crowd), _ENOUGH_ROOM)
        box = boxes[int(np.argmax(np.round(room, 2)))]
        crowd = np.concatenate([crowd, discs_in_box(box)])
        base = float(box[1]) + 0.36 * _NUMBER
        marks.append(Lettering(float(box[0]), base, text, _NUMBER, Role.LABEL, "soft"))
    return marks


def _crowd(flat: Flat) -> Array:
    parts = [EMPTY]
    rings = smallest_rings(flat.molecule)
    for bond in flat.molecule.bonds:
        if {bond.begin, bond.end} <= flat.shown:
            ends = flat.points[[bond.begin, bond.end]]
            middle = _middle(flat, rings.get(frozenset((bond.begin, bond.end))))
            parts.append(discs_along(ends, 4.5 * (1 if middle else min(bond.order, 2))))
            if middle:
                inner = ends + (middle - ends) * _INNER_SHARE
                parts.append(discs_along(inner, 4.5))
    for atom in flat.lettered:
        parts.append(discs_in_box((*flat.at(atom), _pill_width(flat, atom), 2 * _RING + 2, 0.0)))
    return np.concatenate(parts)


def _spots(flat: Flat, atom: int, text: str) -> Array:
    """Return boxes (c, 5) around an atom, the widest gap between its bonds first."""
    (start,) = free_directions(bond_directions(flat, atom), 1)
    width, height = text_width(text, _NUMBER), _NUMBER * 0.95
    half = (_pill_width(flat, atom) / 2, _RING) if atom in flat.lettered else (3.0, 3.0)
    x, y = flat.at(atom)
    rows = []
    for push in (3.0, 7.0, 12.0):
        for step in (0, 1, -1, 2, -2, 3, -3, 4, -4, 5, -5, 6, -6, 7, -7, 8):
            way = start + step * math.pi / 8
            out_x, out_y = half[0] + push + width / 2, half[1] + push + height / 2
            rows.append((x + out_x * math.cos(way), y + out_y * math.sin(way), width, height, 0.0))
    return np.array(rows)
