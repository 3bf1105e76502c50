"""A catalogue folder read whole, or every problem of it in one run."""

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
TWELVE = ROOT / "tests" / "data" / "twelve-mistakes"

SOURCES = """
crc:
  title: Handbook
  authors: A. Nobody
  year: 2001
  kind: recalled
  where: An invented press
"""

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


def _catalogue(folder: Path, **files: str) -> Path:
    root = folder / "compounds"
    for name, text in {"sources.yml": SOURCES, **files}.items():
        file = root / name
        file.parent.mkdir(parents=True, exist_ok=True)
        file.write_text(text, encoding="utf-8")
    return root


def _lines(root: Path) -> list[str]:
    with pytest.raises(CatalogueError) as caught:
        read_catalogue(root)
    return [
        f"{problem.file.name}:{problem.line}: {problem.field}: {problem.message}"
        for problem in caught.value.problems
    ]


def test_twelve_mistakes_give_twelve_lines(monkeypatch: pytest.MonkeyPatch) -> None:
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


def test_every_field_arrives(tmp_path: Path) -> None:
    """All fields of the interface, in the records that later rooms read."""
    protocols = "p1: {title: Leak check, file: docs/p1.md}\n"
    root = _catalogue(
        tmp_path, **{"a/b/sf4.yml": SF4, "protocols.yml": protocols, "docs/p1.md": "# Leak check"}
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


def test_which_files_are_entries(tmp_path: Path) -> None:
    """Every YAML file at any depth, but for the lists, records/ at the top, `.` and `_` names."""
    wanted = ["a.yml", "b.yaml", "deep/er/c.YML", "deep/records/d.yml", "deep/sources.yml"]
    others = ["records/r.yml", "_draft.yml", ".hidden.yml", "_old/o.yml", ".git/g.yml", "x.txt"]
    root = _catalogue(tmp_path, **dict.fromkeys([*wanted, *others, "protocols.yml"], "id: x"))
    assert [file.relative_to(root).as_posix() for file in entry_files(root)] == wanted


def test_entries_stand_in_order_of_id(tmp_path: Path) -> None:
    """Whatever their files are called."""
    root = _catalogue(
        tmp_path,
        **{
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


def test_structure_files(tmp_path: Path) -> None:
    """Relative to the entry, below the catalogue, of a known kind."""
    entry = "id: x\nname: X\nstructure: {file: ../xyz/x.XYZ, charge: -1}\n"
    root = _catalogue(tmp_path, **{"a/x.yml": entry, "xyz/x.XYZ": "1\n\nXe 0 0 0\n"})
    (read,) = read_catalogue(root).entries
    assert read.structure == StructureInput(None, root / "xyz/x.XYZ", -1)


@pytest.mark.parametrize(
    ("name", "message"),
    [
        ("absent.xyz", "there is no file `absent.xyz` beside this entry"),
        ("x.cif", "`x.cif` is no structure file; right would be .xyz or .mol or .sdf"),
        ("../secret.xyz", "`../secret.xyz` lies outside compounds/"),
        ("../absent.xyz", "`../absent.xyz` lies outside compounds/"),
        ("/etc/hostname.xyz", "lies outside compounds/"),
        ("link.xyz", "`link.xyz` lies outside compounds/"),
        ("loop.xyz", "there is no file `loop.xyz`"),
        ("folder.xyz", "there is no file `folder.xyz`"),
        ("sub/../../secret.xyz", "lies outside compounds/"),
        ('"a\\0.xyz"', "holds a control character"),
        ("y" * 290 + ".xyz", "there is no file `yyy"),
        ("big.xyz", "`big.xyz` is larger than 1024 kB"),
    ],
)
def test_structure_files_that_are_refused(tmp_path: Path, name: str, message: str) -> None:
    """What lies outside is refused whether it exists or not; links are followed first."""
    root = _catalogue(tmp_path, **{"x.yml": f"id: x\nname: X\nstructure: {{file: {name}}}\n"})
    (tmp_path / "secret.xyz").write_text("secret")
    (root / "x.cif").write_text("")
    (root / "big.xyz").write_text("x" * (1024 * 1024 + 1))
    (root / "folder.xyz").mkdir()
    (root / "sub").mkdir()
    (root / "link.xyz").symlink_to(tmp_path / "secret.xyz")
    (root / "loop.xyz").symlink_to("loop.xyz")
    lines = _lines(root)
    assert any(f"x.yml:3: structure.file: {message}" in line or message in line for line in lines)


def test_an_entry_that_is_a_link_out_of_the_catalogue_is_refused(tmp_path: Path) -> None:
    """It is not even read."""
    root = _catalogue(tmp_path)
    (tmp_path / "other.yml").write_text("secret: words")
    (root / "x.yml").symlink_to(tmp_path / "other.yml")
    (line,) = _lines(root)
    assert "link to a place outside" in line
    assert "secret" not in line


def test_a_broken_list_hides_no_other_problem_and_adds_none(tmp_path: Path) -> None:
    """Where sources.yml cannot be read, no citation is called unknown for that."""
    text = SF4.replace("used-in: [p1]\n", "").replace("7783-60-0", "7783-60-1")
    lines = _lines(_catalogue(tmp_path, **{"sources.yml": "a: [", "sf4.yml": text}))
    assert [line.split(": ")[0:2] for line in lines] == [
        ["sf4.yml:10", "cas"],
        ["sources.yml:1", "file"],
    ]


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("a: {title: T, authors: A, year: 1999}", "a.kind: is missing"),
        ("a: {title: T, authors: A, year: 1999, kind: guess}", "a.kind: `guess` is no kind of"),
        ("a: {title: T, authors: A, year: '1999', kind: read}", "a.year: `1999` is a text where"),
        ("a: {title: T, author: A, year: 1999, kind: read}", "did you mean `authors`?"),
        ("a: {title: T, authors: A, year: 1999, kind: read, doi: 'https://doi.org/10.1/x'}", "DOI"),
        ("a: {title: T, authors: A, year: 1999, kind: read, isbn: '978'}", "`978` is no ISBN"),
        ("A b: {title: T, authors: A, year: 1999, kind: read}", "A b: this key holds more than"),
        ("a: words", "a: `words` is a text where a group of fields is wanted"),
        ("a:", "a: is empty"),
    ],
)
def test_sources_that_are_refused(tmp_path: Path, text: str, expected: str) -> None:
    """Each with the line of its field."""
    lines = _lines(_catalogue(tmp_path, **{"sources.yml": text}))
    assert any(line.startswith("sources.yml:1: ") and expected in line for line in lines)


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("p1: {title: T, file: absent.md}", "p1.file: there is no file `absent.md`"),
        ("p1: {title: T, file: ../secret.md}", "p1.file: `../secret.md` lies outside compounds/"),
        ("p1: {file: absent.md}", "p1.title: is missing"),
        ('p1: {title: T, file: "a\\0b"}', "p1.file: `a\\x00b`"),
    ],
)
def test_protocols_that_are_refused(tmp_path: Path, text: str, expected: str) -> None:
    """The document must be there, and below the catalogue."""
    (tmp_path / "secret.md").write_text("secret")
    lines = _lines(_catalogue(tmp_path, **{"protocols.yml": text}))
    assert any(line.startswith(f"protocols.yml:1: {expected}") for line in lines)


