"""One drawing of a molecule with its electrons: what resonance moves about.

Rules of the count:

C1  Electrons in no bond = valence electrons - formal charge - sum of the bond orders; an arrow
    takes two from its donor and none from its acceptor.
C2  The d electrons of a metal (groups 3 to 12, f block) are no domains and are not counted here.
C3  An atom left with an odd electron by a plain bond to such a metal gives its pair instead.
C4  A bridge drawn with plain bonds (chlorine with two, aluminium with four) is read as a pair
    given by the bridging atom.
C5  The middle of a three-centre bond, and its neighbours, share its pair (bridges.py).
"""

from dataclasses import dataclass

from shapeshelf.domains.bridges import is_bridge
from shapeshelf.domains.graph import BondGraph, valence_electrons
from shapeshelf.errors import AnalysisError
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule

SCARCE = {1: 1, 2: 1, 13: 1}
"""Groups whose atoms live well without an octet; the others miss a pair badly."""


@dataclass(frozen=True, slots=True)
class Drawing:
    """Bond orders, free electrons and charges; each one an atom or one a bond."""

    orders: tuple[int, ...]
    free: tuple[int, ...]
    """Electrons in no bond; 0 for a metal."""
    charges: tuple[int, ...]


def draw(molecule: Molecule, graph: BondGraph) -> Drawing:
    """Return the molecule's own drawing with its electrons counted by C1 to C5.

    Raises AnalysisError where an atom has more bonds than electrons.
    """
    orders = tuple(bond.order for bond in molecule.bonds)
    charges = [atom.formal_charge for atom in molecule.atoms]
    free = [raw_free(graph, atom, charges[atom]) for atom in range(len(charges))]
    for atom, count in enumerate(free):
        if count % 2 and _plain_metal_bonds(graph, atom):
            free[atom] = count - 1
    _read_bridges(graph, free, charges)
    for atom, count in enumerate(free):
        if count < 0:
            free[atom] = _without_debt(graph, atom, count)
    return Drawing(orders, tuple(free), tuple(charges))


def raw_free(graph: BondGraph, atom: int, charge: int) -> int:
    """Return the electrons in no bond by C1 and C2; negative where there are not enough."""
    if graph.metals[atom]:
        return 0
    used = 0
    for link in graph.links[atom]:
        bond = graph.bonds[link.bond]
        used += bond.order if not bond.dative else 2 * bond.order * (bond.begin == atom)
    return valence_electrons(graph.elements[atom]) - charge - used


def shell(graph: BondGraph, drawing: Drawing, atom: int) -> int:
    """Return the electrons round ``atom``: its own and both of every bond it shares."""
    shared = sum(
        2 * drawing.orders[link.bond]
        for link in graph.links[atom]
        if not (graph.bonds[link.bond].dative and graph.bonds[link.bond].begin == atom)
    )
    return drawing.free[atom] + shared


def lacks_pair(graph: BondGraph, drawing: Drawing, atom: int) -> bool:
    """Tell whether a second- or third-period atom has room for a pair in its octet."""
    group = ELEMENTS[graph.elements[atom]].group
    if graph.metals[atom] or graph.elements[atom] in ("H", "He") or group == 1:
        return False
    if ELEMENTS[graph.elements[atom]].period >= 3 and group != 13:
        return False
    return shell(graph, drawing, atom) <= 6


def strain(graph: BondGraph, drawing: Drawing, atoms: tuple[int, ...]) -> float:
    """Return what a drawing costs: charges, missing pairs, positive halogens; least is best.

    The weights order the drawings as textbooks do (octet first for carbon to fluorine, then
    few charges; common practice, no source); only their order matters.
    """
    cost = 0.0
    for atom in atoms:
        charge = drawing.charges[atom]
        group = ELEMENTS[graph.elements[atom]].group or 0
        cost += abs(charge) + (charge > 0 and group == 17)
        if lacks_pair(graph, drawing, atom):
            cost += SCARCE.get(group, 2.5)
    return cost


def _plain_metal_bonds(graph: BondGraph, atom: int) -> int:
    return sum(
        graph.metals[link.atom] and not graph.bonds[link.bond].dative for link in graph.links[atom]
    )


def _read_bridges(graph: BondGraph, free: list[int], charges: list[int]) -> None:
    """C4."""
    for atom, count in enumerate(free):
        if count >= 0 or graph.elements[atom] == "H":
            continue
        for neighbour in graph.neighbours(atom):
            if free[atom] < 0 and free[neighbour] > 0 and free[neighbour] % 2:
                free[atom] += 1
                charges[atom] -= 1
                free[neighbour] -= 1
                charges[neighbour] += 1


def _without_debt(graph: BondGraph, atom: int, count: int) -> int:
    around = graph.neighbours(atom)
    bridged = any(is_bridge(graph, k) for k in (atom, *around))
    if bridged or any(graph.metals[k] for k in around):
        return 0
    subject = f"{graph.elements[atom]} (atom {atom})"
    raise AnalysisError(
        subject,
        f"its bonds and charge take {-count} electrons more than it has; "
        "a charge is missing, or the bonding is that of a cluster",
    )
