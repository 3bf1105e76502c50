"""Entries drafted from structures: each passes the check as it stands."""

from pathlib import Path

import pytest

from shapeshelf.cli import main
from shapeshelf.errors import CatalogueError, StructureError, UsageError
from shapeshelf.linking.draft_table import draft_one_or_many, draft_table
from shapeshelf.linking.drafting import Wanted, draft_entry, taken_in
from shapeshelf.report.checking import report_on_catalogue

TABLE = Path(__file__).parents[1] / "data" / "draft_200.csv"
"""200 names, SMILES and CAS numbers out of the project's tables of shapes and dipole moments."""

WATER = "3\nwater\nO 0 0 0.117\nH 0 0.757 -0.469\nH 0 -0.757 -0.469\n"
AMMONIUM = """5
charge=1
N 0 0 0
H 0.59 0.59 0.59
H -0.59 -0.59 0.59
H -0.59 0.59 -0.59
H 0.59 -0.59 -0.59
"""


def draft(structure: str, root: Path, **said: str) -> Path:
    return draft_entry(Wanted(structure, **said), root, taken_in(root))


def test_two_hundred_structures_pass_the_check(tmp_path: Path) -> None:
    """A whole catalogue in one go, every line of it an entry without a problem."""
    drafted = draft_table(TABLE, tmp_path, taken_in(tmp_path))
    assert (len(drafted.written), drafted.problems) == (200, ())
    catalogue, reports = report_on_catalogue(tmp_path)
    assert len(reports) == len(catalogue.entries) == 200


def test_a_draft_has_every_field_in_its_order(tmp_path: Path) -> None:
    """Known ones filled in, unknown ones as comments, a line a value that can be measured."""
    text = draft("FS(F)(F)F", tmp_path, name="Sulfur tetrafluoride").read_text("utf-8")
    lines = text.splitlines()
    assert lines[0] == 'id: "sulfur-tetrafluoride"'
    fields = [line.lstrip("# ").partition(":")[0] for line in lines if not line.startswith("#  ")]
    assert fields == [
        "id", "formerly", "name", "also", "structure", "formula", "cas", "code", "kept", "owner",
        "tags", "start-here", "hazards", "used-in", "notes", "measured",
    ]  # fmt: skip
    for label in ("F(ax)-S-F(ax)", "F(ax)-S-F(eq)", "F(eq)-S-F(eq)", "S-F(ax)", "S-F(eq)"):
        assert text.count(f'of: "{label}"') == 1


def test_a_measured_line_is_right_once_it_is_filled_in(tmp_path: Path) -> None:
    """Freed of its # and given a value and a source, it passes."""
    (tmp_path / "sources.yml").write_text(
        "book: {title: A book, authors: A. Author, year: 1991, kind: read}\n"
    )
    path = draft("O", tmp_path)
    text = path.read_text("utf-8").replace("# measured", "measured").replace("#   - {", "  - {")
    filled = text.replace("phase: , method: , source: ", "source: book")
    for unit, value in (("degree", 104.5), ("angstrom", 0.958), ("debye", 1.85)):
        filled = filled.replace(f"value: , unit: {unit}", f"value: {value}, unit: {unit}")
    path.write_text(filled.replace("uncertainty: , ", ""), "utf-8")
    _, (report,) = report_on_catalogue(tmp_path)
    assert report.entry is not None
    assert [item.value for item in report.entry.measured] == [104.5, 0.958, 1.85]


@pytest.mark.parametrize(
    ("name", "text", "stated"),
    [("water.xyz", WATER, {}), ("ammonium.xyz", AMMONIUM, {"charge": 1})],
)
def test_a_file_with_coordinates_comes_along(
    tmp_path: Path, name: str, text: str, stated: dict[str, int]
) -> None:
    """From outside the catalogue it is copied beside the entry, its charge stated."""
    root = tmp_path / "compounds"
    root.mkdir()
    (tmp_path / name).write_text(text)
    draft(str(tmp_path / name), root)
    _, (report,) = report_on_catalogue(root)
    assert report.entry is not None
    assert report.entry.structure.file == root / name
    assert (root / name).read_text() == text
    assert report.molecule.charge == stated.get("charge", 0)


