"""Rings in which single and double bonds alternate and may change places."""

from collections.abc import Iterator

from shapeshelf.domains.graph import BondGraph

RING_SIZES = (6, 10, 14, 18)
"""4n + 2 atoms with one pi electron each; rings of 4n keep their bonds where they are."""
MOST_STEPS = 4000
"""Of one search; a net of rings so wide that it takes more is left as drawn."""


def ring_shifts(
    graph: BondGraph, orders: tuple[int, ...], inside: set[int]
) -> Iterator[tuple[int, ...]]:
    """Yield the bonds round each alternating ring of 4n + 2, a single bond first."""
    seen: set[frozenset[int]] = set()
    steps = 0
    for number in sorted(graph.ring_bonds):
        bond = graph.bonds[number]
        if orders[number] != 2 or not {bond.begin, bond.end} <= inside:
            continue
        # The way goes out from one end of a double bond and comes home to the other.
        stack: list[tuple[int, tuple[int, ...], frozenset[int]]] = [
            (bond.end, (), frozenset((bond.begin, bond.end)))
        ]
        while stack:
            steps += 1
            if steps > MOST_STEPS:
                return
            atom, way, visited = stack.pop()
            wanted = 1 + len(way) % 2
            for link in graph.links[atom]:
                if orders[link.bond] != wanted or link.bond not in graph.ring_bonds:
                    continue
                if link.atom == bond.begin and len(way) % 2 == 0 and len(way) > 0:
                    ring = (*way, link.bond, number)
                    if len(ring) in RING_SIZES and frozenset(ring) not in seen:
                        seen.add(frozenset(ring))
                        yield ring
                elif (
                    link.atom in inside
                    and link.atom not in visited
                    and len(way) < RING_SIZES[-1] - 2
                ):
                    stack.append((link.atom, (*way, link.bond), visited | {link.atom}))
