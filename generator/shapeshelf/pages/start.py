"""The first hour: where to begin, how to read a sheet, what to trust, how to cite and propose."""

from collections.abc import Sequence
from dataclasses import dataclass

from markupsafe import Markup

from shapeshelf.catalogue.model import Catalogue
from shapeshelf.pages.anchors import value_anchors
from shapeshelf.pages.centres import AngleView, angle_view
from shapeshelf.pages.drawings import bench_markup
from shapeshelf.pages.home import CompoundLine, compound_line, first_compounds
from shapeshelf.pages.lookup_index import by_name
from shapeshelf.pages.typesetting import notation_markup
from shapeshelf.report.model import AngleRow, Basis, CompoundReport


@dataclass(frozen=True, slots=True)
class ExampleView:
    """One of the group's own compounds, on which a sheet is explained."""

    line: CompoundLine
    shape: str
    notation: Markup
    angle: AngleView | None
    drawing: Markup


@dataclass(frozen=True, slots=True)
class TrustView:
    """How many values of the catalogue rest on one basis, and how far they may be off."""

    basis: str
    angles: int
    typical: str
    """Median ± of those angles, empty where none is stated."""


@dataclass(frozen=True, slots=True)
class StartView:
    """Everything the page for newcomers prints."""

    compounds: tuple[CompoundLine, ...]
    example: ExampleView | None
    trust: tuple[TrustView, ...]
    cautioned: int
    total: int


def start_view(catalogue: Catalogue, reports: Sequence[CompoundReport]) -> StartView:
    """Return the values of the page for newcomers."""
    chosen = [report for report in by_name(reports) if report.entry and report.entry.start_here]
    example = _example(chosen or list(reports))
    return StartView(
        compounds=first_compounds(reports),
        example=_example_view(example, catalogue) if example else None,
        trust=_trust(reports),
        cautioned=sum(bool(report.cautions) for report in reports),
        total=len(reports),
    )


def _example(reports: Sequence[CompoundReport]) -> CompoundReport | None:
    """Return the compound with most to explain: one centre, a lone pair, a measured angle."""
    return max(reports, key=_tells, default=None)


def _tells(report: CompoundReport) -> tuple[int, int, int]:
    angles = _angles(report)
    measured = sum(row.degrees.basis is Basis.MEASURED for row in angles)
    pairs = sum(bool(centre.centre.lone_pairs) for centre in report.centres)
    return (int(len(report.centres) == 1), int(measured > 0) + int(pairs > 0), len(angles))


def _example_view(report: CompoundReport, catalogue: Catalogue) -> ExampleView:
    rows = sorted(_angles(report), key=lambda row: row.degrees.basis is not Basis.MEASURED)
    anchors = value_anchors(report)
    views = [angle_view(row, catalogue.sources, anchors.get(row.atoms, "")) for row in rows[:1]]
    return ExampleView(
        line=compound_line(report, ""),
        shape=report.shape or "",
        notation=notation_markup(report.centres[0].centre.notation if report.centres else ""),
        angle=views[0] if views else None,
        drawing=bench_markup(report),
    )


def _angles(report: CompoundReport) -> list[AngleRow]:
    return [row for centre in report.centres for row in centre.angles]


def _trust(reports: Sequence[CompoundReport]) -> tuple[TrustView, ...]:
    rows = [row for report in reports for row in _angles(report)]
    views = []
    for basis in Basis:
        values = [row.degrees for row in rows if row.degrees.basis is basis]
        stated = sorted(v.uncertainty for v in values if v.uncertainty)
        typical = f"{stated[len(stated) // 2]:.1f}°" if stated else ""
        if values:
            views.append(TrustView(basis.value, len(values), typical))
    return tuple(views)
