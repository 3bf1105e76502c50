"""Expected NMR patterns to first order, as a small diagram.

The rows have no shift scale: each shows how one signal splits. Lines are spaced so that nested
splittings can be told apart, heights are the binomial ones (first-order rules, as in
H. Günther, NMR Spectroscopy (1995), recalled from memory).
"""

import math
import re
from collections.abc import Sequence

from shapeshelf.figures.canvas import render
from shapeshelf.figures.lettering import plain
from shapeshelf.figures.model import Drawing, Lettering, Mark, Role, Stroke, Style, Svg
from shapeshelf.properties.model import NmrSignal
from shapeshelf.report.model import CompoundReport

Line = tuple[float, float]
"""Place and height."""

WIDTH = 520.0
MOST_SIGNALS = 8
_ROW, _LINE_HEIGHT, _TOP = 74.0, 44.0, 12.0
_PATTERN_LEFT, _PATTERN_RIGHT = 196.0, 500.0
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
    base = top + _ROW - 16
    lines = splitting(_partner_counts(signal))
    span = lines[-1][0] - lines[0][0]
    room = _PATTERN_RIGHT - _PATTERN_LEFT - 20
    unit = min(_WIDEST, room / span) if span else _WIDEST
    middle = (_PATTERN_LEFT + _PATTERN_RIGHT) / 2
    tallest = max(height for _, height in lines)
    width = 2.2 if unit >= _CLOSEST else 1.2
    marks: list[Mark] = [
        Lettering(20, top + 20, _nucleus(signal), _NAME, anchor="start", bold=True),
        Lettering(20, top + 39, signal.multiplicity, _NOTE, anchor="start"),
        Stroke(((_PATTERN_LEFT, base), (_PATTERN_RIGHT, base)), Style("line"), Role.AXIS),
    ]
    if signal.partners:
        text = _COUPLING.sub(r"^{\1}J", ", ".join(signal.partners))
        marks.append(Lettering(20, top + 56, text, _NOTE, anchor="start", colour="soft"))
    for place, height in lines:
        x, y = middle + place * unit, base - _LINE_HEIGHT * height / tallest
        marks.append(Stroke(((x, base), (x, y)), Style("ink", None, width), Role.DATA))
    return marks


def _nucleus(signal: NmrSignal) -> str:
    digits = "".join(letter for letter in signal.nucleus if letter.isdigit())
    return f"^{{{digits}}}{signal.nucleus.removeprefix(digits)}  × {len(signal.atoms)}"


def _signal_words(signal: NmrSignal) -> str:
    partners = f" through {', '.join(signal.partners)}" if signal.partners else ""
    return f"{plain(_nucleus(signal))}: {signal.multiplicity}{partners}"
