"""Minimising an energy in Cartesian coordinates: quasi-Newton steps within a trust radius.

M1  Steps minimise the rational-function model of the energy: A. Banerjee, N. Adams, J. Simons
    and R. Shepard, J. Phys. Chem. 89 (1985) 52.
M2  The Hessian is updated by the formula of Broyden, Fletcher, Goldfarb and Shanno, skipped
    where the curvature along the step is not positive.
M3  A step is not longer than the trust radius, which shrinks where the model was wrong and grows
    where it was right; a step that raises the energy is taken back.
M4  Forces that would only shift or turn the whole molecule are left out: integration on a grid
    leaves some.

All in atomic units.
"""

from collections.abc import Callable
from dataclasses import dataclass, replace

import numpy as np

from shapeshelf.geometry.vectors import Array

Surface = Callable[[Array], tuple[float, Array]]
"""Coordinates (n, 3) in bohr to energy in hartree and gradient (n, 3) in hartree/bohr."""

LEAST_CURVATURE = 0.02
"""Smallest eigenvalue (hartree/bohr²) a first Hessian is given: turns a saddle's or a free
motion's direction into one that is walked down in moderate steps."""
FIRST_TRUST, MOST_TRUST, LEAST_TRUST = 0.3, 0.6, 1e-4
MOST_REFUSED = 8
"""Steps taken back in a row: there is no way further down that the gradient knows of."""
POOR, GOOD = 0.25, 0.75
RIGID_RATIO = 0.03
"""A rotation whose weight relative to the largest is below this is none: the atoms lie on a line
but for what breaking the symmetry or optimising left."""
ENERGY_NOISE = 2e-7
"""A rise of the energy below this (hartree) is the grid's noise and no reason to go back."""


@dataclass(frozen=True, slots=True)
class Tolerances:
    """When a minimum counts as found, in atomic units."""

    gradient: float
    step: float
    most_steps: int


@dataclass(frozen=True, slots=True)
class Minimum:
    """Where a minimisation ended."""

    coordinates: Array
    energy: float
    gradient: Array
    hessian: Array
    """(3n, 3n), as updated on the way."""
    steps: int
    converged: bool


def minimise(surface: Surface, start: Array, hessian: Array, tolerances: Tolerances) -> Minimum:
    """Return where the energy ends downhill from ``start`` (n, 3).

    ``hessian`` (3n, 3n) is a first guess; it is made positive definite.
    """
    surface = _held(surface)
    energy, gradient = surface(start)
    place = Minimum(start, energy, gradient, positive(hessian), 0, False)
    trust, refused = FIRST_TRUST, 0
    while place.steps < tolerances.most_steps:
        step = _step(place, trust)
        if _done(place, step, tolerances):
            return replace(place, converged=True)
        before = place
        place, trust = _advanced(surface, place, step, trust)
        refused = refused + 1 if place.coordinates is before.coordinates else 0
        if refused == MOST_REFUSED:
            break
    return replace(place, converged=_flat(place, tolerances))


def positive(hessian: Array) -> Array:
    """Return ``hessian`` with every eigenvalue made positive, none below LEAST_CURVATURE."""
    values, vectors = np.linalg.eigh((hessian + hessian.T) / 2)
    return np.asarray((vectors * np.maximum(np.abs(values), LEAST_CURVATURE)) @ vectors.T)


def _held(surface: Surface) -> Surface:
    """Return the surface without forces on the molecule as a whole (M4)."""

    def held(coordinates: Array) -> tuple[float, Array]:
        energy, gradient = surface(coordinates)
        rigid = rigid_motions(coordinates)
        slope = gradient.ravel()
        return energy, np.asarray(slope - rigid.T @ (rigid @ slope)).reshape(-1, 3)

    return held


def rigid_motions(points: Array) -> Array:
    """Return orthonormal motions (5 or 6, 3n) of ``points`` (n, 3) that change no distance."""
    centred = points - points.mean(axis=0)
    shifts = np.array([np.tile(axis, len(points)) for axis in np.eye(3)]) / np.sqrt(len(points))
    turns = np.array([np.cross(axis, centred).ravel() for axis in np.eye(3)])
    _, sizes, rows = np.linalg.svd(turns, full_matrices=False)
    return np.vstack([shifts, rows[sizes > RIGID_RATIO * sizes[0]]])


def _step(place: Minimum, trust: float) -> Array:
    """Return the step (3n,) of the rational-function model (M1), within the trust radius."""
    slope = place.gradient.ravel()
    size = len(slope)
    augmented = np.zeros((size + 1, size + 1))
    augmented[:size, :size] = place.hessian
    augmented[:size, size] = augmented[size, :size] = slope
    shift = float(np.linalg.eigvalsh(augmented)[0])
    step = -np.linalg.solve(place.hessian - shift * np.eye(size), slope)
    return np.asarray(step * min(1.0, trust / max(float(np.linalg.norm(step)), 1e-12)))


def _done(place: Minimum, step: Array, tolerances: Tolerances) -> bool:
    return _flat(place, tolerances) and float(np.abs(step).max()) <= tolerances.step


def _flat(place: Minimum, tolerances: Tolerances) -> bool:
    return float(np.abs(place.gradient).max()) <= tolerances.gradient


def _advanced(surface: Surface, place: Minimum, step: Array, trust: float) -> tuple[Minimum, float]:
    """Return the place after ``step`` and the next trust radius (M3)."""
    there = place.coordinates + step.reshape(-1, 3)
    energy, gradient = surface(there)
    change = energy - place.energy
    predicted = float(place.gradient.ravel() @ step + step @ place.hessian @ step / 2)
    hessian = _updated(place.hessian, step, (gradient - place.gradient).ravel())
    length = float(np.linalg.norm(step))
    steps = place.steps + 1
    if change > max(ENERGY_NOISE, 0.5 * abs(predicted)):
        return replace(place, hessian=hessian, steps=steps), max(length / 3, LEAST_TRUST)
    ratio = change / predicted if abs(predicted) > ENERGY_NOISE else 1.0
    if ratio < POOR:
        trust = max(length / 2, LEAST_TRUST)
    elif ratio > GOOD and length > 0.8 * trust:
        trust = min(2 * trust, MOST_TRUST)
    return Minimum(there, energy, gradient, hessian, steps, False), trust


def _updated(hessian: Array, step: Array, change: Array) -> Array:
    """Return the Hessian after the BFGS formula (M2)."""
    curvature = float(step @ change)
    if curvature <= 1e-3 * float(step @ step) * LEAST_CURVATURE:
        return hessian
    moved = hessian @ step
    return np.asarray(
        hessian + np.outer(change, change) / curvature - np.outer(moved, moved) / (step @ moved)
    )
