"""Why a molecule is polar or not, in words: the symmetry that decides and the bonds that cancel.

A dipole moment is a vector that every symmetry operation leaves alone (a totally symmetric
vector; any textbook of group theory). So it lies on every rotation axis and in every mirror
plane; an inversion centre, a second axis, an improper axis or a mirror across the axis forbid it.
"""

from collections import Counter
from collections.abc import Iterable, Sequence

import numpy as np

from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.vectors import Array, unit
from shapeshelf.properties.charges import electronegativity
from shapeshelf.structure.molecule import Molecule

ALIKE = 1e-3
"""Mean of unit vectors under which bonds cancel: rounding of a symmetrised structure."""
NEARLY = 0.15
"""Mean of unit vectors, as of a pair at 163 degrees, under which bonds nearly cancel."""
AT_THE_END_ANGSTROM = 0.2
"""Atoms this near the furthest one make the negative end together."""
CUBIC = ("T", "O", "I")
NUMBERS = ("no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine", "ten")
ION = (
    "An ion has no dipole moment of its own: the value would depend on the point it is taken "
    "from, so none is given."
)


def reason_for(
    molecule: Molecule, symmetry: Symmetry, vector_debye: Array, uncertainty_debye: float
) -> str:
    """Return one or two sentences; ``vector_debye`` (3,) from positive to negative."""
    if molecule.charge:
        return ION
    forbids = _what_forbids(symmetry)
    if forbids is not None:
        return f"{forbids}{_all_cancel(molecule)}"
    cancelling = _cancelling_sets(molecule, symmetry)
    parts = [_what_allows(symmetry), *cancelling]
    parts.append(_negative_end(molecule, symmetry, vector_debye, uncertainty_debye))
    return " ".join(part for part in parts if part)


def _what_forbids(symmetry: Symmetry) -> str | None:
    """Return the sentence on the element that forbids a moment, or ``None``."""
    group = symmetry.point_group
    if group.startswith(CUBIC):
        return f"Symmetry {group} forbids a dipole moment: it cannot lie along several C3 axes."
    if any(operation.label == "i" for operation in symmetry.operations):
        return (
            f"The inversion centre ({group}) forbids a dipole moment: it would have to point "
            "both ways."
        )
    if group.startswith("D"):
        axis = _principal_axis(symmetry)
        return (
            f"The C2 axes across the {axis} axis ({group}) forbid a dipole moment: it cannot lie "
            "along both."
        )
    if group.startswith("S"):
        return f"The improper axis ({group}) forbids a dipole moment: it turns it end over end."
    if group.endswith("h"):
        axis = _principal_axis(symmetry)
        return (
            f"The mirror plane across the {axis} axis ({group}) forbids a dipole moment: it "
            "reverses any along the axis."
        )
    return None


def _principal_axis(symmetry: Symmetry) -> str:
    """Return the name of the highest rotation axis, as in ``C3``."""
    digits = "".join(letter for letter in symmetry.point_group if letter.isdigit())
    return f"C{digits}"


def _all_cancel(molecule: Molecule) -> str:
    polar = [
        (_bond_name(molecule, bond.begin, bond.end))
        for bond in molecule.bonds
        if _differs(molecule, bond.begin, bond.end)
    ]
    if not polar:
        return " No bond joins different elements."
    return f" The polar bonds cancel: {_counted(polar)}."


def _cancelling_sets(molecule: Molecule, symmetry: Symmetry) -> list[str]:
    """Return sentences on the polar bonds that cancel, or nearly cancel, among themselves."""
    coordinates = np.array(symmetry.coordinates_angstrom)
    exact: list[str] = []
    nearly: list[str] = []
    for members in _equivalent_bonds(molecule, symmetry):
        begin, end = members[0]
        if len(members) < 2 or not _differs(molecule, begin, end):
            continue
        mean = np.mean([unit(coordinates[b] - coordinates[a]) for a, b in members], axis=0)
        names = [_bond_name(molecule, begin, end)] * len(members)
        if float(np.linalg.norm(mean)) < NEARLY:
            (exact if float(np.linalg.norm(mean)) < ALIKE else nearly).extend(names)
    said = [f"Of the bonds, {_counted(exact)} cancel."] if exact else []
    return [*said, f"Of the bonds, {_counted(nearly)} nearly cancel."] if nearly else said


def _equivalent_bonds(molecule: Molecule, symmetry: Symmetry) -> list[list[tuple[int, int]]]:
    """Return the bonds in sets that the operations exchange, all turned the same way."""
    left = {frozenset((bond.begin, bond.end)) for bond in molecule.bonds}
    sets = []
    for bond in molecule.bonds:
        if frozenset((bond.begin, bond.end)) not in left:
            continue
        images: dict[frozenset[int], tuple[int, int]] = {}
        for operation in symmetry.operations:
            a, b = operation.permutation[bond.begin], operation.permutation[bond.end]
            images.setdefault(frozenset((a, b)), (a, b))
        left -= set(images)
        sets.append(list(images.values()))
    return sets


def _what_allows(symmetry: Symmetry) -> str:
    group = symmetry.point_group
    if group == "C1":
        return "No symmetry element forbids a dipole moment."
    if group == "Cs":
        return "The mirror plane (Cs) allows a dipole moment in the plane."
    if group == "Cinfv":
        return "A linear molecule with unlike ends has its dipole moment along the axis."
    return f"Symmetry {group} allows a dipole moment along the {_principal_axis(symmetry)} axis."


def _negative_end(molecule: Molecule, symmetry: Symmetry, vector: Array, uncertainty: float) -> str:
    size = float(np.linalg.norm(vector))
    if size < uncertainty:
        return "The model's moment is within its uncertainty of zero, so its direction is open."
    along = np.array(symmetry.coordinates_angstrom) @ (vector / size)
    furthest = [
        atom.element
        for atom, place in zip(molecule.atoms, along, strict=True)
        if place > along.max() - AT_THE_END_ANGSTROM
    ]
    return f"The negative end is on the side of {_listed(sorted(set(furthest)))}."


def _differs(molecule: Molecule, first: int, second: int) -> bool:
    one, other = molecule.atoms[first].element, molecule.atoms[second].element
    return electronegativity(one) != electronegativity(other)


def _bond_name(molecule: Molecule, first: int, second: int) -> str:
    """Return ``S–F``: the less electronegative element first, hydrogen always last."""
    elements = (molecule.atoms[first].element, molecule.atoms[second].element)
    return "–".join(sorted(elements, key=lambda one: (one == "H", electronegativity(one))))


def _counted(names: Iterable[str]) -> str:
    counts = Counter(names)
    return _listed([f"{_number(count)} {name}" for name, count in counts.items()])


def _number(count: int) -> str:
    return NUMBERS[count] if count < len(NUMBERS) else str(count)


def _listed(words: Sequence[str]) -> str:
    if len(words) < 2:
        return "".join(words)
    return ", ".join(words[:-1]) + " and " + words[-1]
