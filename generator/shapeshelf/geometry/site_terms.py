"""What the site of a bond adds to its length: numbered terms, and their fitted numbers.

For a bond of A to X the terms below are added to domains/bond_lengths.py, those of each end that
is a centre. V is the valence of A (its oxidation state, as the drawing counts it), N the sum of
its bond orders, g its group. All single bonds, but for L6, L7 and L8.

L1  -v ln(V/N)      a centre that binds more partners than it has valences, as anions and metal
                    complexes do; the form of I. D. Brown and D. Altermatt, Acta Cryst. B41 (1985)
                    244, whose factor is 0.37. One v for the main groups, one for metals
L2  d               a donor's pair to a centre of group 13, beside L1
L3  bonds that share an orbital with a bond opposite to them (three centres, four electrons:
    G. C. Pimentel, J. Chem. Phys. 19 (1951) 446; R. E. Rundle, J. Am. Chem. Soc. 85 (1963) 112),
    axial or basal ones: t if A has lone pairs, and s if X is of period 3 or below. Of all bonds
    at such a centre with lone pairs also u (V - 4) + w (g - 16): the higher the charge on A the
    shorter. In a pentagonal arrangement the bonds in the plane are the ones that share
L4  b               at a centre without lone pairs, and any other bond than L3's at five domains
    p               at a centre with a lone pair and at most four domains, but not P, whose
                    tabulated radius fits its trihalides (both for A of period 3 or below, B, Be,
                    and X more electronegative)
L5  n, f            X opposite the pi bonds of a nitro or nitroso nitrogen, f more if X is not F
                    and A has a lone pair; k at the like heavy centre (SOCl2): a lone pair gives
                    into the antibond of A-X
L6  multiple bonds at heavy A: c for A = Cl; double bonds that resonance does not share (n = 2):
    q with a lone pair and at most four domains, e in period 4 or below
L7  j min(1, 4 - 2 n)  terminal O at N without a lone pair
L8  a, y            at a carbon with two domains, X not C or N; C=X beside halogens
L9  d block: m times the polarity term taken back, but for single bonds at a d0 centre, which get
    z (g - 5); l at a low-spin centre, whose antibonding orbitals are empty

Citations recalled from memory. The numbers, in ångström, are printed by
tests/benchmarks/fit_bond_lengths.py. Of its 377 bonds, most of them recalled from handbooks, held
back by molecule, the mean error is 0.027 Å (0.065 without these terms); the forms
were chosen with the same table in view. No rule here describes S2F2, O2F2 or the short axial
bonds of IF7.
"""

import math
from collections.abc import Iterator
from dataclasses import dataclass

from shapeshelf.domains.bond_lengths import polarity_angstrom
from shapeshelf.domains.metals import Donor
from shapeshelf.reference.elements import ELEMENTS, Element

SITE_ANGSTROM = {
    "valence": 0.164,
    "valence_metal": 0.293,
    "dative": 0.123,
    "opposed_paired": 0.079,
    "opposed_soft": 0.063,
    "crowded_valence": -0.016,
    "crowded_group": -0.036,
    "bare": -0.022,
    "paired": 0.036,
    "nitro": 0.143,
    "nitroso_soft": 0.124,
    "sulfinyl_soft": 0.044,
    "multiple_paired": 0.035,
    "multiple_late": 0.026,
    "multiple_chlorine": -0.054,
    "nitro_oxygen": -0.092,
    "two_domains": -0.055,
    "acyl": -0.035,
    "metal_polarity": 0.759,
    "empty_shell": 0.029,
    "low_spin": -0.050,
}
"""In the order of L1 to L9: v for main groups and metals, d, t, s, u, w, b, p, n, f, k, q, e, c,
j, a, y, m (a factor), z, l."""
MULTIPLE_ORDER = 1.05
DOUBLE_ORDER = 1.9
LEAST_SHARE = 0.25
MORE_ELECTRONEGATIVE = 0.2
PI_ACCEPTORS = frozenset(
    {Donor.CARBONYL, Donor.CYANIDE, Donor.CARBON, Donor.PHOSPHORUS, Donor.HYDRIDE}
)

Terms = Iterator[tuple[str, float]]


@dataclass(frozen=True, slots=True)
class Site:
    """A bond as seen from the centre A at one of its ends; X is the atom at the other."""

    element: str
    ligand: str
    order: float
    terminal: bool
    """Whether X has no other neighbour."""
    pairs: int
    """Lone pairs and single electrons of A; none for a metal."""
    domains: int
    valence: float
    share: float
    """V/N; 1 where A binds as many as it has valences."""
    opposed: bool
    """Whether it is a bond of L3 by its place."""
    oxo: bool
    """Whether A has another bond, a multiple one, to a terminal atom."""
    halogens: int
    """Halogen atoms at A beside X."""
    given: bool
    """Whether X gives the pair of the bond to a main-group A."""
    donor: Donor | None = None
    """What X is to a metal A."""
    d_electrons: int = 0
    low_spin: bool = False
    singles: int = 0
    """Single electrons of A, counted among ``pairs`` too."""


