"""Polarity, symmetry and expected spectra of one compound as its page shows them."""

import re
from collections import Counter
from collections.abc import Mapping
from dataclasses import dataclass

from markupsafe import Markup, escape

from shapeshelf.catalogue.model import Measurement, Source
from shapeshelf.pages.addresses import source_anchor
from shapeshelf.pages.anchors import frequency_anchors
from shapeshelf.pages.typesetting import (
    NO_BREAK,
    number_text,
    operation_markup,
    point_group_markup,
    species_markup,
)
from shapeshelf.pages.values import DEBYE, ValueView, citation, value_view
from shapeshelf.properties.model import ExpectedSpectra
from shapeshelf.report.labels import atom_labels
from shapeshelf.report.model import CompoundReport

MOSTLY = 0.8
"""Share of stretching from which a mode is called one."""
_SYMBOL = re.compile(
    r"((?<=Symmetry )[A-Z]\w*|\bC(?:\d+|inf)(?= ax[ie]s)|(?<=\()[CDSTOI](?:inf|\d)?\w?(?=\)))"
)
"""Where a reason names a point group or an axis; ``C2`` elsewhere is an atom."""


@dataclass(frozen=True, slots=True)
class BondPolarityView:
    """One kind of bond: which end is negative."""

    bond: str
    negative: str
    difference: str
    count: int


@dataclass(frozen=True, slots=True)
class PolarityView:
    """Whether the compound is polar, how much, and why."""

    word: str
    """``polar``, ``non-polar`` or ``ion``."""
    dipole: ValueView | None
    reason: Markup
    bonds: tuple[BondPolarityView, ...]


@dataclass(frozen=True, slots=True)
class ModeView:
    """The normal modes of one symmetry species."""

    species: Markup
    count: int
    stretches: int
    infrared: bool
    raman: bool


@dataclass(frozen=True, slots=True)
class NmrView:
    """One signal."""

    nucleus: Markup
    atoms: str
    multiplicity: str
    partners: str


@dataclass(frozen=True, slots=True)
class FrequencyView:
    """One measured vibration."""

    of: str
    value: str
    phase: str
    source_text: str
    source_anchor: str
    anchor: str


@dataclass(frozen=True, slots=True)
class BandView:
    """One calculated vibration."""

    wavenumber: str
    species: Markup
    degeneracy: int
    intensity: str
    motion: str


@dataclass(frozen=True, slots=True)
class SymmetryView:
    """Point group and what follows from it."""

    point_group: Markup
    basis: str
    operations: tuple[tuple[int, Markup], ...]
    rotational_number: int
    chiral: bool
    equivalent: tuple[str, ...]
    tolerance: str


@dataclass(frozen=True, slots=True)
class SpectraView:
    """What symmetry lets one expect, and what was measured and calculated of it."""

    expected: ExpectedSpectra
    modes: tuple[ModeView, ...]
    nmr: tuple[NmrView, ...]
    frequencies: tuple[FrequencyView, ...]
    bands: tuple[BandView, ...]
    method: str
    """Of the calculated vibrations, empty where there are none."""


def polarity_view(report: CompoundReport, sources: Mapping[str, Source]) -> PolarityView:
    """Return the polarity of a compound."""
    value = report.dipole_debye
    return PolarityView(
        word=polarity_word(report),
        dipole=value_view(value, DEBYE, sources) if value else None,
        reason=reason_markup(report.dipole_model.reason),
        bonds=_bond_polarities(report),
    )


def reason_markup(reason: str) -> Markup:
    """Return the reason with the symbols of point groups and axes set as such."""
    parts = _SYMBOL.split(reason)
    return Markup("").join(
        point_group_markup(part) if index % 2 else escape(part) for index, part in enumerate(parts)
    )


def polarity_word(report: CompoundReport) -> str:
    """Return ``polar``, ``non-polar``, or ``ion`` where the moment depends on the origin."""
    if report.molecule.charge:
        return "ion"
    if report.dipole_model.polar is None:
        return "not known"
    return "polar" if report.dipole_model.polar else "non-polar"


