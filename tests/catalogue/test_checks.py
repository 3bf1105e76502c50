"""What one field of an entry may hold, and what entries may not share."""

from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from shapeshelf.catalogue.fields import EntryFields, MeasuredFields, StructureFields
from shapeshelf.catalogue.reading import read_catalogue, read_catalogue_with_problems
from shapeshelf.errors import CatalogueError

HEAD = "id: x\nname: X\nstructure: N\n"
MEASURED = (
    HEAD
    + """\
measured:
- quantity: {}
  of: {}
  value: {}
  unit: {}
  source: s
  uncertainty: {}
"""
)
SOURCES = "s: {title: T, authors: A, year: 1999, kind: read}\n"


def _problems(folder: Path, *texts: str) -> list[str]:
    root = folder / "compounds"
    root.mkdir(exist_ok=True)
    (root / "sources.yml").write_text(SOURCES)
    for number, text in enumerate(texts):
        (root / f"{number}.yml").write_text(text, encoding="utf-8")
    try:
        read_catalogue(root)
    except CatalogueError as error:
        return [f"{p.file.name}:{p.line}: {p.field}: {p.message}" for p in error.problems]
    return []


@pytest.mark.parametrize(
    ("line", "expected"),
    [
        ("start_here: a", "start_here: unknown field; did you mean `start-here`?"),
        ("used in: [a]", "used in: unknown field; did you mean `used-in`?"),
        ("Notes: a", "Notes: unknown field; did you mean `notes`?"),
        ("mesured: []", "mesured: unknown field; did you mean `measured`?"),
        ("date: 2024-01-31", "date: unknown field; right would be one of: id, formerly, name, "),
        ("code: 42", "code: `42` is not read as a text; put it in quotes"),
        ("code: true", "code: `true` is not read as a text; put it in quotes"),
        ("code: 1.5", "code: `1.5` is not read as a text; put it in quotes"),
        ("notes:", "notes: is empty; give a value or delete the line"),
        ("notes: ''", "notes: is empty; give a value or delete the line"),
        ("notes: '  '", "notes: is empty; give a value or delete the line"),
        ("tags:", "tags: is empty; give a value or delete the line"),
        ("tags: gas", "tags: `gas` is no list; right would be [gas]"),
        ("tags: [gas, '']", "tags[1]: is empty; give a value or delete the line"),
        ("kept: {a: b}", "kept: is a group of fields where a text is wanted"),
        ('kept: "a\\nb"', "kept: runs over several lines; it must stand in one"),
        ('kept: "a\\eb"', "kept: `a\\x1bb` holds a control character; delete it"),
        (f"kept: {'k' * 301}", "kept: is longer than 300 characters"),
        ("hazards: [h330]", "hazards[0]: `h330` is no H-code of the GHS; did you mean `H330`?"),
        ("hazards: [H300 + H310]", "did you mean `H300+H310`?"),
        ("hazards: [EUH014]", "hazards[0]: `EUH014` is not one of the GHS; put it in `notes`"),
        ("cas: 75-10-5-1", "cas: `75-10-5-1` is no CAS number"),
        ("used-in: [p1]", "used-in[0]: `p1` is not in protocols.yml; add it there"),
        ("formerly: [x]", "formerly[0]: the id `x` is taken in "),
        ("formerly: [con]", "formerly[0]: `con` is reserved; choose another id"),
        ("also: [x]", "also[0]: the name `x` is taken in "),
        ("measured: [5]", "measured[0]: `5` is a number where a group of fields is wanted"),
    ],
)
def test_one_slip_one_line(tmp_path: Path, line: str, expected: str) -> None:
    """With the line of the field and what would be right."""
    (problem,) = _problems(tmp_path, HEAD + line)
    assert problem.startswith("0.yml:4: ")
    assert expected in problem


@pytest.mark.parametrize(
    "key", ["SF4", "sf_4", "sf4-", "-sf4", "s--f", "sf 4", "é", "a/b", "..", "x" * 65]
)
def test_ids_that_are_no_address(tmp_path: Path, key: str) -> None:
    """Lower-case letters, digits and single hyphens."""
    (problem,) = _problems(tmp_path, f"id: '{key}'\nname: X\nstructure: N\n")
    assert problem.startswith("0.yml:1: id: ")


