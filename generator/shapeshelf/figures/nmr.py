"""Expected NMR patterns to first order, as a small diagram.

The rows have no shift scale: each shows how one signal splits. Lines are spaced so that nested
splittings can be told apart, heights are the binomial ones (first-order rules, as in
H. Günther, NMR Spectroscopy (1995), recalled from memory).
"""

import math
import re
from collections.abc import Sequence

from shapeshelf.figures.canvas import render, text_width
from shapeshelf.figures.lettering import plain
from shapeshelf.figures.model import Drawing, Lettering, Mark, Role, Stroke, Style, Svg
from shapeshelf.properties.model import NmrSignal
from shapeshelf.report.model import CompoundReport

Line = tuple[float, float]
"""Place and height."""

WIDTH = 400.0
MOST_SIGNALS = 8
_ROW, _LINE_HEIGHT, _TOP = 80.0, 44.0, 8.0
_EDGE, _PATTERN_LEFT, _PATTERN_RIGHT = 6.0, 150.0, 394.0
_CLOSEST, _WIDEST = 7.0, 18.0
_NAME, _NOTE = 15.0, 12.5
_COUPLING = re.compile(r"(\d)J")


def nmr_pattern(report: CompoundReport) -> Svg | None:
    """Return how each expected NMR signal splits, ``None`` where none does."""
    drawing = nmr_drawing(report)
    return render(drawing) if drawing else None


def nmr_drawing(report: CompoundReport) -> Drawing | None:
    """Return the NMR patterns as data."""
    signals = report.spectra.nmr[:MOST_SIGNALS]
    if not any(signal.partners for signal in signals):
        return None
    marks: list[Mark] = []
    for index, signal in enumerate(signals):
        marks += _signal_row(signal, _TOP + index * _ROW)
    words = "; ".join(_signal_words(signal) for signal in signals)
    height = _TOP + len(signals) * _ROW
    title = f"{report.name}, expected NMR patterns"
    return Drawing("nmr", WIDTH, height, tuple(marks), title, words + ".")


def splitting(counts: Sequence[int]) -> tuple[Line, ...]:
    """Return the lines of a first-order pattern for sets of ``counts`` alike spin-1/2 partners,
    the largest coupling first: places in units of the smallest one, heights adding up to one."""
    lines: dict[float, float] = {0.0: 1.0}
    for count, step in zip(counts, _steps(counts), strict=True):
        split: dict[float, float] = {}
        for place, height in lines.items():
            for k in range(count + 1):
                at = round(place + (k - count / 2) * step, 6)
                split[at] = split.get(at, 0.0) + height * math.comb(count, k) / 2**count
        lines = split
    return tuple(sorted(lines.items()))


def _steps(counts: Sequence[int]) -> list[float]:
    """Spacings wide enough that a coupling's lines stand clear of those it splits into."""
    steps = [1.0]
    for inner in reversed(counts[1:]):
        steps.insert(0, steps[0] * (inner + 1.8))
    return steps[: len(counts)]


def _partner_counts(signal: NmrSignal) -> list[int]:
    return [int(partner.split(" ", 1)[0]) for partner in signal.partners]


def _signal_row(signal: NmrSignal, top: float) -> list[Mark]:
    base = top + _LINE_HEIGHT + 6
    left = _PATTERN_LEFT
    multiplicity = Lettering(_EDGE, base, signal.multiplicity, _NOTE, anchor="start")
    if text_width(signal.multiplicity, _NOTE) > left - _EDGE - 6:
        left = _EDGE + text_width(signal.multiplicity, _NOTE) + 6
    marks: list[Mark] = [
        Lettering(_EDGE, top + 24, _nucleus(signal), _NAME, anchor="start", bold=True),
        multiplicity,
        Stroke(((left, base), (_PATTERN_RIGHT, base)), Style("line"), Role.AXIS),
    ]
    if signal.partners:
        text = _COUPLING.sub(r"^{\1}J", ", ".join(signal.partners))
        marks.append(Lettering(_EDGE, base + 18, text, _NOTE, anchor="start", colour="soft"))
    return marks + _pattern(signal, left, base)


def _pattern(signal: NmrSignal, left: float, base: float) -> list[Mark]:
    lines = splitting(_partner_counts(signal))
    span = lines[-1][0] - lines[0][0]
    room = _PATTERN_RIGHT - left - 20
    unit = min(_WIDEST, room / span) if span else _WIDEST
    middle = (left + _PATTERN_RIGHT) / 2
    tallest = max(height for _, height in lines)
    style = Style("ink", None, 2.2 if unit >= _CLOSEST else 1.2)
    marks: list[Mark] = []
    for place, height in lines:
        x, y = middle + place * unit, base - _LINE_HEIGHT * height / tallest
        marks.append(Stroke(((x, base), (x, y)), style, Role.DATA))
    return marks


def _nucleus(signal: NmrSignal) -> str:
    digits = "".join(letter for letter in signal.nucleus if letter.isdigit())
    return f"^{{{digits}}}{signal.nucleus.removeprefix(digits)}  × {len(signal.atoms)}"


def _signal_words(signal: NmrSignal) -> str:
    partners = f" through {', '.join(signal.partners)}" if signal.partners else ""
    return f"{plain(_nucleus(signal))}: {signal.multiplicity}{partners}"
