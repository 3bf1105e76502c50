"""Formulas: read in any spelling, written in one.

With carbon a formula stands in Hill's order: carbon, hydrogen, the rest by the alphabet (E. A.
Hill, J. Am. Chem. Soc. 22 (1900) 478, recalled). Without carbon it follows the element sequence
of the IUPAC Red Book 2005, table VI (recalled), the most electropositive element first: SF4, OF2,
NH3, XeO2F2. As usual for acids, hydrogen comes first where it is bound to oxygen or another
chalcogen and no metal is present: HNO3, H3PO4 (common practice, no source).
"""

import re
from collections import Counter
from collections.abc import Iterator, Mapping

from rdkit import Chem

from shapeshelf.errors import StructureError
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.drawing import is_metal
from shapeshelf.structure.molecule import Atom, Bond, Molecule

Formula = tuple[dict[str, int], int]
"""Number of atoms by element, and charge."""

LOWERED = str.maketrans("₀₁₂₃₄₅₆₇₈₉⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻₊₋−–", "01234567890123456789+-+---")
CHARGE = re.compile(r"^(?P<body>.*?)(?P<signs>\++|-+)$")
SIGN_FIRST = re.compile(r"^(?P<body>.*[^+-])(?P<charge>[+-]\d+)$")
TOKEN = re.compile(r"([A-Z][a-z]?)(\d*)|([(\[{])|([)\]}])(\d*)|([·.*])(\d*)")
HYDROGEN_NAMES = {"D": "H", "T": "H"}
CLOSING = {"(": ")", "[": "]", "{": "}"}
# Hydrogen bound to these is an acid's, and written first.
ACID_PARTNERS = frozenset({"O", "S", "Se", "Te"})
MOST_OF_ONE_ELEMENT = 100_000


def parse_formula(text: str) -> Formula:
    """Return element counts and charge of a formula in any usual spelling.

    ``SF4``, ``F4S``, ``SF₄``, ``(NH4)2SO4``, ``PF6-``, ``SO4^2-``, ``SO4 2-``, ``[PF6]-``,
    ``O4S-2`` are read; D and T are hydrogen. Where digits run into the
    charge, as in ``SO42-``, the last digit belongs to the charge.
    Raises StructureError.
    """
    return next(_readings(text))


def formulas_agree(text: str, molecule: Molecule) -> bool:
    """Tell whether a formula, in any spelling and reading, is that of ``molecule``.

    Raises StructureError where the text is no formula.
    """
    wanted = (dict(Counter(atom.element for atom in molecule.atoms)), molecule.charge)
    return any(reading == wanted for reading in _readings(text))


def write_formula(molecule: Molecule) -> str:
    """Return the formula of ``molecule`` as plain text, the charge as a suffix."""
    return formula_of(molecule.atoms, molecule.bonds)


def formula_of(atoms: tuple[Atom, ...], bonds: tuple[Bond, ...]) -> str:
    """Return the formula of atoms and bonds that are not yet a molecule."""
    counts = Counter(atom.element for atom in atoms)
    if "C" in counts:
        order = sorted(counts, key=lambda element: ("CH".find(element) % 3, element))
    else:
        centres = _central_halogens(atoms, bonds)
        order = sorted(counts, key=lambda element: _sequence_position(element, centres))
        if "H" in counts and _hydrogen_leads(atoms, bonds, counts):
            order = ["H", *(element for element in order if element != "H")]
    body = "".join(_term(element, counts[element]) for element in order)
    return body + charge_suffix(sum(atom.formal_charge for atom in atoms))


def charge_suffix(charge: int) -> str:
    """Return ``-``, ``^2-``, ``+``, ``^3+``, or nothing for a neutral molecule.

    The caret keeps the charge of ``SO4^2-`` apart from the count before it.
    """
    if charge == 0:
        return ""
    number = "" if abs(charge) == 1 else f"^{abs(charge)}"
    return number + ("+" if charge > 0 else "-")


def molar_mass_g_mol(molecule: Molecule) -> float:
    """Return the molar mass in g/mol from standard atomic weights.

    An atom whose isotope is given counts with the mass of that isotope. Electrons of a charge are
    left out (below 0.001 g/mol each).
    """
    return sum(_mass(atom) for atom in molecule.atoms)


def _mass(atom: Atom) -> float:
    row = ELEMENTS[atom.element]
    if not atom.isotope:
        return row.atomic_weight
    table = Chem.GetPeriodicTable()
    # RDKit answers 0 for an isotope it does not know; the mass number is right within 0.1.
    return table.GetMassForIsotope(row.atomic_number, atom.isotope) or float(atom.isotope)


