"""Repulsion between electron domains at one centre: energy, gradient, curvature, relaxation.

Every domain i is a frame of two perpendicular unit vectors: u_i, its direction, and q_i, the
direction in which the two halves of a double bond are split. The energy, in units of its own, is

    E = - sum over charges k, l of different domains   w_k w_l ln d_kl
        + sum over pairs of bonds i, j                 K ((R_i + R_j) / D_ij)^8
        + sum over pairs of bonds i, j                 kappa sin^2(2 theta_ij)

    d_kl = |h_k - h_l|                      distance between charges on the unit sphere
    h_k  = cos(beta) u_i +- sin(beta) q_i   the two halves of a split double bond; else u_i
    D_ij^2 = r_i^2 + r_j^2 - 2 r_i r_j cos(theta_ij)    distance between ligands, r bond lengths

The first sum is the repulsion of domains on a sphere (R. J. Gillespie and R. S. Nyholm, Quart.
Rev. Chem. Soc. 11 (1957) 339) in its softest form, the limit of d^-n for n to 0 (L. L. Whyte,
Am. Math. Monthly 59 (1952) 606); soft beat hard on measured angles. The second is the contact of
ligands (L. S. Bartell, J. Chem. Phys. 32 (1960) 827; R. J. Gillespie and E. A. Robinson, C. R.
Chim. 8 (2005) 1631). The third is no repulsion: it stands for the wish of a heavy centre with a
lone pair to bond through p orbitals at right angles, its s electrons staying with the lone pair
(W. Kutzelnigg, Angew. Chem. Int. Ed. 23 (1984) 272). Bent-bond halves of a double bond: L.
Pauling, The Nature of the Chemical Bond, 3rd ed. (1960). Citations recalled from memory.
"""

from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

Array = npt.NDArray[np.float64]
CONTACT_EXPONENT = 8


@dataclass(frozen=True, slots=True)
class Problem:
    """The numbers that the energy of n domains needs: m points, the first n the axes u_i."""

    owner: npt.NDArray[np.int64]
    """(m,) the domain each point belongs to."""
    along: Array
    """(m,) share of u in the point."""
    across: Array
    """(m,) share of q in the point."""
    charges: Array
    """(m, m) products of charges; 0 between points of one domain."""
    contact: Array
    """(n, n) K (R_i + R_j)^8 in ångström^8; 0 where there is no pair of bonds."""
    squares: Array
    """(n, n) r_i^2 + r_j^2, square ångström; 1 where there is no pair of bonds."""
    products: Array
    """(n, n) 2 r_i r_j, square ångström; 0 where there is no pair of bonds."""
    orthogonality: Array
    """(n, n) kappa; 0 where there is no pair of bonds."""


def problem_for(
    weights: Array,
    splits: Array,
    lengths: Array,
    radii: Array,
    contact: float,
    orthogonality: float,
) -> Problem:
    """Return the problem for n domains.

    ``weights`` (n,); ``splits`` (n,) half-angles beta in radians, 0 for a round domain;
    ``lengths`` (n,) and contact ``radii`` (n,) in ångström, 0 for a domain that is no bond.
    """
    count = len(weights)
    split = np.flatnonzero(splits)
    owner = np.concatenate([np.arange(count), split, split])
    charge = np.concatenate([np.where(splits > 0, 0, weights), *[weights[split] / 2] * 2])
    bonds = np.outer(lengths > 0, lengths > 0) & ~np.eye(count, dtype=bool)
    return Problem(
        owner=owner,
        along=np.concatenate([np.ones(count), *[np.cos(splits[split])] * 2]),
        across=np.concatenate([np.zeros(count), np.sin(splits[split]), -np.sin(splits[split])]),
        charges=np.where(owner[:, None] == owner, 0, np.outer(charge, charge)),
        contact=np.where(bonds, contact * np.add.outer(radii, radii) ** CONTACT_EXPONENT, 0),
        squares=np.where(bonds, np.add.outer(lengths**2, lengths**2), 1),
        products=np.where(bonds, 2 * np.outer(lengths, lengths), 0),
        orthogonality=np.where(bonds, orthogonality, 0),
    )


def frames_for(directions: Array, splits: Array | None = None) -> Array:
    """Return frames (b, 2, n, 3) of unit ``directions`` (b, n, 3), splits made perpendicular.

    Without ``splits`` (b, n, 3) any perpendicular serves, as for round domains.
    """
    if splits is None:
        splits = np.eye(3)[np.argmin(np.abs(directions), axis=-1)]
    across = splits - (splits * directions).sum(-1, keepdims=True) * directions
    across /= np.linalg.norm(across, axis=-1, keepdims=True)
    return np.stack([directions, across], axis=1)


def energy(problem: Problem, frames: Array) -> Array:
    """Return the energy (b,) of ``frames`` (b, 2, n, 3): directions u, then splits q."""
    return _pair_terms(problem, _cosines(_points(problem, frames)))[0]


def gradient(problem: Problem, frames: Array) -> Array:
    """Return dE/d(rotation) (b, n, 3) per radian of turning each domain about x, y, z."""
    return _slopes(problem, frames)[1]


def curvature(problem: Problem, frames: Array) -> Array:
    """Return the second derivatives (b, 3n, 3n) for turning the domains."""
    return _slopes(problem, frames)[2]


