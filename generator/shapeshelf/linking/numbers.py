"""Numbers with units in running text: ``173.1°``, ``101–102°``, ``1.646 and 1.545 Å``.

* N1  A number without a unit takes that of the next one it is joined to, by a sign of range or,
  where both have as many decimals, by a comma, a stroke, "and" or "or".
* N2  A number stands for all that rounds to it: half of its last digit either way.
* N3  A comma between digits is a decimal one.
"""

import math
import re
from collections.abc import Iterator
from dataclasses import dataclass, replace

OTHER = "other"
"""A unit of something that a compound's page does not give."""

_NUMBER = r"(?<![\w.,#^_\\-])(?<![A-Za-z_.]/)(?<!//)(?<![<>=]-)(?P<number>\d+(?:[.,]\d+)?)"
_GAP = r"[\s\u00a0\u2009\u202f~]*"
_SPREAD = (
    rf"(?:\((?P<last>\d{{1,2}})\)|{_GAP}(?:±|\+/[-−–]|\\pm){_GAP}(?P<spread>\d+(?:[.,]\d+)?))?"
)
_MINUS_ONE = r"(?:\^?\{?[-−–⁻\u2010\u2011]\s?[1¹]\}?)"
_UNITS: tuple[tuple[str, float, str], ...] = (
    (OTHER, 1.0, r"(?:°|º|deg\.?|degrees?)\s*(?:C|F|K|[Cc]elsius|[Ff]ahrenheit|2θ)(?![a-zα-ω])|℃"),
    ("angle", 1.0, r"(?:°|º|\^\\circ|\^\{\\circ\}|deg(?:rees?)?\b\.?)"),
    ("angle", 180 / math.pi, r"rad(?:ians?)?\b"),
    (OTHER, 1.0, r"(?:Å|A\u030a|\u212b)(?:[²³]|\^|[23]\b|" + _MINUS_ONE + ")"),
    (
        "length",
        1.0,
        r"(?:Å|A\u030a|\u212b|\\AA|\\mathrm\{\\AA\}|[Åå]ngstr[öo]ms?\b|[Aa]ngstr[öo]ms?\b)",
    ),
    ("length", 0.01, r"pm\b"),
    ("length", 10.0, r"nm\b"),
    ("frequency", 1.0, r"(?:cm" + _MINUS_ONE + r"|1/cm\b|/cm\b|wavenumbers?\b)"),
    ("dipole", 1.0, r"(?:[Dd]ebyes?\b|D(?![\w-]))"),
    (
        OTHER,
        1.0,
        r"(?:%|‰|K\b|meV\b|eV\b|k?J\b|k?cal\b|[mk]?bar\b|[kMhG]?Pa\b|[Tt]orr\b|atm\b|[cmµμnk]?m\b"
        r"|[mµμk]?g\b|[mµμ]?[lL]\b|[mµμn]?mol\b|mM\b|M\b|h\b|min\b|s\b|[kMG]?Hz\b|pp[mb]\b|m?V\b"
        r"|m?A\b|equiv\b|eq\b|days?\b|hours?\b|minutes?\b|scans?\b)",
    ),
)
_UNIT = re.compile(
    "|".join(f"(?P<u{index}>{pattern})" for index, (_, _, pattern) in enumerate(_UNITS))
)
_ITEM = re.compile(_NUMBER + _SPREAD)
_MINUTES = re.compile(r"\s?(\d{1,2}(?:\.\d+)?)\s?['′’]")
_SPREAD_AFTER = re.compile(rf"{_GAP}(?:±|\+/[-−–]|\\pm){_GAP}(\d+(?:[.,]\d+)?){_GAP}")
_RANGE = re.compile(rf"{_GAP}(?:[-–—−]|to|\.\.\.|…){_GAP}")
_LIST = re.compile(rf"{_GAP}(?:,{_GAP}(?:and|or)|[,/&]|and|or){_GAP}")
_HEAD = re.compile(r"(?:/|\(|\[|\bin\b|,)\s*([^\s)\]|]+)[)\]]?\s*$")
_BETWEEN = re.compile(r"\bbetween\s*$", re.IGNORECASE)


@dataclass(frozen=True, slots=True)
class Quoted:
    """One number, or one range of numbers, as a text gives it."""

    start: int
    end: int
    """Offsets in the text, the unit included."""
    low: float
    high: float
    """In the unit of its quantity; equal unless it is a range."""
    half: float
    """Half of the last digit given."""
    spread: float | None
    """A ± that is given with it."""
    quantity: str | None
    """``angle``, ``length``, ``dipole``, ``frequency``, ``other``; ``None`` without a unit."""
    decimals: int
    bare: float
    """The number as it stands, before any conversion of its unit."""

    @property
    def is_range(self) -> bool:
        """Tell whether two ends are given."""
        return self.low != self.high


