"""What a record of quantum chemistry adds to a report: a structure, angles, lengths, a moment.

K1  Rows of angles and bonds stay those of the model, so that labels do not depend on whether a
    record is there; a calculated value is the mean over the members of its row, and its half-width
    reaches all of them.
K2  The structure, its point group and what follows from it are the calculated ones: a record
    counts only where it is a proven minimum of the structure as it is drawn now.
K3  What that point group fixes, a tetrahedron's angle or a moment of nought, has a half-width
    of nought.
"""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, replace

import numpy as np

from shapeshelf.calculation.accuracy import ACCURACY, Accuracy
from shapeshelf.calculation.judging import SYMMETRY_TOLERANCE_ANGSTROM
from shapeshelf.calculation.mapping import laid_onto
from shapeshelf.calculation.model import CalculationRecord, Mode
from shapeshelf.geometry.fixed import is_fixed
from shapeshelf.geometry.model import Structure, StructureBasis, Symmetry
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.geometry.vectors import angle_degrees, distance
from shapeshelf.properties.polarity import can_be_polar
from shapeshelf.report.model import (
    Analysis,
    AngleRow,
    Band,
    CalculatedVibrations,
    LengthRow,
    Value,
)
from shapeshelf.report.values import with_calculated
from shapeshelf.structure.molecule import Vector

SAME_BAND_PER_CM = 5.0
"""Members of a degenerate mode differ by no more: soft ones are measured one by one."""
MEMBERS = {"E": 2, "T": 3, "G": 4, "H": 5, "Π": 2, "Δ": 2, "Φ": 2}
"""Modes of one band, by the letter of the species."""


@dataclass(frozen=True, slots=True)
class Calculated:
    """A record laid onto the molecule as it is drawn."""

    record: CalculationRecord
    structure: Structure
    symmetry: Symmetry
    accuracy: Accuracy


def calculated_of(model: Analysis, record: CalculationRecord) -> Calculated:
    """Return ``record`` in the order and frame of ``model``."""
    recorded = np.array(record.coordinates_angstrom)
    fixed = np.array(model.structure.coordinates_angstrom)
    rows = laid_onto(model.molecule, recorded, fixed).tolist()
    points = tuple((x, y, z) for x, y, z in rows)
    elements = [atom.element for atom in model.molecule.atoms]
    return Calculated(
        record,
        Structure(points, StructureBasis.CALCULATED, f"optimised with {record.method}"),
        find_symmetry(elements, points, SYMMETRY_TOLERANCE_ANGSTROM),
        ACCURACY[record.level],
    )


def with_calculated_angles(
    rows: Mapping[int, tuple[AngleRow, ...]], found: Calculated
) -> dict[int, tuple[AngleRow, ...]]:
    """Return the rows of each centre with calculated angles beside the others (K1)."""
    return {
        centre: tuple(
            replace(
                row,
                degrees=_merged(
                    row.degrees,
                    row.members,
                    found,
                    angle_degrees,
                    0.0 if is_fixed(found.symmetry, row.members) else found.accuracy.angle_degrees,
                ),
            )
            for row in own
        )
        for centre, own in rows.items()
    }


def with_calculated_lengths(rows: Sequence[LengthRow], found: Calculated) -> tuple[LengthRow, ...]:
    """Return the rows of bonds with calculated lengths beside the others (K1)."""
    return tuple(
        replace(
            row,
            angstrom=_merged(
                row.angstrom, row.members, found, distance, found.accuracy.length_angstrom
            ),
        )
        for row in rows
    )


def with_calculated_moment(value: Value, found: Calculated) -> Value:
    """Return a dipole moment with the calculated one, of a flexible molecule the averaged one."""
    record = found.record
    if record.dipole_debye is None:
        return value
    moment, half_width = float(np.linalg.norm(record.dipole_debye)), found.accuracy.dipole_debye
    if record.conformers is not None and record.level is record.conformers.level:
        moment = record.conformers.mean_dipole_debye
    elif not can_be_polar(found.symmetry):
        moment, half_width = 0.0, 0.0
    return with_calculated(value, moment, half_width, record.method)


def vibrations_of(record: CalculationRecord) -> CalculatedVibrations | None:
    """Return the vibrations of a record as a page shows them."""
    if not record.modes:
        return None
    bands: list[Band] = []
    for mode in sorted(record.modes, key=lambda mode: mode.wavenumber_per_cm):
        if bands and _same_band(bands[-1], mode):
            bands[-1] = replace(
                bands[-1],
                intensity_km_per_mol=bands[-1].intensity_km_per_mol + mode.intensity_km_per_mol,
                degeneracy=bands[-1].degeneracy + 1,
            )
        else:
            bands.append(
                Band(
                    mode.wavenumber_per_cm,
                    mode.intensity_km_per_mol,
                    mode.species,
                    stretching=mode.stretching,
                )
            )
    return CalculatedVibrations(record.method, tuple(bands))


def _same_band(band: Band, mode: Mode) -> bool:
    """Tell whether a mode is one more member of a degenerate band."""
    if mode.species is None or mode.species != band.species:
        return False
    near = mode.wavenumber_per_cm - band.wavenumber_per_cm <= SAME_BAND_PER_CM
    return near and band.degeneracy < MEMBERS.get(mode.species[0], 1)


def _merged(
    value: Value,
    members: Sequence[tuple[int, ...]],
    found: Calculated,
    measure: Callable[..., float],
    half_width: float,
) -> Value:
    points: Sequence[Vector] = found.structure.coordinates_angstrom
    measures = [measure(*(points[atom] for atom in one)) for one in members]
    if half_width:
        half_width = max(half_width, (max(measures) - min(measures)) / 2)
    return with_calculated(value, sum(measures) / len(measures), half_width, found.record.method)
