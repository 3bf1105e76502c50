"""The whole report belongs to the molecule: not to its spelling, nor to the order of its atoms."""

import random

import pytest
from rdkit import Chem

from shapeshelf.report.building import report_on_structure
from shapeshelf.structure.bridging import to_rdkit
from shapeshelf.structure.reading import read_smiles

ANGLE_TOLERANCE_DEGREES = 0.1
"""A tenth is what the pages print."""
DIPOLE_TOLERANCE_DEBYE = 0.02
"""A tenth of the smallest uncertainty that the dipole model claims."""
SEED = 7

MOLECULES = [
    "FS(F)(F)F",
    "FCl(F)F",
    "O=S(F)(F)(F)F",
    "FP(F)(F)(Cl)Cl",
    "FS(F)(F)(F)(F)Cl",
    "FS(F)(F)(F)(F)S(F)(F)(F)(F)F",
    "O=[Xe](F)(F)(F)F",
    "F[Xe](F)(F)(F)(F)F",
    "FI(F)(F)(F)(F)(F)F",
    "O=Cl(F)(F)F",
    "OO",
    "NN",
    "FSSF",
    "FN(F)N(F)F",
    "O=[N+]([O-])[N+](=O)[O-]",
    "O=N[N+](=O)[O-]",
    "O[N+](=O)[O-]",
    "OS(=O)(=O)O",
    "OP(=O)(O)O",
    "OC(=O)O",
    "OB(O)O",
    "O1P2OP3OP1OP(O2)O3",
    "P12P3P1SP(S2)S3",
    "S1SSSSSSS1",
    "ClP1(Cl)=NP(Cl)(Cl)=NP(Cl)(Cl)=N1",
    "B1NBNBN1",
    "[BH2]1[H][BH2][H]1",
    "Cl[Al]1(Cl)[Cl][Al](Cl)(Cl)[Cl]1",
    "F[H-]F",
    "FB(F)B(F)F",
    "CB(C)C",
    "C[Si](C)(C)C",
    "[SiH3]N([SiH3])[SiH3]",
    "N=[N+]=[N-]",
    "CN=C=O",
    "C=C=C",
    "C=C=O",
    "C=CC=C",
    "F/C=C\\F",
    "CC=C",
    "CCCC",
    "C1CCCCC1",
    "C1CCC1",
    "C1CCCC1",
    "C1COC1",
    "c1cc[cH-]c1",
    "[cH+]1cccccc1",
    "c1ccc2cccc2cc1",
    "Nc1ccccc1",
    "Oc1ccc(O)cc1",
    "O=Cc1ccccc1",
    "NC(N)=O",
    "NC=O",
    "CC(=O)O",
    "OC(=O)C(=O)O",
    "C[C@H](N)C(=O)O",
    "F[C@H](Cl)Br",
    "CS(C)=O",
    "Cl[Pt](Cl)(<-[NH3])<-[NH3]",
    "O=[Cr](=O)(Cl)Cl",
]


def rewritten(smiles: str, number: int) -> str:
    """Return another spelling, atoms in another order."""
    mol = to_rdkit(read_smiles(smiles))
    order = list(range(mol.GetNumAtoms()))
    random.Random(number).shuffle(order)
    other = Chem.RenumberAtoms(mol, order)
    return Chem.MolToSmiles(other, canonical=False, allHsExplicit=True)


def answers(smiles: str) -> tuple[object, list[float], float]:
    """Return the facts, every angle in order of size, and the dipole moment."""
    report = report_on_structure(smiles)
    facts = (
        report.point_group,
        report.shape,
        report.dipole_model.polar,
        report.molecule.smiles,
        sorted((c.centre.notation, c.shape or "", c.centre.element) for c in report.centres),
        [(mode.species, mode.count) for mode in report.spectra.modes],
    )
    angles = sorted(
        row.degrees.value for centre in report.centres for row in centre.angles for _ in row.members
    )
    return facts, angles, report.dipole_model.moment_debye or 0.0


@pytest.mark.parametrize("smiles", MOLECULES)
def test_spelling_changes_no_answer(smiles: str) -> None:
    """Shapes, point group, angles and dipole moment are those of the first spelling."""
    facts, angles, dipole = answers(smiles)
    other_facts, other_angles, other_dipole = answers(rewritten(smiles, SEED))
    assert other_facts == facts
    assert other_angles == pytest.approx(angles, abs=ANGLE_TOLERANCE_DEGREES)
    assert other_dipole == pytest.approx(dipole, abs=DIPOLE_TOLERANCE_DEBYE)
