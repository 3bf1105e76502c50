"""How one end of a bond turns against the other where no force field says so.

T1  Two flat ends of a multiple bond lie in one plane; likewise, less stiffly, two flat ends of
    a single bond (conjugation), and a flat end and one with a lone pair (its pair turns into
    the pi system): H2N-BF2, HO-NO2.
T2  Two ends with lone pairs turn those pairs to a right angle: hydrogen peroxide, hydrazine,
    disulfur difluoride, the crown of S8.
T3  Two ends of as many domains are staggered: ethane (3 by 3), S2F10 (4 by 4).
T4  Next to a multiple bond a tetrahedral end eclipses it: propene.
T5  Across a straight chain the ends of an odd number of double bonds lie in one plane, of an
    even number at right angles (allene); across any other chain they are eclipsed (2-butyne).

T6  A lone pair beside a tetrahedral end with electronegative neighbours brings the substituent
    near those (the anomeric effect): sulfuric acid.
T7  A ring of up to six atoms whose bonds all share in pi bonding is flat even at tetrahedral
    atoms: hexachlorocyclotriphosphazene.

T1 to T4, T6: R. J. Gillespie and I. Hargittai, The VSEPR Model of Molecular Geometry (1991) and
E. L. Eliel and S. H. Wilen, Stereochemistry of Organic Compounds (1994); T8, T9: N. N. Greenwood
and A. Earnshaw, Chemistry of the Elements, 2nd ed. (1997); all recalled from memory.
The heights (near kcal/mol) only rank the rules and are ours.
"""

from collections.abc import Iterator
from dataclasses import dataclass
from itertools import pairwise

from shapeshelf.geometry.surroundings import (
    LINEAR_DEGREES,
    MULTIPLE_ORDER,
    Surroundings,
    joined_without,
)
from shapeshelf.reference.elements import ELEMENTS

DOUBLE_ORDER = 1.6


@dataclass(frozen=True, slots=True)
class Turn:
    """V/2 (1 - cos n(phi - phi0)) for the torsion of four atoms."""

    atoms: tuple[int, int, int, int]
    height: float
    fold: int
    minimum_degrees: float


def turns_of(known: Surroundings) -> tuple[Turn, ...]:
    """Return the torsion terms of a whole molecule by T1 to T5."""
    turns: list[Turn] = []
    for first, second in known.orders:
        if first not in known.linear and second not in known.linear:
            turns += _about_bond(known, first, second)
    return (*turns, *chain_turns(known))


def chain_turns(known: Surroundings) -> tuple[Turn, ...]:
    """Return the torsion terms of T5 alone."""
    return tuple(turn for chain in _straight_chains(known) for turn in _about_chain(known, chain))


def _about_bond(known: Surroundings, b: int, c: int) -> Iterator[Turn]:
    left, right = _substituents(known, b, c), _substituents(known, c, b)
    if not left or not right:
        return
    shape = _rule(known, b, c, len(left), len(right))
    share = 1.0 / (len(left) * len(right))
    for a in left:
        for d in right:
            if a == d:
                continue
            yield from _special(known, (a, b, c, d), share)
            if shape is not None:
                height, fold, minimum = shape
                yield Turn((a, b, c, d), height * share, fold, minimum)
            elif max(known.order(a, b), known.order(c, d)) > DOUBLE_ORDER:
                yield Turn((a, b, c, d), 1.0 * share, 3, 0.0)


def _special(known: Surroundings, atoms: tuple[int, int, int, int], share: float) -> Iterator[Turn]:
    """Yield T6, either way round, and T7."""
    a, b, c, d = atoms
    if _is_anomeric(known, b, c, d) or _is_anomeric(known, c, b, a):
        yield Turn(atoms, 4.0 * share, 1, 0.0)
    bonds = ((a, b), (b, c), (c, d))
    if all(known.order(*bond) > MULTIPLE_ORDER for bond in bonds) and _in_six_ring(known, atoms):
        yield Turn(atoms, 30.0, 1, 0.0)
    if a in known.neighbours[d] and any(known.order(*bond) < 1 for bond in bonds):
        yield Turn(atoms, 30.0, 1, 0.0)


def _is_anomeric(known: Surroundings, donor: int, centre: int, acceptor: int) -> bool:
    return (
        donor in known.paired - known.flat
        and centre not in known.paired | known.flat
        and acceptor in known.paired
        and len(known.neighbours[centre]) == 4
        and known.order(centre, acceptor) < MULTIPLE_ORDER
    )


