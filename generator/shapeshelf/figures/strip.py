"""The deviation strip: for each kind of angle a degree scale with every value it has.

Marks differ by shape: a bar for the ideal, a diamond for the model, a triangle for the
calculated, a ring for the supplied and a filled square for the measured value; a line shows ±.
All scales have the same degrees to the pixel, so deviations compare from line to line.
"""

import math

from shapeshelf.figures.canvas import render, text_width
from shapeshelf.figures.model import Drawing, Lettering, Mark, Role, Stroke, Style, Svg
from shapeshelf.figures.numbers import degrees_text, plus_minus_text
from shapeshelf.figures.outlines import ring
from shapeshelf.report.model import AngleRow, Basis, CompoundReport

WIDTH = 400.0
MOST_ROWS = 12
_LEFT, _RIGHT = 10.0, 390.0
_ROW, _TOP, _LEGEND = 64.0, 6.0, 34.0
_LABEL_SIZE, _TICK_SIZE = 15.0, 12.5
_SMALLEST_SPAN_DEGREES = 12.0
_SAME_DEGREES = 0.05
_STEPS = (1.0, 2.0, 5.0, 10.0, 20.0, 30.0)
_KINDS = ("ideal", "model", "supplied", "calculated", "measured")


def strip(report: CompoundReport) -> Svg | None:
    """Return the strip, ``None`` where no angle departs from its ideal."""
    drawing = strip_drawing(report)
    return render(drawing) if drawing else None


def strip_drawing(report: CompoundReport) -> Drawing | None:
    """Return the strip as data."""
    rows = _rows(report)
    if not rows:
        return None
    span = max(_SMALLEST_SPAN_DEGREES, *(_needed_span(row) for _, row in rows)) * 1.12
    marks: list[Mark] = []
    for index, (name, row) in enumerate(rows):
        marks += _row_marks(name, row, _TOP + index * _ROW, span)
    top = _TOP + len(rows) * _ROW
    shown = [kind for kind in _KINDS if any(_value(row, kind) is not None for _, row in rows)]
    marks += _legend(shown, top + 18)
    title = f"{report.name}, angles compared"
    return Drawing("strip", WIDTH, top + _LEGEND, tuple(marks), title, _in_words(rows))


def _rows(report: CompoundReport) -> list[tuple[str, AngleRow]]:
    seen: set[int] = set()
    rows: list[tuple[str, AngleRow]] = []
    for centre in report.centres:
        if centre.centre.atom not in seen:
            rows += [(row.of.replace("-", "–"), row) for row in centre.angles if _says_more(row)]
        seen |= set(centre.equivalent)
    return rows[:MOST_ROWS]


def _says_more(row: AngleRow) -> bool:
    """Tell whether a row has anything beside an ideal value that holds exactly."""
    if row.degrees.basis is not Basis.MODEL or row.ideal_degrees is None:
        return True
    return abs(row.degrees.value - row.ideal_degrees) > _SAME_DEGREES


def _value(row: AngleRow, kind: str) -> float | None:
    if kind == "ideal":
        return row.ideal_degrees
    return {
        "model": row.degrees.model,
        "calculated": row.degrees.calculated,
        "measured": row.degrees.measured,
        "supplied": row.degrees.supplied,
    }[kind]


def _uncertainty(row: AngleRow, kind: str) -> float:
    value = row.degrees
    return {
        "ideal": None,
        "model": value.model_uncertainty,
        "calculated": value.calculated_uncertainty,
        "measured": value.measured_uncertainty,
        "supplied": None,
    }[kind] or 0.0


def _ends(row: AngleRow) -> list[float]:
    ends = []
    for kind in _KINDS:
        value = _value(row, kind)
        if value is not None:
            plus_minus = _uncertainty(row, kind)
            ends += [value - plus_minus, value + plus_minus]
    return ends or [row.degrees.value]


def _needed_span(row: AngleRow) -> float:
    return max(_ends(row)) - min(_ends(row))


