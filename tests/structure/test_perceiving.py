"""Bonds, orders and charges from coordinates."""

import csv
from pathlib import Path

import pytest
from ase.build import molecule as ase_molecule
from ase.data.g2 import data as g2

from shapeshelf.errors import StructureError
from shapeshelf.structure.embedding import embed, mmff_covers, relax_mmff
from shapeshelf.structure.perceiving import read_xyz
from shapeshelf.structure.reading import read_smiles
from shapeshelf.structure.writing import write_xyz

DATA = Path(__file__).parent.parent / "data"
SHAPES = sorted(
    {
        row["smiles"]
        for row in csv.DictReader((DATA / "shapes.csv").read_text(encoding="utf-8").splitlines())
    }
)
SEED = 7

# Geometries: the G2/97 set as carried by ASE (ase.data.g2; L. A. Curtiss et al., J. Chem. Phys.
# 106 (1997) 1063, recalled). What they are is said by their descriptions there.
G2_SMILES = {
    "CO": "[C-]#[O+]", "O3": "[O-][O+]=O", "N2O": "N#[N+][O-]", "ClF3": "FCl(F)F", "SO2": "O=S=O",
    "NO2": "O=[N+][O-]", "CH3NO2": "C[N+](=O)[O-]", "C2H6SO": "CS(C)=O", "C6H6": "c1ccccc1",
    "C5H5N": "c1ccncc1", "C4H4NH": "c1cc[nH]c1", "CH3ONO": "CON=O", "bicyclobutane": "C1C2CC12",
    "CH3CO": "C[C]=O", "CH2_s1A1d": "[CH2]", "AlCl3": "Cl[Al](Cl)Cl", "P2": "P#P", "CCH": "C#[C]",
    "C3H9C": "C[C](C)C", "LiF": "[Li]F", "HOCl": "OCl", "CS": "[C]=S", "NCCN": "N#CC#N",
    "C3H4_D2d": "C=C=C", "SiCl4": "Cl[Si](Cl)(Cl)Cl", "H2": "[H][H]", "CH3COOH": "CC(=O)O",
}  # fmt: skip


def xyz_of(name: str) -> str:
    atoms = ase_molecule(name)
    rows = [
        f"{symbol} {x:.6f} {y:.6f} {z:.6f}"
        for symbol, (x, y, z) in zip(atoms.get_chemical_symbols(), atoms.positions, strict=True)
    ]
    return "\n".join([str(len(rows)), name, *rows])


@pytest.mark.parametrize(("name", "smiles"), G2_SMILES.items())
def test_published_geometries_give_their_molecule(name: str, smiles: str) -> None:
    """Bonds, orders and charges come out as the species that the data set names."""
    found, expected = read_xyz(xyz_of(name), name, None, None), read_smiles(smiles)
    assert (found.formula, found.inchikey[:14]) == (expected.formula, expected.inchikey[:14])
    assert sorted(bond.order for bond in found.bonds) == sorted(
        bond.order for bond in expected.bonds
    )


def test_every_geometry_of_the_set_reads() -> None:
    """All of the set are single molecules that satisfy the electron count."""
    for name in g2:
        found = read_xyz(xyz_of(name), name, None, None)
        assert len(found.atoms) == len(ase_molecule(name))


@pytest.mark.parametrize("smiles", SHAPES)
def test_a_written_structure_reads_back_as_itself(smiles: str) -> None:
    """Ions, hypervalent molecules and complexes survive the way through an XYZ file."""
    molecule = read_smiles(smiles)
    points = embed(molecule, 1, SEED)[0]
    if mmff_covers(molecule):
        points, _ = relax_mmff(molecule, points)
    again = read_xyz(write_xyz(molecule, points, "structure"), "structure.xyz", None, None)
    assert again.inchikey == molecule.inchikey
    assert again.charge == molecule.charge
    assert again.classes == molecule.classes


def test_coordinates_are_untouched() -> None:
    """Supplied coordinates stay as the file gives them, to the last digit."""
    text = "3\nwater charge=0 multiplicity=1\nO 0 0 0.119262\nH 0 0.763239 -0.477047\n" + (
        "H 0 -0.763239 -0.477047\n"
    )
    water = read_xyz(text, "water.xyz", None, None)
    assert water.coordinates_angstrom == (
        (0.0, 0.0, 0.119262),
        (0.0, 0.763239, -0.477047),
        (0.0, -0.763239, -0.477047),
    )
    assert water.multiplicity == 1


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("", "line 1 must be the number of atoms"),
        ("x\n\nH 0 0 0", "line 1 must be the number of atoms"),
        ("0\n\n", "holds no atoms"),
        ("2\n\nH 0 0 0", "2 atoms announced, 1 given"),
        ("1\n\nH 0 0 0\nH 0 0 1", "one molecule is wanted"),
        ("1\n\nH 0 0", "an element and three numbers"),
        ("1\n\nH a b c", "line 3 must be an element and three numbers"),
        ("1\n\nQq 0 0 0", "there is no element Qq"),
        ("1\n\nH 0 0 nan", "no sensible coordinates"),
        ("2\n\nH 0 0 0\nH 0 0 0.1", "closer than 0.4"),
        ("2\n\nHe 0 0 0\nHe 0 0 5", "2 separate parts"),
        ("2\ncharge=7\nH 0 0 0\nH 0 0 0.74", "no bond orders fit these atoms with charge 7"),
        ("1001\n\n", "1001 atoms; at most 1000"),
    ],
)
def test_bad_files_are_refused_in_one_line(text: str, message: str) -> None:
    """Whatever is wrong with the file, one line says so."""
    with pytest.raises(StructureError, match=message) as caught:
        read_xyz(text, "file.xyz", None, None)
    assert "\n" not in str(caught.value)


def test_stereochemistry_comes_from_space() -> None:
    """The centre of a chiral molecule is named from its coordinates."""
    alanine = read_smiles("C[C@@H](C(=O)O)N")
    points = embed(alanine, 1, SEED)[0]
    assert read_xyz(write_xyz(alanine, points, ""), "a.xyz", None, None).inchikey == (
        alanine.inchikey
    )
    mirrored = points * [1.0, 1.0, -1.0]
    other = read_xyz(write_xyz(alanine, mirrored, ""), "a.xyz", None, None)
    assert other.inchikey == read_smiles("C[C@H](C(=O)O)N").inchikey
