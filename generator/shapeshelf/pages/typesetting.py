"""How chemistry is set in HTML: subscripts, true minus signs, units that do not break away.

Every function takes plain text that may come from an entry and returns escaped markup.
"""

import re
import unicodedata

from markupsafe import Markup, escape

MINUS = "\N{MINUS SIGN}"
NO_BREAK = "\N{NO-BREAK SPACE}"

_FORMULA_TOKEN = re.compile(r"(\d+)|([^\d]+)")
_POINT_GROUP = re.compile(r"(C|D|S|T|O|I|K)(inf|\d+)?([a-z]*)")
_SPECIES = re.compile(r"(A|B|E|T|G|H|Sigma|Pi|Delta|Phi|Σ|Π|Δ|Φ)(.*)")
_GREEK = {"Sigma": "Σ", "Pi": "Π", "Delta": "Δ", "Phi": "Φ"}


def formula_markup(formula: str, charge: int = 0) -> Markup:
    """Return ``SF4`` with its number below the line and a charge above it."""
    body = Markup("").join(
        Markup("<sub>{}</sub>").format(token.group(1)) if token.group(1) else escape(token.group(2))
        for token in _FORMULA_TOKEN.finditer(without_charge(formula, charge))
    )
    return body + (Markup("<sup>{}</sup>").format(charge_text(charge)) if charge else Markup(""))


def formula_text(formula: str, charge: int = 0) -> str:
    """Return the formula in plain characters: ``SO4 2−`` as ``SO₄²⁻``."""
    subscripts = str.maketrans("0123456789", "₀₁₂₃₄₅₆₇₈₉")
    superscripts = str.maketrans("0123456789+" + MINUS, "⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻")
    body = without_charge(formula, charge).translate(subscripts)
    return body + (charge_text(charge).translate(superscripts) if charge else "")


def without_charge(formula: str, charge: int) -> str:
    """Return the formula without its charge at the end: ``SO4^2-`` or ``SO4-2`` as ``SO4``."""
    if charge == 0:
        return formula
    sign, magnitude = "+" if charge > 0 else "-", str(abs(charge))
    endings = ("^" + magnitude + sign, magnitude + sign, sign + magnitude, sign)
    plain = formula.replace(MINUS, "-")
    return next((plain.removesuffix(end) for end in endings if plain.endswith(end)), plain)


def charge_text(charge: int) -> str:
    """Return ``2−`` for -2, ``+`` for +1, nothing for 0."""
    if charge == 0:
        return ""
    magnitude = str(abs(charge)) if abs(charge) > 1 else ""
    return magnitude + ("+" if charge > 0 else MINUS)


def point_group_markup(symbol: str) -> Markup:
    """Return a Schoenflies symbol with its letters in place: ``Dinfh`` as D with ∞h below."""
    match = _POINT_GROUP.fullmatch(symbol)
    if match is None:
        return escape(symbol)
    letter, order, rest = match.groups()
    below = ("∞" if order == "inf" else order or "") + rest
    lowered = Markup("<sub>{}</sub>").format(below) if below else Markup("")
    return Markup('<span class="pg"><i>{}</i>{}</span>').format(letter, lowered)


def point_group_text(symbol: str) -> str:
    """Return the symbol in plain characters for titles: ``Dinfh`` as ``D∞h``."""
    return symbol.replace("inf", "∞")


def species_markup(species: str) -> Markup:
    """Return a symmetry species with its indices below: ``B2u``, ``E'``, ``Sigma_g+``."""
    match = _SPECIES.fullmatch(species)
    if match is None:
        return escape(species)
    letter, rest = match.groups()
    above = "".join(mark for mark in rest if mark in "'\"+-")
    below = "".join(mark for mark in rest if mark not in "'\"+-_")
    set_above = above.replace("''", "″").replace('"', "″").replace("'", "′").replace("-", MINUS)
    parts = [Markup("<i>{}</i>").format(_GREEK.get(letter, letter))]
    if below:
        parts.append(Markup("<sub>{}</sub>").format(below))
    if set_above:
        parts.append(Markup("<sup>{}</sup>").format(set_above))
    return Markup("").join(parts)


def operation_markup(label: str) -> Markup:
    """Return ``C3^2`` or ``sigma`` as a symmetry operation is set."""
    body, _, power = label.partition("^")
    if body.startswith("sigma"):
        rest = body.removeprefix("sigma").strip("_")
        base = Markup("<i>σ</i>") + (Markup("<sub>{}</sub>").format(rest) if rest else Markup(""))
    else:
        base = Markup("<i>{}</i>").format(body[:1])
        base += Markup("<sub>{}</sub>").format(body[1:].replace("inf", "∞")) if body[1:] else ""
    return base + (Markup("<sup>{}</sup>").format(power) if power else Markup(""))


def hybrid_markup(label: str) -> Markup:
    """Return ``sp3d2`` with its numbers above the line."""
    return Markup("").join(
        Markup("<sup>{}</sup>").format(part) if part.isdigit() else escape(part)
        for part in re.split(r"(\d+)", label)
    )


def notation_markup(notation: str) -> Markup:
    """Return ``AX4E2`` with its numbers below the line."""
    return formula_markup(notation)


def label_markup(label: str) -> Markup:
    """Return ``F(ax)-S-F(ax)`` with the sites set smaller; copying it gives the plain label."""
    parts = re.split(r"(\([^()]*\))", label)
    return Markup("").join(
        Markup('<span class="site">{}</span>').format(part) if part.startswith("(") else part
        for part in parts
    )


def number_text(value: float, decimals: int) -> str:
    """Return a number with a true minus sign; what rounds to nothing has no sign."""
    text = f"{value:.{decimals}f}"
    if float(text) == 0:
        text = text.lstrip("-")
    return text.replace("-", MINUS)


def as_stated_text(value: float, least_decimals: int, most_decimals: int) -> str:
    """Return a number with the decimals it was stated with, within two bounds."""
    stated = len(repr(float(value)).partition(".")[2].rstrip("0"))
    return number_text(value, min(max(stated, least_decimals), most_decimals))


def slug(text: str) -> str:
    """Return ``T-shaped`` as ``t-shaped``, ``square pyramidal`` as ``square-pyramidal``."""
    plain = unicodedata.normalize("NFKD", text).encode("ascii", "ignore").decode()
    return re.sub(r"[^a-z0-9]+", "-", plain.lower()).strip("-")


def sentence_case(text: str) -> str:
    """Return the text with a capital first letter and the rest untouched."""
    return text[:1].upper() + text[1:]
