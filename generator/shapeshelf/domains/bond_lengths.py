"""Lengths of bonds from covalent radii, bond order and the polarity of the bond.

    r = R_A(n) + R_B(n) - c |chi_A - chi_B|^1.4

with radii of P. Pyykkö and M. Atsumi, interpolated in bond order n, and the polarity term of
R. Blom and A. Haaland, J. Mol. Struct. 128 (1985) 21 (a changed Schomaker-Stevenson rule),
recalled from memory.
"""

from shapeshelf.reference.elements import ELEMENTS, Element

POLARITY_ANGSTROM = 0.085
POLARITY_EXPONENT = 1.4
UNKNOWN_RADIUS_ANGSTROM = 1.5


def bond_length_angstrom(element_a: str, element_b: str, order: float) -> float:
    """Return the expected length, in ångström, of a bond of ``order`` between two elements."""
    a, b = ELEMENTS[element_a], ELEMENTS[element_b]
    return radius_angstrom(a, order) + radius_angstrom(b, order) - _polarity_angstrom(a, b)


def radius_angstrom(element: Element, order: float) -> float:
    """Return the covalent radius, in ångström, for a bond of ``order`` (0.5 to 3)."""
    single = element.single_radius_angstrom or UNKNOWN_RADIUS_ANGSTROM
    double = element.double_radius_angstrom or single
    triple = element.triple_radius_angstrom or double
    if order <= 2:
        return single + (double - single) * (max(order, 1) - 1)
    return double + (triple - double) * (min(order, 3) - 2)


def _polarity_angstrom(a: Element, b: Element) -> float:
    if "H" in (a.symbol, b.symbol) or a.electronegativity is None or b.electronegativity is None:
        return 0.0
    difference = abs(a.electronegativity - b.electronegativity)
    return POLARITY_ANGSTROM * float(difference**POLARITY_EXPONENT)
