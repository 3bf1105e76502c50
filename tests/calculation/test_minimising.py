"""The minimiser finds minima of surfaces whose minima are known."""

import numpy as np
import pytest

from shapeshelf.calculation.minimising import Tolerances, minimise, positive, rigid_motions

TOLERANCES = Tolerances(gradient=1e-6, step=1e-5, most_steps=200)
TRIANGLE = np.array([[0.0, 0.0, 0.0], [2.0, 0.0, 0.0], [0.9, 1.9, 0.0]])
LENGTH = 1e-4
"""Bohr; a hundred times what the gradient tolerance leaves with these springs."""


def springs(wanted, constants):
    """Return a surface of springs between three points and their rest lengths."""
    pairs = ((0, 1), (1, 2), (0, 2))

    def surface(points):
        energy, gradient = 0.0, np.zeros((3, 3))
        for (a, b), length, constant in zip(pairs, wanted, constants, strict=True):
            vector = points[b] - points[a]
            distance = np.linalg.norm(vector)
            energy += constant * (distance - length) ** 2 / 2
            pull = constant * (distance - length) * vector / distance
            gradient[b] += pull
            gradient[a] -= pull
        return energy, gradient

    return surface


def double_well(points):
    """Two atoms on the x axis, a third off it: minima at y = 1 and y = -1, a saddle at 0."""
    y = points[2, 1]
    stretch = points[1, 0] - points[0, 0] - 2.0
    gradient = np.zeros((3, 3))
    gradient[2, 1] = 0.2 * y * (y**2 - 1)
    gradient[1, 0], gradient[0, 0] = stretch, -stretch
    return 0.05 * (y**2 - 1) ** 2 + stretch**2 / 2, gradient


@pytest.mark.parametrize(
    ("wanted", "constants"),
    [((2.1, 2.1, 2.1), (0.5, 0.5, 0.5)), ((1.8, 2.6, 2.2), (0.5, 0.05, 0.2))],
)
def test_springs_come_to_rest_at_their_lengths(wanted, constants):
    """Three springs that make a triangle relax to exactly its sides."""
    found = minimise(springs(wanted, constants), TRIANGLE, np.eye(9) * 0.3, TOLERANCES)
    sides = [
        np.linalg.norm(found.coordinates[b] - found.coordinates[a])
        for a, b in ((0, 1), (1, 2), (0, 2))
    ]
    assert found.converged
    assert sides == pytest.approx(wanted, abs=LENGTH)


def test_a_start_beside_a_saddle_leaves_it():
    """A Hessian that is negative at the start sends the optimisation down, not onto the saddle."""
    start = np.array([[0.0, 0.0, 0.0], [2.0, 0.0, 0.0], [1.0, 0.02, 0.0]])
    hessian = np.diag([1.0] * 7 + [-0.2] + [1.0])
    found = minimise(_free(double_well), start, hessian, TOLERANCES)
    assert found.energy == pytest.approx(0.0, abs=1e-8)


def _free(surface):
    """Measure the third atom's height from the line of the others, however they are turned."""

    def free(points):
        base = points[1] - points[0]
        length = np.linalg.norm(base)
        axis = base / length
        arm = points[2] - points[0]
        height = arm - (arm @ axis) * axis
        y = np.linalg.norm(height)
        local = np.array([[0, 0, 0], [length, 0, 0], [0, y, 0]])
        energy, slopes = surface(local)
        gradient = np.zeros((3, 3))
        gradient[1] += slopes[1, 0] * axis
        gradient[0] -= slopes[1, 0] * axis
        up = height / y
        along = arm @ axis
        gradient[2] += slopes[2, 1] * up
        gradient[1] -= slopes[2, 1] * up * along / length
        gradient[0] -= slopes[2, 1] * up * (1 - along / length)
        return energy, gradient

    return free


def test_steps_run_out():
    """A minimum that is not reached in the steps allowed is not called one."""
    few = Tolerances(gradient=1e-9, step=1e-9, most_steps=2)
    found = minimise(springs((1.2, 2.6, 2.2), (0.5, 0.05, 0.2)), TRIANGLE, np.eye(9), few)
    assert (found.steps, found.converged) == (2, False)


def test_positive_keeps_directions_and_mends_signs():
    """Eigenvalues become positive and not smaller than a floor; eigenvectors stay."""
    given = np.diag([-0.5, 0.001, 2.0])
    assert np.diag(positive(given)) == pytest.approx([0.5, 0.02, 2.0])


@pytest.mark.parametrize(
    ("points", "count"),
    [(TRIANGLE, 6), (np.array([[0.0, 0, 0], [2, 0.01, 0], [4.1, 0, 0]]), 5)],
)
def test_rigid_motions_change_no_distance(points, count):
    """Six for a bent molecule, five for one that is straight but for a hundredth of a bohr."""
    motions = rigid_motions(points)
    assert motions.shape == (count, 9)
    assert motions @ motions.T == pytest.approx(np.eye(count), abs=1e-12)
    moved = points + 1e-5 * motions[-1].reshape(3, 3)
    assert np.linalg.norm(moved[0] - moved[2]) == pytest.approx(
        np.linalg.norm(points[0] - points[2]), abs=1e-8
    )
