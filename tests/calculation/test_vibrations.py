"""Normal modes against cases that can be worked out by hand, and the units behind them."""

from dataclasses import replace

import numpy as np
import pytest

from shapeshelf.calculation.units import (
    BOHR_ANGSTROM,
    DALTON_ELECTRON_MASSES,
    DEBYE_PER_ATOMIC_UNIT,
    HARTREE_KJ_MOL,
    INTENSITY_KM_MOL,
)
from shapeshelf.calculation.vibrations import measured_again, vibrations

WAVENUMBER = 0.05
"""1/cm, rounding of the worked values."""


@pytest.mark.parametrize(
    ("unit", "value"),
    [
        (BOHR_ANGSTROM, 0.529177),
        (HARTREE_KJ_MOL, 2625.50),
        (DALTON_ELECTRON_MASSES, 1822.888),
        (DEBYE_PER_ATOMIC_UNIT, 2.541746),
        (INTENSITY_KM_MOL / DALTON_ELECTRON_MASSES, 974.88),
    ],
)
def test_units(unit, value):
    """CODATA 2018 and the customary 974.9 km/mol for one squared electron a dalton (recalled)."""
    assert unit == pytest.approx(value, rel=2e-5)


def diatomic(constant, axis=(0.0, 0.0, 1.0), charge=0.3):
    """Return coordinates, Hessian and dipole derivatives of HCl with a spring and two charges."""
    u = np.array(axis) / np.linalg.norm(axis)
    block = constant * np.outer(u, u)
    hessian = np.block([[block, -block], [-block, block]])
    slopes = np.vstack([charge * np.eye(3), -charge * np.eye(3)])
    return np.array([0 * u, 2.4 * u]), hessian, slopes


@pytest.mark.parametrize("axis", [(0, 0, 1), (1, 2, -0.5)])
def test_a_diatomic_has_one_mode(axis):
    """HCl on a spring of 516 N/m vibrates at 2989.2 1/cm: sqrt(k/m)/(2 pi c), by hand.

    516 N/m are 0.331429 hartree/bohr²; m is 1.008 x 35.45/36.458 Da or 1.62752e-27 kg.
    """
    coordinates, hessian, slopes = diatomic(0.331429, axis)
    modes, moves = vibrations(("H", "Cl"), coordinates, hessian, slopes)
    assert [mode.wavenumber_per_cm for mode in modes] == [pytest.approx(2989.2, abs=WAVENUMBER)]
    assert moves.shape == (1, 2, 3)


def test_intensity_of_two_charges():
    """Charges of ±0.3 e on a reduced mass m give 974.88 x 0.09/m km/mol."""
    modes, _ = vibrations(("H", "Cl"), *diatomic(0.33))
    reduced = 1.008 * 35.45 / (1.008 + 35.45)
    assert modes[0].intensity_km_per_mol == pytest.approx(974.88 * 0.09 / reduced, rel=1e-4)


def test_a_negative_curvature_is_an_imaginary_mode():
    """Its wavenumber is printed negative, by custom."""
    modes, _ = vibrations(("H", "Cl"), *diatomic(-0.1))
    assert modes[0].wavenumber_per_cm < 0


@pytest.mark.parametrize(
    ("points", "count"),
    [
        ([[0, 0, 0], [2.2, 0, 0], [-2.2, 0, 0]], 4),
        ([[0, 0, 0], [1.4, 1.1, 0], [-1.4, 1.1, 0]], 3),
    ],
)
def test_number_of_modes(points, count):
    """3n - 5 for a linear molecule, 3n - 6 for a bent one."""
    modes, _ = vibrations(("O", "H", "H"), np.array(points, float), np.eye(9), np.zeros((9, 3)))
    assert len(modes) == count


@pytest.mark.parametrize(
    ("first", "constant", "expected"),
    [(-50.0, 1e-5, 16.42), (-50.0, -1e-5, -16.42), (-150.0, 1e-5, -150.0), (40.0, -1e-5, 40.0)],
)
def test_a_soft_imaginary_mode_is_measured_by_energies(first, constant, expected):
    """HCl on a weak spring, by hand: sqrt(k/m)/(2 pi c) of 1e-5 hartree/bohr² is 16.42 1/cm.

    2989.2 1/cm belong to 0.331429 hartree/bohr². Steep modes and real ones stay as they are.
    """
    coordinates, hessian, slopes = diatomic(0.331429)
    (mode,), moves = vibrations(("H", "Cl"), coordinates, hessian, slopes)
    (again,), same = measured_again(
        (replace(mode, wavenumber_per_cm=first),),
        moves,
        coordinates,
        lambda points: constant / 2 * (np.linalg.norm(points[1] - points[0]) - 2.4) ** 2,
    )
    assert again.wavenumber_per_cm == pytest.approx(expected, abs=WAVENUMBER)
    assert same == pytest.approx(moves)