def symmetry_view(report: CompoundReport) -> SymmetryView:
    """Return the symmetry of a compound."""
    symmetry = report.symmetry
    labels = atom_labels(report.molecule)
    counted = Counter(with_inverse(operation.label) for operation in symmetry.operations)
    return SymmetryView(
        point_group=point_group_markup(report.point_group),
        basis=report.point_group_basis.value,
        operations=tuple((count, operation_markup(label)) for label, count in counted.items()),
        rotational_number=symmetry.rotational_number,
        chiral=symmetry.chiral,
        equivalent=tuple(
            " ".join(labels[atom] for atom in group)
            for group in symmetry.equivalent_atoms
            if len(group) > 1
        ),
        tolerance=number_text(symmetry.tolerance_angstrom, 2) + NO_BREAK + "Å",
    )


def with_inverse(label: str) -> str:
    """Return ``C4`` for ``C4^3``: an operation and its inverse are counted together, as character
    tables have them."""
    axis, _, power = label.partition("^")
    if not power or not axis[1:].isdigit():
        return label
    fold = int(axis[1:])
    order = 2 * fold if axis[0] == "S" and fold % 2 else fold
    least = min(int(power), order - int(power))
    return axis if least == 1 else f"{axis}^{least}"


def spectra_view(report: CompoundReport, sources: Mapping[str, Source]) -> SpectraView:
    """Return the expected spectra, and the measured vibrations beside them."""
    spectra = report.spectra
    labels = atom_labels(report.molecule)
    return SpectraView(
        expected=spectra,
        modes=tuple(
            ModeView(species_markup(m.species), m.count, m.stretches, m.infrared, m.raman)
            for m in spectra.modes
        ),
        nmr=tuple(
            NmrView(
                nucleus=_nucleus_markup(signal.nucleus),
                atoms=" ".join(labels[atom] for atom in signal.atoms),
                multiplicity=signal.multiplicity,
                partners=", ".join(signal.partners),
            )
            for signal in spectra.nmr
        ),
        frequencies=_frequencies(report, sources),
        bands=_bands(report),
        method=report.frequencies.method if report.frequencies else "",
    )


def _nucleus_markup(nucleus: str) -> Markup:
    element = nucleus.lstrip("0123456789")
    return Markup("<sup>{}</sup>{}").format(nucleus.removesuffix(element), element)


def _bond_polarities(report: CompoundReport) -> tuple[BondPolarityView, ...]:
    elements = [atom.element for atom in report.molecule.atoms]
    kinds = Counter(
        (
            elements[bond.positive],
            elements[bond.negative],
            number_text(abs(bond.electronegativity_difference), 2),
        )
        for bond in report.dipole_model.bonds
    )
    return tuple(
        BondPolarityView(
            bond=f"{positive}–{negative}",
            negative=negative if float(difference) else "",
            difference=difference,
            count=count,
        )
        for (positive, negative, difference), count in kinds.items()
    )


def _frequencies(
    report: CompoundReport, sources: Mapping[str, Source]
) -> tuple[FrequencyView, ...]:
    return tuple(
        _frequency_view(item, anchor, sources) for item, anchor in frequency_anchors(report)
    )


def _bands(report: CompoundReport) -> tuple[BandView, ...]:
    bands = report.frequencies.bands if report.frequencies else ()
    return tuple(
        BandView(
            wavenumber=number_text(band.wavenumber_per_cm, 0),
            species=species_markup(band.species or "–"),
            degeneracy=band.degeneracy,
            intensity=number_text(band.intensity_km_per_mol, 0),
            motion=_motion(band.stretching),
        )
        for band in reversed(bands)
    )


def _motion(stretching: float | None) -> str:
    """Return what moves, from how much of a mode is bond stretching."""
    if stretching is None:
        return "–"
    if stretching >= MOSTLY:
        return "stretch"
    return "bend or torsion" if stretching <= 1 - MOSTLY else "both"


def _frequency_view(item: Measurement, anchor: str, sources: Mapping[str, Source]) -> FrequencyView:
    plus_minus = "" if item.uncertainty is None else f"{NO_BREAK}±{NO_BREAK}{item.uncertainty:g}"
    return FrequencyView(
        of=item.of or "",
        value=f"{item.value:g}{plus_minus}{NO_BREAK}cm⁻¹",
        phase=item.phase or "",
        source_text=citation(sources[item.source]),
        source_anchor=source_anchor(item.source),
        anchor=anchor,
    )
