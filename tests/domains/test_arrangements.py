"""Arrangements found by minimising repulsion are the polyhedra of the literature."""

import numpy as np
import pytest

from shapeshelf.domains.arrangements import arrangement_name, arrangements

ANGLE_DEGREES = 0.01
"""Arrangements fixed by symmetry are exact to rounding."""
FREE_ANGLE_DEGREES = 1.5
"""Where symmetry leaves an angle free it depends a little on the law of repulsion."""

# Angles from one site to all others, ascending: solid geometry.
FIXED = {
    2: [180.0],
    3: [120.0, 120.0],
    4: [109.4712, 109.4712, 109.4712],
    6: [90.0, 90.0, 90.0, 90.0, 180.0],
}
SITES_ALIKE = {
    # D. L. Kepert, Inorganic Stereochemistry (1982), recalled from memory.
    5: [2, 3],
    7: [2, 5],
    8: [8],
    9: [3, 6],
}


@pytest.mark.parametrize("count", sorted(FIXED))
def test_angles_fixed_by_symmetry(count):
    """Two, three, four and six domains stand at the angles of solid geometry."""
    directions = arrangements(count)[0].directions
    cosines = np.clip(directions[1:] @ directions[0], -1, 1)
    assert np.sort(np.degrees(np.arccos(cosines))) == pytest.approx(FIXED[count], abs=ANGLE_DEGREES)


@pytest.mark.parametrize("count", sorted(SITES_ALIKE))
def test_sites_fall_into_the_known_kinds(count):
    """The sites of five, seven, eight and nine domains are alike as in the known polyhedra."""
    symmetries = arrangements(count)[0].symmetries
    kinds = {frozenset(symmetries[:, site].tolist()) for site in range(count)}
    assert sorted(len(kind) for kind in kinds) == SITES_ALIKE[count]


def test_square_antiprism_of_least_repulsion():
    """Eight points of least repulsion on a sphere: 71.7 degrees along the edge of a square face.

    Thomson's problem for eight charges has its smallest angle at 71.69 degrees (recalled from
    memory of the published tables).
    """
    directions = arrangements(8)[0].directions
    cosines = np.clip(directions[1:] @ directions[0], -1, 1)
    assert np.degrees(np.arccos(cosines)).min() == pytest.approx(71.7, abs=FREE_ANGLE_DEGREES)


def test_seven_domains_have_a_soft_and_a_hard_arrangement():
    """Soft repulsion gives the pentagonal bipyramid, hard repulsion the capped octahedron."""
    assert [a.name for a in arrangements(7)] == ["pentagonal bipyramidal", "capped octahedral"]


@pytest.mark.parametrize(
    ("count", "name", "symmetries"),
    [
        (2, "linear", 2),
        (3, "trigonal planar", 6),
        (4, "tetrahedral", 24),
        (5, "trigonal bipyramidal", 12),
        (6, "octahedral", 48),
        (7, "pentagonal bipyramidal", 20),
        (8, "square antiprismatic", 16),
        (9, "tricapped trigonal prismatic", 12),
    ],
)
def test_names_and_orders_of_symmetry(count, name, symmetries):
    """Each arrangement has its name and as many symmetries as its point group permutes sites."""
    assert arrangement_name(count) == name
    assert len(arrangements(count)[0].symmetries) == symmetries
