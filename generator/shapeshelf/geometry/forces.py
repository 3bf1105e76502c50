"""The penalty on a trial structure, its gradient, and its minimum: many structures at a time.

Energies in arbitrary units near kcal/mol; distances d in ångström, v = (x - x_centre)/L bond
vectors over their target lengths L:

    distance    k (d - d0)^2          bonds and angles (as distances of next neighbours)
    contact     k (d - d0)^2  d < d0  atoms further along the bonds, no closer than they touch
    soft        a / d                 the same pairs: settles what nothing else settles
    line        k |v1 + v2|^2         two opposite bonds
    volume      k (v1 . v2 x v3 - V0)^2   planar (V0 = 0) and stereogenic centres
    torsion     V/2 (1 - cos n(phi - phi0))
"""

from dataclasses import dataclass, field

import numpy as np
from numpy.typing import NDArray
from scipy.optimize import minimize

from shapeshelf.geometry.vectors import Array

Indices = NDArray[np.int64]

MOST_FOR_NEWTON = 18
NEWTON_STEPS = 20
LAST_STEPS = 400
MOST_ATOM_STEPS = 30_000
"""Atoms times steps: beyond some hundred atoms the last steps change little."""
LAST_SLOPE = 5e-3
NEWTON_SLOPE = 1e-3
DIFFERENCE_ANGSTROM = 1e-4


def _no_rows(width: int) -> Indices:
    return np.zeros((0, width), dtype=np.int64)


def _nothing() -> Array:
    return np.zeros(0)


@dataclass(frozen=True, slots=True)
class Terms:
    """All terms of one molecule of n atoms. Pair tables are symmetric, zero where no term is."""

    stiffness: Array
    """(n, n) force constants of distances and contacts."""
    goal_angstrom: Array
    """(n, n) target distances."""
    contact: NDArray[np.bool_]
    """(n, n) whether the term acts only below its target."""
    soft: Array
    """(n, n) weights of the soft repulsion."""
    lines: Indices = field(default_factory=lambda: _no_rows(3))
    """(m, 3) end, centre, end."""
    line_lengths: Array = field(default_factory=lambda: np.zeros((0, 2)))
    line_stiffness: float = 60.0
    volumes: Indices = field(default_factory=lambda: _no_rows(4))
    """(m, 4) centre and three neighbours."""
    volume_lengths: Array = field(default_factory=lambda: np.zeros((0, 3)))
    volume_goals: Array = field(default_factory=_nothing)
    volume_stiffness: float = 40.0
    torsions: Indices = field(default_factory=lambda: _no_rows(4))
    """(m, 4) atoms a-b-c-d, turning about b-c."""
    torsion_heights: Array = field(default_factory=_nothing)
    torsion_folds: Array = field(default_factory=_nothing)
    torsion_minima_degrees: Array = field(default_factory=_nothing)


def minimised(terms: Terms, starts: Array, steps: int, slope: float = 1e-4) -> tuple[Array, Array]:
    """Return structures (s, n, 3) moved downhill together and their energies (s,).

    ``steps`` bounds the iterations; the largest force component left is at most ``slope`` where
    they suffice.
    """

    def value(flat: Array) -> tuple[float, Array]:
        energies, slopes = energy_and_gradient(terms, flat.reshape(starts.shape))
        return float(energies.sum()), slopes.ravel()

    found = minimize(
        value,
        starts.ravel(),
        jac=True,
        method="L-BFGS-B",
        options={"maxiter": steps, "maxfun": 2 * steps, "gtol": slope, "ftol": 1e-14},
    )
    points = found.x.reshape(starts.shape)
    return points, energy_and_gradient(terms, points)[0]


