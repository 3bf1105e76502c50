"""What the electron-domain analysis says: Lewis count, domains, placements, centres."""

from dataclasses import dataclass
from enum import StrEnum

from shapeshelf.structure.molecule import Vector


@dataclass(frozen=True, slots=True)
class LewisAtom:
    """Electrons at one atom that take part in no bond."""

    lone_pairs: int
    single_electrons: int
    formal_charge: int
    delocalised_pairs: int = 0
    """Of ``lone_pairs``, those that lie in a pi system and are no domain in the plane."""
    delocalised_singles: int = 0
    """Of ``single_electrons``, those that another drawing of equal standing has elsewhere."""
    delocalised_by: str = ""
    """The rule that put the pairs in the pi system, ``D1`` to ``D6``; empty where none are."""


@dataclass(frozen=True, slots=True)
class ResonanceForm:
    """One drawing among equals: a bond order for each bond, a charge for each atom."""

    bond_orders: tuple[int, ...]
    formal_charges: tuple[int, ...]


@dataclass(frozen=True, slots=True)
class LewisCount:
    """The count for a whole molecule, the same for every spelling of it."""

    atoms: tuple[LewisAtom, ...]
    bond_orders: tuple[float, ...]
    """One a bond, averaged over resonance forms and equivalent atoms (nitrate 4/3)."""
    forms: tuple[ResonanceForm, ...]
    """The drawings that matter, at least one, at most eight."""
    multiplicity: int


class DomainKind(StrEnum):
    """What fills an electron domain."""

    BOND = "bond"
    LONE_PAIR = "lone pair"
    SINGLE_ELECTRON = "single electron"


@dataclass(frozen=True, slots=True)
class Domain:
    """One electron domain at a centre."""

    kind: DomainKind
    neighbour: int | None = None
    """The atom at the other end of a bond."""
    bond_order: float = 0.0


@dataclass(frozen=True, slots=True)
class Placement:
    """One way to lay the domains on the arrangement's sites, relaxed under repulsion."""

    shape: str
    polyhedral_symbol: str | None
    ideal_directions: tuple[Vector, ...]
    """Unit vectors of the undistorted arrangement, one a domain, in the centre's order."""
    directions: tuple[Vector, ...]
    """Unit vectors after relaxation."""
    sites: tuple[str, ...]
    """``ax``, ``eq``, ``ap``, ``bas`` or empty, one a domain."""
    energy: float
    """Repulsion energy in the model's own units; only differences mean anything."""


@dataclass(frozen=True, slots=True)
class ModelAngle:
    """One bond angle at a centre, before symmetry groups equal ones."""

    atoms: tuple[int, int, int]
    ideal_degrees: float
    model_degrees: float
    uncertainty_degrees: float
    """68 % half-width from cross-validated residuals of this class of centre."""


@dataclass(frozen=True, slots=True)
class TraceStep:
    """One step of the working: the numbered rule and what it found here."""

    rule: str
    text: str


@dataclass(frozen=True, slots=True)
class Departure:
    """A centre known not to follow the electron-domain rule."""

    sentence: str
    """What it does instead, ending with its source."""
    source: str


@dataclass(frozen=True, slots=True)
class Centre:
    """An atom with two or more neighbours, and everything the domain model says of it."""

    atom: int
    element: str
    label: str
    """Element and ordinal among that element, as in ``S1``."""
    domains: tuple[Domain, ...]
    bonded: int
    lone_pairs: int | None
    """``None`` for a transition metal, whose d electrons are no domains."""
    single_electrons: int
    notation: str
    """AXE notation, plain: ``AX4E``, ``AX3E2``."""
    arrangement: str | None
    """Electron arrangement, such as ``trigonal bipyramidal``; ``None`` outside every rule."""
    shape: str | None
    polyhedral_symbol: str | None
    placements: tuple[Placement, ...]
    """Best first; empty where the shape comes from supplied coordinates alone."""
    angles: tuple[ModelAngle, ...]
    """From the best placement, one for every pair of neighbours."""
    departure: Departure | None
    trace: tuple[TraceStep, ...]
    fluxional: bool = False
    """Known or expected to exchange ligand sites quickly at room temperature."""
