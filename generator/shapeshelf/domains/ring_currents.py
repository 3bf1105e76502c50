"""Rings in which single and double bonds alternate and may change places."""

from collections.abc import Iterator

from shapeshelf.domains.graph import BondGraph

RING_SIZES = (6, 10, 14, 18)
"""4n + 2 atoms with one pi electron each; rings of 4n keep their bonds where they are."""


class SearchBudget:
    """Counts the steps of all searches in one pi system, so that a wide net of rings ends."""

    def __init__(self, steps: int) -> None:
        self.left = steps

    def spend(self) -> bool:
        """Take one step; tell whether there was one left."""
        self.left -= 1
        return self.left > 0


def ring_shifts(
    graph: BondGraph, orders: tuple[int, ...], inside: set[int], budget: SearchBudget
) -> Iterator[tuple[int, ...]]:
    """Yield the bonds round each alternating ring of 4n + 2, a single bond first.

    Where all rings are hexagons, shifts of single hexagons reach every drawing.
    """
    small = [ring for ring in graph.rings if inside.issuperset(ring)]
    if small and all(len(ring) == 6 for ring in small):
        yield from _hexagons(graph, orders, small, budget)
        return
    seen: set[frozenset[int]] = set()
    for number in sorted(graph.ring_bonds):
        bond = graph.bonds[number]
        if orders[number] != 2 or not inside.issuperset((bond.begin, bond.end)):
            continue
        for way in _ways_home(graph, orders, inside, number, budget):
            if frozenset(way) not in seen:
                seen.add(frozenset(way))
                yield way


def _hexagons(
    graph: BondGraph,
    orders: tuple[int, ...],
    rings: list[tuple[int, ...]],
    budget: SearchBudget,
) -> Iterator[tuple[int, ...]]:
    for ring in rings:
        budget.spend()
        bonds = [_bond_between(graph, ring[k - 1], ring[k]) for k in range(len(ring))]
        round_ring = tuple(orders[bond] for bond in bonds)
        if round_ring == (1, 2) * 3:
            yield tuple(bonds)
        elif round_ring == (2, 1) * 3:
            yield (*bonds[1:], bonds[0])


def _bond_between(graph: BondGraph, first: int, second: int) -> int:
    return next(link.bond for link in graph.links[first] if link.atom == second)


def _ways_home(
    graph: BondGraph,
    orders: tuple[int, ...],
    inside: set[int],
    number: int,
    budget: SearchBudget,
) -> Iterator[tuple[int, ...]]:
    """Go out from one end of a double bond, alternating, and come home to the other."""
    home, start = graph.bonds[number].begin, graph.bonds[number].end
    stack: list[tuple[int, tuple[int, ...], tuple[int, ...]]] = [(start, (), (home, start))]
    while stack and budget.spend():
        atom, way, visited = stack.pop()
        wanted = 1 + len(way) % 2
        for link in graph.links[atom]:
            if orders[link.bond] != wanted or link.bond not in graph.ring_bonds:
                continue
            if link.atom == home and wanted == 1 and way:
                if len(way) + 2 in RING_SIZES:
                    yield (*way, link.bond, number)
            elif link.atom in inside and link.atom not in visited and len(way) < RING_SIZES[-1] - 2:
                stack.append((link.atom, (*way, link.bond), (*visited, link.atom)))
