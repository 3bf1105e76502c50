"""Which atoms share pi electrons: sets within which a drawing can change, independent of others.

Two atoms belong together where a multiple bond or a ring of pi atoms joins them, or where free
electrons (or a vacancy) can pass along X-Y=Z. Keeping the sets apart keeps the number of
drawings small: two nitro groups have 2 + 2 of them, not 2 x 2.
"""

from shapeshelf.domains.electrons import Drawing, lacks_pair
from shapeshelf.domains.graph import BondGraph
from shapeshelf.reference.elements import ELEMENTS


def pi_systems(graph: BondGraph, drawing: Drawing) -> list[tuple[int, ...]]:
    """Return the pi systems of a drawing, each as its atoms in order."""
    roots = list(range(len(graph.elements)))
    pi_atoms = _pi_atoms(graph, drawing)
    for number, bond in enumerate(graph.bonds):
        in_ring = number in graph.ring_bonds and {bond.begin, bond.end} <= pi_atoms
        if drawing.orders[number] > 1 or in_ring:
            _join(roots, bond.begin, bond.end)
    _join_along_charges(graph, drawing, roots, pi_atoms)
    members: dict[int, list[int]] = {}
    for atom in range(len(roots)):
        members.setdefault(_root(roots, atom), []).append(atom)
    return [tuple(atoms) for atoms in members.values() if len(atoms) > 1]


def _pi_atoms(graph: BondGraph, drawing: Drawing) -> set[int]:
    return {
        atom
        for number, bond in enumerate(graph.bonds)
        if drawing.orders[number] > 1
        for atom in (bond.begin, bond.end)
    }


def _join_along_charges(
    graph: BondGraph, drawing: Drawing, roots: list[int], pi_atoms: set[int]
) -> None:
    """Follow every place where free electrons, a vacancy or a positive charge can go."""
    waiting = [
        (atom, kind)
        for atom in range(len(graph.elements))
        for kind in _kinds(graph, drawing, atom, pi_atoms)
    ]
    seen = set(waiting)
    while waiting:
        start, kind = waiting.pop()
        for middle, end in _ways(graph, drawing, start, kind, pi_atoms):
            _join(roots, start, middle)
            _join(roots, middle, end)
            if (end, kind) not in seen:
                seen.add((end, kind))
                waiting.append((end, kind))


def _kinds(graph: BondGraph, drawing: Drawing, atom: int, pi_atoms: set[int]) -> list[str]:
    """Say what can set out from an atom: ``electrons`` or a ``hole``."""
    if graph.metals[atom]:
        return []
    free, charge = drawing.free[atom], drawing.charges[atom]
    vacant = lacks_pair(graph, drawing, atom) and (ELEMENTS[graph.elements[atom]].group or 0) > 13
    kinds = []
    if vacant or free % 2 or (free >= 2 and charge < 0):
        kinds.append("electrons")
    if vacant or (charge > 0 and (atom in pi_atoms or ELEMENTS[graph.elements[atom]].period > 2)):
        kinds.append("hole")
    return kinds


def _ways(
    graph: BondGraph, drawing: Drawing, start: int, kind: str, pi_atoms: set[int]
) -> list[tuple[int, int]]:
    """Return (middle, end) of every way out of ``start``; middle is end for a direct step."""
    ways = []
    for near in graph.links[start]:
        if graph.bonds[near.bond].dative:
            continue
        if kind == "hole" and drawing.free[near.atom] >= 2:
            ways.append((near.atom, near.atom))
        for far in graph.links[near.atom]:
            if far.atom == start or near.atom not in pi_atoms or graph.metals[far.atom]:
                continue
            ring = far.bond in graph.ring_bonds and far.atom in pi_atoms
            pi_first = drawing.orders[near.bond] > 1 or near.bond in graph.ring_bonds
            if kind == "electrons" and (drawing.orders[far.bond] > 1 or ring):
                ways.append((near.atom, far.atom))
            if kind == "hole" and pi_first and drawing.free[far.atom] >= 2:
                ways.append((near.atom, far.atom))
    return ways


def _join(roots: list[int], first: int, second: int) -> None:
    roots[_root(roots, first)] = _root(roots, second)


def _root(roots: list[int], atom: int) -> int:
    while roots[atom] != atom:
        roots[atom] = roots[roots[atom]]
        atom = roots[atom]
    return atom
