"""Parity plots: what each method says against what is measured, one drawing a method.

Above, found against measured: the diagonal is agreement, the band around it holds 68 % of the
values that count. Below, on the same scale of measured values, how far each is off. All methods
of a quantity share their scales, so that the drawings compare. The values furthest off are filled
and named; a cross is a value that does not count, an arrowhead one beyond the lower frame.
"""

from collections.abc import Iterator, Sequence

import numpy as np

from shapeshelf.calculation.methods import NAMES
from shapeshelf.calculation.model import Level
from shapeshelf.calculation.parity import (
    Averages,
    Deviation,
    Method,
    ParityPoint,
    averages_of,
    charge_in,
    deviations_of,
    furthest,
    is_formula,
    methods_in,
    spoken_name,
)
from shapeshelf.figures.canvas import render
from shapeshelf.figures.clearance import Array, discs_along
from shapeshelf.figures.lettering import formula
from shapeshelf.figures.model import Drawing, Point, Role, Stroke, Style, Svg
from shapeshelf.figures.naming import Named, names_beside
from shapeshelf.figures.numbers import MINUS
from shapeshelf.figures.parity_frames import (
    HEIGHT,
    UPPER,
    WIDTH,
    Scales,
    diagonal,
    legend_marks,
    lower_marks,
    scales_of,
    title_marks,
    upper_marks,
)

MOST_NAMED = 5
METHOD_NAMES = {
    Method.MODEL: "domain model",
    Method.XTB: NAMES[Level.XTB],
    Method.DFT: NAMES[Level.DFT],
}
QUANTITY_NAMES = {"angle": "bond angles", "dipole": "dipole moments"}
_UNITS, _DECIMALS = {"angle": "°", "dipole": " D"}, {"angle": 1, "dipole": 2}
_COLOURS = {Method.MODEL: "blue", Method.XTB: "vermillion", Method.DFT: "purple"}
_RADIUS, _ROOM = 3.8, 4.0
"""Of a symbol, and of the disc that names keep clear of."""


def parity_plots(points: Sequence[ParityPoint], quantity: str) -> dict[Method, Svg]:
    """Return a plot for each method that has values of ``quantity``."""
    return {method: render(one) for method, one in parity_drawings(points, quantity).items()}


def parity_drawings(points: Sequence[ParityPoint], quantity: str) -> dict[Method, Drawing]:
    """Return the plots as data."""
    held = {one: deviations_of(points, quantity, one) for one in methods_in(points, quantity)}
    if not held:
        return {}
    scales = scales_of(quantity, [one for found in held.values() for one in found])
    return {
        method: _drawing(method, found, averages_of(points, quantity, method), scales)
        for method, found in held.items()
    }


def amount_text(quantity: str, value: float, signed: bool = False) -> str:
    """Return an angle or a dipole moment with its unit; what rounds to nothing has no sign."""
    digits = f"{abs(value):.{_DECIMALS[quantity]}f}"
    sign = MINUS if value < 0 else "+" if signed else ""
    return (sign if float(digits) else "") + digits + _UNITS[quantity]


def _drawing(
    method: Method, found: Sequence[Deviation], averages: Averages | None, scales: Scales
) -> Drawing:
    name, width = METHOD_NAMES[method], averages.half_width if averages else 0.0
    told = f"68 % within ±{amount_text(scales.quantity, width)}" if averages else ""
    worst = furthest(found, MOST_NAMED)
    named = [Named(_lettered(one), *_above(one, scales)) for one in worst]
    marks = (
        *title_marks(_begun(name), told),
        *upper_marks(width, scales),
        *lower_marks(f"{name} {MINUS} measured", width, scales),
        *_symbols(method, found, worst, scales),
        *names_beside(named, _crowd(found, scales), UPPER, diagonal(scales)),
        *legend_marks(_meanings(found, scales)),
    )
    title = f"{_begun(name)} against measurement, {QUANTITY_NAMES[scales.quantity]}"
    words = _in_words(found, worst, averages, scales.quantity)
    return Drawing("parity", WIDTH, HEIGHT, marks, title, words)


