"""A catalogue folder read whole, or every problem of it in one run."""

from collections.abc import Callable
from pathlib import Path

import pytest

from shapeshelf.catalogue.model import (
    Measurement,
    Protocol,
    Quantity,
    Source,
    SourceKind,
    StructureInput,
)
from shapeshelf.catalogue.reading import entry_files, read_catalogue, read_catalogue_with_problems
from shapeshelf.errors import CatalogueError

ROOT = Path(__file__).parents[2]
Make = Callable[[dict[str, str]], Path]
Lines = Callable[[Path], list[str]]

TWELVE = ROOT / "tests" / "data" / "twelve-mistakes"

SF4 = """\
id: sf4
formerly: [sulfur-4]
name: Sulfur tetrafluoride
also: [tetrafluoro-λ4-sulfane]
structure:
  smiles: FS(F)(F)F
  charge: 0
  multiplicity: 1
formula: SF4
cas: 7783-60-0
code: "0042"
kept: shelf 3
owner: gas desk
tags: [gas]
start-here: The see-saw.
hazards: [H330, H300+H310]
used-in: [p1]
notes: |
  Two lines
  of <b>text</b>.
measured:
  - quantity: angle
    of: F(ax)-S-F(ax)
    value: 173
    unit: degree
    uncertainty: 0.5
    phase: gas
    method: microwave
    source: crc
    note: vibrationally averaged
"""


def test_twelve_mistakes_give_twelveproblem_lines(monkeypatch: pytest.MonkeyPatch) -> None:
    """Each with file, line, field, and what would be right; paths from the current folder."""
    monkeypatch.chdir(TWELVE)
    with pytest.raises(CatalogueError) as caught:
        read_catalogue(TWELVE / "compounds")
    assert str(caught.value).split("\n") == [
        "compounds/ammonia.yml:4: cas: the check digit of `7664-41-8` is wrong: 7664-41 ends in 7,"
        " so 7664-41-7, unless another digit is mistyped",
        "compounds/ammonia.yml:5: hazards[2]: `H999` is no H-code of the GHS; right would be one"
        " such as H330",
        "compounds/ammonia.yml:6: used-in[0]: `x-p02` is not in protocols.yml; did you mean"
        " `x-p01`?",
        "compounds/boron.yml:4: hazard: unknown field; did you mean `hazards`?",
        "compounds/boron.yml:5: kept: `12` is not read as a text; put it in quotes",
        "compounds/gases/sulfur.yml:7: measured[0].value: 273.1 lies outside what this quantity"
        " (angle) can be, 1 to 180 degree",
        "compounds/gases/sulfur.yml:13: measured[1].unit: `pm` is no unit for length; right would"
        " be angstrom",
        "compounds/gases/sulfur.yml:14: measured[1].source: `handbok` is not in sources.yml; did"
        " you mean `handbook`?",
        "compounds/gases/water.yml:1: id: the id `bf3` is taken in compounds/boron.yml:1; choose"
        " another",
        "compounds/gases/water.yml:4: structure.file: `../../outside.xyz` lies outside compounds/;"
        " right would be relative to this entry",
        "compounds/gases/xenon.yml:2: file: a colon and a space inside a text start a new field;"
        " put the text in quotes",
        "compounds/phosphine.yml:2: name: the name `ammonia` is taken in"
        " compounds/ammonia.yml:2; choose another",
    ]


def test_every_field_arrives(make_catalogue: Make) -> None:
    """All fields of the interface, in the records that later rooms read."""
    protocols = "p1: {title: Leak check, file: docs/p1.md}\n"
    root = make_catalogue(
        {"a/b/sf4.yml": SF4, "protocols.yml": protocols, "docs/p1.md": "# Leak check"}
    )
    catalogue = read_catalogue(root)
    (entry,) = catalogue.entries
    assert catalogue.root == root
    assert catalogue.protocols == {"p1": Protocol("p1", "Leak check", "docs/p1.md")}
    assert catalogue.sources == {
        "crc": Source(
            "crc", "Handbook", "A. Nobody", 2001, SourceKind.RECALLED, "An invented press"
        )
    }
    assert entry.structure == StructureInput("FS(F)(F)F", None, 0, 1)
    assert (entry.id, entry.formerly) == ("sf4", ("sulfur-4",))
    assert (entry.name, entry.also) == ("Sulfur tetrafluoride", ("tetrafluoro-λ4-sulfane",))
    assert (entry.formula, entry.cas, entry.code) == ("SF4", "7783-60-0", "0042")
    assert (entry.kept, entry.owner, entry.tags) == ("shelf 3", "gas desk", ("gas",))
    assert (entry.start_here, entry.used_in) == ("The see-saw.", ("p1",))
    assert entry.hazards == ("H330", "H300+H310")
    assert entry.notes == "Two lines\nof <b>text</b>."
    assert entry.measured == (
        Measurement(
            Quantity.ANGLE,
            "F(ax)-S-F(ax)",
            173.0,
            "degree",
            0.5,
            "gas",
            "microwave",
            "crc",
            "vibrationally averaged",
            22,
        ),
    )
    assert entry.lines["measured[0].value"] == 24
    assert entry.file == root / "a/b/sf4.yml"


