"""Single bonds that turn, and the conformers that turning them gives.

Random starts may miss the lowest conformer of a chain; turning one bond after the other of the
best one by a third of a circle, either way, finds the neighbours it is usually among.
"""

from collections.abc import Callable, Iterator, Sequence

import numpy as np

from shapeshelf.geometry.surroundings import MULTIPLE_ORDER, Surroundings, joined_without
from shapeshelf.geometry.vectors import Array, rotation_about

Relaxed = tuple[Array, float]
TURNS_DEGREES = (120.0, -120.0)
MOST_SCANNED = 4
RING_SIZE = 12
"""Rings of more atoms than this turn like chains."""


def turning_bonds(classes: Sequence[int], known: Surroundings) -> tuple[tuple[int, int], ...]:
    """Return the single bonds outside rings whose turning makes another conformer.

    An end of three like atoms (methyl) makes none. ``classes`` holds one number an atom, equal
    for atoms that are alike.
    """
    return tuple(
        (b, c)
        for (b, c), order in known.orders.items()
        if min(len(known.neighbours[b]), len(known.neighbours[c])) > 1
        and order < MULTIPLE_ORDER
        and not {b, c} & known.linear
        and not joined_without(known, b, c, within=RING_SIZE)
        and not (_is_top(classes, known, b, c) or _is_top(classes, known, c, b))
    )


def scanned(
    best: Relaxed,
    bonds: Sequence[tuple[int, int]],
    known: Surroundings,
    relax: Callable[[Array], Relaxed],
) -> Iterator[Relaxed]:
    """Yield the conformers met while each bond of the best one is turned, relaxed.

    Each bond is turned in the lowest conformer so far.
    """
    for b, c in bonds[:MOST_SCANNED]:
        start = best[0]
        for degrees in TURNS_DEGREES:
            found = relax(_turned(start, b, c, known, degrees))
            if found[1] < best[1]:
                best = found
            yield found


def _is_top(classes: Sequence[int], known: Surroundings, atom: int, axis: int) -> bool:
    """Return whether ``atom`` holds three like neighbours beside ``axis``."""
    others = [classes[k] for k in known.neighbours[atom] if k != axis]
    return len(others) == 3 and len(set(others)) == 1


def _turned(points: Array, b: int, c: int, known: Surroundings, degrees: float) -> Array:
    """Return the structure with everything beyond c turned about the bond b-c."""
    beyond = sorted(_beyond(known, b, c))
    turn = rotation_about(points[c] - points[b], degrees)
    moved = points.copy()
    moved[beyond] = (points[beyond] - points[c]) @ turn.T + points[c]
    return np.asarray(moved)


def _beyond(known: Surroundings, b: int, c: int) -> set[int]:
    """Return the atoms on the far side of the bond, c among them."""
    reached, front = {b, c}, {c}
    while front:
        front = {k for atom in front for k in known.neighbours[atom]} - reached
        reached |= front
    return reached - {b}
