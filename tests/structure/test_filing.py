"""MOL and SDF files."""

from pathlib import Path

import pytest
from rdkit import Chem

from shapeshelf.errors import StructureError
from shapeshelf.structure.embedding import embed
from shapeshelf.structure.filing import read_file
from shapeshelf.structure.reading import read_smiles
from shapeshelf.structure.writing import write_sdf

SPECIES = ["FCl(F)F", "C[C@@H](C(=O)O)N", "[O-]S(=O)(=O)[O-]", "[CH2]", "C/C=C\\C", "[CH3]",
           "O=[Xe](=O)(=O)=O", "N->[Pt](<-N)(Cl)Cl", "FB(F)(F)<-N", "[2H]O[2H]"]  # fmt: skip
SEED = 5


@pytest.mark.parametrize("smiles", SPECIES)
@pytest.mark.parametrize("ending", [".sdf", ".mol"])
def test_a_written_record_reads_back_as_itself(smiles: str, ending: str, tmp_path: Path) -> None:
    """A three-dimensional record keeps structure, stereochemistry, isotopes and coordinates."""
    molecule = read_smiles(smiles)
    points = embed(molecule, 1, SEED)[0]
    file = tmp_path / f"record{ending}"
    file.write_text(write_sdf(molecule, points, "title"), encoding="utf-8")
    again = read_file(file)
    assert (again.inchikey, again.formula) == (molecule.inchikey, molecule.formula)
    assert again.coordinates_angstrom is not None
    largest = max(
        abs(a - b)
        for row, point in zip(again.coordinates_angstrom, points, strict=True)
        for a, b in zip(row, point, strict=True)
    )
    # MOL files hold four decimals.
    assert largest <= 0.5001e-4


def test_a_flat_drawing_has_no_coordinates(tmp_path: Path) -> None:
    """A two-dimensional MOL file gives hydrogens by valence and no structure."""
    file = tmp_path / "flat.mol"
    file.write_text(Chem.MolToMolBlock(Chem.MolFromSmiles("CC(=O)O")))
    molecule = read_file(file)
    assert molecule.coordinates_angstrom is None
    assert molecule.inchikey == read_smiles("CC(=O)O").inchikey


@pytest.mark.parametrize(
    ("name", "content", "message"),
    [
        ("a.pdb", b"", r"\.xyz, \.mol and \.sdf files can be read"),
        ("a.mol", b"", "not a readable MOL file"),
        ("a.mol", b"nonsense\n" * 20, "not a readable MOL file"),
        ("a.sdf", b"\xff\xfe\x00", "not a text file in UTF-8"),
        ("a.sdf", b"x" * 2_000_001, "larger than 2000000 bytes"),
    ],
)
def test_bad_files_are_refused(name: str, content: bytes, message: str, tmp_path: Path) -> None:
    """A file that cannot be read is refused by its name."""
    (tmp_path / name).write_bytes(content)
    with pytest.raises(StructureError, match=message):
        read_file(tmp_path / name)


def test_an_sdf_of_two_records_is_refused(tmp_path: Path) -> None:
    """One file, one molecule."""
    water = read_smiles("O")
    record = write_sdf(water, embed(water, 1, SEED)[0], "water")
    (tmp_path / "two.sdf").write_text(record * 2)
    with pytest.raises(StructureError, match="2 records; one molecule is wanted"):
        read_file(tmp_path / "two.sdf")


def test_missing_hydrogens_in_space_are_refused(tmp_path: Path) -> None:
    """Coordinates for some of the atoms are no structure."""
    bare = Chem.MolFromSmiles("CCO")
    full = Chem.AddHs(bare)
    conformer = Chem.Conformer(3)
    conformer.Set3D(True)
    for index, point in enumerate([(0.0, 0.0, 0.0), (1.5, 0.0, 0.1), (2.0, 1.4, 0.3)]):
        conformer.SetAtomPosition(index, point)
    bare.AddConformer(conformer)
    (tmp_path / "bare.mol").write_text(Chem.MolToMolBlock(bare))
    missing = full.GetNumAtoms() - bare.GetNumAtoms()
    with pytest.raises(StructureError, match=f"{missing} hydrogens have no coordinates"):
        read_file(tmp_path / "bare.mol")