def _row_marks(name: str, row: AngleRow, top: float, span: float) -> list[Mark]:
    middle = (max(_ends(row)) + min(_ends(row))) / 2
    scale = (_RIGHT - _LEFT) / span
    y = top + 38

    def at(degrees: float) -> float:
        return (_LEFT + _RIGHT) / 2 + (degrees - middle) * scale

    best = degrees_text(row) + plus_minus_text(row.degrees.uncertainty)
    marks: list[Mark] = [
        Lettering(_LEFT, top + 14, name, _LABEL_SIZE, anchor="start", bold=True),
        Lettering(
            _RIGHT, top + 14, f"{best}  {row.degrees.basis.value}", _LABEL_SIZE, anchor="end"
        ),
        Stroke(((_LEFT, y), (min(_RIGHT, at(180.0)), y)), Style("line", None, 1.0), Role.AXIS),
    ]
    marks += _ticks(middle, span, y, at(0.0), scale)
    for kind in _KINDS:
        value = _value(row, kind)
        if value is not None:
            marks += _mark(kind, at(value), y, _uncertainty(row, kind) * scale)
    return marks


def _ticks(middle: float, span: float, y: float, origin: float, scale: float) -> list[Mark]:
    step = next(step for step in _STEPS if span / step <= 8)
    first, last = math.ceil((middle - span / 2) / step), math.floor((middle + span / 2) / step)
    marks: list[Mark] = []
    for count in range(first, last + 1):
        degrees = count * step
        if degrees > 180 or degrees < 0:
            continue
        x = origin + degrees * scale
        marks.append(Stroke(((x, y), (x, y + 4)), Style("line", None, 1.0), Role.AXIS))
        reach = text_width(f"{degrees:g}°", _TICK_SIZE) / 2
        if x - reach >= _LEFT and x + reach <= _RIGHT:
            marks.append(Lettering(x, y + 18, f"{degrees:g}°", _TICK_SIZE, colour="soft"))
    return marks


def _mark(kind: str, x: float, y: float, plus_minus: float) -> list[Mark]:
    marks: list[Mark] = []
    if plus_minus > 0:
        level = y + {"model": 0.0, "calculated": -5.0, "measured": 0.0}[kind]
        width = 5.0 if kind == "model" else 1.6
        colour = "band" if kind == "model" else "ink"
        ends = ((x - plus_minus, level), (x + plus_minus, level))
        marks.append(Stroke(ends, Style(colour, None, width), Role.DATA))
    return [*marks, symbol(kind, x, y)]


def symbol(kind: str, x: float, y: float) -> Stroke:
    """Return the mark of ``ideal``, ``model``, ``supplied``, ``calculated`` or ``measured``."""
    if kind == "ideal":
        return Stroke(((x, y - 11), (x, y + 3)), Style("soft", None, 1.6, (3, 2)), Role.DATA)
    if kind == "model":
        points = ((x, y - 6), (x + 6, y), (x, y + 6), (x - 6, y))
        return Stroke(points, Style("blue", "paper", 1.8), Role.DATA, closed=True)
    if kind == "supplied":
        return ring(x, y, 5.0, Style("green", "paper", 1.8), Role.DATA)
    if kind == "calculated":
        triangle = ((x, y - 11), (x + 6, y - 1), (x - 6, y - 1))
        return Stroke(triangle, Style("purple", "paper", 1.8), Role.DATA, closed=True)
    points = ((x - 4.5, y - 4.5), (x + 4.5, y - 4.5), (x + 4.5, y + 4.5), (x - 4.5, y + 4.5))
    return Stroke(points, Style("ink", "ink", 1.0), Role.DATA, closed=True)


def _legend(kinds: list[str], y: float) -> list[Mark]:
    marks: list[Mark] = []
    x = _LEFT + 6
    for kind in kinds:
        marks.append(symbol(kind, x, y))
        marks.append(Lettering(x + 11, y + 4.5, kind, _TICK_SIZE, anchor="start", colour="soft"))
        x += 11 + text_width(kind, _TICK_SIZE) + 15
    return marks


def _in_words(rows: list[tuple[str, AngleRow]]) -> str:
    parts = []
    for name, row in rows:
        known = [
            f"{kind} {value:.1f}°{plus_minus_text(_uncertainty(row, kind))}"
            for kind in _KINDS
            if (value := _value(row, kind)) is not None
        ]
        parts.append(f"{name}: {', '.join(known)}.")
    return " ".join(parts)
