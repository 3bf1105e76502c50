"""Normalising rules N11 and N12: bridges drawn without charges or arrows (see normalising.py).

Also what a three-centre bridge is: an atom without lone pairs that holds two atoms together.
"""

from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.drawing import (
    Drawing,
    DrawnBond,
    exceeds_octet,
    free_electrons,
    is_metal,
    shell_electrons,
)

PAIRLESS = frozenset({"H", "C"})
"""Elements that bridge by a three-centre bond, having no lone pair to give."""


def bridge_by_pair(drawing: Drawing, donor: int) -> bool:
    """N11."""
    group = ELEMENTS[drawing.elements[donor]].group or 0
    if group < 15 or drawing.charges[donor] != 0 or not _is_overfull(drawing, donor):
        return False
    takers = [bond.other(donor) for bond in drawing.at[donor] if _lacks_one(drawing, bond, donor)]
    if not takers:
        return False
    taker = max(takers, key=lambda atom: drawing.ranks[atom])
    drawing.charges[donor] += 1
    drawing.charges[taker] -= 1
    return True


def neutral_bridge(drawing: Drawing, bridge: int) -> bool:
    """N12."""
    if drawing.charges[bridge] <= 0 or not is_three_centre_bridge(drawing, bridge):
        return False
    bearers = [
        bond.other(bridge)
        for bond in bridging_bonds(drawing, bridge)
        if drawing.charges[bond.other(bridge)] < 0
    ]
    if not bearers:
        return False
    bearer = max(bearers, key=lambda atom: (-drawing.charges[atom], drawing.ranks[atom]))
    drawing.charges[bridge] -= 1
    drawing.charges[bearer] += 1
    return True


def is_three_centre_bridge(drawing: Drawing, atom: int) -> bool:
    """Tell whether ``atom`` holds electron-poor atoms together with more bonds than electrons."""
    if drawing.elements[atom] not in PAIRLESS or free_electrons(drawing, atom) >= 0:
        return False
    return len(bridging_bonds(drawing, atom)) >= 2


def bridging_bonds(drawing: Drawing, atom: int) -> list[DrawnBond]:
    """Return the plain single bonds of ``atom`` to metals and to groups 2 and 13."""
    return [
        bond
        for bond in drawing.at[atom]
        if bond.order == 1 and not bond.dative and is_electron_poor(drawing, bond.other(atom))
    ]


def is_electron_poor(drawing: Drawing, atom: int) -> bool:
    """Tell whether the element has fewer valence electrons than orbitals: up to group 13."""
    element = drawing.elements[atom]
    return element != "H" and (is_metal(element) or ELEMENTS[element].group in (2, 13))


def shared_debt(drawing: Drawing, atom: int) -> int:
    """Return how many electrons ``atom`` may lack because its three-centre bonds lend them."""
    half = sum(is_three_centre_bridge(drawing, bond.other(atom)) for bond in drawing.at[atom])
    return (half + 1) // 2


def _is_overfull(drawing: Drawing, atom: int) -> bool:
    """One bond too many for its own electrons, and all of them single."""
    if any(bond.order > 1 or bond.dative for bond in drawing.at[atom]):
        return False
    return shell_electrons(drawing, atom) == 9 or exceeds_octet(drawing, atom)


def _lacks_one(drawing: Drawing, bond: DrawnBond, donor: int) -> bool:
    """Tell whether the other end has a bond without an electron of its own for it."""
    atom = bond.other(donor)
    if is_metal(drawing.elements[atom]) or _is_overfull(drawing, atom):
        return False
    free = free_electrons(drawing, atom)
    return free < 0 or free % 2 == 1
