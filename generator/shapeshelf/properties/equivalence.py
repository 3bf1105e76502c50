"""Which nuclei are alike to NMR: by symmetry, or because rotation about single bonds is fast.

* M1  Atoms that an operation of the point group exchanges are alike.
* M2  So are ligands of one centre that the bond graph and the electron-domain model cannot tell
  apart, where no multiple bond to another ligand stops the centre from turning: the hydrogens of
  a methyl group, the two ortho positions of a phenyl group. The axial and equatorial fluorines
  of PF5 differ to the model and stay apart.
* M3  What is alike carries on along the bonds: ligands of like centres are alike where each
  centre holds one set of them.

Source: the usual first-order treatment, H. Guenther, NMR Spectroscopy (1995), recalled from
memory. Diastereotopic pairs count as one: their difference is small and not foreseen here.
"""

from collections import defaultdict
from collections.abc import Hashable, Sequence
from itertools import combinations

from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.geometry.model import Symmetry
from shapeshelf.structure.molecule import Molecule

FREE_TURNING_ORDER = 1.2
"""Highest averaged bond order about which rotation at room temperature is fast (common practice,
no source)."""
AMIDE_ACCEPTORS = frozenset({"O", "S", "Se", "N"})


def alike_sets(
    molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre], symmetry: Symmetry
) -> tuple[tuple[int, ...], ...]:
    """Return all atoms in sets of alike ones, each sorted, in order of their first atoms."""
    parents = list(range(len(molecule.atoms)))
    for group in symmetry.equivalent_atoms:
        for atom in group[1:]:
            _join(parents, group[0], atom)
    colours = _colours(molecule, centres)
    neighbours = [molecule.neighbours(atom) for atom in range(len(molecule.atoms))]
    for centre in centres:
        _join_turning_ligands(centre.atom, neighbours, colours, molecule, lewis, parents)
    _carry_along(neighbours, colours, parents)
    sets: defaultdict[int, list[int]] = defaultdict(list)
    for atom in range(len(parents)):
        sets[_root(parents, atom)].append(atom)
    return tuple(tuple(group) for group in sets.values())


def _colours(molecule: Molecule, centres: Sequence[Centre]) -> list[Hashable]:
    """Return for each atom what graph and domain model know of it: class and angles made."""
    outlook: defaultdict[int, list[tuple[int, int]]] = defaultdict(list)
    for centre in centres:
        for angle in centre.angles:
            first, _, last = angle.atoms
            degrees = round(angle.model_degrees)
            outlook[first].append((molecule.classes[last], degrees))
            outlook[last].append((molecule.classes[first], degrees))
    return [
        (molecule.classes[atom], tuple(sorted(outlook[atom])))
        for atom in range(len(molecule.atoms))
    ]


def _join_turning_ligands(
    atom: int,
    neighbours: Sequence[Sequence[int]],
    colours: Sequence[Hashable],
    molecule: Molecule,
    lewis: LewisCount,
    parents: list[int],
) -> None:
    stiff = {
        other
        for other, order in _orders(molecule, lewis, atom).items()
        if order > FREE_TURNING_ORDER or _is_amide(molecule, lewis, atom, other)
    }
    for first, last in combinations(neighbours[atom], 2):
        if colours[first] == colours[last] and stiff <= {first, last}:
            _join(parents, first, last)


def _orders(molecule: Molecule, lewis: LewisCount, atom: int) -> dict[int, float]:
    """Return the averaged order of each bond of ``atom``, by the neighbour."""
    return {
        bond.end if bond.begin == atom else bond.begin: order
        for bond, order in zip(molecule.bonds, lewis.bond_orders, strict=True)
        if atom in (bond.begin, bond.end)
    }


def _is_amide(molecule: Molecule, lewis: LewisCount, donor: int, carbon: int) -> bool:
    """Tell whether a nitrogen gives its pair to a carbon that is doubly bound to O, S or N."""
    return (
        molecule.atoms[donor].element == "N"
        and molecule.atoms[carbon].element == "C"
        and lewis.atoms[donor].delocalised_pairs > 0
        and any(
            order > FREE_TURNING_ORDER and molecule.atoms[other].element in AMIDE_ACCEPTORS
            for other, order in _orders(molecule, lewis, carbon).items()
            if other != donor
        )
    )


def _carry_along(
    neighbours: Sequence[Sequence[int]], colours: Sequence[Hashable], parents: list[int]
) -> None:
    """Join ligands of joined centres until nothing changes (rule M3)."""
    changed = True
    while changed:
        changed = False
        sets: defaultdict[int, list[int]] = defaultdict(list)
        for atom in range(len(parents)):
            sets[_root(parents, atom)].append(atom)
        for group in sets.values():
            changed |= _join_ligands_of(group, neighbours, colours, parents)


def _join_ligands_of(
    group: Sequence[int],
    neighbours: Sequence[Sequence[int]],
    colours: Sequence[Hashable],
    parents: list[int],
) -> bool:
    by_colour: defaultdict[Hashable, list[int]] = defaultdict(list)
    for atom in group:
        held: defaultdict[Hashable, set[int]] = defaultdict(set)
        for neighbour in neighbours[atom]:
            held[colours[neighbour]].add(_root(parents, neighbour))
        for colour, roots in held.items():
            if len(roots) == 1:
                by_colour[colour].append(next(iter(roots)))
    changed = False
    for roots_of_colour in by_colour.values():
        for other in roots_of_colour[1:]:
            changed |= _join(parents, roots_of_colour[0], other)
    return changed


def _root(parents: list[int], atom: int) -> int:
    while parents[atom] != atom:
        atom = parents[atom]
    return atom


def _join(parents: list[int], first: int, last: int) -> bool:
    low, high = sorted((_root(parents, first), _root(parents, last)))
    parents[high] = low
    return low != high
