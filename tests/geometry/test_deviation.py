"""Continuous shape measures and angle indices against published values."""

from itertools import permutations

import numpy as np
import pytest

from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.deviation import shape_deviation, shape_measure, vertices
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.geometry.vectors import best_orthogonal, rotation_about
from shapeshelf.reference.polyhedra import POLYHEDRA

ROUNDED_MEASURE = 0.02
"""Published measures are printed to two or three figures after the point."""

EXACT_MEASURE = 1e-6
"""A measure is one minus a sum near one: rounding of some 1e-14, times a hundred."""

SYMBOLS = [(count, symbol) for count, named in POLYHEDRA.items() for symbol in named]
TURN = rotation_about((1.0, 2.0, -0.5), 77.0)


@pytest.mark.parametrize(("count", "symbol"), SYMBOLS)
def test_a_polyhedron_is_at_no_distance_from_itself(count, symbol):
    """Turned, scaled, shifted and renumbered, each polyhedron measures zero against itself."""
    points = 2.1 * vertices(count, symbol)[::-1] @ TURN.T + 3.0
    nearest, measure = shape_deviation((3.0, 3.0, 3.0), list(points)).measures[0]
    assert nearest == symbol
    assert measure < EXACT_MEASURE


# The point group each polyhedron must have: IUPAC Red Book (2005), table IR-9.2 names the ideal
# bodies; their groups are geometry.
GROUPS = {
    "L-2": "Dinfh",
    "A-2": "C2v",
    "TP-3": "D3h",
    "TPY-3": "C3v",
    "TS-3": "C2v",
    "T-4": "Td",
    "SP-4": "D4h",
    "SPY-4": "C4v",
    "SS-4": "C2v",
    "TBPY-5": "D3h",
    "SPY-5": "C4v",
    "OC-6": "Oh",
    "TPR-6": "D3h",
    "PBPY-7": "D5h",
    "OCF-7": "C3v",
    "TPRS-7": "C2v",
    "CU-8": "Oh",
    "SAPR-8": "D4d",
    "DD-8": "D2d",
    "HBPY-8": "D6h",
    "OCT-8": "D3d",
    "TPRT-8": "D3h",
    "TPRS-8": "C2v",
    "TPRS-9": "D3h",
    "HBPY-9": "D7h",
}


@pytest.mark.parametrize(("count", "symbol"), SYMBOLS)
def test_polyhedra_have_their_point_groups(count, symbol):
    """The tabulated vertices have the symmetry of the body they are named after."""
    points = [(0.0, 0.0, 0.0), *vertices(count, symbol)]
    assert find_symmetry(["Xe", *["F"] * count], points, 1e-4).point_group == GROUPS[symbol]


PUBLISHED = [
    # Exact by geometry; the value 33.33 is also printed by H. Zabrodsky and D. Avnir and by
    # S. Keinan and D. Avnir, Inorg. Chem. 40 (2001) 318 (recalled from memory).
    (4, "SP-4", "T-4", 33.33),
    # S. Alvarez, D. Avnir, M. Llunell and M. Pinsky, New J. Chem. 26 (2002) 996 (recalled).
    (6, "TPR-6", "OC-6", 16.74),
    # S. Alvarez and M. Llunell, J. Chem. Soc., Dalton Trans. 2000, 3288 (recalled).
    (5, "SPY-5", "TBPY-5", 5.38),
    # D. Casanova, M. Llunell, P. Alemany and S. Alvarez, Chem. Eur. J. 11 (2005) 1479 (recalled).
    (8, "SAPR-8", "CU-8", 10.99),
    (8, "DD-8", "SAPR-8", 2.85),
    (8, "DD-8", "CU-8", 7.95),
]


@pytest.mark.parametrize(("count", "first", "second", "published"), PUBLISHED)
def test_distances_between_ideal_shapes(count, first, second, published):
    """Measures of one ideal polyhedron against another as published, the same both ways."""
    forth = shape_measure(vertices(count, first), second)
    back = shape_measure(vertices(count, second), first)
    assert abs(forth - published) < ROUNDED_MEASURE
    assert abs(forth - back) < EXACT_MEASURE


INDICES = [
    # L. Yang, D. R. Powell and R. P. Houser, Dalton Trans. 2007, 955: tetrahedron 1, square 0.
    (4, "T-4", "tau4", 1.0),
    (4, "SP-4", "tau4", 0.0),
    # The same paper prints 0.43 for an ideal see-saw (recalled).
    (4, "SS-4", "tau4", 0.43),
    # A. W. Addison et al., J. Chem. Soc., Dalton Trans. 1984, 1349.
    (5, "TBPY-5", "tau5", 1.0),
    (5, "SPY-5", "tau5", 0.0),
]


@pytest.mark.parametrize(("count", "symbol", "index", "published"), INDICES)
def test_angle_indices(count, symbol, index, published):
    """The indices tau at their ideal ends."""
    found = shape_deviation(np.zeros(3), list(vertices(count, symbol)))
    assert abs(getattr(found, index) - published) < 0.006
    assert getattr(found, "tau5" if index == "tau4" else "tau4") is None


def brute_force(points: np.ndarray, symbol: str) -> float:
    """The measure by trying every order of the vertices, written out from the definition."""
    ideal = vertices(len(points), symbol)
    q, p = (np.vstack([given, np.zeros(3)]) for given in (points, ideal))
    q, p = q - q.mean(0), p - p.mean(0)
    orders = np.array(list(permutations(range(len(points)))))
    best = 0.0
    for chunk in np.array_split(orders, max(1, len(orders) // 5000)):
        covariance = np.einsum("ni,mnj->mij", q[:-1], p[chunk]) + np.outer(q[-1], p[-1])
        overlap = np.einsum("mij,mij->m", best_orthogonal(covariance), covariance)
        best = max(best, float(overlap.max()))
    return 100 * (1 - best**2 / ((q**2).sum() * (p**2).sum()))


@pytest.mark.parametrize("symbol", ["DD-8", "TPRS-8"])
@pytest.mark.parametrize("seed", [1, 2])
def test_the_search_finds_the_best_order(symbol, seed):
    """For eight neighbours, badly distorted, the search equals trying all 40320 orders."""
    noise = np.random.default_rng(seed).normal(size=(8, 3)) * 0.25
    points = vertices(8, "SAPR-8") + noise
    assert abs(shape_measure(points, symbol) - brute_force(points, symbol)) < 1e-3


@pytest.mark.parametrize("count", [5, 6, 7])
def test_the_enumeration_equals_every_order(count):
    """Leaving out orders that a rotation makes equal loses nothing."""
    points = np.random.default_rng(count).normal(size=(count, 3))
    for symbol in POLYHEDRA[count]:
        assert abs(shape_measure(points, symbol) - brute_force(points, symbol)) < EXACT_MEASURE


def test_numbers_without_polyhedra_give_no_measures():
    """Twelve neighbours have no IUPAC polyhedron here: an empty list, no indices."""
    found = shape_deviation(np.zeros(3), list(np.random.default_rng(0).normal(size=(12, 3))))
    assert (found.measures, found.tau4, found.tau5) == ((), None, None)


def test_a_neighbour_on_the_centre_is_refused():
    """Coinciding atoms have no shape."""
    with pytest.raises(AnalysisError, match="coincides with the centre"):
        shape_deviation((0, 0, 0), [(0, 0, 0), (1, 0, 0)])
