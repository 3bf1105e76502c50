"""What assembly knows of each atom: its neighbours, lengths, angles, lone pairs, flatness."""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from shapeshelf.domains.model import Centre, LewisCount, ModelAngle
from shapeshelf.geometry.site_lengths import site_lengths_angstrom
from shapeshelf.structure.molecule import Molecule

LINEAR_DEGREES = 168.0
"""An angle this wide is treated as a straight line."""
FLAT_SUM_DEGREES = 357.0
"""Three angles that add up to this lie in a plane."""
ALIKE_SITES = ("tetrahedral", "trigonal pyramidal", "trigonal planar")
"""Shapes whose sites are of one kind only."""
FLAT_SHAPE = "trigonal planar"
TRIANGLE_DEGREES, BESIDE_TRIANGLE_DEGREES = 60.0, 150.0
MULTIPLE_ORDER = 1.15
"""From this averaged bond order a bond has a share of pi bonding."""


@dataclass(frozen=True, slots=True)
class Surroundings:
    """The molecule as assembly sees it; one entry an atom or a bond."""

    neighbours: tuple[tuple[int, ...], ...]
    lengths: dict[tuple[int, int], float]
    """Target length in ångström by (lower, higher) atom."""
    orders: dict[tuple[int, int], float]
    angles: dict[tuple[int, int, int], float]
    """Target angle in degrees by (end, centre, end), both ways round."""
    linear: frozenset[int]
    """Centres with two neighbours in line."""
    flat: frozenset[int]
    """Atoms whose bonds lie in a plane and that can share in a pi system."""
    paired: frozenset[int]
    """Atoms with a lone pair of their own."""
    elements: tuple[str, ...] = ()

    def length(self, first: int, second: int) -> float:
        """Return the target length in ångström."""
        return self.lengths[min(first, second), max(first, second)]

    def order(self, first: int, second: int) -> float:
        """Return the averaged bond order."""
        return self.orders[min(first, second), max(first, second)]


def surroundings_of(
    molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre]
) -> Surroundings:
    """Return what assembly needs to know of ``molecule``."""
    neighbours = tuple(molecule.neighbours(atom) for atom in range(len(molecule.atoms)))
    lengths, orders = {}, {}
    found = site_lengths_angstrom(molecule, lewis, centres)
    for bond, order, length in zip(molecule.bonds, lewis.bond_orders, found, strict=True):
        key = (min(bond.begin, bond.end), max(bond.begin, bond.end))
        orders[key], lengths[key] = order, length
    angles = dict(_angles(molecule, centres))
    linear = frozenset(c.atom for c in centres if c.bonded == 2 and _widest(c) > LINEAR_DEGREES)
    return Surroundings(
        neighbours=neighbours,
        lengths=lengths,
        orders=orders,
        angles=angles,
        linear=linear,
        flat=frozenset(_flat_atoms(neighbours, orders, lewis, centres)) - linear,
        paired=frozenset(k for k, atom in enumerate(lewis.atoms) if _own_pairs(lewis, k) > 0),
        elements=tuple(atom.element for atom in molecule.atoms),
    )


def joined_without(
    known: Surroundings, start: int, goal: int, barred: int = -1, within: int = 7
) -> bool:
    """Return whether a path of at most ``within`` bonds, two at least, joins start and goal.

    It may not pass through ``barred``: so asked, it tells whether an angle or a bond is in a ring.
    """
    reached, front = {start, barred}, {start}
    for step in range(within):
        front = {k for atom in front for k in known.neighbours[atom]} - reached
        if step == 0:
            front.discard(goal)
        if goal in front:
            return True
        reached |= front
    return False


def _angles(
    molecule: Molecule, centres: Sequence[Centre]
) -> Iterator[tuple[tuple[int, int, int], float]]:
    """Yield the angles, equal ones where all sites of an arrangement are alike.

    A flat centre in a ring of three leaves what the ring takes to the angles beside it.
    On a tetrahedron or triangle, angles between neighbours of the same classes differ only by
    the way a placement happens to be turned; on other arrangements they may be real.
    """
    for centre in centres:
        alike = centre.placements[0].shape in ALIKE_SITES
        closed = [a for a in centre.angles if a.atoms[2] in molecule.neighbours(a.atoms[0])]
        by_kind: dict[tuple[int, int], list[float]] = {}
        for angle in centre.angles:
            by_kind.setdefault(_kind(molecule, angle), []).append(angle.model_degrees)
        for angle in centre.angles:
            same = by_kind[_kind(molecule, angle)]
            degrees = sum(same) / len(same) if alike else angle.model_degrees
            if centre.placements[0].shape == FLAT_SHAPE and closed:
                degrees = TRIANGLE_DEGREES if angle in closed else BESIDE_TRIANGLE_DEGREES
            yield angle.atoms, degrees
            yield angle.atoms[::-1], degrees


def _kind(molecule: Molecule, angle: ModelAngle) -> tuple[int, int]:
    first, last = sorted((molecule.classes[angle.atoms[0]], molecule.classes[angle.atoms[2]]))
    return first, last


def _widest(centre: Centre) -> float:
    return max((angle.model_degrees for angle in centre.angles), default=0.0)


def _own_pairs(lewis: LewisCount, atom: int) -> int:
    return lewis.atoms[atom].lone_pairs - lewis.atoms[atom].delocalised_pairs


def _flat_atoms(
    neighbours: tuple[tuple[int, ...], ...],
    orders: dict[tuple[int, int], float],
    lewis: LewisCount,
    centres: Sequence[Centre],
) -> Iterator[int]:
    for centre in centres:
        atom = centre.atom
        if centre.bonded == 3 and sum(a.model_degrees for a in centre.angles) > FLAT_SUM_DEGREES:
            yield atom
        elif centre.bonded == 2:
            shares = (orders[min(atom, k), max(atom, k)] for k in neighbours[atom])
            if lewis.atoms[atom].delocalised_pairs or max(shares) > MULTIPLE_ORDER:
                yield atom
