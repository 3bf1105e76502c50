"""s-characters at a centre with more than four electron domains, from s and p alone.

H6  A pair of opposite ligands shares one p orbital in a three-centre four-electron bond (G. C.
    Pimentel, J. Chem. Phys. 19 (1951) 446; R. E. Rundle, J. Am. Chem. Soc. 85 (1963) 112;
    recalled from memory): their s-character is zero. The s orbital and the p orbitals left
    serve the other domains.
    Five domains: one such pair; the rest are s-p hybrids in the plane (H1, H2).
    Six or seven domains with lone pairs: the bonds in opposite pairs, or in a planar ring of
    five, are p alone; the lone pairs and a bond without an opposite one share s.
H7  Six or seven bonds and no lone pair: symmetry gives every bond the same part of s.

What the numbers mean: an electron count in s and p, not a wave function. d orbitals take no part.
"""

from collections.abc import Sequence
from itertools import combinations

import numpy as np

from shapeshelf.geometry.vectors import Array
from shapeshelf.properties.coulson import s_characters

FIVE = 5
OPPOSITE_COSINE = -0.80
"""Beyond 143 degrees: bonds so far apart share one p orbital."""


def hypervalent_s_characters(directions: Array, lone: int) -> tuple[float, ...]:
    """Return the s-character of every bond; ``directions`` (n, 3), ``lone`` pairs beside them."""
    bonds = len(directions)
    if bonds + lone == FIVE:
        return _five(directions, lone)
    if not lone:
        return (1 / bonds,) * bonds
    return _six_or_more(directions, lone)


def _five(directions: Array, lone: int) -> tuple[float, ...]:
    """One p-only pair, the most nearly opposite; the others by Coulson's theorem."""
    axial = set(_most_opposite(directions, range(len(directions))))
    rest = [bond for bond in range(len(directions)) if bond not in axial]
    found = [0.0] * len(directions)
    if rest:
        values = s_characters(directions[rest], lone, [False] * len(rest))
        for bond, value in zip(rest, values, strict=True):
            found[bond] = value
    return tuple(found)


def _six_or_more(directions: Array, lone: int) -> tuple[float, ...]:
    """Bonds with an opposite partner are p alone; a bond without one shares s with lone pairs."""
    bonds = len(directions)
    if bonds % 2 and bonds + lone > FIVE + 1:
        return (0.0,) * bonds
    left = list(range(bonds))
    while len(left) > 1:
        first, second = _most_opposite(directions, left)
        if directions[first] @ directions[second] > OPPOSITE_COSINE:
            break
        left = [bond for bond in left if bond not in (first, second)]
    alone = left if len(left) == 1 else []
    return tuple(1 / (1 + lone) if bond in alone else 0.0 for bond in range(bonds))


def _most_opposite(directions: Array, among: Sequence[int]) -> tuple[int, int]:
    def cosine(pair: tuple[int, int]) -> float:
        return float(np.dot(directions[pair[0]], directions[pair[1]]))

    return min(combinations(among, 2), key=cosine)
