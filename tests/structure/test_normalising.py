"""One drawing for every spelling, rules N1 to N12."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from rdkit import Chem

from shapeshelf.structure.bridging import to_rdkit
from shapeshelf.structure.hydrogens import fill_hydrogens
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.reading import read_smiles

# Each row: the rule, then spellings of one species; the first is the drawing that is kept.
SPELLINGS = [
    ("N1", ["Cl[Au-](Cl)(Cl)Cl", "[Cl-]->[Au+3](<-[Cl-])(<-[Cl-])<-[Cl-]"]),
    ("N2", ["[NH3+][B-](F)(F)F", "FB(F)(F)<-N", "N->B(F)(F)F"]),
    ("N2", ["[BH3-]C#[O+]", "[BH3]<-[C-]#[O+]"]),
    ("N3", ["N->[Pt](<-N)(Cl)Cl", "[NH3+][Pt-2]([NH3+])(Cl)Cl", "[NH3][Pt]([NH3])(Cl)Cl"]),
    ("N3", ["[O+]#[C-]->[Ni](<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]", "O=C=[Ni](=C=O)(=C=O)=C=O",
            "[O+]#C[Ni-4](C#[O+])(C#[O+])C#[O+]"]),
    ("N4", ["C[N+](=O)[O-]", "CN(=O)=O"]),
    ("N4", ["C[N+](C)(C)[O-]", "CN(C)(C)=O"]),
    ("N4", ["CN=[N+]=[N-]", "CN=N#N", "C[N-][N+]#N"]),
    ("N4", ["[O-][O+]=O", "O=O=O", "O=[O+][O-]"]),
    ("N4", ["[O-][n+]1ccccc1", "O=n1ccccc1"]),
    ("N4", ["O=[N+][O-]", "O=[N]=O", "[O]N=O"]),
    ("N5", ["CS(C)=O", "C[S+](C)[O-]"]),
    ("N5", ["O=S(=O)([O-])[O-]", "[O-][S+2]([O-])([O-])[O-]", "O=[S+]([O-])([O-])[O-]"]),
    ("N5", ["CP(C)(C)=C", "C[P+](C)(C)[CH2-]"]),
    ("N5", ["O=Cl(=O)(=O)[O-]", "[O-][Cl+3]([O-])([O-])[O-]"]),
    ("N5", ["O=[Xe](=O)(=O)=O", "[O-][Xe+4]([O-])([O-])[O-]"]),
    ("N5", ["[O-][N+](=O)[O-]", "[O-][N+2]([O-])[O-]", "[O-]N(=O)=O"]),
    ("N5", ["O=S=O", "[O-][S+]=O", "[O-][S+2][O-]"]),
    ("N6", ["[O-]I(=O)(F)F", "O=[I-](=O)(F)F"]),
    ("N6", ["[O-]S(=O)(=O)[O-]", "O=[S-2](=O)(=O)=O", "O=[S-](=O)(=O)[O-]"]),
    ("N6", ["[O-][Mn](=O)(=O)=O", "O=[Mn-](=O)(=O)=O"]),
    ("N7", ["[O-]C#N", "O=C=[N-]"]),
    ("N7", ["S=C=[N-]", "[S-]C#N"]),
    ("N7", ["N#[N+][O-]", "[N-]=[N+]=O", "N#N=O"]),
    ("N7", ["S=S(=O)([O-])[O-]", "[S-]S(=O)(=O)[O-]"]),
    ("N8", ["O=Cl=O", "O=Cl[O]"]),
    ("N9", ["[C-]#[O+]", "[C]=O"]),
    ("N9", ["C[N+]#[C-]", "CN=[C]", "CN#[C]"]),
    ("N10", ["C=C[O-]", "[CH2-]C=O"]),
    ("N10", ["C=[N+]=[N-]", "[CH2-][N+]#N", "C=N#N"]),
    ("N11", ["Cl[Al-]1(Cl)[Cl+][Al-](Cl)(Cl)[Cl+]1", "Cl[Al]1(Cl)[Cl][Al](Cl)(Cl)[Cl]1",
             "Cl[Al]1(Cl)<-[Cl][Al](Cl)(Cl)<-[Cl]1"]),
    ("N11", ["Cl[I-]1(Cl)[Cl+][I-](Cl)(Cl)[Cl+]1", "Cl[I]1(Cl)[Cl][I](Cl)(Cl)[Cl]1"]),
    ("N11", ["C[Al-]1(C)[NH2+][Al-](C)(C)[NH2+]1", "C[Al]1(C)[NH2][Al](C)(C)[NH2]1"]),
    ("N12", ["[BH2]1[H][BH2][H]1", "[BH2-]1[H+][BH2-][H+]1", "[BH2]1<-[H][BH2]<-[H]1",
             "[H]B1([H])[H]B([H])([H])[H]1"]),
    ("N12", ["C[Al]1(C)[CH3][Al](C)(C)[CH3]1", "C[Al-]1(C)[CH3+][Al-](C)(C)[CH3+]1"]),
    ("N1", ["F[H-]F", "F[H]<-[F-]"]),
    ("Kekulé forms", ["Cc1ccccc1C", "CC1=CC=CC=C1C", "CC1=C(C)C=CC=C1"]),
]  # fmt: skip

# Already the drawing of the chemist: nothing may move.
KEPT = [
    "C[CH+]C", "[CH3-]", "C[P+](C)(C)C", "C[P+](C)(C)[BH3-]", "F[B-](F)(F)F", "C[N+](C)(C)C",
    "C=[N+](C)[O-]", "N#CC#N", "[O-][Cl]", "FS(F)(F)F", "C1=CC=CC=C1", "O=C=O", "[NH3+]CC(=O)[O-]",
    "F[P-](F)(F)(F)(F)F",
]  # fmt: skip

SPECIES = [spelling for _, row in SPELLINGS for spelling in row] + [
    "C[C@H](N)C(=O)O", "C/C=C/C", "F/N=N\\F", "C[S@](=O)CC", "OS(=O)(=O)O", "FI(F)(F)(F)(F)(F)F",
    "c1ccc2[nH]ccc2c1", "CC(=O)[CH-]C(=O)C(F)(F)F", "O=[N+]([O-])c1ccc(N=[N+]=[N-])cc1",
    "OP(=O)(O)OP(=O)(O)O", "C[C@@H]1CCCC[C@H]1O", "[O-]S(=O)(=S)SS(=O)(=O)[O-]",
]  # fmt: skip

SPLIT = [
    "O=S(=O)(O)O", "O=Cl(=O)(=O)O", "CS(C)(=O)=O", "O=P(O)(O)O", "O=[Xe](=O)=O", "N#S(F)(F)F",
    "O=S(=O)(N=S=O)F", "C=P(C)(C)N=P(C)(C)C",
]  # fmt: skip


def identity(molecule: Molecule) -> tuple[str, str | None, str, int]:
    return molecule.smiles, molecule.inchikey, molecule.formula, molecule.charge


@pytest.mark.parametrize(("rule", "spellings"), SPELLINGS)
def test_spellings_of_one_species_give_one_molecule(rule: str, spellings: list[str]) -> None:
    """SMILES, InChIKey, formula and charge do not depend on the spelling."""
    found = {identity(read_smiles(spelling)) for spelling in spellings}
    assert len(found) == 1, rule


@pytest.mark.parametrize(("rule", "spellings"), SPELLINGS)
def test_the_first_spelling_is_the_drawing_kept(rule: str, spellings: list[str]) -> None:
    """Charges and the number of pi bonds are those of the first spelling as written."""
    written = Chem.MolFromSmiles(spellings[0], sanitize=False)
    molecule = read_smiles(spellings[-1])
    heavy = [atom for atom in written.GetAtoms() if atom.GetSymbol() != "H"]
    charges = sorted(atom.GetFormalCharge() for atom in heavy)
    kept = sorted(atom.formal_charge for atom in molecule.atoms if atom.element != "H")
    assert kept == charges, rule


@pytest.mark.parametrize("smiles", KEPT)
def test_ordinary_drawings_stay(smiles: str) -> None:
    """No rule touches a drawing that follows them already."""
    written = Chem.MolFromSmiles(smiles, sanitize=False)
    molecule = read_smiles(smiles)
    assert [atom.formal_charge for atom in molecule.atoms[: written.GetNumAtoms()]] == [
        atom.GetFormalCharge() for atom in written.GetAtoms()
    ]
    assert [bond.order for bond in molecule.bonds[: written.GetNumBonds()]] == [
        int(bond.GetBondTypeAsDouble()) for bond in written.GetBonds()
    ]


@given(st.sampled_from(SPECIES), st.integers(1, 2**31 - 1))
@settings(max_examples=80, deadline=None, derandomize=True)
def test_random_rewritings_change_nothing(smiles: str, seed: int) -> None:
    """Any order of atoms and branches in the SMILES gives the same molecule."""
    molecule = read_smiles(smiles)
    rewritten = Chem.MolToRandomSmilesVect(to_rdkit(molecule), 1, randomSeed=seed)[0]
    assert identity(read_smiles(rewritten)) == identity(molecule)


@given(st.sampled_from(SPECIES), st.randoms(use_true_random=False))
@settings(max_examples=80, deadline=None, derandomize=True)
def test_order_of_the_written_atoms_changes_nothing(smiles: str, random: object) -> None:
    """Spellings that the rules must still change are permuted before they are read."""
    written = Chem.RWMol(Chem.MolFromSmiles(smiles, sanitize=False))
    fill_hydrogens(written)
    order = list(range(written.GetNumAtoms()))
    random.shuffle(order)  # type: ignore[attr-defined]
    shuffled = Chem.RenumberAtoms(written, order)
    permuted = Chem.MolToSmiles(shuffled, canonical=False, allHsExplicit=True)
    assert identity(read_smiles(permuted)) == identity(read_smiles(smiles))


@given(
    st.sampled_from(SPLIT),
    st.lists(st.booleans(), min_size=8, max_size=8),
)
@settings(max_examples=60, deadline=None, derandomize=True)
def test_any_mixture_of_charges_and_multiple_bonds_is_one_species(
    smiles: str, split: list[bool]
) -> None:
    """Multiple bonds of a heavy centre, split into charges at will, come back."""
    mol = Chem.RWMol(to_rdkit(read_smiles(smiles)))
    for bond, chosen in zip(mol.GetBonds(), split * 4, strict=False):
        heavy, light = sorted((bond.GetBeginAtom(), bond.GetEndAtom()), key=_heaviness)[::-1]
        if chosen and bond.GetBondTypeAsDouble() > 1:
            lower = {2.0: Chem.BondType.SINGLE, 3.0: Chem.BondType.DOUBLE}
            bond.SetBondType(lower[bond.GetBondTypeAsDouble()])
            heavy.SetFormalCharge(heavy.GetFormalCharge() + 1)
            light.SetFormalCharge(light.GetFormalCharge() - 1)
    assert identity(read_smiles(Chem.MolToSmiles(mol))) == identity(read_smiles(smiles))


def _heaviness(atom: Chem.Atom) -> int:
    return int(atom.GetAtomicNum())
