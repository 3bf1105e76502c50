"""One drawing for every spelling of a structure.

The rules, applied in this order and repeated until none of them changes anything:

N1  An arrow from an anion, D(-) -> A, is a plain bond: D-A(-), unless the donor's charge is
    balanced by a positive neighbour (carbon monoxide, isocyanides).
N2  An arrow onto a main-group acceptor is a plain bond between charges: D(+)-A(-).
N3  A donor drawn with a plain bond to a metal that leaves it no lone pair (onium, or more bonds
    than its octet allows) gives its pair along an arrow: D -> M. A carbonyl drawn M=C=O or
    M-C#O(+) is M <- [C-]#[O+].
N4  An atom of period 2 with more than an octet gives up one bond of a multiple bond: the
    most electronegative neighbour, terminal ones first, takes the pair, N=O is N(+)-O(-).
N5  An atom of period 2 with less than an octet and a positive charge takes a pair from a
    negative neighbour: C(+)-O(-) is C=O. So does an atom of groups 14 to 18 from period 3 on,
    whatever its shell: S(+)-O(-) is S=O, P(+)-C(-) is P=C.
N6  A negative charge on an atom of groups 14 to 18, period 3 or later, goes to a doubly bonded
    terminal atom that is more electronegative: I(-)=O is I-O(-). So does that of a metal whose
    neighbours are terminal oxygens only: Mn(-)=O is Mn-O(-).
N7  Of two terminal atoms at one atom, the more electronegative one bears the charge:
    N(-)=C=O is N#C-O(-), S(-)-C=O is S=C-O(-).
N8  A terminal oxygen radical next to a lone pair hands the single electron on, where its
    partner is doubly bonded to oxygen already: O.-Cl=O is O=Cl.=O, and nitrogen dioxide is
    O(-)-N(+).=O.
N9  A terminal carbon with a sextet takes a lone pair of its multiply bonded neighbour: :C=O is
    C(-)#O(+), :C=N-R is C(-)#N(+)-R; so is C#N-R drawn without its charges.

The octet of period 2, and multiple bonds for heavier centres, are the drawings that the IUPAC
Recommendations 2008 on graphical representation of structures (Pure Appl. Chem. 80, 277,
recalled) prefer or accept.
"""

from collections.abc import Callable

from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.drawing import (
    Drawing,
    DrawnBond,
    electronegativity,
    free_electrons,
    given_pairs,
    is_heavy_p_block,
    is_metal,
    is_terminal,
    shell_electrons,
)

Rule = Callable[[Drawing, int], bool]
"""Apply a rule once at an atom; tell whether the drawing changed."""


def normalise(drawing: Drawing) -> None:
    """Bring ``drawing`` to the one normalised form, in place, by rules N1 to N9."""
    rules: tuple[Rule, ...] = (
        _plain_anion_arrow,
        _plain_main_group_arrow,
        _arrow_onto_metal,
        _carbonyl_arrow,
        _octet_of_period_two,
        _joined_charges,
        _charge_to_terminal,
        _charge_to_electronegative,
        _radical_to_centre,
        _filled_sextet,
    )
    # Every rule lowers a count (arrows, charges, excess electrons), so this ends; the bound
    # only guards against a drawing that is beyond all of them.
    for _ in range(8 * len(drawing.elements) + 8):
        if not any(_sweep(rule, drawing) for rule in rules):
            return


def _sweep(rule: Rule, drawing: Drawing) -> bool:
    changes = [rule(drawing, atom) for atom in range(len(drawing.elements))]
    return any(changes)


def _plain_anion_arrow(drawing: Drawing, donor: int) -> bool:
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


def _plain_main_group_arrow(drawing: Drawing, acceptor: int) -> bool:
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


def _arrow_onto_metal(drawing: Drawing, donor: int) -> bool:
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


def _is_overfull(drawing: Drawing, donor: int) -> bool:
    """Nine electrons around a neutral donor: one bond too many for its own electrons."""
    if drawing.charges[donor] != 0:
        return False
    return shell_electrons(drawing, donor) == 9 or _exceeds_octet(drawing, donor)


