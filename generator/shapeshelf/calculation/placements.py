"""Several placements of one centre, each optimised, and which of them is lowest.

P1  Each is optimised roughly. Two that end in the same structure are one.
P2  Where more than one structure remains, their energies are compared as the fine optimisation
    sees them, at the rough geometries.
"""

from collections.abc import Sequence

import numpy as np

from shapeshelf.calculation.judging import same_structure
from shapeshelf.calculation.methods import Method
from shapeshelf.calculation.minimising import Minimum
from shapeshelf.calculation.model import PlacementResult, System
from shapeshelf.calculation.starting import Start
from shapeshelf.calculation.units import HARTREE_KJ_MOL


def ends_of(system: System, minima: Sequence[Minimum]) -> tuple[int, ...]:
    """Return, for each minimum, the number of the first that is the same structure (P1)."""
    places = [minimum.coordinates for minimum in minima]
    return tuple(
        next(
            k
            for k in range(n + 1)
            if k == n or same_structure(system.elements, places[k], places[n])
        )
        for n in range(len(places))
    )


def energies_of(
    method: Method, minima: Sequence[Minimum], ends: Sequence[int]
) -> tuple[float, ...]:
    """Return the energy in hartree of each minimum; of distinct ones as P2 says.

    Infinite where no optimisation arrived.
    """
    if len(set(ends)) == 1:
        return tuple(minima[0].energy for _ in minima)
    fine = {end: _fine_energy(method, minima, ends, end) for end in sorted(set(ends))}
    return tuple(fine[n] for n in ends)


def placement_results(
    starts: Sequence[Start],
    minima: Sequence[Minimum],
    ends: Sequence[int],
    energies: Sequence[float],
) -> tuple[PlacementResult, ...]:
    """Return what the record keeps of each placement; nothing where there was but one."""
    if len(starts) == 1:
        return ()
    lowest = min(energies)
    winner = energies.index(lowest)
    return tuple(
        PlacementResult(
            start.shape,
            start.sites,
            start.model_energy,
            (energy - lowest) * HARTREE_KJ_MOL if np.isfinite(energy) else None,
            ends[n],
            ends[n] == ends[winner],
        )
        for n, (start, energy) in enumerate(zip(starts, energies, strict=True))
    )


def _fine_energy(method: Method, minima: Sequence[Minimum], ends: Sequence[int], end: int) -> float:
    """Return the fine energy of one structure, infinite where no optimisation arrived at it."""
    arrived = [m for m, one in zip(minima, ends, strict=True) if one == end and m.converged]
    return method.energy(arrived[0].coordinates) if arrived else np.inf
