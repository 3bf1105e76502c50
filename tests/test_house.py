"""The plan of the house: imports run down the list of rooms, and each tongue has one room."""

import ast
from collections.abc import Iterator
from pathlib import Path

import pytest

SOURCE = Path(__file__).parents[1] / "generator" / "shapeshelf"
ROOMS = (
    "errors",
    "reference",
    "catalogue",
    "structure",
    "domains",
    "geometry",
    "properties",
    "calculation",
    "report",
    "figures",
    "pages",
    "linking",
    "plugin",
    "cli",
)
SPOKEN_ONLY_IN = {
    "rdkit": {"structure"},
    "matplotlib": {"figures"},
    "mkdocs": {"plugin"},
    "jinja2": {"pages"},
    "markupsafe": {"pages"},
    "yaml": {"catalogue"},
    "pydantic": {"catalogue", "calculation"},  # the two rooms that read files from outside
    "pyscf": {"calculation"},
    "tblite": {"calculation"},
    "distributed": {"calculation"},
    "segno": {"linking"},
}
FILES = sorted(path for path in SOURCE.rglob("*.py") if path.parent != SOURCE or path.stem in ROOMS)


def room_of(path: Path) -> str:
    return path.relative_to(SOURCE).parts[0].removesuffix(".py")


def imported(path: Path) -> Iterator[str]:
    """Yield the full name of every module the file imports, wherever the import stands."""
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            assert node.level == 0, f"{path}: relative import"
            yield node.module or ""


def test_every_room_stands_on_the_plan():
    """A new room is placed in the order before it is built."""
    found = {room_of(path) for path in SOURCE.rglob("*.py") if path.name != "__init__.py"}
    assert found <= set(ROOMS)


@pytest.mark.parametrize("path", FILES, ids=lambda path: str(path.relative_to(SOURCE)))
def test_imports_run_down_the_list(path):
    """A room uses itself and the rooms above it, never those below."""
    own = ROOMS.index(room_of(path))
    for module in imported(path):
        if module.startswith("shapeshelf."):
            assert ROOMS.index(module.split(".")[1]) <= own, f"{path.name} imports {module}"


@pytest.mark.parametrize("path", FILES, ids=lambda path: str(path.relative_to(SOURCE)))
def test_each_library_is_spoken_in_its_room_only(path):
    """RDKit, matplotlib, mkdocs and the rest each have one room that knows them."""
    for module in imported(path):
        allowed = SPOKEN_ONLY_IN.get(module.split(".")[0])
        assert allowed is None or room_of(path) in allowed, f"{path.name} imports {module}"