def _begun(name: str) -> str:
    return name[:1].upper() + name[1:]


def _above(one: Deviation, scales: Scales) -> Point:
    return scales.across(one.point.measured), scales.up(one.found)


def _below(one: Deviation, scales: Scales) -> Point:
    return scales.across(one.point.measured), scales.off(one.off)


def _symbols(
    method: Method, found: Sequence[Deviation], worst: Sequence[Deviation], scales: Scales
) -> Iterator[Stroke]:
    """Yield a symbol for each value in both frames: the worst last, so that none hides them."""
    for one in sorted(found, key=lambda one: (one in worst, one.point.counts)):
        yield _symbol(method, one, one in worst, _above(one, scales))
        beyond = abs(one.off) > scales.reach
        yield (
            _arrowhead(one.off, _below(one, scales))
            if beyond
            else _symbol(method, one, one in worst, _below(one, scales))
        )


def _symbol(method: Method, one: Deviation, is_named: bool, at: Point) -> Stroke:
    if not one.point.counts:
        return _cross(at)
    x, y = at
    r = _RADIUS
    shapes = {
        Method.MODEL: ((x, y - r), (x + r, y), (x, y + r), (x - r, y)),
        Method.XTB: ((x - r, y - 0.8 * r), (x + r, y - 0.8 * r), (x, y + r)),
        Method.DFT: ((x - r, y + 0.8 * r), (x + r, y + 0.8 * r), (x, y - r)),
    }
    style = Style(_COLOURS[method], _COLOURS[method] if is_named else "paper", 1.3)
    return Stroke(shapes[method], style, Role.DATA, closed=True)


def _cross(at: Point) -> Stroke:
    x, y = at
    r = 0.85 * _RADIUS
    points = ((x - r, y - r), (x + r, y + r), at, (x - r, y + r), (x + r, y - r))
    return Stroke(points, Style("ink", None, 1.5), Role.DATA)


def _arrowhead(off: float, at: Point) -> Stroke:
    """Return an arrowhead at the edge of the lower frame that points out of it."""
    x, y = at
    out = -9.0 if off > 0 else 9.0
    points = ((x, y), (x + 4.0, y - out), (x - 4.0, y - out))
    return Stroke(points, Style(None, "ink"), Role.DATA, closed=True)


def _meanings(found: Sequence[Deviation], scales: Scales) -> list[tuple[Stroke, str]]:
    meanings = []
    if not all(one.point.counts for one in found):
        meanings.append((_cross((0.0, 0.0)), "not a free molecule"))
    if any(abs(one.off) > scales.reach for one in found):
        reach = f"{scales.reach:g}{_UNITS[scales.quantity]}"
        meanings.append((_arrowhead(1.0, (0.0, -4.5)), f"beyond ±{reach}"))
    return meanings


def _crowd(found: Sequence[Deviation], scales: Scales) -> Array:
    """Return what names keep clear of: all points and the line of agreement."""
    points = np.array([(*_above(one, scales), _ROOM) for one in found])
    return np.concatenate([points, discs_along(diagonal(scales), 1.0)])


def _lettered(one: Deviation) -> str:
    name = spoken_name(one.point.name)
    return formula(name, charge_in(name)) if is_formula(name) else name


def _in_words(
    found: Sequence[Deviation],
    worst: Sequence[Deviation],
    averages: Averages | None,
    quantity: str,
) -> str:
    measured = [one.point.measured for one in found]
    least, most = (amount_text(quantity, value) for value in (min(measured), max(measured)))
    words = f"{len(found)} values, measured from {least} to {most}."
    if averages:
        mean, half_width = (
            amount_text(quantity, value) for value in (averages.mean, averages.half_width)
        )
        words += f" Off by {mean} on average over the {averages.values} that count, "
        words += f"68 % by at most {half_width}."
    names = ", ".join(_told(one) for one in worst)
    return f"{words} Furthest off: {names}."


def _told(one: Deviation) -> str:
    parts = (spoken_name(one.point.name), one.point.of)
    name = " ".join(part for part in parts if part)
    return f"{name} {amount_text(one.point.quantity, one.off, signed=True)}"
