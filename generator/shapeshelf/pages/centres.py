"""The centres of one compound as its page shows them, equivalent ones together."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass

from markupsafe import Markup

from shapeshelf.catalogue.model import Source
from shapeshelf.domains.model import TraceStep
from shapeshelf.pages.addresses import shape_address
from shapeshelf.pages.anchors import value_anchors
from shapeshelf.pages.typesetting import (
    hybrid_markup,
    label_markup,
    notation_markup,
    number_text,
)
from shapeshelf.pages.values import DEGREE, ValueView, value_view
from shapeshelf.report.model import AngleRow, CentreReport, CompoundReport

PLACEMENTS_SHOWN = 3
MEASURES_SHOWN = 3
LABELS_SPELLED_OUT = 3


@dataclass(frozen=True, slots=True)
class AngleView:
    """One row of equivalent angles."""

    label: Markup
    plain_label: str
    count: int
    ideal: str
    value: ValueView
    anchor: str = ""
    """On the compound's page; empty where the row stands on another."""


@dataclass(frozen=True, slots=True)
class HybridView:
    """One kind of hybrid orbital at a centre."""

    towards: str
    count: int
    s_percent: str


@dataclass(frozen=True, slots=True)
class HybridisationView:
    """The customary label of a centre and the s characters behind it."""

    label: Markup | None
    customary_only: bool
    hybrids: tuple[HybridView, ...]
    basis: str
    bent_rule: str | None
    pyramidalisation: str | None


@dataclass(frozen=True, slots=True)
class CentreView:
    """A set of equivalent centres."""

    anchors: tuple[str, ...]
    """``centre-S1`` for every centre of the set; the first heads the section."""
    labels: tuple[str, ...]
    element: str
    shape: str | None
    shape_address: str | None
    symbol: str | None
    notation: Markup
    arrangement: str | None
    bonded: int
    lone_pairs: int | None
    single_electrons: int
    angles: tuple[AngleView, ...]
    hybridisation: HybridisationView | None
    measures: tuple[tuple[str, str], ...]
    taus: tuple[tuple[str, str], ...]
    departure: str | None
    fluxional: bool
    trace: tuple[TraceStep, ...]
    placements: tuple[tuple[str, str], ...]
    """(shape, energy above the best) of the placements that were weighed, best first."""
    title: str
    """``S1``, ``C1, C2``, or first and last of many."""
    key_angle: AngleView | None
    """The angle that stands for the centre: a measured one if there is one."""


def centre_views(report: CompoundReport, sources: Mapping[str, Source]) -> tuple[CentreView, ...]:
    """Return one view a set of equivalent centres, in atom order."""
    by_atom = {centre.centre.atom: centre for centre in report.centres}
    anchors = value_anchors(report)
    seen: set[int] = set()
    views = []
    for centre in report.centres:
        if centre.centre.atom in seen:
            continue
        members = [by_atom[atom] for atom in centre.equivalent if atom in by_atom] or [centre]
        seen.update(member.centre.atom for member in members)
        views.append(_centre_view(members, sources, anchors))
    return tuple(views)


def angle_view(row: AngleRow, sources: Mapping[str, Source], anchor: str = "") -> AngleView:
    """Return one row of the table of angles."""
    return AngleView(
        label=label_markup(row.of),
        plain_label=row.of,
        count=len(row.members),
        ideal="" if row.ideal_degrees is None else _ideal_text(row.ideal_degrees),
        value=value_view(row.degrees, DEGREE, sources),
        anchor=anchor,
    )


def _centre_view(
    members: Sequence[CentreReport],
    sources: Mapping[str, Source],
    anchors: Mapping[tuple[int, ...], str],
) -> CentreView:
    report, centre = members[0], members[0].centre
    deviation = report.deviation
    angles = tuple(angle_view(row, sources) for row in report.angles)
    return CentreView(
        anchors=tuple(f"centre-{member.centre.label}" for member in members),
        labels=tuple(member.centre.label for member in members),
        element=centre.element,
        shape=report.shape,
        shape_address=shape_address(report.shape) if report.shape else None,
        symbol=report.polyhedral_symbol,
        notation=notation_markup(centre.notation),
        arrangement=centre.arrangement,
        bonded=centre.bonded,
        lone_pairs=centre.lone_pairs,
        single_electrons=centre.single_electrons,
        angles=tuple(angle_view(row, sources, anchors.get(row.atoms, "")) for row in report.angles),
        hybridisation=_hybridisation_view(report),
        measures=tuple(
            (symbol, number_text(measure, 2))
            for symbol, measure in (deviation.measures[:MEASURES_SHOWN] if deviation else ())
        ),
        taus=_taus(report),
        departure=centre.departure.sentence if centre.departure else None,
        fluxional=centre.fluxional,
        trace=centre.trace,
        placements=_placements(report),
        title=_title([member.centre.label for member in members]),
        key_angle=min(angles, key=lambda angle: angle.value.basis != "measured", default=None),
    )


def _title(labels: Sequence[str]) -> str:
    if len(labels) <= LABELS_SPELLED_OUT:
        return ", ".join(labels)
    return f"{labels[0]} … {labels[-1]} ({len(labels)})"


def _taus(report: CentreReport) -> tuple[tuple[str, str], ...]:
    if report.deviation is None:
        return ()
    held = (("τ₄", report.deviation.tau4), ("τ₅", report.deviation.tau5))
    return tuple((name, number_text(tau, 2)) for name, tau in held if tau is not None)


def _placements(report: CentreReport) -> tuple[tuple[str, str], ...]:
    placements = report.centre.placements
    if len(placements) < 2:
        return ()
    best = placements[0].energy
    return tuple(
        (
            " ".join([placement.shape, *_lone_pair_sites(report, index)]),
            number_text(placement.energy - best, 3),
        )
        for index, placement in enumerate(placements[:PLACEMENTS_SHOWN])
    )


def _lone_pair_sites(report: CentreReport, index: int) -> list[str]:
    """Return the sites of the ligands in words where they tell two placements apart."""
    placement = report.centre.placements[index]
    named = [
        f"{report.ligand_labels[domain.neighbour].partition('(')[0]} {site}"
        for domain, site in zip(report.centre.domains, placement.sites, strict=False)
        if domain.neighbour is not None and site and domain.neighbour in report.ligand_labels
    ]
    return [f"({', '.join(named)})"] if named else []


def _hybridisation_view(report: CentreReport) -> HybridisationView | None:
    found = report.hybridisation
    if found is None:
        return None
    kinds: dict[tuple[str, str], int] = {}
    for hybrid in found.hybrids:
        towards = (
            "lone pair"
            if hybrid.neighbour is None
            else report.ligand_labels.get(hybrid.neighbour, "bond")
        )
        key = (towards, number_text(100 * hybrid.s_character, 0))
        kinds[key] = kinds.get(key, 0) + 1
    return HybridisationView(
        label=hybrid_markup(found.label) if found.label else None,
        customary_only=found.customary_only,
        hybrids=tuple(HybridView(t, count, percent) for (t, percent), count in kinds.items()),
        basis=found.basis,
        bent_rule=found.bent_rule,
        pyramidalisation=(
            None
            if found.pyramidalisation_degrees is None
            else number_text(found.pyramidalisation_degrees, 1) + "°"
        ),
    )


def _ideal_text(degrees: float) -> str:
    """Return 109.5° and 90°: ideal angles carry a decimal only where they need one."""
    text = number_text(degrees, 1)
    return text.removesuffix(".0") + "°"
