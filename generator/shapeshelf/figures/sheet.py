"""The drawing sheet: a molecule drawn as a workshop draws a part.

Front, top and left side view in first-angle projection (ISO 5456-2), one scale, dimensions
where they are shown true, a title block. Auxiliary views where no principal view shows an
angle true.
"""

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.callouts import (
    axis_orders,
    caption,
    hidden_notes,
    looking_arrow,
    symmetry_axes,
)
from shapeshelf.figures.canvas import render
from shapeshelf.figures.clearance import EMPTY
from shapeshelf.figures.describing import describe
from shapeshelf.figures.dimensions import Ground, Placed, place_dimension
from shapeshelf.figures.dipole import dipole_arrow
from shapeshelf.figures.frames import auxiliary_frames, principal_frames
from shapeshelf.figures.layout import INSET, MARGIN, Layout, lay_out
from shapeshelf.figures.model import Drawing, Mark, Role, Stroke, Style, Svg
from shapeshelf.figures.numbers import angstrom_text, degrees_text
from shapeshelf.figures.scene import Scene, build_scene
from shapeshelf.figures.title_block import title_block
from shapeshelf.figures.view_parts import Painted, paint
from shapeshelf.report.model import AngleRow, CompoundReport, LengthRow
from shapeshelf.report.revision import revision

Array = NDArray[np.float64]

MOST_ATOMS = 12
MOST_ROWS = 8
_REACH = 110.0
"""Pixels around a view within which its dimensions and notes stand."""


@dataclass(frozen=True, slots=True)
class Sheet:
    """A sheet as data: the drawing, its views, and what was dimensioned where."""

    drawing: Drawing
    layout: Layout
    placed: tuple[Placed, ...]
    left_out: tuple[str, ...]
    """Rows that found no place in a view: the title block lists them."""


def sheet(report: CompoundReport) -> Svg | None:
    """Return the sheet, ``None`` where a molecule has too many atoms for one."""
    made = sheet_data(report)
    return render(made.drawing) if made else None


def sheet_data(report: CompoundReport) -> Sheet | None:
    """Return the sheet as data."""
    angles, lengths = _rows(report)
    if len(report.molecule.atoms) > MOST_ATOMS or not report.centres or len(angles) > MOST_ROWS:
        return None
    scene = build_scene(report)
    linear = report.point_group in ("Cinfv", "Dinfh")
    frames = principal_frames(scene, angles, linear)
    layout = lay_out(scene, frames["front"], auxiliary_frames(scene, angles, frames))
    if layout is None:
        return None
    painted = [paint(scene, view) for view in layout.views]
    marks, grounds = _furniture(report, layout, painted, linear)
    placed, left_out, grounds = _dimensions(scene, [*angles, *lengths], grounds)
    marks += _callouts(report, scene, grounds)
    everything = _assembled(report, layout, painted, marks, placed, left_out)
    title = f"{report.name}, drawing sheet"
    drawing = Drawing(
        "sheet", layout.width, layout.height, tuple(everything), title, describe(report)
    )
    return Sheet(drawing, layout, tuple(placed), tuple(left_out))


def _rows(report: CompoundReport) -> tuple[list[AngleRow], list[LengthRow]]:
    """Return the rows to dimension: one set of equivalent centres each, every bond length."""
    seen: set[int] = set()
    angles: list[AngleRow] = []
    for one in report.centres:
        if one.centre.atom not in seen:
            angles += one.angles
        seen |= set(one.equivalent)
    return angles, list(report.lengths)


def _furniture(
    report: CompoundReport, layout: Layout, painted: list[Painted], linear: bool
) -> tuple[list[Mark], list[Ground]]:
    """Return axes and captions, and what each view holds so far."""
    orders = axis_orders(report.symmetry)
    marks: list[Mark] = []
    crowds = [_edges(layout), *(one.crowd for one in painted)]
    letters = [EMPTY]
    for one in painted:
        for drawn, crowd in (symmetry_axes(one, orders, linear), caption(one, _caption_base(one))):
            marks += drawn
            letters.append(crowd)
    words = np.concatenate(letters)
    everything = np.concatenate([*crowds, words])
    grounds = [
        Ground(one, everything[_near(one, everything)], words[_near(one, words)], EMPTY)
        for one in painted
    ]
    return marks, grounds