@dataclass(frozen=True, slots=True)
class _Raw:
    start: int
    number_end: int
    end: int
    value: float
    half: float
    spread: float | None
    quantity: str | None
    factor: float
    decimals: int


def quoted_numbers(text: str) -> list[Quoted]:
    """Return every number in the text, ranges as one, in order."""
    raws = _with_shared_units(text, list(_raw_numbers(text)))
    quoted: list[Quoted] = []
    index = 0
    while index < len(raws):
        first = raws[index]
        after = raws[index + 1] if index + 1 < len(raws) else None
        if after is not None and _is_range(text, first, after):
            quoted.append(_range(first, after))
            index += 2
        else:
            quoted.append(_single(first))
            index += 1
    return quoted


def unit_in_head(head: str) -> str | None:
    """Return the unit that the head of a column gives its numbers: ``Angle / °``, ``r (Å)``."""
    found = _HEAD.search(head)
    unit = _UNIT.match(found.group(1)) if found else None
    return unit.group() if unit and _UNITS[int(str(unit.lastgroup)[1:])][0] != OTHER else None


def _raw_numbers(text: str) -> Iterator[_Raw]:
    read = 0
    for match in _ITEM.finditer(text):
        if match.start() < read:
            continue  # part of a unit, or the ± of the number before
        digits = match.group("number").replace(",", ".")
        decimals = len(digits.partition(".")[2])
        place = match.end()
        gap = re.match(_GAP, text[place:])
        unit = _UNIT.match(text, place + (gap.end() if gap else 0))
        if unit is None and text[place : place + 1].isalpha():
            continue
        quantity, factor, _ = _UNITS[int(str(unit.lastgroup)[1:])] if unit else (None, 1.0, "")
        raw = _Raw(
            match.start(),
            match.end("number"),
            unit.end() if unit else place,
            float(digits),
            0.5 * 10.0**-decimals,
            _spread(match, decimals),
            quantity,
            factor,
            decimals,
        )
        raw = _with_spread_after(text, _with_minutes(text, raw))
        read = raw.end
        yield raw


def _spread(match: re.Match[str], decimals: int) -> float | None:
    if match.group("last"):
        return float(int(match.group("last")) * 10.0**-decimals)
    given = match.group("spread")
    return float(given.replace(",", ".")) if given else None


def _with_minutes(text: str, raw: _Raw) -> _Raw:
    minutes = _MINUTES.match(text, raw.end) if raw.quantity == "angle" else None
    if minutes is None:
        return raw
    value = raw.value + float(minutes.group(1)) / 60
    return replace(raw, end=minutes.end(), value=value, half=0.5 / 60)


def _with_spread_after(text: str, raw: _Raw) -> _Raw:
    """Read the ± that follows the unit: ``173.1° ± 0.5°``."""
    after = _SPREAD_AFTER.match(text, raw.end) if raw.quantity and raw.spread is None else None
    if after is None:
        return raw
    unit = _UNIT.match(text, after.end())
    spread = float(after.group(1).replace(",", "."))
    return replace(raw, end=unit.end() if unit else after.end(), spread=spread)


def _with_shared_units(text: str, raws: list[_Raw]) -> list[_Raw]:
    """Give a number without a unit that of the next one it is joined to (rule N1)."""
    shared = raws[:]
    for index in range(len(raws) - 2, -1, -1):
        raw, after = shared[index], shared[index + 1]
        between = text[raw.end : after.start]
        joined = _RANGE.fullmatch(between) or (
            _LIST.fullmatch(between) and raw.decimals == after.decimals
        )
        if raw.quantity is None and after.quantity is not None and joined:
            shared[index] = replace(raw, quantity=after.quantity, factor=after.factor)
    return shared


def _is_range(text: str, first: _Raw, after: _Raw) -> bool:
    if first.quantity != after.quantity or first.quantity is None or first.value >= after.value:
        return False
    between = text[first.end : after.start]
    if _RANGE.fullmatch(between):
        return True
    return between.strip() == "and" and _BETWEEN.search(text[: first.start]) is not None


def _range(first: _Raw, after: _Raw) -> Quoted:
    return replace(
        _single(after),
        start=first.start,
        low=first.value * first.factor,
        half=max(first.half * first.factor, after.half * after.factor),
    )


def _single(raw: _Raw) -> Quoted:
    value = raw.value * raw.factor
    return Quoted(
        start=raw.start,
        end=raw.end,
        low=value,
        high=value,
        half=raw.half * raw.factor,
        spread=None if raw.spread is None else raw.spread * raw.factor,
        quantity=raw.quantity,
        decimals=raw.decimals,
        bare=raw.value,
    )