@pytest.mark.parametrize("key", ["index", "records", "nul", "com1"])
def test_reserved_ids(tmp_path: Path, key: str) -> None:
    """Addresses of the site itself, and names no folder can bear everywhere."""
    (problem,) = _problems(tmp_path, f"id: {key}\nname: X\nstructure: N\n")
    assert "is reserved" in problem


@pytest.mark.parametrize(
    ("quantity", "label", "value", "unit", "uncertainty"),
    [
        ("angle", "F(ax)-S-F(ax)", "180", "degree", "0"),
        ("angle", "O(=)-S1-O(-)", "110.5", "degree", "0.1"),
        ("length", "S-F(ax)", "1.64", "angstrom", "0.003"),
        ("dipole", "all", "0", "debye", "0.01"),
        ("frequency", "nu1", "892", "1/cm", "1"),
    ],
)
def test_measured_values_that_are_taken(
    tmp_path: Path, quantity: str, label: str, value: str, unit: str, uncertainty: str
) -> None:
    """Up to the bounds; a hyphen in brackets joins nothing."""
    assert _problems(tmp_path, MEASURED.format(quantity, label, value, unit, uncertainty)) == []


@pytest.mark.parametrize(
    ("quantity", "label", "value", "unit", "uncertainty", "expected"),
    [
        ("angle", "F-S-F", "180.1", "degree", "1", "7: measured[0].value: 180.1 lies outside"),
        ("angle", "F-S-F", "0", "degree", "1", "7: measured[0].value: 0 lies outside"),
        ("length", "S-F", "164", "angstrom", "1", "7: measured[0].value: 164 lies outside"),
        ("dipole", "all", "-1", "debye", "1", "7: measured[0].value: -1 lies outside"),
        ("frequency", "nu1", "5001", "1/cm", "1", "7: measured[0].value: 5001 lies outside"),
        ("angle", "F-S-F", "1.5", "rad", "1", "8: measured[0].unit: `rad` is no unit for angle"),
        ("dipole", "all", "1", "degree", "1", "8: measured[0].unit: `degree` is no unit"),
        ("angel", "F-S-F", "90", "degree", "1", "5: measured[0].quantity: `angel` is no quantity"),
        ("angle", "F-S", "90", "degree", "1", "6: measured[0].of: `F-S` does not join 3 atoms"),
        ("angle", "F-S-", "90", "degree", "1", "6: measured[0].of: `F-S-` does not join 3 atoms"),
        ("length", "S-F-S", "1", "angstrom", "1", "6: measured[0].of: `S-F-S` does not join 2"),
        ("length", "s-f", "1", "angstrom", "1", "6: measured[0].of: `s-f` does not join 2 atoms"),
        ("length", "S–F", "1", "angstrom", "1", "6: measured[0].of: `S–F` holds a dash"),
        ("angle", "F-S-F", "90", "degree", "-1", "10: measured[0].uncertainty: `-1` is too small"),
        ("angle", "F-S-F", "'90'", "degree", "1", "7: measured[0].value: `90` is a text where a"),
        ("angle", "F-S-F", "true", "degree", "1", "7: measured[0].value: `true` is a truth value"),
        ("angle", "F-S-F", "1e999", "degree", "1", "7: measured[0].value: `inf` is no finite"),
        ("angle", "F-S-F", ".nan", "degree", "1", "7: measured[0].value: `.nan` is a text where"),
    ],
)  # fmt: skip
def test_measured_values_that_are_refused(
    tmp_path: Path,
    quantity: str,
    label: str,
    value: str,
    unit: str,
    uncertainty: str,
    expected: str,
) -> None:
    """Unit, range, label and uncertainty, each at its own line."""
    (problem,) = _problems(tmp_path, MEASURED.format(quantity, label, value, unit, uncertainty))
    assert problem.startswith(f"0.yml:{expected}")


@pytest.mark.parametrize("quantity", ["angle", "length"])
def test_an_angle_and_a_length_need_their_label(tmp_path: Path, quantity: str) -> None:
    """The problem stands at the line of the value it belongs to."""
    text = MEASURED.format(quantity, "A", 2, {"angle": "degree", "length": "angstrom"}[quantity], 0)
    (problem,) = _problems(tmp_path, text.replace("  of: A\n", ""))
    assert problem.startswith(f"0.yml:5: measured[0].of: is missing: which {quantity}?")


