"""Files for other programs."""

import pytest
from rdkit import Chem

from shapeshelf.structure.embedding import embed
from shapeshelf.structure.reading import read_smiles
from shapeshelf.structure.writing import write_sdf, write_xyz

SEED = 3
KEYED = ["CCO", "FS(F)(F)F", "FCl(F)F", "[O-][N+](=O)[O-]", "C[C@@H](C(=O)O)N", "O=S(=O)(O)O",
         "c1ccncc1", "F/N=N\\F", "O=Cl=O", "[CH3]", "F[Xe](F)(F)F",
         "[Ni](<-[C-]#[O+])(<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]", "[BH3]<-[NH3]"]  # fmt: skip


@pytest.mark.parametrize("smiles", KEYED)
def test_rdkit_reads_the_same_inchikey(smiles: str) -> None:
    """A record read by the reference library has the key we print."""
    molecule = read_smiles(smiles)
    record = write_sdf(molecule, embed(molecule, 1, SEED)[0], "title", {"code": "A-1"})
    mol = Chem.MolFromMolBlock(record, sanitize=False, removeHs=False)
    assert Chem.MolToInchiKey(mol) == molecule.inchikey


def test_titles_and_fields_cannot_break_a_record() -> None:
    """Line breaks and record ends in a title or a field are folded."""
    water = read_smiles("O")
    record = write_sdf(
        water, embed(water, 1, SEED)[0], "a\n$$$$\nb", {"no\ntes> <x": "one\n\n$$$$\ntwo", "n": 3}
    )
    supplier = Chem.SDMolSupplier()
    supplier.SetData(record)
    (mol,) = list(supplier)
    assert mol.GetProp("_Name") == "a b"
    assert mol.GetPropsAsDict() == {"no tes x": "one two", "n": 3}


def test_xyz_states_charge_and_multiplicity() -> None:
    """What the coordinates cannot tell stands on the second line."""
    oxygen = read_smiles("O=O", multiplicity=3)
    lines = write_xyz(oxygen, [(0, 0, 0), (0, 0, 1.2075)], "dioxygen\nX").splitlines()
    assert lines[:2] == ["2", "dioxygen X charge=0 multiplicity=3"]
    assert lines[3].split() == ["O", "0.00000000", "0.00000000", "1.20750000"]
    assert len(lines) == 4
