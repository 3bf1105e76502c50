"""SMILES in, one molecule or one clear line out."""

import csv
from pathlib import Path

import pytest

from shapeshelf.catalogue.model import StructureInput
from shapeshelf.errors import StructureError
from shapeshelf.structure.reading import read_argument, read_smiles, read_structure

DATA = Path(__file__).parent.parent / "data"
TABLES = ("shapes.csv", "angles.csv", "dipoles.csv")
ALL_SMILES = sorted(
    {
        row["smiles"]
        for table in TABLES
        for row in csv.DictReader((DATA / table).read_text(encoding="utf-8").splitlines())
    }
)

# InChIKeys as PubChem lists them, read from the identifier tables of the PyPI package chemicals.
INCHIKEYS = {
    "O": "XLYOFNOQVPJJNP-UHFFFAOYSA-N",
    "CCO": "LFQSCWFLJHTTHZ-UHFFFAOYSA-N",
    "c1ccccc1": "UHOVQNZJYSORNB-UHFFFAOYSA-N",
    "C[C@@H](C(=O)O)N": "QNAYBMKLOCPYGJ-REOHCLBHSA-N",
    "FS(F)(F)(F)(F)F": "SFZCNBIFKDRMGX-UHFFFAOYSA-N",
    "CS(=O)C": "IAZDPXIOMUYVGZ-UHFFFAOYSA-N",
}

REFUSED = [
    ("", "the SMILES is empty"),
    ("   ", "the SMILES is empty"),
    ("C.C", "2 separate parts; one molecule or ion at a time"),
    ("[Na+].[Cl-]", "2 separate parts"),
    ("*C", "atom 0 is a wildcard"),
    ("C$C", "is quadruple"),
    ("C~C", "is unspecified"),
    ("[Xx]", "there is no element Xx"),
    ("[Lv]", "beyond curium"),
    ("C(", "round brackets do not pair"),
    ("[C", "square bracket is not closed"),
    ("C1CC", "ring bond 1 is not closed"),
    ("C C", "it contains a space"),
    ("日本", "has no meaning"),
    ("Zz", "its syntax is wrong"),
    ("CC(C)(C)(C)C", r"atom 1 \(C\) has bonds of total order 5"),
    ("[CH5]", r"atom 0 \(C\) has bonds of total order 5"),
    ("CN(C)(C)C", "a charge may be missing"),
    ("F=F", "9 electrons around it"),
    ("[O-3]", "9 electrons around it"),
    ("[Na-9]", "more electrons than it can hold"),
    ("[H][H][H]", "hydrogen takes one single bond"),
    ("F[H]F", "hydrogen takes one single bond"),
    ("[BH3]1[H][BH3][H]1", "takes 2 more electrons than it has"),
    ("C->[Fe]", "a lone pair that it does not have"),
    ("c1cccc1", "no arrangement of double bonds"),
    ("C" * 400, "1202 atoms; at most 1000"),
    ("C" * 20_001, "20001 characters"),
]


@pytest.mark.parametrize("smiles", ALL_SMILES)
def test_every_reference_structure_reads_and_reads_back(smiles: str) -> None:
    """The canonical SMILES of a molecule gives the same molecule again."""
    molecule = read_smiles(smiles)
    again = read_smiles(molecule.smiles)
    assert (again.smiles, again.inchikey, again.formula) == (
        molecule.smiles,
        molecule.inchikey,
        molecule.formula,
    )


@pytest.mark.parametrize(("smiles", "key"), INCHIKEYS.items())
def test_inchikey_is_the_published_one(smiles: str, key: str) -> None:
    """Normalising does not move a compound off its published key."""
    assert read_smiles(smiles).inchikey == key


@pytest.mark.parametrize(("smiles", "message"), REFUSED)
def test_bad_input_is_refused_in_one_line(smiles: str, message: str) -> None:
    """Every refusal is a StructureError of one line that says what is wrong."""
    with pytest.raises(StructureError, match=message) as caught:
        read_smiles(smiles)
    assert "\n" not in str(caught.value)


def test_refusals_print_nothing(capfd: pytest.CaptureFixture[str]) -> None:
    """What RDKit thinks of bad input does not reach the user."""
    for smiles, message in REFUSED:
        with pytest.raises(StructureError, match=message):
            read_smiles(smiles)
    assert capfd.readouterr() == ("", "")


def test_atoms_stand_in_the_order_of_the_smiles() -> None:
    """Heavy atoms keep their order; added hydrogens follow, in the order of their atoms."""
    molecule = read_smiles("OC[2H]")
    assert [(a.element, a.isotope) for a in molecule.atoms] == [
        ("O", 0),
        ("C", 0),
        ("H", 2),
        ("H", 0),
        ("H", 0),
        ("H", 0),
    ]
    assert molecule.neighbours(0) == (1, 3)


@pytest.mark.parametrize(
    ("smiles", "hydrogens"),
    # OpenSMILES specification 1.0, organic subset and bracket atoms (recalled).
    [("C", 4), ("[C]", 0), ("[CH2]", 2), ("P", 3), ("CS(C)=O", 6), ("FI(F)F", 0), ("c1cc[nH]c1", 5),
     ("B", 3), ("[NH4+]", 4), ("FP(F)(F)(F)F", 0), ("OS(O)(=O)=O", 2), ("Cn1cccc1", 7)],
)  # fmt: skip
def test_hydrogens_follow_the_rules_of_smiles(smiles: str, hydrogens: int) -> None:
    """Atoms without brackets are filled, atoms in brackets are taken as written."""
    elements = [atom.element for atom in read_smiles(smiles).atoms]
    assert elements.count("H") == hydrogens


def test_stated_charge_and_multiplicity_are_checked() -> None:
    """A charge must be that of the drawing, a multiplicity must fit the electrons."""
    assert read_smiles("O=O", 0, 3).multiplicity == 3
    with pytest.raises(StructureError, match="charge 1 is stated, but the structure has 0"):
        read_smiles("O", charge=1)
    with pytest.raises(StructureError, match="multiplicity 2 does not fit 10 electrons"):
        read_smiles("O", multiplicity=2)


def test_structure_field_and_argument(tmp_path: Path) -> None:
    """A structure comes as a SMILES or a file; an argument that names a file is one."""
    file = tmp_path / "water.xyz"
    file.write_text("3\nwater\nO 0 0 0.119\nH 0 0.763 -0.477\nH 0 -0.763 -0.477\n")
    from_file = read_structure(StructureInput(smiles=None, file=file))
    assert from_file.inchikey == read_argument("O").inchikey
    assert read_argument(str(file)) == from_file
    with pytest.raises(StructureError, match=r"absent\.xyz: No such file"):
        read_argument(str(tmp_path / "absent.xyz"))
    with pytest.raises(StructureError, match="neither a SMILES nor a file"):
        read_structure(StructureInput(smiles=None, file=None))