@pytest.mark.parametrize(
    ("first", "second", "expected"),
    [
        ("id: a\nname: A", "id: a\nname: B", "1.yml:1: id: the id `a` is taken in "),
        ("id: a\nname: A", "id: b\nformerly: [a]\nname: B", "1.yml:2: formerly[0]: the id `a`"),
        ("id: a\nname: A\nformerly: [b]", "id: b\nname: B", "1.yml:1: id: the id `b` is taken"),
        ("id: a\nname: Iron  oxide", "id: b\nname: iron oxide", "1.yml:2: name: the name"),
        ("id: a\nname: A\nalso: [B]", "id: b\nname: b", "1.yml:2: name: the name `b` is taken"),
        ("id: a\nname: A", "id: b\nname: B\nalso: [c, a]", "1.yml:3: also[1]: the name `a` is"),
    ],
)
def test_ids_and_names_stand_once(tmp_path: Path, first: str, second: str, expected: str) -> None:
    """Past and present ids share one space, names and other names another; case is no matter."""
    texts = (f"{text}\nstructure: N\n" for text in (first, second))
    (problem,) = _problems(tmp_path, *texts)
    assert problem.startswith(expected)
    assert "0.yml:" in problem


def test_every_repetition_names_the_first_place(tmp_path: Path) -> None:
    """A third entry of one id points to the first, not to the second."""
    texts = (f"id: a\nname: {name}\nstructure: N\n" for name in "ABC")
    second, third = _problems(tmp_path, *texts)
    assert (second[:5], third[:5]) == ("1.yml", "2.yml")
    assert all("0.yml:1" in problem for problem in (second, third))


FIELDS = [
    field.alias or name
    for model in (EntryFields, StructureFields, MeasuredFields)
    for name, field in model.model_fields.items()
]
WORDS = ["~", "12", "-1.5", "true", "''", "'a'", "N", "angle", "degree", "H330", "s", "..", "é"]
SIGNS = [*"[]{},#%&*!\\\"'\0\t\n\u2028\u202e", ": ", "- ", "\n  ", "&a ", "*a", "!!int "]


@pytest.fixture(scope="module")
def folder(tmp_path_factory: pytest.TempPathFactory) -> Path:
    return tmp_path_factory.mktemp("catalogue")


@settings(max_examples=150, deadline=None)
@given(text=st.lists(st.sampled_from([*FIELDS, *WORDS, *SIGNS]), max_size=40).map("".join))
def test_no_text_makes_reading_fail_otherwise(folder: Path, text: str) -> None:
    """Whatever stands in the files, reading ends in entries and one-line problems."""
    for name in ("a.yml", "sources.yml", "protocols.yml"):
        (folder / name).write_text(text, encoding="utf-8")
    problems = read_catalogue_with_problems(folder)[1]
    assert all("\n" not in str(problem) and problem.line >= 1 for problem in problems)


VALUES = st.recursive(
    st.sampled_from(WORDS),
    lambda inner: st.one_of(
        st.lists(inner, max_size=3).map(lambda items: f"[{', '.join(items)}]"),
        st.dictionaries(st.sampled_from(FIELDS), inner, max_size=4).map(
            lambda items: "{" + ", ".join(f"{key}: {items[key]}" for key in items) + "}"
        ),
    ),
    max_leaves=12,
)


@settings(max_examples=150, deadline=None)
@given(fields=st.dictionaries(st.sampled_from(FIELDS), VALUES, min_size=1, max_size=8))
def test_no_value_makes_reading_fail_otherwise(folder: Path, fields: dict[str, str]) -> None:
    """Any value in any field: an entry, or a problem that names a line of its file."""
    text = "".join(f"{name}: {value}\n" for name, value in fields.items())
    for name in ("sources.yml", "protocols.yml"):
        (folder / name).write_text("s: {title: T}\n", encoding="utf-8")
    (folder / "a.yml").write_text(text, encoding="utf-8")
    problems = read_catalogue_with_problems(folder)[1]
    found = [problem.line for problem in problems if problem.file.name == "a.yml"]
    assert {"id", "name", "structure"} <= fields.keys() or found
    assert all(1 <= line <= len(fields) for line in found)
