"""Which angles a point group fixes: those that no totally symmetric motion of the atoms changes."""

from collections.abc import Iterable

import numpy as np

from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.operations import averaged
from shapeshelf.geometry.vectors import angle_degrees

DISPLACEMENT_ANGSTROM = 0.05
"""Of each coordinate, before averaging over the group; what is free moves by degrees."""
UNCHANGED_DEGREES = 1e-3
"""Far above rounding, which reaches 1e-5 degrees near a straight angle."""


def is_fixed(symmetry: Symmetry, angles: Iterable[tuple[int, int, int]]) -> bool:
    """Tell whether the point group alone gives every one of the ``angles`` (atoms i, j, k).

    The 109.47 degrees of a tetrahedron are fixed, the angle of a bent molecule is not. Of a
    linear molecule every straight angle is.
    """
    points = np.array(symmetry.coordinates_angstrom)
    steps = np.random.default_rng(0).uniform(-1.0, 1.0, points.shape) * DISPLACEMENT_ANGSTROM
    moved = points + averaged(
        steps,
        np.array([operation.matrix for operation in symmetry.operations]),
        np.array([operation.permutation for operation in symmetry.operations]),
    )
    return all(
        abs(angle_degrees(*moved[list(atoms)]) - angle_degrees(*points[list(atoms)]))
        < UNCHANGED_DEGREES
        for atoms in angles
    )
