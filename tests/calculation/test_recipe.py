"""One run of each engine from SMILES to record, and what becomes of runs that fail."""

import numpy as np
import pytest

from shapeshelf.calculation import dft, methods, xtb
from shapeshelf.calculation.minimising import Tolerances
from shapeshelf.calculation.model import Level, Outcome, System
from shapeshelf.calculation.recipe import calculate
from shapeshelf.calculation.units import BOHR_ANGSTROM
from shapeshelf.calculation.vibrations import vibrations
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.geometry.vectors import angle_degrees
from shapeshelf.structure.reading import read_smiles

GFN2_WATER_HARTREE = -5.070544440612
"""Total energy of optimised water in the documentation of the program xtb (recalled)."""
ENERGY_HARTREE = 2e-7
"""Two optimisations of one surface that stop at different tolerances."""
DIPOLE_DEBYE = 0.05
"""What the method is known to be right to."""
ANGLE_DEGREES = 0.8
BOND_ANGSTROM = 0.005
WAVENUMBER_PER_CM = 5.0
"""What the grid leaves of a difference; without its correction it is some hundred."""
DIFFERENTIAL_DEBYE_PER_ANGSTROM = 0.01


def quietly(stage):
    """Take no notice of the stage."""


@pytest.fixture(scope="module")
def water():
    """Water at the full level, with the stages it went through."""
    stages = []
    return calculate(read_smiles("O"), Level.DFT, stages.append), stages


def test_gfn2_water():
    """The energy is the published one to all digits that an optimisation settles."""
    record = calculate(read_smiles("O"), Level.XTB, quietly)
    assert record.outcome is Outcome.MINIMUM
    assert record.energy_hartree == pytest.approx(GFN2_WATER_HARTREE, abs=ENERGY_HARTREE)
    assert (record.point_group, len(record.modes)) == ("C2v", 3)


def test_pbe0_water(water):
    """Measured: 104.5 degrees, 0.958 angstrom, 1.855 D (CRC Handbook, recalled)."""
    record, stages = water
    points = np.array(record.coordinates_angstrom)
    oxygen = record.elements.index("O")
    first, last = (k for k in range(3) if k != oxygen)
    angle = angle_degrees(points[first], points[oxygen], points[last])
    assert record.outcome is Outcome.MINIMUM
    assert angle == pytest.approx(104.5, abs=ANGLE_DEGREES)
    assert np.linalg.norm(points[first] - points[oxygen]) == pytest.approx(0.958, abs=BOND_ANGSTROM)
    assert np.linalg.norm(record.dipole_debye) == pytest.approx(1.855, abs=DIPOLE_DEBYE)
    assert stages[-1] == "dipole moment"


def test_pbe0_water_vibrates(water):
    """Three modes; harmonic ones measured at 1648, 3832 and 3943 1/cm.

    W. S. Benedict, N. Gailar and E. K. Plyler, J. Chem. Phys. 24 (1956) 1139 (recalled); PBE0
    is right to some two per cent. The bend and the asymmetric stretch are the strong bands.
    """
    record, _ = water
    found = [mode.wavenumber_per_cm for mode in record.modes]
    assert found == pytest.approx([1648, 3832, 3943], rel=0.02)
    strengths = [mode.intensity_km_per_mol for mode in record.modes]
    assert strengths[1] < 10 < strengths[2] < strengths[0]


def test_dipole_derivatives_follow_the_dipole():
    """The analytic derivative is the finite difference, for closed and open shells alike."""
    for elements, multiplicity, points in (
        (("O", "H", "H"), 1, [[0, 0, 0.1], [0, 1.43, -1.0], [0, -1.43, -1.0]]),
        (("O", "H"), 2, [[0, 0, 0.0], [0.3, 0, 1.8]]),
    ):
        system, place = System(elements, 0, multiplicity), np.array(points, float)
        solver = dft.solver_of(system, dft.Treatment("def2-svp", 2), place)
        dft.solve(solver, place)
        slopes = dft.analytic_second_derivatives(solver)[1]
        moments = []
        for sign in (1, -1):
            moved = place.copy()
            moved[1, 2] += sign * 0.01
            dft.solve(solver, moved)
            moments.append(dft.dipole(solver))
        assert slopes[5] == pytest.approx(
            (moments[0] - moments[1]) / 0.02, abs=DIFFERENTIAL_DEBYE_PER_ANGSTROM
        )


