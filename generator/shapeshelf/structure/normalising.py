"""One drawing for every spelling of a structure.

The rules, applied in this order and repeated until none of them changes anything:

N1  An arrow from an anion, D(-) -> A, is a plain bond: D-A(-), unless the donor's charge is
    balanced by a positive neighbour (carbon monoxide, isocyanides).
N2  An arrow onto a main-group acceptor is a plain bond between charges: D(+)-A(-).
N3  A donor drawn with a plain bond to a metal that leaves it no lone pair (onium, or more bonds
    than its octet allows) gives its pair along an arrow: D -> M. A carbonyl drawn M=C=O,
    M-C#O(+) or M-C(-)=O is M <- [C-]#[O+].
N4  An atom of period 2 with more than an octet gives up one bond of a multiple bond: the
    most electronegative neighbour, terminal ones first, takes the pair, N=O is N(+)-O(-).
N5  An atom of period 2 with less than an octet and a positive charge takes a pair from a
    negative neighbour: C(+)-O(-) is C=O. So does an atom of groups 14 to 18 from period 3 on,
    whatever its shell: S(+)-O(-) is S=O, P(+)-C(-) is P=C. A halogen takes none from a less
    electronegative neighbour, to which it is a bridge.
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

N10 A carbanion next to C=O, C=S or N(+)=O is an enolate: C(-)-C=O is C=C-O(-). At a positive
    nitrogen between two atoms the charge goes to the terminal nitrogen: N(-)-N(+)#N is
    N=N(+)=N(-), C(-)-N(+)#N is C=N(+)=N(-).
N11 A bridge drawn with plain bonds and no charges is one by a lone pair: X-A with one bond too
    many at X (groups 15 to 17) and an electron missing at A is X(+)-A(-), as in Al2Cl6.
N12 A hydrogen or carbon that bridges electron-poor atoms (groups 1 to 13) by a three-centre bond
    is neutral: B(-)-H(+)-B is B-H-B.

Atoms are visited, and chosen where several would do, in the order of their colour classes: the
order they stand in decides nothing.

The octet of period 2, and multiple bonds for heavier centres, are the drawings that the IUPAC
Recommendations 2008 on graphical representation of structures (Pure Appl. Chem. 80, 277,
recalled) prefer or accept.
"""

from collections.abc import Callable

from shapeshelf.structure.arrow_rules import (
    arrow_onto_metal,
    carbonyl_arrow,
    plain_anion_arrow,
    plain_main_group_arrow,
)
from shapeshelf.structure.bridge_rules import bridge_by_pair, neutral_bridge
from shapeshelf.structure.charge_rules import (
    charge_along_chain,
    charge_to_electronegative,
    charge_to_terminal,
)
from shapeshelf.structure.colouring import colour_classes
from shapeshelf.structure.drawing import Drawing
from shapeshelf.structure.molecule import Atom, Bond
from shapeshelf.structure.octet_rules import (
    filled_sextet,
    joined_charges,
    octet_of_period_two,
    radical_to_centre,
)

Rule = Callable[[Drawing, int], bool]
"""Apply a rule once at an atom; tell whether the drawing changed."""

RULES: tuple[Rule, ...] = (
    plain_anion_arrow,
    plain_main_group_arrow,
    bridge_by_pair,
    neutral_bridge,
    arrow_onto_metal,
    carbonyl_arrow,
    octet_of_period_two,
    joined_charges,
    charge_to_terminal,
    charge_to_electronegative,
    radical_to_centre,
    filled_sextet,
    charge_along_chain,
)


def normalise(drawing: Drawing) -> None:
    """Bring ``drawing`` to the one normalised form, in place, by rules N1 to N12."""
    drawing.ranks = _ranks(drawing)
    order = sorted(range(len(drawing.elements)), key=lambda atom: drawing.ranks[atom])
    # Every rule lowers a count (arrows, charges, excess electrons) or moves a charge one way, so
    # this ends; the bound only guards against a drawing that is beyond all of them.
    for _ in range(8 * len(drawing.elements) + 8):
        if not any(_sweep(rule, drawing, order) for rule in RULES):
            return


def _sweep(rule: Rule, drawing: Drawing, order: list[int]) -> bool:
    changes = [rule(drawing, atom) for atom in order]
    return any(changes)


def _ranks(drawing: Drawing) -> list[int]:
    """Number the atoms by their place in the bond graph alone."""
    atoms = [Atom(element, 0) for element in drawing.elements]
    bonds = [Bond(bond.begin, bond.end, 1) for bond in drawing.bonds]
    return list(colour_classes(atoms, bonds))
