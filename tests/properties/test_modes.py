"""Normal modes by species, against published countings."""

import pytest

from shapeshelf.properties.modes import mode_species
from shapeshelf.properties.spectra import expect_spectra

NAKAMOTO = """K. Nakamoto, Infrared and Raman Spectra of Inorganic and Coordination Compounds,
Part A, 6th ed. (2009), ISBN 978-0-471-74339-2, recalled from memory; benzene, ethylene, allene,
ethane: G. Herzberg, Molecular Spectra and Molecular Structure II (1945), recalled from memory."""

PUBLISHED = [
    ("O=C=O", "Dinfh", "1Σg+ 1Σu+ 1Πu"),
    ("O=C=S", "Cinfv", "2Σ+ 1Π"),
    ("C#N", "Cinfv", "2Σ+ 1Π"),
    ("C#C", "Dinfh", "2Σg+ 1Πg 1Σu+ 1Πu"),
    ("F[Xe]F", "Dinfh", "1Σg+ 1Σu+ 1Πu"),
    ("O=S=O", "C2v", "2A1 1B2"),
    ("O", "C2v", "2A1 1B2"),
    ("N", "C3v", "2A1 2E"),
    ("FB(F)F", "D3h", "1A1' 2E' 1A2''"),
    ("C", "Td", "1A1 1E 2T2"),
    ("O=P(Cl)(Cl)Cl", "C3v", "3A1 3E"),
    ("FCl(F)F", "C2v", "3A1 1B1 2B2"),
    ("FS(F)(F)F", "C2v", "4A1 1A2 2B1 2B2"),
    ("O=S(=O)(F)F", "C2v", "4A1 1A2 2B1 2B2"),
    ("F[Xe](F)(F)F", "D4h", "1A1g 1B1g 1B2g 1A2u 1B2u 2Eu"),
    ("FP(F)(F)(F)F", "D3h", "2A1' 3E' 2A2'' 1E''"),
    ("FBr(F)(F)(F)F", "C4v", "3A1 2B1 1B2 3E"),
    ("FS(F)(F)(F)(F)F", "Oh", "1A1g 1Eg 2T1u 1T2g 1T2u"),
    ("FI(F)(F)(F)(F)(F)F", "D5h", "2A1' 3E1' 2E2' 2A2'' 1E1'' 1E2''"),
    ("P12P3P1P23", "Td", "1A1 1E 1T2"),
    ("F/N=N/F", "C2h", "3Ag 1Au 2Bu"),
    ("F/N=N\\F", "C2v", "3A1 1A2 2B2"),
    ("c1ccccc1", "D6h", "2A1g 1A2g 2B2g 1E1g 4E2g 1A2u 2B1u 2B2u 3E1u 2E2u"),
    ("C=C=C", "D2d", "3A1 1B1 3B2 4E"),
    ("CC", "D3d", "3A1g 3Eg 1A1u 2A2u 3Eu"),
]

ACTIVE_STRETCHES = [
    # infrared-active and Raman-active stretching modes (each species counted once)
    ("O=C=O", 1, 1),
    ("FB(F)F", 1, 2),
    ("FS(F)(F)F", 4, 4),
    ("F[Xe](F)(F)F", 1, 2),
    ("FP(F)(F)(F)F", 2, 3),
    ("FS(F)(F)(F)(F)F", 1, 2),
    ("F/N=N/F", 1, 2),
    ("F/N=N\\F", 3, 3),
]


@pytest.mark.parametrize(("smiles", "group", "published"), PUBLISHED)
def test_species_of_the_normal_modes(smiles, group, published, worked_out):
    """Every species occurs as often as published (NAKAMOTO)."""
    molecule, _, _, symmetry = worked_out(smiles)
    found = {mode.species: mode.count for mode in mode_species(molecule, symmetry)}
    assert symmetry.point_group == group
    assert found == {part[1:]: int(part[0]) for part in published.split()}


@pytest.mark.parametrize(("smiles", "group", "published"), PUBLISHED)
def test_all_degrees_of_freedom_are_spent(smiles, group, published, worked_out):
    """3N - 6 vibrations, 3N - 5 of a linear molecule."""
    molecule, _, _, symmetry = worked_out(smiles)
    modes = mode_species(molecule, symmetry)
    lost = 5 if group.endswith(("infv", "infh")) else 6
    assert sum(m.count * m.degeneracy for m in modes) == 3 * len(molecule.atoms) - lost


@pytest.mark.parametrize(("smiles", "infrared", "raman"), ACTIVE_STRETCHES)
def test_active_stretches(smiles, infrared, raman, worked_out):
    """Stretching modes that infrared and Raman spectra show (NAKAMOTO)."""
    spectra = expect_spectra(*worked_out(smiles))
    assert (spectra.infrared_stretches, spectra.raman_stretches) == (infrared, raman)


@pytest.mark.parametrize("smiles", ["O=C=O", "C#C", "F/N=N/F", "FS(F)(F)(F)(F)F", "c1ccccc1"])
def test_mutual_exclusion(smiles, worked_out):
    """With a centre of inversion no band is both infrared- and Raman-active."""
    assert expect_spectra(*worked_out(smiles)).coincidences == 0


def test_isomers_are_told_apart_by_infrared_stretches(worked_out):
    """trans-N2F2 hides its symmetric stretches from the infrared, cis-N2F2 shows all three."""
    trans = expect_spectra(*worked_out("F/N=N/F"))
    cis = expect_spectra(*worked_out("F/N=N\\F"))
    assert (trans.infrared_stretches, cis.infrared_stretches) == (1, 3)


@pytest.mark.parametrize(
    ("smiles", "axes"),
    [
        ("O", ("b",)),  # Herzberg (recalled): water is a b-type rotor
        ("O=C=S", ("a",)),
        ("N", ("c",)),
        ("CF", ("a",)),
        ("C", ()),
        ("O=C=O", ()),
        ("FN=O", ("a", "b")),
    ],
)
def test_microwave_axes(smiles, axes, worked_out):
    """Components of the dipole moment along the inertial axes, by symmetry."""
    assert expect_spectra(*worked_out(smiles)).microwave_axes == axes
