"""Where an optimisation starts: the domain model's angles, with GFN2-xTB's bond lengths.

S1  One start for the best placement, one for every other that the model ranks close behind it.
S2  GFN2-xTB's own angles are not used: at hypervalent centres they may lie in another basin.
    Bonds that belong to no ring are stretched along themselves, all angles kept, until the
    GFN2-xTB energy is lowest.
S3  Every atom is moved a little, the same way every time, so that no symmetry keeps the
    optimisation on a saddle.
"""

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from scipy.optimize import minimize

from shapeshelf.calculation.model import System
from shapeshelf.calculation.units import BOHR_ANGSTROM
from shapeshelf.calculation.xtb import evaluate
from shapeshelf.domains.bond_lengths import bond_length_angstrom
from shapeshelf.domains.model import Centre, LewisCount, Placement
from shapeshelf.geometry.model import Structure, StructureBasis
from shapeshelf.geometry.vectors import Array
from shapeshelf.structure.molecule import Molecule

CLOSE = 0.06
"""How far above the best placement, in the domain model's units, one is still calculated."""
MOST_PLACEMENTS = 3
SHAKE_BOHR = 0.02
SEED = 2005
SITE_WORDS = {"ax": "axial", "ap": "apical"}
STRETCH_LIMIT = 0.25
"""Largest change of a bond, as a share of the model's length."""


@dataclass(frozen=True, slots=True)
class Start:
    """One structure to optimise from."""

    shape: str
    sites: str
    """Who stands on the sites that are named apart."""
    model_energy: float
    """Above the best placement."""
    coordinates: Array
    """(n, 3) in bohr."""


def starts_of(
    molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre], structure: Structure
) -> tuple[Start, ...]:
    """Return the starts (S1), the assembled structure first. Only one centre has several."""
    assembled = np.array(structure.coordinates_angstrom) / BOHR_ANGSTROM
    placements = centres[0].placements if len(centres) == 1 else ()
    if not placements or structure.basis is not StructureBasis.MODEL:
        return (Start("", "", 0.0, assembled),)
    best = placements[0].energy
    close = [p for p in placements[1:] if p.energy - best <= CLOSE][: MOST_PLACEMENTS - 1]
    first = Start(placements[0].shape, _sites(molecule, centres[0], placements[0]), 0.0, assembled)
    return (first, *(_start(molecule, lewis, centres[0], p, p.energy - best) for p in close))


def with_fitted_lengths(molecule: Molecule, system: System, coordinates: Array) -> Array:
    """Return coordinates (n, 3) in bohr with the bond lengths of lowest GFN2-xTB energy (S2)."""
    moves = _stretches(molecule, coordinates)
    if not moves:
        return coordinates
    directions = np.array([direction for direction, _ in moves])
    limits = [(-STRETCH_LIMIT * length, STRETCH_LIMIT * length) for _, length in moves]

    def energy(lengths: Array) -> tuple[float, Array]:
        point = evaluate(system, coordinates + np.tensordot(lengths, directions, 1))
        return point.energy, np.tensordot(directions, point.gradient, 2)

    found = minimize(energy, np.zeros(len(moves)), jac=True, method="L-BFGS-B", bounds=limits)
    return np.asarray(coordinates + np.tensordot(found.x, directions, 1))


def shaken(coordinates: Array) -> Array:
    """Return coordinates (n, 3) in bohr, every atom moved a little (S3)."""
    generator = np.random.default_rng(SEED)
    return np.asarray(coordinates + SHAKE_BOHR * generator.uniform(-1, 1, coordinates.shape))


def _start(
    molecule: Molecule, lewis: LewisCount, centre: Centre, placement: Placement, above: float
) -> Start:
    points = _placed(molecule, lewis, centre, placement)
    return Start(placement.shape, _sites(molecule, centre, placement), above, points)


def _sites(molecule: Molecule, centre: Centre, placement: Placement) -> str:
    """Return who stands axially or apically, alphabetically, lone pairs and electrons last."""
    for site, word in SITE_WORDS.items():
        held = [
            molecule.atoms[domain.neighbour].element
            if domain.neighbour is not None
            else domain.kind.value
            for domain, one in zip(centre.domains, placement.sites, strict=True)
            if one == site
        ]
        if held:
            return f"{', '.join(sorted(held))} {word}"
    return ""


def _placed(molecule: Molecule, lewis: LewisCount, centre: Centre, placement: Placement) -> Array:
    points = np.zeros((len(molecule.atoms), 3))
    for domain, direction in zip(centre.domains, placement.directions, strict=True):
        if domain.neighbour is not None:
            ends = centre.element, molecule.atoms[domain.neighbour].element
            length = bond_length_angstrom(*ends, domain.bond_order)
            points[domain.neighbour] = length * np.array(direction)
    return points / BOHR_ANGSTROM


def _stretches(molecule: Molecule, coordinates: Array) -> list[tuple[Array, float]]:
    """Return, for each bond in no ring, the motion (n, 3) that lengthens it by one, and its length.

    The smaller side moves away from the other.
    """
    moves = []
    for bond in molecule.bonds:
        beyond = _beyond(molecule, bond.begin, bond.end)
        if beyond is None:
            continue
        vector = coordinates[bond.end] - coordinates[bond.begin]
        length = float(np.linalg.norm(vector))
        motion = np.zeros_like(coordinates)
        motion[sorted(beyond)] = vector / length
        moves.append((motion, length))
    return moves


def _beyond(molecule: Molecule, begin: int, end: int) -> set[int] | None:
    """Return the atoms on the far side of the bond; ``None`` where a ring joins the sides."""
    reached, waiting = {end}, [end]
    while waiting:
        atom = waiting.pop()
        for other in molecule.neighbours(atom):
            if {atom, other} == {begin, end} or other in reached:
                continue
            reached.add(other)
            waiting.append(other)
    return None if begin in reached else reached
