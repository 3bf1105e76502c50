"""A record's coordinates laid onto a molecule as it is drawn now.

Records hold atoms in the settled order; the molecule may be written in another, and atoms that
only geometry tells apart (the fluorines of SF4) may have been numbered otherwise.

F1  Round a single centre, alike neighbours are exchanged until the angles agree best with those
    of the fixed structure.
F2  Elsewhere alike atoms are paired with the nearest ones, as long as every bond stays a bond.
F3  The result is superposed; without stereogenic centres its mirror image serves as well.
"""

from itertools import permutations, product

import numpy as np
from scipy.optimize import linear_sum_assignment

from shapeshelf.geometry.ordering import settled_order
from shapeshelf.geometry.vectors import Array, superpose
from shapeshelf.structure.molecule import Molecule

MOST_EXCHANGES = 50_000
"""Of permutations tried round one centre: eight alike ligands have 40 320."""


def laid_onto(molecule: Molecule, recorded: Array, fixed: Array) -> Array:
    """Return ``recorded`` (n, 3), in the settled order, in the molecule's order and on ``fixed``.

    Both in ångström.
    """
    given = np.empty_like(recorded)
    given[list(settled_order(molecule))] = recorded
    centre = _only_centre(molecule)
    if centre is None:
        return _paired(molecule, given, fixed)
    return _superposed(molecule, given[_best_exchange(molecule, centre, given, fixed)], fixed)


def _only_centre(molecule: Molecule) -> int | None:
    """Return the atom that all others are bonded to, ``None`` where there is none."""
    size = len(molecule.atoms)
    for atom in range(size):
        if len(molecule.neighbours(atom)) == size - 1 and size > 2:
            return atom if len(molecule.bonds) == size - 1 else None
    return None


def _best_exchange(molecule: Molecule, centre: int, given: Array, fixed: Array) -> list[int]:
    """Return, for each atom, the recorded atom that stands for it (F1)."""
    choices = _exchanges(molecule, centre)
    atoms = [atom for atom in range(len(molecule.atoms)) if atom != centre]
    wanted = _cosines(fixed, centre)[np.ix_(atoms, atoms)]
    there = _cosines(given, centre)
    found = there[choices[:, atoms, None], choices[:, None, atoms]]
    misfit = ((found - wanted) ** 2).sum(axis=(1, 2))
    return [int(atom) for atom in choices[int(np.argmin(misfit > misfit.min() + 1e-6))]]


def _exchanges(molecule: Molecule, centre: int) -> "np.ndarray[tuple[int, int], np.dtype[np.int_]]":
    """Return every exchange of alike neighbours (k, n), the identity first."""
    alike: dict[int, list[int]] = {}
    for atom in molecule.neighbours(centre):
        alike.setdefault(molecule.classes[atom], []).append(atom)
    sets = list(alike.values())
    rows = []
    for choice in product(*(permutations(group) for group in sets)):
        row = list(range(len(molecule.atoms)))
        for group, taken in zip(sets, choice, strict=True):
            for atom, other in zip(group, taken, strict=True):
                row[atom] = other
        rows.append(row)
        if len(rows) == MOST_EXCHANGES:
            break
    return np.array(rows)


def _cosines(points: Array, centre: int) -> Array:
    vectors = points - points[centre]
    lengths = np.linalg.norm(vectors, axis=1)
    lengths[centre] = 1.0
    units = vectors / lengths[:, None]
    return np.asarray(units @ units.T)


def _paired(molecule: Molecule, given: Array, fixed: Array) -> Array:
    """Return the recorded atoms paired with the nearest alike ones (F2), on ``fixed``."""
    laid = _superposed(molecule, given, fixed)
    gaps = np.linalg.norm(fixed[:, None] - laid[None, :], axis=2)
    classes = np.array(molecule.classes)
    gaps[classes[:, None] != classes[None, :]] = 1e6
    _, order = linear_sum_assignment(gaps)
    bonds = {frozenset((bond.begin, bond.end)) for bond in molecule.bonds}
    moved = {frozenset((int(order[a]), int(order[b]))) for a, b in map(tuple, bonds)}
    if moved != bonds:
        return laid
    return min(laid, _superposed(molecule, given[order], fixed), key=lambda p: _misfit(p, fixed))


def _superposed(molecule: Molecule, given: Array, fixed: Array) -> Array:
    """Return ``given`` turned onto ``fixed``, mirrored where that is allowed and better (F3)."""
    laid = superpose(given, fixed)
    if molecule.tetrahedral_stereo:
        return laid
    mirrored = superpose(given * np.array([-1.0, 1.0, 1.0]), fixed)
    return min(laid, mirrored, key=lambda points: _misfit(points, fixed))


def _misfit(points: Array, fixed: Array) -> float:
    return float(((points - fixed) ** 2).sum())