def _caption_base(one: Painted) -> float:
    return float((one.crowd[:, 1] + one.crowd[:, 2]).max()) + MARGIN + 10


def _near(one: Painted, crowd: Array) -> NDArray[np.bool_]:
    """Pick what lies close enough to a view for its dimensions to meet."""
    low = (one.crowd[:, :2] - one.crowd[:, 2:]).min(axis=0) - _REACH
    high = (one.crowd[:, :2] + one.crowd[:, 2:]).max(axis=0) + _REACH
    inside = (crowd[:, :2] > low) & (crowd[:, :2] < high)
    return np.asarray(inside.all(axis=1))


def _edges(layout: Layout) -> Array:
    """Return discs along the frame and over the title block, which nothing may touch."""
    x, y = layout.block
    right, bottom = layout.width - INSET, layout.height - INSET
    across, down = np.arange(INSET, right, 6.0), np.arange(INSET, bottom, 6.0)
    rim = [(s, INSET, 1.0) for s in across] + [(s, bottom, 1.0) for s in across]
    rim += [(INSET, s, 1.0) for s in down] + [(right, s, 1.0) for s in down]
    rim += [(s, y, 2.0) for s in across if s > x] + [(x, s, 2.0) for s in down if s > y]
    return np.array(rim)


def _dimensions(
    scene: Scene, rows: list[AngleRow | LengthRow], grounds: list[Ground]
) -> tuple[list[Placed], list[str], list[Ground]]:
    placed: list[Placed] = []
    left_out: list[str] = []
    for row in rows:
        found = place_dimension(scene, row, grounds)
        if found is None:
            left_out.append(_in_words(row))
            continue
        placed.append(found)
        grounds = [
            ground.with_more(
                found.crowd, found.letters, found.path, ground.painted.view.name == found.view
            )
            for ground in grounds
        ]
    return placed, left_out, grounds


def _in_words(row: AngleRow | LengthRow) -> str:
    value = degrees_text(row) if isinstance(row, AngleRow) else angstrom_text(row.angstrom) + " Å"
    return f"{row.of.replace('-', '–')} {value}"


def _callouts(report: CompoundReport, scene: Scene, grounds: list[Ground]) -> list[Mark]:
    """Return viewing arrows, notes on hidden atoms and the dipole, each where it has room."""
    marks: list[Mark] = []
    for ground in list(grounds):
        drawn, crowd = looking_arrow(ground.painted.view, grounds)
        marks += drawn
        grounds = [one.with_more(crowd, EMPTY, EMPTY) for one in grounds]
    for index in range(len(grounds)):
        drawn, crowd = hidden_notes(scene, grounds[index])
        marks += drawn
        grounds = [one.with_more(crowd, EMPTY, EMPTY) for one in grounds]
    return [*marks, *dipole_arrow(report, grounds)]


def _assembled(
    report: CompoundReport,
    layout: Layout,
    painted: list[Painted],
    marks: list[Mark],
    placed: list[Placed],
    left_out: list[str],
) -> list[Mark]:
    """Return all marks in drawing order: lines under atoms, lettering on top."""
    axes = [mark for mark in marks if mark.role is Role.AXIS]
    others = [mark for mark in marks if mark.role is not Role.AXIS]
    body: list[Mark] = [*axes]
    strokes = [stroke for one in placed for stroke in one.lines]
    strokes.sort(key=lambda stroke: (stroke.style.stroke or "", stroke.curved))
    body += strokes
    body += [mark for one in painted for mark in one.marks]
    body += others
    body += [one.lettering for one in placed]
    block = title_block(report, layout.block, layout.scale, revision(report), left_out)
    return [_frame(layout), *body, *block]


def _frame(layout: Layout) -> Stroke:
    right, bottom = layout.width - INSET, layout.height - INSET
    corners = ((INSET, INSET), (right, INSET), (right, bottom), (INSET, bottom))
    return Stroke(corners, Style("ink", None, 1.8), Role.FRAME, closed=True)
