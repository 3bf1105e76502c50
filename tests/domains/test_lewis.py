"""The electron count: bond orders, lone pairs, charges, multiplicity, errors."""

import pytest

from shapeshelf.domains.lewis import count_electrons
from shapeshelf.errors import AnalysisError
from shapeshelf.structure.molecule import Atom, Bond, Molecule
from shapeshelf.structure.reading import read_smiles

ORDER_TOLERANCE = 1e-9
"""Mean bond orders are ratios of small whole numbers, exact but for rounding."""


def count(smiles, multiplicity=None):
    return count_electrons(read_smiles(smiles, multiplicity=multiplicity))


def molecule(elements, bonds, charges=None, multiplicity=None):
    charges = charges or [0] * len(elements)
    atoms = tuple(Atom(e, q) for e, q in zip(elements, charges, strict=True))
    return Molecule(
        atoms=atoms,
        bonds=tuple(Bond(*bond) for bond in bonds),
        charge=sum(charges),
        multiplicity=multiplicity,
        coordinates_angstrom=None,
        tetrahedral_stereo=(),
        double_bond_stereo=(),
        formula="".join(elements),
        smiles="",
        inchikey=None,
        classes=tuple(range(len(elements))),
    )


@pytest.mark.parametrize(
    ("smiles", "bond", "order"),
    [
        # Averages over the textbook resonance forms; Pauling, The Nature of the Chemical
        # Bond, 3rd ed. (1960), recalled from memory.
        ("[O-][N+](=O)[O-]", 0, 4 / 3),
        ("[O-]C(=O)[O-]", 1, 4 / 3),
        ("[O-]S(=O)(=O)[O-]", 0, 3 / 2),
        ("[O-]P(=O)([O-])[O-]", 1, 5 / 4),
        ("[O-]Cl(=O)(=O)=O", 0, 7 / 4),
        ("[O-][O+]=O", 0, 3 / 2),
        ("O=[N]=O", 0, 3 / 2),
        ("CC(=O)[O-]", 2, 3 / 2),
        ("C[N+](=O)[O-]", 1, 3 / 2),
        ("[N-]=[N+]=[N-]", 0, 2),
        ("[N-]=[N+]=O", 0, 5 / 2),
        ("c1ccccc1", 0, 3 / 2),
        ("[cH-]1cccc1", 0, 7 / 5),
        ("[CH2-]C=C", 0, 3 / 2),
        ("[CH2]C=C", 1, 3 / 2),
        ("[CH2+]C=C", 0, 3 / 2),
        ("NC(N)=[NH2+]", 0, 4 / 3),
        ("[O-][Mn](=O)(=O)=O", 0, 7 / 4),
        ("[O-][Cr](=O)(=O)[O-]", 0, 3 / 2),
        ("F[C+](F)F", 0, 4 / 3),
        # Naphthalene: the 1,2 bond is double in two of three forms.
        ("c1ccc2ccccc2c1", 1, 5 / 3),
        # Rings of 4n electrons keep their bonds apart.
        ("C1=CC=CC=CC=C1", 0, 2),
        ("C1=CC=C1", 1, 1),
        # No charge, no averaging: amide and ester as drawn.
        ("NC=O", 0, 1),
        ("COC=O", 1, 1),
        ("FB(F)F", 0, 1),
    ],
)
def test_mean_bond_order(smiles, bond, order):
    """Bond orders are averaged over the drawings that count alike."""
    assert count(smiles).bond_orders[bond] == pytest.approx(order, abs=ORDER_TOLERANCE)


@pytest.mark.parametrize(
    "smiles", ["[O-][N+](=O)[O-]", "[O-]S(=O)(=O)[O-]", "CC(=O)[O-]", "NC(N)=[NH2+]", "c1ccccc1"]
)
def test_equivalent_atoms_count_alike(smiles):
    """Atoms that the bond graph cannot tell apart have the same pairs and single electrons."""
    given = read_smiles(smiles)
    counts = {}
    for number, atom in zip(given.classes, count_electrons(given).atoms, strict=True):
        own = (
            atom.lone_pairs,
            atom.delocalised_pairs,
            atom.single_electrons,
            atom.delocalised_singles,
        )
        assert counts.setdefault(number, own) == own


def test_oxygen_of_nitrate():
    """Each oxygen has the three pairs of its best drawing, one of them delocalised."""
    nitrate = count("[O-][N+](=O)[O-]")
    oxygens = [nitrate.atoms[k] for k in (0, 2, 3)]
    assert [(o.lone_pairs, o.delocalised_pairs) for o in oxygens] == [(3, 1)] * 3


