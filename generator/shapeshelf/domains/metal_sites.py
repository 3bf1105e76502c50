"""Ligands on the vertices of a named polyhedron: every distinct way, ranked by simple preferences.

S1  Donors of one chelate ring stand next to each other.
S2  The multiply bonded ligand stands at the apex of a square pyramid, in the equator of a
    trigonal bipyramid and on the axis of a pentagonal or hexagonal one.
S3  Two multiply bonded ligands stand next to each other at a d0 octahedron and opposite each
    other at a d2 one.
S4  Otherwise charged ligands keep apart.

S2 to S4 after N. N. Greenwood and A. Earnshaw, Chemistry of the Elements, 2nd ed. (1997),
recalled from memory; where they leave isomers equal, the drawing does not say which one it is.
"""

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import combinations

import numpy as np
import numpy.typing as npt

from shapeshelf.domains.directions import angle_degrees
from shapeshelf.domains.graph import BondGraph
from shapeshelf.domains.metals import Donor, MetalCentre
from shapeshelf.domains.model import Placement
from shapeshelf.reference.metal_shapes import SHAPE_NAMES
from shapeshelf.reference.polyhedra import POLYHEDRA
from shapeshelf.structure.molecule import Molecule, Vector

KEPT = 6
MOST_PAINTINGS = 3000
"""Ways to lay the ligands that are looked at; nine unlike ones would have 362880."""
NEXT_DEGREES = 110.0
"""Vertices closer than this count as next to each other."""
OPPOSITE_DEGREES = 160.0


@dataclass(frozen=True, slots=True)
class Weights:
    """Cost of each broken preference, S1 far above the rest; only the order matters."""

    chelate: float = 10.0
    site: float = 1.0
    multiple: float = 1.0
    charged: float = 0.1


WEIGHTS = Weights()
AXIAL = {"PBPY-7": 2, "HBPY-8": 2, "SPY-5": 1}
"""How many of a polyhedron's vertices, the first in the table, are its axis or apex."""
SITE_NAMES = {
    "TBPY-5": ("ax", "eq", 2),
    "PBPY-7": ("ax", "eq", 2),
    "HBPY-8": ("ax", "eq", 2),
    "SPY-5": ("ap", "bas", 1),
}


def place_on(
    molecule: Molecule, graph: BondGraph, centre: MetalCentre, symbol: str
) -> tuple[Placement, ...]:
    """Return placements of a metal's neighbours on the polyhedron ``symbol``, best first."""
    vertices = directions_of(centre.coordination, symbol)
    colours = [molecule.classes[atom] for atom in centre.neighbours]
    bitten = _chelated_pairs(graph, centre)
    ways = []
    for way in _distinct_ways(vertices, colours, bool(bitten)):
        energy = _energy(vertices, way, centre, bitten, symbol)
        ways.append((energy, way))
    ways.sort(key=lambda item: (item[0], item[1]))
    return tuple(_placement(vertices, way, symbol, energy) for energy, way in ways[:KEPT])


def directions_of(count: int, symbol: str) -> tuple[Vector, ...]:
    """Return the unit vectors of the vertices of a polyhedron."""
    vectors = []
    for polar, azimuth in POLYHEDRA[count][symbol]:
        theta, phi = math.radians(polar), math.radians(azimuth)
        vectors.append(
            (
                math.sin(theta) * math.cos(phi),
                math.sin(theta) * math.sin(phi),
                math.cos(theta),
            )
        )
    return tuple(vectors)


def site_names(count: int, symbol: str) -> tuple[str, ...]:
    """Return the name of every vertex, empty where the polyhedron needs none."""
    if symbol not in SITE_NAMES:
        return ("",) * count
    first, rest, number = SITE_NAMES[symbol]
    return (first,) * number + (rest,) * (count - number)


