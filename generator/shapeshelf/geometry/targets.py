"""The terms of one molecule: lengths and angles as distances, planes, contacts, torsions."""

from collections.abc import Sequence

import numpy as np
from numpy.typing import NDArray

from shapeshelf.geometry.forces import Terms
from shapeshelf.geometry.surroundings import (
    FLAT_SUM_DEGREES,
    LINEAR_DEGREES,
    Surroundings,
    joined_without,
)
from shapeshelf.geometry.torsions import Turn
from shapeshelf.geometry.vectors import Array
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule, TetrahedralStereo

BOND_STIFFNESS = 600.0
ANGLE_STIFFNESS = 80.0
CONTACT_STIFFNESS = 4.0
SOFT_REPULSION = 0.5
VAN_DER_WAALS_STEP_ANGSTROM = 0.8
"""A van der Waals radius is about the single-bond radius and 0.80 Å: L. Pauling, The Nature of
the Chemical Bond, 3rd ed. (1960), recalled from memory."""
CONTACT_SHARE = 0.85
"""Atoms of one molecule come closer than van der Waals radii say (common practice, no source)."""
UNKNOWN_RADIUS_ANGSTROM = 1.5
TETRAHEDRAL_VOLUME = 0.77
"""v1 . v2 x v3 of three unit vectors at tetrahedral angles: 4/(3 sqrt 3)."""


def terms_of(
    molecule: Molecule, known: Surroundings, turns: Sequence[Turn], guarded: bool = True
) -> Terms:
    """Return all terms; without contacts, soft repulsion and stereo volumes if not ``guarded``."""
    stiffness, goal = _distances(known)
    bonded = stiffness > 0
    soft = np.zeros_like(goal)
    if guarded:
        free = _far_pairs(known)
        goal = np.where(free, CONTACT_SHARE * _touching(molecule), goal).astype(np.float64)
        stiffness = np.where(free, CONTACT_STIFFNESS, stiffness)
        soft = np.asarray(SOFT_REPULSION * free, dtype=np.float64)
    lines = _lines(known)
    volumes, volume_goals = _volumes(molecule, known)
    return Terms(
        stiffness=stiffness,
        goal_angstrom=goal,
        contact=~bonded,
        soft=soft,
        lines=np.array(lines, dtype=np.int64).reshape(-1, 3),
        line_lengths=np.array(
            [(known.length(a, b), known.length(c, b)) for a, b, c in lines]
        ).reshape(-1, 2),
        volumes=np.array(volumes, dtype=np.int64).reshape(-1, 4),
        volume_lengths=np.array(
            [[known.length(row[0], k) for k in row[1:]] for row in volumes]
        ).reshape(-1, 3),
        volume_goals=np.array(volume_goals, dtype=float),
        torsions=np.array([turn.atoms for turn in turns], dtype=np.int64).reshape(-1, 4),
        torsion_heights=np.array([turn.height for turn in turns]),
        torsion_folds=np.array([float(turn.fold) for turn in turns]),
        torsion_minima_degrees=np.array([turn.minimum_degrees for turn in turns]),
    )


def bounds_of(molecule: Molecule, known: Surroundings) -> Array:
    """Return distance bounds (n, n) in ångström, upper above the diagonal and lower below it.

    Rings may close at angles far from the targets, so next neighbours get some room.
    """
    stiffness, goal = _distances(known)
    total = sum(known.lengths.values())
    upper = np.full(goal.shape, max(total, 4.0))
    lower = np.minimum(0.8 * CONTACT_SHARE * _touching(molecule), 2.5)
    near = stiffness > 0
    room = np.where(stiffness >= BOND_STIFFNESS, 0.01, np.where(_ring_pairs(known), 0.35, 0.06))
    upper = np.where(near, goal + room, upper)
    lower = np.where(near, np.maximum(goal - 2 * room, 0.8), lower)
    bounds = np.triu(upper, 1) + np.tril(lower, -1)
    np.fill_diagonal(bounds, 0.0)
    return bounds


