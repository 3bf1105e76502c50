"""The title block of a sheet: what is drawn, on what it rests, at what scale."""

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.layout import BLOCK_HEIGHT, BLOCK_WIDTH
from shapeshelf.figures.lettering import formula, point_group
from shapeshelf.figures.model import Lettering, Mark, Role, Stroke, Style
from shapeshelf.figures.outlines import ring
from shapeshelf.report.model import Basis, CompoundReport, Value

_HEAD, _FOOT = 40.0, 44.0
_PAD, _LABEL_COLUMN = 12.0, 96.0
_NAME_SIZE, _SMALLEST_NAME = 19.0, 13.0
_TEXT, _SMALLEST_TEXT, _SMALL = 14.0, 12.0, 12.0
_ROOM = BLOCK_WIDTH - _LABEL_COLUMN - _PAD
_RULE, _THICK = Style("ink", None, 0.8), Style("ink", None, 1.6)
_SYMBOL_WIDTH = 70.0

_MOST_LINES = 3


def title_block(
    report: CompoundReport,
    corner: tuple[float, float],
    scale: float,
    revision: str,
    not_drawn: list[str],
) -> list[Mark]:
    """Return the block with its upper left corner at ``corner``; ``not_drawn`` are the values
    that no view shows."""
    x, y = corner
    rows = [
        ("shape", _shape(report)),
        ("point group", f"{point_group(report.point_group)}  {report.point_group_basis.value}"),
        ("angles", _bases([row.degrees for one in report.centres for row in one.angles])),
        ("lengths", _bases([row.angstrom for row in report.lengths])),
        ("structure", report.structure.method),
        ("id · revision", " · ".join(part for part in (report.id, revision) if part)),
    ]
    if not_drawn:
        rows.insert(4, ("not in a view", ", ".join(not_drawn)))
    marks: list[Mark] = [_box(x, y, BLOCK_WIDTH, BLOCK_HEIGHT, _THICK)]
    marks += _head(report, x, y)
    total = sum(_lines(text) for _, text in rows)
    each = (BLOCK_HEIGHT - _HEAD - _FOOT) / total
    top = y + _HEAD
    for label, text in rows:
        marks += _row(label, text, x, top, each * _lines(text))
        top += each * _lines(text)
    from_model = any(row.angstrom.basis is Basis.MODEL for row in report.lengths)
    unit = "lengths in Å, ≈ from model" if from_model else "lengths in Å"
    return [*marks, *_foot(x, y + BLOCK_HEIGHT - _FOOT, scale, unit)]


def fitted(text: str, room: float, size: float, smallest: float, bold: bool = False) -> Lettering:
    """Return ``text`` as large as fits into ``room`` pixels, shortened with … as a last resort."""
    while size > smallest and text_width(text, size, bold) > room:
        size -= 0.5
    while len(text) > 1 and text_width(text, size, bold) > room:
        text = text[:-2].rstrip() + "…"
    return Lettering(0, 0, text, size, anchor="start", bold=bold)


def _head(report: CompoundReport, x: float, y: float) -> list[Mark]:
    charge = report.molecule.charge
    sum_formula = formula(report.molecule.formula, charge)
    wide = min(text_width(sum_formula, 18, True), BLOCK_WIDTH * 0.4)
    small = fitted(sum_formula, wide + 1, 18, 10, bold=True)
    name = fitted(report.name, BLOCK_WIDTH - 3 * _PAD - wide, _NAME_SIZE, _SMALLEST_NAME, bold=True)
    base = y + _HEAD / 2 + 7
    return [
        Lettering(x + _PAD, base, name.text, name.size, anchor="start", bold=True),
        Lettering(x + BLOCK_WIDTH - _PAD, base, small.text, small.size, anchor="end", bold=True),
    ]


def _lines(text: str) -> int:
    """Return how many lines a row's text takes, three at most."""
    return len(_wrapped(text))


