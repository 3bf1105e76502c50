"""Bent's rule, checked against the s-characters of one centre.

Atomic s-character concentrates in the orbitals directed towards the less electronegative
partners, and most of all in lone pairs: H. A. Bent, Chem. Rev. 61 (1961) 275 (recalled from
memory). The rule speaks of single bonds; multiple bonds at the centre are left out.
"""

from collections.abc import Sequence
from dataclasses import dataclass
from itertools import pairwise

from shapeshelf.domains.model import Centre, Domain, DomainKind
from shapeshelf.properties.model import Hybrid
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule

SINGLE_BOND = 1.05
"""Mean bond orders up to this count as single."""
EQUAL_SHARES = 0.005
"""s-characters closer than this are told apart by no structure."""
LONE_PAIR_RANK = -1.0
"""Below every electronegativity: nothing at the far end pulls."""
PERCENT = 100


@dataclass(frozen=True, slots=True)
class _Kind:
    """The partners of one sort: their rank (electronegativity) and mean s-character."""

    name: str
    rank: float
    share: float


def bent_rule(molecule: Molecule, centre: Centre, hybrids: Sequence[Hybrid]) -> str | None:
    """Return what the rule expects here and whether the numbers agree.

    ``hybrids`` one a domain of ``centre``, in its order. ``None`` where all partners are alike.
    """
    kinds = _kinds(molecule, centre, hybrids)
    if len({kind.rank for kind in kinds}) < 2:
        return None
    expected = " > ".join(kind.name for kind in kinds)
    found = ", ".join(f"{kind.name} {PERCENT * kind.share:.0f} %" for kind in kinds)
    return f"Bent's rule expects s-character in the order {expected}; {_verdict(kinds, found)}"


def _verdict(kinds: Sequence[_Kind], found: str) -> str:
    steps = [
        first.share - second.share for first, second in pairwise(kinds) if first.rank < second.rank
    ]
    if all(abs(step) < EQUAL_SHARES for step in steps):
        return f"the angles do not tell them apart ({found})."
    if all(step > -EQUAL_SHARES for step in steps):
        return f"the numbers agree ({found})."
    return f"the numbers do not follow it ({found})."


def _kinds(molecule: Molecule, centre: Centre, hybrids: Sequence[Hybrid]) -> list[_Kind]:
    """Return the sorts of partner, least electronegative first."""
    gathered: dict[tuple[float, str], list[float]] = {}
    for domain, hybrid in zip(centre.domains, hybrids, strict=True):
        key = _rank_and_name(molecule, domain)
        if key is not None:
            gathered.setdefault(key, []).append(hybrid.s_character)
    return [
        _Kind(name, rank, sum(shares) / len(shares))
        for (rank, name), shares in sorted(gathered.items())
    ]


def _rank_and_name(molecule: Molecule, domain: Domain) -> tuple[float, str] | None:
    if domain.kind is not DomainKind.BOND:
        return (LONE_PAIR_RANK, "lone pair") if domain.kind is DomainKind.LONE_PAIR else None
    if domain.neighbour is None or domain.bond_order > SINGLE_BOND:
        return None
    element = molecule.atoms[domain.neighbour].element
    electronegativity = ELEMENTS[element].electronegativity
    return None if electronegativity is None else (electronegativity, element)
