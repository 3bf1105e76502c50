"""Sub- and superscripts in lettering: ``C_{2v}``, ``SO_{4}^{2-}``; true minus signs."""

import re
from html import escape

from shapeshelf.reference.elements import ELEMENTS

SCRIPT_SIZE = 0.7
_DROP_EM, _RISE_EM = 0.34, -0.55
"""Shift of the baseline in em of the script's own size."""
_SCRIPT = re.compile(r"([_^])\{([^}]*)\}")
_POINT_GROUP = re.compile(r"([CDSTOIK])(inf|\d*)([vhdis]*)")
_SPECIES = re.compile(r"([A-Z]|[ΣΠΔΦ])([0-9gu]*)('*)([+-]?)")
_FORMULA_PART = re.compile(r"([A-Z][a-z]?|\))(\d+)")


def runs(text: str) -> list[tuple[str, str]]:
    """Split ``text`` into (``""``, ``"_"`` or ``"^"``, letters) runs."""
    parts = _SCRIPT.split(text)
    found = [("", parts[0])]
    for kind, script, rest in zip(parts[1::3], parts[2::3], parts[3::3], strict=True):
        found += [(kind, script), ("", rest)]
    return [(kind, letters) for kind, letters in found if letters]


def plain(text: str) -> str:
    """Return ``text`` with the script marks left out."""
    return "".join(letters for _, letters in runs(text))


def markup(text: str) -> str:
    """Return ``text`` as SVG character data with ``tspan`` elements, escaped."""
    out, baseline = [], 0.0
    for kind, letters in runs(text):
        shift = {"": 0.0, "_": _DROP_EM, "^": _RISE_EM}[kind] * SCRIPT_SIZE
        out.append(_span(letters, shift - baseline, bool(kind)))
        baseline = shift
    return "".join(out)


def formula(text: str, charge: int = 0) -> str:
    """Return a plain formula such as ``SF4`` or ``SO42-`` (of charge -2) with scripts set."""
    size = str(abs(charge)) if abs(charge) > 1 else ""
    suffix = f"{size}{'+' if charge > 0 else '-'}" if charge else ""
    bare = text.removesuffix(suffix).rstrip("^ ")
    return _FORMULA_PART.sub(r"\1_{\2}", bare) + charge_script(charge)


def charge_script(charge: int) -> str:
    """Return the superscript for a charge: ``^{2−}``, ``^{+}``, nothing for none."""
    if not charge:
        return ""
    size = str(abs(charge)) if abs(charge) > 1 else ""
    return f"^{{{size}{'+' if charge > 0 else '−'}}}"


def point_group(symbol: str) -> str:
    """Return a Schoenflies symbol in plain letters with its subscript set."""
    match = _POINT_GROUP.fullmatch(symbol)
    if match is None:
        return symbol
    letter, order, rest = match.groups()
    script = order.replace("inf", "∞") + rest
    return f"{letter}_{{{script}}}" if script else letter


def symmetry_species(name: str) -> str:
    """Return a symmetry species in plain letters with its marks set: ``B2u``, ``E'``, ``Σg+``."""
    match = _SPECIES.fullmatch(name)
    if match is None:
        return name
    letter, below, primes, sign = match.groups()
    primes = primes.replace("''", "″").replace("'", "′")
    script = f"_{{{below}}}" if below else ""
    return f"{letter}{script}{primes}" + (f"^{{{sign.replace('-', '−')}}}" if sign else "")


def element_of(label: str) -> str:
    """Return the element that a label such as ``F(ax)`` or ``C12`` begins with."""
    return label[:2] if label[:2] in ELEMENTS and label[1:2].islower() else label[:1]


def _span(letters: str, shift_em: float, script: bool) -> str:
    if not script and not shift_em:
        return escape(letters, quote=False)
    size = SCRIPT_SIZE if script else 1.0
    grade = f' font-size="{SCRIPT_SIZE:.0%}"' if script else ""
    return f'<tspan dy="{shift_em / size:.2f}em"{grade}>{escape(letters, quote=False)}</tspan>'
