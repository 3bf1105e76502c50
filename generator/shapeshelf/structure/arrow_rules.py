"""Normalising rules N1 to N3: arrows (see normalising.py)."""

from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.drawing import (
    Drawing,
    DrawnBond,
    exceeds_octet,
    is_metal,
    is_terminal,
    shell_electrons,
)


def plain_anion_arrow(drawing: Drawing, donor: int) -> bool:
    """N1."""
    for bond in drawing.at[donor]:
        if not bond.dative or bond.begin != donor or drawing.charges[donor] >= 0:
            continue
        if any(
            drawing.charges[b.other(donor)] > 0 and b is not bond and not b.dative
            for b in drawing.at[donor]
        ):
            continue
        bond.dative = False
        drawing.charges[donor] += 1
        drawing.charges[bond.end] -= 1
        return True
    return False


def plain_main_group_arrow(drawing: Drawing, acceptor: int) -> bool:
    """N2."""
    if is_metal(drawing.elements[acceptor]):
        return False
    for bond in drawing.at[acceptor]:
        if bond.dative and bond.end == acceptor and not is_metal(drawing.elements[bond.begin]):
            bond.dative = False
            drawing.charges[bond.begin] += 1
            drawing.charges[acceptor] -= 1
            return True
    return False


def arrow_onto_metal(drawing: Drawing, donor: int) -> bool:
    """N3, onium and overfull donors."""
    if (ELEMENTS[drawing.elements[donor]].group or 0) < 15:
        return False
    overfull = _is_overfull(drawing, donor)
    if not overfull and not _is_onium(drawing, donor):
        return False
    for bond in drawing.at[donor]:
        if is_metal(drawing.elements[bond.other(donor)]) and bond.order == 1 and not bond.dative:
            _point(bond, donor)
            if not overfull:
                drawing.charges[donor] -= 1
                drawing.charges[bond.end] += 1
            return True
    return False


def carbonyl_arrow(drawing: Drawing, carbon: int) -> bool:
    """N3, carbonyls."""
    if drawing.elements[carbon] != "C" or len(drawing.at[carbon]) != 2:
        return False
    first, second = drawing.at[carbon]
    to_metal, to_oxygen = (
        (first, second) if is_metal(drawing.elements[first.other(carbon)]) else (second, first)
    )
    metal, oxygen = to_metal.other(carbon), to_oxygen.other(carbon)
    if not is_metal(drawing.elements[metal]) or to_metal.dative:
        return False
    if drawing.elements[oxygen] != "O" or not is_terminal(drawing, oxygen):
        return False
    pattern = (to_metal.order, to_oxygen.order, drawing.charges[oxygen], drawing.charges[carbon])
    if pattern == (1, 3, 1, 0):
        drawing.charges[metal] += 1
    elif pattern == (2, 2, 0, 0):
        drawing.charges[oxygen] = 1
    elif pattern == (1, 2, 0, -1):
        drawing.charges[oxygen] = 1
        drawing.charges[metal] -= 1
    else:
        return False
    drawing.charges[carbon] = -1
    to_oxygen.order = 3
    to_metal.order = 1
    _point(to_metal, carbon)
    return True


def _is_overfull(drawing: Drawing, donor: int) -> bool:
    """Nine electrons around a neutral donor: one bond too many for its own electrons."""
    if drawing.charges[donor] != 0:
        return False
    return shell_electrons(drawing, donor) == 9 or exceeds_octet(drawing, donor)


def _is_onium(drawing: Drawing, donor: int) -> bool:
    """A positive donor whose charge no negative neighbour but the metal balances."""
    return drawing.charges[donor] == 1 and not any(
        drawing.charges[bond.other(donor)] < 0 and not is_metal(drawing.elements[bond.other(donor)])
        for bond in drawing.at[donor]
    )


def _point(bond: DrawnBond, donor: int) -> None:
    bond.begin, bond.end, bond.dative = donor, bond.other(donor), True