def _is_onium(drawing: Drawing, donor: int) -> bool:
    """A positive donor whose charge no negative neighbour but the metal balances."""
    return drawing.charges[donor] == 1 and not any(
        drawing.charges[bond.other(donor)] < 0 and not is_metal(drawing.elements[bond.other(donor)])
        for bond in drawing.at[donor]
    )


def _carbonyl_arrow(drawing: Drawing, carbon: int) -> bool:
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
    else:
        return False
    drawing.charges[carbon] = -1
    to_oxygen.order = 3
    to_metal.order = 1
    _point(to_metal, carbon)
    return True


def _point(bond: DrawnBond, donor: int) -> None:
    bond.begin, bond.end, bond.dative = donor, bond.other(donor), True


def _exceeds_octet(drawing: Drawing, atom: int) -> bool:
    return ELEMENTS[drawing.elements[atom]].period == 2 and shell_electrons(drawing, atom) > 8


def _octet_of_period_two(drawing: Drawing, atom: int) -> bool:
    """N4."""
    if drawing.charges[atom] != 0 or drawing.elements[atom] not in ("N", "O"):
        return False
    if not _exceeds_octet(drawing, atom):
        return False
    # An odd count is one bond too many by mistake, unless the atom is that of nitrogen dioxide.
    if shell_electrons(drawing, atom) % 2 == 1 and not _is_dioxide(drawing, atom):
        return False
    multiple = [bond for bond in drawing.at[atom] if bond.order > 1]
    if not multiple:
        return False

    def preference(bond: DrawnBond) -> tuple[bool, float, int]:
        other = bond.other(atom)
        element = drawing.elements[other]
        return (is_terminal(drawing, other), electronegativity(element), bond.order)

    bond = max(multiple, key=preference)
    bond.order -= 1
    drawing.charges[atom] += 1
    drawing.charges[bond.other(atom)] -= 1
    return True


def _is_dioxide(drawing: Drawing, atom: int) -> bool:
    ends = [bond.other(atom) for bond in drawing.at[atom]]
    return len(ends) == 2 and all(
        drawing.elements[end] == "O" and is_terminal(drawing, end) for end in ends
    )


def _joined_charges(drawing: Drawing, atom: int) -> bool:
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


def _gives_pair(drawing: Drawing, bond: DrawnBond, atom: int) -> bool:
    other = bond.other(atom)
    return (
        not bond.dative
        and bond.order < 3
        and drawing.charges[other] < 0
        and not is_metal(drawing.elements[other])
        and free_electrons(drawing, other) - 2 * given_pairs(drawing, other) >= 2
    )


def _partner_rank(drawing: Drawing, other: int) -> tuple[bool, float]:
    """Oxygen last: it keeps a charge best, so carbon and nitrogen are joined first."""
    return (is_terminal(drawing, other), -electronegativity(drawing.elements[other]))


def _charge_to_terminal(drawing: Drawing, atom: int) -> bool:
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
    bond = max(ends, key=lambda b: electronegativity(drawing.elements[b.other(atom)]))
    bond.order -= 1
    drawing.charges[bond.other(atom)] -= 1
    drawing.charges[atom] += 1
    return True


def _is_oxometallate(drawing: Drawing, atom: int) -> bool:
    ends = [bond.other(atom) for bond in drawing.at[atom]]
    return is_metal(drawing.elements[atom]) and all(
        drawing.elements[end] == "O" and is_terminal(drawing, end) for end in ends
    )


def _charge_to_electronegative(drawing: Drawing, atom: int) -> bool:
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


def _bears_charge(drawing: Drawing, atom: int) -> bool:
    return (
        is_terminal(drawing, atom)
        and drawing.charges[atom] < 0
        and free_electrons(drawing, atom) >= 2
    )


def _radical_to_centre(drawing: Drawing, atom: int) -> bool:
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


def _is_oxyl(drawing: Drawing, atom: int) -> bool:
    return (
        drawing.elements[atom] == "O"
        and drawing.charges[atom] == 0
        and is_terminal(drawing, atom)
        and free_electrons(drawing, atom) == 5
    )


def _filled_sextet(drawing: Drawing, atom: int) -> bool:
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
