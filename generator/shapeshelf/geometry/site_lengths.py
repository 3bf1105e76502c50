"""Lengths of bonds as structures are laid out: by kind of bond, then by the site at each centre.

domains/bond_lengths.py gives all bonds of one kind one length, and the angles of the domain model
were fitted with those; here a bond may also be axial or equatorial, given or shared.
"""

import math
from collections.abc import Sequence

from shapeshelf.domains.bond_lengths import bond_length_angstrom
from shapeshelf.domains.graph import BondGraph, Link, graph_of
from shapeshelf.domains.metals import HALOGENS, MetalCentre, is_low_spin, metal_centre
from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.geometry.site_terms import MULTIPLE_ORDER, SITE_ANGSTROM, Site, site_terms
from shapeshelf.structure.molecule import Molecule

OPPOSITE_COSINE = math.cos(math.radians(150.0))


def site_lengths_angstrom(
    molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre]
) -> tuple[float, ...]:
    """Return the expected length, in ångström, of every bond of ``molecule``, in its order."""
    return tuple(
        kind_length_angstrom(molecule, lewis, bond)
        + sum(SITE_ANGSTROM[name] * weight for name, weight in terms.items())
        for bond, terms in enumerate(length_terms(molecule, lewis, centres))
    )


def kind_length_angstrom(molecule: Molecule, lewis: LewisCount, bond: int) -> float:
    """Return the length, in ångström, that elements, order and carbon's domains alone give."""
    ends = molecule.bonds[bond].begin, molecule.bonds[bond].end
    first, second = (molecule.atoms[atom].element for atom in ends)
    counts = (_carbon_domains(molecule, lewis, atom) for atom in ends)
    return bond_length_angstrom(first, second, lewis.bond_orders[bond], *counts)


def length_terms(
    molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre]
) -> tuple[dict[str, float], ...]:
    """Return the weight of every term of site_terms.py in every bond, both ends together."""
    graph = graph_of(molecule)
    found: list[dict[str, float]] = [{} for _ in molecule.bonds]
    for centre in centres:
        metal = metal_centre(molecule, graph, centre.atom) if graph.metals[centre.atom] else None
        for link in graph.links[centre.atom]:
            terms = found[link.bond]
            for name, weight in site_terms(_site(lewis, graph, centre, link, metal)):
                terms[name] = terms.get(name, 0.0) + weight
    return tuple({name: weight for name, weight in row.items() if weight} for row in found)


def _carbon_domains(molecule: Molecule, lewis: LewisCount, atom: int) -> int:
    if molecule.atoms[atom].element != "C":
        return 4
    row = lewis.atoms[atom]
    own = row.lone_pairs + row.single_electrons - row.delocalised_pairs - row.delocalised_singles
    return len(molecule.neighbours(atom)) + own


def _site(
    lewis: LewisCount, graph: BondGraph, centre: Centre, bond: Link, metal: MetalCentre | None
) -> Site:
    atom, other = centre.atom, bond.atom
    beside = [link for link in graph.links[atom] if link.atom != other]
    row = lewis.atoms[atom]
    pairs = 0 if metal else row.lone_pairs + row.single_electrons
    valence, share = _valence(lewis, graph, atom, metal)
    return Site(
        element=centre.element,
        ligand=graph.elements[other],
        order=lewis.bond_orders[bond.bond],
        terminal=graph.degree(other) == 1,
        pairs=pairs,
        domains=centre.bonded + pairs,
        valence=valence,
        share=share,
        opposed=_is_opposed(centre, other),
        oxo=any(
            lewis.bond_orders[link.bond] > MULTIPLE_ORDER and graph.degree(link.atom) == 1
            for link in beside
        ),
        halogens=sum(graph.elements[link.atom] in HALOGENS for link in beside),
        given=metal is None and row.formal_charge < 0 < lewis.atoms[other].formal_charge,
        donor=metal.donors[metal.neighbours.index(other)] if metal else None,
        d_electrons=(metal.d_electrons or 0) if metal else 0,
        singles=row.single_electrons,
        low_spin=metal is not None and metal.d_electrons is not None and is_low_spin(metal),
    )


def _valence(
    lewis: LewisCount, graph: BondGraph, atom: int, metal: MetalCentre | None
) -> tuple[float, float]:
    """Return V and V/N of L1; a bridge's half bonds are not counted in it."""
    orders = [lewis.bond_orders[link.bond] for link in graph.links[atom]]
    drawn = sum(orders)
    valence = metal.oxidation_state if metal else drawn + lewis.atoms[atom].formal_charge
    whole = valence > 0 and min(orders) >= 1
    return float(valence), valence / drawn if whole else 1.0


def _is_opposed(centre: Centre, other: int) -> bool:
    """Tell whether the bond shares an orbital with one opposite to it (L3)."""
    if not centre.placements:
        return False
    placement = centre.placements[0]
    placed = {
        domain.neighbour: direction
        for domain, direction in zip(centre.domains, placement.ideal_directions, strict=True)
        if domain.neighbour is not None
    }
    own = placed[other]
    straight = any(
        sum(p * q for p, q in zip(own, direction, strict=True)) < OPPOSITE_COSINE
        for direction in placed.values()
    )
    return straight != ("pentagonal" in placement.shape)
