"""Every operation that carries a set of atoms onto itself, as one closed, exact group.

S1  An operation is fixed by what it does to two atoms that are not in line with the centre,
    save for a reflection. Two atoms with few possible images are chosen, every pair of images
    with the same distances tried, both as a rotation and as a rotation-reflection.
S2  Each trial is refined by orthogonal Procrustes on all atoms and kept where no atom misses
    its image by more than the tolerance.
S3  What is kept must be a group: the loosest cut-off under which the kept set is closed wins.
S4  The matrices are made an exact representation of that group by averaging
    R(g) <- orthogonal part of mean over h of R(gh) R(h)^T, and the coordinates are averaged
    over the group.
"""

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray
from scipy.spatial import cKDTree

from shapeshelf.geometry.model import SymmetryOperation
from shapeshelf.geometry.vectors import Array, best_orthogonal

Indices = NDArray[np.int64]

_WELL_SPREAD_SINE = 0.3
_REFINEMENTS = 3
MOST_AT_ONCE = 2_000_000


@dataclass(frozen=True, slots=True)
class OperationSet:
    """Operations in no order: matrices (m, 3, 3), permutations (m, n), deviations (m,)."""

    matrices: Array
    permutations: Indices
    deviations_angstrom: Array

    def part(self, chosen: NDArray[np.bool_] | Indices) -> "OperationSet":
        """Return the chosen operations."""
        return OperationSet(
            self.matrices[chosen], self.permutations[chosen], self.deviations_angstrom[chosen]
        )


def closed_operations(numbers: Indices, points: Array, tolerance: float) -> OperationSet:
    """Return the group of ``points`` (n, 3) about the origin, not all on one line (S1 to S4).

    ``numbers`` (n,) tell unlike atoms apart. The identity comes first; matrices are exact to
    rounding. ``tolerance`` in ångström: the furthest an atom may land from its image.
    """
    alike = _alike(numbers, points, tolerance)
    if alike.sum() == len(points) and not _is_flat(points, tolerance):
        identity = np.eye(3)[None], np.arange(len(points))[None], np.zeros(1)
        return OperationSet(*identity)
    trials = _trial_matrices(alike, points, tolerance)
    found = _distinct(_refined(trials, numbers, points, tolerance))
    group, table = _largest_group(found)
    matrices = _exact_representation(group.matrices, table)
    return OperationSet(matrices, group.permutations, group.deviations_angstrom)


def averaged(points: Array, matrices: Array, permutations: Indices) -> Array:
    """Return ``points`` (n, 3) averaged over the group: atom k lands on ``permutations[:, k]``."""
    images = np.einsum("gij,nj->gni", matrices, points)
    total = np.zeros_like(points)
    for image, permutation in zip(images, permutations, strict=True):
        total[permutation] += image
    return total / len(matrices)


def carried(vectors: Array, operation: SymmetryOperation) -> Array:
    """Return vectors that sit on atoms, (..., n, 3), where ``operation`` takes them."""
    moved = np.empty_like(vectors)
    moved[..., list(operation.permutation), :] = vectors @ np.array(operation.matrix).T
    return moved


def _alike(numbers: Indices, points: Array, tolerance: float) -> NDArray[np.bool_]:
    """Return which atoms (n, n) an operation may exchange.

    They are of one kind, equally far from the centre, and see the others at equal distances.
    """
    radii = np.linalg.norm(points, axis=1)
    alike = np.asarray(numbers[:, None] == numbers)
    alike &= np.abs(radii[:, None] - radii) <= 2 * tolerance
    views = np.sort(np.linalg.norm(points[:, None] - points, axis=2), axis=1)
    first, second = np.nonzero(alike)
    alike[first, second] = np.abs(views[first] - views[second]).max(axis=1) <= 2 * tolerance
    return alike


def _is_flat(points: Array, tolerance: float) -> bool:
    _, _, axes = np.linalg.svd(points, full_matrices=False)
    return bool(np.abs(points @ axes[-1]).max() <= tolerance)


def _trial_matrices(alike: NDArray[np.bool_], points: Array, tolerance: float) -> Array:
    """Return matrices (m, 3, 3) worth refining (S1), the identity and its mirror among them."""
    radii = np.linalg.norm(points, axis=1)
    first, second = _reference_pair(points, radii, alike.sum(1))
    images, other_images = np.nonzero(alike[first])[0], np.nonzero(alike[second])[0]
    pairs = np.array([(a, b) for a in images for b in other_images if a != b])
    apart = np.linalg.norm(points[pairs[:, 0]] - points[pairs[:, 1]], axis=1)
    wanted = np.linalg.norm(points[first] - points[second])
    pairs = pairs[np.abs(apart - wanted) <= 2 * tolerance]
    base = _frames(points[first][None], points[second][None])[0]
    frames = _frames(points[pairs[:, 0]], points[pairs[:, 1]])
    mirror = np.diag([1.0, 1.0, -1.0])
    return np.concatenate([frames @ base.T, frames @ mirror @ base.T])


