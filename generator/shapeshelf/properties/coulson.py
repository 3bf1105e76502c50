"""Hybrid orbitals of an s-p centre from the directions of its bonds.

H1  Coulson's theorem: two hybrids of one atom, s + lambda p along the bonds i and j, are
    orthogonal where 1 + lambda_i lambda_j cos theta_ij = 0; the s-character is
    1 / (1 + lambda^2).
H2  One s orbital: the s-characters of all bonds and lone pairs at a centre add up to one. What
    the bonds leave, the lone pairs and single electrons share equally.
H3  More angles than hybrids: least squares over the overlaps that should be zero. Fewer angles
    than hybrids: of all solutions the one with the s-characters nearest to equal.
H4  Bonds into a ring of three or four at a centre without lone pairs are bent: their hybrids do
    not lie along them, so their angles are left out, and they share what the others leave.
H5  Under 90 degrees two s-p hybrids cannot both follow their bonds. Least squares then takes the
    nearest they can come, bare p orbitals.

Sources: C. A. Coulson, Valence, 2nd ed., Oxford University Press, 1961 (H1, H2, H4; recalled from
memory). H3 and H5 are ours.
"""

from collections.abc import Sequence
from itertools import combinations

import numpy as np

from shapeshelf.geometry.vectors import Array

SUM_WEIGHT = 10.0
"""The sum rule is exact, the angles are those of a model or a measurement."""
LEVEL_WEIGHT = 0.01
"""Weak enough to move a determined s-character by less than 0.001."""
DAMPING = 1e-6
STEPS = 60
SMALL = 1e-9


def s_characters(directions: Array, lone: int, bent: Sequence[bool]) -> tuple[float, ...]:
    """Return the s-character of every bond, 0 to 1.

    ``directions`` (n, 3) unit vectors, ``lone`` the number of lone pairs and single electrons
    that are domains, ``bent`` which of the n bonds lie in a small ring (H4).
    """
    count = len(directions)
    if count == 1:
        return (1 / (1 + lone),)
    pairs = _pairs_that_count(count, lone, bent)
    cosines = np.array([float(directions[i] @ directions[j]) for i, j in pairs])
    angles = np.full(count, np.arcsin(np.sqrt(1 / (count + lone))))
    for _ in range(STEPS):
        residuals, slopes = _residuals(angles, pairs, cosines, lone)
        normal = slopes.T @ slopes + DAMPING * np.eye(count)
        moved = np.clip(angles - np.linalg.solve(normal, slopes.T @ residuals), 0.0, np.pi / 2)
        done = float(np.abs(moved - angles).max()) < SMALL
        angles = moved
        if done:
            break
    found = np.sin(angles) ** 2
    total = float(found.sum())
    exact = found / total if not lone or total > 1 else found
    return tuple(float(value) for value in exact)


def _pairs_that_count(count: int, lone: int, bent: Sequence[bool]) -> list[tuple[int, int]]:
    """Return the pairs of bonds whose angle is that of their hybrids (H4)."""
    pairs = combinations(range(count), 2)
    return [(i, j) for i, j in pairs if lone or not (bent[i] or bent[j])]


def _residuals(
    angles: Array, pairs: Sequence[tuple[int, int]], cosines: Array, lone: int
) -> tuple[Array, Array]:
    """Return what should be zero, and its slopes; s = sin^2 of the ``angles`` (n,).

    Rows: one overlap for each pair (H1), the sum (H2), one distance from the mean for each
    bond (H3).
    """
    count = len(angles)
    sine, cosine = np.sin(angles), np.cos(angles)
    rows = len(pairs) + 1 + count
    residuals, slopes = np.zeros(rows), np.zeros((rows, count))
    for row, ((i, j), between) in enumerate(zip(pairs, cosines, strict=True)):
        residuals[row] = sine[i] * sine[j] + cosine[i] * cosine[j] * between
        slopes[row, i] = cosine[i] * sine[j] - sine[i] * cosine[j] * between
        slopes[row, j] = sine[i] * cosine[j] - cosine[i] * sine[j] * between
    share, share_slope = sine**2, 2 * sine * cosine
    excess = float(share.sum()) - 1
    if not lone or excess > 0:
        residuals[len(pairs)] = SUM_WEIGHT * excess
        slopes[len(pairs)] = SUM_WEIGHT * share_slope
    residuals[len(pairs) + 1 :] = LEVEL_WEIGHT * (share - share.mean())
    slopes[len(pairs) + 1 :] = LEVEL_WEIGHT * (np.eye(count) - 1 / count) * share_slope
    return residuals, slopes
