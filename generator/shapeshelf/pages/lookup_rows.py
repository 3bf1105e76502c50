"""What the lookup knows of one compound: by what it is found, what a result shows of it, and
the numbers and words that the lookup page filters by."""

from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass

from shapeshelf.pages.compound import shape_words
from shapeshelf.pages.properties import polarity_word
from shapeshelf.pages.typesetting import point_group_text, without_charge
from shapeshelf.pages.values import DEGREE, value_view
from shapeshelf.report.model import AngleRow, Basis, CentreReport, CompoundReport

UNNAMED = "no named shape"
METAL = "not counted"
"""Lone pairs of a transition metal, whose d electrons are no domains."""


@dataclass(frozen=True, slots=True)
class Site:
    """A kind of centre, as filters ask for it."""

    shape: str
    bonded: int
    lone_pairs: int | None
    hybridisation: str
    """Customary label, empty where none is assigned."""


@dataclass(frozen=True, slots=True)
class LookupRow:
    """One compound in the index."""

    id: str
    name: str
    also: tuple[str, ...]
    formula: str
    """Plain, its charge left out: ``SO4``."""
    charge: int
    cas: str
    code: str
    spelling: str
    """SMILES of the entry, empty where it is the canonical one."""
    smiles: str
    inchikey: str
    shape: str
    """In words; ``glyph`` is the shape drawn beside it."""
    glyph: str
    group: str
    """Point group in plain letters, ``C2v``."""
    angle: str
    """Key angle in degrees, as its page prints it, the sign left out."""
    polarity: str
    tags: tuple[str, ...]
    sites: tuple[Site, ...]
    hazards: tuple[str, ...]
    bases: tuple[str, ...]
    """What any angle or the dipole moment of the compound rests on."""
    corners: tuple[tuple[str, int], ...]
    """(``F-S-F``, angle in tenths of a degree), each once."""
    dipole_debye: float | None
    molar_mass_g_mol: float
    infrared_stretches: int
    signals: tuple[tuple[str, int], ...]
    """(``19F``, number of its NMR signals)."""


def lookup_row(report: CompoundReport) -> LookupRow:
    """Return the row of a catalogue entry's report."""
    entry, molecule = report.entry, report.molecule
    assert entry is not None
    spelling = entry.structure.smiles or ""
    dipole = report.dipole_debye
    return LookupRow(
        id=entry.id,
        name=entry.name,
        also=entry.also,
        formula=without_charge(molecule.formula, molecule.charge),
        charge=molecule.charge,
        cas=entry.cas or "",
        code=entry.code or "",
        spelling="" if spelling == molecule.smiles else spelling,
        smiles=molecule.smiles,
        inchikey=molecule.inchikey or "",
        shape=shape_words(report),
        glyph=report.shape or _telling_shape(report),
        group=report.point_group,
        angle=_key_angle(report),
        polarity=polarity_word(report),
        tags=entry.tags,
        sites=tuple(dict.fromkeys(_site(centre) for centre in report.centres)),
        hazards=entry.hazards,
        bases=_bases(report),
        corners=tuple(sorted(set(_corners(report)))),
        dipole_debye=None if dipole is None else round(dipole.value, 3),
        molar_mass_g_mol=round(report.molar_mass_g_mol, 2),
        infrared_stretches=report.spectra.infrared_stretches,
        signals=tuple(sorted(Counter(s.nucleus for s in report.spectra.nmr).items())),
    )


def group_words(group: str) -> str:
    """Return a point group as a reader types it, infinity with its sign."""
    return point_group_text(group)


def _site(centre: CentreReport) -> Site:
    hybridisation = centre.hybridisation
    return Site(
        shape=centre.shape or UNNAMED,
        bonded=centre.centre.bonded,
        lone_pairs=centre.centre.lone_pairs,
        hybridisation=(hybridisation.label or "") if hybridisation else "",
    )


def _telling_shape(report: CompoundReport) -> str:
    """Return the one shape of all centres that are not plain carbon, or nothing."""
    found = {c.shape for c in report.centres if c.centre.element != "C"}
    if not found:
        found = {c.shape for c in report.centres}
    return (found.pop() or "") if len(found) == 1 else ""


def _key_angle(report: CompoundReport) -> str:
    """Return the angle that stands for a compound of one kind of centre, measured if it can be."""
    kinds = {min(centre.equivalent, default=centre.centre.atom) for centre in report.centres}
    if len(kinds) != 1:
        return ""
    rows = sorted(report.centres[0].angles, key=lambda row: row.degrees.basis != "measured")
    return value_view(rows[0].degrees, DEGREE, {}).text.removesuffix("°") if rows else ""


def _bases(report: CompoundReport) -> tuple[str, ...]:
    values = [row.degrees for centre in report.centres for row in centre.angles]
    values += [report.dipole_debye] if report.dipole_debye else []
    held = {value.basis for value in values}
    return tuple(basis.value for basis in Basis if basis in held)


def _corners(report: CompoundReport) -> list[tuple[str, int]]:
    return [
        (_corner(report, row), round(row.degrees.value * 10))
        for centre in report.centres
        for row in centre.angles
    ]


def _corner(report: CompoundReport, row: AngleRow) -> str:
    """Return the elements of an angle, its ends in the order of the alphabet."""
    first, middle, last = (report.molecule.atoms[atom].element for atom in row.atoms)
    ends: Sequence[str] = sorted((first, last))
    return f"{ends[0]}-{middle}-{ends[1]}"
