"""What every later room knows of a molecule: atoms, bonds, and coordinates where supplied."""

from dataclasses import dataclass

Vector = tuple[float, float, float]


@dataclass(frozen=True, slots=True)
class Atom:
    """One atom of the normalised drawing; hydrogens are always explicit."""

    element: str
    formal_charge: int
    isotope: int = 0
    """Mass number, 0 for the natural mixture."""


@dataclass(frozen=True, slots=True)
class Bond:
    """One bond of the normalised drawing, aromatic bonds in one Kekulé form."""

    begin: int
    end: int
    order: int
    """1, 2 or 3."""
    dative: bool = False
    """Drawn as an arrow from ``begin`` (the donor) to ``end`` (the acceptor)."""


@dataclass(frozen=True, slots=True)
class TetrahedralStereo:
    """A stereogenic centre: seen from the first neighbour the rest turn ``clockwise`` or not.

    Of three neighbours, the lone pair counts as the fourth and last.
    """

    atom: int
    neighbours: tuple[int, ...]
    clockwise: bool


@dataclass(frozen=True, slots=True)
class DoubleBondStereo:
    """``first`` and ``last`` lie on the same side of the bond ``begin``=``end`` if ``cis``."""

    first: int
    begin: int
    end: int
    last: int
    cis: bool


@dataclass(frozen=True, slots=True)
class Molecule:
    """A structure read and normalised: one drawing, whatever the spelling it came in.

    Atoms stand in the order of the SMILES or file, added hydrogens after them.
    """

    atoms: tuple[Atom, ...]
    bonds: tuple[Bond, ...]
    charge: int
    multiplicity: int | None
    """As the entry states it; ``None`` where it does not."""
    coordinates_angstrom: tuple[Vector, ...] | None
    """Supplied coordinates (from XYZ, or a three-dimensional MOL/SDF), untouched."""
    tetrahedral_stereo: tuple[TetrahedralStereo, ...]
    double_bond_stereo: tuple[DoubleBondStereo, ...]
    formula: str
    """Plain text: Hill order with carbon, else the order of IUPAC's element sequence."""
    smiles: str
    """Canonical SMILES of the normalised drawing."""
    inchikey: str | None
    classes: tuple[int, ...]
    """One number an atom: equal for atoms that the bond graph cannot tell apart (bond orders
    and formal charges left out, so resonance partners share a class)."""

    def neighbours(self, atom: int) -> tuple[int, ...]:
        """Return the atoms bonded to ``atom``, in bond order of the file."""
        return tuple(
            bond.end if bond.begin == atom else bond.begin
            for bond in self.bonds
            if atom in (bond.begin, bond.end)
        )
