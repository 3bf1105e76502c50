"""Cautions that a structure calls for, whatever its label says."""

import pytest

from shapeshelf.report.cautions import hazard_groups
from shapeshelf.structure.reading import read_smiles

CASES = [
    ("C[Si](C)(C)N=[N+]=[N-]", ("azide",)),
    ("N=[N+]=[N-]", ("azide",)),
    ("CC(=O)OOC(C)=O", ("peroxide",)),
    ("OO", ("peroxide",)),
    ("[O-][O+]=O", ()),
    ("OCl(=O)(=O)=O", ("perchlorate",)),
    ("[O-]Cl(=O)=O", ()),
    ("ClN(Cl)Cl", ("n-halogen",)),
    ("[AsH3]", ("hydride-gas",)),
    ("[SiH4]", ("hydride-gas",)),
    ("O", ()),
    ("C", ()),
    ("FS(F)(F)F", ("volatile-fluoride",)),
    ("FS(F)(F)(F)(F)F", ()),
    ("FC(F)(F)F", ()),
    ("FCl(F)F", ("volatile-fluoride", "halogen-fluoride")),
    ("F", ("volatile-fluoride",)),
    ("F[Xe]F", ("volatile-fluoride", "xenon")),
    ("C[Al](C)C", ("metal-alkyl",)),
    ("C[Zn]C", ("metal-alkyl",)),
    ("C#N", ("acid-cyanide",)),
    ("CC#N", ()),
    ("c1ccncc1", ()),
]


@pytest.mark.parametrize(("smiles", "groups"), CASES)
def test_groups_known_for_hazard(smiles, groups):
    """As Bretherick's Handbook groups them (recalled from memory)."""
    assert hazard_groups(read_smiles(smiles)) == groups


def test_metal_carbonyl_is_cautioned():
    smiles = "[O+]#[C-]->[Ni](<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]"
    assert "metal-carbonyl" in hazard_groups(read_smiles(smiles))
