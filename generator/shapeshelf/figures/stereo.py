"""Wedged bonds for stereogenic centres of a flat drawing.

A bond is chosen at each centre as the IUPAC Recommendations 2006 ask (Pure Appl. Chem. 78
(2006) 1897): single, to an atom with few neighbours, not to another stereogenic centre where
that can be helped. Whether it is wedged or hashed follows from the sense of turning.
"""

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.structure.molecule import Molecule, TetrahedralStereo

Array = NDArray[np.float64]


@dataclass(frozen=True, slots=True)
class StereoBond:
    """A wedge (or hash) with its narrow end at the centre."""

    narrow: int
    wide: int
    towards_viewer: bool


def stereo_bonds(
    molecule: Molecule, points: Array, shown: frozenset[int]
) -> dict[frozenset[int], StereoBond]:
    """Return the bonds to wedge, by their two atoms; ``points`` (n, 2) with y downwards."""
    centres = {stereo.atom for stereo in molecule.tetrahedral_stereo}
    chosen: dict[frozenset[int], StereoBond] = {}
    for stereo in molecule.tetrahedral_stereo:
        wide = _choose(molecule, stereo, shown, centres, chosen)
        if wide is not None:
            towards = _towards_viewer(stereo, points, wide)
            chosen[frozenset((stereo.atom, wide))] = StereoBond(stereo.atom, wide, towards)
    return chosen


def _choose(
    molecule: Molecule,
    stereo: TetrahedralStereo,
    shown: frozenset[int],
    centres: set[int],
    chosen: dict[frozenset[int], StereoBond],
) -> int | None:
    orders = {frozenset((bond.begin, bond.end)): bond.order for bond in molecule.bonds}
    free = [
        other
        for other in stereo.neighbours
        if other in shown
        and frozenset((stereo.atom, other)) not in chosen
        and orders.get(frozenset((stereo.atom, other))) == 1
    ]
    return min(free, key=lambda k: (k in centres, len(molecule.neighbours(k)), k), default=None)


def _towards_viewer(stereo: TetrahedralStereo, points: Array, wide: int) -> bool:
    """Seen from ``wide``, the others turn one way; on paper (seen from above) they turn so."""
    order = list(stereo.neighbours)
    place = order.index(wide)
    others = [other for other in order if other != wide]
    clockwise_from_wide = stereo.clockwise if place % 2 == 0 else not stereo.clockwise
    middle = points[stereo.atom]
    ways = [np.arctan2(*(points[other] - middle)[::-1]) for other in others]
    if len(others) < 3:
        ways.append(
            np.arctan2(*-(np.sum(points[others] - middle, axis=0) + points[wide] - middle)[::-1])
        )
    turn = [(way - ways[0]) % (2 * np.pi) for way in ways[1:]]
    clockwise_on_paper = turn[0] < turn[1]
    return bool(clockwise_on_paper == clockwise_from_wide)