def test_a_file_within_the_catalogue_stays_where_it_is(tmp_path: Path) -> None:
    (tmp_path / "coordinates").mkdir()
    (tmp_path / "coordinates" / "water.xyz").write_text(WATER)
    path = draft(str(tmp_path / "coordinates" / "water.xyz"), tmp_path)
    assert 'file: "coordinates/water.xyz"' in path.read_text()
    assert [item.name for item in tmp_path.glob("*.xyz")] == []
    report_on_catalogue(tmp_path)


def test_nothing_is_overwritten_and_no_id_or_name_given_twice(tmp_path: Path) -> None:
    """Neither an entry, nor an earlier id, nor what was withdrawn."""
    first = draft("O", tmp_path)
    (tmp_path / "x.yml").write_text("id: xx\nformerly: [ammonia]\nname: Azane\nstructure: N\n")
    before = first.read_bytes()
    assert draft("O", tmp_path).stem == "h2o-2"
    assert draft("N", tmp_path, name="Ammonia").stem == "ammonia-2"
    assert first.read_bytes() == before
    with pytest.raises(UsageError, match="the id xx is taken"):
        draft("N", tmp_path, id="xx")
    with pytest.raises(StructureError, match="azane is taken"):
        draft("N", tmp_path, name="azane")
    main(["release", "--catalogue", str(tmp_path)])
    first.unlink()
    assert draft("O", tmp_path, name="h2o").stem == "h2o-3"


def test_an_entry_of_another_name_in_the_way_is_left_alone(tmp_path: Path) -> None:
    (tmp_path / "h2o.yml").write_text("id: other\nname: Other\nstructure: S\n")
    with pytest.raises(UsageError, match="overwrites nothing"):
        draft("O", tmp_path)
    assert "id: other" in (tmp_path / "h2o.yml").read_text()


@pytest.mark.parametrize(
    ("said", "fault"),
    [
        ({"cas": "7732-18-4"}, "cas: "),
        ({"id": "Water"}, "id: "),
        ({"id": "index"}, "is taken"),
        ({"code": "x" * 400}, "code: "),
    ],
)
def test_a_wrong_field_writes_nothing(tmp_path: Path, said: dict[str, str], fault: str) -> None:
    with pytest.raises((CatalogueError, UsageError), match=fault):
        draft("O", tmp_path, **said)
    assert list(tmp_path.iterdir()) == []


def test_lines_that_fail_are_reported_and_the_rest_written(tmp_path: Path, capsys) -> None:
    """With the number of the line; the exit status is 1."""
    table = tmp_path / "list.csv"
    table.write_text(
        "Name;SMILES;CAS number;Code\nWater;O;7732-18-5;A-1\nWrong;C(C;;\n\nBad;N;7664-41-8;\n"
        ";[NH4+];;A-4\nHostile: {x};S;;'#'\n",
        "utf-8-sig",
    )
    root = tmp_path / "compounds"
    root.mkdir()
    assert main(["draft", str(table), "--catalogue", str(root)]) == 1
    printed = capsys.readouterr()
    assert [line.partition(".csv:")[2][:2] for line in printed.err.splitlines()] == ["3:", "5:"]
    assert sorted(path.stem for path in root.iterdir()) == ["hostile-x", "nh4", "water"]
    _, reports = report_on_catalogue(root)
    assert {report.name for report in reports} == {"Water", "NH4+", "Hostile: {x}"}


@pytest.mark.parametrize("text", ["", "name,cas\nWater,7732-18-5\n"])
def test_a_table_without_structures_is_refused(tmp_path: Path, text: str) -> None:
    table = tmp_path / "list.csv"
    table.write_text(text)
    with pytest.raises(UsageError, match="no column smiles"):
        draft_one_or_many(Wanted(str(table)), tmp_path, taken_in(tmp_path))
