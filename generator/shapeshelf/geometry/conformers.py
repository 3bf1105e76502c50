"""Several conformers of a molecule, each relaxed, and the lowest of them.

Rules A3 and A4 of assembly.py.
"""

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.choosing import (
    FORCE_FIELD_ERROR_KCAL_MOL,
    RULE_ERROR,
    most_symmetric,
)
from shapeshelf.geometry.copying import copied
from shapeshelf.geometry.finishing import finished
from shapeshelf.geometry.forces import minimised, settled_down
from shapeshelf.geometry.ordering import renumbered, settled_order
from shapeshelf.geometry.rotors import scanned, turning_bonds
from shapeshelf.geometry.surroundings import MULTIPLE_ORDER, Surroundings, joined_without
from shapeshelf.geometry.targets import bounds_of, terms_of
from shapeshelf.geometry.torsions import turns_of
from shapeshelf.geometry.vectors import Array
from shapeshelf.structure.embedding import embed, mmff_relaxer
from shapeshelf.structure.molecule import Molecule

SEED = 20050
FIRST_STEPS = 200
FIRST_SLOPE = 0.01
LEAST_TRIES = 2
MOST_TRIES = ((12, 12), (20, 8), (40, 6), (70, 6), (100, 2), (1000, 1))
"""Up to so many atoms, so many conformers at most: a structure has to come while one waits."""
MOST_FOR_SCAN = 40
MOST_SETTLED = 3
SHAKE_ANGSTROM = 0.03
ROUGHLY_SAME_ENERGY = 0.02


@dataclass(frozen=True, slots=True)
class Conformers:
    """The lowest conformer (n, 3) in ångström, in the molecule's order, and how it was found."""

    best: Array
    method: str
    tried: int


def by_force_field(molecule: Molecule, known: Surroundings) -> Conformers:
    """Return the lowest MMFF94s conformer, the most symmetric of those that are as low."""
    order = settled_order(molecule)
    settled = renumbered(molecule, order)
    relax_settled = mmff_relaxer(settled)

    def relax(points: Array) -> tuple[Array, float]:
        moved, energy = relax_settled(points[list(order)])
        return _in_given_order(moved, order), energy

    bonds = turning_bonds(molecule.classes, known)
    # Turning the bonds of the best one finds most others, so half as many starts do.
    starts = embed(settled, _count(molecule, known, len(bonds) // 2), SEED)
    relaxed = [relax(_in_given_order(start, order)) for start in starts]
    if len(molecule.atoms) <= MOST_FOR_SCAN:
        lowest = min(relaxed, key=lambda one: one[1])
        relaxed += scanned(lowest, _in_order(bonds, order), known, relax)
    best = most_symmetric(
        _elements(molecule),
        relaxed,
        relax,
        FORCE_FIELD_ERROR_KCAL_MOL,
        lambda points: _shaken(points, order),
        lambda points: copied(molecule.classes, known, points),
    )
    return Conformers(finished(molecule, known, best), "lowest MMFF94s conformer", len(relaxed))


def by_rules(molecule: Molecule, known: Surroundings) -> Conformers:
    """Return the lowest conformer under our own lengths, angles, contacts and torsion rules."""
    order = settled_order(molecule)
    bounds = _settled_bounds(bounds_of(molecule, known), order)
    count = _count(molecule, known, 4 * len(turning_bonds(molecule.classes, known)))
    starts = embed(renumbered(molecule, order), count, SEED, bounds)
    given = np.stack([_in_given_order(start, order) for start in starts])
    terms = terms_of(molecule, known, turns_of(known))
    rough, energies = minimised(terms, given, FIRST_STEPS, FIRST_SLOPE)
    if not np.isfinite(energies).all():
        raise AnalysisError(molecule.formula, "no three-dimensional structure fits the distances")

    def relax(points: Array) -> tuple[Array, float]:
        return settled_down(terms, points)

    few = [relax(rough[k]) for k in _lowest_distinct(energies)]
    best = most_symmetric(
        _elements(molecule),
        few,
        relax,
        RULE_ERROR,
        lambda points: _shaken(points, order),
        lambda points: copied(molecule.classes, known, points),
    )
    return Conformers(best, "domain-model angles and bond lengths assembled", len(starts))


def _shaken(points: Array, order: tuple[int, ...]) -> Array:
    """Return the structure a little shaken, so that it does not rest on a saddle."""
    noise = np.random.default_rng(SEED).normal(scale=SHAKE_ANGSTROM, size=points.shape)
    return np.asarray(points + _in_given_order(noise, order))


def _elements(molecule: Molecule) -> list[str]:
    return [atom.element for atom in molecule.atoms]


def _lowest_distinct(energies: Array) -> list[int]:
    """Return the lowest of the roughly relaxed conformers, no two of one energy."""
    kept: list[int] = []
    for k in np.argsort(energies, kind="stable"):
        if all(energies[k] - energies[other] > ROUGHLY_SAME_ENERGY for other in kept):
            kept.append(int(k))
    return kept[:MOST_SETTLED]


def _count(molecule: Molecule, known: Surroundings, turning: int) -> int:
    """Return how many random starts: more for more bonds to turn or rings to fold."""
    folding = sum(
        1
        for (b, c), order in known.orders.items()
        if order < MULTIPLE_ORDER and joined_without(known, b, c)
    )
    most = next(tries for size, tries in MOST_TRIES if len(molecule.atoms) <= size)
    return min(LEAST_TRIES + turning + folding, most)


def _in_order(bonds: Sequence[tuple[int, int]], order: tuple[int, ...]) -> list[tuple[int, int]]:
    """Return the bonds, and the ends of each, as they stand in the settled order."""
    place = {atom: k for k, atom in enumerate(order)}
    sided = [bond if place[bond[0]] < place[bond[1]] else bond[::-1] for bond in bonds]
    return sorted(sided, key=lambda bond: (place[bond[0]], place[bond[1]]))


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
