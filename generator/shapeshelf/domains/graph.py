"""The bond graph of a molecule, laid out once for quick walking."""

from collections import deque
from dataclasses import dataclass
from functools import lru_cache

from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Bond, Molecule

LARGEST_RING = 9
"""Larger rings bring no planarity of their own."""


@dataclass(frozen=True, slots=True)
class Link:
    """One bond as seen from one of its atoms."""

    atom: int
    """The neighbour."""
    bond: int
    """The number of the bond in the molecule."""


@dataclass(frozen=True, slots=True)
class BondGraph:
    """Who is bonded to whom, and which small rings there are."""

    elements: tuple[str, ...]
    bonds: tuple[Bond, ...]
    links: tuple[tuple[Link, ...], ...]
    """One an atom, in bond order of the file."""
    metals: tuple[bool, ...]
    """Whether the atom's d or f electrons set it apart: groups 3 to 12 and the f block."""
    rings: tuple[tuple[int, ...], ...]
    """A shortest ring through each bond, up to nine atoms, each ring once."""
    ring_bonds: frozenset[int]
    """Bonds that lie in a ring of any size."""

    def neighbours(self, atom: int) -> tuple[int, ...]:
        """Return the atoms bonded to ``atom``."""
        return tuple(link.atom for link in self.links[atom])

    def degree(self, atom: int) -> int:
        """Return the number of neighbours."""
        return len(self.links[atom])


def is_d_or_f_block(element: str) -> bool:
    """Tell whether ``element`` stands in groups 3 to 12 or in the f block."""
    group = ELEMENTS[element].group
    return group is None or 3 <= group <= 12


def valence_electrons(element: str) -> int:
    """Return the valence electrons of a neutral main-group atom."""
    if element == "He":
        return 2
    group = ELEMENTS[element].group or 0
    return group if group <= 2 else group - 10


@lru_cache(maxsize=16)
def graph_of(molecule: Molecule) -> BondGraph:
    """Return the bond graph of ``molecule``."""
    links: list[list[Link]] = [[] for _ in molecule.atoms]
    for number, bond in enumerate(molecule.bonds):
        links[bond.begin].append(Link(bond.end, number))
        links[bond.end].append(Link(bond.begin, number))
    elements = tuple(atom.element for atom in molecule.atoms)
    rings, ring_bonds = _rings(molecule.bonds, links)
    return BondGraph(
        elements,
        molecule.bonds,
        tuple(tuple(row) for row in links),
        tuple(is_d_or_f_block(element) for element in elements),
        rings,
        ring_bonds,
    )


def _rings(
    bonds: tuple[Bond, ...], links: list[list[Link]]
) -> tuple[tuple[tuple[int, ...], ...], frozenset[int]]:
    found: dict[frozenset[int], tuple[int, ...]] = {}
    ring_bonds = set()
    for number, bond in enumerate(bonds):
        if min(len(links[bond.begin]), len(links[bond.end])) < 2:
            continue
        ring = _shortest_way(links, bond.begin, bond.end, number)
        if ring:
            ring_bonds.add(number)
        if 0 < len(ring) <= LARGEST_RING:
            found.setdefault(frozenset(ring), ring)
    return tuple(found.values()), frozenset(ring_bonds)


def _shortest_way(links: list[list[Link]], start: int, goal: int, without: int) -> tuple[int, ...]:
    """Return the atoms of a shortest way that leaves out one bond, empty where there is none."""
    came_from = {start: start}
    queue = deque([start])
    while queue and goal not in came_from:
        atom = queue.popleft()
        for link in links[atom]:
            if link.bond != without and link.atom not in came_from:
                came_from[link.atom] = atom
                queue.append(link.atom)
    if goal not in came_from:
        return ()
    way = [goal]
    while way[-1] != start:
        way.append(came_from[way[-1]])
    return tuple(way)
