"""How far each method is from measurement: 68 % half-widths of the residuals.

Measured by ``tests/benchmarks/accuracy_of_methods.py`` against the tables in ``tests/data/``:
angles and dipole moments on molecules of at most eight atoms, lengths on all with a record. Of
PBE0/def2-SVP on few: 21 angles and 13 moments of small molecules, 7 kinds of bond.
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
    Level.DFT: Accuracy(0.7, 0.012, 0.11),
    Level.DFT_SMALL: Accuracy(1.2, 0.035, 0.12),
    Level.XTB: Accuracy(2.8, 0.036, 0.7),
}
