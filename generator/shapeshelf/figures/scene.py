"""A report as something to draw: positions in the principal frame, radii, bonds, lobes."""

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.domains.model import Centre, DomainKind
from shapeshelf.figures.fitting import drawn_coordinates
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.report.model import CompoundReport

Array = NDArray[np.float64]

LOBE_REACH_ANGSTROM = 0.74
"""From the atom's middle to the middle of a lobe's round end."""
LOBE_RADIUS_ANGSTROM = 0.27

_SMALLEST_RADIUS, _RADIUS_SHARE, _UNKNOWN_RADIUS = 0.19, 0.13, 1.5
_ELECTRONS = {DomainKind.LONE_PAIR: 2, DomainKind.SINGLE_ELECTRON: 1}


@dataclass(frozen=True, slots=True)
class Stick:
    """A bond to draw: atoms, order averaged over resonance forms, arrow for a dative bond."""

    begin: int
    end: int
    order: float
    dative: bool = False


@dataclass(frozen=True, slots=True)
class Lobe:
    """A lone pair (or single electron) at ``atom``, pointing along a unit vector."""

    atom: int
    direction: tuple[float, float, float]
    electrons: int


@dataclass(frozen=True, slots=True)
class Scene:
    """Everything a view needs, in the frame of the principal axes (ångström)."""

    elements: tuple[str, ...]
    points: Array
    radii: Array
    sticks: tuple[Stick, ...]
    lobes: tuple[Lobe, ...]


def build_scene(report: CompoundReport) -> Scene:
    """Return the scene of a report, drawn so that its best values hold."""
    axes = np.array(report.symmetry.axes)
    points = (drawn_coordinates(report) - np.array(report.symmetry.centre_angstrom)) @ axes.T
    elements = tuple(atom.element for atom in report.molecule.atoms)
    sticks = tuple(
        Stick(bond.begin, bond.end, order, bond.dative)
        for bond, order in zip(report.molecule.bonds, report.lewis.bond_orders, strict=True)
    )
    lobes = tuple(lobe for one in report.centres for lobe in _lobes(one.centre, points))
    return Scene(elements, points, np.array([radius(name) for name in elements]), sticks, lobes)


def radius(element: str) -> float:
    """Return the drawn radius of an atom in ångström: it grows gently with the real one."""
    real = ELEMENTS[element].single_radius_angstrom or _UNKNOWN_RADIUS
    return _SMALLEST_RADIUS + _RADIUS_SHARE * real


def lobe_ends(scene: Scene) -> Array:
    """Return the middles of the lobes' round ends, (k, 3) in ångström."""
    return np.array(
        [
            scene.points[lobe.atom] + reach(scene, lobe) * np.array(lobe.direction)
            for lobe in scene.lobes
        ]
    ).reshape(-1, 3)


def reach(scene: Scene, lobe: Lobe) -> float:
    """Return how far out the round end of a lobe lies: beyond the ring of its atom."""
    return LOBE_REACH_ANGSTROM + float(scene.radii[lobe.atom]) - 0.32


def _lobes(centre: Centre, points: Array) -> list[Lobe]:
    bonds = [index for index, domain in enumerate(centre.domains) if domain.neighbour is not None]
    others = [index for index, domain in enumerate(centre.domains) if domain.kind in _ELECTRONS]
    if not others:
        return []
    outward = np.array([points[centre.domains[i].neighbour] - points[centre.atom] for i in bonds])
    outward /= np.linalg.norm(outward, axis=1)[:, None]
    if centre.placements:
        placed = np.array(centre.placements[0].directions)
        directions = placed[others] @ _turn(placed[bonds], outward, placed[others[0]]).T
    elif len(others) == 1 and np.linalg.norm(outward.sum(axis=0)) > 0.1:
        directions = -outward.sum(axis=0, keepdims=True)
    else:
        return []
    directions /= np.linalg.norm(directions, axis=1)[:, None]
    return [
        Lobe(
            centre.atom, (float(d[0]), float(d[1]), float(d[2])), _ELECTRONS[centre.domains[i].kind]
        )
        for i, d in zip(others, directions, strict=True)
    ]


def _turn(placed: Array, real: Array, lobe: Array) -> Array:
    """Return the rotation (or mirror) that lays placed directions on real ones, least squares.

    Where all bonds lie on one line the turn about it is free: the first lobe then takes the
    first principal axis that it can.
    """
    left, sizes, right = np.linalg.svd(real.T @ placed)
    if sizes[1] > 1e-3:
        turned: Array = left @ right
        return turned
    return np.asarray(_frame(real[0], _across(real[0])).T @ _frame(placed[0], lobe))


def _across(line: Array) -> Array:
    return np.asarray(np.eye(3)[int(np.argmin(np.round(np.abs(line), 6)))])


def _frame(line: Array, side: Array) -> Array:
    along = line / np.linalg.norm(line)
    across = side - (side @ along) * along
    across /= np.linalg.norm(across)
    return np.array([along, across, np.cross(along, across)])
