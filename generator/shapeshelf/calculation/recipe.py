"""The recipe: from a molecule to a finished record.

C1  Starts come from the domain model (starting.py); the lowest conformer of a flexible molecule
    (conformers.py) is one more, and the only one at GFN2-xTB level.
C2  Every start is optimised roughly; the lowest goes on (methods.py says how, for each level).
C3  It is optimised finely. A structure of higher symmetry that lies no higher takes its place:
    one nearby or, where groups of atoms turn, the one that the model's leads to.
C4  Second derivatives there, its symmetry made exact, give wavenumbers and infrared intensities,
    and prove the minimum; a soft imaginary mode is measured again by energies along it, and one
    that stays imaginary is followed downhill and C3 repeated.
C5  The dipole moment comes from a single point with diffuse functions.
C7  What fails is a record that says why.
"""

from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass, replace

import numpy as np

from shapeshelf.calculation.conformers import averaged, bonds_with_turning_ends, conformers_of
from shapeshelf.calculation.engines import engine_versions
from shapeshelf.calculation.failing import UnusableError
from shapeshelf.calculation.judging import (
    SYMMETRY_TOLERANCE_ANGSTROM,
    check_bonds,
    check_spin,
    check_system,
    imaginary,
)
from shapeshelf.calculation.keys import settled, structure_key
from shapeshelf.calculation.methods import NAMES, Method, method_for, settings_of
from shapeshelf.calculation.minimising import Minimum
from shapeshelf.calculation.model import (
    CalculationRecord,
    Level,
    Mode,
    Outcome,
    PlacementResult,
    System,
)
from shapeshelf.calculation.placements import ends_of, energies_of, placement_results
from shapeshelf.calculation.starting import Start, shaken, starts_of, with_fitted_lengths
from shapeshelf.calculation.units import BOHR_ANGSTROM, DEBYE_PER_ATOMIC_UNIT
from shapeshelf.calculation.vibrations import labelled, masses, measured_again, vibrations
from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.geometry.vectors import Array
from shapeshelf.structure.molecule import Molecule, Vector

Told = Callable[[str], None]
"""Receives the name of each stage as it begins."""

MOST_DESCENTS = 3
DESCENT_BOHR, DESCENT_GROWTH = 0.3, 3.0
"""A short way down a steep mode; a long one where a shallow saddle held the optimisation."""
NEARLY_SYMMETRIC_ANGSTROM = 0.2
"""How far a motion with next to no force may have stopped short of a symmetric structure."""
UNCERTAIN_HARTREE = 1e-3
"""A symmetric structure that lies higher before its lengths have settled is not worth a try."""
SAME_HARTREE = 2e-6
"""Two minima this near in energy are one."""


@dataclass(frozen=True, slots=True)
class Proven:
    """A minimum with its modes."""

    minimum: Minimum
    modes: tuple[Mode, ...]
    moves: Array
    """What each mode moves, (modes, n, 3)."""
    descents: int


def calculate(molecule: Molecule, level: Level, told: Told) -> CalculationRecord:
    """Return the record of ``molecule`` at ``level``, a failure as a record too (C7).

    Raises AnalysisError where the domain model gives no structure to start from, CalculationError
    where a program is not installed.
    """
    molecule = settled(molecule)
    lewis, centres = analyse(molecule)
    structure = assemble(molecule, lewis, centres)
    system = System(
        tuple(atom.element for atom in molecule.atoms), molecule.charge, lewis.multiplicity
    )
    record = CalculationRecord(
        key=structure_key(molecule, lewis.multiplicity),
        level=level,
        method=NAMES[level],
        engines=engine_versions(level),
        settings=settings_of(level),
        outcome=Outcome.MINIMUM,
        elements=system.elements,
    )
    starts = starts_of(molecule, lewis, centres, structure)
    try:
        check_system(system)
        return _calculated(record, molecule, system, starts, told)
    except UnusableError as failure:
        return replace(record, outcome=failure.outcome, failure=failure.sentence)


def _calculated(
    record: CalculationRecord,
    molecule: Molecule,
    system: System,
    starts: Sequence[Start],
    told: Told,
) -> CalculationRecord:
    method = method_for(record.level, system)
    told("conformers")
    conformers = conformers_of(molecule, system, starts[0].coordinates)
    placements: tuple[PlacementResult, ...] = ()
    if conformers and record.level is Level.XTB:
        rough = conformers[0].minimum
    else:
        rough, placements = _lowest(method, molecule, system, starts, told)
    if len(conformers) > 1 and record.level is not Level.XTB:
        told("first optimisation, lowest conformer")
        other = method.roughly(shaken(conformers[0].minimum.coordinates))
        rough = min(rough, other, key=lambda one: one.energy)
    model = starts[0].coordinates if bonds_with_turning_ends(molecule) else None
    proven = _proven(method, system, rough, model, told)
    place = _centred(system, proven.minimum.coordinates)
    check_bonds(molecule, starts[0].coordinates, place)
    check_spin(system, method.spin_squared())
    told("dipole moment")
    dipole = method.dipole(place)
    points = place * BOHR_ANGSTROM
    symmetry = _symmetry_of(system, place, SYMMETRY_TOLERANCE_ANGSTROM)
    return replace(
        record,
        coordinates_angstrom=_rows(points),
        energy_hartree=proven.minimum.energy,
        dipole_debye=_rows([dipole * DEBYE_PER_ATOMIC_UNIT])[0],
        modes=labelled(proven.modes, proven.moves, molecule, symmetry),
        spin_squared=method.spin_squared(),
        point_group=symmetry.point_group,
        placements=placements,
        conformers=averaged(conformers),
        warnings=_warnings(proven),
    )


