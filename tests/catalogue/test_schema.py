"""The JSON Schema for editors: valid, committed as generated, and of one mind with reading."""

import json
from pathlib import Path
from typing import Any

import pytest
from jsonschema import Draft202012Validator

from shapeshelf.catalogue.fields import EntryFields
from shapeshelf.catalogue.problems import Document
from shapeshelf.catalogue.reading import entry_files
from shapeshelf.catalogue.schema import catalogue_schema, schema_text, write_schema
from shapeshelf.catalogue.validation import validated
from shapeshelf.catalogue.yaml_lines import read_document
from shapeshelf.reference.ghs import H_STATEMENTS

COMPOUNDS = Path(__file__).parents[2] / "compounds"

ENTRY = {"id": "x", "name": "X", "structure": "[Xe]"}
ANGLE = {"quantity": "angle", "of": "F-S-F", "value": 90, "unit": "degree", "source": "s"}


def test_the_schema_is_a_schema() -> None:
    """Valid under its own dialect, JSON Schema 2020-12."""
    Draft202012Validator.check_schema(catalogue_schema())


def test_the_committed_file_is_the_generated_one(tmp_path: Path) -> None:
    """An editor never completes from an old schema."""
    assert (COMPOUNDS / "schema.json").read_text(encoding="utf-8") == schema_text()
    assert json.loads(write_schema(tmp_path).read_text(encoding="utf-8")) == catalogue_schema()


def test_the_schema_completes_what_is_fixed() -> None:
    """H-codes, quantities, units and phases are listed; every field of an entry is described."""
    schema = catalogue_schema()
    measured = schema["$defs"]["MeasuredFields"]["properties"]
    assert schema["properties"]["hazards"]["items"]["enum"] == list(H_STATEMENTS)
    assert measured["quantity"]["enum"] == ["angle", "length", "dipole", "frequency"]
    assert measured["unit"]["enum"] == ["degree", "angstrom", "debye", "1/cm"]
    assert "gas" in measured["phase"]["enum"]
    for fields in (schema["properties"], measured):
        assert all(field.get("description") for field in fields.values())


def test_every_entry_of_the_catalogue_fits_the_schema() -> None:
    """What reading takes, an editor takes."""
    validator = Draft202012Validator(catalogue_schema())
    files = list(entry_files(COMPOUNDS))
    faults = {
        file.name: [e.message for e in validator.iter_errors(read_document(file).data)]
        for file in files
    }
    assert files
    assert {name: found for name, found in faults.items() if found} == {}


@pytest.mark.parametrize(
    "change",
    [
        {"hazard": []},
        {"id": "SF4"},
        {"id": "a--b"},
        {"id": 12},
        {"name": ""},
        {"name": "two\nlines"},
        {"name": "bell\x07"},
        {"notes": None},
        {"notes": "\x1b[2J"},
        {"tags": "gas"},
        {"tags": [1]},
        {"cas": "7783-60"},
        {"hazards": ["H999"]},
        {"structure": ["NH4+"]},
        {"structure": "F S"},
        {"structure": "C\x85"},
        {"structure": {"smiles": "N", "charge": "1"}},
        {"structure": {"smiles": "N", "multiplicity": 0}},
        {"structure": {"smiles": "N", "spin": 1}},
        {"measured": [{**ANGLE, "phase": "vapour"}]},
        {"measured": [{**ANGLE, "value": "90"}]},
        {"measured": [{**ANGLE, "uncertainty": -1}]},
        {"measured": [{**ANGLE, "quantity": "angel"}]},
        {"measured": [{"quantity": "dipole", "value": 1.0, "unit": "debye"}]},
    ],
    ids=str,
)
def test_schema_and_reading_refuse_the_same(change: dict[str, Any]) -> None:
    """A slip that reading refuses shows in the editor already."""
    data = {**ENTRY, **change}
    problems = validated(Document(Path("x.yml"), data, {}), data, EntryFields)[1]
    assert problems
    assert list(Draft202012Validator(catalogue_schema()).iter_errors(data))


@pytest.mark.parametrize(
    "change",
    [
        {"unit": "debye"},
        {"value": 190},
        {"of": None},
        {"quantity": "length"},
    ],
    ids=str,
)
def test_the_schema_knows_unit_range_and_label_of_a_quantity(change: dict[str, Any]) -> None:
    """The rules that join two fields of a measured value are in the schema too."""
    validator = Draft202012Validator(catalogue_schema())
    item = {name: value for name, value in {**ANGLE, **change}.items() if value is not None}
    assert validator.is_valid({**ENTRY, "measured": [ANGLE]})
    assert not validator.is_valid({**ENTRY, "measured": [item]})
