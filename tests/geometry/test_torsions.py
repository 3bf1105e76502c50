"""Torsion rules T1 to T7: which rule applies to which bond, and where its minimum is."""

import numpy as np
import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.rotors import scanned, turning_bonds
from shapeshelf.geometry.surroundings import Surroundings, surroundings_of
from shapeshelf.geometry.torsions import turns_of
from shapeshelf.structure.reading import read_smiles


def known_of(smiles: str) -> tuple[Surroundings, tuple[int, ...]]:
    molecule = read_smiles(smiles)
    return surroundings_of(molecule, *analyse(molecule)), molecule.classes


# Rules as numbered in geometry/torsions.py; fold and minimum in degrees.
RULES = [
    ("T1 double bond", "C=C", {(2, 0.0)}),
    ("T1 conjugation", "FB(F)B(F)F", {(2, 0.0)}),
    ("T1 lone pair into a pi system", "NB(F)F", {(2, 0.0)}),
    ("T2 hydrogen peroxide", "OO", {(2, 90.0)}),
    ("T2 hydrazine", "NN", {(2, 90.0)}),
    ("T3 ethane", "CC", {(3, 60.0)}),
    ("T3 disulfur decafluoride", "FS(F)(F)(F)(F)S(F)(F)(F)(F)F", {(4, 45.0)}),
    ("T5 allene", "C=C=C", {(2, 90.0)}),
    ("T5 butatriene", "C=C=C=C", {(2, 0.0)}),
    ("T5 2-butyne", "CC#CC", {(3, 0.0)}),
    ("T6 sulfuric acid", "OS(=O)(=O)O", {(3, 60.0), (1, 0.0)}),
    ("a linear molecule has none", "C#C", set()),
]


@pytest.mark.parametrize(("name", "smiles", "expected"), RULES, ids=[row[0] for row in RULES])
def test_each_bond_has_its_rule(name, smiles, expected):
    """The terms of a molecule are those of the rule its bonds fall under, and no others."""
    known, _ = known_of(smiles)
    assert {(turn.fold, turn.minimum_degrees) for turn in turns_of(known)} == expected


# Bonds whose turning makes another conformer.
TURNING = [
    ("CC", 0),
    ("CCO", 1),
    ("CCCC", 1),
    ("CCCCO", 3),
    ("C1CCCCC1", 0),
    ("c1ccccc1-c1ccccc1", 1),
    ("C=C", 0),
    ("FN(F)N(F)F", 1),
]


@pytest.mark.parametrize(("smiles", "count"), TURNING)
def test_turning_bonds(smiles, count):
    """Bonds of rings, of methyl groups and double bonds make no conformers by turning."""
    known, classes = known_of(smiles)
    assert len(turning_bonds(classes, known)) == count


def test_a_scan_turns_what_stands_beyond_the_bond():
    """Each turning bond is turned both ways; lengths stay, and a better conformer is kept."""
    known, classes = known_of("OO")
    points = np.array([[0, 0, 0], [0, 0, 1.4], [0.9, 0, -0.3], [0.9, 0, 1.7]], float)
    seen = []

    def relax(moved: np.ndarray) -> tuple[np.ndarray, float]:
        seen.append(moved)
        return moved, -float(np.linalg.norm(moved[2] - moved[3]))

    found = list(scanned((points, 0.0), turning_bonds(classes, known), known, relax))
    assert len(found) == len(seen) == 2
    for moved in seen:
        assert (
            abs(np.linalg.norm(moved[1] - moved[3]) - np.linalg.norm(points[1] - points[3])) < 1e-9
        )
        assert np.abs(moved - points).max() > 0.5