def _lowest(
    method: Method, molecule: Molecule, system: System, starts: Sequence[Start], told: Told
) -> tuple[Minimum, tuple[PlacementResult, ...]]:
    """Return the lowest rough minimum (C2) and what became of each placement."""
    minima = []
    for start in starts:
        told(f"first optimisation, {start.shape}" if len(starts) > 1 else "first optimisation")
        fitted = with_fitted_lengths(molecule, system, start.coordinates)
        minima.append(method.roughly(shaken(fitted)))
    ends = ends_of(system, minima)
    energies = energies_of(method, minima, ends)
    results = placement_results(starts, minima, ends, energies)
    return minima[energies.index(min(energies))], results


def _proven(
    method: Method, system: System, rough: Minimum, model: Array | None, told: Told
) -> Proven:
    """Return the fine minimum (C3), proven (C4). Raises UnusableError where none is found."""
    place, hessian = rough.coordinates, rough.hessian
    for descents in range(MOST_DESCENTS + 1):
        told("optimisation" if not descents else "optimisation, downhill from a saddle")
        fine = _completed(method, system, method.finely(place, hessian), model)
        if not fine.converged:
            raise UnusableError(Outcome.NO_MINIMUM, f"not found in {fine.steps} steps")
        told("vibrations")
        symmetry = _symmetry_of(system, fine.coordinates, SYMMETRY_TOLERANCE_ANGSTROM)
        exact = np.array(symmetry.coordinates_angstrom) / BOHR_ANGSTROM
        hessian, slopes = method.second_derivatives(exact, symmetry)
        modes, moves = vibrations(system.elements, exact, hessian, slopes)
        modes, moves = measured_again(modes, moves, exact, method.energy)
        if not imaginary(modes):
            return Proven(replace(fine, coordinates=exact), modes, moves, descents)
        place = exact + _downhill(moves[0], descents)
    raise UnusableError(Outcome.NO_MINIMUM, f"{MOST_DESCENTS + 1} saddles in a row")


def _completed(method: Method, system: System, fine: Minimum, model: Array | None) -> Minimum:
    """Return a minimum of higher symmetry than ``fine`` that lies no higher, else ``fine``.

    A motion with next to no force, such as the turning of a methyl group, ends anywhere. Tried
    are the symmetric structure near ``fine`` and the one that ``model`` (n, 3) leads to.
    """
    if not fine.converged:
        return fine
    found = _symmetry_of(system, fine.coordinates, SYMMETRY_TOLERANCE_ANGSTROM)
    near = _symmetry_of(system, fine.coordinates, NEARLY_SYMMETRIC_ANGSTROM)
    if len(near.operations) > len(found.operations):
        place = np.array(near.coordinates_angstrom) / BOHR_ANGSTROM
        if method.energy(place) > fine.energy + UNCERTAIN_HARTREE:
            return fine
        return _lower(fine, method.finely(place, fine.hessian))
    if model is None:
        return fine
    drawn = _symmetry_of(system, model, SYMMETRY_TOLERANCE_ANGSTROM)
    if len(drawn.operations) <= len(found.operations):
        return fine
    rough = method.roughly(np.array(drawn.coordinates_angstrom) / BOHR_ANGSTROM)
    return _lower(fine, method.finely(rough.coordinates, rough.hessian))


def _lower(fine: Minimum, symmetric: Minimum) -> Minimum:
    lies_no_higher = symmetric.energy <= fine.energy + SAME_HARTREE
    return symmetric if symmetric.converged and lies_no_higher else fine


def _symmetry_of(system: System, place: Array, tolerance_angstrom: float) -> Symmetry:
    """Return the symmetry of coordinates (n, 3) in bohr."""
    return find_symmetry(system.elements, place * BOHR_ANGSTROM, tolerance_angstrom)


def _downhill(move: Array, descents: int) -> Array:
    """Return a displacement (n, 3) in bohr along an imaginary mode, longer at every descent."""
    return np.asarray(move * DESCENT_BOHR * DESCENT_GROWTH**descents / np.linalg.norm(move))


def _centred(system: System, place: Array) -> Array:
    weights = masses(system.elements)
    return np.asarray(place - weights @ place / weights.sum())


def _rows(points: Iterable[Array]) -> tuple[Vector, ...]:
    return tuple((float(x), float(y), float(z)) for x, y, z in points)


def _warnings(proven: Proven) -> tuple[str, ...]:
    found = []
    if proven.descents:
        found.append(f"imaginary modes followed downhill: {proven.descents}")
    if any(mode.wavenumber_per_cm < 0 for mode in proven.modes):
        found.append("a mode is flat within the noise of the integration grid")
    return tuple(found)
