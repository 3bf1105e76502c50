"""Normalising rules N6, N7 and N10: which atom bears the charge (see normalising.py)."""

from shapeshelf.structure.drawing import (
    Drawing,
    DrawnBond,
    electronegativity,
    free_electrons,
    is_heavy_p_block,
    is_metal,
    is_terminal,
)


def charge_to_terminal(drawing: Drawing, atom: int) -> bool:
    """N6."""
    element = drawing.elements[atom]
    if drawing.charges[atom] >= 0:
        return False
    if not is_heavy_p_block(element) and not _is_oxometallate(drawing, atom):
        return False
    ends = [
        bond
        for bond in drawing.at[atom]
        if bond.order > 1
        and is_terminal(drawing, bond.other(atom))
        and drawing.charges[bond.other(atom)] == 0
        and electronegativity(drawing.elements[bond.other(atom)]) > electronegativity(element)
    ]
    if not ends:
        return False
    bond = max(ends, key=lambda b: _end_rank(drawing, b.other(atom)))
    bond.order -= 1
    drawing.charges[bond.other(atom)] -= 1
    drawing.charges[atom] += 1
    return True


def charge_to_electronegative(drawing: Drawing, atom: int) -> bool:
    """N7."""
    for low in drawing.at[atom]:
        start = low.other(atom)
        if low.order > 2 or low.dative or not _bears_charge(drawing, start):
            continue
        for high in drawing.at[atom]:
            end = high.other(atom)
            if high is low or high.order < 2 or not is_terminal(drawing, end):
                continue
            gain = electronegativity(drawing.elements[end]) - electronegativity(
                drawing.elements[start]
            )
            if drawing.charges[end] == 0 and gain > 0:
                low.order += 1
                high.order -= 1
                drawing.charges[start] += 1
                drawing.charges[end] -= 1
                return True
    return False


def charge_along_chain(drawing: Drawing, atom: int) -> bool:
    """N10, at the middle atom."""
    starts = [
        bond
        for bond in drawing.at[atom]
        if bond.order == 1 and _is_chain_anion(drawing, bond.other(atom), atom)
    ]
    ends = [bond for bond in drawing.at[atom] if _takes_chain_charge(drawing, bond, atom)]
    if not starts or not ends:
        return False
    low = max(starts, key=lambda b: drawing.ranks[b.other(atom)])
    high = max(ends, key=lambda b: _end_rank(drawing, b.other(atom)))
    low.order += 1
    high.order -= 1
    drawing.charges[low.other(atom)] += 1
    drawing.charges[high.other(atom)] -= 1
    return True


def _is_chain_anion(drawing: Drawing, start: int, middle: int) -> bool:
    """Tell whether ``start`` is a carbanion, or a charged nitrogen of an azide."""
    if drawing.charges[start] != -1 or any(bond.dative for bond in drawing.at[start]):
        return False
    if drawing.elements[start] == "C":
        return free_electrons(drawing, start) == 2
    return (
        drawing.elements[start] == "N"
        and free_electrons(drawing, start) == 4
        and _is_middle_nitrogen(drawing, middle)
    )


def _is_middle_nitrogen(drawing: Drawing, atom: int) -> bool:
    charged = drawing.elements[atom] == "N" and drawing.charges[atom] == 1
    return charged and len(drawing.at[atom]) == 2


def _takes_chain_charge(drawing: Drawing, bond: DrawnBond, middle: int) -> bool:
    end = bond.other(middle)
    if bond.order < 2 or not is_terminal(drawing, end) or drawing.charges[end] != 0:
        return False
    if drawing.elements[end] == "N":
        return bond.order == 3 and _is_middle_nitrogen(drawing, middle)
    carbonyl = drawing.elements[middle] == "C" or drawing.charges[middle] == 1
    return carbonyl and drawing.elements[end] in ("O", "S", "Se")


def _end_rank(drawing: Drawing, end: int) -> tuple[float, int]:
    return (electronegativity(drawing.elements[end]), drawing.ranks[end])


def _is_oxometallate(drawing: Drawing, atom: int) -> bool:
    ends = [bond.other(atom) for bond in drawing.at[atom]]
    return is_metal(drawing.elements[atom]) and all(
        drawing.elements[end] == "O" and is_terminal(drawing, end) for end in ends
    )


def _bears_charge(drawing: Drawing, atom: int) -> bool:
    return (
        is_terminal(drawing, atom)
        and drawing.charges[atom] < 0
        and free_electrons(drawing, atom) >= 2
    )
