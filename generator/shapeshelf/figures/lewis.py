"""The Lewis structure: bonds, lone pairs, single electrons, formal charges, resonance forms."""

import math

import numpy as np
from numpy.typing import NDArray

from shapeshelf.domains.model import ResonanceForm
from shapeshelf.figures.canvas import render, text_width
from shapeshelf.figures.clearance import EMPTY, discs_along, discs_in_box, gaps_along
from shapeshelf.figures.flat import (
    MANY_ATOMS,
    Flat,
    bond_directions,
    crowded,
    free_directions,
    lay_flat,
    letter_reach,
)
from shapeshelf.figures.framing import MARGIN, extent, framed, lettering_box, shifted
from shapeshelf.figures.lettering import charge_script, plain
from shapeshelf.figures.model import Drawing, Lettering, Mark, Point, Role, Stroke, Style, Svg
from shapeshelf.figures.outlines import arrowhead, ring
from shapeshelf.figures.sticks import lines, trimmed
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.report.model import CompoundReport
from shapeshelf.structure.molecule import Molecule

Array = NDArray[np.float64]

MOST_FORMS = 4
_BOND, _SYMBOL, _DOT = 56.0, 22.0, 2.3
_PAIR_OUT, _PAIR_APART = 19.0, 4.2
_CHARGE_OUT, _CHARGE_SIZE = 23.0, 16.0
_ARROW, _GAP, _ROW_WIDTH = 52.0, 16.0, 440.0
_NOTE_SIZE = 14.0
_CROWDED = 5.2
_HALF_LETTER = 12.0
_CHARGE_ROOM = 2.0
_UP_RIGHT = -math.pi / 4


def lewis_structure(report: CompoundReport) -> Svg | None:
    """Return the Lewis structure, resonance forms side by side; ``None`` where it cannot be
    drawn flat without atoms on one another."""
    drawing = lewis_drawing(report)
    return render(drawing) if drawing else None


def lewis_drawing(report: CompoundReport) -> Drawing | None:
    """Return the Lewis structure as data."""
    bond = _BOND * _stretch(report.molecule)
    flat = lay_flat(report.molecule, bond)
    if crowded(flat, bond):
        return None
    forms = report.lewis.forms[: _forms_drawn(report.molecule)]
    marks = _in_rows([_form(report, flat, form) for form in forms])
    marks += _not_all(marks, len(forms), len(report.lewis.forms))
    marks, height = framed(marks)
    width = math.ceil(extent(marks)[2] + MARGIN)
    title = f"{report.name}, Lewis structure"
    return Drawing("lewis", width, height, tuple(marks), title, _in_words(report))


def _forms_drawn(molecule: Molecule) -> int:
    """One form for many atoms: there, forms mostly shift the double bonds of rings."""
    return 1 if len(molecule.atoms) >= MANY_ATOMS else MOST_FORMS


def nonbonding(molecule: Molecule, form: ResonanceForm, atom: int) -> int | None:
    """Return the electrons at an atom that take part in no bond; ``None`` for d and f blocks.

    Valence electrons less formal charge less one for each bond order; a dative bond takes two
    from its donor and none from its acceptor.
    """
    group = ELEMENTS[molecule.atoms[atom].element].group
    if group is None or 2 < group < 13:
        return None
    valence = group - 10 if group > 2 else group
    if molecule.atoms[atom].element == "He":
        valence = 2
    shared = 0
    for bond, order in zip(molecule.bonds, form.bond_orders, strict=True):
        if atom in (bond.begin, bond.end):
            shared += (2 if atom == bond.begin else 0) if bond.dative else order
    return max(0, valence - form.formal_charges[atom] - shared)


def _form(report: CompoundReport, flat: Flat, form: ResonanceForm) -> list[Mark]:
    marks: list[Mark] = []
    for bond, order in zip(report.molecule.bonds, form.bond_orders, strict=True):
        if {bond.begin, bond.end} <= flat.shown:
            ends = ((bond.begin, bond.end), (bond.end, bond.begin))
            reach = [letter_reach(flat, *pair, _HALF_LETTER, _SYMBOL) for pair in ends]
            segment = trimmed(flat.at(bond.begin), flat.at(bond.end), *reach)
            marks += lines(segment, order, bond.dative) if segment else []
    for atom in sorted(flat.shown):
        marks += _atom(report, flat, form, atom)
    return [*marks, *_charges(flat, form, marks)]


def _atom(report: CompoundReport, flat: Flat, form: ResonanceForm, atom: int) -> list[Mark]:
    marks: list[Mark] = []
    x, y = flat.at(atom)
    if atom in flat.lettered:
        symbol = flat.letters[atom]
        marks.append(Lettering(x, y + 0.36 * _SYMBOL, symbol, _SYMBOL, Role.SYMBOL, bold=True))
    pairs, singles = _electrons(report, form, atom)
    taken = bond_directions(flat, atom)
    ways = free_directions(taken, pairs + singles)
    for index, way in enumerate(ways):
        out = _PAIR_OUT + _wider(flat, atom) * abs(math.cos(way))
        marks += _dots((x, y), way, 2 if index < pairs else 1, out)
    return marks


def _electrons(report: CompoundReport, form: ResonanceForm, atom: int) -> tuple[int, int]:
    count = nonbonding(report.molecule, form, atom)
    if count is None:
        return 0, 0
    singles = max(count % 2, min(count, report.lewis.atoms[atom].single_electrons))
    if len(report.lewis.forms) > 1:
        singles = count % 2
    return (count - singles) // 2, singles


