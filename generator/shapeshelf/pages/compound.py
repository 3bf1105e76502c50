"""One compound: from its report to the values its page prints."""

from collections.abc import Mapping
from dataclasses import dataclass
from urllib.parse import quote

from markupsafe import Markup

from shapeshelf.catalogue.model import Catalogue, Entry, Source, SourceKind
from shapeshelf.pages.addresses import (
    compound_address,
    shape_address,
    source_anchor,
)
from shapeshelf.pages.anchors import value_anchors
from shapeshelf.pages.calculation import CalculationView, calculation_view
from shapeshelf.pages.centres import AngleView, CentreView, angle_view, centre_views
from shapeshelf.pages.history import Change
from shapeshelf.pages.model import Standing
from shapeshelf.pages.properties import (
    PolarityView,
    SpectraView,
    SymmetryView,
    polarity_view,
    spectra_view,
    symmetry_view,
)
from shapeshelf.pages.protocols import address_of
from shapeshelf.pages.typesetting import (
    NO_BREAK,
    formula_markup,
    formula_text,
    label_markup,
    number_text,
    point_group_text,
    sentence_case,
)
from shapeshelf.pages.values import ANGSTROM, ValueView, bases_held, citation, value_view
from shapeshelf.report.model import Caution, CompoundReport

NOWHERE = Standing()
KEY_ANGLES = 4
"""As many as the title block holds without pushing the cautions off the first screen."""
KEY_CENTRES = 6
PLAIN_ELEMENT = "C"
"""Carbon without a lone pair is what an organic molecule is made of; other centres are asked
for first."""


@dataclass(frozen=True, slots=True)
class LengthView:
    """One row of equivalent bonds."""

    label: Markup
    count: int
    order: str
    value: ValueView
    plain_label: str
    anchor: str


@dataclass(frozen=True, slots=True)
class SourceView:
    """One source that this page cites."""

    key: str
    anchor: str
    text: str
    recalled: bool
    kind: str
    identifiers: tuple[tuple[str, str, str | None], ...]
    """(``DOI`` or ``ISBN``, text, link)."""
    note: str | None


@dataclass(frozen=True, slots=True)
class UnmatchedView:
    """A measured value whose label fits nothing in the structure."""

    of: str
    value: str
    source_text: str
    source_anchor: str


@dataclass(frozen=True, slots=True)
class CompoundView:
    """Everything the compound page prints."""

    id: str
    address: str
    name: str
    formula: Markup
    entry: Entry
    shape: str | None
    shape_words: str
    shape_address: str | None
    key_angles: tuple[AngleView, ...]
    more_angles: int
    centres: tuple[CentreView, ...]
    key_centres: tuple[CentreView, ...]
    lengths: tuple[LengthView, ...]
    polarity: PolarityView
    symmetry: SymmetryView
    spectra: SpectraView
    structure_method: str
    resonance_forms: int
    molar_mass: str
    surface_area: str | None
    log_p: str | None
    smiles: str
    inchikey: str | None
    cautions: tuple[Caution, ...]
    unmatched: tuple[UnmatchedView, ...]
    sources: tuple[SourceView, ...]
    protocols: tuple[tuple[str, str | None], ...]
    """(title, address) of every protocol that uses the compound."""
    revision: str
    change: Change | None
    angle_bases: tuple[str, ...]
    """The bases that any angle of the compound has: columns of the table."""
    length_bases: tuple[str, ...]
    url: str | None
    """Absolute, where the site's address is known."""
    news: Mapping[str, str]
    """By anchor: what a value was when it was last released."""
    unreleased: bool
    description: str
    """One plain sentence for search engines and previews."""
    calculation: CalculationView | None = None