def test_what_is_right_is_there_beside_the_problems(tmp_path: Path) -> None:
    """So that later checks of the same entry find theirs in the same run."""
    bad = SF4.replace("7783-60-0", "1").replace("[p1]", "[]").replace("phase: gas", "phase: ice")
    root = _catalogue(tmp_path, **{"a.yml": bad + "tagz: x\n", "b.yml": "id: b\nstructure: N\n"})
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


@pytest.mark.parametrize(
    "structure", ["{}", "{smiles: N, file: a.xyz}", "{file: absent.xyz}", "{charge: 1}", "[N]"]
)
def test_an_entry_without_a_right_structure_is_left_out(tmp_path: Path, structure: str) -> None:
    """Nothing later is to trip over it."""
    root = _catalogue(tmp_path, **{"a.yml": f"id: a\nname: A\nstructure: {structure}\n"})
    catalogue, problems = read_catalogue_with_problems(root)
    assert catalogue.entries == ()
    assert {problem.line for problem in problems} == {3}


def test_the_catalogue_of_this_repository_is_right() -> None:
    """No problem in it, and every record whole."""
    catalogue = read_catalogue(ROOT / "compounds")
    assert len(catalogue.entries) >= 48
    assert len(catalogue.protocols) >= 3
    assert all(item.source in catalogue.sources for e in catalogue.entries for item in e.measured)
