"""Records are text that diffs, rounds and reads back, and are written whole or not at all."""

import json

import pytest

from shapeshelf.calculation.model import (
    ConformerResult,
    Level,
    Mode,
    Outcome,
    PlacementResult,
)
from shapeshelf.calculation.records import (
    read_record,
    record_json,
    record_path,
    record_text,
    rounded_record,
    write_record,
)
from shapeshelf.errors import CalculationError

PLACEMENT = PlacementResult("see-saw", "F, F axial", 0.0123456, 12.3456, 0, True)
CONFORMERS = ConformerResult(Level.XTB, 3, 15.0, 298.15, 0.61234, 1.23456, 0.5, 2.0)


def test_a_record_comes_back_as_it_was_written(tmp_path, record_of):
    """Reading gives the record in the digits that were printed, and writing it again the text."""
    record = record_of(placements=(PLACEMENT,), conformers=CONFORMERS, warnings=("one",))
    path = record_path(tmp_path, "water")
    write_record(path, record)
    found = read_record(path)
    assert found == rounded_record(record)
    assert record_text(found) == path.read_text("utf-8") == record_text(record)


def test_a_failure_comes_back(tmp_path, record_of):
    """A record without a result is a record."""
    record = record_of(
        outcome=Outcome.NO_MINIMUM,
        failure="not found in 80 steps",
        coordinates_angstrom=(),
        dipole_debye=None,
        modes=(),
        energy_hartree=None,
        point_group=None,
    )
    write_record(tmp_path / "water.json", record)
    assert read_record(tmp_path / "water.json") == record


def test_numbers_are_rounded(record_of):
    """Each field has its decimals, and nothing prints as minus nought."""
    record = record_of(
        energy_hartree=-76.12345678,
        modes=(Mode(1623.4499, 81.96, "A1", 0.0251),),
        dipole_debye=(-0.0001, 0.00049, -1.86449),
        coordinates_angstrom=((0.12345, -0.00001, 1.0),),
    )
    held = json.loads(record_text(record))
    assert held["energy_hartree"] == -76.123457
    assert list(held["modes"][0].values()) == [1623.4, 82.0, "A1", 0.03]
    assert held["dipole_debye"] == [0.0, 0.0, -1.864]
    assert held["coordinates_angstrom"] == [[0.1235, 0.0, 1.0]]
    assert "-0.0," not in record_text(record)


def test_one_line_an_atom(record_of):
    """A moved atom changes one line."""
    text = record_text(record_of())
    moved = record_of(
        coordinates_angstrom=((0.0, 0.757, -0.521), (0.0, -0.757, -0.521), (0.0, 0.0, 0.07))
    )
    changed = [
        (one, other)
        for one, other in zip(text.splitlines(), record_text(moved).splitlines(), strict=True)
        if one != other
    ]
    assert len(changed) == 1


@pytest.mark.parametrize(
    "text",
    ["", "{", "[]", "{}", '{"schema": 99}', '{"schema": 1, "level": "dft"}', "\x00\x01"],
)
def test_a_file_that_is_no_record_is_refused(tmp_path, text):
    """One line with the file's name and the remedy."""
    path = tmp_path / "water.json"
    path.write_text(text, "utf-8")
    with pytest.raises(CalculationError, match=r"water\.json: not a record.*compute it again"):
        read_record(path)


def test_a_missing_record_is_none(tmp_path):
    """No file, no record, no error."""
    assert read_record(tmp_path / "water.json") is None


def test_an_interrupted_write_leaves_the_old_record(tmp_path, record_of, monkeypatch):
    """The new text takes the place of the old only when it is whole; no rubbish stays."""
    path = tmp_path / "water.json"
    write_record(path, record_of())
    before = path.read_text("utf-8")

    def interrupt(*_):
        raise KeyboardInterrupt

    monkeypatch.setattr("os.replace", interrupt)
    with pytest.raises(KeyboardInterrupt):
        write_record(path, record_of(warnings=("new",)))
    assert path.read_text("utf-8") == before
    assert [file.name for file in tmp_path.iterdir()] == ["water.json"]


def test_json_for_scripts(record_of):
    """Method, energy and modes are there; what the compound's JSON has elsewhere is not."""
    held = record_json(record_of(placements=(PLACEMENT,)))
    assert held["method"] == "PBE0/def2-TZVP"
    assert held["placements"][0]["energy_kj_mol"] == 12.3
    assert "coordinates_angstrom" not in held
    json.dumps(held)
