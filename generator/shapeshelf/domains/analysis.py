"""Every centre of a molecule: count, domains, placement, angles, departures, and the working."""

from collections import Counter
from dataclasses import dataclass
from itertools import combinations

from shapeshelf.domains.counting import domains_at, notation_of
from shapeshelf.domains.departing import is_fluxional, known_departure
from shapeshelf.domains.directions import angle_degrees
from shapeshelf.domains.fitting_departures import bonds_of, departed, needs_bonds_only
from shapeshelf.domains.graph import BondGraph, graph_of
from shapeshelf.domains.lewis import count_electrons
from shapeshelf.domains.metal_rules import MetalShape, metal_shape
from shapeshelf.domains.metal_sites import place_on
from shapeshelf.domains.metals import MetalCentre, metal_centre
from shapeshelf.domains.model import (
    Centre,
    Departure,
    Domain,
    DomainKind,
    LewisCount,
    ModelAngle,
    Placement,
    TraceStep,
)
from shapeshelf.domains.placing import arrangement_name, place
from shapeshelf.domains.tracing import (
    trace_main_group,
    trace_metal,
    trace_unplaceable,
)
from shapeshelf.domains.uncertainty import class_uncertainty_degrees
from shapeshelf.errors import AnalysisError
from shapeshelf.reference.departures import KnownDeparture
from shapeshelf.reference.metal_shapes import SHAPE_NAMES
from shapeshelf.structure.molecule import Molecule

FLUXIONAL_METALS = frozenset({"TBPY-5", "PBPY-7", "OCF-7", "TPRS-7", "SAPR-8", "DD-8", "TPRS-9"})
UNFITTED_UNCERTAINTY_DEGREES = 6.0
"""Of angles that no fit stands behind: a metal's, and those of known departures (common
practice, no source)."""


@dataclass(frozen=True, slots=True)
class _Site:
    """A centre while it is being worked out."""

    molecule: Molecule
    graph: BondGraph
    lewis: LewisCount
    atom: int
    label: str


def analyse(molecule: Molecule) -> tuple[LewisCount, tuple[Centre, ...]]:
    """Return the electron count and one Centre for every atom with two or more neighbours.

    Raises AnalysisError where the electrons do not add up.
    """
    graph = graph_of(molecule)
    lewis = count_electrons(molecule)
    labels = _labels(graph)
    sites = (
        _Site(molecule, graph, lewis, atom, labels[atom])
        for atom in range(len(molecule.atoms))
        if graph.degree(atom) >= 2
    )
    return lewis, tuple(
        _metal(site) if graph.metals[site.atom] else _main_group(site) for site in sites
    )


def _labels(graph: BondGraph) -> list[str]:
    seen: Counter[str] = Counter()
    labels = []
    for element in graph.elements:
        seen[element] += 1
        labels.append(f"{element}{seen[element]}")
    return labels


def _main_group(site: _Site) -> Centre:
    counted = domains_at(site.molecule, site.lewis, site.atom)
    known = known_departure(site.graph, site.lewis, site.atom)
    domains = bonds_of(counted) if needs_bonds_only(known) else counted
    try:
        placements = _placements(site, domains, known)
    except AnalysisError as error:
        return _centre(site, counted, None, (), None, trace_unplaceable(str(error)))
    trace = trace_main_group(site.molecule, site.lewis, site.atom, counted, placements, known)
    arrangement = _arrangement(counted, placements, known)
    return _centre(site, counted, arrangement, placements, known, trace, domains)


def _arrangement(
    counted: tuple[Domain, ...], placements: tuple[Placement, ...], known: KnownDeparture | None
) -> str:
    """Name the arrangement of what takes room: of the bonds alone where a pair is inactive."""
    if needs_bonds_only(known):
        return placements[0].shape
    if known and known.polyhedron:
        return SHAPE_NAMES[known.polyhedron]
    return arrangement_name(len(counted))