def _row(label: str, text: str, x: float, y: float, height: float) -> list[Mark]:
    lines = _wrapped(text)
    step = height / len(lines)
    marks: list[Mark] = [
        Stroke(((x, y), (x + BLOCK_WIDTH, y)), _RULE, Role.FRAME),
        Lettering(x + _PAD, y + step / 2 + 5, label, _SMALL, colour="soft", anchor="start"),
    ]
    for index, line in enumerate(lines):
        shown = fitted(line, _ROOM, _TEXT, _SMALLEST_TEXT)
        base = y + (index + 0.5) * step + 5 + (1.5 * (len(lines) - 1 - 2 * index))
        marks.append(Lettering(x + _LABEL_COLUMN, base, shown.text, shown.size, anchor="start"))
    return marks


def _wrapped(text: str) -> list[str]:
    """Return the text in lines, each broken at the last space that fits."""
    lines: list[str] = []
    rest = text.split(" ")
    while rest and len(lines) < _MOST_LINES - 1:
        count = len(rest)
        while count > 1 and text_width(" ".join(rest[:count]), _SMALLEST_TEXT) > _ROOM:
            count -= 1
        lines.append(" ".join(rest[:count]))
        rest = rest[count:]
    return [*lines, " ".join(rest)] if rest else lines


def _foot(x: float, y: float, scale: float, unit: str) -> list[Mark]:
    """The scale bar and the sign for first-angle projection."""
    split = x + BLOCK_WIDTH - _SYMBOL_WIDTH
    left, level = x + _PAD + 4, y + 30
    marks: list[Mark] = [
        Stroke(((x, y), (x + BLOCK_WIDTH, y)), _RULE, Role.FRAME),
        Stroke(((split, y), (split, y + _FOOT)), _RULE, Role.FRAME),
        Stroke(((left, level), (left + scale, level)), Style("ink", None, 2.0), Role.FRAME),
        Lettering(left + scale / 2, level - 8, "1 Å", _SMALL),
        Lettering(left + scale + 16, level + 4, unit, _SMALL, Role.LABEL, "soft", "start"),
    ]
    bar = Style("ink", None, 2.0)
    for end in (left, left + scale):
        marks.append(Stroke(((end, level - 5), (end, level + 5)), bar, Role.FRAME))
    return [*marks, *_first_angle_sign(split + 8, y + _FOOT / 2)]


def _first_angle_sign(x: float, y: float) -> list[Mark]:
    """A cone from the front, then from the left to its right (ISO 5456-2, first angle)."""
    small, large, length = 5.0, 10.0, 20.0
    line = Style("ink", None, 1.2)
    cone = ((x, y - large), (x + length, y - small), (x + length, y + small), (x, y + large))
    eye = x + length + 17
    chain = Style("soft", None, 0.8, (7, 2, 1.5, 2))
    return [
        Stroke(cone, line, Role.FRAME, closed=True),
        ring(eye, y, small, line, Role.FRAME),
        ring(eye, y, large, line, Role.FRAME),
        Stroke(((x - 4, y), (eye + large + 4, y)), chain, Role.FRAME),
        Stroke(((eye, y - large - 4), (eye, y + large + 4)), chain, Role.FRAME),
    ]


def _shape(report: CompoundReport) -> str:
    distinct = {one.equivalent for one in report.centres}
    if len(distinct) > 1:
        return f"{len(distinct)} kinds of centre"
    for one in report.centres:
        return "  ".join(part for part in (one.shape or "unnamed", one.polyhedral_symbol) if part)
    return report.shape or "unnamed"


def _bases(values: list[Value]) -> str:
    found = {value.basis for value in values}
    return " + ".join(basis.value for basis in Basis if basis in found)


def _box(x: float, y: float, width: float, height: float, style: Style) -> Stroke:
    corners = ((x, y), (x + width, y), (x + width, y + height), (x, y + height))
    return Stroke(corners, style, Role.FRAME, closed=True)
