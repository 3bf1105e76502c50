"""What a calculation is asked for and what it leaves: jobs, records and their parts.

Inside the engines numbers are in atomic units (bohr, hartree); every record is in the units of
its field names.
"""

from dataclasses import dataclass
from enum import StrEnum

from shapeshelf.structure.molecule import Vector


class Level(StrEnum):
    """How a structure is calculated, best first."""

    DFT = "dft"
    """PBE0/def2-TZVP, dipole moment with def2-TZVPD."""
    DFT_SMALL = "dft-small"
    """PBE0/def2-SVP throughout, dipole moment with def2-TZVPD."""
    XTB = "xtb"
    """GFN2-xTB."""


class Outcome(StrEnum):
    """How a calculation ended."""

    MINIMUM = "minimum"
    """A stationary point without imaginary modes."""
    NOT_CONVERGED = "self-consistent field not converged"
    NO_MINIMUM = "no minimum found"
    WRONG_PARITY = "electrons and multiplicity do not fit"
    SPIN_CONTAMINATED = "spin contamination"
    UNSUPPORTED = "unsupported element"
    OTHER_STRUCTURE = "another structure"
    """The atoms are no longer joined as the entry says."""


@dataclass(frozen=True, slots=True)
class System:
    """What an engine needs to know besides coordinates."""

    elements: tuple[str, ...]
    charge: int
    multiplicity: int


@dataclass(frozen=True, slots=True)
class StructureKey:
    """What a result belongs to; another spelling of the same structure has the same key."""

    smiles: str
    charge: int
    multiplicity: int
    inchikey: str | None
    digest: str
    """Short hash of elements, isotopes, bonds and stereochemistry in the settled order."""


@dataclass(frozen=True, slots=True)
class Mode:
    """One normal mode."""

    wavenumber_per_cm: float
    """Negative for an imaginary one. Harmonic, unscaled."""
    intensity_km_per_mol: float
    species: str | None = None
    """Symmetry species in the record's point group; ``None`` where it is of no single one."""
    stretching: float | None = None
    """How much of it is bond stretching, 0 to 1."""


@dataclass(frozen=True, slots=True)
class PlacementResult:
    """One placement of the domain model, optimised."""

    shape: str
    sites: str
    """Who stands where, for shapes that several placements share: ``Cl, F axial``."""
    model_energy: float
    """Above the best placement, in the model's own units."""
    energy_kj_mol: float | None
    """Above the lowest one; ``None`` where no minimum was found from it."""
    ends_as: int
    """The number of the placement whose structure it ends in; its own where it stays apart."""
    wins: bool


@dataclass(frozen=True, slots=True)
class ConformerResult:
    """What GFN2-xTB says of the conformers of a flexible molecule."""

    level: Level
    count: int
    """Distinct minima within the energy window."""
    window_kj_mol: float
    temperature_kelvin: float
    lowest_share: float
    """Boltzmann weight of the lowest conformer."""
    mean_dipole_debye: float
    """Boltzmann-averaged: root of the mean square moment, as a static measurement gives."""
    least_dipole_debye: float
    most_dipole_debye: float


@dataclass(frozen=True, slots=True)
class CalculationRecord:
    """The result of one calculation, whole: success or failure.

    Atoms stand in the settled order of the structure (``settled_elements``); the geometry is
    centred at the centre of mass.
    """

    key: StructureKey
    level: Level
    method: str
    """As a page prints it: ``PBE0/def2-TZVP``."""
    engines: tuple[tuple[str, str], ...]
    """(program, version)."""
    settings: tuple[tuple[str, str], ...]
    outcome: Outcome
    failure: str | None = None
    """One sentence where the outcome is no minimum."""
    elements: tuple[str, ...] = ()
    coordinates_angstrom: tuple[Vector, ...] = ()
    energy_hartree: float | None = None
    dipole_debye: Vector | None = None
    modes: tuple[Mode, ...] = ()
    spin_squared: float | None = None
    point_group: str | None = None
    placements: tuple[PlacementResult, ...] = ()
    conformers: ConformerResult | None = None
    warnings: tuple[str, ...] = ()
