"""Which figures stand on which page, as markup that is safe to place."""

from dataclasses import dataclass

from markupsafe import Markup

from shapeshelf.figures.bench import bench_view
from shapeshelf.figures.glyph import glyph
from shapeshelf.figures.lewis import lewis_structure
from shapeshelf.figures.model import Svg
from shapeshelf.figures.sheet import sheet
from shapeshelf.figures.strip import strip
from shapeshelf.report.model import CompoundReport


@dataclass(frozen=True, slots=True)
class CompoundFigures:
    """The figures of one compound page; ``None`` where one would say nothing."""

    bench: Markup
    lewis: Markup | None
    sheet: Markup | None
    strip: Markup | None


def compound_figures(report: CompoundReport) -> CompoundFigures:
    """Draw the figures of one compound."""
    return CompoundFigures(
        bench=_markup(bench_view(report)),
        lewis=_maybe(lewis_structure(report)),
        sheet=_maybe(sheet(report)),
        strip=_maybe(strip(report)),
    )


def shape_glyph(shape: str) -> Markup:
    """Return the small drawing of a shape."""
    return _markup(glyph(shape))


def _maybe(svg: Svg | None) -> Markup | None:
    return _markup(svg) if svg else None


def _markup(svg: Svg) -> Markup:
    """Trust the figure's markup: the figures room escapes all text it sets."""
    return Markup(svg.markup)
