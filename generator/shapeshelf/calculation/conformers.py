"""Conformers of a flexible molecule with GFN2-xTB, and the moment they show together.

N1  A bond turns where it is single, in no ring, and neither end looks the same three times round:
    a methyl or trifluoromethyl group turns without making another conformer.
N2  Conformers come from distance geometry, the assembled structure beside them; each is relaxed.
    Two of the same energy and moment are one; one without improper symmetry counts twice.
N3  Boltzmann weights at 298.15 K from GFN2-xTB energies within a window. The averaged moment is
    the root of the mean square, as a measurement in a static field gives it (P. Debye, Polar
    Molecules, 1929).
"""

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from shapeshelf.calculation import xtb
from shapeshelf.calculation.methods import guessed_hessian
from shapeshelf.calculation.minimising import Minimum, Tolerances, minimise
from shapeshelf.calculation.model import ConformerResult, Level, System
from shapeshelf.calculation.units import (
    BOHR_ANGSTROM,
    DEBYE_PER_ATOMIC_UNIT,
    GAS_CONSTANT_KJ_MOL_KELVIN,
    HARTREE_KJ_MOL,
)
from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.geometry.vectors import Array
from shapeshelf.structure.embedding import embed
from shapeshelf.structure.molecule import Bond, Molecule

TEMPERATURE_KELVIN = 298.15
WINDOW_KJ_MOL = 15.0
"""Higher conformers weigh less than 0.3 % each."""
SAME_KJ_MOL, SAME_DEBYE = 0.1, 0.02
TOLERANCES = Tolerances(gradient=5e-5, step=2e-3, most_steps=300)
SEED = 20050
PER_TURN, MOST, MOST_OF_LARGE, LARGE = 6, 24, 8, 30
SYMMETRY_TOLERANCE_ANGSTROM = 0.05
SAME_THRICE = 3


@dataclass(frozen=True, slots=True)
class Conformer:
    """One relaxed conformer."""

    minimum: Minimum
    dipole_debye: float
    weight: int
    """Two for a chiral one, whose mirror image is another."""


def turning_bonds(molecule: Molecule) -> tuple[Bond, ...]:
    """Return the bonds whose turning makes other conformers (N1)."""
    return tuple(
        bond
        for bond in bonds_with_turning_ends(molecule)
        if _makes_conformers(molecule, bond.begin, bond.end)
        and _makes_conformers(molecule, bond.end, bond.begin)
    )


def bonds_with_turning_ends(molecule: Molecule) -> tuple[Bond, ...]:
    """Return the single bonds in no ring between atoms that each have further neighbours."""
    return tuple(
        bond
        for bond in molecule.bonds
        if bond.order == 1
        and min(len(molecule.neighbours(end)) for end in (bond.begin, bond.end)) > 1
        and not _in_ring(molecule, bond)
    )


def conformers_of(molecule: Molecule, system: System, assembled: Array) -> tuple[Conformer, ...]:
    """Return the distinct conformers of a settled molecule, lowest first (N2).

    ``assembled`` (n, 3) in bohr. Empty where no bond turns or none can be embedded.
    """
    turns = len(turning_bonds(molecule))
    if not turns:
        return ()
    most = MOST if len(molecule.atoms) <= LARGE else MOST_OF_LARGE
    try:
        starts = embed(molecule, min(2 + PER_TURN * turns, most), SEED)
    except AnalysisError:
        return ()
    places = [assembled, *(start / BOHR_ANGSTROM for start in starts)]
    relaxed = [_relaxed(system, place) for place in places]
    found = [one for one in relaxed if one.minimum.converged]
    return _distinct(sorted(found, key=lambda one: one.minimum.energy))


def averaged(conformers: Sequence[Conformer]) -> ConformerResult | None:
    """Return the Boltzmann average over conformers (N3), ``None`` of none."""
    if not conformers:
        return None
    energies = np.array([one.minimum.energy for one in conformers]) * HARTREE_KJ_MOL
    above = energies - energies[0]
    kept = above <= WINDOW_KJ_MOL
    shares = np.array([one.weight for one in conformers]) * np.exp(
        -above / (GAS_CONSTANT_KJ_MOL_KELVIN * TEMPERATURE_KELVIN)
    )
    shares, moments = shares[kept], np.array([one.dipole_debye for one in conformers])[kept]
    shares /= shares.sum()
    return ConformerResult(
        level=Level.XTB,
        count=len(moments),
        window_kj_mol=WINDOW_KJ_MOL,
        temperature_kelvin=TEMPERATURE_KELVIN,
        lowest_share=float(shares[0]),
        mean_dipole_debye=float(np.sqrt(shares @ moments**2)),
        least_dipole_debye=float(moments.min()),
        most_dipole_debye=float(moments.max()),
    )


def _makes_conformers(molecule: Molecule, atom: int, other: int) -> bool:
    """Tell whether turning the far side of ``atom`` gives another structure."""
    beyond = [one for one in molecule.neighbours(atom) if one != other]
    alike = len({molecule.classes[one] for one in beyond}) == 1
    return not (alike and len(beyond) >= SAME_THRICE)


def _in_ring(molecule: Molecule, bond: Bond) -> bool:
    reached, waiting = {bond.begin}, [bond.begin]
    while waiting:
        atom = waiting.pop()
        for other in molecule.neighbours(atom):
            if {atom, other} != {bond.begin, bond.end} and other not in reached:
                reached.add(other)
                waiting.append(other)
    return bond.end in reached


def _relaxed(system: System, place: Array) -> Conformer:
    minimum = minimise(xtb.surface_of(system), place, guessed_hessian(place), TOLERANCES)
    points = minimum.coordinates * BOHR_ANGSTROM
    symmetry = find_symmetry(system.elements, points, SYMMETRY_TOLERANCE_ANGSTROM)
    dipole = xtb.evaluate(system, minimum.coordinates).dipole
    moment = float(np.linalg.norm(dipole)) * DEBYE_PER_ATOMIC_UNIT
    return Conformer(minimum, moment, 2 if symmetry.chiral else 1)


def _distinct(ranked: Sequence[Conformer]) -> tuple[Conformer, ...]:
    kept: list[Conformer] = []
    for one in ranked:
        if not any(_same(one, other) for other in kept):
            kept.append(one)
    return tuple(kept)


def _same(one: Conformer, other: Conformer) -> bool:
    apart = abs(one.minimum.energy - other.minimum.energy) * HARTREE_KJ_MOL
    return apart <= SAME_KJ_MOL and abs(one.dipole_debye - other.dipole_debye) <= SAME_DEBYE
