"""Gradients of every term by differences, and the bottom they lead to."""

import numpy as np

from shapeshelf.geometry.forces import Terms, energy_and_gradient, minimised, settled_down
from shapeshelf.geometry.vectors import angle_degrees, distance, torsion_degrees

DIFFERENCE_ANGSTROM = 1e-5
RELATIVE_SLOPE = 1e-6
"""Central differences of a smooth function leave an error of the square of the step."""


def all_terms(count: int, rng: np.random.Generator) -> Terms:
    """One of each term on ``count`` atoms, constants at random."""
    stiffness = rng.random((count, count))
    stiffness = stiffness + stiffness.T
    np.fill_diagonal(stiffness, 0.0)
    contact = np.triu(rng.random((count, count)) > 0.5, 1)
    return Terms(
        stiffness=stiffness,
        goal_angstrom=np.full((count, count), 1.9),
        contact=contact | contact.T,
        soft=0.3 * stiffness,
        lines=np.array([[0, 1, 2], [3, 1, 4]]),
        line_lengths=np.array([[1.0, 1.2], [1.1, 0.9]]),
        volumes=np.array([[0, 1, 2, 3], [2, 3, 4, 5]]),
        volume_lengths=np.array([[1.0, 1.1, 1.2], [1.0, 1.0, 1.0]]),
        volume_goals=np.array([0.0, 0.77]),
        torsions=np.array([[0, 1, 2, 3], [5, 2, 4, 1]]),
        torsion_heights=np.array([3.0, 5.0]),
        torsion_folds=np.array([3.0, 1.0]),
        torsion_minima_degrees=np.array([60.0, -33.0]),
    )


def test_the_gradient_is_the_slope_of_the_energy():
    """Central differences of the energy agree with the gradient for every coordinate."""
    rng = np.random.default_rng(3)
    terms, points = all_terms(6, rng), 1.5 * rng.normal(size=(2, 6, 3))
    _, gradient = energy_and_gradient(terms, points)
    slopes = np.zeros_like(points)
    for place in np.ndindex(points.shape):
        for sign in (1, -1):
            moved = points.copy()
            moved[place] += sign * DIFFERENCE_ANGSTROM
            energy = energy_and_gradient(terms, moved)[0][place[0]]
            slopes[place] += sign * energy / (2 * DIFFERENCE_ANGSTROM)
    # Torsions carry a small floor against three atoms in line, of a thousandth.
    assert np.abs(slopes - gradient).max() < 2e-3 * np.abs(gradient).max()


def chain() -> Terms:
    """Four atoms in a chain: bonds 1.5, angles by distances 2.4, torsion at -60 degrees."""
    goal = np.array([[0, 1.5, 2.4, 0], [0, 0, 1.5, 2.4], [0, 0, 0, 1.5], [0, 0, 0, 0]])
    goal = goal + goal.T
    none = np.zeros((4, 4))
    return Terms(
        stiffness=np.where(goal > 0, 300.0, 0.0),
        goal_angstrom=goal,
        contact=none.astype(bool),
        soft=none,
        torsions=np.array([[0, 1, 2, 3]]),
        torsion_heights=np.array([2.0]),
        torsion_folds=np.array([1.0]),
        torsion_minima_degrees=np.array([-60.0]),
    )


def test_lengths_angles_and_torsions_reach_their_targets():
    """From anywhere, a chain of four comes to rest at its targets, torsion sign included."""
    starts = np.random.default_rng(1).normal(size=(3, 4, 3))
    rough, _ = minimised(chain(), starts, 200, slope=0.05)
    for points in rough:
        final, energy = settled_down(chain(), points)
        assert energy < RELATIVE_SLOPE
        assert abs(distance(final[0], final[1]) - 1.5) < 1e-4
        expected = np.degrees(2 * np.arcsin(2.4 / 3.0))
        assert abs(angle_degrees(*final[:3]) - expected) < 0.01
        assert abs(torsion_degrees(*final) + 60.0) < 0.05
