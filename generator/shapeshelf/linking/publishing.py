"""Reports to the document of published values."""

import hashlib
from collections.abc import Mapping, Sequence
from pathlib import Path

import shapeshelf
from shapeshelf.catalogue.model import Catalogue, Entry
from shapeshelf.linking.published import Published, PublishedCompound, PublishedValue
from shapeshelf.pages.addresses import source_anchor
from shapeshelf.pages.anchors import (
    DIPOLE,
    SECTIONS,
    frequency_anchors,
    shown_angles,
    value_anchors,
)
from shapeshelf.pages.compound import shape_words
from shapeshelf.pages.properties import polarity_word
from shapeshelf.pages.typesetting import slug
from shapeshelf.reference.shapes import SHAPES
from shapeshelf.report.model import Basis, CompoundReport, Value

HASH_DIGITS = 16
CHEMISTRY = ("reference", "structure", "domains", "geometry", "properties", "report")
"""The rooms whose code decides a model value."""
DECIMALS = {"angle": 2, "length": 4, "dipole": 3, "frequency": 2}


def published_values(
    catalogue: Catalogue,
    reports: Sequence[CompoundReport],
    site: str | None,
    withdrawn: Mapping[str, PublishedCompound],
) -> Published:
    """Return the present values of a catalogue; ``site`` is the address of the site's root."""
    compounds = {}
    for report in reports:
        if report.entry is not None:
            compounds[report.entry.id] = _compound(report, report.entry)
    shapes = {slug(known.shape) for known in SHAPES.values()}
    shapes |= {slug(c.shape) for report in reports for c in report.centres if c.shape}
    return Published(compounds, withdrawn, site, code_hash(), tuple(sorted(shapes)))


def structure_hash(entry: Entry) -> str:
    """Return a hash of the structure as the entry gives it: its text or file, charge, spin."""
    given = entry.structure
    body = given.file.read_bytes() if given.file else (given.smiles or "").encode()
    stated = f"\0{given.charge}\0{given.multiplicity}".encode()
    return hashlib.sha256(body + stated).hexdigest()[:HASH_DIGITS]


def code_hash() -> str:
    """Return a hash of the program's own chemistry, packages it rests on left out."""
    package = Path(shapeshelf.__file__).parent
    digest = hashlib.sha256()
    for room in CHEMISTRY:
        for path in sorted((package / room).rglob("*.py")):
            digest.update(path.read_bytes())
    return digest.hexdigest()[:HASH_DIGITS]


def published_value(
    value: Value, quantity: str, of: str, labels: Sequence[str] = ()
) -> PublishedValue:
    """Return one value of a report as it is published."""
    digits = DECIMALS[quantity]
    return PublishedValue(
        quantity=quantity,
        of=of,
        labels=tuple(labels) or (of,),
        value=round(value.value, digits),
        uncertainty=_rounded(value.uncertainty, digits),
        basis=value.basis.value,
        source=value.source,
        measured=_rounded(value.measured, digits),
        calculated=_rounded(value.calculated, digits),
        supplied=_rounded(value.supplied, digits),
        model=_rounded(value.model, digits),
        calculated_uncertainty=_rounded(value.calculated_uncertainty, digits),
    )


def _compound(report: CompoundReport, entry: Entry) -> PublishedCompound:
    cited = dict.fromkeys(source_anchor(item.source) for item in entry.measured)
    centres = [f"centre-{centre.centre.label}" for centre in report.centres]
    return PublishedCompound(
        name=entry.name,
        formula=report.molecule.formula,
        structure=structure_hash(entry),
        names=(*entry.also, *([entry.code] if entry.code else [])),
        formerly=entry.formerly,
        anchors=(*SECTIONS, *centres, *cited),
        used_in=entry.used_in,
        facts={
            "shape": shape_words(report),
            "point group": report.point_group,
            "polarity": polarity_word(report),
        },
        values=_values(report),
    )


def _values(report: CompoundReport) -> dict[str, PublishedValue]:
    anchors = value_anchors(report)
    values = {
        anchors[row.atoms]: published_value(row.degrees, "angle", row.of, row.labels)
        for row in shown_angles(report)
    }
    for row in report.lengths:
        values[anchors[row.atoms]] = published_value(row.angstrom, "length", row.of, row.labels)
    if report.dipole_debye is not None:
        values[DIPOLE] = published_value(report.dipole_debye, "dipole", "dipole moment")
    for item, anchor in frequency_anchors(report):
        measured = Value(
            item.value, item.uncertainty, Basis.MEASURED, None, None, None, None,
            item.value, item.uncertainty, item.source,
        )  # fmt: skip
        values[anchor] = published_value(measured, "frequency", item.of or f"{item.value:g}")
    return values


def _rounded(value: float | None, digits: int) -> float | None:
    return None if value is None else round(value, digits)