def _in_six_ring(known: Surroundings, atoms: tuple[int, int, int, int]) -> bool:
    a, b, c, d = atoms
    between = set(known.neighbours[a]) - {b}
    return any(
        d in known.neighbours[k] or set(known.neighbours[k]) & set(known.neighbours[d]) - {a, c}
        for k in between - {c}
    )


def _substituents(known: Surroundings, atom: int, axis: int) -> list[int]:
    """Return the neighbours of ``atom`` that point away from the axis to ``axis``."""
    return [
        other
        for other in known.neighbours[atom]
        if other != axis and known.angles.get((other, atom, axis), 109.5) <= LINEAR_DEGREES
    ]


def _rule(
    known: Surroundings, b: int, c: int, left: int, right: int
) -> tuple[float, int, float] | None:
    """Return height, fold and minimum of the rule that applies to the bond b-c."""
    flat = (b in known.flat) + (c in known.flat)
    paired = _holds_pair_aside(known, b) + _holds_pair_aside(known, c)
    if flat == 2 and all(ELEMENTS[known.elements[k]].group == 13 for k in (b, c)):
        return (12.0, 2, 90.0 if _bears_heavy(known, b) or _bears_heavy(known, c) else 0.0)
    if flat == 2:
        return (60.0 if known.order(b, c) > DOUBLE_ORDER else 12.0, 2, 0.0)
    if flat == 1 and paired == 1:
        return (8.0, 2, 0.0)
    if paired == 2:
        away = _turns_pair_away(known, b) and _turns_pair_away(known, c)
        return (8.0, 1, 180.0) if away and not joined_without(known, b, c) else (8.0, 2, 90.0)
    if flat == 0:
        return _staggered(known, b, c)
    return None


def _holds_pair_aside(known: Surroundings, atom: int) -> bool:
    """Tell whether a lone pair stands beside the bonds as in a pyramid or a bent centre."""
    return atom in known.paired - known.flat and len(known.neighbours[atom]) <= 3


def _bears_heavy(known: Surroundings, atom: int) -> bool:
    return any(ELEMENTS[known.elements[k]].period >= 3 for k in known.neighbours[atom])


def _turns_pair_away(known: Surroundings, atom: int) -> bool:
    """T8."""
    around, row = known.neighbours[atom], ELEMENTS[known.elements[atom]]
    return (
        row.group == 15
        and row.period >= 3
        and len(around) == 3
        and all(known.elements[k] != "H" for k in around)
    )


def _staggered(known: Surroundings, b: int, c: int) -> tuple[float, int, float] | None:
    """Return T3 where both ends have as many domains beside the axis: three or four."""
    domains = [_domains_beside(known, atom, axis) for atom, axis in ((b, c), (c, b))]
    if domains[0] != domains[1] or domains[0] not in (3, 4):
        return None
    return (3.0, domains[0], 180.0 / domains[0])


def _domains_beside(known: Surroundings, atom: int, axis: int) -> int:
    """Return how many domains stand beside the axis; ends of a tetrahedron always have three."""
    neighbours = len(known.neighbours[atom])
    return 3 if neighbours <= 4 else len(_substituents(known, atom, axis))


def _straight_chains(known: Surroundings) -> Iterator[tuple[int, ...]]:
    """Yield each run of straight centres with the two bent ends, lower end first."""
    for start in range(len(known.neighbours)):
        if start in known.linear:
            continue
        for second in known.neighbours[start]:
            chain = [start, second]
            while chain[-1] in known.linear and len(chain) <= len(known.neighbours):
                before, here = chain[-2:]
                chain.append(next(k for k in known.neighbours[here] if k != before))
            if len(chain) > 2 and chain[0] < chain[-1]:
                yield tuple(chain)


def _about_chain(known: Surroundings, chain: tuple[int, ...]) -> Iterator[Turn]:
    b, c = chain[0], chain[-1]
    left = [k for k in _substituents(known, b, chain[1]) if k != c]
    right = [k for k in _substituents(known, c, chain[-2]) if k != b]
    if not left or not right:
        return
    double = all(known.order(x, y) > MULTIPLE_ORDER for x, y in pairwise(chain))
    share = 1.0 / (len(left) * len(right))
    if double and b in known.flat and c in known.flat:
        height, fold, minimum = 40.0, 2, 90.0 if len(chain) % 2 else 0.0
    else:
        height, fold, minimum = 0.5, len(left) if len(left) == len(right) else 1, 0.0
    for a in left:
        for d in right:
            yield Turn((a, b, c, d), height * share, fold, minimum)
