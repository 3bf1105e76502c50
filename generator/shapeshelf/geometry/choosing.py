"""Which of several conformers to show: the most symmetric of those as low as the lowest.

A force field is right to some tenths of a kcal/mol at best. Below that, which of two conformers
is lower, or whether a methyl group stands a little aside of its symmetric place, is its error and
not chemistry; the symmetric structure is then the one to show.
"""

from collections.abc import Callable, Iterator, Sequence

from shapeshelf.geometry.symmetry import symmetrised
from shapeshelf.geometry.vectors import Array

FORCE_FIELD_ERROR_KCAL_MOL = 0.5
"""Conformer energies of MMFF94 are right to about this: T. A. Halgren, J. Comput. Chem. 20
(1999) 730 (recalled from memory)."""
RULE_ERROR = 0.3
"""The same for the torsion rules, whose heights are ours; in their unit."""
SNAP_ANGSTROM = 0.08
"""How far an assembled atom may be from its symmetric place and still be put there."""
NEARLY_ANGSTROM = 0.6
"""How far a structure may be from a symmetric one for the symmetric one to be tried."""
SAME_ENERGY = 1e-3
NEGLIGIBLE = 0.01
"""A hump this low, in kcal/mol or the rules' unit, is no barrier to any vibration."""
MOST_COMPARED = 3
MOST_FOR_TRIAL = 40

Relaxed = tuple[Array, float]


def most_symmetric(
    elements: Sequence[str],
    conformers: Sequence[Relaxed],
    relax: Callable[[Array], Relaxed],
    margin: float,
    shaken: Callable[[Array], Array],
    further: Callable[[Array], Sequence[Array]],
) -> Array:
    """Return the coordinates (n, 3) of the chosen conformer.

    ``conformers`` hold coordinates (n, 3) in ångström and an energy; ``relax`` relaxes further
    ones to the same energy scale; ``margin`` is how much higher a symmetric one may be;
    one that is no minimum falls when ``shaken``, unless it is as low as the lowest (oxetane);
    ``further`` makes more structures to try out of the lowest.
    """
    ranked = sorted(conformers, key=lambda one: one[1])
    limit = ranked[0][1] + margin
    low = _distinct([one for one in ranked if one[1] <= limit])[:MOST_COMPARED]
    counted = [(_operations(elements, points), points) for points, _ in low]
    if len(elements) > MOST_FOR_TRIAL:
        return max(counted, key=lambda one: one[0])[1]
    most = max(count for count, _ in counted)
    for trial in _trials(elements, low[0][0], most, further):
        points, energy = relax(trial)
        if energy > ranked[0][1] + NEGLIGIBLE:
            points, energy = relax(shaken(points))
        if energy <= limit:
            counted.append((_operations(elements, points), points))
    return max(counted, key=lambda one: one[0])[1]


def _trials(
    elements: Sequence[str], points: Array, most: int, further: Callable[[Array], Sequence[Array]]
) -> Iterator[Array]:
    """Yield structures of more than ``most`` operations near the lowest one."""
    nearest, count = symmetrised(elements, points, NEARLY_ANGSTROM)
    if count > most:
        yield nearest
    for trial in further(points):
        if _operations(elements, trial) > most:
            yield trial


def _distinct(ranked: Sequence[Relaxed]) -> list[Relaxed]:
    kept: list[Relaxed] = []
    for one in ranked:
        if not kept or one[1] - kept[-1][1] > SAME_ENERGY:
            kept.append(one)
    return kept


def _operations(elements: Sequence[str], points: Array) -> int:
    return symmetrised(elements, points, SNAP_ANGSTROM)[1]
