"""Conformers in which like arms are turned alike: starts that chance seldom hits.

An arm is an atom that hangs on the rest by one bond and bears end atoms: OH, NH2, CH3. The rest,
the skeleton, has its own symmetry operations; for each of them the arms of one orbit are turned
as its first one is, carried there by the operation. So three hydroxyl groups of phosphoric acid
come to stand as a propeller.
"""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass

import numpy as np

from shapeshelf.geometry.operations import OperationSet, averaged, closed_operations
from shapeshelf.geometry.surroundings import Surroundings
from shapeshelf.geometry.vectors import Array

SKELETON_TOLERANCE_ANGSTROM = 0.3
FLAT_SHARE = 1e-3
"""A skeleton this much thinner than long, in two directions, lies on a line."""
MOST_COPIES = 6
MOST_TURNS = 12


@dataclass(frozen=True, slots=True)
class _Cycle:
    """The powers of one operation: matrices (m, 3, 3) and images of skeleton atoms (m, k)."""

    matrices: Array
    images: np.ndarray


def copied(classes: Sequence[int], known: Surroundings, points: Array) -> list[Array]:
    """Return structures (n, 3) in ångström with like arms turned alike, most operations first.

    ``classes`` tell unlike atoms apart; ``points`` is the structure whose arms are copied.
    """
    arms = _arms(known)
    skeleton = sorted(set(range(len(points))) - {end for ends in arms.values() for end in ends})
    if len(arms) < 2 or len(skeleton) < 3:
        return []
    centre = points[skeleton].mean(axis=0)
    frame = points[skeleton] - centre
    spread = np.linalg.svd(frame, compute_uv=False)
    if spread[1] <= FLAT_SHARE * spread[0]:
        return []
    kinds = np.array([classes[atom] for atom in skeleton])
    group = closed_operations(kinds, frame, SKELETON_TOLERANCE_ANGSTROM)
    cycles = sorted(_cycles(group), key=lambda cycle: -len(cycle.matrices))
    return [_turned_alike(points, centre, skeleton, arms, c) for c in cycles[:MOST_COPIES]]


def _arms(known: Surroundings) -> dict[int, list[int]]:
    """Return the end atoms of each arm, by the atom that bears them."""
    ends = {k for k, around in enumerate(known.neighbours) if len(around) == 1}
    return {
        atom: sorted(ends & set(around))
        for atom, around in enumerate(known.neighbours)
        if len(set(around) - ends) == 1 and ends & set(around) and atom not in known.linear
    }


def _cycles(group: OperationSet) -> Iterator[_Cycle]:
    """Yield the powers of every operation but the identity, each cyclic group once."""
    seen: set[frozenset[bytes]] = set()
    for matrix, images in zip(group.matrices, group.permutations, strict=True):
        powers, moved = [np.eye(3)], [np.arange(len(images))]
        while len(powers) < MOST_TURNS:
            following = matrix @ powers[-1]
            if np.allclose(following, np.eye(3), atol=1e-6):
                break
            powers.append(following)
            moved.append(images[moved[-1]])
        key = frozenset(np.round(power, 4).tobytes() for power in powers)
        if len(powers) > 1 and key not in seen:
            seen.add(key)
            yield _Cycle(np.array(powers), np.array(moved))


def _turned_alike(
    points: Array, centre: Array, skeleton: list[int], arms: dict[int, list[int]], cycle: _Cycle
) -> Array:
    """Return the structure with the skeleton averaged and the arms of each orbit copied."""
    place = {atom: k for k, atom in enumerate(skeleton)}
    new = points - centre
    old = new.copy()
    new[skeleton] = averaged(old[skeleton], cycle.matrices, cycle.images)
    done: set[int] = set()
    for first, ends in arms.items():
        if first in done:
            continue
        for matrix, images in zip(cycle.matrices, cycle.images, strict=True):
            image = skeleton[images[place[first]]]
            if image not in done:
                done.add(image)
                turned = (old[ends] - old[first]) @ matrix.T
                new[arms[image]] = turned + new[image]
    return np.asarray(new + centre)
