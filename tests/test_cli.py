"""The command line: what it prints, and the exit status."""

import io
import json

import pytest

from shapeshelf.cli import main


def test_assess_prints_shape_angles_and_polarity(capsys):
    assert main(["assess", "FCl(F)F"]) == 0
    printed = capsys.readouterr().out
    for words in ("T-shaped", "C2v", "F(ax)-Cl-F(eq)", "polar"):
        assert words in printed


def test_assess_json_is_one_object(capsys):
    assert main(["assess", "O", "--json"]) == 0
    assert json.loads(capsys.readouterr().out)["shape"] == "bent"


def test_assess_reads_lines_and_keeps_their_order(capsys, monkeypatch):
    """A line that cannot be handled gives its error, the rest go on, the exit status is 1."""
    monkeypatch.setattr("sys.stdin", io.StringIO("O\nnonsense(\nN\n"))
    assert main(["assess", "-", "--json"]) == 1
    rows = [json.loads(line) for line in capsys.readouterr().out.splitlines()]
    assert [row.get("formula") for row in rows] == ["H2O", None, "NH3"]
    assert rows[1]["input"] == "nonsense("
    assert rows[1]["error"]


@pytest.mark.parametrize("structure", ["nonsense(", "", "missing.xyz", "[Xx]"])
def test_a_structure_that_cannot_be_read_gets_one_line(structure, capsys):
    assert main(["assess", structure]) == 1
    captured = capsys.readouterr()
    assert captured.out == ""
    assert len(captured.err.strip().splitlines()) == 1


@pytest.mark.parametrize("arguments", [[], ["polish"], ["assess"], ["assess", "O", "--colour"]])
def test_wrong_usage_is_status_two(arguments, capsys):
    with pytest.raises(SystemExit) as caught:
        main(arguments)
    assert caught.value.code == 2


def test_check_lists_problems_and_exits_one(tmp_path, capsys):
    (tmp_path / "a.yml").write_text("id: a\nname: A\nstructure: O\nfrmula: H2O\n")
    assert main(["check", "--catalogue", str(tmp_path)]) == 1
    line = capsys.readouterr().err.strip()
    assert line.endswith("did you mean `formula`?")
    assert ":4: frmula: " in line


def test_check_of_a_good_catalogue_says_how_many(tmp_path, capsys):
    (tmp_path / "a.yml").write_text("id: a\nname: A\nstructure: O\n")
    assert main(["check", "--catalogue", str(tmp_path)]) == 0
    printed = capsys.readouterr().out
    assert "1 compounds, 0 sources: no problems" in printed
    assert "shapeshelf compute a" in printed
