"""Normalising rules N4, N5, N8 and N9: octets and joined charges (see normalising.py)."""

from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.drawing import (
    Drawing,
    DrawnBond,
    electronegativity,
    exceeds_octet,
    free_electrons,
    given_pairs,
    is_heavy_p_block,
    is_metal,
    is_terminal,
    shell_electrons,
)


def octet_of_period_two(drawing: Drawing, atom: int) -> bool:
    """N4."""
    if drawing.charges[atom] != 0 or drawing.elements[atom] not in ("N", "O"):
        return False
    if not exceeds_octet(drawing, atom):
        return False
    # An odd count is one bond too many by mistake, unless the atom is that of nitrogen dioxide.
    if shell_electrons(drawing, atom) % 2 == 1 and not _is_dioxide(drawing, atom):
        return False
    multiple = [bond for bond in drawing.at[atom] if bond.order > 1]
    if not multiple:
        return False

    def preference(bond: DrawnBond) -> tuple[bool, float, int, int]:
        other = bond.other(atom)
        strength = electronegativity(drawing.elements[other])
        return (is_terminal(drawing, other), strength, bond.order, drawing.ranks[other])

    bond = max(multiple, key=preference)
    bond.order -= 1
    drawing.charges[atom] += 1
    drawing.charges[bond.other(atom)] -= 1
    return True


def joined_charges(drawing: Drawing, atom: int) -> bool:
    """N5."""
    element = drawing.elements[atom]
    if drawing.charges[atom] <= 0:
        return False
    room = is_heavy_p_block(element) or (
        ELEMENTS[element].period == 2 and shell_electrons(drawing, atom) <= 6
    )
    if not room:
        return False
    partners = [bond for bond in drawing.at[atom] if _gives_pair(drawing, bond, atom)]
    if not partners:
        return False
    bond = max(partners, key=lambda b: _partner_rank(drawing, b.other(atom)))
    bond.order += 1
    drawing.charges[atom] -= 1
    drawing.charges[bond.other(atom)] += 1
    return True


def radical_to_centre(drawing: Drawing, atom: int) -> bool:
    """N8."""
    if not (is_heavy_p_block(drawing.elements[atom]) or drawing.elements[atom] == "N"):
        return False
    if drawing.charges[atom] != 0 or free_electrons(drawing, atom) < 2:
        return False
    doubles = [
        b for b in drawing.at[atom] if b.order == 2 and drawing.elements[b.other(atom)] == "O"
    ]
    radicals = [b for b in drawing.at[atom] if b.order == 1 and _is_oxyl(drawing, b.other(atom))]
    if not doubles or not radicals:
        return False
    radicals[0].order = 2
    return True


def filled_sextet(drawing: Drawing, atom: int) -> bool:
    """N9."""
    if drawing.elements[atom] != "C" or drawing.charges[atom] != 0:
        return False
    if len(drawing.at[atom]) != 1 or shell_electrons(drawing, atom) not in (6, 7):
        return False
    bond = drawing.at[atom][0]
    other = bond.other(atom)
    if bond.order == 3 and shell_electrons(drawing, other) == 9:
        drawing.charges[atom] = -1
        drawing.charges[other] = 1
        return True
    if bond.order != 2 or drawing.elements[other] not in ("N", "O"):
        return False
    if drawing.charges[other] != 0 or free_electrons(drawing, other) < 2:
        return False
    bond.order = 3
    drawing.charges[atom] = -1
    drawing.charges[other] = 1
    return True


def _is_dioxide(drawing: Drawing, atom: int) -> bool:
    ends = [bond.other(atom) for bond in drawing.at[atom]]
    return len(ends) == 2 and all(
        drawing.elements[end] == "O" and is_terminal(drawing, end) for end in ends
    )


def _gives_pair(drawing: Drawing, bond: DrawnBond, atom: int) -> bool:
    other = bond.other(atom)
    return (
        not bond.dative
        and bond.order < 3
        and drawing.charges[other] < 0
        and not is_metal(drawing.elements[other])
        and not _bridges_heavier(drawing, atom, other)
        and free_electrons(drawing, other) - 2 * given_pairs(drawing, other) >= 2
    )


def _bridges_heavier(drawing: Drawing, atom: int, other: int) -> bool:
    """Tell whether ``atom`` is a halogen bridge that gave its pair to ``other``, as in I2Cl6."""
    difference = electronegativity(drawing.elements[atom]) - electronegativity(
        drawing.elements[other]
    )
    return ELEMENTS[drawing.elements[atom]].group == 17 and difference > 0


def _partner_rank(drawing: Drawing, other: int) -> tuple[bool, float, int]:
    """Oxygen last among terminal atoms: it keeps a charge best."""
    strength = electronegativity(drawing.elements[other])
    return (is_terminal(drawing, other), -strength, drawing.ranks[other])


def _is_oxyl(drawing: Drawing, atom: int) -> bool:
    return (
        drawing.elements[atom] == "O"
        and drawing.charges[atom] == 0
        and is_terminal(drawing, atom)
        and free_electrons(drawing, atom) == 5
    )
