"""The home page: what is here, by shape; where to start; what changed last."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from pathlib import Path

from markupsafe import Markup

from shapeshelf.pages.addresses import compound_address
from shapeshelf.pages.history import Change
from shapeshelf.pages.shapes import ShapeView
from shapeshelf.pages.typesetting import formula_markup
from shapeshelf.report.model import CompoundReport

LATEST = 6


@dataclass(frozen=True, slots=True)
class CompoundLine:
    """One compound in a list, with what the list says of it."""

    name: str
    formula: Markup
    address: str
    note: str


@dataclass(frozen=True, slots=True)
class HomeView:
    """Everything the home page prints."""

    compounds: int
    angles: int
    measured: int
    shapes: tuple[ShapeView, ...]
    start_here: tuple[CompoundLine, ...]
    latest: tuple[CompoundLine, ...]


def home_view(
    reports: Sequence[CompoundReport],
    shapes: Sequence[ShapeView],
    changes: Mapping[Path, Change],
) -> HomeView:
    """Return the values of the home page."""
    angles = [row for report in reports for centre in report.centres for row in centre.angles]
    return HomeView(
        compounds=len(reports),
        angles=len(angles),
        measured=sum(row.degrees.basis == "measured" for row in angles),
        shapes=tuple(shape for shape in shapes if shape.compounds),
        start_here=first_compounds(reports),
        latest=_latest(reports, changes),
    )


def first_compounds(reports: Sequence[CompoundReport]) -> tuple[CompoundLine, ...]:
    """Return the compounds to know first with their reasons, each after what it builds on.

    In the order of the domains at their most crowded centre, then of its lone pairs.
    """
    reasons = {report.id: report.entry.start_here for report in reports if report.entry}
    chosen = sorted((report for report in reports if reasons.get(report.id)), key=_crowding)
    return tuple(compound_line(report, reasons[report.id] or "") for report in chosen)


def _crowding(report: CompoundReport) -> tuple[int, int, str]:
    counts = [(one.centre.bonded, one.centre.lone_pairs or 0) for one in report.centres]
    domains, pairs = max(((bonded + pairs, pairs) for bonded, pairs in counts), default=(0, 0))
    return domains, pairs, report.name.casefold()


def compound_line(report: CompoundReport, note: str) -> CompoundLine:
    """Return a compound as lists print it."""
    return CompoundLine(
        name=report.name,
        formula=formula_markup(report.molecule.formula, report.molecule.charge),
        address=compound_address(report.id or ""),
        note=note,
    )


def _latest(
    reports: Sequence[CompoundReport], changes: Mapping[Path, Change]
) -> tuple[CompoundLine, ...]:
    dated = [
        (changes[report.entry.file.resolve()].date, report)
        for report in reports
        if report.entry and report.entry.file.resolve() in changes
    ]
    dated.sort(key=lambda pair: (pair[0], pair[1].id), reverse=True)
    return tuple(compound_line(report, date) for date, report in dated[:LATEST])
