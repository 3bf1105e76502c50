"""How far the neighbours of a centre are from each ideal polyhedron.

The continuous shape measure of M. Pinsky and D. Avnir, Inorg. Chem. 37 (1998) 5575: with the
structure q (centre and neighbours, taken from their centroid) and the polyhedron p likewise,

    S = 100 min  sum |q_k - s R p_k|^2 / sum |q_k|^2
             R,s,order

over rotations R, scale s and the order of the vertices; the central atom stays the centre.
S is 0 for the polyhedron itself and 100 at most. At the best scale
S = 100 (1 - (sum q_k . R p_k)^2 / (sum |q_k|^2 sum |p_k|^2)).

Up to seven neighbours every order of the vertices is tried that no rotation of the polyhedron
makes equal to another. Beyond, the best order is looked for from many orientations in turns:
the order that suits the rotation (Hungarian method), the rotation that suits the order.
"""

from collections.abc import Sequence
from functools import cache
from itertools import permutations

import numpy as np
from numpy.typing import ArrayLike
from scipy.optimize import linear_sum_assignment

from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.group_names import element
from shapeshelf.geometry.model import ShapeDeviation
from shapeshelf.geometry.operations import Indices
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.geometry.vectors import Array, angle_degrees, best_orthogonal
from shapeshelf.reference.polyhedra import POLYHEDRA

_FULL_ENUMERATION = 7
_POLYHEDRON_TOLERANCE = 1e-3
_ROUNDS = 6


def shape_deviation(centre_xyz: ArrayLike, neighbours_xyz: Sequence[ArrayLike]) -> ShapeDeviation:
    """Return the shape measures, nearest polyhedron first, and the angle indices tau.

    ``centre_xyz`` (3,) and ``neighbours_xyz`` (n, 3) in one unit. ``measures`` is empty where
    IUPAC has no polyhedron of n vertices. Raises AnalysisError where atoms coincide.
    """
    centre = np.asarray(centre_xyz, float)
    neighbours = np.asarray(neighbours_xyz, float).reshape(-1, 3) - centre
    if len(neighbours) and np.linalg.norm(neighbours, axis=1).min() < 1e-6:
        raise AnalysisError("shape measure", "a neighbour coincides with the centre")
    symbols = POLYHEDRA.get(len(neighbours), {})
    measures = [(symbol, shape_measure(neighbours, symbol)) for symbol in symbols]
    return ShapeDeviation(
        measures=tuple(sorted(measures, key=lambda item: (item[1], item[0]))),
        tau4=_tau4(neighbours) if len(neighbours) == 4 else None,
        tau5=_tau5(neighbours) if len(neighbours) == 5 else None,
    )


def shape_measure(neighbours: ArrayLike, symbol: str) -> float:
    """Return the continuous shape measure of ``neighbours`` (n, 3), taken from the centre."""
    given = np.asarray(neighbours, float)
    ideal = vertices(len(given), symbol)
    structure, model = _from_centroid(given), _from_centroid(ideal)
    if len(given) <= _FULL_ENUMERATION:
        overlap = _overlaps(structure, model, _distinct_orders(len(given), symbol)).max()
    else:
        overlap = _searched_overlap(structure, model)
    share = overlap**2 / ((structure**2).sum() * (model**2).sum())
    return max(0.0, 100.0 * (1.0 - float(share)))


@cache
def vertices(count: int, symbol: str) -> Array:
    """Return the unit vectors (count, 3) to the vertices of a polyhedron."""
    polar, azimuth = np.radians(np.array(POLYHEDRA[count][symbol])).T
    points = [np.sin(polar) * np.cos(azimuth), np.sin(polar) * np.sin(azimuth), np.cos(polar)]
    return np.array(points).T


def _from_centroid(neighbours: Array) -> Array:
    """Return neighbours (n, 3) and, last, their centre, taken from the centroid of all."""
    points = np.vstack([neighbours, np.zeros(3)])
    return np.asarray(points - points.mean(axis=0))