def _distances(known: Surroundings) -> tuple[Array, Array]:
    """Return force constants and targets (n, n) of bonds and of next neighbours."""
    count = len(known.neighbours)
    stiffness, paths = np.zeros((count, count)), np.zeros((count, count))
    goal = np.zeros((count, count))
    for (a, b, c), degrees in known.angles.items():
        goal[a, c] += opposite_side(known.length(a, b), known.length(b, c), degrees)
        paths[a, c] += 1
    goal /= np.maximum(paths, 1.0)
    stiffness[paths > 0] = ANGLE_STIFFNESS
    for (a, b), length in known.lengths.items():
        goal[a, b] = goal[b, a] = length
        stiffness[a, b] = stiffness[b, a] = BOND_STIFFNESS
    return stiffness, goal


def opposite_side(first: float, second: float, degrees: float) -> float:
    """Return the side opposite an angle between two sides, all lengths in one unit."""
    cosine = float(np.cos(np.radians(degrees)))
    return float(np.sqrt(first**2 + second**2 - 2 * first * second * cosine))


def _far_pairs(known: Surroundings) -> NDArray[np.bool_]:
    """Return where (n, n) two atoms are neither bonded nor share a neighbour."""
    count = len(known.neighbours)
    bonded = np.eye(count, dtype=bool)
    for a, b in known.lengths:
        bonded[a, b] = bonded[b, a] = True
    near = bonded.astype(float) @ bonded.astype(float) > 0
    return np.asarray(~near)


def _touching(molecule: Molecule) -> Array:
    """Return sums (n, n) of van der Waals radii in ångström."""
    radii = [
        (ELEMENTS[atom.element].single_radius_angstrom or UNKNOWN_RADIUS_ANGSTROM)
        + VAN_DER_WAALS_STEP_ANGSTROM
        for atom in molecule.atoms
    ]
    return np.asarray(np.add.outer(radii, radii))


def _ring_pairs(known: Surroundings) -> NDArray[np.bool_]:
    """Return which pairs (n, n) of next neighbours are next neighbours by two paths or close."""
    count = len(known.neighbours)
    pairs = np.zeros((count, count), dtype=bool)
    for a, b, c in known.angles:
        pairs[a, c] = pairs[a, c] or joined_without(known, a, c, b)
    return pairs


def _lines(known: Surroundings) -> list[tuple[int, int, int]]:
    return [
        (a, b, c)
        for (a, b, c), degrees in known.angles.items()
        if a < c and degrees > LINEAR_DEGREES
    ]


def _volumes(
    molecule: Molecule, known: Surroundings
) -> tuple[list[tuple[int, int, int, int]], list[float]]:
    """Return planar centres with volume zero and stereogenic ones with a signed volume."""
    rows, goals = [], []
    for centre, ends in enumerate(known.neighbours):
        if len(ends) == 3 and _angle_sum(known, centre) > FLAT_SUM_DEGREES:
            rows.append((centre, ends[0], ends[1], ends[2]))
            goals.append(0.0)
    for stereo in molecule.tetrahedral_stereo:
        first, second, third = stereo.neighbours[:3]
        rows.append((stereo.atom, first, second, third))
        goals.append(TETRAHEDRAL_VOLUME * handedness(stereo))
    return rows, goals


def handedness(stereo: TetrahedralStereo) -> float:
    """Return the sign of v1 . v2 x v3 of the first three neighbours.

    Seen from the first the others turn clockwise, a lone pair counting as the last of them; that
    last one stands opposite the other three.
    """
    return -1.0 if stereo.clockwise else 1.0


def _angle_sum(known: Surroundings, centre: int) -> float:
    a, b, c = known.neighbours[centre]
    pairs = ((a, b), (b, c), (a, c))
    return sum(known.angles.get((x, centre, y), 0.0) for x, y in pairs)
