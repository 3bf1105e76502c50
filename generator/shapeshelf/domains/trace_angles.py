"""Which repulsion moves which angle which way, in words."""

from dataclasses import dataclass
from itertools import combinations

from shapeshelf.domains.directions import angle_degrees
from shapeshelf.domains.model import Domain, DomainKind, Placement, TraceStep
from shapeshelf.structure.molecule import Molecule

NOTICED_DEGREES = 0.5
"""Shifts below this are left unsaid."""
MOST_STEPS = 4
ORDER_NOTICED = 0.1


@dataclass(frozen=True, slots=True)
class _Shift:
    """One kind of angle: what it is, where it starts and ends, and why."""

    name: str
    ideal: float
    actual: float
    cause: str


def angle_steps(
    molecule: Molecule, atom: int, domains: tuple[Domain, ...], placement: Placement
) -> list[TraceStep]:
    """Return a step for each kind of angle that leaves its ideal value, the largest shift first."""
    kinds: dict[tuple[str, int], list[_Shift]] = {}
    bonds = [k for k, domain in enumerate(domains) if domain.kind is DomainKind.BOND]
    for i, j in combinations(bonds, 2):
        shift = _shift(molecule, atom, domains, placement, (i, j))
        kinds.setdefault((shift.name, round(shift.ideal)), []).append(shift)
    rows = [_mean(shifts) for shifts in kinds.values()]
    rows = [row for row in rows if abs(row.actual - row.ideal) >= NOTICED_DEGREES]
    rows.sort(key=lambda row: (-round(abs(row.actual - row.ideal), 3), row.name))
    return [TraceStep("P3", _sentence(row)) for row in rows[:MOST_STEPS]]


def _shift(
    molecule: Molecule,
    atom: int,
    domains: tuple[Domain, ...],
    placement: Placement,
    pair: tuple[int, int],
) -> _Shift:
    ideal = angle_degrees(*(placement.ideal_directions[k] for k in pair))
    actual = angle_degrees(*(placement.directions[k] for k in pair))
    ends = sorted(_name(molecule, domains, placement, k) for k in pair)
    name = f"{ends[0]}-{molecule.atoms[atom].element}-{ends[1]}"
    within = [domains[k] for k in pair]
    without = [domain for k, domain in enumerate(domains) if k not in pair]
    cause = _why_closed(within, without) if actual < ideal else _why_opened(within, without)
    return _Shift(name, ideal, actual, cause)


def _mean(shifts: list[_Shift]) -> _Shift:
    actual = sum(shift.actual for shift in shifts) / len(shifts)
    nearest = min(shifts, key=lambda shift: abs(shift.actual - actual))
    return _Shift(shifts[0].name, shifts[0].ideal, actual, nearest.cause)


def _sentence(row: _Shift) -> str:
    way = "closes" if row.actual < row.ideal else "opens"
    moved = f"{abs(row.actual - row.ideal):.1f} degrees, from {row.ideal:.1f} to {row.actual:.1f}"
    return f"{row.name} {way} by {moved}: {row.cause}."


def _why_closed(within: list[Domain], without: list[Domain]) -> str:
    if any(domain.kind is DomainKind.LONE_PAIR for domain in without):
        return "the lone pair repels more strongly than a bond and pushes these two together"
    if _order(without) > _order(within) + ORDER_NOTICED:
        return "the multiple bond repels more strongly and pushes these two together"
    if any(domain.kind is DomainKind.SINGLE_ELECTRON for domain in without):
        return "the single electron still pushes these two together"
    return "the other bonds, to less electronegative or bulkier neighbours, push these two together"


def _why_opened(within: list[Domain], without: list[Domain]) -> str:
    if 0 < _order(without) < _order(within) - ORDER_NOTICED:
        return "the multiple bond repels more strongly than the others"
    if any(domain.kind is DomainKind.SINGLE_ELECTRON for domain in without):
        return "the single electron gives way to these two bonds"
    if _order(within) > 1 + ORDER_NOTICED:
        return "the multiple bonds push each other apart"
    return "these bonds, to less electronegative or bulkier neighbours, push each other apart"


def _order(domains: list[Domain]) -> float:
    return max((domain.bond_order for domain in domains), default=0.0)


def _name(molecule: Molecule, domains: tuple[Domain, ...], placement: Placement, index: int) -> str:
    neighbour = domains[index].neighbour
    element = "" if neighbour is None else molecule.atoms[neighbour].element
    site = placement.sites[index]
    return f"{element}({site})" if site else element
