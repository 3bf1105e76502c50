"""Bonds, orders and charges from the coordinates of an XYZ file."""

import re

import numpy as np
import numpy.typing as npt
from rdkit import Chem
from scipy.spatial import cKDTree

from shapeshelf.errors import StructureError
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.assembling import finish
from shapeshelf.structure.bridging import Stereo, mol_of_drawing, stereo_of, with_coordinates
from shapeshelf.structure.checking import check_size
from shapeshelf.structure.drawing import Drawing, is_metal
from shapeshelf.structure.molecule import Molecule, Vector
from shapeshelf.structure.normalising import normalise
from shapeshelf.structure.ordering import assign_orders

STRETCH = 1.3
"""Longest bond over the sum of single-bond radii: N2O4 and FOOF reach 1.25."""
MARGIN_ANGSTROM = 0.4
"""Longest bond beyond that sum: keeps the silicon atoms of a siloxane or silazane apart."""
METAL_MARGIN_ANGSTROM = 0.5
"""The same with a metal, whose bonds are softer."""
CLOSEST_ANGSTROM = 0.4
"""Half the shortest bond there is, that of dihydrogen."""
FARTHEST_ANGSTROM = 10_000.0
MOST_NEIGHBOURS = {"H": 1, "He": 0, "B": 4, "C": 4, "N": 4, "O": 3, "F": 1}
DEFAULT_RADIUS_ANGSTROM = 1.7
STATED = re.compile(r"\b(charge|multiplicity)\s*=\s*([+-]?\d{1,3})\b", re.IGNORECASE)


def read_xyz(text: str, name: str, charge: int | None, multiplicity: int | None) -> Molecule:
    """Return the molecule of an XYZ file, its coordinates (ångström) untouched.

    Charge and multiplicity come from the arguments, else from ``charge=`` and ``multiplicity=``
    on the second line; the charge is 0 where neither states it. Raises StructureError.
    """
    elements, points, comment = _parse(text, name)
    stated = {key.lower(): int(value) for key, value in STATED.findall(comment)}
    total = charge if charge is not None else stated.get("charge", 0)
    spin = multiplicity if multiplicity is not None else stated.get("multiplicity")
    pairs = bonded_pairs(elements, points)
    _check_connected(name, len(elements), pairs)
    lengths = [float(np.linalg.norm(points[i] - points[j])) for i, j in pairs]
    drawing = assign_orders(name, elements, pairs, lengths, total)
    normalise(drawing)
    coordinates: tuple[Vector, ...] = tuple((float(x), float(y), float(z)) for x, y, z in points)
    stereo = _stereo(drawing, coordinates)
    return finish(name, drawing, [0] * len(elements), stereo, total, spin, coordinates)


def bonded_pairs(elements: list[str], points: npt.NDArray[np.float64]) -> list[tuple[int, int]]:
    """Return the bonded pairs (lower index first) among atoms at ``points``, (n, 3) in ångström.

    A pair is bonded up to ``STRETCH`` times the sum of the single-bond radii of Pyykkö and
    Atsumi (see reference/elements.py), and no more than a margin beyond it; atoms of period 2
    then lose their longest surplus bonds.
    """
    radii = np.array(
        [ELEMENTS[e].single_radius_angstrom or DEFAULT_RADIUS_ANGSTROM for e in elements]
    )
    near = cKDTree(points).query_pairs(2 * STRETCH * float(radii.max()))
    bonded = {}
    for i, j in sorted((min(pair), max(pair)) for pair in near):
        distance = float(np.linalg.norm(points[i] - points[j]))
        radius = float(radii[i] + radii[j])
        metal = is_metal(elements[i]) or is_metal(elements[j])
        margin = METAL_MARGIN_ANGSTROM if metal else MARGIN_ANGSTROM
        if distance <= min(STRETCH * radius, radius + margin):
            bonded[i, j] = distance / radius
    return sorted(_without_surplus(elements, bonded))


def _without_surplus(
    elements: list[str], bonded: dict[tuple[int, int], float]
) -> list[tuple[int, int]]:
    """Drop the longest bonds first, wherever an atom has more than it can have."""
    count = [0] * len(elements)
    for pair in bonded:
        for atom in pair:
            count[atom] += 1
    kept = dict(bonded)
    for pair in sorted(bonded, key=lambda pair: (-bonded[pair], pair)):
        if any(count[atom] > MOST_NEIGHBOURS.get(elements[atom], 16) for atom in pair):
            del kept[pair]
            for atom in pair:
                count[atom] -= 1
    return list(kept)


def _parse(text: str, name: str) -> tuple[list[str], npt.NDArray[np.float64], str]:
    lines = text.splitlines()
    try:
        count = int(lines[0])
    except (IndexError, ValueError):
        raise StructureError(name, f"{name}: line 1 must be the number of atoms") from None
    if count < 1:
        raise StructureError(name, f"{name}: the file holds no atoms")
    check_size(name, count)
    rows = [line.split() for line in lines[2 : count + 2]]
    if len(rows) < count:
        raise StructureError(name, f"{name}: {count} atoms announced, {len(rows)} given")
    if any(line.strip() for line in lines[count + 2 :]):
        raise StructureError(name, f"{name}: more lines than {count} atoms; one molecule is wanted")
    atoms = [_row(row, number, name) for number, row in enumerate(rows, start=3)]
    points = np.array([point for _, point in atoms], dtype=np.float64)
    _check_distances(name, points)
    return [element for element, _ in atoms], points, lines[1]


def _row(row: list[str], number: int, name: str) -> tuple[str, Vector]:
    try:
        x, y, z = (float(part) for part in row[1:4])
    except ValueError:
        raise StructureError(
            name, f"{name}: line {number} must be an element and three numbers"
        ) from None
    if not all(abs(value) < FARTHEST_ANGSTROM for value in (x, y, z)):
        raise StructureError(name, f"{name}: line {number} holds no sensible coordinates")
    return _element(row[0], number, name), (x, y, z)


def _element(text: str, number: int, name: str) -> str:
    symbol = text.capitalize()
    if text.isdigit():
        by_number = {row.atomic_number: row.symbol for row in ELEMENTS.values()}
        symbol = by_number.get(int(text[:4]), text)
    if symbol not in ELEMENTS:
        raise StructureError(name, f"{name}: line {number}: there is no element {text}")
    return symbol


def _check_distances(name: str, points: npt.NDArray[np.float64]) -> None:
    close = sorted(cKDTree(points).query_pairs(CLOSEST_ANGSTROM))
    if close:
        first, second = close[0]
        raise StructureError(
            name, f"{name}: atoms {first} and {second} are closer than {CLOSEST_ANGSTROM} Å"
        )


def _check_connected(name: str, count: int, pairs: list[tuple[int, int]]) -> None:
    group = list(range(count))
    for first, second in pairs:
        old, new = group[first], group[second]
        group = [new if label == old else label for label in group]
    parts = len(set(group))
    if parts > 1:
        raise StructureError(
            name, f"{name}: {parts} separate parts; one molecule or ion at a time is wanted"
        )


def _stereo(drawing: Drawing, coordinates: tuple[Vector, ...]) -> Stereo:
    mol = mol_of_drawing(drawing, [0] * len(drawing.elements), Stereo((), ()))
    with_coordinates(mol, coordinates)
    Chem.AssignStereochemistryFrom3D(mol)
    return stereo_of(mol)
