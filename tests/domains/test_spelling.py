"""The answer belongs to the molecule: not to its spelling, nor to the order of its atoms."""

from dataclasses import replace

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from shapeshelf.domains.analysis import analyse
from shapeshelf.structure.reading import read_smiles

ANGLE_DIGITS = 2
"""Angles agree to a hundredth of a degree; relaxation stops well inside that."""

MOLECULES = [
    "[O-][N+](=O)[O-]",
    "O=[N]=O",
    "FS(F)(F)F",
    "O=S(F)(F)(F)F",
    "FP(F)(F)(Cl)Cl",
    "[O-]S(=O)(=O)[O-]",
    "CC(=O)[O-]",
    "NC(N)=[NH2+]",
    "O=[N+]([O-])c1ccc(N)cc1",
    "c1ccc2[nH]ccc2c1",
    "Cn1cnc2c1c(=O)n(C)c(=O)n2C",
    "[CH2-]C=O",
    "C=[N+]=[N-]",
    "CN1C=CN(C)[C]1",
    "[SiH3]N([SiH3])[SiH3]",
    "Cl[Te-2](Cl)(Cl)(Cl)(Cl)Cl",
    "Cl[Pt](Cl)(<-[NH3])<-[NH3]",
    "O=[W](F)(F)(F)F",
    "[O+]#[C-]->[Fe](<-[C-]#[O+])(<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]",
]


def centre_answer(centre, numbers):
    """Return what is said of a centre, its neighbours under their new numbers."""
    angles = sorted(
        (sorted((numbers[a.atoms[0]], numbers[a.atoms[2]])), round(a.model_degrees, ANGLE_DIGITS))
        for a in centre.angles
    )
    facts = (centre.notation, centre.lone_pairs, centre.single_electrons, centre.arrangement)
    return (*facts, centre.shape, centre.polyhedral_symbol, centre.fluxional, len(angles))


def angle_values(centre):
    return sorted(round(angle.model_degrees, ANGLE_DIGITS) for angle in centre.angles)


def permuted(molecule, order, bond_order):
    """Return ``molecule`` with atom k at place ``order[k]`` and its bonds in another order."""
    back = sorted(range(len(order)), key=order.__getitem__)
    bonds = tuple(
        replace(bond, begin=order[bond.begin], end=order[bond.end]) for bond in molecule.bonds
    )
    return replace(
        molecule,
        atoms=tuple(molecule.atoms[k] for k in back),
        bonds=tuple(bonds[k] for k in bond_order),
        classes=tuple(molecule.classes[k] for k in back),
        tetrahedral_stereo=(),
        double_bond_stereo=(),
    )


@settings(max_examples=40, deadline=None, derandomize=True)
@given(data=st.data(), smiles=st.sampled_from(MOLECULES))
def test_order_of_the_atoms_changes_nothing(data, smiles):
    """Permuting atoms and bonds permutes counts, centres and angles, and nothing else."""
    molecule = read_smiles(smiles)
    order = data.draw(st.permutations(range(len(molecule.atoms))))
    bond_order = data.draw(st.permutations(range(len(molecule.bonds))))
    lewis, centres = analyse(molecule)
    other_lewis, others = analyse(permuted(molecule, order, bond_order))
    by_atom = {centre.atom: centre for centre in others}
    assert other_lewis.multiplicity == lewis.multiplicity
    for k, atom in enumerate(lewis.atoms):
        assert replace(other_lewis.atoms[order[k]], formal_charge=0) == replace(
            atom, formal_charge=0
        )
    for place, k in enumerate(bond_order):
        assert other_lewis.bond_orders[place] == pytest.approx(lewis.bond_orders[k])
    for centre in centres:
        other = by_atom[order[centre.atom]]
        assert centre_answer(other, range(len(order))) == centre_answer(centre, order)
        assert angle_values(other) == angle_values(centre)


@pytest.mark.parametrize(
    "spellings",
    [
        ("O=S(=O)([O-])[O-]", "[O-][S+2]([O-])([O-])[O-]", "[O-]S(=O)(=O)[O-]"),
        ("C[S+](C)[O-]", "CS(C)=O"),
        ("C=C[O-]", "[CH2-]C=O"),
        ("N#C[O-]", "[N-]=C=O"),
        ("[N-]=[N+]=O", "N#[N+][O-]"),
        ("C=[N+]=[N-]", "[CH2-][N+]#N"),
        ("CN(=O)=O", "C[N+](=O)[O-]"),
        ("[O]N=O", "O=N=O", "[O-][N+]=O"),
        ("[O]Cl=O", "O=Cl=O"),
        ("NC=O", "[NH2+]=C[O-]"),
        ("c1ccccc1C", "C1=CC=CC=C1C", "C1(C)=CC=CC=C1"),
        ("FB(F)(F)<-N", "F[B-](F)(F)[NH3+]"),
        ("O=[I-](=O)(F)F", "[O-]I(=O)(F)F"),
        ("C=P(C)(C)C", "[CH2-][P+](C)(C)C"),
        ("[NH3]->[Pt](Cl)(Cl)<-[NH3]", "[NH3+][Pt-2](Cl)(Cl)[NH3+]"),
        ("O=C=[Ni](=C=O)(=C=O)=C=O", "[Ni](<-[C-]#[O+])(<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]"),
        ("NC(=[NH2+])C", "[NH2+]=C(N)C"),
        ("[CH2]C=C", "C=C[CH2]"),
        ("F[C+](F)F", "F[C+](F)F"),
    ],
    ids=lambda spellings: spellings[0],
)
def test_spelling_changes_nothing(spellings):
    """Every spelling of a compound gives the same centres and the same mean bond orders."""
    answers = []
    for smiles in spellings:
        lewis, centres = analyse(read_smiles(smiles))
        said = sorted(
            repr(
                (
                    centre.element,
                    centre_answer(centre, {}.fromkeys(range(99), 0)),
                    angle_values(centre),
                )
            )
            for centre in centres
        )
        answers.append((said, sorted(round(order, 6) for order in lewis.bond_orders)))
    assert all(answer == answers[0] for answer in answers)
