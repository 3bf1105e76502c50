"""What geometry says of a molecule: structure, symmetry, distance from ideal shapes."""

from dataclasses import dataclass
from enum import StrEnum

from shapeshelf.structure.molecule import Vector

Matrix = tuple[Vector, Vector, Vector]


class StructureBasis(StrEnum):
    """Where a set of coordinates comes from."""

    SUPPLIED = "supplied"
    CALCULATED = "calculated"
    MODEL = "model"


@dataclass(frozen=True, slots=True)
class Structure:
    """Coordinates of every atom, in the molecule's order."""

    coordinates_angstrom: tuple[Vector, ...]
    basis: StructureBasis
    method: str
    """One phrase for the page: how the coordinates came about."""
    conformers_tried: int = 1


@dataclass(frozen=True, slots=True)
class SymmetryOperation:
    """An operation of the point group: what it does to space and to the atoms."""

    label: str
    """``E``, ``C3``, ``C3^2``, ``S4``, ``i``, ``sigma``."""
    matrix: Matrix
    """Acts on coordinates taken from the centre of mass."""
    permutation: tuple[int, ...]
    """Atom k lands on atom ``permutation[k]``."""


@dataclass(frozen=True, slots=True)
class Symmetry:
    """The point group of a structure, within a stated tolerance."""

    point_group: str
    """Schoenflies symbol in plain letters: ``C2v``, ``D3h``, ``Td``, ``Cinfv``."""
    tolerance_angstrom: float
    operations: tuple[SymmetryOperation, ...]
    """All of them; for a linear molecule those of the finite subgroup C4v or D4h."""
    rotational_number: int
    chiral: bool
    equivalent_atoms: tuple[tuple[int, ...], ...]
    centre_angstrom: Vector
    axes: Matrix
    """Rows: the standard x, y, z axes of the group (z the principal axis)."""
    coordinates_angstrom: tuple[Vector, ...]
    """The structure symmetrised within the tolerance, in the frame it came in."""


@dataclass(frozen=True, slots=True)
class ShapeDeviation:
    """How far the neighbours of one centre are from the ideal polyhedra."""

    measures: tuple[tuple[str, float], ...]
    """(IUPAC polyhedral symbol, continuous shape measure), nearest first."""
    tau4: float | None
    tau5: float | None
