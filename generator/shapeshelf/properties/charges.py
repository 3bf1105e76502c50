"""Partial charges: how many electrons each bond moves from one end to the other.

The charge of an atom is its formal charge, averaged over the equal drawings, plus what these
terms move. Each term has one coefficient c, fitted by tests/benchmarks/fit_dipole_model.py
(charge_parameters.py), and moves c times its factor from a donor to an acceptor:

Q1  Every bond A-B moves c (chi_B - chi_A) towards B, and as much again of another c for each
    order above one; chi after Pauling.
Q2  Atoms differ from Pauling's number: each element, and each element with its number of
    electron domains, draws c towards itself along each of its bonds.
Q3  Each pair of elements has its own correction, and one for each order above one.
Q4  Induction: the other neighbours of A, having drawn on it, draw through it on B; factor: the
    sum of their chi less that of A.
Q5  Formal charges even out along the bonds; factor: the difference of the charges.
Q6  Mesomerism: in D-A=B, a donor D with a lone pair (``n``) or, by hyperconjugation, without one
    (``h``) gives to B; factor: the order of A=B above one. In B=A-D=E the far ends B and E, where
    of unlike elements, exchange; factor: the product of both orders above one.

A term without a fitted coefficient moves nothing. Models of this kind: bond-charge increments,
T. A. Halgren, J. Comput. Chem. 17 (1996) 520; induction along bonds, J. Gasteiger and M. Marsili,
Tetrahedron 36 (1980) 3219 (both recalled from memory).
"""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import cache

import numpy as np

from shapeshelf.domains.model import LewisCount
from shapeshelf.geometry.vectors import Array
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule

MULTIPLE = 1.1
"""Mean bond orders above this count as multiple."""
JOINED = 1.4
"""Mean bond orders up to this count as a single bond between pi bonds."""
LIKE_XENON = "Xe"
NOBLE_GASES = 18
UNTABULATED_METAL = 1.2
"""The untabulated elements other than noble gases are f-block metals; their neighbours' value."""


@dataclass(frozen=True, slots=True)
class Transfer:
    """``coefficient of term`` times ``factor`` electrons pass from ``donor`` to ``acceptor``."""

    term: str
    donor: int
    acceptor: int
    factor: float


@dataclass(frozen=True, slots=True)
class ChargeGraph:
    """What the terms need to know of a molecule, gathered once."""

    elements: tuple[str, ...]
    orders: tuple[Mapping[int, float], ...]
    """For each atom its neighbours and the mean orders of the bonds to them."""
    formal_charges: Array
    """(n,), averaged over drawings and equivalent atoms."""
    lone_pairs: tuple[int, ...]
    delocalised_pairs: tuple[int, ...]
    domains: tuple[int, ...]
    pull: Array
    """(n,), the neighbours' electronegativities less the atom's own, summed."""


@cache
def electronegativity(element: str) -> float:
    """Return Pauling's electronegativity; where none is tabulated, that of the nearest kin."""
    value = ELEMENTS[element].electronegativity
    if value is not None:
        return value
    if ELEMENTS[element].group == NOBLE_GASES:
        return electronegativity(LIKE_XENON)
    return UNTABULATED_METAL


def charge_graph(molecule: Molecule, lewis: LewisCount) -> ChargeGraph:
    """Return the molecule as the charge terms see it."""
    elements = tuple(atom.element for atom in molecule.atoms)
    orders: tuple[dict[int, float], ...] = tuple({} for _ in elements)
    for bond, order in zip(molecule.bonds, lewis.bond_orders, strict=True):
        orders[bond.begin][bond.end] = orders[bond.end][bond.begin] = order
    chi = [electronegativity(element) for element in elements]
    return ChargeGraph(
        elements=elements,
        orders=orders,
        formal_charges=_mean_formal_charges(molecule, lewis),
        lone_pairs=tuple(atom.lone_pairs for atom in lewis.atoms),
        delocalised_pairs=tuple(atom.delocalised_pairs for atom in lewis.atoms),
        domains=tuple(
            len(around) + atom.lone_pairs - atom.delocalised_pairs + (atom.single_electrons > 0)
            for around, atom in zip(orders, lewis.atoms, strict=True)
        ),
        pull=np.array(
            [sum(chi[j] - chi[i] for j in around) for i, around in enumerate(orders)], float
        ),
    )


