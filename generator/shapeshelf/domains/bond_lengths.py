"""Lengths of bonds from covalent radii, bond order, polarity and the repulsion of lone pairs.

    r = R_A(n) + R_B(n) + h_A + h_B - c |chi_A - chi_B|^p + l_A l_B (2 - n) + m (n)

R(n) are the radii of P. Pyykkö and M. Atsumi, interpolated in bond order n. The polarity term
has the form of V. Schomaker and D. P. Stevenson, J. Am. Chem. Soc. 63 (1941) 37, with an exponent
as in R. Blom and A. Haaland, J. Mol. Struct. 128 (1985) 21. h is the change of carbon's radius
with its number of electron domains, l the repulsion of lone pairs that lengthens O-O, N-F and
their like, m what multiple bonds of heavy atoms gain. Citations recalled from memory.

The numbers below were refitted on the bonds of ase.data.g2 (L. A. Curtiss et al., J. Chem. Phys.
106 (1997) 1063) and on some 100 textbook bond lengths recalled from memory; bonds to hydrogen
take no polarity term.
"""

from math import log10

from shapeshelf.reference.elements import ELEMENTS, Element

POLARITY_ANGSTROM = 0.064
POLARITY_OF_CARBON_ANGSTROM = 0.020
POLARITY_EXPONENT = 1.665
CARBON_BY_DOMAINS_ANGSTROM = {4: 0.016, 3: -0.002, 2: -0.015}
CONJUGATION_ANGSTROM = 0.033
LONE_PAIRS = {"N": 0.198, "O": 0.463, "F": 0.361, "Cl": 0.180, "Br": 0.105, "I": 0.105}
"""Square root of ångström, so that the product of two is a length."""
HEAVY_MULTIPLE_ANGSTROM = 0.049
TRIPLE_ANGSTROM = 0.048
XENON_SINGLE_ANGSTROM = 0.094
XENON_DOUBLE_RADIUS_ANGSTROM = 1.23
"""The tabulated double-bond radius of xenon, 1.35, is longer than its single-bond radius."""
HALF_BOND_ANGSTROM = 0.50
"""Bonds of an order below one lengthen by this times its logarithm: the form of L. Pauling, J.
Am. Chem. Soc. 69 (1947) 542 (recalled from memory), whose factor is 0.6; ours gives the bridges of
B2H6, Ga2H6, Al2(CH3)6 and HF2- within 0.03 Å of their lengths (recalled from memory)."""
UNKNOWN_RADIUS_ANGSTROM = 1.5
ELECTROPOSITIVE = frozenset({"Li", "Be", "B", "Na", "Mg", "Al", "Si", "Ga", "Ge", "Sn"})


def bond_length_angstrom(
    element_a: str, element_b: str, order: float, domains_a: int = 4, domains_b: int = 4
) -> float:
    """Return the expected length, in ångström, of a bond of ``order`` between two elements.

    ``domains_a`` and ``domains_b`` are the numbers of electron domains of the two atoms.
    """
    a, b = ELEMENTS[element_a], ELEMENTS[element_b]
    length = radius_angstrom(a, order) + radius_angstrom(b, order)
    length += _carbon_angstrom(element_a, domains_a) + _carbon_angstrom(element_b, domains_b)
    length -= polarity_angstrom(a, b)
    length += _lone_pair_angstrom(element_a, element_b, order)
    return length + _order_angstrom(a, b, order, (domains_a, domains_b))


def radius_angstrom(element: Element, order: float) -> float:
    """Return the covalent radius, in ångström, for a bond of ``order`` (0.5 to 3)."""
    single = element.single_radius_angstrom or UNKNOWN_RADIUS_ANGSTROM
    double = element.double_radius_angstrom or single
    if element.symbol == "Xe":
        double = XENON_DOUBLE_RADIUS_ANGSTROM
    triple = min(element.triple_radius_angstrom or double, double)
    if order <= 2:
        return single + (double - single) * (max(order, 1) - 1)
    return double + (triple - double) * (min(order, 3) - 2)


def _carbon_angstrom(element: str, domains: int) -> float:
    return CARBON_BY_DOMAINS_ANGSTROM.get(domains, 0.0) if element == "C" else 0.0


def polarity_angstrom(a: Element, b: Element) -> float:
    """Return by how much polarity shortens a bond between two elements, in ångström."""
    pair = {a.symbol, b.symbol}
    if "H" in pair or a.electronegativity is None or b.electronegativity is None:
        return 0.0
    difference = abs(a.electronegativity - b.electronegativity)
    soft = "C" in pair and not pair & ELECTROPOSITIVE
    scale = POLARITY_OF_CARBON_ANGSTROM if soft else POLARITY_ANGSTROM
    return scale * float(difference**POLARITY_EXPONENT)


def _lone_pair_angstrom(element_a: str, element_b: str, order: float) -> float:
    pair = LONE_PAIRS.get(element_a, 0.0) * LONE_PAIRS.get(element_b, 0.0)
    return pair * max(0.0, 2 - max(order, 1))


def _order_angstrom(a: Element, b: Element, order: float, domains: tuple[int, int]) -> float:
    pair = {a.symbol, b.symbol}
    change = XENON_SINGLE_ANGSTROM if "Xe" in pair and order <= 1 else 0.0
    if order <= 1 and max(domains) <= 3 and "H" not in pair:
        between = domains.count(2) if pair <= {"C", "N"} else 0
        change -= CONJUGATION_ANGSTROM * (1 + between)
    if order > 1 and max(a.period, b.period) >= 3 and a.symbol != "C" != b.symbol:
        change -= HEAVY_MULTIPLE_ANGSTROM * (min(order, 2) - 1)
    if 0 < order < 1:
        change -= HALF_BOND_ANGSTROM * log10(order)
    return change + TRIPLE_ANGSTROM * max(0.0, order - 2)