def _overlaps(structure: Array, model: Array, orders: Indices) -> Array:
    """Return the largest sum q . R p over rotations for each order of the vertices (m,)."""
    covariance = np.einsum("ni,mnj->mij", structure[:-1], model[orders])
    covariance += np.multiply.outer(structure[-1], model[-1])
    left, values, right = np.linalg.svd(covariance)
    sign = np.sign(np.linalg.det(left) * np.linalg.det(right))
    return np.asarray(values[:, 0] + values[:, 1] + sign * values[:, 2])


@cache
def _distinct_orders(count: int, symbol: str) -> Indices:
    """Return the orders (m, count) of the vertices that no rotation turns into one another."""
    found = find_symmetry(
        ["He", *["H"] * count], [(0.0, 0.0, 0.0), *vertices(count, symbol)], _POLYHEDRON_TOLERANCE
    )
    turns = [
        tuple(image - 1 for image in operation.permutation[1:])
        for operation in found.operations
        if element(np.array(operation.matrix)).proper
    ]
    orders: list[tuple[int, ...]] = []
    seen: set[tuple[int, ...]] = set()
    for order in permutations(range(count)):
        if order not in seen:
            orders.append(order)
            seen.update(tuple(turn[vertex] for vertex in order) for turn in turns)
    return np.array(orders)


def _searched_overlap(structure: Array, model: Array) -> float:
    """Return the best overlap found from many orientations of the polyhedron."""
    orders = _best_orders(structure, model, _starting_rotations(structure, model))
    for _ in range(_ROUNDS):
        covariance = np.einsum("ni,mnj->mij", structure[:-1], model[orders])
        covariance += np.multiply.outer(structure[-1], model[-1])
        better = _best_orders(structure, model, best_orthogonal(covariance))
        if np.array_equal(better, orders):
            break
        orders = better
    return float(_overlaps(structure, model, orders).max())


def _starting_rotations(structure: Array, model: Array) -> Array:
    """Return rotations (m, 3, 3) that bring two vertices near three pairs of neighbours each."""
    count = len(structure) - 1
    pairs = [(a, b) for a in range(count) for b in range(count) if a != b]
    ideal = model[:-1] - model[-1]
    actual = structure[:-1] - structure[-1]
    rotations = []
    for a, b in ((0, 1), (2, 3), (4, 5), (6, 7)):
        goal = np.stack([actual[a], actual[b]])
        covariance = np.array([goal.T @ ideal[list(pair)] for pair in pairs])
        rotations.append(best_orthogonal(covariance))
    return np.concatenate(rotations)


def _best_orders(structure: Array, model: Array, rotations: Array) -> Indices:
    """Return the distinct best orders (m, n) of the vertices, one for each rotation."""
    turned = np.einsum("mij,nj->mni", rotations, model[:-1])
    gains = np.einsum("ni,mki->mnk", structure[:-1], turned)
    orders = [linear_sum_assignment(gain, maximize=True)[1] for gain in gains]
    return np.unique(np.array(orders), axis=0)


def _tau4(neighbours: Array) -> float:
    """Return (360 - alpha - beta)/141 of the two largest angles.

    L. Yang, D. R. Powell and R. P. Houser, Dalton Trans. 2007, 955: 0 square, 1 tetrahedral.
    """
    largest, second = _largest_angles(neighbours)
    return (360.0 - largest - second) / 141.0


def _tau5(neighbours: Array) -> float:
    """Return (beta - alpha)/60 of the two largest angles.

    A. W. Addison et al., J. Chem. Soc., Dalton Trans. 1984, 1349: 0 square pyramid, 1 trigonal
    bipyramid.
    """
    largest, second = _largest_angles(neighbours)
    return (largest - second) / 60.0


def _largest_angles(neighbours: Array) -> tuple[float, float]:
    angles = sorted(
        angle_degrees(neighbours[a], np.zeros(3), neighbours[b])
        for a in range(len(neighbours))
        for b in range(a)
    )
    return angles[-1], angles[-2]
