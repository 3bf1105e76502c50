"""Starts keep the domain model's angles and take GFN2-xTB's bond lengths."""

import numpy as np
import pytest

from shapeshelf.calculation.model import System
from shapeshelf.calculation.starting import shaken, starts_of, with_fitted_lengths
from shapeshelf.calculation.xtb import evaluate
from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.vectors import angle_degrees
from shapeshelf.structure.reading import read_smiles

ANGLE_DEGREES = 1e-6
"""Stretching along the bond changes an angle by rounding only."""


def started(smiles):
    molecule = read_smiles(smiles)
    lewis, centres = analyse(molecule)
    system = System(tuple(a.element for a in molecule.atoms), molecule.charge, lewis.multiplicity)
    starts = starts_of(molecule, lewis, centres, assemble(molecule, lewis, centres))
    return molecule, system, starts


def angles(molecule, points):
    return [
        angle_degrees(points[i], points[centre], points[j])
        for centre in range(len(points))
        for i in molecule.neighbours(centre)
        for j in molecule.neighbours(centre)
        if i < j
    ]


@pytest.mark.parametrize("smiles", ["FS(F)(F)F", "CO", "CC(C)=O", "F[Se](F)(F)F"])
def test_angles_stay_and_the_energy_falls(smiles):
    """Chains are stretched beyond their first bond as well."""
    molecule, system, starts = started(smiles)
    before = starts[0].coordinates
    after = with_fitted_lengths(molecule, system, before)
    assert angles(molecule, after) == pytest.approx(angles(molecule, before), abs=ANGLE_DEGREES)
    assert evaluate(system, after).energy < evaluate(system, before).energy


def test_rings_are_left_alone():
    """No bond of cyclopropane's ring can be stretched by itself; those to hydrogen are."""
    molecule, system, starts = started("C1CC1")
    before = starts[0].coordinates
    after = with_fitted_lengths(molecule, system, before)
    assert after[:3] == pytest.approx(before[:3])
    assert not np.allclose(after[3:], before[3:])


@pytest.mark.parametrize(
    ("smiles", "count"), [("O", 1), ("F[Xe](F)(F)F", 2), ("FP(F)(F)(Cl)Cl", 3), ("CC", 1)]
)
def test_close_placements_start_too(smiles, count):
    """One start for each placement that the model ranks close behind the first."""
    _, _, starts = started(smiles)
    assert len(starts) == count
    assert [start.model_energy for start in starts] == sorted(s.model_energy for s in starts)


def test_placements_say_who_stands_where():
    """Three trigonal bipyramids of PF3Cl2 are told apart by what is axial."""
    _, _, starts = started("FP(F)(F)(Cl)Cl")
    assert {start.sites for start in starts} == {"F, F axial", "Cl, F axial", "Cl, Cl axial"}


def test_shaking_is_small_and_the_same_every_time():
    """No hidden state: two shakes of one structure are equal."""
    points = np.zeros((5, 3))
    assert np.array_equal(shaken(points), shaken(points))
    assert 0 < np.abs(shaken(points)).max() <= 0.02
