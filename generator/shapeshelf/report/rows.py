"""Angles and lengths of a molecule, gathered into rows of equivalent ones.

* E1  Two angles (or bonds) share a row where an operation of the point group carries one onto
  the other.
* E2  So do two of the same label that the domain model cannot tell apart, and that the structure
  shows less than ``ALIKE_DEGREES`` apart: the hydrogens of a methyl group differ only by a
  rotation that is free.
* E3  Ligands are alike as seen from their centre where the bond graph gives them one class and
  they make the same angles there.
* E4  Rows of one label that stay apart: the smallest angle keeps the bare label, an angle whose
  ideal is straight is marked ``(trans)``, any other ``(far)``.
"""

from collections import defaultdict
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, replace
from itertools import combinations
from typing import TypeVar

from shapeshelf.domains.model import Centre
from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.vectors import angle_degrees, distance
from shapeshelf.report.labels import angle_label
from shapeshelf.structure.molecule import Molecule, Vector

ALIKE_DEGREES = 4.0
"""What a conformation does to angles that rotation makes equal (common practice, no source)."""
SAME_TO_MODEL_DEGREES = 0.5
ALIKE_ANGSTROM = 0.01
STRAIGHT_DEGREES = 150.0

Triple = tuple[int, int, int]
Item = TypeVar("Item", bound=tuple[int, ...])


@dataclass(frozen=True, slots=True)
class AngleSet:
    """Equivalent angles at one centre and their mean."""

    of: str
    members: tuple[Triple, ...]
    mean_degrees: float
    domain_degrees: float
    """What the domain model alone says; the mean where it says nothing."""


@dataclass(frozen=True, slots=True)
class BondSet:
    """Equivalent bonds and their mean length."""

    of: str
    members: tuple[int, ...]
    """Indices into the molecule's bonds."""
    mean_angstrom: float


def ligand_sets(
    molecule: Molecule, centre: Centre, symmetry: Symmetry
) -> tuple[frozenset[int], ...]:
    """Return the neighbours of ``centre`` in sets of alike ones (rules E1 and E3)."""
    merged: dict[object, set[int]] = {}
    for group in _orbits_of_neighbours(molecule, centre, symmetry):
        merged.setdefault(_outlook(molecule, centre, min(group)), set()).update(group)
    return tuple(sorted((frozenset(group) for group in merged.values()), key=min))


def angle_sets(
    centre: Centre,
    centre_name: str,
    names: Mapping[int, str],
    symmetry: Symmetry,
    coordinates: Sequence[Vector],
) -> tuple[AngleSet, ...]:
    """Return the rows of angles at ``centre``, widest first within a label."""
    neighbours = [d.neighbour for d in centre.domains if d.neighbour is not None]
    triples = [(first, centre.atom, last) for first, last in combinations(neighbours, 2)]
    alone = {frozenset((a.atoms[0], a.atoms[2])): a.model_degrees for a in centre.angles}
    sets = []
    for members in _orbits(triples, symmetry):
        first, _, last = members[0]
        mean = _mean(angle_degrees(*(coordinates[atom] for atom in one)) for one in members)
        label = angle_label(names, centre_name, first, last)
        domain = alone.get(frozenset((first, last)), mean)
        sets.append(AngleSet(label, tuple(members), mean, domain))
    return tuple(_distinct_labels(_merge_alike(sets)))


def bond_sets(
    molecule: Molecule,
    labels: Sequence[str],
    symmetry: Symmetry,
    coordinates: Sequence[Vector],
) -> tuple[BondSet, ...]:
    """Return the rows of bonds; ``labels`` gives the printed label of each bond."""
    pairs = [tuple(sorted((bond.begin, bond.end))) for bond in molecule.bonds]
    number = {pair: index for index, pair in enumerate(pairs)}
    gathered: dict[str, list[BondSet]] = defaultdict(list)
    for orbit in _orbits(pairs, symmetry):
        members = tuple(number[pair] for pair in orbit)
        mean = _mean(distance(coordinates[a], coordinates[b]) for a, b in orbit)
        label = labels[members[0]]
        gathered[label].append(BondSet(label, members, mean))
    return tuple(row for rows in gathered.values() for row in _merge_bonds(rows))


