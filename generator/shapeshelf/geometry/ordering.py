"""A numbering of the atoms that does not depend on how the molecule was written.

O1  Atoms are told apart by class, element, isotope and charge-averaged surroundings; ties are
    refined by the neighbours' numbers until nothing changes (colour refinement).
O2  While ties remain, one atom of the first tied set is set apart and O1 repeated. Atoms that
    symmetry exchanges may be chosen either way; the molecule that results is the same.
"""

from dataclasses import replace

from shapeshelf.structure.molecule import (
    Bond,
    DoubleBondStereo,
    Molecule,
    TetrahedralStereo,
)


def settled_order(molecule: Molecule) -> tuple[int, ...]:
    """Return the atoms (n,) in their settled order: position k holds atom ``order[k]``."""
    around = _neighbour_lists(molecule)
    marks = [
        (atom.element, atom.isotope, len(around[index]), molecule.classes[index])
        for index, atom in enumerate(molecule.atoms)
    ]
    colours = _refined(_ranked(marks), around)
    while len(set(colours)) < len(colours):
        colours = _refined(_one_set_apart(colours), around)
    return tuple(sorted(range(len(colours)), key=lambda atom: colours[atom]))


def renumbered(molecule: Molecule, order: tuple[int, ...]) -> Molecule:
    """Return the molecule with atom ``order[k]`` at place k, bonds sorted, coordinates dropped."""
    place = {atom: k for k, atom in enumerate(order)}
    bonds = sorted((_moved_bond(bond, place) for bond in molecule.bonds), key=_bond_key)
    return replace(
        molecule,
        atoms=tuple(molecule.atoms[atom] for atom in order),
        bonds=tuple(bonds),
        coordinates_angstrom=None,
        tetrahedral_stereo=tuple(_moved_centre(s, place) for s in molecule.tetrahedral_stereo),
        double_bond_stereo=tuple(_moved_double(s, place) for s in molecule.double_bond_stereo),
        classes=tuple(molecule.classes[atom] for atom in order),
    )


def _neighbour_lists(molecule: Molecule) -> list[list[int]]:
    around: list[list[int]] = [[] for _ in molecule.atoms]
    for bond in molecule.bonds:
        around[bond.begin].append(bond.end)
        around[bond.end].append(bond.begin)
    return around


def _ranked(marks: list[tuple[str, int, int, int]]) -> list[int]:
    places = {mark: k for k, mark in enumerate(sorted(set(marks)))}
    return [places[mark] for mark in marks]


def _refined(colours: list[int], around: list[list[int]]) -> list[int]:
    """Return colours refined by the neighbours' colours until they no longer split."""
    while True:
        marks = [
            (colour, tuple(sorted(colours[other] for other in around[atom])))
            for atom, colour in enumerate(colours)
        ]
        places = {mark: k for k, mark in enumerate(sorted(set(marks)))}
        if len(places) == len(set(colours)):
            return [places[mark] for mark in marks]
        colours = [places[mark] for mark in marks]


def _one_set_apart(colours: list[int]) -> list[int]:
    """Return colours with the first atom of the first tied set in front of the others."""
    first = min(colour for colour in colours if colours.count(colour) > 1)
    chosen = colours.index(first)
    return [2 * colour + (colour == first and k != chosen) for k, colour in enumerate(colours)]


def _moved_bond(bond: Bond, place: dict[int, int]) -> Bond:
    begin, end = place[bond.begin], place[bond.end]
    if not bond.dative and begin > end:
        begin, end = end, begin
    return replace(bond, begin=begin, end=end)


def _bond_key(bond: Bond) -> tuple[int, int]:
    return (min(bond.begin, bond.end), max(bond.begin, bond.end))


def _moved_centre(stereo: TetrahedralStereo, place: dict[int, int]) -> TetrahedralStereo:
    neighbours = tuple(place[atom] for atom in stereo.neighbours)
    return replace(stereo, atom=place[stereo.atom], neighbours=neighbours)


def _moved_double(stereo: DoubleBondStereo, place: dict[int, int]) -> DoubleBondStereo:
    return DoubleBondStereo(
        place[stereo.first],
        place[stereo.begin],
        place[stereo.end],
        place[stereo.last],
        stereo.cis,
    )
