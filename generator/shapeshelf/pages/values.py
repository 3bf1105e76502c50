"""A number as a page shows it: its text, its ±, what it rests on and where it was published."""

import re
from collections.abc import Iterable, Mapping
from dataclasses import dataclass

from shapeshelf.catalogue.model import Source, SourceKind
from shapeshelf.pages.addresses import source_anchor
from shapeshelf.pages.typesetting import NO_BREAK, as_stated_text, number_text
from shapeshelf.report.model import Basis, Value

BASES = (Basis.MEASURED, Basis.CALCULATED, Basis.SUPPLIED, Basis.MODEL)


@dataclass(frozen=True, slots=True)
class Unit:
    """How a quantity is printed."""

    symbol: str
    """Follows the number; begins with a no-break space where one belongs."""
    decimals: int
    """Of model and calculated values."""
    most_decimals: int
    """Of measured ones, which keep the decimals they were stated with."""


BY_SYMMETRY = f"by{NO_BREAK}symmetry"
"""In place of a half-width of nought."""

DEGREE = Unit("°", 1, 2)
ANGSTROM = Unit(NO_BREAK + "Å", 3, 4)
DEBYE = Unit(NO_BREAK + "D", 2, 3)


@dataclass(frozen=True, slots=True)
class ValueView:
    """One value with the parts a table or a title block prints."""

    text: str
    plus_minus: str
    """``± 0.5°``, ``by symmetry`` of what the point group fixes, empty where it is not known."""
    basis: str
    recalled: bool
    """The measured value was set down from memory of its source."""
    source_text: str
    source_anchor: str | None
    """Anchor on this page, for a measured value."""
    phase: str
    method: str
    note: str
    others: dict[str, str]
    """Number with its ± by basis, for every basis there is, best first."""


def value_view(value: Value, unit: Unit, sources: Mapping[str, Source]) -> ValueView:
    """Return a value as it is printed; ``sources`` are those of the catalogue."""
    measured = value.basis is Basis.MEASURED
    source = sources.get(value.source or "") if measured else None
    measurement = value.measurement if measured else None
    return ValueView(
        text=_number(value.value, value.basis, unit) + unit.symbol,
        plus_minus=_plus_minus(value.uncertainty, unit),
        basis=value.basis.value,
        recalled=source is not None and source.kind is SourceKind.RECALLED,
        source_text=citation(source) if source else value.source or "",
        source_anchor=source_anchor(source.key) if source else None,
        phase=(measurement and measurement.phase) or "",
        method=(measurement and measurement.method) or "",
        note=(measurement and measurement.note) or "",
        others=_others(value, unit),
    )


def bases_held(values: Iterable[ValueView]) -> tuple[str, ...]:
    """Return the bases that any of the values has, the model first as tables print them."""
    held = {basis for value in values for basis in value.others}
    return tuple(basis.value for basis in reversed(BASES) if basis.value in held)


def citation(source: Source) -> str:
    """Return a source in a few words: the first author's surname and the year."""
    first = re.split(r",|;| and | et al", re.sub(r"\(.*?\)", "", source.authors))[0]
    surname = " ".join(word for word in first.split() if not word.endswith("."))
    return f"{surname or first.strip() or source.title} {source.year}"


def _others(value: Value, unit: Unit) -> dict[str, str]:
    held = {
        Basis.MEASURED: (value.measured, value.measured_uncertainty),
        Basis.CALCULATED: (value.calculated, value.calculated_uncertainty),
        Basis.SUPPLIED: (value.supplied, None),
        Basis.MODEL: (value.model, value.model_uncertainty),
    }
    return {
        basis.value: _with_uncertainty(number, uncertainty, basis, unit)
        for basis in BASES
        for number, uncertainty in (held[basis],)
        if number is not None
    }


def _with_uncertainty(number: float, uncertainty: float | None, basis: Basis, unit: Unit) -> str:
    text = _number(number, basis, unit)
    plus_minus = _plus_minus(uncertainty, unit, symbol="")
    return f"{text}{NO_BREAK}{plus_minus}" if plus_minus else text


def _number(number: float, basis: Basis, unit: Unit) -> str:
    if basis is Basis.MEASURED:
        return as_stated_text(number, min(1, unit.decimals), unit.most_decimals)
    return number_text(number, unit.decimals)


def _plus_minus(uncertainty: float | None, unit: Unit, symbol: str | None = None) -> str:
    if uncertainty is None:
        return ""
    if uncertainty == 0:
        return BY_SYMMETRY
    shown = unit.symbol if symbol is None else symbol
    text = as_stated_text(uncertainty, min(1, unit.decimals), unit.decimals)
    if float(text) == 0:
        text = as_stated_text(uncertainty, unit.decimals, unit.most_decimals)
    return f"±{NO_BREAK}{text}{shown}"
