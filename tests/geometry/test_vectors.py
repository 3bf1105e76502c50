"""Vectors: angles, torsions, rotations, superposition."""

import numpy as np
import pytest

from shapeshelf.geometry.vectors import (
    angle_degrees,
    best_orthogonal,
    distance,
    perpendicular,
    rotation_about,
    rotation_between,
    superpose,
    torsion_degrees,
    unit,
)

ROUNDING = 1e-9
"""A handful of floating-point operations on numbers near one."""


@pytest.mark.parametrize("degrees", [0.0, 0.001, 60.0, 109.471, 179.999, 180.0])
def test_angles_near_the_ends_are_exact(degrees):
    """An angle laid out is the angle read back, near 0 and 180 degrees too."""
    end = rotation_about((0, 0, 1), degrees) @ np.array([2.0, 0.0, 0.0])
    assert abs(angle_degrees((3, 0, 0), (0, 0, 0), end) - degrees) < 1e-6


@pytest.mark.parametrize("degrees", [-150.0, -60.0, 0.0, 90.0, 179.0])
def test_torsions_have_the_sign_of_the_clockwise_turn(degrees):
    """Seen along b-c, a far bond turned clockwise gives a positive torsion (IUPAC rule)."""
    # Seen from b towards c the axis points away, so clockwise is anticlockwise about it.
    far = rotation_about((0, 0, 1), degrees) @ np.array([1.0, 0.0, 0.0]) + np.array([0, 0, 1.5])
    assert abs(torsion_degrees((1, 0, 0), (0, 0, 0), (0, 0, 1.5), far) - degrees) < 1e-6


@pytest.mark.parametrize("end", [(0, 0, 1), (1, 2, 3), (-1, 0, 0), (1, 0, 0)])
def test_a_rotation_between_brings_one_onto_the_other(end):
    """The shortest turn carries the start onto the end, opposite directions included."""
    turn = rotation_between((1, 0, 0), end)
    assert np.abs(turn @ np.array([1.0, 0, 0]) - unit(end)).max() < ROUNDING
    assert abs(np.linalg.det(turn) - 1) < ROUNDING


def test_superposition_undoes_a_motion():
    """Turned and shifted points come back onto themselves; a mirror image does not."""
    points = np.random.default_rng(4).normal(size=(7, 3))
    moved = points @ rotation_about((1, -2, 0.5), 123.0).T + 4.0
    assert np.abs(superpose(moved, points) - points).max() < ROUNDING
    assert np.abs(superpose(moved * [-1, 1, 1], points) - points).max() > 0.1


def test_the_nearest_orthogonal_matrix_can_be_improper():
    """The handedness asked for is the handedness given."""
    matrix = np.random.default_rng(5).normal(size=(3, 3))
    for proper in (True, False):
        nearest = best_orthogonal(matrix, proper)
        assert np.abs(nearest @ nearest.T - np.eye(3)).max() < ROUNDING
        assert (np.linalg.det(nearest) > 0) == proper


def test_small_ones():
    """Distance, a unit vector of nothing, and a perpendicular."""
    assert distance((0, 0, 0), (0, 3, 4)) == 5.0
    assert np.array_equal(unit((0, 0, 0)), np.zeros(3))
    assert abs(perpendicular((1, 1, 1)) @ np.ones(3)) < ROUNDING
