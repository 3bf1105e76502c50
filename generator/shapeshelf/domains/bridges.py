"""Three-centre bonds: which bonds of a drawing are half of one.

C5  A hydrogen with two bonds shares them: B-H-B holds one pair, F-H-F two; so does a carbon
    with more bonds than electrons to atoms of groups 1 to 13. Either bond counts one half.
"""

from shapeshelf.domains.graph import BondGraph, Link
from shapeshelf.reference.elements import ELEMENTS

HALF = 0.5


def half_bonds(graph: BondGraph) -> frozenset[int]:
    """Return the numbers of all bonds that are half of a three-centre bond (C5)."""
    return frozenset(
        link.bond for atom in range(len(graph.elements)) for link in _halves_at(graph, atom)
    )


def is_bridge(graph: BondGraph, atom: int) -> bool:
    """Tell whether ``atom`` is the middle of a three-centre bond."""
    return bool(_halves_at(graph, atom))


def _halves_at(graph: BondGraph, atom: int) -> tuple[Link, ...]:
    if graph.elements[atom] == "H":
        return graph.links[atom] if graph.degree(atom) == 2 else ()
    if graph.elements[atom] != "C":
        return ()
    poor = tuple(link for link in graph.links[atom] if _is_poor(graph, link.atom))
    orders = sum(graph.bonds[link.bond].order for link in graph.links[atom])
    plain = not any(graph.bonds[link.bond].dative for link in graph.links[atom])
    return poor if plain and orders == 5 and len(poor) == 2 else ()


def _is_poor(graph: BondGraph, atom: int) -> bool:
    group = ELEMENTS[graph.elements[atom]].group
    return graph.elements[atom] != "H" and (group is None or group <= 13)
