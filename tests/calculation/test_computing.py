"""The command from the outside."""

import json

import pytest

from shapeshelf.calculation import engines
from shapeshelf.calculation.records import record_path, write_record
from shapeshelf.cli import main


def test_compute_writes_records_and_says_so(folder, capsys):
    """Then there is nothing left to do."""
    root = folder({"water": "O", "sulfane": "S"})
    arguments = ["compute", "--basis", "xtb", "--catalogue", str(root)]
    assert main([*arguments, "water"]) == 0
    assert capsys.readouterr().out.splitlines() == [
        "water: GFN2-xTB, C2v",
        "1 computed, 0 without a result, 0 kept",
    ]
    assert json.loads((root / "records" / "water.json").read_text("utf-8"))["level"] == "xtb"
    assert main([*arguments, "water"]) == 0
    assert capsys.readouterr().out == "0 computed, 0 without a result, 1 kept\n"


@pytest.mark.parametrize(
    ("arguments", "status", "said"),
    [
        (["watr"], 2, "watr: no entry has this id; did you mean water?\n"),
        (["--jobs", "0"], 2, "--jobs 0: at least 1 is needed\n"),
    ],
)
def test_wrong_usage(folder, capsys, arguments, status, said):
    """One line, exit status 2."""
    root = folder({"water": "O"})
    assert main(["compute", "--catalogue", str(root), *arguments]) == status
    assert capsys.readouterr().err == said


@pytest.mark.parametrize(
    ("missing", "arguments", "said"),
    [
        ("tblite", [], "tblite: not installed; run: pip install 'shapeshelf[calculated]'\n"),
        ("pyscf", [], "pyscf: not installed; run: pip install 'shapeshelf[calculated]'\n"),
        (
            "distributed",
            ["--scheduler", "tcp://127.0.0.1:9"],
            "distributed: not installed; run: pip install 'shapeshelf[cluster]'\n",
        ),
    ],
)
def test_a_missing_program_is_named(folder, capsys, monkeypatch, missing, arguments, said):
    """With the extra that brings it."""
    found = engines.find_spec
    monkeypatch.setattr(engines, "find_spec", lambda name: None if name == missing else found(name))
    assert main(["compute", "--catalogue", str(folder({"water": "O"})), *arguments]) == 1
    assert capsys.readouterr().err == said


def test_check_says_what_to_compute(folder, capsys, record_of):
    """Notes, not problems: exit status 0."""
    root = folder({"water": "O", "sulfane": "S", "ammonia": "N"})
    write_record(record_path(root, "water"), record_of())
    write_record(record_path(root, "sulfane"), record_of())
    assert main(["check", "--catalogue", str(root)]) == 0
    said = capsys.readouterr().out
    assert "1 whose record belongs to another structure: shapeshelf compute sulfane\n" in said
    assert "1 without calculated values: shapeshelf compute ammonia\n" in said
