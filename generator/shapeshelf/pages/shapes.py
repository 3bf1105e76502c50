"""Pages of shapes: one a shape, and the overview by neighbours and lone pairs."""

import re
from collections.abc import Mapping, Sequence
from dataclasses import dataclass

from markupsafe import Markup

from shapeshelf.catalogue.model import Source
from shapeshelf.figures.angle_scale import ScaleRow
from shapeshelf.pages.addresses import compound_address, root_from, shape_address
from shapeshelf.pages.centres import AngleView, angle_view
from shapeshelf.pages.shape_notes import OriginView, ideal_degrees, origins, usual_shapes
from shapeshelf.pages.typesetting import (
    charge_text,
    formula_markup,
    notation_markup,
    without_charge,
)
from shapeshelf.reference.shapes import SHAPES
from shapeshelf.report.model import CentreReport, CompoundReport

FEWEST_NEIGHBOURS = 2
USUAL_NEIGHBOURS = 7
USUAL_LONE_PAIRS = 4
MOST_ON_SCALE = 60
"""Lines of the scale; where there are more, those with a measured angle come first."""


@dataclass(frozen=True, slots=True)
class MemberView:
    """One compound that has a shape, and the centre at which it has it."""

    name: str
    formula: Markup
    address: str
    centre: str
    notation: Markup
    angles: tuple[AngleView, ...]


@dataclass(frozen=True, slots=True)
class ShapeView:
    """One shape with the group's compounds."""

    name: str
    address: str
    symbols: tuple[str, ...]
    arrangements: tuple[str, ...]
    members: tuple[MemberView, ...]
    compounds: int
    ways: tuple[OriginView, ...] = ()
    scale: tuple[ScaleRow, ...] = ()
    ideals: tuple[float, ...] = ()
    """Ideal angles in degrees, for the scale."""


@dataclass(frozen=True, slots=True)
class CellView:
    """One cell of the overview: what the catalogue holds with so many neighbours and pairs."""

    shapes: tuple[tuple[str, str, int], ...]
    """(shape, address, number of compounds)."""


@dataclass(frozen=True, slots=True)
class OverviewView:
    """Neighbours down, lone pairs across."""

    lone_pairs: tuple[int, ...]
    rows: tuple[tuple[int, tuple[CellView, ...]], ...]
    uncounted: CellView
    """Shapes at centres whose lone pairs are no domains: transition metals."""


def shape_views(
    reports: Sequence[CompoundReport], sources: Mapping[str, Source]
) -> tuple[ShapeView, ...]:
    """Return one view for every shape the table of shapes or the catalogue knows.

    In the table's order, which is that of the number of domains and then of lone pairs; shapes
    that only the catalogue has come last.
    """
    members: dict[str, list[tuple[CompoundReport, CentreReport]]] = {}
    for report in reports:
        for centre in _distinct_centres(report):
            if centre.shape:
                members.setdefault(centre.shape, []).append((report, centre))
    names = dict.fromkeys([*(known.shape for known in SHAPES.values()), *sorted(members)])
    return tuple(_shape_view(name, members.get(name, []), sources) for name in names)


def overview(reports: Sequence[CompoundReport]) -> OverviewView:
    """Return the table of shapes by number of neighbours and lone pairs."""
    held: dict[tuple[int, int | None], dict[str, set[str]]] = {}
    for report in reports:
        for centre in _distinct_centres(report):
            if centre.shape:
                key = (centre.centre.bonded, centre.centre.lone_pairs)
                held.setdefault(key, {}).setdefault(centre.shape, set()).add(report.id or "")
    for key, usual in usual_shapes().items():
        for shape in usual:
            held.setdefault(key, {}).setdefault(shape, set())
    neighbours = range(FEWEST_NEIGHBOURS, max([USUAL_NEIGHBOURS, *(n for n, _ in held)]) + 1)
    pairs = range(max([USUAL_LONE_PAIRS, *(p for _, p in held if p is not None)]) + 1)
    merged: dict[str, set[str]] = {}
    for (_, count), shapes in held.items():
        if count is None:
            for shape, ids in shapes.items():
                merged.setdefault(shape, set()).update(ids)
    return OverviewView(
        lone_pairs=tuple(pairs),
        rows=tuple((n, tuple(_cell(held.get((n, p), {})) for p in pairs)) for n in neighbours),
        uncounted=_cell(merged),
    )


