"""A record counts for the structure it was computed for, and no other."""

import pytest

from shapeshelf.calculation.model import Outcome
from shapeshelf.calculation.records import record_path, write_record
from shapeshelf.calculation.states import State, standing_of
from shapeshelf.structure.reading import read_smiles


@pytest.mark.parametrize(
    ("smiles", "multiplicity", "state"),
    [
        ("O", 1, State.FRESH),
        ("[OH2]", 1, State.FRESH),
        ("S", 1, State.STALE),
        ("O", 3, State.STALE),
    ],
)
def test_fresh_or_stale(tmp_path, record_of, smiles, multiplicity, state):
    """Another spelling keeps the record; another structure or multiplicity does not."""
    write_record(record_path(tmp_path, "water"), record_of("O"))
    standing = standing_of(tmp_path, "water", read_smiles(smiles), multiplicity)
    assert standing.state is state
    assert (standing.record is not None) is (state is State.FRESH)


def test_failed_missing_and_broken(tmp_path, record_of):
    """A failure is held apart from a result, no file from a file that is no record."""
    molecule = read_smiles("O")
    assert standing_of(tmp_path, "water", molecule, 1).state is State.MISSING
    path = record_path(tmp_path, "water")
    write_record(path, record_of(outcome=Outcome.NOT_CONVERGED, failure="PBE0 after 120 cycles"))
    assert standing_of(tmp_path, "water", molecule, 1).state is State.FAILED
    path.write_text("{", "utf-8")
    assert standing_of(tmp_path, "water", molecule, 1).state is State.BROKEN
