"""A Lewis drawing while it is being put in order: charges and bonds that may still change."""

from dataclasses import dataclass, field

from shapeshelf.reference.elements import ELEMENTS

METAL_GROUPS = range(1, 13)
METALLOID_LIKE = frozenset({"H", "Be"})


@dataclass(slots=True)
class DrawnBond:
    """One bond; a dative bond points from ``begin`` (the donor) to ``end``."""

    begin: int
    end: int
    order: int
    dative: bool = False

    def other(self, atom: int) -> int:
        """Return the atom at the other end."""
        return self.end if atom == self.begin else self.begin


@dataclass(slots=True)
class Drawing:
    """Elements with the charges and bonds of one drawing; hydrogens are atoms of their own."""

    elements: list[str]
    charges: list[int]
    bonds: list[DrawnBond]
    at: list[list[DrawnBond]] = field(init=False)
    """The bonds of each atom, in the order of ``bonds``."""
    ranks: list[int] = field(init=False)
    """Numbers that order the atoms whatever order they stand in; equal where nothing tells."""

    def __post_init__(self) -> None:
        self.at = [[] for _ in self.elements]
        self.ranks = [0] * len(self.elements)
        for bond in self.bonds:
            self.at[bond.begin].append(bond)
            self.at[bond.end].append(bond)


def is_metal(element: str) -> bool:
    """Tell whether arrows onto ``element`` stay arrows: groups 1 to 12 and the f block.

    Beryllium counts with boron: both take lone pairs up to an octet.
    """
    group = ELEMENTS[element].group
    return element not in METALLOID_LIKE and (group is None or group in METAL_GROUPS)


def is_heavy_p_block(element: str) -> bool:
    """Tell whether ``element`` stands in groups 14 to 18, period 3 or later."""
    row = ELEMENTS[element]
    return row.period >= 3 and row.group is not None and row.group >= 14


def valence_electrons(element: str) -> int | None:
    """Return the number of valence electrons of the neutral atom; ``None`` in the f block."""
    row = ELEMENTS[element]
    if row.group is None:
        return None
    if element == "He":
        return 2
    return row.group if row.group <= 12 else row.group - 10


def bond_sum(drawing: Drawing, atom: int) -> int:
    """Return the sum of the orders of the plain bonds; arrows cost an atom no electron."""
    return sum(bond.order for bond in drawing.at[atom] if not bond.dative)


def given_pairs(drawing: Drawing, atom: int) -> int:
    """Return how many lone pairs the atom gives away along arrows."""
    return sum(1 for bond in drawing.at[atom] if bond.dative and bond.begin == atom)


def taken_pairs(drawing: Drawing, atom: int) -> int:
    """Return how many pairs the atom receives along arrows."""
    return sum(1 for bond in drawing.at[atom] if bond.dative and bond.end == atom)


def free_electrons(drawing: Drawing, atom: int) -> int:
    """Return the electrons in no plain bond, those given along arrows included.

    Negative where the drawing asks for more electrons than the atom has.
    """
    electrons = valence_electrons(drawing.elements[atom])
    if electrons is None:
        return 0
    return electrons - drawing.charges[atom] - bond_sum(drawing, atom)


def shell_electrons(drawing: Drawing, atom: int) -> int:
    """Return the electrons around the atom: its own, and both of every bond."""
    shared = 2 * (bond_sum(drawing, atom) + taken_pairs(drawing, atom))
    return free_electrons(drawing, atom) + shared


def is_terminal(drawing: Drawing, atom: int) -> bool:
    """Tell whether the atom has one neighbour and is no hydrogen."""
    return len(drawing.at[atom]) == 1 and drawing.elements[atom] != "H"


def electronegativity(element: str) -> float:
    """Return Pauling's electronegativity, 0 where none is tabulated (light noble gases)."""
    return ELEMENTS[element].electronegativity or 0.0


def exceeds_octet(drawing: Drawing, atom: int) -> bool:
    """Tell whether an atom of period 2 has more than eight electrons around it."""
    return ELEMENTS[drawing.elements[atom]].period == 2 and shell_electrons(drawing, atom) > 8
