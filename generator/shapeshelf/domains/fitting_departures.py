"""Placements for centres that a known departure takes away from the rule."""

import math
from dataclasses import replace

import numpy as np

from shapeshelf.domains.metal_sites import directions_of, site_names
from shapeshelf.domains.model import Domain, DomainKind, Placement
from shapeshelf.reference.departures import KnownDeparture
from shapeshelf.structure.molecule import Vector


def needs_bonds_only(departure: KnownDeparture | None) -> bool:
    """Tell whether the departure gives the neighbours their places by itself."""
    return departure is not None and departure.symbol is not None and departure.symbol != "A-2"


def departed(placement: Placement, departure: KnownDeparture, bonds: int) -> Placement:
    """Return ``placement`` of ``bonds`` bonds (and what follows them) as the departure has it."""
    if departure.shape is None:
        return placement
    named = replace(placement, shape=departure.shape, polyhedral_symbol=departure.symbol)
    if departure.angle_degrees is not None:
        return replace(named, directions=_opened(placement.directions, departure.angle_degrees))
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


def _opened(directions: tuple[Vector, ...], angle_degrees: float) -> tuple[Vector, ...]:
    """Set the first two directions at an angle, in their plane; the others stay."""
    first, second = np.array(directions[0]), np.array(directions[1])
    middle = first + second
    if np.linalg.norm(middle) < 1e-6:
        # Two opposite bonds have no plane of their own; any will do.
        middle = np.cross(first, np.eye(3)[int(np.argmin(np.abs(first)))])
    middle = middle / np.linalg.norm(middle)
    across = first - middle * (first @ middle)
    across = across / np.linalg.norm(across)
    half = math.radians(angle_degrees) / 2
    arms = (
        middle * math.cos(half) + across * math.sin(half),
        middle * math.cos(half) - across * math.sin(half),
    )
    opened = tuple((float(arm[0]), float(arm[1]), float(arm[2])) for arm in arms)
    return (*opened, *directions[2:])
