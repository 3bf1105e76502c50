"""The Lewis count of a molecule, the same for every spelling of it.

C6  Of all drawings that resonance reaches, those with full octets and fewest charges count
    alike. Bond orders are averaged over them, and so over equivalent atoms (nitrate 4/3).
C7  An atom's lone pairs are those of the drawing in which it has most; the ones that are bonds
    in another drawing are delocalised. So each oxygen of nitrate has three, one of them
    delocalised. The same holds for single electrons.
C8  Two free electrons on one atom are a lone pair, unless a multiplicity is stated that needs
    them apart: CF2 is a singlet, CH2 with multiplicity 3 has two single electrons.
C9  Single electrons on different atoms are parallel where no multiplicity is stated. A metal's
    d electrons add to the multiplicity by rule M2 (metals).
"""

from itertools import islice, product

from shapeshelf.domains.bridges import HALF, half_bonds
from shapeshelf.domains.delocalisation import pairs_in_pi
from shapeshelf.domains.electrons import Drawing, draw, shell, strain
from shapeshelf.domains.graph import BondGraph, graph_of
from shapeshelf.domains.metals import unpaired_d_electrons
from shapeshelf.domains.model import LewisAtom, LewisCount, ResonanceForm
from shapeshelf.domains.pi_systems import pi_systems
from shapeshelf.domains.resonance import Resonance, bonds_within, equal_drawings
from shapeshelf.errors import AnalysisError
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule

MOST_FORMS = 8


def count_electrons(molecule: Molecule) -> LewisCount:
    """Return the electron count of ``molecule`` by rules C1 to C9 and D1 to D7.

    Raises AnalysisError where bonds and charges do not add up, or where the stated
    multiplicity does not fit the number of electrons.
    """
    graph = graph_of(molecule)
    drawing, systems = _resonance(graph, draw(molecule, graph))
    drawings = _drawings_at(drawing, systems)
    multiplicity = _multiplicity(molecule, graph, drawing)
    apart = _pairs_apart(graph, drawing, multiplicity)
    in_pi = pairs_in_pi(graph, drawing)
    atoms = tuple(
        _lewis_atom(
            [d.free[k] for d in drawings[k]], drawing.charges[k], in_pi.get(k, ""), k in apart
        )
        for k in range(len(molecule.atoms))
    )
    orders = _mean_orders(molecule, graph, drawing, systems)
    return LewisCount(atoms, orders, _forms(graph, drawing, systems), multiplicity)


def _resonance(graph: BondGraph, drawing: Drawing) -> tuple[Drawing, list[Resonance]]:
    """Return the best drawing of all, and the drawings of each pi system."""
    systems = [equal_drawings(graph, drawing, atoms) for atoms in pi_systems(graph, drawing)]
    best = _combined(graph, drawing, systems, tuple(system.drawings[0] for system in systems))
    everywhere = tuple(range(len(graph.elements)))
    if strain(graph, best, everywhere) < strain(graph, drawing, everywhere):
        # A better drawing may join its pi electrons otherwise: look again from there.
        return _resonance(graph, best)
    return best, systems


def _drawings_at(drawing: Drawing, systems: list[Resonance]) -> list[tuple[Drawing, ...]]:
    """Return, for each atom, the drawings in which it may differ."""
    drawings: list[tuple[Drawing, ...]] = [(drawing,)] * len(drawing.free)
    for system in systems:
        for atom in system.atoms:
            drawings[atom] = system.drawings
    return drawings


def _lewis_atom(free: list[int], charge: int, rule: str, apart: bool) -> LewisAtom:
    """C7 and C8."""
    if apart:
        return LewisAtom(free[0] // 2 - 1, 2 + free[0] % 2, charge)
    pairs = [count // 2 for count in free]
    singles = [count % 2 for count in free]
    moving = max(pairs) - min(pairs)
    return LewisAtom(
        max(pairs),
        max(singles),
        charge,
        delocalised_pairs=max(moving, int(bool(rule))),
        delocalised_singles=max(singles) - min(singles),
        delocalised_by="D1" if moving else rule,
    )


def _mean_orders(
    molecule: Molecule, graph: BondGraph, drawing: Drawing, systems: list[Resonance]
) -> tuple[float, ...]:
    """C6."""
    orders = [float(order) for order in drawing.orders]
    for n in half_bonds(graph):
        orders[n] = HALF
    for system in systems:
        bonds = bonds_within(graph, system.atoms)
        for n in bonds:
            orders[n] = sum(d.orders[n] for d in system.drawings) / len(system.drawings)
        if not system.complete:
            _average_alike(molecule, bonds, orders)
    return tuple(orders)


def _average_alike(molecule: Molecule, bonds: list[int], orders: list[float]) -> None:
    alike: dict[tuple[int, ...], list[int]] = {}
    for n in bonds:
        bond = molecule.bonds[n]
        key = tuple(sorted((molecule.classes[bond.begin], molecule.classes[bond.end])))
        alike.setdefault(key, []).append(n)
    for group in alike.values():
        mean = sum(orders[n] for n in group) / len(group)
        for n in group:
            orders[n] = mean


def _forms(
    graph: BondGraph, drawing: Drawing, systems: list[Resonance]
) -> tuple[ResonanceForm, ...]:
    """Combine the drawings of the pi systems, at most ``MOST_FORMS`` of them."""
    choices = islice(product(*(system.drawings for system in systems)), MOST_FORMS)
    combined = (_combined(graph, drawing, systems, choice) for choice in choices)
    return tuple(ResonanceForm(form.orders, form.charges) for form in combined)


def _combined(
    graph: BondGraph,
    drawing: Drawing,
    systems: list[Resonance],
    choice: tuple[Drawing, ...],
) -> Drawing:
    """Return ``drawing`` with every pi system as in the drawing chosen for it."""
    orders, free, charges = list(drawing.orders), list(drawing.free), list(drawing.charges)
    for system, chosen in zip(systems, choice, strict=True):
        for atom in system.atoms:
            free[atom], charges[atom] = chosen.free[atom], chosen.charges[atom]
        for bond in bonds_within(graph, system.atoms):
            orders[bond] = chosen.orders[bond]
    return Drawing(tuple(orders), tuple(free), tuple(charges))


def _multiplicity(molecule: Molecule, graph: BondGraph, drawing: Drawing) -> int:
    """C9."""
    electrons = sum(ELEMENTS[e].atomic_number for e in graph.elements) - molecule.charge
    stated = molecule.multiplicity
    if stated is None:
        singles = sum(count % 2 for count in drawing.free)
        singles += sum(unpaired_d_electrons(molecule, graph))
        return singles + 1 if (singles - electrons) % 2 == 0 else 1 + electrons % 2
    if stated < 1 or (stated - 1 - electrons) % 2:
        parity = "odd" if electrons % 2 else "even"
        raise AnalysisError(
            molecule.formula,
            f"multiplicity {stated} does not fit an {parity} number of electrons ({electrons})",
        )
    return stated


def _pairs_apart(graph: BondGraph, drawing: Drawing, multiplicity: int) -> set[int]:
    """C8: the atoms with a sextet whose pair a stated multiplicity separates."""
    singles = sum(count % 2 for count in drawing.free)
    missing = (multiplicity - 1 - singles) // 2
    if any(graph.metals):
        return set()
    sextets = [
        atom
        for atom, count in enumerate(drawing.free)
        if count in (2, 3) and shell(graph, drawing, atom) in (6, 7) and graph.degree(atom)
    ]
    return set(sextets[: max(missing, 0)])