def site_terms(site: Site) -> Terms:
    """Yield the name and the weight of every term of one end of a bond; none in the f block."""
    centre, ligand = ELEMENTS[site.element], ELEMENTS[site.ligand]
    if centre.group is None:
        return
    if site.donor is not None:
        yield from _metal_terms(site, centre, ligand)
    elif site.ligand == "H":
        yield from _valence_terms(site, centre)
    elif site.element == "C":
        yield from _carbon_terms(site, ligand)
    elif site.element == "N":
        yield from _nitrogen_terms(site)
    elif centre.period >= 3 or site.element in ("B", "Be"):
        yield from _valence_terms(site, centre)
        yield from _heavy_terms(site, centre, ligand)


def _is_single(site: Site) -> bool:
    return 1 <= site.order <= MULTIPLE_ORDER


def _is_polar(centre: Element, ligand: Element) -> bool:
    if centre.electronegativity is None or ligand.electronegativity is None:
        return False
    return ligand.electronegativity > centre.electronegativity + MORE_ELECTRONEGATIVE


def _metal_terms(site: Site, metal: Element, ligand: Element) -> Terms:
    """L9, and L1 and L3 for metals."""
    if site.donor in PI_ACCEPTORS:
        return
    if not _is_single(site):
        yield "metal_polarity", polarity_angstrom(metal, ligand)
        return
    yield "valence_metal", -math.log(max(site.share, LEAST_SHARE))
    if site.d_electrons:
        yield "metal_polarity", polarity_angstrom(metal, ligand)
        yield "low_spin", float(site.low_spin)
    else:
        yield "empty_shell", float((metal.group or 5) - 5)
    if site.opposed and site.domains == 5 and ligand.period >= 3:
        yield "opposed_soft", 1.0


def _valence_terms(site: Site, centre: Element) -> Terms:
    """L1 and L2; hydrogen at a centre with an octet and lone pairs keeps its length."""
    if not _is_single(site):
        return
    counted = site.pairs == 0 or site.domains > 4
    counted = counted or _is_polar(centre, ELEMENTS[site.ligand])
    if counted and (centre.period >= 3 or centre.group == 13):
        yield "valence", -math.log(max(site.share, LEAST_SHARE))
    if site.given and centre.group == 13:
        yield "dative", 1.0


def _carbon_terms(site: Site, ligand: Element) -> Terms:
    """L8."""
    if site.domains == 2 and site.order < 2.5 and site.ligand not in "CN":
        yield "two_domains", float((ligand.group or 0) > 12)
    if site.domains == 3 and site.order > 1.5 and site.halogens:
        yield "acyl", 1.0


def _nitrogen_terms(site: Site) -> Terms:
    """L5 and L7."""
    if site.ligand == "O":
        bare = site.terminal and site.pairs == site.singles
        yield "nitro_oxygen", bare * max(0.0, min(1.0, 4 - 2 * site.order))
    elif site.oxo and _is_single(site):
        yield "nitro", 1.0
        yield "nitroso_soft", float(site.pairs > 0 and site.ligand != "F")


def _heavy_terms(site: Site, centre: Element, ligand: Element) -> Terms:
    """L3 to L6."""
    paired = float(site.pairs > 0)
    if site.order > MULTIPLE_ORDER:
        whole = site.order >= DOUBLE_ORDER
        yield "multiple_paired", paired * whole * (site.domains <= 4)
        yield "multiple_late", float(whole and centre.period >= 4)
        yield "multiple_chlorine", float(site.element == "Cl")
    elif _is_single(site) and site.domains >= 5:
        yield from _crowded_terms(site, centre, ligand)
    elif _is_single(site) and _is_polar(centre, ligand):
        yield "bare", float(not site.pairs)
        yield "paired", paired * (site.element != "P")
        yield "sulfinyl_soft", paired * site.oxo * (ligand.period >= 3)


def _crowded_terms(site: Site, centre: Element, ligand: Element) -> Terms:
    """L3, and L4 for the other bonds of such a centre."""
    if site.opposed:
        yield "opposed_paired", float(site.pairs > 0)
        yield "opposed_soft", float(ligand.period >= 3)
    elif _is_polar(centre, ligand):
        yield "bare", 1.0
    if site.pairs:
        yield "crowded_valence", site.valence - 4
        yield "crowded_group", float((centre.group or 16) - 16)
