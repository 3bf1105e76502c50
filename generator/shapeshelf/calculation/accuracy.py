"""How far each method is from measurement: 68 % half-widths of the residuals.

Measured by ``tests/benchmarks/accuracy_of_methods.py`` against the tables in ``tests/data/``.
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
    Level.XTB: Accuracy(2.5, 0.03, 0.7),
}
