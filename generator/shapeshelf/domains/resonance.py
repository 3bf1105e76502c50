"""The drawings of a molecule that count alike, found by moving electrons one step at a time.

Moves, each between neighbours X, Y, Z, all of them reversible or downhill:

E1  a lone pair joins, a pi bond leaves:         X: Y=Z    ->  X=Y :Z
E2  a vacancy draws a pi bond:                   X+ Y=Z    ->  X=Y Z+
E3  a single electron changes places likewise:   X. Y=Z    ->  X=Y .Z
E4  a lone pair fills its neighbour's vacancy:   X: Y+     ->  X=Y
E5  alternating bonds of a ring of 4n + 2 change places

Resonance after L. Pauling, The Nature of the Chemical Bond (1939), the count 4n + 2 after
E. Hückel, Z. Phys. 70 (1931) 204; both recalled from memory.
"""

from collections.abc import Iterator
from dataclasses import dataclass

from shapeshelf.domains.electrons import Drawing, lacks_pair, strain
from shapeshelf.domains.graph import BondGraph
from shapeshelf.domains.ring_currents import SearchBudget, ring_shifts
from shapeshelf.reference.elements import ELEMENTS

MOST_DRAWINGS = 300
"""Of one pi system; beyond them the drawing given is averaged over equivalent bonds."""
MOST_STEPS = 40_000
"""Of all ring searches in one pi system."""


@dataclass(frozen=True, slots=True)
class Resonance:
    """The drawings of one pi system that count alike."""

    atoms: tuple[int, ...]
    drawings: tuple[Drawing, ...]
    """At least one; they differ within ``atoms`` only. The best-placed charges first."""
    complete: bool = True
    """False where there are too many to list; then one stands for all."""


def equal_drawings(graph: BondGraph, drawing: Drawing, atoms: tuple[int, ...]) -> Resonance:
    """Return the drawings of least strain that moves within ``atoms`` reach, in a fixed order."""
    best = strain(graph, drawing, atoms)
    # Without charges, vacancies and single electrons every move but E5 only costs.
    quiet = best == 0 and all(drawing.free[atom] % 2 == 0 for atom in atoms)
    budget = SearchBudget(MOST_STEPS)
    found = {drawing}
    waiting = [drawing]
    while waiting:
        for following in _moves(graph, waiting.pop(), atoms, quiet, budget):
            cost = best if quiet else strain(graph, following, atoms)
            if cost < best - 1e-9:
                return equal_drawings(graph, following, atoms)
            if cost <= best + 1e-9 and following not in found:
                found.add(following)
                waiting.append(following)
        if len(found) > MOST_DRAWINGS or budget.left <= 0:
            return Resonance(atoms, (drawing,), complete=False)
    ranked = sorted(found, key=lambda d: (_misplacement(graph, d, atoms), d.orders, d.free))
    return Resonance(atoms, tuple(ranked))


def bonds_within(graph: BondGraph, atoms: tuple[int, ...]) -> list[int]:
    """Return the bonds that have both ends among ``atoms``."""
    inside = set(atoms)
    return sorted(
        {link.bond for atom in atoms for link in graph.links[atom] if link.atom in inside}
    )


def _misplacement(graph: BondGraph, drawing: Drawing, atoms: tuple[int, ...]) -> float:
    """Return how badly charges sit: least with the negative ones on electronegative atoms."""
    total = sum(
        drawing.charges[atom] * (ELEMENTS[graph.elements[atom]].electronegativity or 0.0)
        for atom in atoms
    )
    return round(total, 6)


def _moves(
    graph: BondGraph, drawing: Drawing, atoms: tuple[int, ...], quiet: bool, budget: SearchBudget
) -> Iterator[Drawing]:
    inside = set(atoms)
    for start in () if quiet else atoms:
        yield from _moves_from(graph, drawing, start, inside)
    for bonds in ring_shifts(graph, drawing.orders, inside, budget):
        yield _altered(drawing, {bond: 1 - 2 * (k % 2) for k, bond in enumerate(bonds)}, {}, {})


def _moves_from(
    graph: BondGraph, drawing: Drawing, start: int, inside: set[int]
) -> Iterator[Drawing]:
    pair, single = drawing.free[start] >= 2, drawing.free[start] % 2 == 1
    vacant = lacks_pair(graph, drawing, start)
    if graph.metals[start] or not (pair or single or vacant):
        return
    for near in graph.links[start]:
        if near.atom not in inside or graph.bonds[near.bond].dative:
            continue
        if pair and drawing.orders[near.bond] < 3:
            yield from _filled_vacancy(graph, drawing, start, near.atom, near.bond)
        if not _may_join(graph, drawing, start, near.bond):
            continue
        for far in graph.links[near.atom]:
            if far.atom == start or far.atom not in inside or graph.metals[far.atom]:
                continue
            if drawing.orders[far.bond] < 2:
                continue
            orders = {near.bond: 1, far.bond: -1}
            if pair:
                yield _altered(drawing, orders, {start: -2, far.atom: 2}, {start: 1, far.atom: -1})
            if vacant:
                yield _altered(drawing, orders, {}, {start: -1, far.atom: 1})
            if single:
                yield _altered(drawing, orders, {start: -1, far.atom: 1}, {})


def _may_join(graph: BondGraph, drawing: Drawing, start: int, bond: int) -> bool:
    """Tell whether the electrons at ``start`` lie in a p orbital that can meet the pi bond.

    An atom with two neighbours and a pi bond keeps its free electrons in the plane, unless the
    pi bond is the very one that would become a triple bond, outside rings.
    """
    if drawing.orders[bond] > 2:
        return False
    pi_bonds = sum(drawing.orders[link.bond] - 1 for link in graph.links[start])
    if pi_bonds == 0 or graph.degree(start) == 1:
        return True
    return drawing.orders[bond] == 2 and bond not in graph.ring_bonds


def _filled_vacancy(
    graph: BondGraph, drawing: Drawing, start: int, end: int, bond: int
) -> Iterator[Drawing]:
    row = ELEMENTS[graph.elements[end]]
    heavy = row.period >= 3 and (row.group or 0) >= 14
    joins = heavy and drawing.charges[end] > 0 and drawing.charges[start] < 0
    if row.group == 17 and _strength(graph, start) < _strength(graph, end):
        joins = False  # a halogen bridge, as in I2Cl6, gave that pair itself
    if not graph.metals[end] and (joins or lacks_pair(graph, drawing, end)):
        yield _altered(drawing, {bond: 1}, {start: -2}, {start: 1, end: -1})


def _strength(graph: BondGraph, atom: int) -> float:
    return ELEMENTS[graph.elements[atom]].electronegativity or 0.0


def _altered(
    drawing: Drawing, orders: dict[int, int], free: dict[int, int], charges: dict[int, int]
) -> Drawing:
    return Drawing(
        _added(drawing.orders, orders), _added(drawing.free, free), _added(drawing.charges, charges)
    )


def _added(values: tuple[int, ...], changes: dict[int, int]) -> tuple[int, ...]:
    altered = list(values)
    for index, change in changes.items():
        altered[index] += change
    return tuple(altered)