def transfers(molecule: Molecule, graph: ChargeGraph) -> tuple[Transfer, ...]:
    """Return every term Q1 to Q6 of the molecule, fitted or not."""
    found: list[Transfer] = []
    for bond in molecule.bonds:
        first, second = sorted((bond.begin, bond.end), key=lambda atom: graph.elements[atom])
        found.extend(_of_bond(graph, first, second))
        found.extend(_conjugated(graph, first, second))
    for middle in range(len(graph.elements)):
        found.extend(_mesomeric(graph, middle))
    return tuple(found)


def partial_charges(
    graph: ChargeGraph, moved: tuple[Transfer, ...], coefficients: Mapping[str, float]
) -> Array:
    """Return the charge (n,) of every atom in elementary charges."""
    charges = graph.formal_charges.copy()
    for transfer in moved:
        electrons = coefficients.get(transfer.term, 0.0) * transfer.factor
        charges[transfer.donor] += electrons
        charges[transfer.acceptor] -= electrons
    return charges


def _mean_formal_charges(molecule: Molecule, lewis: LewisCount) -> Array:
    drawn = np.mean([form.formal_charges for form in lewis.forms], axis=0)
    classes = np.array(molecule.classes)
    means = {kind: float(drawn[classes == kind].mean()) for kind in set(molecule.classes)}
    return np.array([means[kind] for kind in molecule.classes])


def _of_bond(graph: ChargeGraph, a: int, b: int) -> Iterator[Transfer]:
    """Yield the terms of one bond, ``a`` the donor; its element comes first in the alphabet."""
    one, other = graph.elements[a], graph.elements[b]
    above_one = max(graph.orders[a][b] - 1, 0.0)
    difference = electronegativity(other) - electronegativity(one)
    yield Transfer("difference", a, b, difference)
    yield Transfer("difference multiple", a, b, difference * above_one)
    for atom, sign in ((b, 1.0), (a, -1.0)):
        element = graph.elements[atom]
        yield Transfer(f"atom {element}", a, b, sign)
        if element != "H":
            yield Transfer(f"atom {element} {graph.domains[atom]}", a, b, sign)
    pulled_a, pulled_b = graph.pull[a] - difference, graph.pull[b] + difference
    yield Transfer("induction", b, a, float(pulled_a - pulled_b))
    charge = float(graph.formal_charges[a] - graph.formal_charges[b])
    yield Transfer("charge", a, b, charge)
    if one != other:
        yield Transfer(f"bond {one}-{other}", a, b, 1.0)
        yield Transfer(f"multiple {one}-{other}", a, b, above_one)
        yield Transfer(f"induction {one}<{other}", b, a, float(pulled_a))
        yield Transfer(f"induction {other}<{one}", a, b, float(pulled_b))
        yield Transfer(f"charge {one}-{other}", a, b, charge)


def _mesomeric(graph: ChargeGraph, middle: int) -> Iterator[Transfer]:
    """Yield what the donors at ``middle`` give through each of its multiple bonds (Q6)."""
    around = graph.orders[middle]
    for acceptor, order in around.items():
        if order <= MULTIPLE:
            continue
        for donor in around:
            kind = _donor_kind(graph, donor)
            if donor == acceptor or kind is None:
                continue
            yield Transfer(f"{kind} donor", donor, acceptor, order - 1)
            yield Transfer(f"{kind} donor {graph.elements[donor]}", donor, acceptor, order - 1)
            yield Transfer(f"{kind} to {graph.elements[acceptor]}", donor, acceptor, order - 1)


def _conjugated(graph: ChargeGraph, a: int, b: int) -> Iterator[Transfer]:
    """Yield what two pi bonds joined by the single bond ``a``-``b`` exchange at their far ends."""
    if graph.orders[a][b] > JOINED:
        return
    for far_a, order_a in graph.orders[a].items():
        for far_b, order_b in graph.orders[b].items():
            names = graph.elements[far_a], graph.elements[far_b]
            if far_a in (b, far_b) or far_b == a or names[0] == names[1]:
                continue
            if min(order_a, order_b) > MULTIPLE:
                donor, acceptor = (far_a, far_b) if names[0] < names[1] else (far_b, far_a)
                pair = "-".join(sorted(names))
                yield Transfer(f"conjugated {pair}", donor, acceptor, (order_a - 1) * (order_b - 1))


def _donor_kind(graph: ChargeGraph, atom: int) -> str | None:
    """Return how an atom gives into a pi bond next to it: ``n``, ``h``, or not at all."""
    if any(order > MULTIPLE for order in graph.orders[atom].values()):
        return None
    if graph.lone_pairs[atom]:
        return "n"
    return None if graph.elements[atom] == "H" else "h"
