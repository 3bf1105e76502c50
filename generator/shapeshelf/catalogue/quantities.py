"""Unit and physical range of each measured quantity.

The bounds only catch slips of the pen and of the unit. An angle cannot exceed 180 degrees
and no moment or wavenumber is negative; the other bounds are common practice, no source:
wide of the shortest and longest bonds, of the largest moments of zwitterions, and above the
vibration of H2 (about 4401 1/cm harmonic: K. P. Huber and G. Herzberg, Constants of Diatomic
Molecules, 1979; recalled from memory).
"""

from dataclasses import dataclass

from shapeshelf.catalogue.model import Quantity


@dataclass(frozen=True, slots=True)
class Limit:
    """What a value of one quantity may be."""

    unit: str
    least: float
    most: float
    atoms_in_label: int | None
    """How many atoms ``of`` must join with hyphens; ``None`` where it is free."""
    example: str


LIMITS: dict[Quantity, Limit] = {
    Quantity.ANGLE: Limit("degree", 1.0, 180.0, 3, "F(ax)-S-F(ax)"),
    Quantity.LENGTH: Limit("angstrom", 0.3, 6.0, 2, "S-F(ax)"),
    Quantity.DIPOLE: Limit("debye", 0.0, 50.0, None, ""),
    Quantity.FREQUENCY: Limit("1/cm", 1.0, 5000.0, None, ""),
}
