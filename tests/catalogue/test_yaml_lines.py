"""Reading YAML: lines of every field, words as a chemist means them, hostile files refused."""

from pathlib import Path

import pytest
import yaml

from shapeshelf.catalogue import yaml_lines
from shapeshelf.catalogue.yaml_lines import MAX_BYTES, MAX_DEPTH, read_document
from shapeshelf.errors import CatalogueError

LOADERS = {"plain": yaml.SafeLoader, "compiled": getattr(yaml, "CSafeLoader", yaml.SafeLoader)}


@pytest.fixture(params=LOADERS.values(), ids=LOADERS)
def _each_loader(request: pytest.FixtureRequest, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(yaml_lines, "LOADER", request.param)


pytestmark = pytest.mark.usefixtures("_each_loader")


def _file(folder: Path, content: str | bytes) -> Path:
    file = folder / "entry.yml"
    file.write_bytes(content if isinstance(content, bytes) else content.encode())
    return file


@pytest.mark.parametrize("lead", ["", "\ufeff", "# a comment\n\n", "---\n"])
def test_every_field_and_item_knows_its_line(tmp_path: Path, lead: str) -> None:
    """Nested fields and items too, counted from 1; a byte order mark and comments no matter."""
    text = (
        lead
        + "id: x\nmeasured:\n  - quantity: angle\n    value: 1\n  - {value: 2}\ntags: [a,\n b]\n"
    )
    lines = read_document(_file(tmp_path, text)).lines
    first = lead.count("\n") + 1
    assert {field: line - first for field, line in lines.items()} == {
        "id": 0,
        "measured": 1,
        "measured[0]": 2,
        "measured[0].quantity": 2,
        "measured[0].value": 3,
        "measured[1]": 4,
        "measured[1].value": 4,
        "tags": 5,
        "tags[0]": 5,
        "tags[1]": 6,
    }


@pytest.mark.parametrize(
    ("word", "value"),
    [
        # Text that the older YAML 1.1 turns into a truth value, a date or a number of base 60.
        ("NO", "NO"),
        ("no", "no"),
        ("on", "on"),
        ("Y", "Y"),
        ("2024-01-31", "2024-01-31"),
        ("75-10-5", "75-10-5"),
        ("12:30:45", "12:30:45"),
        ("1_000", "1_000"),
        ("0x1F", "0x1F"),
        # Zeros in front belong to a code.
        ("0042", "0042"),
        ("007.5", "007.5"),
        (".inf", ".inf"),
        (".nan", ".nan"),
        ("9" * 5000, "9" * 5000),
        # Core schema, YAML 1.2.2 (2021), section 10.3.2.
        ("true", True),
        ("False", False),
        ("null", None),
        ("~", None),
        ("", None),
        ("12", 12),
        ("-3", -3),
        ("0", 0),
        ("1.50", 1.5),
        (".5", 0.5),
        ("1e-3", 0.001),
        ("+1.", 1.0),
        ("'12'", "12"),
        ('"true"', "true"),
        ("C#N", "C#N"),
        ("F/C=C\\F", "F/C=C\\F"),
    ],
)
def test_words_mean_what_a_chemist_means(tmp_path: Path, word: str, value: object) -> None:
    """The core schema of YAML 1.2, decimal numbers only."""
    read = read_document(_file(tmp_path, f"field: {word}\n")).data["field"]
    assert (read, type(read)) == (value, type(value))


def _bomb() -> str:
    rows = ["a0: &a0 [lol, lol, lol, lol, lol, lol, lol, lol, lol]"]
    rows += [f"a{n}: &a{n} [{', '.join([f'*a{n - 1}'] * 9)}]" for n in range(1, 12)]
    return "\n".join(rows)


@pytest.mark.parametrize(
    ("content", "line", "message"),
    [
        (_bomb(), 1, "an anchor .* is not taken"),
        ("a: &a [*a]", 1, "an anchor .* is not taken"),
        ("id: x\ntags: *t", 2, "alias"),
        ("id: x\nrun: !!python/object/apply:os.system ['true']", 2, "tag `!!python/object/apply"),
        ("id: !custom x", 1, "tag `!custom` is not taken"),
        ("id: !!binary aGk=", 1, "tag `!!binary` is not taken"),
        (f"id: x\na: {'[' * MAX_DEPTH}{']' * MAX_DEPTH}", 2, f"more than {MAX_DEPTH} deep"),
        (b"id: x\nname: caf\xe9", 2, "not in UTF-8"),
        ("id: x".encode("utf-16"), 1, "not in UTF-8"),
        ("id: x\nname: a\x07b", 2, "control character"),
        ("id: x\n\tname: b", 2, "a tab indents the line"),
        ("x" * (MAX_BYTES + 1), 1, "larger than 256 kB"),
        ("", 1, "is empty"),
        ("# nothing\n", 1, "is empty"),
        ("- a\n- b", 1, "holds no fields"),
        ("null", 1, "holds no fields"),
        ("id: x\n---\nid: y", 2, "a second document"),
        ("? [a, b]\n: c", 1, "a field's name must be a word"),
        ("? {a: b}\n: c", 1, "a field's name must be a word"),
        ("id: x\nname: a: b", 2, "put the text in quotes"),
        ("id: x\nname: @b", 2, "begins with `@` must stand in quotes"),
        ("id: x\nstructure: [O-][N+]=O", 2, "SMILES .* must stand in quotes"),
        ('id: x\nstructure: "F/C=C\\F"', 2, "use single quotes"),
    ],
)
def test_hostile_and_broken_files_are_refused_with_their_line(
    tmp_path: Path, content: str | bytes, line: int, message: str
) -> None:
    """One problem, in the line where it stands, and nothing built from the file."""
    with pytest.raises(CatalogueError, match=message) as caught:
        read_document(_file(tmp_path, content))
    assert [problem.line for problem in caught.value.problems] == [line]


@pytest.mark.parametrize("opening", ["[", "{a: ", "- "])
def test_a_very_deep_file_does_not_exhaust_the_stack(tmp_path: Path, opening: str) -> None:
    """Depth is refused before anything is built."""
    with pytest.raises(CatalogueError):
        read_document(_file(tmp_path, "a:\n  " + opening * 5_000))


def test_depth_within_the_limit_is_read(tmp_path: Path) -> None:
    """The limit refuses only what is deeper."""
    depth = MAX_DEPTH - 1
    data = read_document(_file(tmp_path, f"a: {'[' * depth}{']' * depth}")).data
    for _ in range(depth - 1):
        (data["a"],) = data["a"]
    assert data["a"] == []


def test_a_repeated_field_is_reported_and_its_first_value_kept(tmp_path: Path) -> None:
    """At the later line, naming the first; the rest of the file is still read."""
    text = "id: x\nmeasured:\n  - of: a\n    of: b\nid: y\ntags: [a]\ntags: [b, c]\n"
    document = read_document(_file(tmp_path, text))
    assert document.data == {"id": "x", "measured": [{"of": "a"}], "tags": ["a"]}
    assert [(problem.line, problem.field) for problem in document.problems] == [
        (4, "measured[0].of"),
        (5, "id"),
        (7, "tags"),
    ]
    assert document.lines["tags[0]"] == 6
    assert "first in line 1" in document.problems[1].message


def test_what_is_no_ordinary_file_is_refused(tmp_path: Path) -> None:
    """A folder with the name of an entry, a link to nowhere."""
    (tmp_path / "folder.yml").mkdir()
    (tmp_path / "link.yml").symlink_to("nowhere")
    for name in ("folder.yml", "link.yml"):
        with pytest.raises(CatalogueError, match="no ordinary file"):
            read_document(tmp_path / name)
