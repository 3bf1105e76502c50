"""Moments of lone pairs: an s-p hybrid holds its electrons off the nucleus.

Q7  The lone pairs of an atom with two neighbours or more, those in a pi system left out, have
    together a moment of c debye, from the nucleus towards them: away from the sum of the bond
    directions; less where that sum is small, so that it fades as an atom becomes planar.

c is fitted for each element (charge_parameters.py). Hybrid moments: C. A. Coulson, Valence, 2nd
ed., Oxford University Press, 1961 (recalled from memory).
"""

from dataclasses import dataclass

import numpy as np

from shapeshelf.geometry.vectors import Array, unit
from shapeshelf.properties.charges import ChargeGraph

FADES_BELOW = 0.3
"""Length of the sum of bond directions; a pyramid 6 degrees from planar has it."""


@dataclass(frozen=True, slots=True)
class LoneMoment:
    """``coefficient of term`` debye along ``direction`` (3,), positive end to negative."""

    term: str
    direction: Array


def lone_moments(graph: ChargeGraph, coordinates_angstrom: Array) -> tuple[LoneMoment, ...]:
    """Return the moment of every atom that has one; ``coordinates_angstrom`` (n, 3)."""
    found = []
    for atom, around in enumerate(graph.orders):
        pairs = graph.lone_pairs[atom] - graph.delocalised_pairs[atom]
        if pairs <= 0 or len(around) < 2:
            continue
        here = coordinates_angstrom[atom]
        away = -np.sum([unit(coordinates_angstrom[j] - here) for j in around], axis=0)
        size = float(np.linalg.norm(away))
        direction = unit(away) * min(1.0, size / FADES_BELOW)
        found.append(LoneMoment(f"lone pair {graph.elements[atom]}", direction))
    return tuple(found)
