"""Loose distance bounds for any molecule, from covalent radii alone."""

from math import cos, radians, sqrt

import numpy as np
import numpy.typing as npt

from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Bond, Molecule

BOND_MARGIN_ANGSTROM = 0.05
"""Scatter of real bonds around sums of radii."""
SMALLEST_ANGLE_DEGREES = {2: 90.0, 3: 85.0, 4: 78.0, 5: 70.0, 6: 70.0}
"""By number of neighbours; pairs in three-membered rings are bonded and have a bond's bounds."""
SMALLEST_LINEAR_DEGREES = 165.0
"""Carbon and nitrogen with two pi bonds and two neighbours."""
SMALLEST_CROWDED_DEGREES = 60.0
"""Seven neighbours and more: 72 degrees in a pentagonal plane, less in eight."""
CLOSEST_ANGSTROM = 1.5
"""Lower bound for atoms three or more bonds apart: hydrogens across a small ring."""
DEFAULT_RADIUS_ANGSTROM = 1.5


def loose_bounds(molecule: Molecule) -> npt.NDArray[np.float64]:
    """Return (n, n) bounds in ångström: upper above the diagonal, lower below it.

    Bonds have their length within a margin; atoms that share a neighbour are kept apart by the
    sharpest usual angle; all else is free.
    """
    lengths = {
        (min(b.begin, b.end), max(b.begin, b.end)): bond_length_angstrom(molecule, b)
        for b in molecule.bonds
    }
    count = len(molecule.atoms)
    bounds = np.full((count, count), 2.0 * sum(lengths.values()) + CLOSEST_ANGSTROM)
    bounds[np.tril_indices(count, -1)] = CLOSEST_ANGSTROM
    np.fill_diagonal(bounds, 0.0)
    _bound_angles(molecule, lengths, bounds)
    for (low, high), length in lengths.items():
        bounds[low, high] = length + BOND_MARGIN_ANGSTROM
        bounds[high, low] = length - BOND_MARGIN_ANGSTROM
    return bounds


def bond_length_angstrom(molecule: Molecule, bond: Bond) -> float:
    """Return the sum of the covalent radii for the bond's order (see reference/elements.py)."""
    return sum(_radius(molecule.atoms[end].element, bond.order) for end in (bond.begin, bond.end))


def _radius(element: str, order: int) -> float:
    row = ELEMENTS[element]
    by_order = (row.single_radius_angstrom, row.double_radius_angstrom, row.triple_radius_angstrom)
    known = [radius for radius in by_order[:order] if radius is not None]
    return known[-1] if known else DEFAULT_RADIUS_ANGSTROM


def _bound_angles(
    molecule: Molecule,
    lengths: dict[tuple[int, int], float],
    bounds: npt.NDArray[np.float64],
) -> None:
    around: list[list[int]] = [[] for _ in molecule.atoms]
    pi = [0] * len(molecule.atoms)
    for bond in molecule.bonds:
        pi[bond.begin] += bond.order - 1
        pi[bond.end] += bond.order - 1
        around[bond.begin].append(bond.end)
        around[bond.end].append(bond.begin)
    for centre, neighbours in enumerate(around):
        sharpest = SMALLEST_ANGLE_DEGREES.get(len(neighbours), SMALLEST_CROWDED_DEGREES)
        if len(neighbours) == 2 and pi[centre] == 2 and molecule.atoms[centre].element in "CN":
            sharpest = SMALLEST_LINEAR_DEGREES
        for second in range(len(neighbours)):
            for first in range(second):
                low, high = sorted((neighbours[first], neighbours[second]))
                a = lengths[min(low, centre), max(low, centre)]
                b = lengths[min(high, centre), max(high, centre)]
                nearest = _opposite_side(a, b, sharpest)
                bounds[high, low] = nearest - 2 * BOND_MARGIN_ANGSTROM
                bounds[low, high] = a + b + 2 * BOND_MARGIN_ANGSTROM


def _opposite_side(a: float, b: float, angle_degrees: float) -> float:
    return sqrt(a * a + b * b - 2 * a * b * cos(radians(angle_degrees)))