def _readings(text: str) -> Iterator[Formula]:
    """Yield every reading of ``text``, the likeliest first; at least one, or raise."""
    plain = text.translate(LOWERED).strip()
    spaced = re.fullmatch(r"(?P<body>.*?)(?:\s*\^\s*|\s+)\{?(?P<charge>\d*[+-])\}?", plain)
    if spaced:
        yield _counts(text, spaced["body"]), _charge(spaced["charge"])
        return
    match = CHARGE.fullmatch(plain)
    sign_first = SIGN_FIRST.fullmatch(plain)
    if match:
        yield from _joined_readings(text, match["body"], match["signs"])
    elif sign_first:
        yield _counts(text, sign_first["body"]), int(sign_first["charge"][:6])
    else:
        yield _counts(text, plain), 0


def _joined_readings(text: str, body: str, signs: str) -> Iterator[Formula]:
    """Read ``PF6-`` as PF6 with one charge, ``SO42-`` as SO4 with two, then the other way."""
    unit = len(signs) if signs[0] == "+" else -len(signs)
    digits = re.search(r"(\d*)([1-9])$", body)
    if digits is None or len(signs) > 1:
        yield _counts(text, body), unit
        return
    split = (_counts(text, body[:-1]), unit * int(digits[2]))
    bracketed = body[-2:-1] in (")", "]", "}")
    first_split = bool(digits[1]) or bracketed
    simple = (_counts(text, body), unit)
    yield from (split, simple) if first_split else (simple, split)


def _charge(text: str) -> int:
    number = int(text[:-1] or 1)
    return number if text[-1] == "+" else -number


def _counts(text: str, body: str) -> dict[str, int]:
    stack: list[Counter[str]] = [Counter()]
    closing: list[str] = []
    position = 0
    compact = re.sub(r"\s+", "", body)
    while position < len(compact):
        match = TOKEN.match(compact, position)
        if match is None or match[6]:
            raise _unreadable(text, f"{compact[position]!r} is not understood")
        _take(text, match, stack, closing)
        position = match.end()
    if closing or not stack[0]:
        raise _unreadable(text, "a bracket stays open" if closing else "it names no element")
    return dict(stack[0])


def _take(text: str, match: re.Match[str], stack: list[Counter[str]], closing: list[str]) -> None:
    element, number, opening, close, times = match.groups()[:5]
    if element:
        element = HYDROGEN_NAMES.get(element, element)
        if element not in ELEMENTS:
            raise _unreadable(text, f"there is no element {element}")
        stack[-1][element] += _number(text, number)
    elif opening:
        stack.append(Counter())
        closing.append(CLOSING[opening])
    else:
        if not closing or closing.pop() != close:
            raise _unreadable(text, f"{close!r} closes nothing")
        inner = stack.pop()
        factor = _number(text, times)
        for symbol, count in inner.items():
            stack[-1][symbol] += count * factor


def _number(text: str, digits: str) -> int:
    number = int(digits) if digits and len(digits) < 7 else (1 if not digits else 0)
    if not 1 <= number <= MOST_OF_ONE_ELEMENT:
        raise _unreadable(text, f"{digits} is no sensible number of atoms")
    return number


def _unreadable(text: str, reason: str) -> StructureError:
    return StructureError(text, f"the formula {text!r} cannot be read: {reason}")


def _term(element: str, count: int) -> str:
    return element if count == 1 else f"{element}{count}"


def _hydrogen_leads(
    atoms: tuple[Atom, ...], bonds: tuple[Bond, ...], counts: Mapping[str, int]
) -> bool:
    if any(is_metal(element) for element in counts):
        return False
    # Hydrazoic acid and nitrosyl hydride are HN3 and HNO.
    if counts["H"] == 1 and "N" in counts and (set(counts) == {"H", "N"} and counts["N"] > 1):
        return True
    if set(counts) == {"H", "N", "O"}:
        return True
    pairs = ((atoms[bond.begin].element, atoms[bond.end].element) for bond in bonds)
    return any("H" in pair and ACID_PARTNERS & set(pair) for pair in pairs)


def _central_halogens(atoms: tuple[Atom, ...], bonds: tuple[Bond, ...]) -> set[str]:
    """Return the halogens with several neighbours, which are written as central atoms: ClO2F."""
    ends = Counter(end for bond in bonds for end in (bond.begin, bond.end))
    return {
        atom.element
        for number, atom in enumerate(atoms)
        if ELEMENTS[atom.element].group == 17 and ends[number] > 1
    }


def _sequence_position(element: str, central: set[str]) -> tuple[int, int]:
    """Return where the element stands from the electropositive end of table VI.

    The sequence runs through the groups from 18 (electropositive end) over 1, 2, the f block,
    3 to 16 and ends with 17; inside a group from the heaviest element to the lightest.
    Hydrogen stands between groups 15 and 16; ``central`` halogens come before oxygen.
    """
    if element == "H":
        return (155, 0)
    row = ELEMENTS[element]
    if element in central:
        return (159, -row.atomic_number)
    place = {18: 0, None: 25}.get(row.group, (row.group or 0) * 10)
    return (place, -row.atomic_number)
