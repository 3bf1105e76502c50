"""``card.svg``: a compound on a small card that stands alone, to embed in a wiki."""

import re
from collections.abc import Iterator
from itertools import islice
from xml.sax.saxutils import escape, quoteattr

from shapeshelf.figures.bench import bench_view
from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.model import Svg
from shapeshelf.figures.palette import colours
from shapeshelf.pages.anchors import shown_angles
from shapeshelf.pages.compound import shape_words
from shapeshelf.pages.properties import polarity_word
from shapeshelf.pages.typesetting import formula_text, point_group_text, sentence_case
from shapeshelf.pages.values import DEBYE, DEGREE, Unit, value_view
from shapeshelf.report.model import CompoundReport, Value

WIDTH, HEIGHT = 460, 150
DRAWING_WIDTH, MARGIN = 160, 10
FONT = (
    "Bahnschrift,'DIN Alternate','Segoe UI',Roboto,'Noto Sans','Liberation Sans',Arial,sans-serif"
)
MOST_ANGLES = 2
_LINE = 20


def card_svg(report: CompoundReport) -> bytes:
    """Return the card of one compound: drawing, name, shape, first angles, polarity."""
    ink, soft, paper = (colours()[name].light for name in ("ink", "soft", "paper"))
    title = f"{report.name}: {shape_words(report)}"
    parts = [
        f'<svg xmlns="http://www.w3.org/2000/svg" width="{WIDTH}" height="{HEIGHT}" '
        f'viewBox="0 0 {WIDTH} {HEIGHT}" role="img" aria-label={quoteattr(title)} '
        f"font-family={quoteattr(FONT)}>",
        f"<title>{escape(title)}</title>",
        f'<rect x="0.5" y="0.5" width="{WIDTH - 1}" height="{HEIGHT - 1}" fill="{paper}" '
        f'stroke="{soft}"/>',
        _placed(bench_view(report)),
    ]
    left, top = DRAWING_WIDTH + 2 * MARGIN, 32
    room = WIDTH - left - MARGIN
    for index, (text, size, bold) in enumerate(_lines(report)):
        weight = ' font-weight="700"' if bold else ""
        parts.append(
            f'<text x="{left}" y="{top + index * _LINE}" font-size="{size}" '
            f'fill="{ink if index < 2 else soft}"{weight}>{escape(_cut(text, size, bold, room))}'
            "</text>"
        )
    return "\n".join([*parts, "</svg>", ""]).encode()


def _lines(
    report: CompoundReport,
) -> Iterator[tuple[str, float, bool]]:
    formula = formula_text(report.molecule.formula, report.molecule.charge)
    yield report.name, 17, True
    yield f"{formula}  {point_group_text(report.point_group)}", 15, False
    yield sentence_case(shape_words(report)), 14, False
    for row in islice(shown_angles(report), MOST_ANGLES):
        yield f"{row.of} {_said(row.degrees, DEGREE)}", 13, False
    dipole = report.dipole_debye
    amount = f", {_said(dipole, DEBYE)}" if dipole else ""
    yield f"{polarity_word(report)}{amount}", 13, False


def _said(value: Value, unit: Unit) -> str:
    view = value_view(value, unit, {})
    return f"{' '.join(filter(None, (view.text, view.plus_minus)))}, {view.basis}"


def _placed(figure: Svg) -> str:
    """Return the drawing scaled into its part of the card."""
    height = HEIGHT - 2 * MARGIN
    size = f'x="{MARGIN}" y="{MARGIN}" width="{DRAWING_WIDTH}" height="{height}"'
    head, _, body = figure.markup.partition(">")
    head = re.sub(r'\s(?:width|height)="[^"]*"', "", head)
    return f"{head} {size}>{body}"


def _cut(text: str, size: float, bold: bool, room: float) -> str:
    """Return as much of a line as fits, an ellipsis for the rest."""
    if text_width(text, size, bold) <= room:
        return text
    kept = text
    while kept and text_width(kept + "…", size, bold) > room:
        kept = kept[:-1]
    return kept.rstrip() + "…"
