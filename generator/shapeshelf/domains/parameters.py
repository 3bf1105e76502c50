"""From the chemistry of a centre A to the numbers of the repulsion: the fitted parameters.

    bond to X:       ln w = -a (chi_X - chi_A) + h [X = H, A in period 3 or below]
                            + (D + D_s [A in period 2, X has more ligands]) (n - 1)
    lone pair:       ln w = L_2 + L_p [three bonds] (A in period 2) or L_3 (A in period 3 or below)
    single electron: ln w = s
    contact radius:  R_X = single-bond covalent radius + delta + size [X has two more ligands]
    right angles:    kappa (period of A - 2), A in period 3 or below with a lone pair and at most
                     six domains, all that three p orbitals can serve; else 0

chi are Pauling's electronegativities, radii those of Pyykkö and Atsumi (reference/elements.py).
n is the bond order; a terminal oxygen or its kin counts 2 however it is drawn, since what it
lacks in bond order it makes up in lone pairs given back (common practice, no source). A double
bond with one pi plane (A in period 2, or X with more ligands) is split into two halves at
beta = 45 degrees, less so as n leaves 2; other multiple bonds are round.
"""

import math
from dataclasses import dataclass
from functools import cache

import numpy as np

from shapeshelf.domains.bond_lengths import UNKNOWN_RADIUS_ANGSTROM, bond_length_angstrom
from shapeshelf.domains.model import DomainKind
from shapeshelf.domains.repulsion import Problem, problem_for
from shapeshelf.reference.elements import ELEMENTS

UNKNOWN_ELECTRONEGATIVITY = 1.5
TERMINAL_ORDER = 2.0
CHALCOGENS = frozenset({"O", "S", "Se", "Te"})
SPLIT_RADIANS = math.pi / 4
P_ORBITAL_DOMAINS = 6
SHARED_ORDERS = (1.2, 2.5)
"""Bond orders between which a bond counts as double in the rule for shared double bonds."""


@dataclass(frozen=True, slots=True)
class Parameters:
    """The numbers fitted to measured angles by tests/benchmarks/fit_domain_model.py."""

    electronegativity: float = 0.150
    order: float = 0.536
    order_shared: float = -0.250
    hydrogen_heavy: float = -0.180
    lone_pair_light: float = 0.653
    lone_pair_heavy: float = 0.541
    lone_pair_pyramidal: float = -0.238
    single_electron: float = 0.057
    ln_contact: float = -2.531
    radius_angstrom: float = 0.331
    size_angstrom: float = 0.070
    orthogonality: float = 0.017


FITTED = Parameters()


@dataclass(frozen=True, slots=True, order=True)
class DomainTraits:
    """All that the model knows of one domain: equal traits repel equally."""

    kind: DomainKind
    element: str = ""
    order: float = 0.0
    neighbours: int = 0
    """Atoms bonded to the atom at the other end, this centre among them; at most 3 are told."""


def problem_of(
    element: str, domains: tuple[DomainTraits, ...], parameters: Parameters = FITTED
) -> Problem:
    """Return the repulsion problem of the centre ``element`` with its domains, in order."""
    period = ELEMENTS[element].period
    paired = any(domain.kind is DomainKind.LONE_PAIR for domain in domains)
    right_angles = max(period - 2, 0) if paired and len(domains) <= P_ORBITAL_DOMAINS else 0
    return problem_for(
        np.array([math.exp(value) for value in _log_weights(element, domains, parameters)]),
        np.array([split_radians(element, domain) for domain in domains]),
        np.array([_length(element, domain, len(domains)) for domain in domains]),
        np.array([_contact_radius(domain, parameters) for domain in domains]),
        math.exp(parameters.ln_contact),
        parameters.orthogonality * right_angles,
    )


def split_radians(element: str, domain: DomainTraits) -> float:
    """Return beta, the angle between a double bond and each of its halves; 0 if it is round."""
    if domain.kind is not DomainKind.BOND or not 1 < domain.order < 3:
        return 0.0
    planar = ELEMENTS[element].period <= 2 or domain.neighbours >= 2
    return SPLIT_RADIANS * (1 - abs(domain.order - 2)) if planar else 0.0


def _log_weights(
    element: str, domains: tuple[DomainTraits, ...], parameters: Parameters
) -> list[float]:
    pair = parameters.lone_pair_heavy
    if ELEMENTS[element].period <= 2:
        bonds = sum(domain.kind is DomainKind.BOND for domain in domains)
        pair = parameters.lone_pair_light + parameters.lone_pair_pyramidal * (bonds == 3)
    unshared = {DomainKind.LONE_PAIR: pair, DomainKind.SINGLE_ELECTRON: parameters.single_electron}
    return [
        unshared[domain.kind]
        if domain.kind in unshared
        else _bond_log_weight(element, domain, parameters)
        for domain in domains
    ]


def _bond_log_weight(element: str, domain: DomainTraits, parameters: Parameters) -> float:
    light = ELEMENTS[element].period <= 2
    difference = _electronegativity(domain.element) - _electronegativity(element)
    low, high = SHARED_ORDERS
    shared = light and domain.neighbours >= 2 and low < domain.order < high
    multiple = parameters.order + parameters.order_shared * shared
    hydrogen = 0.0 if light or domain.element != "H" else parameters.hydrogen_heavy
    return (
        -parameters.electronegativity * difference + multiple * (_repelling_order(domain) - 1)
    ) + hydrogen


def _repelling_order(domain: DomainTraits) -> float:
    """Return the order that counts in repulsion: below one for half of a three-centre bond."""
    if domain.element in CHALCOGENS and domain.neighbours == 1:
        return max(domain.order, TERMINAL_ORDER)
    return domain.order


def _length(element: str, domain: DomainTraits, domains: int) -> float:
    if domain.kind is not DomainKind.BOND:
        return 0.0
    other = 4 if domain.order <= 1 else 3
    return bond_length_angstrom(element, domain.element, domain.order, domains, other)


def _contact_radius(domain: DomainTraits, parameters: Parameters) -> float:
    if domain.kind is not DomainKind.BOND:
        return 0.0
    radius = ELEMENTS[domain.element].single_radius_angstrom or UNKNOWN_RADIUS_ANGSTROM
    size = parameters.size_angstrom if domain.neighbours >= 3 else 0.0
    return radius + parameters.radius_angstrom + size


@cache
def _electronegativity(element: str) -> float:
    value = ELEMENTS[element].electronegativity
    return UNKNOWN_ELECTRONEGATIVITY if value is None else value
