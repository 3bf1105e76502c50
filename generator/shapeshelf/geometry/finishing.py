"""What the force field leaves undone, or does against the electron count: the count governs.

F1  Bonds of equal order between like atoms have one length, and like angles at their ends one
    size: MMFF94s localises the double bonds of cyclopentadienide, azulene, squarate.
F2  A centre that the electron domains make a pyramid stays one: MMFF94s flattens aniline.
F3  The ends of a straight chain are aligned across it (torsions.py, T5): MMFF94s has no force
    there.

Everything else is held as the force field has it: lengths, angles, torsions.
"""

from collections import defaultdict
from collections.abc import Callable, Collection, Hashable, Mapping
from dataclasses import dataclass, replace
from typing import TypeVar

import numpy as np

from shapeshelf.geometry.forces import settled_down
from shapeshelf.geometry.surroundings import FLAT_SUM_DEGREES, Surroundings
from shapeshelf.geometry.targets import terms_of
from shapeshelf.geometry.torsions import Turn, chain_turns
from shapeshelf.geometry.vectors import Array, angle_degrees, distance, torsion_degrees, unit
from shapeshelf.structure.molecule import Molecule

UNEVEN_ANGSTROM = 0.015
"""Like bonds differ by less in the two halves of a conformer, by far more where localised."""
KEPT_TORSION_HEIGHT = 30.0
PRESSED_ANGSTROM = 0.25
"""How far a flattened centre is first moved out of its plane; it then settles by itself."""

Key = TypeVar("Key")


@dataclass(frozen=True, slots=True)
class _Contradiction:
    """What the force field got wrong: ends of uneven bonds, and flattened centres."""

    uneven: frozenset[int]
    flattened: tuple[int, ...]


def finished(molecule: Molecule, known: Surroundings, points: Array) -> Array:
    """Return the structure (n, 3) in ångström put right by F1 to F3, else ``points``."""
    wrong = _contradiction(molecule, known, points)
    chains = chain_turns(known)
    if not (wrong.uneven or wrong.flattened or chains):
        return points
    goal = _goal(molecule, known, points, wrong)
    turns = (*_kept_turns(known, points, wrong.flattened), *chains)
    terms = terms_of(molecule, goal, turns, guarded=False)
    return settled_down(terms, _pressed(known, points, wrong.flattened))[0]


def _measured(known: Surroundings, points: Array) -> Surroundings:
    """Return ``known`` with the lengths and angles of a structure for targets."""
    return replace(
        known,
        angles={abc: angle_degrees(*points[list(abc)]) for abc in known.angles},
        lengths={(a, b): distance(points[a], points[b]) for a, b in known.lengths},
    )


def _kept_turns(known: Surroundings, points: Array, barred: Collection[int]) -> tuple[Turn, ...]:
    """Return terms that hold the torsions where they are, but about bonds of ``barred`` atoms."""
    turns = []
    for b, c in known.orders:
        if {b, c} & (known.linear | set(barred)):
            continue
        for a in known.neighbours[b]:
            for d in known.neighbours[c]:
                if len({a, b, c, d}) == 4:
                    angle = torsion_degrees(*points[[a, b, c, d]])
                    turns.append(Turn((a, b, c, d), KEPT_TORSION_HEIGHT, 1, angle))
    return tuple(turns)


def _contradiction(molecule: Molecule, known: Surroundings, points: Array) -> _Contradiction:
    alike = defaultdict(list)
    for bond in known.orders:
        if "H" not in (known.elements[bond[0]], known.elements[bond[1]]):
            alike[_bond_kind(molecule, known, bond)].append(bond)
    uneven = {
        atom
        for bonds in alike.values()
        if np.ptp([distance(points[a], points[b]) for a, b in bonds]) > UNEVEN_ANGSTROM
        for bond in bonds
        for atom in bond
    }
    pyramids = [
        (atom, ends)
        for atom, ends in enumerate(known.neighbours)
        if len(ends) == 3 and _angle_sum(known.angles, atom, ends) < FLAT_SUM_DEGREES
    ]
    found = _measured(known, points).angles if pyramids else {}
    flattened = tuple(
        atom for atom, ends in pyramids if _angle_sum(found, atom, ends) > FLAT_SUM_DEGREES
    )
    return _Contradiction(frozenset(uneven), flattened)


def _goal(
    molecule: Molecule, known: Surroundings, points: Array, wrong: _Contradiction
) -> Surroundings:
    """Return the structure's own lengths and angles, with those that were wrong replaced."""
    found = _measured(known, points)
    lengths = _levelled(
        found.lengths,
        lambda bond: _bond_kind(molecule, known, bond) if set(bond) <= wrong.uneven else None,
    )
    angles = _levelled(
        found.angles,
        lambda abc: _angle_kind(molecule, abc) if abc[1] in wrong.uneven else None,
    )
    own = {abc: known.angles[abc] for abc in angles if abc[1] in wrong.flattened}
    return replace(found, lengths=lengths, angles={**angles, **own})


def _levelled(
    values: Mapping[Key, float], kind: Callable[[Key], Hashable | None]
) -> dict[Key, float]:
    """Return the values, each the mean of its kind; ``None`` is of no kind and stays."""
    kinds = {key: kind(key) for key in values}
    gathered: defaultdict[Hashable, list[float]] = defaultdict(list)
    for key, value in values.items():
        gathered[kinds[key]].append(value)
    return {
        key: value if kinds[key] is None else float(np.mean(gathered[kinds[key]]))
        for key, value in values.items()
    }


def _bond_kind(molecule: Molecule, known: Surroundings, bond: tuple[int, int]) -> Hashable:
    ends = sorted(molecule.classes[atom] for atom in bond)
    return (*ends, round(known.orders[bond], 2))


def _angle_kind(molecule: Molecule, abc: tuple[int, int, int]) -> Hashable:
    first, last = sorted((molecule.classes[abc[0]], molecule.classes[abc[2]]))
    return (first, molecule.classes[abc[1]], last)


def _angle_sum(
    angles: Mapping[tuple[int, int, int], float], atom: int, ends: tuple[int, ...]
) -> float:
    a, b, c = ends
    return sum(angles.get((x, atom, y), 0.0) for x, y in ((a, b), (b, c), (a, c)))


def _pressed(known: Surroundings, points: Array, flattened: tuple[int, ...]) -> Array:
    """Move flattened centres out of their planes, all to the side of the first."""
    moved = points.copy()
    side = np.zeros(3)
    for atom in flattened:
        a, b, c = (points[k] for k in known.neighbours[atom])
        normal = unit(np.cross(b - a, c - a))
        side = side if side.any() else normal
        moved[atom] += PRESSED_ANGSTROM * (1.0 if normal @ side >= 0 else -1.0) * normal
    return moved
