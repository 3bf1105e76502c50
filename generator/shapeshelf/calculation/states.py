"""What a catalogue's records are worth: which count, which are stale, missing or failed."""

from dataclasses import dataclass
from enum import StrEnum
from pathlib import Path

from shapeshelf.calculation.keys import structure_key
from shapeshelf.calculation.model import CalculationRecord, Outcome
from shapeshelf.calculation.records import read_record, record_path
from shapeshelf.errors import CalculationError
from shapeshelf.structure.molecule import Molecule


class State(StrEnum):
    """What stands where an entry's record belongs."""

    FRESH = "fresh"
    FAILED = "failed"
    """The record belongs to the structure and says that there is no result."""
    STALE = "stale"
    """The record belongs to another structure."""
    MISSING = "missing"
    BROKEN = "broken"
    """The file is no record."""


@dataclass(frozen=True, slots=True)
class Standing:
    """The state of one entry's record, and the record where it belongs to the structure."""

    state: State
    record: CalculationRecord | None = None


def standing_of(catalogue: Path, entry_id: str, molecule: Molecule, multiplicity: int) -> Standing:
    """Return what the record of an entry is worth for ``molecule`` as it is now."""
    try:
        record = read_record(record_path(catalogue, entry_id))
    except CalculationError:
        return Standing(State.BROKEN)
    if record is None:
        return Standing(State.MISSING)
    if record.key.digest != structure_key(molecule, multiplicity).digest:
        return Standing(State.STALE)
    failed = record.outcome is not Outcome.MINIMUM
    return Standing(State.FAILED if failed else State.FRESH, record)
