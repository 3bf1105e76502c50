"""Second derivatives by symmetry are those that displacing every atom gives."""

import numpy as np
import pytest

from shapeshelf.calculation import xtb
from shapeshelf.calculation.differences import (
    averaged_derivatives,
    displacements_of,
    evaluations_of,
)
from shapeshelf.calculation.model import System
from shapeshelf.calculation.units import BOHR_ANGSTROM
from shapeshelf.geometry.symmetry import find_symmetry

TOLERANCE = 2e-5
"""Atomic units: what is left of third derivatives in differences over 0.005 bohr."""
OCTAHEDRON = [[1.58 * sign * (i == k) for k in range(3)] for i in range(3) for sign in (1, -1)]
TRIGONAL = [[1.31, 0, 0], [-0.655, 1.1345, 0], [-0.655, -1.1345, 0]]
WATER = (("O", "H", "H"), [[0, 0, 0.1], [0, 0.76, -0.5], [0, -0.76, -0.5]], 0)
AMMONIA = (("N", "H", "H", "H"), [[0, 0, 0.3], *np.array(TRIGONAL) * 0.7], 0)
SULFUR_HEXAFLUORIDE = (("S", *["F"] * 6), [[0, 0, 0], *OCTAHEDRON], 0)
BORON_TRIFLUORIDE = (("B", "F", "F", "F"), [[0, 0, 0], *TRIGONAL], 0)
CARBON_DIOXIDE = (("O", "C", "O"), [[0, 0, 1.16], [0, 0, 0], [0, 0, -1.16]], 0)
HYDROXIDE = (("O", "H"), [[0, 0, 0], [0.3, 0.2, 0.9]], -1)
FORMALDEHYDE_BENT = (
    ("C", "O", "H", "H"),
    [[0, 0, 0], [0.1, 0.2, 1.2], [0.9, 0.1, -0.6], [-0.8, 0.3, -0.5]],
    0,
)


def symmetric(elements, points):
    """Return exact coordinates (n, 3) in bohr and their symmetry."""
    symmetry = find_symmetry(elements, np.array(points, float), 0.01)
    return np.array(symmetry.coordinates_angstrom) / BOHR_ANGSTROM, symmetry


@pytest.mark.parametrize(
    ("case", "group", "gradients"),
    [
        (SULFUR_HEXAFLUORIDE, "Oh", 4),
        (BORON_TRIFLUORIDE, "D3h", 7),
        (CARBON_DIOXIDE, "Dinfh", 5),
        (WATER, "C2v", 9),
        (FORMALDEHYDE_BENT, "C1", 24),
    ],
)
def test_symmetry_spares_gradients(case, group, gradients):
    """Counted by hand: one side of each direction that an operation turns round, else two.

    In SF6 sulfur needs one, fluorine two outward and one across.
    """
    elements, points, _ = case
    place, symmetry = symmetric(elements, points)
    assert symmetry.point_group == group
    assert evaluations_of(displacements_of(place, symmetry)) == gradients


@pytest.mark.parametrize(
    "case",
    [WATER, AMMONIA, SULFUR_HEXAFLUORIDE, BORON_TRIFLUORIDE, CARBON_DIOXIDE, HYDROXIDE],
    ids=lambda case: "".join(case[0]),
)
def test_symmetry_changes_nothing(case):
    """All atoms one by one, without symmetry, give the same Hessian and dipole derivatives."""
    elements, points, charge = case
    place, symmetry = symmetric(elements, points)
    system = System(elements, charge, 1)
    hessian, slopes = xtb.second_derivatives(system, place, symmetry)
    size, step = place.size, 0.005
    plain, plain_slopes = np.zeros((size, size)), np.zeros((size, 3))
    for index in range(size):
        shift = np.zeros(size)
        shift[index] = step
        ahead, behind = (
            xtb.evaluate(system, place + sign * shift.reshape(-1, 3)) for sign in (1, -1)
        )
        plain[index] = (ahead.gradient - behind.gradient).ravel() / (2 * step)
        plain_slopes[index] = (ahead.dipole - behind.dipole) / (2 * step)
    assert hessian == pytest.approx((plain + plain.T) / 2, abs=TOLERANCE)
    assert slopes == pytest.approx(plain_slopes, abs=TOLERANCE)


def test_averaging_takes_noise_off():
    """What is symmetric stays; of noise, 12 of 78 parts are; averaging again finds no more."""
    elements, points, charge = BORON_TRIFLUORIDE
    place, symmetry = symmetric(elements, points)
    exact, slopes = xtb.second_derivatives(System(elements, charge, 1), place, symmetry)
    noise = np.random.default_rng(7).normal(scale=1e-3, size=exact.shape)
    kept, kept_slopes = averaged_derivatives(exact, slopes, symmetry)
    cleaner, _ = averaged_derivatives(exact + noise + noise.T, slopes, symmetry)
    again, _ = averaged_derivatives(cleaner, slopes, symmetry)
    assert kept == pytest.approx(exact, abs=TOLERANCE)
    assert kept_slopes == pytest.approx(slopes, abs=TOLERANCE)
    assert again == pytest.approx(cleaner, abs=TOLERANCE)
    assert np.linalg.norm(cleaner - exact) < 0.6 * np.linalg.norm(noise + noise.T)
