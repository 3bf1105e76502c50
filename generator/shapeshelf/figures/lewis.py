"""The Lewis structure: bonds, lone pairs, single electrons, formal charges, resonance forms."""

import math

from shapeshelf.domains.model import ResonanceForm
from shapeshelf.figures.canvas import render, text_width
from shapeshelf.figures.flat import (
    Flat,
    bond_directions,
    crowded,
    free_directions,
    lay_flat,
    letter_reach,
)
from shapeshelf.figures.framing import MARGIN, extent, framed, shifted
from shapeshelf.figures.lettering import charge_script, plain
from shapeshelf.figures.model import Drawing, Lettering, Mark, Point, Role, Stroke, Style, Svg
from shapeshelf.figures.outlines import arrowhead, ring
from shapeshelf.figures.sticks import lines, trimmed
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.report.model import CompoundReport
from shapeshelf.structure.molecule import Molecule

MOST_FORMS = 4
_BOND, _SYMBOL, _DOT = 56.0, 22.0, 2.3
_PAIR_OUT, _PAIR_APART = 19.0, 4.2
_CHARGE_OUT, _CHARGE_SIZE = 23.0, 16.0
_ARROW, _GAP, _ROW_WIDTH = 52.0, 16.0, 760.0
_CROWDED = 5.2
_HALF_LETTER = 12.0
_ENOUGH_ROOM, _FARTHER = math.radians(52), 12.0
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
    forms = report.lewis.forms[:MOST_FORMS]
    marks = _in_rows([_form(report, flat, form) for form in forms])
    marks, height = framed(marks)
    width = math.ceil(extent(marks)[2] + MARGIN)
    title = f"{report.name}, Lewis structure"
    return Drawing("lewis", width, height, tuple(marks), title, _in_words(report))


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
    return marks


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
    charge = form.formal_charges[atom]
    if charge:
        way, room = _charge_direction([*taken, *ways])
        out = _CHARGE_OUT + _wider(flat, atom) + (_FARTHER if room < _ENOUGH_ROOM else 0.0)
        marks += _charge((x + out * math.cos(way), y + out * math.sin(way)), charge)
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


def _charge_direction(taken: list[float]) -> tuple[float, float]:
    """Return the free direction nearest to the upper right, and the angle free around it."""

    def clearance(way: float) -> float:
        return min((abs(math.remainder(way - other, 2 * math.pi)) for other in taken), default=9)

    candidates = [_UP_RIGHT + math.pi / 24 * step for step in range(48)]
    best = max(clearance(way) for way in candidates)
    enough = min(best, _ENOUGH_ROOM)
    free = [way for way in candidates if clearance(way) >= enough - 1e-6]
    way = min(free, key=lambda way: abs(math.remainder(way - _UP_RIGHT, 2 * math.pi)))
    return way, best


def _charge(middle: Point, charge: int) -> list[Mark]:
    text = plain(charge_script(charge))
    width = text_width(text, _CHARGE_SIZE, True)
    return [
        ring(*middle, max(8.0, width / 2 + 2.5), Style("soft", "paper", 1.0), Role.FRAME),
        Lettering(
            middle[0], middle[1] + 0.35 * _CHARGE_SIZE, text, _CHARGE_SIZE, Role.LABEL, bold=True
        ),
    ]


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