def _orbits_of_neighbours(molecule: Molecule, centre: Centre, symmetry: Symmetry) -> list[set[int]]:
    singles = [(atom,) for atom in molecule.neighbours(centre.atom)]
    fixing = [op for op in symmetry.operations if op.permutation[centre.atom] == centre.atom]
    return [
        {atom for (atom,) in orbit}
        for orbit in _orbits(singles, replace(symmetry, operations=tuple(fixing)))
    ]


def _outlook(molecule: Molecule, centre: Centre, neighbour: int) -> object:
    """Return what the centre sees of a neighbour: its class, and the angles it makes."""
    angles = sorted(
        (
            molecule.classes[angle.atoms[2] if angle.atoms[0] == neighbour else angle.atoms[0]],
            round(angle.model_degrees),
        )
        for angle in centre.angles
        if neighbour in (angle.atoms[0], angle.atoms[2])
    )
    return molecule.classes[neighbour], tuple(angles)


def _orbits(items: Sequence[Item], symmetry: Symmetry) -> list[list[Item]]:
    """Return the items in sets that the operations carry onto one another, read either way."""
    waiting = dict.fromkeys(items)
    orbits = []
    while waiting:
        seed = next(iter(waiting))
        images = {
            tuple(operation.permutation[atom] for atom in seed) for operation in symmetry.operations
        } | {seed}
        orbit = [item for item in waiting if item in images or item[::-1] in images]
        orbits.append(orbit)
        for item in orbit:
            del waiting[item]
    return orbits


def _merge_alike(sets: Iterable[AngleSet]) -> list[AngleSet]:
    merged: list[AngleSet] = []
    for row in sorted(sets, key=lambda row: (row.of, row.mean_degrees)):
        if merged and _alike(merged[-1], row):
            merged[-1] = _joined(merged[-1], row)
        else:
            merged.append(row)
    return merged


def _alike(left: AngleSet, right: AngleSet) -> bool:
    return (
        left.of == right.of
        and abs(left.domain_degrees - right.domain_degrees) <= SAME_TO_MODEL_DEGREES
        and abs(left.mean_degrees - right.mean_degrees) <= ALIKE_DEGREES
    )


def _joined(left: AngleSet, right: AngleSet) -> AngleSet:
    members = left.members + right.members
    total = left.mean_degrees * len(left.members) + right.mean_degrees * len(right.members)
    return replace(left, members=tuple(sorted(members)), mean_degrees=total / len(members))


def _distinct_labels(sets: Sequence[AngleSet]) -> list[AngleSet]:
    taken: set[str] = set()
    named = []
    for row in sets:
        label, ordinal = row.of, 2
        if label in taken:
            label += " (trans)" if row.mean_degrees >= STRAIGHT_DEGREES else " (far)"
        base = label
        while label in taken:
            label, ordinal = f"{base[:-1]} {ordinal})", ordinal + 1
        taken.add(label)
        named.append(replace(row, of=label))
    return named


def _merge_bonds(rows: Sequence[BondSet]) -> list[BondSet]:
    merged: list[BondSet] = []
    for row in sorted(rows, key=lambda row: row.mean_angstrom):
        if merged and row.mean_angstrom - merged[-1].mean_angstrom <= ALIKE_ANGSTROM:
            last = merged[-1]
            members = tuple(sorted(last.members + row.members))
            weights = (len(last.members), len(row.members))
            mean = (last.mean_angstrom * weights[0] + row.mean_angstrom * weights[1]) / sum(weights)
            merged[-1] = BondSet(last.of, members, mean)
        else:
            merged.append(row)
    return merged


def _mean(values: Iterable[float]) -> float:
    held = list(values)
    return sum(held) / len(held)