@pytest.mark.parametrize(
    "smiles",
    ["[O-][N+](=O)[O-]", "CC(=O)[O-]", "C[N+](C)(C)[O-]", "[O-]S(=O)(=O)[O-]", "N#[N+][O-]"],
)
def test_every_form_has_the_charge_of_the_molecule(smiles):
    """Charges of each drawing, and of the atoms in the first one, add up to the whole."""
    given = read_smiles(smiles)
    result = count_electrons(given)
    assert sum(atom.formal_charge for atom in result.atoms) == given.charge
    assert {sum(form.formal_charges) for form in result.forms} == {given.charge}
    assert 1 <= len(result.forms) <= 8


@pytest.mark.parametrize(
    ("smiles", "stated", "multiplicity"),
    [
        ("O", None, 1),
        ("[CH3]", None, 2),
        ("[CH2]", None, 1),
        ("[CH2]", 3, 3),
        ("F[C]F", None, 1),
        ("O=[N]=O", None, 2),
        ("[O][O]", None, 3),
        # Spin-only ground states; Greenwood and Earnshaw (1997), chapter 19 ff., recalled.
        ("F[Co-3](F)(F)(F)(F)F", None, 5),
        ("[NH3]->[Co+3](<-[NH3])(<-[NH3])(<-[NH3])(<-[NH3])<-[NH3]", None, 1),
        ("N#C[Fe-4](C#N)(C#N)(C#N)(C#N)C#N", None, 1),
        ("N#C[Fe-3](C#N)(C#N)(C#N)(C#N)C#N", None, 2),
        ("Cl[Ni-2](Cl)(Cl)Cl", None, 3),
        ("N#C[Ni-2](C#N)(C#N)C#N", None, 1),
        ("Cl[Fe-](Cl)(Cl)Cl", None, 6),
        ("Cl[Cu-2](Cl)(Cl)Cl", None, 2),
    ],
)
def test_multiplicity(smiles, stated, multiplicity):
    """A stated multiplicity stands; else single electrons are parallel, by rules C9 and M2."""
    assert count(smiles, stated).multiplicity == multiplicity


@pytest.mark.parametrize(
    ("stated", "pairs", "singles"),
    [(None, 1, 0), (1, 1, 0), (3, 0, 2)],
)
def test_methylene(stated, pairs, singles):
    """Two free electrons are a pair unless a triplet is stated (rule C8)."""
    carbon = count("[CH2]", stated).atoms[0]
    assert (carbon.lone_pairs, carbon.single_electrons) == (pairs, singles)


def test_bridging_chlorine_drawn_with_plain_bonds():
    """Al2Cl6 with neutral four-bonded aluminium counts like the drawing with arrows (rule C4)."""
    bonds = [(0, 1, 1), (1, 2, 1), (1, 3, 1), (3, 4, 1), (4, 5, 1), (4, 6, 1), (4, 7, 1), (7, 1, 1)]
    drawn = molecule(["Cl", "Al", "Cl", "Cl", "Al", "Cl", "Cl", "Cl"], bonds)
    result = count_electrons(drawn)
    assert [result.atoms[k].lone_pairs for k in (1, 3, 4, 7)] == [0, 2, 0, 2]
    assert result.multiplicity == 1


def test_diborane():
    """Bridging hydrogens share their pairs: no atom of diborane is left with any (rule C5)."""
    bonds = [(0, 2, 1), (1, 2, 1), (0, 3, 1), (1, 3, 1), (0, 4, 1), (0, 5, 1), (1, 6, 1), (1, 7, 1)]
    result = count_electrons(molecule(["B", "B", *"HHHHHH"], bonds))
    assert all(a.lone_pairs == a.single_electrons == 0 for a in result.atoms)
    assert result.multiplicity == 1


def test_multiplicity_against_the_number_of_electrons():
    """A multiplicity of the wrong parity is refused in one line."""
    water = molecule(["O", "H", "H"], [(0, 1, 1), (0, 2, 1)], multiplicity=2)
    with pytest.raises(AnalysisError, match=r"multiplicity 2 does not fit an even number"):
        count_electrons(water)


def test_more_bonds_than_electrons():
    """A cluster drawn with a bond for every contact is refused in one line."""
    bonds = [(0, k, 1) for k in range(1, 6)]
    with pytest.raises(AnalysisError, match=r"B \(atom 0\): .* 2 electrons more than it has"):
        count_electrons(molecule(["B", *"FFFFF"], bonds))
