"""A catalogue as later rooms see it: frozen entries, each knowing its file and lines."""

from dataclasses import dataclass, field
from enum import StrEnum
from pathlib import Path


class Quantity(StrEnum):
    """What a measured value is a value of."""

    ANGLE = "angle"
    LENGTH = "length"
    DIPOLE = "dipole"
    FREQUENCY = "frequency"


class SourceKind(StrEnum):
    """How a source's figures came into the catalogue."""

    READ = "read"
    DATASET = "dataset"
    RECALLED = "recalled"


@dataclass(frozen=True, slots=True)
class Source:
    """One entry of ``sources.yml``."""

    key: str
    title: str
    authors: str
    year: int
    kind: SourceKind
    where: str | None = None
    """Journal, volume and page, or publisher."""
    doi: str | None = None
    isbn: str | None = None
    note: str | None = None


@dataclass(frozen=True, slots=True)
class Protocol:
    """One entry of ``protocols.yml``: a document of the group that uses compounds."""

    id: str
    title: str
    file: str | None = None
    """Path of the document, relative to the catalogue folder."""


@dataclass(frozen=True, slots=True)
class StructureInput:
    """The ``structure`` field: exactly one of ``smiles`` and ``file``."""

    smiles: str | None
    file: Path | None
    charge: int | None = None
    multiplicity: int | None = None


@dataclass(frozen=True, slots=True)
class Measurement:
    """One item of ``measured``, in the units of the interface (degree, ångström, debye, 1/cm)."""

    quantity: Quantity
    of: str | None
    value: float
    unit: str
    uncertainty: float | None
    phase: str | None
    method: str | None
    source: str
    note: str | None
    line: int


@dataclass(frozen=True, slots=True)
class Entry:
    """One compound of the catalogue."""

    id: str
    name: str
    structure: StructureInput
    file: Path
    formerly: tuple[str, ...] = ()
    also: tuple[str, ...] = ()
    formula: str | None = None
    cas: str | None = None
    code: str | None = None
    kept: str | None = None
    owner: str | None = None
    tags: tuple[str, ...] = ()
    start_here: str | None = None
    hazards: tuple[str, ...] = ()
    used_in: tuple[str, ...] = ()
    notes: str | None = None
    measured: tuple[Measurement, ...] = ()
    lines: dict[str, int] = field(default_factory=dict, compare=False)
    """Line of each field in the file, by the field's name in YAML."""


@dataclass(frozen=True, slots=True)
class Catalogue:
    """Everything below ``compounds/`` that the steward keeps."""

    root: Path
    entries: tuple[Entry, ...]
    """In order of id."""
    sources: dict[str, Source]
    protocols: dict[str, Protocol]
