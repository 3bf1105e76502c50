"""A numbered drawing for molecules of many atoms: flat, hydrogens on carbon left out."""

import math

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.describing import describe
from shapeshelf.figures.flat import Flat, bond_directions, free_directions, lay_flat
from shapeshelf.figures.framing import MARGIN, extent, framed
from shapeshelf.figures.lettering import charge_script
from shapeshelf.figures.model import Drawing, Lettering, Mark, Point, Role, Style
from shapeshelf.figures.outlines import ring
from shapeshelf.figures.palette import element_colour
from shapeshelf.figures.stereo import stereo_bonds
from shapeshelf.figures.sticks import Segment, lines, trimmed, wedge_or_hash
from shapeshelf.report.model import CompoundReport

_BOND = 46.0
_SYMBOL, _NUMBER = 17.0, 12.0
_RING, _RING_WIDE = 12.0, 14.0
_NUMBER_OUT = 14.0
_FEWEST_LEFT_OUT = 10
_BOND_WIDTH = 2.4


def numbered_drawing(report: CompoundReport) -> Drawing:
    """Return every heavy atom with its label, ``C1``, ``N2``, as tables and cards name it."""
    flat = lay_flat(report.molecule, _BOND, _FEWEST_LEFT_OUT)
    marks = [*_bonds(report, flat), *_atoms(report, flat)]
    marks, height = framed(marks)
    width = math.ceil(extent(marks)[2] + MARGIN)
    title = f"{report.name}, numbered drawing"
    return Drawing("bench", width, height, tuple(marks), title, describe(report))


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
    marks: list[Mark] = []
    for bond, order in zip(report.molecule.bonds, report.lewis.bond_orders, strict=True):
        if not {bond.begin, bond.end} <= flat.shown:
            continue
        stereo = marked.get(frozenset((bond.begin, bond.end)))
        begin, end = (stereo.narrow, stereo.wide) if stereo else (bond.begin, bond.end)
        segment = trimmed(flat.at(begin), flat.at(end), *(_reach(flat, k) for k in (begin, end)))
        if segment is None:
            continue
        if stereo:
            marks += wedge_or_hash(segment, stereo.towards_viewer)
        else:
            marks += lines(Segment(segment.start, segment.end, _BOND_WIDTH), order, bond.dative)
    return marks


def _reach(flat: Flat, atom: int) -> float:
    if atom not in flat.lettered:
        return 0.0
    return _ring_radius(flat.molecule.atoms[atom].element) + 1


def _ring_radius(element: str) -> float:
    return _RING if len(element) == 1 else _RING_WIDE


def _atoms(report: CompoundReport, flat: Flat) -> list[Mark]:
    labels = atom_labels(report)
    marks: list[Mark] = []
    for atom in sorted(flat.shown):
        marks += _atom(report, flat, atom, labels[atom])
    return marks


def _atom(report: CompoundReport, flat: Flat, atom: int, label: str) -> list[Mark]:
    one = report.molecule.atoms[atom]
    x, y = flat.at(atom)
    marks: list[Mark] = []
    if atom in flat.lettered:
        radius = _ring_radius(one.element)
        marks.append(ring(x, y, radius, Style(element_colour(one.element), "paper", 2.0)))
        symbol = Lettering(x, y + 0.36 * _SYMBOL, one.element, _SYMBOL, Role.SYMBOL, bold=True)
        marks.append(symbol)
    if one.element == "H":
        return marks
    text = label + charge_script(one.formal_charge)
    out = _NUMBER_OUT + (9.0 if atom in flat.lettered else 0.0)
    marks.append(_number(flat, atom, text, out))
    return marks


def _number(flat: Flat, atom: int, text: str, out: float) -> Lettering:
    (way,) = free_directions(bond_directions(flat, atom), 1)
    x, y = flat.at(atom)
    wide = (text_width(text, _NUMBER) - 8) / 2 * abs(math.cos(way))
    spot: Point = (x + (out + wide) * math.cos(way), y + out * math.sin(way))
    return Lettering(spot[0], spot[1] + 0.36 * _NUMBER, text, _NUMBER, Role.LABEL, "soft")
