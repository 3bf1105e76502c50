"""Placements for centres that a known departure takes away from the rule."""

from dataclasses import replace

from shapeshelf.domains.directions import flattened, opened
from shapeshelf.domains.metal_sites import directions_of, site_names
from shapeshelf.domains.model import Domain, DomainKind, Placement
from shapeshelf.reference.departures import KnownDeparture


def needs_bonds_only(departure: KnownDeparture | None) -> bool:
    """Tell whether the departure gives the neighbours their places by itself."""
    if departure is None or departure.polyhedron is not None:
        return False
    return departure.symbol is not None and departure.symbol != "A-2"


def departed(placement: Placement, departure: KnownDeparture, bonds: int) -> Placement:
    """Return ``placement`` of ``bonds`` bonds (and what follows them) as the departure has it."""
    if departure.shape is None:
        return _pressed(placement, departure)
    named = replace(placement, shape=departure.shape, polyhedral_symbol=departure.symbol)
    if departure.polyhedron is not None:
        return _capped(named, departure.polyhedron)
    if departure.angle_degrees is not None:
        return replace(named, directions=opened(placement.directions, departure.angle_degrees))
    if placement.polyhedral_symbol == departure.symbol or departure.symbol is None:
        return named
    vertices = directions_of(bonds, departure.symbol)
    return replace(
        named,
        ideal_directions=vertices,
        directions=vertices,
        sites=site_names(bonds, departure.symbol),
    )


def bonds_of(domains: tuple[Domain, ...]) -> tuple[Domain, ...]:
    """Return the bonding domains alone."""
    return tuple(domain for domain in domains if domain.kind is DomainKind.BOND)


def _pressed(placement: Placement, departure: KnownDeparture) -> Placement:
    """Return a shallower pyramid where the departure says how shallow."""
    if departure.angle_degrees is None:
        return placement
    return replace(placement, directions=flattened(placement.directions, departure.angle_degrees))


def _capped(placement: Placement, polyhedron: str) -> Placement:
    """Put the lone pair, the last domain, on the first vertex and the bonds on the others."""
    cap, *others = directions_of(len(placement.directions), polyhedron)
    vertices = (*others, cap)
    sites = ("",) * len(vertices)
    return replace(placement, ideal_directions=vertices, directions=vertices, sites=sites)