def _placements(
    site: _Site, domains: tuple[Domain, ...], known: KnownDeparture | None
) -> tuple[Placement, ...]:
    found = place(site.molecule, site.lewis, site.atom, domains)
    if known is None:
        return found
    return tuple(departed(p, known, site.graph.degree(site.atom)) for p in found[:1])


def _centre(
    site: _Site,
    counted: tuple[Domain, ...],
    arrangement: str | None,
    placements: tuple[Placement, ...],
    known: KnownDeparture | None,
    trace: tuple[TraceStep, ...],
    domains: tuple[Domain, ...] | None = None,
) -> Centre:
    kinds = Counter(domain.kind for domain in counted)
    bonded = kinds[DomainKind.BOND]
    pairs, singles = kinds[DomainKind.LONE_PAIR], kinds[DomainKind.SINGLE_ELECTRON]
    best = placements[0] if placements else None
    element = site.graph.elements[site.atom]
    fitted = class_uncertainty_degrees(element, bonded, pairs + singles)
    uncertainty = fitted if known is None else UNFITTED_UNCERTAINTY_DEGREES
    return Centre(
        atom=site.atom,
        element=element,
        label=site.label,
        domains=counted if domains is None else domains,
        bonded=bonded,
        lone_pairs=pairs,
        single_electrons=singles,
        notation=notation_of(bonded, pairs, singles),
        arrangement=arrangement,
        shape=best.shape if best else None,
        polyhedral_symbol=best.polyhedral_symbol if best else None,
        placements=placements,
        angles=_angles(site, best, uncertainty) if best else (),
        departure=_departure(known.sentence, known.source) if known else None,
        trace=trace,
        fluxional=is_fluxional(len(counted), bonded, known) and not _is_ringed(site),
    )


def _is_ringed(site: _Site) -> bool:
    return any(link.bond in site.graph.ring_bonds for link in site.graph.links[site.atom])


def _metal(site: _Site) -> Centre:
    metal = metal_centre(site.molecule, site.graph, site.atom)
    found = metal_shape(site.graph, metal)
    placements: tuple[Placement, ...] = ()
    if found:
        placements = place_on(site.molecule, site.graph, metal, found.symbol)
    symbol = found.symbol if found else None
    return Centre(
        atom=site.atom,
        element=metal.element,
        label=site.label,
        domains=bonds_of(domains_at(site.molecule, site.lewis, site.atom)),
        bonded=metal.coordination,
        lone_pairs=None,
        single_electrons=0,
        notation=notation_of(metal.coordination, 0, 0),
        arrangement=SHAPE_NAMES[symbol] if symbol else None,
        shape=SHAPE_NAMES[symbol] if symbol else None,
        polyhedral_symbol=symbol,
        placements=placements,
        angles=_angles(site, placements[0], UNFITTED_UNCERTAINTY_DEGREES) if placements else (),
        departure=_metal_departure(metal, found),
        trace=trace_metal(metal, found, placements, site.molecule),
        fluxional=symbol in FLUXIONAL_METALS and not _is_ringed(site),
    )


def _metal_departure(metal: MetalCentre, found: MetalShape | None) -> Departure | None:
    if found is not None:
        return _departure(found.departs, found.source) if found.departs else None
    why = metal.obstacle or "no rule covers its d electrons, ligands and number of neighbours"
    return Departure(
        f"{metal.element} is outside every rule ({why}); only supplied coordinates give its shape",
        "",
    )


def _departure(sentence: str, source: str) -> Departure:
    return Departure(f"{sentence} ({source}).", source)


def _angles(site: _Site, placement: Placement, uncertainty: float) -> tuple[ModelAngle, ...]:
    neighbours = site.graph.neighbours(site.atom)
    return tuple(
        ModelAngle(
            (neighbours[i], site.atom, neighbours[j]),
            angle_degrees(placement.ideal_directions[i], placement.ideal_directions[j]),
            angle_degrees(placement.directions[i], placement.directions[j]),
            uncertainty,
        )
        for i, j in combinations(range(len(neighbours)), 2)
    )
