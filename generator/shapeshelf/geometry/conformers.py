"""Several conformers of a molecule, each relaxed, and the lowest of them.

Rules A3 and A4 of assembly.py.
"""

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.forces import minimised
from shapeshelf.geometry.ordering import renumbered, settled_order
from shapeshelf.geometry.surroundings import Surroundings
from shapeshelf.geometry.targets import bounds_of, terms_of
from shapeshelf.geometry.torsions import Turn, turns_of
from shapeshelf.geometry.vectors import Array, torsion_degrees
from shapeshelf.structure.embedding import embed, relax_mmff
from shapeshelf.structure.molecule import Molecule

SEED = 20050
FIRST_STEPS = 120
LAST_STEPS = 600
KEPT_TORSION_HEIGHT = 30.0
SAME_ENERGY = 1e-3


@dataclass(frozen=True, slots=True)
class Conformers:
    """The lowest conformer (n, 3) in ångström, in the molecule's order, and how it was found."""

    best: Array
    method: str
    tried: int


def by_force_field(molecule: Molecule, known: Surroundings) -> Conformers:
    """Return the lowest MMFF94s conformer with its lengths and angles brought to the targets."""
    order = settled_order(molecule)
    settled = renumbered(molecule, order)
    relaxed = [relax_mmff(settled, start) for start in embed(settled, _count(molecule), SEED)]
    lowest = _lowest(np.array([energy for _, energy in relaxed]))
    points = _in_given_order(relaxed[lowest][0], order)
    terms = terms_of(molecule, known, _kept_turns(known, points), guarded=False)
    refined, _ = minimised(terms, points[None], LAST_STEPS)
    method = "lowest MMFF94s conformer, lengths and angles of the domain model"
    return Conformers(refined[0], method, len(relaxed))


def by_rules(molecule: Molecule, known: Surroundings) -> Conformers:
    """Return the lowest conformer under our own lengths, angles, contacts and torsion rules."""
    order = settled_order(molecule)
    settled = renumbered(molecule, order)
    bounds = bounds_of(molecule, known)
    starts = np.array(embed(settled, _count(molecule), SEED, _settled_bounds(bounds, order)))
    given = np.stack([_in_given_order(start, order) for start in starts])
    terms = terms_of(molecule, known, turns_of(known))
    rough, energies = minimised(terms, given, FIRST_STEPS, slope=0.05)
    if not np.isfinite(energies).all():
        raise AnalysisError(molecule.formula, "no three-dimensional structure fits the distances")
    few = rough[np.argsort(energies, kind="stable")[:2]]
    final, energies = minimised(terms, few, LAST_STEPS)
    method = "domain-model angles and bond lengths assembled by distance geometry"
    return Conformers(final[_lowest(energies)], method, len(starts))


def _count(molecule: Molecule) -> int:
    """Return how many conformers to try: more for a molecule with more single bonds to turn."""
    degree = [len(molecule.neighbours(atom)) for atom in range(len(molecule.atoms))]
    turning = sum(1 for bond in molecule.bonds if min(degree[bond.begin], degree[bond.end]) > 1)
    return int(np.clip(4 + 2 * turning, 6, 12))


def _lowest(energies: Array) -> int:
    """Return the first conformer that is as low as the lowest."""
    return int(np.argmax(energies <= energies.min() + SAME_ENERGY))


def _in_given_order(points: Array, order: tuple[int, ...]) -> Array:
    given = np.empty_like(points)
    given[list(order)] = points
    return given


def _settled_bounds(bounds: Array, order: tuple[int, ...]) -> Array:
    """Return bounds in the settled order, upper ones again above the diagonal."""
    rows = np.array(order)
    upper = (np.triu(bounds, 1) + np.triu(bounds, 1).T)[np.ix_(rows, rows)]
    lower = (np.tril(bounds, -1) + np.tril(bounds, -1).T)[np.ix_(rows, rows)]
    return np.asarray(np.triu(upper, 1) + np.tril(lower, -1))


def _kept_turns(known: Surroundings, points: Array) -> Sequence[Turn]:
    """Return terms that hold every torsion about a bond where it is."""
    turns = []
    for b, c in known.orders:
        for a in known.neighbours[b]:
            for d in known.neighbours[c]:
                if len({a, b, c, d}) == 4 and not {b, c} & known.linear:
                    angle = torsion_degrees(*points[[a, b, c, d]])
                    turns.append(Turn((a, b, c, d), KEPT_TORSION_HEIGHT, 1, angle))
    return turns
