"""How far each method is from measurement: 68 % half-widths of the residuals.

GFN2-xTB's angles and dipole moments are measured by ``tests/benchmarks/accuracy_of_methods.py``
against the tables in ``tests/data/``, molecules of at most eight atoms. The half-widths of both
density-functional levels, and all those of lengths, are provisional: estimates set before enough
molecules were run, to be replaced by measured ones before a record is released.
Angles and dipole moments in degrees and debye; lengths in ångström.
"""

from dataclasses import dataclass

from shapeshelf.calculation.model import Level


@dataclass(frozen=True, slots=True)
class Accuracy:
    """68 % half-widths of one method."""

    angle_degrees: float
    length_angstrom: float
    dipole_debye: float


ACCURACY = {
    Level.DFT: Accuracy(0.5, 0.01, 0.06),
    Level.DFT_SMALL: Accuracy(1.0, 0.02, 0.15),
    Level.XTB: Accuracy(2.8, 0.03, 0.58),
}
