"""The report: one frozen record that pages, figures and JSON read and nothing computes twice."""

from dataclasses import dataclass
from enum import StrEnum

from shapeshelf.calculation.model import CalculationRecord
from shapeshelf.catalogue.model import Entry, Measurement
from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.geometry.model import ShapeDeviation, Structure, Symmetry
from shapeshelf.properties.model import DipoleModel, ExpectedSpectra, Hybridisation
from shapeshelf.structure.molecule import Molecule


class Basis(StrEnum):
    """What a shown value rests on, best first."""

    MEASURED = "measured"
    CALCULATED = "calculated"
    SUPPLIED = "supplied"
    """Read off the coordinates that the entry supplies."""
    MODEL = "model"


@dataclass(frozen=True, slots=True)
class Analysis:
    """A molecule worked out: what the rooms above have said of it, before values are merged."""

    molecule: Molecule
    lewis: LewisCount
    centres: tuple[Centre, ...]
    structure: Structure
    symmetry: Symmetry


@dataclass(frozen=True, slots=True)
class Value:
    """A number with every basis it has; ``value`` is the best of them."""

    value: float
    uncertainty: float | None
    basis: Basis
    model: float | None
    model_uncertainty: float | None
    calculated: float | None
    calculated_uncertainty: float | None
    measured: float | None
    measured_uncertainty: float | None
    source: str | None
    """Key of the measured value's source, the calculation's method, or the model's name."""
    measurement: Measurement | None = None
    supplied: float | None = None


@dataclass(frozen=True, slots=True)
class AngleRow:
    """One set of symmetry-equivalent angles at a centre."""

    of: str
    """``F(ax)-S-F(ax)``, the label that measured values refer to."""
    atoms: tuple[int, int, int]
    """One member of the set."""
    members: tuple[tuple[int, int, int], ...]
    ideal_degrees: float | None
    degrees: Value
    labels: tuple[str, ...]
    """Every spelling that means this row, ``of`` first."""


@dataclass(frozen=True, slots=True)
class LengthRow:
    """One set of symmetry-equivalent bonds."""

    of: str
    """``S-F(ax)``."""
    atoms: tuple[int, int]
    members: tuple[tuple[int, int], ...]
    bond_order: float
    angstrom: Value
    labels: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class CentreReport:
    """One centre, with all that any room knows of it."""

    centre: Centre
    atom_label: str
    ligand_labels: dict[int, str]
    """Label of each neighbour as printed in ``of``: ``F(ax)``."""
    shape: str | None
    polyhedral_symbol: str | None
    angles: tuple[AngleRow, ...]
    hybridisation: Hybridisation | None
    deviation: ShapeDeviation | None
    equivalent: tuple[int, ...]
    """Atoms whose centres are equivalent to this one, itself included."""


@dataclass(frozen=True, slots=True)
class Caution:
    """One line of safety: an H-statement, or a rule that the structure triggers."""

    code: str | None
    text: str


@dataclass(frozen=True, slots=True)
class Band:
    """One calculated vibration, the members of a degenerate one together."""

    wavenumber_per_cm: float
    intensity_km_per_mol: float
    """Of all members."""
    species: str | None = None
    """``None`` where the mode is of no single symmetry species."""
    degeneracy: int = 1
    stretching: float | None = None
    """How much of it is bond stretching, 0 to 1."""


@dataclass(frozen=True, slots=True)
class CalculatedVibrations:
    """The harmonic, unscaled vibrations of one calculation."""

    method: str
    """As a page prints it: ``PBE0/def2-TZVP``."""
    bands: tuple[Band, ...]


@dataclass(frozen=True, slots=True)
class CompoundReport:
    """Everything known about one compound."""

    id: str | None
    name: str
    entry: Entry | None
    molecule: Molecule
    lewis: LewisCount
    structure: Structure
    symmetry: Symmetry
    centres: tuple[CentreReport, ...]
    shape: str | None
    point_group: str
    point_group_basis: Basis
    lengths: tuple[LengthRow, ...]
    dipole_model: DipoleModel
    dipole_debye: Value | None
    """``None`` for an ion."""
    spectra: ExpectedSpectra
    molar_mass_g_mol: float
    topological_polar_surface_area: float | None
    """Å², organics only."""
    crippen_log_p: float | None
    cautions: tuple[Caution, ...]
    unmatched: tuple[Measurement, ...] = ()
    """Measured values whose label fits nothing in the structure."""
    frequencies: CalculatedVibrations | None = None
    """``None`` where no calculation of them is on record."""
    calculation: CalculationRecord | None = None
    """The record that counts for the structure, a failed one too."""
