"""Normal modes from a Hessian: wavenumbers and infrared intensities, double-harmonic."""

from collections.abc import Callable, Sequence
from dataclasses import replace

import numpy as np

from shapeshelf.calculation.minimising import rigid_motions
from shapeshelf.calculation.model import Mode
from shapeshelf.calculation.units import (
    DALTON_ELECTRON_MASSES,
    INTENSITY_KM_MOL,
    WAVENUMBER_PER_ROOT,
)
from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.vectors import Array
from shapeshelf.properties.mode_labels import species_of_modes, stretching_shares
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule

SOFT_IMAGINARY_PER_CM = -100.0
"""Steeper ones lead downhill, whatever the noise."""
ALONG_BOHR = 0.15
"""Length of a step along a mode: its energy far above noise, bonds hardly stretched."""


def vibrations(
    elements: Sequence[str], coordinates: Array, hessian: Array, dipole_derivatives: Array
) -> tuple[tuple[Mode, ...], Array]:
    """Return the modes, lowest first, and their Cartesian displacements (modes, n, 3).

    ``coordinates`` (n, 3), ``hessian`` (3n, 3n) and ``dipole_derivatives`` (3n, 3) in atomic
    units; translations and rotations are projected out. Standard atomic weights.
    """
    weights = 1 / np.sqrt(np.repeat(masses(elements), 3))
    weighted = hessian * np.outer(weights, weights)
    basis = _internal_basis(elements, coordinates)
    values, inner = np.linalg.eigh(basis.T @ ((weighted + weighted.T) / 2) @ basis)
    vectors = basis @ inner
    moves = (vectors * weights[:, None]).T
    wavenumbers = _wavenumbers(values)
    strengths = ((moves @ dipole_derivatives) ** 2).sum(axis=1) * INTENSITY_KM_MOL
    modes = tuple(Mode(float(w), float(s)) for w, s in zip(wavenumbers, strengths, strict=True))
    return modes, moves.reshape(len(modes), -1, 3)


def measured_again(
    modes: tuple[Mode, ...], moves: Array, coordinates: Array, energy: Callable[[Array], float]
) -> tuple[tuple[Mode, ...], Array]:
    """Return modes and moves, lowest first, soft imaginary ones measured by energies along them.

    Second derivatives of a motion with next to no force, such as the turning of a methyl group,
    are mostly noise; three energies of points (n, 3) on a line are not.
    """
    soft = [k for k, one in enumerate(modes) if SOFT_IMAGINARY_PER_CM < one.wavenumber_per_cm < 0]
    if not soft:
        return modes, moves
    found, here = list(modes), energy(coordinates)
    for number in soft:
        step = ALONG_BOHR / np.linalg.norm(moves[number])
        beside = [energy(coordinates + way * step * moves[number]) for way in (1, -1)]
        value = (sum(beside) - 2 * here) / step**2
        found[number] = replace(
            modes[number], wavenumber_per_cm=float(_wavenumbers(np.array(value)))
        )
    order = sorted(range(len(found)), key=lambda k: found[k].wavenumber_per_cm)
    return tuple(found[k] for k in order), moves[order]


def labelled(
    modes: Sequence[Mode], moves: Array, molecule: Molecule, symmetry: Symmetry
) -> tuple[Mode, ...]:
    """Return the modes with their species in the point group and their share of stretching.

    ``moves`` (modes, n, 3) in the frame of ``symmetry``, whose coordinates are the structure.
    """
    elements = [atom.element for atom in molecule.atoms]
    bonds = [(bond.begin, bond.end) for bond in molecule.bonds]
    points = np.array(symmetry.coordinates_angstrom)
    shares = stretching_shares(bonds, points, masses(elements), moves)
    names = species_of_modes(symmetry, moves)
    return tuple(
        replace(mode, species=name, stretching=float(share))
        for mode, name, share in zip(modes, names, shares, strict=True)
    )


def masses(elements: Sequence[str]) -> Array:
    """Return the standard atomic masses (n,) in electron masses."""
    return np.array([ELEMENTS[symbol].atomic_weight for symbol in elements]) * (
        DALTON_ELECTRON_MASSES
    )


def _wavenumbers(values: Array) -> Array:
    """Return wavenumbers from mass-weighted force constants, negative where imaginary."""
    return np.asarray(np.sign(values) * np.sqrt(np.abs(values)) * WAVENUMBER_PER_ROOT)


def _internal_basis(elements: Sequence[str], coordinates: Array) -> Array:
    """Return orthonormal mass-weighted motions (3n, m) other than translation and rotation."""
    roots = np.repeat(np.sqrt(masses(elements)), 3)
    rigid = rigid_motions(coordinates) * roots
    left, _, _ = np.linalg.svd(rigid.T, full_matrices=True)
    return np.asarray(left[:, len(rigid) :])
