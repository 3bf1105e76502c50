import math

import pytest

from shapeshelf.pages.shape_notes import ideal_degrees, notations, origins, usual_shapes
from shapeshelf.reference.lone_pairs import LEAVINGS
from shapeshelf.reference.shapes import SHAPES

TETRAHEDRAL_DEGREES = math.degrees(math.acos(-1 / 3))
"""Two vertices of a regular tetrahedron seen from its middle."""
ROUNDED_DEGREES = 0.051
"""Ideal angles are printed to a tenth."""


@pytest.mark.parametrize(
    ("shape", "degrees"),
    [
        ("linear", (180.0,)),
        ("tetrahedral", (TETRAHEDRAL_DEGREES,)),
        ("trigonal pyramidal", (TETRAHEDRAL_DEGREES,)),
        ("bent", (TETRAHEDRAL_DEGREES, 120.0)),
        ("see-saw", (90.0, 120.0, 180.0)),
        ("T-shaped", (90.0, 180.0)),
        ("square planar", (90.0, 180.0)),
        ("pentagonal planar", (72.0, 144.0)),
    ],
)
def test_ideal_angles_follow_from_the_arrangement(shape: str, degrees: tuple[float, ...]) -> None:
    """Geometry of the regular polyhedra with the lone pairs' vertices left out."""
    assert ideal_degrees(shape) == pytest.approx(degrees, abs=ROUNDED_DEGREES)


@pytest.mark.parametrize(
    ("shape", "expected"),
    [("see-saw", ("AX4E",)), ("T-shaped", ("AX3E2", "AX3E3")), ("bent", ("AX2E", "AX2E2"))],
)
def test_notations_count_neighbours_and_lone_pairs(shape: str, expected: tuple[str, ...]) -> None:
    """R. J. Gillespie and I. Hargittai (1991), recalled from memory."""
    assert notations(shape) == expected


def test_every_way_with_lone_pairs_says_what_they_do() -> None:
    """And every way leads to a shape of the table."""
    assert set(LEAVINGS) <= set(SHAPES)
    ways = [way for key in LEAVINGS for way in origins(SHAPES[key].shape)]
    assert all(way.effect for way in ways if way.lone_pairs)


def test_usual_shapes_of_five_domains() -> None:
    """A trigonal bipyramid with none to three lone pairs on its equator."""
    usual = usual_shapes()
    assert [usual[5 - pairs, pairs] for pairs in range(4)] == [
        ("trigonal bipyramidal",), ("see-saw",), ("T-shaped",), ("linear",),
    ]  # fmt: skip
