"""Which lone pairs lie in a pi system and are no domain in the plane of the bonds.

D1  A pair that is a bond in another drawing of equal standing (carboxylate, enolate, allyl,
    azide, amidinium): planar.
D2  One pair of N, O, S, Se or Te in a ring whose other atoms all have pi bonds, each bringing one
    electron, or none where its double bond leaves the ring for O, S, Se, Te or N; 4n + 2 in all
    (pyrrole, furan, thiophene, imidazole, 4-pyridone).
D3  The pair of three-bonded N next to a carbon doubly bonded to O, S, Se, Te or N (amide, urea,
    amidine, thioamide), or one C=C further on (vinylogous amide). Not where the double bond
    belongs to an aromatic ring (2-aminopyridine), nor for a nitrile (cyanamide): those are
    shallow pyramids and keep the domain.
D4  The pair of three-bonded N next to N=O or N=N (nitrosamine, nitramine, triazene).
D5  The pair of three-bonded N next to boron, aluminium or another atom of group 13 that lacks a
    pair (borazine, aminoborane), or next to a metal of the d or f block (its amides).
D6  The pair of three-bonded N next to an oxygen radical (nitroxide): three electrons in pi.
D7  Everything else keeps its pairs in place: aniline, enamine, hydrazone and sulfonamide
    nitrogen, and oxygen and sulfur outside aromatic rings (esters, phenols, enol ethers), which
    are bent either way.

N in a three-membered ring keeps its pair whatever its neighbour (aziridine amides).
D1 to D4: L. Pauling, The Nature of the Chemical Bond, 3rd ed. (1960); D5: N. N. Greenwood and
A. Earnshaw, Chemistry of the Elements, 2nd ed. (1997); D7: R. J. Gillespie and I. Hargittai, The
VSEPR Model of Molecular Geometry (1991); all recalled from memory. D6: common practice, no source.
"""

from shapeshelf.domains.electrons import Drawing, lacks_pair
from shapeshelf.domains.graph import BondGraph
from shapeshelf.reference.elements import ELEMENTS

RING_DONORS = {"N": 3, "O": 2, "S": 2, "Se": 2, "Te": 2}
"""Elements that D2 covers, with the number of neighbours they have in the ring."""
ACCEPTORS = frozenset({"O", "S", "Se", "Te", "N"})


def pairs_in_pi(graph: BondGraph, drawing: Drawing) -> dict[int, str]:
    """Return the atoms with one lone pair in a pi system by D2 to D6, each with its rule."""
    ring = _ring_donors(graph, drawing)
    found = dict.fromkeys(ring, "D2")
    for atom, element in enumerate(graph.elements):
        if atom in found or element != "N" or not _has_one_pair(graph, drawing, atom):
            continue
        if any(len(small) == 3 and atom in small for small in graph.rings):
            continue
        rule = _amine_rule(graph, drawing, atom, ring)
        if rule:
            found[atom] = rule
    return found


def has_pi_bond(graph: BondGraph, drawing: Drawing, atom: int) -> bool:
    """Tell whether a multiple bond ends at ``atom``."""
    return any(drawing.orders[link.bond] > 1 for link in graph.links[atom])


def _has_one_pair(graph: BondGraph, drawing: Drawing, atom: int) -> bool:
    return graph.degree(atom) == 3 and drawing.free[atom] == 2


def _ring_donors(graph: BondGraph, drawing: Drawing) -> set[int]:
    """D2."""
    return {
        atom
        for ring in graph.rings
        for atom in ring
        if RING_DONORS.get(graph.elements[atom]) == graph.degree(atom)
        and drawing.free[atom] >= 2
        and not has_pi_bond(graph, drawing, atom)
        and _completes_sextet(graph, drawing, atom, ring)
    }


def _completes_sextet(
    graph: BondGraph, drawing: Drawing, donor: int, ring: tuple[int, ...]
) -> bool:
    """Tell whether the donor's pair and the pi electrons of the others make 4n + 2."""
    electrons = 2
    for atom in ring:
        if atom == donor:
            continue
        if _brings_one(graph, drawing, atom, ring):
            electrons += 1
        elif not _has_outer_double_bond(graph, drawing, atom):
            return False
    return electrons % 4 == 2 and electrons > 2


def _brings_one(graph: BondGraph, drawing: Drawing, atom: int, ring: tuple[int, ...]) -> bool:
    """Tell whether a ring atom brings one pi electron: its pi bond lies in some ring."""
    return any(
        drawing.orders[link.bond] > 1 and (link.atom in ring or link.bond in graph.ring_bonds)
        for link in graph.links[atom]
    )


def _has_outer_double_bond(graph: BondGraph, drawing: Drawing, atom: int) -> bool:
    return any(
        drawing.orders[link.bond] == 2 and graph.elements[link.atom] in ACCEPTORS
        for link in graph.links[atom]
    )


def _amine_rule(graph: BondGraph, drawing: Drawing, atom: int, ring: set[int]) -> str | None:
    for link in graph.links[atom]:
        near = link.atom
        if graph.metals[near] and not graph.bonds[link.bond].dative:
            return "D5"
        group = ELEMENTS[graph.elements[near]].group
        if group == 13 and lacks_pair(graph, drawing, near):
            return "D5"
        if graph.elements[near] == "O" and graph.degree(near) == 1 and drawing.free[near] % 2:
            return "D6"
        if graph.elements[near] == "C" and _accepts(graph, drawing, near, ring):
            return "D3"
        if graph.elements[near] == "N" and _has_azo_or_oxo(graph, drawing, near):
            return "D4"
    return None


def _accepts(graph: BondGraph, drawing: Drawing, carbon: int, ring: set[int]) -> bool:
    """Tell whether a carbon has C=X, or C=C-C=X, outside aromatic rings."""
    for link in graph.links[carbon]:
        if drawing.orders[link.bond] != 2:
            continue
        if _in_aromatic_ring(graph, drawing, carbon, link.atom, ring):
            continue
        if graph.elements[link.atom] in ACCEPTORS:
            return True
        beyond = [k for k in graph.neighbours(link.atom) if k != carbon]
        if graph.elements[link.atom] == "C" and any(
            graph.elements[k] in ("C", "N") and _has_outer_double_bond(graph, drawing, k)
            for k in beyond
        ):
            return True
    return False


def _in_aromatic_ring(
    graph: BondGraph, drawing: Drawing, first: int, second: int, donors: set[int]
) -> bool:
    return any(
        first in ring
        and second in ring
        and all(k in donors or _brings_one(graph, drawing, k, ring) for k in ring)
        for ring in graph.rings
    )


def _has_azo_or_oxo(graph: BondGraph, drawing: Drawing, nitrogen: int) -> bool:
    return any(
        drawing.orders[link.bond] == 2 and graph.elements[link.atom] in ("N", "O")
        for link in graph.links[nitrogen]
    )