def _placement(
    vertices: Sequence[Vector], way: tuple[int, ...], symbol: str, energy: float
) -> Placement:
    """``way`` says at which vertex each neighbour stands."""
    directions = tuple(vertices[site] for site in way)
    names = site_names(len(vertices), symbol)
    return Placement(
        SHAPE_NAMES[symbol],
        symbol,
        directions,
        directions,
        tuple(names[site] for site in way),
        energy,
    )


def _chelated_pairs(graph: BondGraph, centre: MetalCentre) -> list[tuple[int, int]]:
    """Return the pairs of neighbours, by position, that share a small ring with the metal."""
    return [
        (first, second)
        for first, second in combinations(range(centre.coordination), 2)
        if any(
            {centre.atom, centre.neighbours[first], centre.neighbours[second]} <= set(ring)
            for ring in graph.rings
        )
    ]


def _distinct_ways(
    vertices: Sequence[Vector], colours: list[int], chelated: bool
) -> Iterator[tuple[int, ...]]:
    """Yield the vertex of each neighbour, for every way that no symmetry makes the same."""
    # Chelating neighbours of one class are not interchangeable: who holds whom matters.
    marks = list(range(len(colours))) if chelated else colours
    symmetries = _symmetries(vertices)
    seen: set[tuple[int, ...]] = set()
    for looked_at, painting in enumerate(_paintings(tuple(sorted(marks)))):
        if looked_at >= MOST_PAINTINGS:
            return
        if painting in seen:
            continue
        seen.update(tuple(painting[k] for k in row) for row in symmetries)
        free = {mark: [k for k, m in enumerate(painting) if m == mark] for mark in set(marks)}
        yield tuple(free[mark].pop(0) for mark in marks)


def _symmetries(vertices: Sequence[Vector]) -> list[tuple[int, ...]]:
    """Return every permutation of the vertices that keeps all their distances."""
    points = np.array(vertices)
    cosines: npt.NDArray[np.float64] = points @ points.T
    partial: list[tuple[int, ...]] = [()]
    for vertex in range(len(points)):
        partial = [
            (*images, image)
            for images in partial
            for image in range(len(points))
            if image not in images
            and all(
                abs(cosines[image, images[k]] - cosines[vertex, k]) < 1e-3 for k in range(vertex)
            )
        ]
    return partial


def _paintings(marks: tuple[int, ...]) -> Iterator[tuple[int, ...]]:
    if not marks:
        yield ()
    for mark in sorted(set(marks)):
        index = marks.index(mark)
        for rest in _paintings(marks[:index] + marks[index + 1 :]):
            yield (mark, *rest)


def _energy(
    vertices: Sequence[Vector],
    way: tuple[int, ...],
    centre: MetalCentre,
    bitten: list[tuple[int, int]],
    symbol: str,
) -> float:
    angles = {
        (i, j): angle_degrees(vertices[way[i]], vertices[way[j]])
        for i, j in combinations(range(len(way)), 2)
    }
    energy = WEIGHTS.chelate * sum(angles[pair] > NEXT_DEGREES for pair in bitten)
    multiple = [k for k, donor in enumerate(centre.donors) if donor is Donor.MULTIPLE]
    energy += WEIGHTS.site * sum(_is_misplaced(way[k], symbol) for k in multiple)
    charged = [k for k, donor in enumerate(centre.donors) if donor is Donor.HALIDE]
    for pair, angle in angles.items():
        if set(pair) <= set(multiple) and symbol == "OC-6":
            together = angle < OPPOSITE_DEGREES
            energy += WEIGHTS.multiple * (together is (centre.d_electrons == 2))
        if set(pair) <= set(charged):
            energy += WEIGHTS.charged * (1 + math.cos(math.radians(angle)))
    return round(energy, 6)


def _is_misplaced(site: int, symbol: str) -> bool:
    """S2."""
    if symbol == "TBPY-5":
        return site < 2
    return symbol in AXIAL and site >= AXIAL[symbol]
