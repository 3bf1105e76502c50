"""Which domain stands on which site of an arrangement: every way that symmetry tells apart."""

from collections import Counter
from collections.abc import Hashable, Iterator, Sequence
from math import factorial, prod

import numpy as np
import numpy.typing as npt

from shapeshelf.domains.arrangements import Arrangement
from shapeshelf.domains.parameters import DomainTraits

MOST_LAYOUTS = 200
"""Beyond this many, ligands are told apart by bond order alone, then not at all."""


def layouts(arrangement: Arrangement, traits: tuple[DomainTraits, ...]) -> npt.NDArray[np.int64]:
    """Return (b, n): for each distinct placement, the site of each of the n domains.

    Equal domains are interchangeable, mirror images count as one.
    """
    colours = _colours(arrangement, traits)
    symmetries = arrangement.symmetries.tolist()
    seen: set[tuple[int, ...]] = set()
    rows = []
    for painting in _paintings(tuple(sorted(colours))):
        if painting not in seen:
            seen.update(tuple(painting[site] for site in row) for row in symmetries)
            rows.append(_sites_of(painting, colours))
    return np.array(rows, dtype=np.int64)


def _colours(arrangement: Arrangement, traits: tuple[DomainTraits, ...]) -> list[int]:
    """Number the kinds of domain, as finely as the number of placements allows."""
    fine: Sequence[Hashable] = traits
    medium = [(trait.kind, round(trait.order, 1)) for trait in traits]
    coarse = [trait.kind for trait in traits]
    for told_apart in (fine, medium, coarse):
        kinds = list(dict.fromkeys(told_apart))
        repeats = prod(factorial(count) for count in Counter(told_apart).values())
        if factorial(len(traits)) <= MOST_LAYOUTS * repeats * len(arrangement.symmetries):
            break
    return [kinds.index(kind) for kind in told_apart]


def _paintings(colours: tuple[int, ...]) -> Iterator[tuple[int, ...]]:
    """Yield every distinct order of ``colours``, the smallest first."""
    if not colours:
        yield ()
    for colour in sorted(set(colours)):
        index = colours.index(colour)
        for rest in _paintings(colours[:index] + colours[index + 1 :]):
            yield (colour, *rest)


def _sites_of(painting: tuple[int, ...], colours: list[int]) -> tuple[int, ...]:
    free = {colour: [k for k, c in enumerate(painting) if c == colour] for colour in set(colours)}
    return tuple(free[colour].pop(0) for colour in colours)