def _reference_pair(points: Array, radii: Array, image_counts: Indices) -> tuple[int, int]:
    """Return two atoms well out of line with the origin that have the fewest images."""
    lengths = np.maximum(radii, 1e-9)
    cosine = np.clip((points @ points.T) / np.outer(lengths, lengths), -1.0, 1.0)
    reach = np.minimum.outer(radii, radii) * np.sqrt(1.0 - cosine**2)
    good = reach >= _WELL_SPREAD_SINE * reach.max()
    cost = np.where(good, np.multiply.outer(image_counts, image_counts) - 1e-3 * reach, np.inf)
    first, second = np.unravel_index(int(np.argmin(cost)), cost.shape)
    return int(first), int(second)


def _frames(first: Array, second: Array) -> Array:
    """Return right-handed frames (m, 3, 3), columns along ``first`` and in the pair's plane."""
    x = first / np.linalg.norm(first, axis=1, keepdims=True)
    z = np.cross(first, second)
    z = z / np.maximum(np.linalg.norm(z, axis=1, keepdims=True), 1e-12)
    return np.stack([x, np.cross(z, x), z], axis=2)


def _refined(trials: Array, numbers: Indices, points: Array, tolerance: float) -> OperationSet:
    """Return the trials that carry every atom onto one of its kind within tolerance (S2)."""
    proper = np.linalg.det(trials) > 0
    matrices = trials
    for _ in range(_REFINEMENTS):
        permutations = _nearest(matrices, numbers, points)
        one_to_one = (np.sort(permutations, axis=1) == np.arange(len(points))).all(axis=1)
        permutations, proper = permutations[one_to_one], proper[one_to_one]
        covariance = np.einsum("mni,nj->mij", points[permutations], points)
        matrices = best_orthogonal(covariance, proper)
    images = np.einsum("mij,nj->mni", matrices, points)
    deviations = np.linalg.norm(images - points[permutations], axis=2).max(axis=1)
    return OperationSet(matrices, permutations, deviations).part(deviations <= tolerance)


def _nearest(matrices: Array, numbers: Indices, points: Array) -> Indices:
    """Return for each matrix the nearest like atom to each atom's image (m, n)."""
    images = np.einsum("mij,nj->mni", matrices, points)
    nearest = np.empty(images.shape[:2], dtype=np.int64)
    for number in np.unique(numbers):
        alike = np.nonzero(numbers == number)[0]
        _, places = cKDTree(points[alike]).query(images[:, alike])
        nearest[:, alike] = alike[places]
    return nearest


def _distinct(found: OperationSet) -> OperationSet:
    """Return each operation once, the identity first, then by growing deviation."""
    marks = _marks(found.permutations, np.linalg.det(found.matrices) > 0)
    identity = _marks(np.arange(found.permutations.shape[1])[None], np.array([True]))[0]
    order = np.lexsort((found.deviations_angstrom, marks != identity))
    _, first_seen = np.unique(marks[order], return_index=True)
    return found.part(order[np.sort(first_seen)])


def _marks(permutations: Indices, proper: NDArray[np.bool_]) -> Indices:
    """Return one number an operation (m,) that tells operations apart.

    For atoms not on one line an operation is its permutation and its handedness. The mark is
    a sum of fixed random weights: two unlike ones agree with a probability near 2^-63.
    """
    size = permutations.shape[1]
    weights = np.random.default_rng(size).integers(-(2**62), 2**62, size)
    return np.asarray((permutations * weights).sum(axis=1) * 2 + proper)


def _largest_group(found: OperationSet) -> tuple[OperationSet, Indices]:
    """Return the operations under the loosest cut-off that is closed, and their table (S3)."""
    cuts = np.unique(found.deviations_angstrom)[::-1]
    for cut in cuts:
        group = found.part(found.deviations_angstrom <= cut)
        table = _multiplication_table(group)
        if table is not None:
            return group, table
    return found.part(np.array([0])), np.zeros((1, 1), dtype=np.int64)


def _multiplication_table(group: OperationSet) -> Indices | None:
    """Return the row of each product g h (m, m), ``None`` where one is missing."""
    proper = np.linalg.det(group.matrices) > 0
    marks, size = _marks(group.permutations, proper), group.permutations.shape[1]
    order = np.argsort(marks)
    table = np.empty((len(marks), len(marks)), dtype=np.int64)
    for rows in np.array_split(np.arange(len(marks)), 1 + marks.size**2 * size // MOST_AT_ONCE):
        products = _marks(
            group.permutations[rows][:, group.permutations].reshape(-1, size),
            (proper[rows][:, None] == proper).ravel(),
        )
        places = np.searchsorted(marks, products, sorter=order).clip(max=len(marks) - 1)
        found = order[places]
        if (marks[found] != products).any():
            return None
        table[rows] = found.reshape(len(rows), -1)
    return table


def _exact_representation(matrices: Array, table: Indices) -> Array:
    """Return orthogonal matrices that multiply exactly as ``table`` says (S4)."""
    proper = np.linalg.det(matrices) > 0
    for _ in range(6):
        means = np.einsum("ghij,hkj->gik", matrices[table], matrices) / len(matrices)
        matrices = best_orthogonal(means, proper)
    return matrices