def settled_down(terms: Terms, points: Array) -> tuple[Array, float]:
    """Return one structure (n, 3) at the bottom of its hollow, and its energy.

    Newton steps on the Hessian by differences of gradients, so that soft torsions settle as
    tightly as stiff bonds; for many atoms the slower descent alone.
    """
    exactly = len(points) <= MOST_FOR_NEWTON
    slope = NEWTON_SLOPE if exactly else LAST_SLOPE
    steps = min(LAST_STEPS, MOST_ATOM_STEPS // len(points))
    moved, found = minimised(terms, points[None], steps, slope)
    points, energy = moved[0], float(found[0])
    if not exactly:
        return points, energy
    for _ in range(NEWTON_STEPS):
        step = _newton_step(terms, points)
        tried = points + np.array([1.0, 0.5, 0.1, 0.01])[:, None, None] * step
        energies = energy_and_gradient(terms, tried)[0]
        best = int(np.argmin(energies))
        if energies[best] > energy - 1e-10:
            break
        points, energy = tried[best], float(energies[best])
    return points, energy


def _newton_step(terms: Terms, points: Array) -> Array:
    """Return the step (n, 3) to the bottom of the local quadratic, no atom further than 0.3 Å."""
    size = points.size
    shifts = DIFFERENCE_ANGSTROM * np.eye(size).reshape(size, *points.shape)
    slopes = energy_and_gradient(terms, np.concatenate([points + shifts, points - shifts]))[1]
    hessian = (slopes[:size] - slopes[size:]).reshape(size, size) / (2 * DIFFERENCE_ANGSTROM)
    slope = energy_and_gradient(terms, points[None])[1].ravel()
    values, vectors = np.linalg.eigh((hessian + hessian.T) / 2)
    share = np.where(np.abs(values) > 1e-5, 1.0 / np.maximum(np.abs(values), 1e-3), 0.0)
    step = -(vectors @ (share * (vectors.T @ slope))).reshape(points.shape)
    longest = float(np.linalg.norm(step, axis=1).max())
    return np.asarray(step * min(1.0, 0.3 / max(longest, 1e-12)))


def energy_and_gradient(terms: Terms, points: Array) -> tuple[Array, Array]:
    """Return energies (s,) and gradients (s, n, 3) of structures (s, n, 3)."""
    energies, gradients = _pairs(terms, points)
    for part in (_lines, _volumes, _torsions):
        part(terms, points, energies, gradients)
    return energies, gradients


def _pairs(terms: Terms, points: Array) -> tuple[Array, Array]:
    apart = points[:, :, None, :] - points[:, None, :, :]
    lengths = np.sqrt(np.einsum("sijk,sijk->sij", apart, apart) + 1e-12)
    stretch = lengths - terms.goal_angstrom
    stretch = np.where(terms.contact & (stretch > 0), 0.0, stretch)
    pull = terms.stiffness * stretch
    push = terms.soft / lengths
    energies = 0.5 * (pull * stretch + push).sum(axis=(1, 2))
    slopes = (2.0 * pull - push / lengths) / lengths
    return energies, np.einsum("sij,sijk->sik", slopes, apart)


def _lines(terms: Terms, points: Array, energies: Array, gradients: Array) -> None:
    if not len(terms.lines):
        return
    first, centre, last = terms.lines.T
    lengths = terms.line_lengths[:, :, None]
    bend = (points[:, first] - points[:, centre]) / lengths[:, 0]
    bend = bend + (points[:, last] - points[:, centre]) / lengths[:, 1]
    energies += terms.line_stiffness * np.einsum("smk,smk->s", bend, bend)
    at_first = 2.0 * terms.line_stiffness * bend / lengths[:, 0]
    at_last = 2.0 * terms.line_stiffness * bend / lengths[:, 1]
    _add(gradients, first, at_first)
    _add(gradients, last, at_last)
    _add(gradients, centre, -at_first - at_last)


def _volumes(terms: Terms, points: Array, energies: Array, gradients: Array) -> None:
    if not len(terms.volumes):
        return
    centre, *ends = terms.volumes.T
    lengths = terms.volume_lengths
    a, b, c = (
        (points[:, end] - points[:, centre]) / lengths[:, k : k + 1] for k, end in enumerate(ends)
    )
    normal = _cross(b, c)
    miss = np.einsum("smk,smk->sm", a, normal) - terms.volume_goals
    energies += terms.volume_stiffness * (miss**2).sum(axis=1)
    scale = 2.0 * terms.volume_stiffness * miss[:, :, None]
    slopes = (normal, _cross(c, a), _cross(a, b))
    for k, end in enumerate(ends):
        force = scale * slopes[k] / lengths[:, k : k + 1]
        _add(gradients, end, force)
        _add(gradients, centre, -force)


def _torsions(terms: Terms, points: Array, energies: Array, gradients: Array) -> None:
    """Add the torsions; derivatives after A. Blondel and M. Karplus.

    J. Comput. Chem. 17 (1996) 1132 (recalled from memory).
    """
    if not len(terms.torsions):
        return
    a, b, c, d = terms.torsions.T
    f, g, h = points[:, a] - points[:, b], points[:, b] - points[:, c], points[:, d] - points[:, c]
    left, right = _cross(f, g), _cross(h, g)
    long = np.sqrt(_dot(g, g))
    angle = np.arctan2(_dot(_cross(right, left), g) / long, _dot(left, right))
    turned = terms.torsion_folds * (angle - np.radians(terms.torsion_minima_degrees))
    energies += (0.5 * terms.torsion_heights * (1.0 - np.cos(turned))).sum(axis=1)
    slope = 0.5 * terms.torsion_heights * terms.torsion_folds * np.sin(turned)
    # A small floor keeps the force finite while three atoms pass through one line.
    left_square, right_square = _dot(left, left) + 1e-3, _dot(right, right) + 1e-3
    at_a = -(slope * long / left_square)[:, :, None] * left
    at_d = (slope * long / right_square)[:, :, None] * right
    shared = (slope * _dot(f, g) / (left_square * long))[:, :, None] * left
    shared = shared - (slope * _dot(h, g) / (right_square * long))[:, :, None] * right
    _add(gradients, a, at_a)
    _add(gradients, b, -at_a + shared)
    _add(gradients, c, -shared - at_d)
    _add(gradients, d, at_d)


def _dot(first: Array, second: Array) -> Array:
    return np.asarray(np.einsum("smk,smk->sm", first, second))


def _cross(first: Array, second: Array) -> Array:
    """Return cross products (s, m, 3); several times quicker than numpy's on short arrays."""
    ahead, behind = first[..., [1, 2, 0]], first[..., [2, 0, 1]]
    return ahead * second[..., [2, 0, 1]] - behind * second[..., [1, 2, 0]]


def _add(gradients: Array, atoms: Indices, forces: Array) -> None:
    """Add forces (s, m, 3) to the gradients of the atoms (m,) they act on."""
    np.add.at(gradients.swapaxes(0, 1), atoms, forces.swapaxes(0, 1))
