"""A catalogue folder made on the spot, and the lines that reading it gives."""

from collections.abc import Callable
from pathlib import Path

import pytest

from shapeshelf.catalogue.reading import read_catalogue
from shapeshelf.errors import CatalogueError

SOURCES = """
crc:
  title: Handbook
  authors: A. Nobody
  year: 2001
  kind: recalled
  where: An invented press
"""


@pytest.fixture
def make_catalogue(tmp_path: Path) -> Callable[[dict[str, str]], Path]:
    """Return a function that writes files, by their path, into a catalogue folder."""

    def make(files: dict[str, str]) -> Path:
        root = tmp_path / "compounds"
        for name, text in {"sources.yml": SOURCES, **files}.items():
            file = root / name
            file.parent.mkdir(parents=True, exist_ok=True)
            file.write_text(text, encoding="utf-8")
        return root

    return make


@pytest.fixture
def problem_lines() -> Callable[[Path], list[str]]:
    """Return a function that gives each problem of a catalogue, with the file's bare name."""

    def lines(root: Path) -> list[str]:
        with pytest.raises(CatalogueError) as caught:
            read_catalogue(root)
        return [
            f"{problem.file.name}:{problem.line}: {problem.field}: {problem.message}"
            for problem in caught.value.problems
        ]

    return lines
