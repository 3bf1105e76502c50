"""Second derivatives from gradients at displaced geometries, as few of them as symmetry allows.

D1  One atom of each set of equivalent ones is displaced; the operations of the point group carry
    the answer to all the others.
D2  Of the directions in which it may move, one is left out where an operation that keeps the atom
    in place turns another into it, and one side is enough where an operation turns it round.
D3  A displacement u and its answer g obey H u = g; all images together determine H.

All in atomic units.
"""

from collections.abc import Callable, Sequence
from dataclasses import dataclass

import numpy as np

from shapeshelf.calculation.units import BOHR_ANGSTROM
from shapeshelf.geometry.model import Symmetry, SymmetryOperation
from shapeshelf.geometry.operations import carried
from shapeshelf.geometry.vectors import Array

Evaluated = Callable[[Array], tuple[Array, Array]]
"""Coordinates (n, 3) to gradient (n, 3) and dipole moment (3,)."""
SAME = 1e-6


@dataclass(frozen=True, slots=True)
class Displacement:
    """One atom along one unit vector (3,)."""

    atom: int
    direction: Array
    turned_round_by: SymmetryOperation | None
    """An operation after which it is its own opposite."""


def displacements_of(place: Array, symmetry: Symmetry) -> tuple[Displacement, ...]:
    """Return the displacements of a structure (n, 3) that stand for all others (D1, D2)."""
    centred = place - np.array(symmetry.centre_angstrom) / BOHR_ANGSTROM
    found: list[Displacement] = []
    for atoms in symmetry.equivalent_atoms:
        atom = atoms[0]
        keeping = [one for one in symmetry.operations if one.permutation[atom] == atom]
        span = np.zeros((0, 3))
        for direction in _own_axes(centred[atom], np.array(symmetry.axes)):
            images = np.array([np.array(one.matrix) @ direction for one in keeping])
            if _rank(np.vstack([span, direction])) == _rank(span):
                continue
            span = np.vstack([span, images])
            round_by = next(
                (
                    k
                    for k, image in zip(keeping, images, strict=True)
                    if np.allclose(image, -direction, atol=SAME)
                ),
                None,
            )
            found.append(Displacement(atom, direction, round_by))
    return tuple(found)


def evaluations_of(displacements: Sequence[Displacement]) -> int:
    """Return how many gradients the displacements ask for."""
    return sum(1 if one.turned_round_by else 2 for one in displacements)


def differentiate(
    evaluated: Evaluated, place: Array, symmetry: Symmetry, step: float
) -> tuple[Array, Array]:
    """Return the Hessian (3n, 3n) and dipole derivatives (3n, 3) at ``place`` (n, 3).

    ``place`` has the symmetry exactly; ``step`` is the length of a displacement.
    """
    moves, answers, moments = [], [], []
    for one in displacements_of(place, symmetry):
        gradient, dipole = _slope(evaluated, place, one, step)
        move = _move(place, one)
        for operation in symmetry.operations:
            moves.append(carried(move, operation).ravel())
            answers.append(carried(gradient, operation).ravel())
            moments.append(np.array(operation.matrix) @ dipole)
    inverse = np.linalg.pinv(np.array(moves))
    hessian, slopes = inverse @ np.array(answers), inverse @ np.array(moments)
    return (hessian + hessian.T) / 2, slopes


def averaged_derivatives(hessian: Array, slopes: Array, symmetry: Symmetry) -> tuple[Array, Array]:
    """Return a Hessian (3n, 3n) and dipole derivatives (3n, 3) averaged over the point group."""
    size = len(hessian) // 3
    total, moments = np.zeros_like(hessian), np.zeros_like(slopes)
    for operation in symmetry.operations:
        matrix = np.array(operation.matrix)
        moving = np.zeros((size, 3, size, 3))
        moving[list(operation.permutation), :, range(size), :] = matrix
        flat = moving.reshape(hessian.shape)
        total += flat @ hessian @ flat.T
        moments += flat @ slopes @ matrix.T
    count = len(symmetry.operations)
    return total / count, moments / count


def _slope(
    evaluated: Evaluated, place: Array, displacement: Displacement, step: float
) -> tuple[Array, Array]:
    """Return how gradient (n, 3) and dipole (3,) change along a displacement."""
    move = step * _move(place, displacement)
    gradient, dipole = evaluated(place + move)
    if displacement.turned_round_by is None:
        behind, dipole_behind = evaluated(place - move)
    else:
        behind = carried(gradient, displacement.turned_round_by)
        dipole_behind = np.array(displacement.turned_round_by.matrix) @ dipole
    return (gradient - behind) / (2 * step), (dipole - dipole_behind) / (2 * step)


def _move(place: Array, displacement: Displacement) -> Array:
    """Return a displacement of unit length as the vectors of all atoms (n, 3)."""
    move = np.zeros_like(place)
    move[displacement.atom] = displacement.direction
    return move


def _own_axes(outward: Array, axes: Array) -> Array:
    """Return axes (3, 3) in rows that fit the site of an atom: outward first, where it can be."""
    length = float(np.linalg.norm(outward))
    if length < SAME:
        return axes
    first = outward / length
    beside = next(axis for axis in axes[::-1] if abs(axis @ first) < 0.9)
    second = beside - (beside @ first) * first
    second /= np.linalg.norm(second)
    return np.array([first, second, np.cross(first, second)])


def _rank(vectors: Array) -> int:
    return int(np.linalg.matrix_rank(vectors, tol=1e-3)) if len(vectors) else 0