def _distinct_centres(report: CompoundReport) -> list[CentreReport]:
    """Return one centre of each set of equivalent ones."""
    seen: set[int] = set()
    distinct = []
    for centre in report.centres:
        if centre.centre.atom not in seen:
            distinct.append(centre)
        seen.update(centre.equivalent)
    return distinct


def _shape_view(
    name: str,
    members: Sequence[tuple[CompoundReport, CentreReport]],
    sources: Mapping[str, Source],
) -> ShapeView:
    known = [(key[0], value) for key, value in SHAPES.items() if value.shape == name]
    symbols = [value.polyhedral_symbol for _, value in known]
    symbols += [centre.polyhedral_symbol for _, centre in members]
    ways = origins(name)
    arrangements = [way.arrangement for way in ways] or [arrangement for arrangement, _ in known]
    return ShapeView(
        name=name,
        address=shape_address(name),
        symbols=tuple(dict.fromkeys(symbol for symbol in symbols if symbol)),
        arrangements=tuple(dict.fromkeys(arrangements)),
        members=tuple(_member_view(report, centre, sources) for report, centre in members),
        compounds=len({report.id for report, _ in members}),
        ways=ways,
        scale=_scale_rows(members, root_from(shape_address(name))),
        ideals=ideal_degrees(name),
    )


def _scale_rows(
    members: Sequence[tuple[CompoundReport, CentreReport]], root: str
) -> tuple[ScaleRow, ...]:
    """Return one row a compound in the order of its widest angle, measured ones kept first."""
    points: dict[str, tuple[tuple[float, str], ...]] = {}
    reports = {report.id or "": report for report, _ in members}
    for report, centre in members:
        more = tuple((row.degrees.value, row.degrees.basis.value) for row in centre.angles)
        points[report.id or ""] = points.get(report.id or "", ()) + more
    rows = [_scale_row(reports[key], held, root) for key, held in points.items() if held]
    told = sorted(rows, key=_measured_first)
    return tuple(sorted(told[:MOST_ON_SCALE], key=lambda row: max(row.points)[0]))


def _scale_row(
    report: CompoundReport, points: tuple[tuple[float, str], ...], root: str
) -> ScaleRow:
    label = _lettering(report.molecule.formula, report.molecule.charge)
    return ScaleRow(label, points, report.name, root + compound_address(report.id or ""))


def _measured_first(row: ScaleRow) -> bool:
    return all(basis != "measured" for _, basis in row.points)


def _lettering(formula: str, charge: int) -> str:
    """Return a formula as the figures room letters it: ``SO_{4}^{2−}``."""
    body = re.sub(r"(\d+)", r"_{\1}", without_charge(formula, charge))
    return body + (f"^{{{charge_text(charge)}}}" if charge else "")


def _member_view(
    report: CompoundReport, centre: CentreReport, sources: Mapping[str, Source]
) -> MemberView:
    return MemberView(
        name=report.name,
        formula=formula_markup(report.molecule.formula, report.molecule.charge),
        address=compound_address(report.id or ""),
        centre=centre.centre.label if len(report.centres) > 1 else "",
        notation=notation_markup(centre.centre.notation),
        angles=tuple(angle_view(row, sources) for row in centre.angles),
    )


def _cell(shapes: Mapping[str, set[str]]) -> CellView:
    return CellView(
        tuple((shape, shape_address(shape), len(ids)) for shape, ids in sorted(shapes.items()))
    )