def test_analytic_second_derivatives_are_those_of_the_gradient(monkeypatch):
    """Chlorine, where the grid round heavy atoms spoils derivatives that ignore it."""
    elements, points = ("Cl", "Cl"), [[0, 0, 0], [0, 0, 2.0]]
    symmetry = find_symmetry(elements, np.array(points, float), 0.01)
    place = np.array(symmetry.coordinates_angstrom) / BOHR_ANGSTROM
    solver = dft.solver_of(System(elements, 0, 1), dft.Treatment("def2-svp", 1), place)
    found = []
    for most in (0, 9):
        monkeypatch.setattr(dft, "MOST_EVALUATIONS_PER_ATOM", most)
        modes, _ = vibrations(elements, place, *dft.second_derivatives(solver, place, symmetry))
        found.append([mode.wavenumber_per_cm for mode in modes])
    assert found[0] == pytest.approx(found[1], abs=WAVENUMBER_PER_CM)


def test_a_field_that_does_not_converge_is_a_record(monkeypatch):
    """The record says so, and has no numbers."""
    monkeypatch.setattr(dft, "MOST_CYCLES", 1)
    record = calculate(read_smiles("O"), Level.DFT_SMALL, quietly)
    assert record.outcome is Outcome.NOT_CONVERGED
    assert record.failure == "PBE0 after 1 cycles"
    assert (record.energy_hartree, record.coordinates_angstrom, record.modes) == (None, (), ())


def test_a_minimum_not_found_is_a_record(monkeypatch):
    """Steps run out."""
    monkeypatch.setattr(methods, "XTB_TOLERANCES", Tolerances(1e-9, 1e-9, 1))
    record = calculate(read_smiles("N"), Level.XTB, quietly)
    assert record.outcome is Outcome.NO_MINIMUM
    assert record.failure == "not found in 1 steps"


def test_an_unsupported_element_is_a_record():
    """Uranium lies beyond the basis sets."""
    record = calculate(read_smiles("F[U](F)(F)(F)(F)F"), Level.XTB, quietly)
    assert (record.outcome, record.failure) == (
        Outcome.UNSUPPORTED,
        "no basis set or parameters for U",
    )


def test_a_saddle_is_left():
    """Ammonia started flat ends as a pyramid."""
    system = System(("N", "H", "H", "H"), 0, 1)
    flat = 1.9 * np.array([[0, 0, 0], [1, 0, 0], [-0.5, 0.866, 0], [-0.5, -0.866, 0]])
    found = methods.method_for(Level.XTB, system).roughly(flat + 0.01 * np.eye(4, 3))
    height = np.linalg.det(found.coordinates[1:] - found.coordinates[0])
    assert abs(height) > 1.0


def test_a_flat_motion_ends_symmetric():
    """Methyl groups that turn freely stop anywhere; the symmetric structure lies no higher."""
    assert calculate(read_smiles("C[Al](C)C"), Level.XTB, quietly).point_group == "C3h"


def test_close_placements_are_compared():
    """Xenon tetrafluoride: the see-saw that the model ranks second lies far above the square."""
    record = calculate(read_smiles("F[Xe](F)(F)F"), Level.XTB, quietly)
    best, other = record.placements
    assert (best.shape, best.wins, best.energy_kj_mol) == ("square planar", True, 0.0)
    assert (other.shape, other.wins) == ("see-saw", False)
    assert other.energy_kj_mol > 50


def test_a_flexible_molecule_has_conformers():
    """At GFN2-xTB level the structure is the lowest conformer's."""
    record = calculate(read_smiles("FCCF"), Level.XTB, quietly)
    assert record.conformers.count == 2
    assert record.conformers.least_dipole_debye < record.conformers.mean_dipole_debye


def test_the_same_run_gives_the_same_record():
    """No clock, no chance."""
    first, second = (calculate(read_smiles("FCCF"), Level.XTB, quietly) for _ in range(2))
    assert first == second


def test_xtb_gradient_is_the_slope_of_its_energy():
    """The unit and sign of what tblite returns."""
    system = System(("O", "H", "H"), 0, 1)
    place = np.array([[0, 0, 0.1], [0, 1.43, -1.0], [0, -1.43, -1.0]])
    step = np.zeros((3, 3))
    step[1, 1] = 1e-3
    ahead, behind = (xtb.evaluate(system, place + s * step).energy for s in (1, -1))
    gradient = xtb.evaluate(system, place).gradient
    assert gradient[1, 1] == pytest.approx((ahead - behind) / 2e-3, abs=1e-5)
