"""What a comparison shows of one compound: its drawing to scale, and rows that line up by key."""

import json
from collections import Counter
from collections.abc import Iterator, Mapping
from dataclasses import asdict, dataclass

from shapeshelf.catalogue.model import Source
from shapeshelf.figures.to_scale import scaled_view
from shapeshelf.pages.addresses import compound_address
from shapeshelf.pages.compound import shape_words
from shapeshelf.pages.properties import polarity_word
from shapeshelf.pages.typesetting import NO_BREAK, number_text, without_charge
from shapeshelf.pages.values import ANGSTROM, DEBYE, DEGREE, Unit, value_view
from shapeshelf.report.model import CentreReport, CompoundReport, Value

COMPARISON = "compare"
"""Name of the file beside a compound's page."""
MIDDLE = "•"
"""Stands for the centre in a row's label, so that F-S-F lines up with F-Cl-F."""


@dataclass(frozen=True, slots=True)
class ComparedRow:
    """One row of one compound; rows with the same key stand side by side."""

    key: str
    group: str
    label: str
    text: str
    basis: str = ""
    value: float | None = None
    """For numbers: two rows differ where their values do by more than both ± allow."""
    uncertainty: float | None = None


def comparison_json(report: CompoundReport, sources: Mapping[str, Source]) -> bytes:
    """Return the compound's part of any comparison."""
    drawing = scaled_view(report)
    molecule = report.molecule
    content = {
        "id": report.id,
        "name": report.name,
        "address": compound_address(report.id or ""),
        "formula": without_charge(molecule.formula, molecule.charge),
        "charge": molecule.charge,
        "drawing": drawing.markup,
        "width": drawing.width,
        "height": drawing.height,
        "rows": [asdict(row) for row in compared_rows(report, sources)],
    }
    return json.dumps(content, ensure_ascii=False, separators=(",", ":")).encode()


def compared_rows(report: CompoundReport, sources: Mapping[str, Source]) -> tuple[ComparedRow, ...]:
    """Return all rows of a compound in the order in which a comparison prints them."""
    return (
        *_shape_rows(report),
        *_angle_rows(report, sources),
        *_length_rows(report, sources),
        *_polarity_rows(report, sources),
        *_spectra_rows(report),
        *_record_rows(report),
    )


def _shape_rows(report: CompoundReport) -> Iterator[ComparedRow]:
    centres = _distinct(report)
    yield ComparedRow("shape", "Shape", "Shape", shape_words(report))
    if len(centres) == 1:
        centre = centres[0]
        pairs = centre.centre.lone_pairs
        yield ComparedRow("neighbours", "Shape", "Neighbours", str(centre.centre.bonded))
        counted = "not counted" if pairs is None else str(pairs)
        yield ComparedRow("pairs", "Shape", "Lone pairs", counted)
        yield ComparedRow("notation", "Shape", "AXE notation", centre.centre.notation)
        label = centre.hybridisation.label if centre.hybridisation else None
        yield ComparedRow("hybrid", "Shape", "Hybridisation", label or "none")
    yield ComparedRow("group", "Shape", "Point group", report.point_group)


def _angle_rows(report: CompoundReport, sources: Mapping[str, Source]) -> Iterator[ComparedRow]:
    for centre in _distinct(report):
        for row in centre.angles:
            label = _centreless(row.of)
            yield _value_row(f"angle {label}", "Angles", label, row.degrees, DEGREE, sources)


def _length_rows(report: CompoundReport, sources: Mapping[str, Source]) -> Iterator[ComparedRow]:
    """Yield bonds at the only kind of centre; elsewhere there is nothing to line them up by."""
    if len(_distinct(report)) != 1 or report.shape is None:
        return
    for row in report.lengths:
        label = f"{MIDDLE}-{row.of.partition('-')[2]}"
        yield _value_row(f"length {label}", "Bond lengths", label, row.angstrom, ANGSTROM, sources)


def _polarity_rows(report: CompoundReport, sources: Mapping[str, Source]) -> Iterator[ComparedRow]:
    yield ComparedRow("polarity", "Polarity", "Polarity", polarity_word(report))
    if report.dipole_debye is not None:
        yield _value_row("dipole", "Polarity", "Dipole moment", report.dipole_debye, DEBYE, sources)


def _spectra_rows(report: CompoundReport) -> Iterator[ComparedRow]:
    spectra = report.spectra
    yield _count_row("stretches", "Infrared-active stretches", spectra.infrared_stretches)
    yield _count_row("infrared", "Infrared bands", spectra.infrared_bands)
    yield _count_row("raman", "Raman bands", spectra.raman_bands)
    for nucleus, count in sorted(Counter(signal.nucleus for signal in spectra.nmr).items()):
        yield _count_row(f"nmr {nucleus}", f"{nucleus} NMR signals", count)


def _record_rows(report: CompoundReport) -> Iterator[ComparedRow]:
    mass = number_text(report.molar_mass_g_mol, 2) + f"{NO_BREAK}g/mol"
    yield ComparedRow("mass", "Record", "Molar mass", mass)
    entry = report.entry
    held = (("cas", "CAS", entry and entry.cas), ("code", "Code", entry and entry.code))
    kept = (("kept", "Kept", entry and entry.kept), ("owner", "Owner", entry and entry.owner))
    for key, label, text in (*held, *kept):
        if text:
            yield ComparedRow(key, "Record", label, text)
    for text in [c.code or c.text for c in report.cautions] or ["none recorded"]:
        yield ComparedRow("cautions", "Record", "Cautions", text)


def _value_row(
    key: str, group: str, label: str, value: Value, unit: Unit, sources: Mapping[str, Source]
) -> ComparedRow:
    view = value_view(value, unit, sources)
    text = f"{view.text} {view.plus_minus}".rstrip()
    basis = "recalled" if view.recalled else view.basis
    return ComparedRow(key, group, label, text, basis, value.value, value.uncertainty)


def _count_row(key: str, label: str, count: int) -> ComparedRow:
    return ComparedRow(key, "Expected spectra", label, str(count))


def _centreless(label: str) -> str:
    """Return ``F(ax)-•-F(ax)`` for ``F(ax)-S-F(ax)``."""
    first, _, rest = label.partition("-")
    return f"{first}-{MIDDLE}-{rest.partition('-')[2]}"


def _distinct(report: CompoundReport) -> list[CentreReport]:
    """Return one centre of each set of equivalent ones."""
    seen: set[int] = set()
    distinct = []
    for centre in report.centres:
        if centre.centre.atom not in seen:
            distinct.append(centre)
        seen.update(centre.equivalent)
    return distinct
