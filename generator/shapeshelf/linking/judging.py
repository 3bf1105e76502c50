"""Whether a quoted number still is the present one.

* J1  A number holds where a present value lies within half of its last digit and the larger of
  the two ±, the present value's and the quoted one; within a whole one where the text says
  "about".
* J2  A range holds where a present value's ± reaches into it, or where each end is a present
  value.
* J3  Which values come into question: the one the anchor names; else those of the number's
  quantity, and of them those the text names by a label such as ``O-S-O``.
* J4  Where the sentence says "model" or "calculated", the numbers of that basis hold too.
"""

import re
from collections.abc import Iterator, Sequence
from dataclasses import dataclass, replace

from shapeshelf.linking.attribution import Quote
from shapeshelf.linking.numbers import OTHER, Quoted
from shapeshelf.linking.published import UNITS, PublishedValue, value_text
from shapeshelf.linking.targets import Target

_ROUNDING = 1e-9
_ATOM = r"[A-Z][a-z]?\d*(?:\([a-z0-9 ]+\))?"
_LABEL = re.compile(rf"(?<![\w-]){_ATOM}(?:[-‐‑‒–—−=≡]{_ATOM}){{1,2}}(?![\w-])")
_BASES = {"calculated": ("calculated", "computed"), "model": ("model", "predicted")}
_MOST_NAMED = 4


@dataclass(frozen=True, slots=True)
class Verdict:
    """What is wrong with a quoted number."""

    kind: str
    """``value`` or ``unit``."""
    message: str


def judge(quote: Quote, target: Target) -> Verdict | None:
    """Return what is wrong with a number, ``None`` where it holds or is no value's."""
    if target.compound is None:
        return None
    quoted, section = quote.quoted, target.quantity
    if quote.about:
        quoted = replace(quoted, half=2 * quoted.half)
    if quoted.quantity in UNITS:
        candidates = _candidates(quote, target, str(quoted.quantity))
        if any(_holds(quoted, value, quote.sentence) for value in candidates):
            return None
        if _ends_hold(quoted, candidates):
            return None
        if quoted.quantity == "frequency" and not candidates:
            return None
        return _wrong_number(quote, target, candidates)
    if section is None or not quote.within:
        return None
    return _without_unit(quote, target, section)


def _without_unit(quote: Quote, target: Target, section: str) -> Verdict | None:
    """Judge a number with a foreign unit or none in a link that leads to values."""
    candidates = _candidates(quote, target, section)
    plain = _as_given(quote.quoted)
    matches = any(_holds(plain, value, quote.sentence) for value in candidates)
    if quote.quoted.quantity == OTHER:
        unit = UNITS[section]
        return Verdict("unit", f"the unit is not that of the value, {unit}") if matches else None
    exact = target.anchor in target.compound.values if target.compound else False
    if matches or not candidates or not (exact or quote.quoted.decimals):
        return None
    return _wrong_number(quote, target, candidates)


def _candidates(quote: Quote, target: Target, quantity: str) -> list[PublishedValue]:
    """Return the values that the number may be (rule J3)."""
    assert target.compound is not None
    values = target.compound.values
    exact = values.get(target.anchor)
    if exact is not None and exact.quantity == quantity and quote.within:
        return [exact]
    held = [value for value in values.values() if value.quantity == quantity]
    labels = [_parts(label.group()) for label in _LABEL.finditer(quote.before)]
    for label in reversed(labels):
        named = [value for value in held if _is_named(value, label)]
        if named:
            return named
    return held


def _is_named(value: PublishedValue, label: list[str]) -> bool:
    spellings = [_parts(spelling) for spelling in value.labels]
    if any(label in (parts, parts[::-1]) for parts in spellings):
        return True
    bare = [re.sub(r"\d+|\(.*?\)", "", part) for part in _parts(value.of)]
    return label in (bare, bare[::-1])


def _parts(label: str) -> list[str]:
    plain = re.sub(r"[‐‑‒–—−=≡]", "-", label.partition(" (")[0])
    return plain.split("-")


def _holds(quoted: Quoted, value: PublishedValue, sentence: str) -> bool:
    return any(
        quoted.low - spread <= number <= quoted.high + spread
        for number, spread in _numbers(quoted, value, sentence)
    )


def _numbers(quoted: Quoted, value: PublishedValue, sentence: str) -> Iterator[tuple[float, float]]:
    """Yield the numbers that hold for a value, each with how far off a quote may be."""
    spread = max(value.uncertainty or 0.0, quoted.spread or 0.0)
    yield value.value, spread + quoted.half + _ROUNDING
    for basis, words in _BASES.items():
        number = getattr(value, basis)
        if number is not None and any(word in sentence.casefold() for word in words):
            yield number, quoted.half + _ROUNDING


def _ends_hold(quoted: Quoted, candidates: Sequence[PublishedValue]) -> bool:
    """Tell whether a range runs from one present value to another (rule J2)."""
    if not quoted.is_range:
        return False
    reach = quoted.half + _ROUNDING
    return all(
        any(abs(value.value - end) <= (value.uncertainty or 0.0) + reach for value in candidates)
        for end in (quoted.low, quoted.high)
    )


def _wrong_number(quote: Quote, target: Target, candidates: Sequence[PublishedValue]) -> Verdict:
    """Say that a number is not the present one, or that only its unit is wrong."""
    assert target.compound is not None
    section = target.quantity
    plain = _as_given(quote.quoted)
    everything = target.compound.values.values()
    kinds = (section, quote.quoted.quantity)
    meant = [value for value in everything if section is None or value.quantity in kinds]
    other_unit = [value for value in meant if _fits_without_unit(quote.quoted, plain, value)]
    if other_unit and quote.quoted.quantity is not None:
        best = other_unit[0]
        return Verdict("unit", f"the unit is wrong; the page has {best.of} {value_text(best)}")
    if not candidates:
        return Verdict("value", "the page has no value of this kind")
    shown = sorted(candidates, key=lambda value: abs(value.value - quote.quoted.low))
    listed = ", ".join(f"{value.of} {value_text(value)}" for value in shown[:_MOST_NAMED])
    more = f" and {len(shown) - _MOST_NAMED} more" if len(shown) > _MOST_NAMED else ""
    return Verdict("value", f"the page has {listed}{more}")


def _fits_without_unit(quoted: Quoted, plain: Quoted, value: PublishedValue) -> bool:
    """Tell whether the bare number is a value of another unit, or off by a power of ten."""
    powers = (0.001, 0.01, 0.1, 1.0, 10.0, 100.0, 1000.0)
    factors = powers if value.quantity == "length" and quoted.quantity == "length" else (1.0,)
    return value.value != 0 and any(
        abs(plain.low * factor - value.value) <= plain.half * factor + _ROUNDING
        and (value.quantity, plain.low * factor) != (quoted.quantity, quoted.low)
        for factor in factors
    )


def _as_given(quoted: Quoted) -> Quoted:
    """Return the quote with its number as it stands, whatever its unit says."""
    half = 0.5 * 10.0**-quoted.decimals
    return replace(quoted, low=quoted.bare, high=quoted.bare, half=half)
