from rdkit import Chem

from shapeshelf.pages.structure_files import sdf_text, xyz_text
from shapeshelf.report.model import CompoundReport

ANGSTROM = 5e-5
"""Half the last decimal that a V2000 record holds."""


def test_xyz_is_read_by_a_reference_reader(sf4: CompoundReport) -> None:
    """RDKit finds the atoms and coordinates that the report holds."""
    molecule = Chem.MolFromXYZBlock(xyz_text(sf4))
    assert [atom.GetSymbol() for atom in molecule.GetAtoms()] == ["F", "S", "F", "F", "F"]
    assert abs(molecule.GetConformer().GetAtomPosition(0).y - 1.642) < ANGSTROM


def test_sdf_is_read_by_a_reference_reader(sf4: CompoundReport) -> None:
    """RDKit finds atoms, bonds, coordinates and data items in the record."""
    supplier = Chem.SDMolSupplier()
    supplier.SetData(sdf_text(sf4), sanitize=False, removeHs=False)
    (molecule,) = list(supplier)
    bonds = [(b.GetBeginAtomIdx(), b.GetEndAtomIdx()) for b in molecule.GetBonds()]
    assert bonds == [(1, 0), (1, 2), (1, 3), (1, 4)]
    assert abs(molecule.GetConformer().GetAtomPosition(2).z + 0.97) < ANGSTROM
    assert molecule.GetProp("CAS") == "7783-60-0"
    assert molecule.GetProp("POINT_GROUP") == "C2v"


def test_a_name_with_line_breaks_cannot_add_a_record(sf4: CompoundReport, renamed) -> None:
    """The name stays one line, whatever the entry says."""
    hostile = renamed(sf4, name="x\n$$$$\ny")
    text = sdf_text(hostile)
    assert [line for line in text.splitlines() if line == "$$$$"] == ["$$$$"]
    assert len(xyz_text(hostile).splitlines()) == 7
