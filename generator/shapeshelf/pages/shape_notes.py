"""How each shape comes about: from which arrangement, its ideal angles, what lone pairs do."""

import math
from collections import Counter
from dataclasses import dataclass
from itertools import combinations

from markupsafe import Markup

from shapeshelf.pages.typesetting import notation_markup, number_text
from shapeshelf.reference.lone_pairs import LEAVINGS
from shapeshelf.reference.polyhedra import POLYHEDRA, Vertex
from shapeshelf.reference.shapes import SHAPES


@dataclass(frozen=True, slots=True)
class OriginView:
    """One way to a shape: so many neighbours and lone pairs in one arrangement."""

    arrangement: str
    neighbours: int
    lone_pairs: int
    notation: Markup
    angles: tuple[tuple[str, int], ...]
    """(``90°``, how many), the widest first."""
    degrees: tuple[float, ...]
    effect: str


def origins(shape: str) -> tuple[OriginView, ...]:
    """Return the ways to a shape, fewest lone pairs first; none for one that only metals show."""
    keys = [key for key in LEAVINGS if SHAPES[key].shape == shape]
    return tuple(sorted((_origin(key) for key in keys), key=lambda one: one.lone_pairs))


def notations(shape: str) -> tuple[str, ...]:
    """Return the AXE notations that lead to a shape: ``AX4E`` for see-saw."""
    return tuple(_notation(one.neighbours, one.lone_pairs) for one in origins(shape))


def usual_shapes() -> dict[tuple[int, int], tuple[str, ...]]:
    """Return the shapes that a number of neighbours and of lone pairs leads to."""
    found: dict[tuple[int, int], dict[str, None]] = {}
    for key in LEAVINGS:
        one = _origin(key)
        found.setdefault((one.neighbours, one.lone_pairs), {})[SHAPES[key].shape] = None
    return {key: tuple(shapes) for key, shapes in found.items()}


def ideal_degrees(shape: str) -> tuple[float, ...]:
    """Return every ideal angle of a shape in degrees, each once, to a tenth.

    From the arrangements that lead to it; for a shape that lone pairs do not lead to, from the
    polyhedron of its symbol where the table of polyhedra has one by that name.
    """
    found = {degrees for one in origins(shape) for degrees in one.degrees}
    return tuple(sorted(found))


def _origin(key: tuple[str, str]) -> OriginView:
    leaving = LEAVINGS[key]
    vertices = _vertices(leaving.symbol)
    kept = [v for index, v in enumerate(vertices) if index not in leaving.vertices]
    counted = Counter(_between(a, b) for a, b in combinations(kept, 2))
    widest = sorted(counted, reverse=True)
    pairs = len(leaving.vertices)
    return OriginView(
        arrangement=key[0],
        neighbours=len(kept),
        lone_pairs=pairs,
        notation=notation_markup(_notation(len(kept), pairs)),
        angles=tuple((_text(degrees), counted[degrees]) for degrees in widest),
        degrees=tuple(widest),
        effect=leaving.effect,
    )


def _vertices(symbol: str) -> tuple[Vertex, ...]:
    return next(kinds[symbol] for kinds in POLYHEDRA.values() if symbol in kinds)


def _between(first: Vertex, second: Vertex) -> float:
    """Return the angle between two vertices in degrees, to a tenth."""
    (polar_a, around_a), (polar_b, around_b) = (
        (math.radians(polar), math.radians(around)) for polar, around in (first, second)
    )
    cosine = math.cos(polar_a) * math.cos(polar_b) + math.sin(polar_a) * math.sin(
        polar_b
    ) * math.cos(around_a - around_b)
    return round(math.degrees(math.acos(max(-1.0, min(1.0, cosine)))), 1)


def _notation(neighbours: int, lone_pairs: int) -> str:
    pairs = "" if lone_pairs == 0 else "E" if lone_pairs == 1 else f"E{lone_pairs}"
    return f"AX{neighbours}{pairs}"


def _text(degrees: float) -> str:
    return number_text(degrees, 1).removesuffix(".0") + "°"
