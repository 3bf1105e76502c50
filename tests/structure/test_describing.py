"""Descriptors of organic compounds."""

import pytest
from rdkit import Chem
from rdkit.Chem import Crippen, rdMolDescriptors

from shapeshelf.structure.describing import (
    crippen_log_p,
    is_organic,
    rotatable_bonds,
    topological_polar_surface_area,
)
from shapeshelf.structure.reading import read_smiles

ORGANIC = ["CCO", "CC(=O)Nc1ccc(O)cc1", "c1ccncc1", "C[N+](=O)[O-]", "CS(C)=O", "O=C(O)c1ccccc1",
           "CN1C=NC2=C1C(=O)N(C(=O)N2C)C", "CC(C)(C)OC(=O)NCCCCl"]  # fmt: skip


@pytest.mark.parametrize("smiles", ORGANIC)
def test_descriptors_are_those_of_the_reference_library(smiles: str) -> None:
    """Our partial sanitising gives the numbers of RDKit's own reading."""
    molecule, mol = read_smiles(smiles), Chem.MolFromSmiles(smiles)
    assert topological_polar_surface_area(molecule) == pytest.approx(rdMolDescriptors.CalcTPSA(mol))
    assert crippen_log_p(molecule) == pytest.approx(Crippen.MolLogP(mol))
    assert rotatable_bonds(molecule) == rdMolDescriptors.CalcNumRotatableBonds(mol)


# Polar surface areas from P. Ertl et al., J. Med. Chem. 43 (2000) 3714 (fragment table, recalled).
@pytest.mark.parametrize(("smiles", "area"), [("CCO", 20.23), ("CC(C)=O", 17.07), ("CN", 26.02)])
def test_published_polar_surface_areas(smiles: str, area: float) -> None:
    """Single groups have the area of their fragment; two decimals are printed."""
    assert topological_polar_surface_area(read_smiles(smiles)) == pytest.approx(area, abs=0.01)


@pytest.mark.parametrize(
    ("smiles", "organic"),
    [("C", True), ("CCO", True), ("ClC(Cl)(Cl)Cl", True), ("C[Si](C)(C)C", True), ("O=C=O", False),
     ("[C-]#[O+]", False), ("FS(F)(F)F", False), ("[O-]C#N", False), ("C[Hg]C", False)],
)  # fmt: skip
def test_what_counts_as_organic(smiles: str, organic: bool) -> None:
    """Carbon bonded to hydrogen, carbon or halogen among nonmetals (common practice, no source)."""
    assert is_organic(read_smiles(smiles)) is organic