def _stretch(molecule: Molecule) -> float:
    """Longer bonds where many ligands with lone pairs crowd one atom."""
    most = max(len(molecule.neighbours(atom)) for atom in range(len(molecule.atoms)))
    return max(1.0, most / _CROWDED)


def _wider(flat: Flat, atom: int) -> float:
    return max(0.0, text_width(flat.letters[atom], _SYMBOL, True) / 2 - 8.5)


def _dots(middle: Point, way: float, count: int, out: float) -> list[Mark]:
    x, y = middle[0] + out * math.cos(way), middle[1] + out * math.sin(way)
    offsets = (0.0,) if count == 1 else (-_PAIR_APART, _PAIR_APART)
    return [
        ring(
            x - offset * math.sin(way),
            y + offset * math.cos(way),
            _DOT,
            Style(None, "ink"),
            Role.ELECTRON,
        )
        for offset in offsets
    ]


def _charges(flat: Flat, form: ResonanceForm, marks: list[Mark]) -> list[Mark]:
    """Return formal charges in small circles, to the upper right where that has room."""
    crowd = np.concatenate([EMPTY, *(_occupied(mark) for mark in marks)])
    found: list[Mark] = []
    for atom in sorted(flat.shown):
        if form.formal_charges[atom]:
            drawn, occupied = _charge(flat, atom, form.formal_charges[atom], crowd)
            found += drawn
            crowd = np.concatenate([crowd, occupied])
    return found


def _occupied(mark: Mark) -> Array:
    if isinstance(mark, Lettering):
        x, y, width, height, angle = lettering_box(mark)
        return discs_in_box((x, y, width * 0.8, height * 0.8, angle))
    return discs_along(mark.points, max(2.0, mark.style.width / 2))


def _charge(flat: Flat, atom: int, charge: int, crowd: Array) -> tuple[list[Mark], Array]:
    text = plain(charge_script(charge))
    radius = max(8.0, text_width(text, _CHARGE_SIZE, True) / 2 + 2.5)
    x, y = flat.at(atom)
    outs = _CHARGE_OUT + (radius - 8.0) + _wider(flat, atom) + np.array([0.0, 6.0, 13.0, 21.0])
    turns = np.arange(48) * math.pi / 24
    out, turn = (grid.ravel() for grid in np.meshgrid(outs, turns))
    spots = np.column_stack([x + out * np.cos(turn), y + out * np.sin(turn)])
    room = np.minimum(gaps_along(spots, crowd) - radius, _CHARGE_ROOM)
    away = np.abs(np.remainder(turn - _UP_RIGHT + math.pi, 2 * math.pi) - math.pi)
    best = int(np.argmin(np.round(away + 0.15 * (out - outs[0]) - 5.0 * room, 4)))
    middle = (float(spots[best, 0]), float(spots[best, 1]))
    base = middle[1] + 0.35 * _CHARGE_SIZE
    marks: list[Mark] = [
        ring(*middle, radius, Style("soft", "paper", 1.0), Role.FRAME),
        Lettering(middle[0], base, text, _CHARGE_SIZE, Role.LABEL, bold=True),
    ]
    return marks, np.array([[*middle, radius]])


def _in_rows(forms: list[list[Mark]]) -> list[Mark]:
    """Set the forms side by side with double-headed arrows between, rows as wide as a page."""
    placed: list[Mark] = []
    left, top, row_height = 0.0, 0.0, 0.0
    for index, marks in enumerate(forms):
        x0, y0, x1, y1 = extent(marks)
        if index and left + _ARROW + x1 - x0 > _ROW_WIDTH:
            left, top, row_height = 0.0, top + row_height + _GAP, 0.0
        if index:
            placed += _double_arrow(left, top + (y1 - y0) / 2)
            left += _ARROW
        placed += shifted(marks, left - x0, top - y0)
        left += x1 - x0
        row_height = max(row_height, y1 - y0)
    return placed


def _not_all(marks: list[Mark], drawn: int, known: int) -> list[Mark]:
    """Return a note below the forms where there are more than are drawn."""
    if drawn == known:
        return []
    left, _, _, bottom = extent(marks)
    text = f"{drawn} of {known} forms"
    return [Lettering(left, bottom + 26, text, _NOTE_SIZE, colour="soft", anchor="start")]


def _double_arrow(left: float, y: float) -> list[Mark]:
    x0, x1 = left + 10, left + _ARROW - 10
    return [
        Stroke(((x0 + 6, y), (x1 - 6, y)), Style("ink", None, 1.6), Role.LEADER),
        arrowhead((x0, y), math.pi, 11, "ink", Role.LEADER),
        arrowhead((x1, y), 0.0, 11, "ink", Role.LEADER),
    ]


def _in_words(report: CompoundReport) -> str:
    count = len(report.lewis.forms)
    parts = [f"{count} resonance forms" if count > 1 else "One form"]
    names = ("no", "one", "two", "three", "four")
    kinds: dict[str, int] = {}
    form = report.lewis.forms[0]
    for atom, one in enumerate(report.molecule.atoms):
        pairs, singles = _electrons(report, form, atom)
        charge = form.formal_charges[atom]
        words = [f"{names[pairs]} lone pair{'s' if pairs > 1 else ''}"] if pairs else []
        words += (
            [f"{names[singles]} single electron{'s' if singles > 1 else ''}"] if singles else []
        )
        words += [f"formal charge {charge:+d}".replace("-", "−")] if charge else []
        if words:
            key = f"{one.element} with {' and '.join(words)}"
            kinds[key] = kinds.get(key, 0) + 1
    parts += [f"{number} × {key}" for key, number in kinds.items()]
    return "; ".join(parts) + "."
