"""The lists beside the entries: sources and protocols."""

from collections.abc import Callable
from pathlib import Path

import pytest

Make = Callable[[dict[str, str]], Path]
Lines = Callable[[Path], list[str]]


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
def test_sources_that_are_refused(
    text: str, expected: str, make_catalogue: Make, problem_lines: Lines
) -> None:
    """Each with the line of its field."""
    lines = problem_lines(make_catalogue({"sources.yml": text}))
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
def test_protocols_that_are_refused(
    tmp_path: Path, text: str, expected: str, make_catalogue: Make, problem_lines: Lines
) -> None:
    """The document must be there, and below the catalogue."""
    (tmp_path / "secret.md").write_text("secret")
    lines = problem_lines(make_catalogue({"protocols.yml": text}))
    assert any(line.startswith(f"protocols.yml:1: {expected}") for line in lines)
