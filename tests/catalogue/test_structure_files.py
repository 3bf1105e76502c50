"""The files that hold a structure: beside the entry, below the catalogue, of a known kind."""

from collections.abc import Callable
from pathlib import Path

import pytest

from shapeshelf.catalogue.model import StructureInput
from shapeshelf.catalogue.reading import read_catalogue, read_catalogue_with_problems

Make = Callable[[dict[str, str]], Path]
Lines = Callable[[Path], list[str]]


def test_structure_files(make_catalogue: Make) -> None:
    """Relative to the entry, below the catalogue, of a known kind."""
    entry = "id: x\nname: X\nstructure: {file: ../xyz/x.XYZ, charge: -1}\n"
    root = make_catalogue({"a/x.yml": entry, "xyz/x.XYZ": "1\n\nXe 0 0 0\n"})
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
def test_structure_files_that_are_refused(
    tmp_path: Path, name: str, message: str, make_catalogue: Make, problem_lines: Lines
) -> None:
    """What lies outside is refused whether it exists or not; links are followed first."""
    root = make_catalogue({"x.yml": f"id: x\nname: X\nstructure: {{file: {name}}}\n"})
    (tmp_path / "secret.xyz").write_text("secret")
    (root / "x.cif").write_text("")
    (root / "big.xyz").write_text("x" * (1024 * 1024 + 1))
    (root / "folder.xyz").mkdir()
    (root / "sub").mkdir()
    (root / "link.xyz").symlink_to(tmp_path / "secret.xyz")
    (root / "loop.xyz").symlink_to("loop.xyz")
    lines = problem_lines(root)
    assert all(line.startswith("x.yml:3: structure.file: ") for line in lines)
    assert any(message in line for line in lines)


@pytest.mark.parametrize(
    "structure", ["{}", "{smiles: N, file: a.xyz}", "{file: absent.xyz}", "{charge: 1}", "[N]"]
)
def test_an_entry_without_a_right_structure_is_left_out(
    structure: str, make_catalogue: Make
) -> None:
    """Nothing later is to trip over it."""
    root = make_catalogue({"a.yml": f"id: a\nname: A\nstructure: {structure}\n"})
    catalogue, problems = read_catalogue_with_problems(root)
    assert catalogue.entries == ()
    assert {problem.line for problem in problems} == {3}