def test_which_files_are_entries(make_catalogue: Make) -> None:
    """Every YAML file at any depth, but for the lists, records/ at the top, `.` and `_` names."""
    wanted = ["a.yml", "b.yaml", "deep/er/c.YML", "deep/records/d.yml", "deep/sources.yml"]
    others = ["records/r.yml", "_draft.yml", ".hidden.yml", "_old/o.yml", ".git/g.yml", "x.txt"]
    root = make_catalogue(dict.fromkeys([*wanted, *others, "protocols.yml"], "id: x"))
    assert [file.relative_to(root).as_posix() for file in entry_files(root)] == wanted


def test_entries_stand_in_order_of_id(make_catalogue: Make) -> None:
    """Whatever their files are called."""
    root = make_catalogue(
        {
            f"{file}.yml": f"id: {key}\nname: {key}\nstructure: N"
            for file, key in ("az", "by", "cx")
        },
    )
    assert [entry.id for entry in read_catalogue(root).entries] == ["x", "y", "z"]


def test_a_folder_without_lists_or_entries_is_a_catalogue(tmp_path: Path) -> None:
    """A group starts with nothing."""
    catalogue = read_catalogue(tmp_path)
    assert (catalogue.entries, catalogue.sources, catalogue.protocols) == ((), {}, {})


def test_no_such_folder(tmp_path: Path) -> None:
    """One line that says so."""
    with pytest.raises(CatalogueError, match="there is no such folder"):
        read_catalogue(tmp_path / "absent")


def test_an_entry_that_is_a_link_out_of_the_catalogue_is_refused(
    tmp_path: Path, make_catalogue: Make, problem_lines: Lines
) -> None:
    """It is not even read."""
    root = make_catalogue({})
    (tmp_path / "other.yml").write_text("secret: words")
    (root / "x.yml").symlink_to(tmp_path / "other.yml")
    (line,) = problem_lines(root)
    assert "link to a place outside" in line
    assert "secret" not in line


def test_a_broken_list_hides_no_other_problem_and_adds_none(
    make_catalogue: Make, problem_lines: Lines
) -> None:
    """Where sources.yml cannot be read, no citation is called unknown for that."""
    text = SF4.replace("used-in: [p1]\n", "").replace("7783-60-0", "7783-60-1")
    lines = problem_lines(make_catalogue({"sources.yml": "a: [", "sf4.yml": text}))
    assert [line.split(": ")[0:2] for line in lines] == [
        ["sf4.yml:10", "cas"],
        ["sources.yml:1", "file"],
    ]


def test_what_is_right_is_there_beside_the_problems(make_catalogue: Make) -> None:
    """So that later checks of the same entry find theirs in the same run."""
    bad = SF4.replace("7783-60-0", "1").replace("[p1]", "[]").replace("phase: gas", "phase: ice")
    root = make_catalogue({"a.yml": bad + "tagz: x\n", "b.yml": "id: b\nstructure: N\n"})
    catalogue, problems = read_catalogue_with_problems(root)
    (entry,) = catalogue.entries
    assert sorted((problem.file.name, problem.field) for problem in problems) == [
        ("a.yml", "cas"),
        ("a.yml", "measured[0].phase"),
        ("a.yml", "tagz"),
        ("b.yml", "name"),
    ]
    assert (entry.cas, entry.formula) == (None, "SF4")
    assert (entry.measured[0].phase, entry.measured[0].value) == (None, 173.0)


def test_the_catalogue_of_this_repository_is_right() -> None:
    """No problem in it, and every record whole."""
    catalogue = read_catalogue(ROOT / "compounds")
    assert len(catalogue.entries) >= 48
    assert len(catalogue.protocols) >= 3
    assert all(item.source in catalogue.sources for e in catalogue.entries for item in e.measured)
