"""Checked fields to the frozen records that later rooms read."""

from shapeshelf.catalogue.checks import structure_path
from shapeshelf.catalogue.fields import EntryFields, MeasuredFields, StructureFields
from shapeshelf.catalogue.model import Entry, Measurement, Quantity, StructureInput
from shapeshelf.catalogue.problems import Document


def frozen_entry(fields: EntryFields, document: Document) -> Entry:
    """Return the entry of ``fields``, with the lines of the ``document`` they came from."""
    return Entry(
        id=fields.id,
        name=fields.name,
        structure=_structure(fields.structure, document),
        file=document.file,
        formerly=tuple(fields.formerly),
        also=tuple(fields.also),
        formula=fields.formula,
        cas=fields.cas,
        code=fields.code,
        kept=fields.kept,
        owner=fields.owner,
        tags=tuple(fields.tags),
        start_here=fields.start_here,
        hazards=tuple(fields.hazards),
        used_in=tuple(fields.used_in),
        notes=fields.notes,
        measured=tuple(
            _measurement(item, document.lines[f"measured[{index}]"])
            for index, item in enumerate(fields.measured)
        ),
        lines=document.lines,
    )


def _structure(given: str | StructureFields, document: Document) -> StructureInput:
    if isinstance(given, str):
        return StructureInput(smiles=given, file=None)
    file = structure_path(document.file, given.file) if given.file is not None else None
    return StructureInput(given.smiles, file, given.charge, given.multiplicity)


def _measurement(fields: MeasuredFields, line: int) -> Measurement:
    return Measurement(
        quantity=Quantity(fields.quantity),
        of=fields.of,
        value=fields.value,
        unit=fields.unit,
        uncertainty=fields.uncertainty,
        phase=fields.phase,
        method=fields.method,
        source=fields.source,
        note=fields.note,
        line=line,
    )