def relax(problem: Problem, frames: Array, steps: int = 60) -> tuple[Array, Array]:
    """Return relaxed frames (b, 2, n, 3) and energies (b,) by damped Newton steps.

    The symmetry of a start is kept: a symmetric start ends on the stationary point of that
    symmetry, which may be a saddle.
    """
    energies = energy(problem, frames)
    for _ in range(steps):
        _, slope, second = _slopes(problem, frames)
        if np.abs(slope).max() < 1e-9:
            break
        step = _newton_step(slope, second)
        frames, energies, moved = _step_downhill(problem, frames, energies, step)
        if not moved:
            break
    return frames, energies


def stable(problem: Problem, frames: Array) -> npt.NDArray[np.bool_]:
    """Return (b,) whether each stationary point is a minimum rather than a saddle."""
    values = np.linalg.eigvalsh(curvature(problem, frames))
    return np.asarray(values[:, 0] > -1e-5)


def turn(frames: Array, rotations: Array) -> Array:
    """Return frames (b, 2, n, 3) turned domain by domain by rotation vectors (b, n, 3)."""
    angle = np.linalg.norm(rotations, axis=-1, keepdims=True)[:, None]
    axis = rotations[:, None] / np.where(angle > 0, angle, 1)
    dot = (axis * frames).sum(-1, keepdims=True)
    turned = frames * np.cos(angle) + np.cross(axis, frames) * np.sin(angle)
    return np.asarray(turned + axis * dot * (1 - np.cos(angle)))


def _points(problem: Problem, frames: Array) -> Array:
    along, across = problem.along[:, None], problem.across[:, None]
    return along * frames[:, 0, problem.owner] + across * frames[:, 1, problem.owner]


def _cosines(points: Array) -> Array:
    return np.clip(points @ points.transpose(0, 2, 1), -1, 1)


def _pair_terms(problem: Problem, cosines: Array) -> tuple[Array, Array, Array]:
    """Energy (b,), and its first and second derivatives (b, m, m) with each pair's cosine."""
    square = np.where(problem.charges != 0, np.maximum(2 - 2 * cosines, 1e-6), 1)
    pair = -problem.charges * np.log(square) / 2
    first = problem.charges / square
    second = 2 * first / square
    count = len(problem.contact)
    inner = cosines[:, :count, :count]
    reach = np.maximum(problem.squares - problem.products * inner, 1e-6)
    power = CONTACT_EXPONENT / 2
    touch = problem.contact / reach**power
    c2 = inner * inner
    tilt = problem.orthogonality
    total = pair.sum((1, 2)) + (touch + 4 * tilt * c2 * (1 - c2)).sum((1, 2))
    ratio = problem.products / reach
    first[:, :count, :count] += power * touch * ratio + tilt * inner * (8 - 16 * c2)
    second[:, :count, :count] += power * (power + 1) * touch * ratio**2 + tilt * (8 - 48 * c2)
    return total / 2, first, second


def _slopes(problem: Problem, frames: Array) -> tuple[Array, Array, Array]:
    points = _points(problem, frames)
    cosines = _cosines(points)
    total, first, second = _pair_terms(problem, cosines)
    member = (problem.owner == np.arange(frames.shape[2])[:, None]).astype(float)
    slope = member @ np.cross(points, first @ points)
    return total, slope, _second_slopes(points, cosines, first, second, member)


def _second_slopes(
    points: Array, cosines: Array, first: Array, second: Array, member: Array
) -> Array:
    """Second derivatives, from those with the cosines c_kl = h_k . h_l by the chain rule."""
    batch, size, _ = points.shape
    count = len(member)
    normal = np.cross(points[:, :, None], points[:, None])
    bend = second[..., None, None] * normal[..., :, None] * normal[..., None, :]
    bend -= (first * cosines)[..., None, None] * np.eye(3)
    outer = points[:, :, None, :, None] * points[:, None, :, None, :]
    pull = first[..., None, None] * outer
    swapped = pull.swapaxes(-1, -2)
    own = (bend + (pull + swapped) / 2).sum(2)
    blocks = -bend - swapped
    if size > count:
        blocks = np.tensordot(member, blocks, (1, 1)).swapaxes(0, 1)
        blocks = np.tensordot(member, blocks, (1, 2)).transpose(1, 2, 0, 3, 4)
        own = np.tensordot(member, own, (1, 1)).swapaxes(0, 1)
    index = np.arange(count)
    blocks[:, index, index] += own
    return blocks.transpose(0, 1, 3, 2, 4).reshape(batch, 3 * count, 3 * count)


def _newton_step(slope: Array, second: Array) -> Array:
    values, vectors = np.linalg.eigh((second + second.swapaxes(1, 2)) / 2)
    along = (vectors.swapaxes(1, 2) @ slope.reshape(len(slope), -1, 1))[..., 0]
    size = np.abs(values)
    # Turning a round domain about itself, or all domains together, costs nothing.
    scaled = np.where(size > 1e-7, along / np.maximum(size, 1e-7), 0)
    step = -(vectors @ scaled[..., None])[..., 0].reshape(slope.shape)
    longest = np.linalg.norm(step, axis=-1).max(axis=-1)[:, None, None]
    return np.asarray(step * np.minimum(1, 0.3 / np.maximum(longest, 1e-30)))


def _step_downhill(
    problem: Problem, frames: Array, energies: Array, step: Array
) -> tuple[Array, Array, bool]:
    scale = np.ones(len(frames))
    done = np.zeros(len(frames), dtype=bool)
    best, lowest = frames, energies
    for _ in range(12):
        trial = turn(frames, step * scale[:, None, None])
        value = energy(problem, trial)
        better = ~done & (value <= energies + 1e-13)
        best = np.where(better[:, None, None, None], trial, best)
        lowest = np.where(better, value, lowest)
        done |= better
        if done.all():
            break
        scale = np.where(done, scale, scale / 4)
    return best, lowest, bool(done.any())
