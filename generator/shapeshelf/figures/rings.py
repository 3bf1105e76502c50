"""Rings of a molecule, as far as a drawing asks: on which side of a double bond its ring lies."""

from collections import deque
from collections.abc import Mapping

from shapeshelf.structure.molecule import Molecule

LARGEST_RING = 7
"""In a larger ring the inner line of a double bond no longer points at anything."""


def smallest_rings(molecule: Molecule) -> Mapping[frozenset[int], tuple[int, ...]]:
    """Return for each bond that lies in a ring the atoms of its smallest one, at most seven."""
    found = {}
    for bond in molecule.bonds:
        ring = _shortest_way_round(molecule, bond.begin, bond.end)
        if ring:
            found[frozenset((bond.begin, bond.end))] = ring
    return found


def _shortest_way_round(molecule: Molecule, begin: int, end: int) -> tuple[int, ...]:
    """Return the shortest path from ``begin`` to ``end`` without their bond, empty for none."""
    ways: deque[tuple[int, ...]] = deque([(begin,)])
    seen = {begin}
    while ways:
        way = ways.popleft()
        for other in molecule.neighbours(way[-1]):
            if other == end and len(way) > 1:
                return (*way, end)
            if other not in seen and other != end and len(way) < LARGEST_RING - 1:
                seen.add(other)
                ways.append((*way, other))
    return ()
