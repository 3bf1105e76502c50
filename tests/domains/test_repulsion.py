"""The energy's slopes are its slopes, and relaxing finds minima."""

import numpy as np
import pytest

from shapeshelf.domains.repulsion import (
    curvature,
    energy,
    frames_for,
    gradient,
    problem_for,
    relax,
    stable,
    turn,
)

STEP_RADIANS = 1e-5
SLOPE = 1e-5
"""Central differences with that step are right to about ten digits less what rounding takes."""
CURVATURE = 1e-3
AT_REST = 1e-8
DOMAINS = 5


def a_problem():
    """Return a problem with everything in it: split, round, bonded and empty domains."""
    return problem_for(
        weights=np.array([0.7, 1.2, 1.6, 0.9, 1.1]),
        splits=np.array([0.0, 0.6, 0.0, 0.0, 0.3]),
        lengths=np.array([1.5, 1.6, 0.0, 1.7, 1.4]),
        radii=np.array([1.0, 1.1, 0.0, 1.2, 1.0]),
        contact=0.08,
        orthogonality=0.03,
    )


def spread_frames():
    """Return three sets of frames (3, 2, 5, 3), well spread but far from any minimum."""
    random = np.random.default_rng(3)
    poles = np.array([[0, 0, 1], [0, 0, -1], [1, 0, 0], [-0.5, 0.8, 0], [-0.5, -0.8, 0.1]])
    directions = poles + 0.15 * random.normal(size=(3, DOMAINS, 3))
    directions /= np.linalg.norm(directions, axis=-1, keepdims=True)
    return frames_for(directions, random.normal(size=(3, DOMAINS, 3)))


def turns():
    """Yield the flat index and the small rotation (1, 5, 3) for each degree of freedom."""
    for flat in range(3 * DOMAINS):
        rotation = np.zeros(3 * DOMAINS)
        rotation[flat] = STEP_RADIANS
        yield flat, rotation.reshape(1, DOMAINS, 3)


def test_gradient_is_the_slope_of_the_energy():
    """The analytic gradient agrees with central differences of the energy."""
    problem, frames = a_problem(), spread_frames()
    analytic = gradient(problem, frames).reshape(3, -1)
    for flat, rotation in turns():
        rise = energy(problem, turn(frames, rotation)) - energy(problem, turn(frames, -rotation))
        assert analytic[:, flat] == pytest.approx(rise / (2 * STEP_RADIANS), abs=SLOPE)


def test_curvature_is_the_slope_of_the_gradient():
    """The analytic second derivatives agree with differences of the gradient, once symmetrised."""
    problem, frames = a_problem(), spread_frames()
    numeric = np.zeros((3, 3 * DOMAINS, 3 * DOMAINS))
    for flat, rotation in turns():
        rise = gradient(problem, turn(frames, rotation)) - gradient(
            problem, turn(frames, -rotation)
        )
        numeric[:, :, flat] = (rise / (2 * STEP_RADIANS)).reshape(3, -1)
    numeric = (numeric + numeric.swapaxes(1, 2)) / 2
    assert np.abs(curvature(problem, frames) - numeric).max() < CURVATURE


def test_relaxing_ends_at_rest_and_lower():
    """Relaxed frames feel no force, lie below their start, and are minima."""
    problem, frames = a_problem(), spread_frames()
    relaxed, energies = relax(problem, frames)
    assert np.abs(gradient(problem, relaxed)).max() < AT_REST
    assert (energies < energy(problem, frames)).all()
    assert stable(problem, relaxed).all()


def test_energy_does_not_depend_on_the_frame_of_reference():
    """Turning everything together changes no energy."""
    problem, frames = a_problem(), spread_frames()
    together = np.broadcast_to(np.array([0.3, -0.7, 1.1]), (1, DOMAINS, 3))
    assert energy(problem, turn(frames, together)) == pytest.approx(energy(problem, frames))


def test_a_symmetric_saddle_is_told_from_a_minimum():
    """Four equal domains at rest in a square are a saddle, in a tetrahedron a minimum."""
    ones, none = np.ones(4), np.zeros(4)
    problem = problem_for(ones, none, none, none, 0.0, 0.0)
    square = np.array([[[1, 0, 0], [0, 1, 0], [-1, 0, 0], [0, -1, 0]]], dtype=float)
    corners = np.array([[[1, 1, 1], [1, -1, -1], [-1, 1, -1], [-1, -1, 1]]]) / np.sqrt(3)
    assert not stable(problem, relax(problem, frames_for(square))[0])[0]
    assert stable(problem, relax(problem, frames_for(corners))[0])[0]