def compound_view(
    report: CompoundReport,
    catalogue: Catalogue,
    revision: str,
    change: Change | None = None,
    standing: Standing = NOWHERE,
) -> CompoundView:
    """Return the values of a compound page; the report must be that of a catalogue entry."""
    entry, molecule = report.entry, report.molecule
    assert entry is not None
    sources = catalogue.sources
    centres = centre_views(report, sources)
    angles = _key_angles(report, sources) if len(centres) == 1 else ()
    lengths = _length_views(report, sources)
    return CompoundView(
        id=entry.id,
        address=compound_address(entry.id),
        name=entry.name,
        formula=formula_markup(molecule.formula, molecule.charge),
        entry=entry,
        shape=report.shape,
        shape_words=shape_words(report),
        shape_address=shape_address(report.shape) if report.shape else None,
        key_angles=angles[:KEY_ANGLES],
        more_angles=max(0, len(angles) - KEY_ANGLES),
        centres=centres,
        key_centres=_key_centres(centres),
        lengths=lengths,
        polarity=polarity_view(report, sources),
        symmetry=symmetry_view(report),
        spectra=spectra_view(report, sources),
        structure_method=report.structure.method,
        resonance_forms=len(report.lewis.forms),
        molar_mass=f"{number_text(report.molar_mass_g_mol, 2)}{NO_BREAK}g/mol",
        surface_area=_optional(report.topological_polar_surface_area, 1, NO_BREAK + "Å²"),
        log_p=_optional(report.crippen_log_p, 2, ""),
        smiles=molecule.smiles,
        inchikey=molecule.inchikey,
        cautions=report.cautions,
        unmatched=_unmatched(report, sources),
        sources=_cited(entry, sources),
        protocols=tuple(
            (catalogue.protocols[key].title, address_of(catalogue.protocols[key]))
            for key in entry.used_in
            if key in catalogue.protocols
        ),
        revision=revision,
        change=change,
        angle_bases=bases_held(angle.value for centre in centres for angle in centre.angles),
        length_bases=bases_held(length.value for length in lengths),
        description=_description(report),
        url=standing.page_url(compound_address(entry.id)),
        news=standing.news.get(entry.id, {}),
        unreleased=entry.id in standing.unreleased,
        calculation=calculation_view(report.calculation),
    )


def shape_words(report: CompoundReport) -> str:
    """Return the shape as one says it; for several centres, each kind with its shape."""
    if report.shape:
        return report.shape
    kinds: dict[str, None] = {}
    for centre in report.centres:
        kinds[f"{centre.centre.element} {centre.shape or 'without a named shape'}"] = None
    return ", ".join(kinds) or "no centre"


def full_citation(source: Source) -> str:
    """Return a source in full, as lists of literature print it."""
    place = f" {source.where}" if source.where else ""
    title = source.title.rstrip(".")
    return f"{source.authors} ({source.year}). {title}.{place}".strip()


def _description(report: CompoundReport) -> str:
    formula = formula_text(report.molecule.formula, report.molecule.charge)
    group = point_group_text(report.point_group)
    return f"{report.name} ({formula}): {shape_words(report)}, {group}."


def _key_angles(report: CompoundReport, sources: Mapping[str, Source]) -> tuple[AngleView, ...]:
    """Return the angles of the only kind of centre, measured ones first."""
    rows = sorted(report.centres[0].angles, key=lambda row: row.degrees.basis != "measured")
    return tuple(angle_view(row, sources) for row in rows)


def _key_centres(centres: tuple[CentreView, ...]) -> tuple[CentreView, ...]:
    """Return as many centres as the first screen holds, the telling ones first."""
    telling = sorted(centres, key=lambda c: c.element == PLAIN_ELEMENT and not c.lone_pairs)
    return tuple(telling[:KEY_CENTRES])


def _length_views(report: CompoundReport, sources: Mapping[str, Source]) -> tuple[LengthView, ...]:
    anchors = value_anchors(report)
    return tuple(
        LengthView(
            label=label_markup(row.of),
            plain_label=row.of,
            anchor=anchors[row.atoms],
            count=len(row.members),
            order=f"{round(row.bond_order, 2):g}",
            value=value_view(row.angstrom, ANGSTROM, sources),
        )
        for row in report.lengths
    )


def _optional(value: float | None, decimals: int, unit: str) -> str | None:
    return None if value is None else number_text(value, decimals) + unit


def _unmatched(report: CompoundReport, sources: Mapping[str, Source]) -> tuple[UnmatchedView, ...]:
    return tuple(
        UnmatchedView(
            of=item.of or item.quantity.value,
            value=f"{item.value:g} {item.unit}",
            source_text=citation(sources[item.source]),
            source_anchor=source_anchor(item.source),
        )
        for item in report.unmatched
    )


def _cited(entry: Entry, sources: Mapping[str, Source]) -> tuple[SourceView, ...]:
    keys = dict.fromkeys(item.source for item in entry.measured if item.source in sources)
    return tuple(source_view(sources[key]) for key in keys)


def source_view(source: Source) -> SourceView:
    """Return a source as lists print it."""
    return SourceView(
        key=source.key,
        anchor=source_anchor(source.key),
        text=sentence_case(full_citation(source)),
        recalled=source.kind is SourceKind.RECALLED,
        kind=source.kind.value,
        identifiers=_identifiers(source),
        note=source.note,
    )


def _identifiers(source: Source) -> tuple[tuple[str, str, str | None], ...]:
    held: list[tuple[str, str, str | None]] = []
    if source.doi:
        held.append(("DOI", source.doi, f"https://doi.org/{quote(source.doi, safe='/()')}"))
    if source.isbn:
        held.append(("ISBN", source.isbn, None))
    return tuple(held)
