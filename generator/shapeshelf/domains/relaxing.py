"""From an arrangement's directions to relaxed frames: which way double bonds split, and saddles."""

import numpy as np
import numpy.typing as npt

from shapeshelf.domains.repulsion import Problem, frames_for, relax, stable, turn

Array = npt.NDArray[np.float64]
SAME_ENERGY = 1e-6
NUDGE_RADIANS = 0.02


def relax_from(problem: Problem, ideal: Array) -> tuple[Array, Array]:
    """Relax from unit directions (b, n, 3), double bonds split either way, and keep the lower.

    Returns frames (b, 2, n, 3) and energies (b,), the symmetry of each start kept.
    """
    towards = _towards_nearest(ideal)
    starts = [frames_for(ideal, np.cross(ideal, towards))]
    if len(problem.owner) > ideal.shape[1] > 3:
        starts.append(frames_for(ideal, towards))
    frames, energies = relax(problem, starts[0])
    for start in starts[1:]:
        other, value = relax(problem, start)
        lower = value < energies - SAME_ENERGY
        frames = np.where(lower[:, None, None, None], other, frames)
        energies = np.where(lower, value, energies)
    return frames, energies


def _towards_nearest(directions: Array) -> Array:
    """Return (b, n, 3) unit vectors across each direction towards the domain nearest to it.

    For a domain whose nearest lies straight across, any perpendicular, turned by a quarter from
    one such domain to the next, as the pi planes of a cumulene are.
    """
    cosines = np.round(directions @ directions.transpose(0, 2, 1), 6)
    nearest = np.argmax(cosines - 3 * np.eye(directions.shape[1]), axis=2)
    toward = np.take_along_axis(directions, nearest[..., None], axis=1)
    straight = np.abs((toward * directions).sum(-1, keepdims=True)) > 0.999
    axes = np.eye(3)[np.argsort(np.abs(directions), axis=-1)[..., :2]]
    aside = np.where((np.arange(directions.shape[1]) % 2)[:, None], axes[:, :, 1], axes[:, :, 0])
    toward = np.where(straight, aside, toward)
    toward = toward - (toward * directions).sum(-1, keepdims=True) * directions
    return np.asarray(toward / np.linalg.norm(toward, axis=-1, keepdims=True))


def settle(problem: Problem, frames: Array, energies: Array, gain: float) -> tuple[Array, Array]:
    """Let the lowest of b leave a saddle that its symmetry held it on, if it gains ``gain``."""
    best = int(np.argmin(np.round(energies, 9)))
    chosen = frames[best : best + 1]
    if stable(problem, chosen)[0]:
        return frames, energies
    random = np.random.default_rng(0).normal(size=(1, frames.shape[2], 3))
    moved, value = relax(problem, turn(chosen, NUDGE_RADIANS * random))
    if value[0] < energies[best] - gain:
        frames[best], energies[best] = moved[0], value[0]
    return frames, energies
