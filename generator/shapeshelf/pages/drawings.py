"""Which figures stand on which page, as markup that is safe to place."""

import hashlib
import pickle
import re
from collections.abc import Sequence
from dataclasses import dataclass, field
from functools import cache, lru_cache

from markupsafe import Markup

from shapeshelf.calculation.parity import Method, ParityPoint
from shapeshelf.figures.angle_scale import ScaleRow, angle_scale
from shapeshelf.figures.bench import bench_view
from shapeshelf.figures.glyph import glyph, shape_drawing
from shapeshelf.figures.infrared import infrared_sticks
from shapeshelf.figures.lewis import lewis_structure
from shapeshelf.figures.model import Svg
from shapeshelf.figures.nmr import nmr_pattern
from shapeshelf.figures.parity import parity_plots
from shapeshelf.figures.sheet import sheet
from shapeshelf.figures.strip import strip
from shapeshelf.pages.turning import turn_data
from shapeshelf.report.model import CompoundReport

KEPT = 400
"""Compounds whose figures are kept in memory, some 100 kB each."""

_NAMING_ATTRIBUTE = re.compile(r' (?:role|aria-[a-z]+|font-family)="[^"]*"')
_NAMING_ELEMENT = re.compile(r"<(title|desc)\b.*?</\1>")


@dataclass(frozen=True, slots=True)
class CompoundFigures:
    """The figures of one compound page; ``None`` where one would say nothing."""

    bench: Markup
    turn: Markup | None
    """Numbers from which the bench view is drawn anew at any turn."""
    lewis: Markup | None
    sheet: Markup | None
    strip: Markup | None
    nmr: Markup | None = None
    infrared: Markup | None = None


def compound_figures(report: CompoundReport) -> CompoundFigures:
    """Draw the figures of one compound, or hand out those of a report that says the same: a
    server that follows changes draws anew only what changed."""
    return _drawn(_Told(hashlib.sha256(pickle.dumps(report)).digest(), report))


@dataclass(frozen=True, slots=True)
class _Told:
    """A report that is equal to another by its content, which is quick to compare."""

    digest: bytes
    report: CompoundReport = field(compare=False)


@lru_cache(maxsize=KEPT)
def _drawn(told: _Told) -> CompoundFigures:
    report = told.report
    return CompoundFigures(
        bench=_markup(bench_view(report)),
        turn=turn_data(report),
        lewis=_maybe(lewis_structure(report)),
        sheet=_maybe(sheet(report)),
        strip=_maybe(strip(report)),
        nmr=_maybe(nmr_pattern(report)),
        infrared=_maybe(infrared_sticks(report)),
    )


def bench_markup(report: CompoundReport) -> Markup:
    """Draw the bench view alone."""
    return _markup(bench_view(report))


@cache
def shape_glyph(shape: str) -> Markup:
    """Return the small drawing of a shape for places where its name stands beside it.

    Without title and ids: it may stand several times on a page, and a screen reader that has
    the name need not hear of the picture.
    """
    opening, body = glyph(shape).markup.split(">", 1)
    bare = _NAMING_ATTRIBUTE.sub("", opening)
    return Markup(f'{bare} aria-hidden="true" focusable="false">{_NAMING_ELEMENT.sub("", body)}')


def shape_figure(shape: str) -> Markup | None:
    """Return the large drawing of a shape, lone pairs with it."""
    return _maybe(shape_drawing(shape))


def scale_figure(shape: str, rows: Sequence[ScaleRow], ideals: Sequence[float]) -> Markup | None:
    """Return the angles of a shape's compounds on one scale."""
    return _maybe(angle_scale(shape, rows, ideals))


def parity_figures(points: Sequence[ParityPoint], quantity: str) -> dict[Method, Markup]:
    """Return what each method says of a quantity, plotted against what is measured."""
    return {method: _markup(svg) for method, svg in parity_plots(points, quantity).items()}


def _maybe(svg: Svg | None) -> Markup | None:
    return _markup(svg) if svg else None


def _markup(svg: Svg) -> Markup:
    """Trust the figure's markup: the figures room escapes all text it sets."""
    return Markup(svg.markup)
