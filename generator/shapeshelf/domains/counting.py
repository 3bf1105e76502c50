"""The electron domains of a centre."""

from shapeshelf.domains.graph import graph_of
from shapeshelf.domains.model import Domain, DomainKind, LewisCount
from shapeshelf.structure.molecule import Molecule


def domains_at(molecule: Molecule, lewis: LewisCount, atom: int) -> tuple[Domain, ...]:
    """Return the domains of ``atom``: bonds in neighbour order, lone pairs, single electrons.

    Pairs and single electrons that lie in a pi system are left out (rules D1 to D6), and so are
    the d electrons of metals (rule C2). A single electron fills a domain of its own.
    """
    bonds = tuple(
        Domain(DomainKind.BOND, link.atom, lewis.bond_orders[link.bond])
        for link in graph_of(molecule).links[atom]
    )
    count = lewis.atoms[atom]
    pairs = count.lone_pairs - count.delocalised_pairs
    singles = count.single_electrons - count.delocalised_singles
    return (
        *bonds,
        *(Domain(DomainKind.LONE_PAIR),) * pairs,
        *(Domain(DomainKind.SINGLE_ELECTRON),) * singles,
    )


def notation_of(bonded: int, lone_pairs: int, single_electrons: int) -> str:
    """Return the AXE notation; a single electron that is a domain is an E like a lone pair."""
    empty = lone_pairs + single_electrons
    return f"AX{bonded}" + ("" if empty == 0 else "E" if empty == 1 else f"E{empty}")
