"""From the chemistry of a centre to the numbers of the repulsion: the fitted parameters.

    bond:            ln w = -a (chi_X - chi_A) + (D + D3 [period of A >= 3]) (order - 1)
                            + h3 [X = H, period of A >= 3]
    lone pair:       ln w = L2 (A in period 2) or L3 (period 3 and below)
    single electron: ln w = s
    contact radius:  R_X = single-bond covalent radius + delta

chi are Pauling's electronegativities, radii those of Pyykkö and Atsumi (reference/elements.py).
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


@dataclass(frozen=True, slots=True)
class Parameters:
    """The numbers fitted to measured angles by tests/benchmarks/fit_domain_model.py."""

    electronegativity: float = 0.264
    order: float = 0.453
    order_heavy: float = 0.261
    hydrogen_heavy: float = -0.253
    lone_pair_light: float = 0.995
    lone_pair_heavy: float = 0.780
    single_electron: float = 0.198
    ln_contact: float = -2.72
    radius_angstrom: float = 0.421


FITTED = Parameters()


@dataclass(frozen=True, slots=True, order=True)
class DomainTraits:
    """All that the model knows of one domain: equal traits repel equally."""

    kind: DomainKind
    element: str = ""
    order: float = 0.0
    planar: bool = False
    """A double bond with one pi plane rather than a round one."""


def problem_of(
    element: str, domains: tuple[DomainTraits, ...], parameters: Parameters = FITTED
) -> Problem:
    """Return the repulsion problem of the centre ``element`` with its domains, in order."""
    weights = [math.exp(_log_weight(element, domain, parameters)) for domain in domains]
    bonds = [domain.kind is DomainKind.BOND for domain in domains]
    lengths = [
        bond_length_angstrom(element, domain.element, domain.order) if bond else 0.0
        for domain, bond in zip(domains, bonds, strict=True)
    ]
    radii = [
        _contact_radius(domain.element, parameters) if bond else 0.0
        for domain, bond in zip(domains, bonds, strict=True)
    ]
    return problem_for(
        np.array(weights),
        np.zeros(len(domains)),
        np.array(lengths),
        np.array(radii),
        math.exp(parameters.ln_contact),
        0.0,
    )


def _log_weight(element: str, domain: DomainTraits, parameters: Parameters) -> float:
    heavy = ELEMENTS[element].period >= 3
    if domain.kind is DomainKind.LONE_PAIR:
        return parameters.lone_pair_heavy if heavy else parameters.lone_pair_light
    if domain.kind is DomainKind.SINGLE_ELECTRON:
        return parameters.single_electron
    difference = _electronegativity(domain.element) - _electronegativity(element)
    multiple = parameters.order + parameters.order_heavy * heavy
    hydrogen = parameters.hydrogen_heavy * (heavy and domain.element == "H")
    return -parameters.electronegativity * difference + multiple * (domain.order - 1) + hydrogen


@cache
def _electronegativity(element: str) -> float:
    value = ELEMENTS[element].electronegativity
    return UNKNOWN_ELECTRONEGATIVITY if value is None else value


def _contact_radius(element: str, parameters: Parameters) -> float:
    radius = ELEMENTS[element].single_radius_angstrom or UNKNOWN_RADIUS_ANGSTROM
    return radius + parameters.radius_angstrom
