"""Which repulsion moves which angle which way, in words."""

import math
from itertools import combinations

from shapeshelf.domains.model import Domain, DomainKind, Placement, TraceStep
from shapeshelf.structure.molecule import Molecule, Vector

NOTICED_DEGREES = 0.5
"""Shifts below this are left unsaid."""
MOST_STEPS = 4


def angle_steps(
    molecule: Molecule, atom: int, domains: tuple[Domain, ...], placement: Placement
) -> list[TraceStep]:
    """Return a step for each kind of angle that leaves its ideal value, the largest shift first."""
    shifts: dict[tuple[str, float], list[float]] = {}
    bonds = [k for k, domain in enumerate(domains) if domain.kind is DomainKind.BOND]
    for i, j in combinations(bonds, 2):
        ideal = _angle_degrees(placement.ideal_directions[i], placement.ideal_directions[j])
        actual = _angle_degrees(placement.directions[i], placement.directions[j])
        ends = sorted((_name(molecule, domains, placement, k) for k in (i, j)))
        name = f"{ends[0]}-{molecule.atoms[atom].element}-{ends[1]}"
        shifts.setdefault((name, round(ideal)), []).append(actual)
    cause = _cause(domains)
    rows = [(name, ideal, sum(found) / len(found)) for (name, ideal), found in shifts.items()]
    rows = [row for row in rows if abs(row[2] - row[1]) >= NOTICED_DEGREES]
    rows.sort(key=lambda row: (-abs(row[2] - row[1]), row[0]))
    return [TraceStep("P3", _sentence(*row, cause)) for row in rows[:MOST_STEPS]]


def _sentence(name: str, ideal: float, actual: float, cause: str) -> str:
    way = "closes" if actual < ideal else "opens"
    return (
        f"{name} {way} by {abs(actual - ideal):.1f} degrees, {ideal:.0f} to {actual:.1f}: {cause}."
    )


def _cause(domains: tuple[Domain, ...]) -> str:
    kinds = {domain.kind for domain in domains}
    if DomainKind.LONE_PAIR in kinds:
        return "lone pairs repel more strongly than bonds"
    if DomainKind.SINGLE_ELECTRON in kinds:
        return "a single electron repels less than a pair"
    orders = {round(domain.bond_order, 1) for domain in domains}
    if len(orders) > 1:
        return "multiple bonds repel more strongly than single ones"
    return "bonds to less electronegative and bulkier neighbours repel more strongly"


def _name(molecule: Molecule, domains: tuple[Domain, ...], placement: Placement, index: int) -> str:
    neighbour = domains[index].neighbour
    element = "" if neighbour is None else molecule.atoms[neighbour].element
    site = placement.sites[index]
    return f"{element}({site})" if site else element


def _angle_degrees(first: Vector, second: Vector) -> float:
    cosine = sum(a * b for a, b in zip(first, second, strict=True))
    return math.degrees(math.acos(max(-1.0, min(1.0, cosine))))
