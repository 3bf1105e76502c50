"""What the property rooms say: hybridisation, polarity, expected spectra."""

from dataclasses import dataclass

from shapeshelf.structure.molecule import Vector


@dataclass(frozen=True, slots=True)
class Hybrid:
    """One hybrid orbital at a centre: a bond to ``neighbour`` or, with ``None``, a lone pair."""

    neighbour: int | None
    s_character: float
    """Fraction of s, 0 to 1; all hybrids of a centre add up to one."""


@dataclass(frozen=True, slots=True)
class Hybridisation:
    """The customary label of a centre and the numbers behind it."""

    atom: int
    label: str | None
    """``sp3``, ``sp3d2``; ``None`` for a transition metal."""
    customary_only: bool
    """The label names d orbitals: kept as a customary name, d participation not implied."""
    hybrids: tuple[Hybrid, ...]
    bent_rule: str | None
    """What Bent's rule says here and whether the numbers agree."""
    pyramidalisation_degrees: float | None
    """Pi-orbital axis vector angle minus 90 degrees (Haddon), for three-coordinate centres."""
    basis: str = ""
    """One sentence: where the s-characters come from and what they do not say."""


@dataclass(frozen=True, slots=True)
class BondPolarity:
    """One bond: which end is negative and by how much electronegativities differ."""

    positive: int
    negative: int
    electronegativity_difference: float


@dataclass(frozen=True, slots=True)
class DipoleModel:
    """The model's dipole moment."""

    moment_debye: float | None
    """``None`` for an ion, whose moment depends on the origin."""
    vector_debye: Vector | None
    """From positive to negative, in the structure's frame."""
    uncertainty_debye: float | None
    polar: bool | None
    reason: str
    """Which symmetry forbids or allows it and which bonds cancel; for ions why there is none."""
    partial_charges: tuple[float, ...]
    bonds: tuple[BondPolarity, ...]


@dataclass(frozen=True, slots=True)
class ModeSpecies:
    """The normal modes of one symmetry species."""

    species: str
    degeneracy: int
    count: int
    stretches: int
    infrared: bool
    raman: bool


@dataclass(frozen=True, slots=True)
class NmrSignal:
    """One set of equivalent spin-1/2 nuclei."""

    nucleus: str
    """``19F``."""
    atoms: tuple[int, ...]
    multiplicity: str
    """First order: ``triplet``, ``doublet of triplets``, ``singlet``."""
    partners: tuple[str, ...]
    """The neighbours that cause it, as ``2 F (2J)``."""


@dataclass(frozen=True, slots=True)
class ExpectedSpectra:
    """What symmetry alone lets one expect."""

    modes: tuple[ModeSpecies, ...]
    infrared_bands: int
    raman_bands: int
    coincidences: int
    infrared_stretches: int
    raman_stretches: int
    microwave_axes: tuple[str, ...]
    """Of a, b, c, those along which the dipole moment has a component."""
    nmr: tuple[NmrSignal, ...]
    fluxional_note: str | None
