"""Where a problem stands and how it is worded."""

from pathlib import Path

import pytest

from shapeshelf.catalogue.model import Entry, StructureInput
from shapeshelf.catalogue.problems import line_of, nearest, one_line, problem_at, quoted, shown

LINES = {"id": 1, "measured": 5, "measured[0]": 6, "measured[2]": 12, "measured[2].value": 14}


@pytest.mark.parametrize(
    ("field", "line"),
    [
        ("id", 1),
        ("measured[2].value", 14),
        ("measured[2].unit", 12),
        ("measured[7].unit", 5),
        ("measured[7]", 5),
        ("formula", 1),
        ("a.b[3].c", 1),
        ("", 1),
        ("x]", 1),
        ("a[", 1),
        (".[.[", 1),
    ],
)
def test_a_field_that_is_absent_takes_the_line_around_it(field: str, line: int) -> None:
    """The nearest thing that is there; the first line of the file in the end."""
    assert line_of(LINES, field) == line


def test_a_problem_found_later_stands_where_its_field_does() -> None:
    """What chemistry finds is addressed like what reading finds."""
    entry = Entry("x", "X", StructureInput("N", None), Path("compounds/x.yml"), lines=LINES)
    problem = problem_at(entry, "measured[2].value", "is wrong")
    assert str(problem) == "compounds/x.yml:14: measured[2].value: is wrong"


def test_files_are_shown_from_the_current_folder(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    """Where they lie below it; else as they were given."""
    (tmp_path / "here").mkdir()
    monkeypatch.chdir(tmp_path / "here")
    assert shown(tmp_path / "here" / "a.yml") == Path("a.yml")
    assert shown(tmp_path / "b.yml") == tmp_path / "b.yml"
    assert shown(Path("c/d.yml")) == Path("c/d.yml")
    assert str(shown(Path("\udcff.yml"))) == "\ufffd.yml"


def test_a_message_is_one_line_whatever_it_quotes() -> None:
    """Line breaks and escape sequences are written out, long texts cut."""
    assert one_line("a\nb\x1b[2Jc\u2028d") == "a\\nb\\x1b[2Jc\\u2028d"
    assert quoted("a" * 61) == "`" + "a" * 60 + "…`"
    assert quoted(True) == "`true`"


@pytest.mark.parametrize(
    ("word", "right", "expected"),
    [
        ("start_here", ["start-here", "tags"], "; did you mean `start-here`?"),
        ("Start Here", ["start-here", "tags"], "; did you mean `start-here`?"),
        ("degre", ["degree", "debye"], "; did you mean `degree`?"),
        ("zzz", ["a", "b"], "; right would be one of: a, b"),
        ("zzz", [], ""),
        ("zzz", [f"word{number}" for number in range(21)], ""),
    ],
)
def test_the_nearest_right_word(word: str, right: list[str], expected: str) -> None:
    """A near miss gets its suggestion, else all choices if they are few."""
    assert nearest(word, right) == expected
