"""A flat drawing of a molecule: where atoms stand on paper, where there is room around each."""

import math
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.canvas import text_width
from shapeshelf.figures.model import Point
from shapeshelf.structure.depicting import flat_coordinates
from shapeshelf.structure.molecule import Molecule

Array = NDArray[np.float64]

MANY_ATOMS = 18
"""From here on carbon is a corner without a letter, and hydrogens are written beside their atom
or, on a carbon corner, left out."""
_READABLE = 0.45
_FULL_TURN = 2 * math.pi


@dataclass(frozen=True, slots=True)
class Flat:
    """A molecule on paper; ``shown`` are the atoms drawn, ``lettered`` those with a symbol."""

    molecule: Molecule
    points: Array
    """(n, 2) in pixels, y downwards; the mean bond has the length asked for."""
    shown: frozenset[int]
    lettered: frozenset[int]
    letters: tuple[str, ...]
    """Symbol of each atom, with the hydrogens that are written beside it: ``NH_{3}``."""

    def at(self, atom: int) -> Point:
        """Return where an atom stands."""
        return (float(self.points[atom, 0]), float(self.points[atom, 1]))


def lay_flat(molecule: Molecule, bond_pixels: float, many_atoms: int = MANY_ATOMS) -> Flat:
    """Return the molecule laid out flat, wide rather than high."""
    points = flat_coordinates(molecule) * (1, -1)
    points = _lying(points - points.mean(axis=0))
    lengths = [math.dist(points[bond.begin], points[bond.end]) for bond in molecule.bonds]
    points = points * (bond_pixels / float(np.median(lengths)))
    elements = tuple(atom.element for atom in molecule.atoms)
    if len(molecule.atoms) < many_atoms:
        everything = frozenset(range(len(molecule.atoms)))
        return Flat(molecule, points, everything, everything, elements)
    shown = frozenset(k for k in range(len(elements)) if not _folds(molecule, k))
    lettered = frozenset(k for k in shown if _needs_letter(molecule, k))
    letters = tuple(_with_hydrogens(molecule, k) for k in range(len(elements)))
    return Flat(molecule, points, shown, lettered, letters)


def crowded(flat: Flat, bond_pixels: float) -> bool:
    """Tell whether two drawn atoms stand so close that the drawing cannot be read."""
    points = flat.points[sorted(flat.shown)]
    first, second = np.triu_indices(len(points), 1)
    apart = np.hypot(*(points[first] - points[second]).T)
    return bool(len(apart)) and float(apart.min()) < _READABLE * bond_pixels


def letter_reach(flat: Flat, atom: int, other: int, half_height: float, size: float) -> float:
    """Return how far from an atom's middle its letters reach towards a neighbour, in pixels."""
    if atom not in flat.lettered:
        return 0.0
    half_width = text_width(flat.letters[atom], size, True) / 2 + 3.0
    dx, dy = np.abs(flat.points[other] - flat.points[atom]) / max(
        1e-9, math.dist(flat.points[atom], flat.points[other])
    )
    reach = min(
        max(half_width, half_height) / max(float(dx), 1e-9), half_height / max(float(dy), 1e-9)
    )
    return min(reach, math.hypot(max(half_width, half_height), half_height))


def free_directions(taken: list[float], count: int) -> list[float]:
    """Return ``count`` directions (radians) in the widest gaps between those taken."""
    if not taken:
        return [-math.pi / 2 + _FULL_TURN * k / max(count, 1) for k in range(count)]
    edges = sorted(angle % _FULL_TURN for angle in taken)
    gaps = [
        (start, (end - start) % _FULL_TURN or _FULL_TURN)
        for start, end in zip(edges, edges[1:] + edges[:1], strict=True)
    ]
    filled = [0] * len(gaps)
    for _ in range(count):
        widest = max(range(len(gaps)), key=lambda k: (round(gaps[k][1] / (filled[k] + 2), 6), -k))
        filled[widest] += 1
    return [
        start + width * (step + 1) / (number + 1)
        for (start, width), number in zip(gaps, filled, strict=True)
        for step in range(number)
    ]


def bond_directions(flat: Flat, atom: int) -> list[float]:
    """Return the directions (radians, clockwise on paper) of the drawn bonds at an atom."""
    x, y = flat.at(atom)
    return [
        math.atan2(flat.points[other, 1] - y, flat.points[other, 0] - x)
        for other in flat.molecule.neighbours(atom)
        if other in flat.shown
    ]


def _lying(points: Array) -> Array:
    """Turn by a quarter where the drawing is clearly higher than wide."""
    width, height = np.ptp(points, axis=0)
    return points @ np.array([[0.0, 1.0], [-1.0, 0.0]]) if height > 1.25 * width else points


def _folds(molecule: Molecule, atom: int) -> bool:
    """Tell whether an atom is a plain hydrogen on one heavier atom."""
    one = molecule.atoms[atom]
    others = molecule.neighbours(atom)
    plain = one.element == "H" and not one.isotope and not one.formal_charge
    return plain and len(others) == 1 and molecule.atoms[others[0]].element != "H"


def _with_hydrogens(molecule: Molecule, atom: int) -> str:
    count = sum(_folds(molecule, other) for other in molecule.neighbours(atom))
    element = molecule.atoms[atom].element
    if not count:
        return element
    return f"{element}H" + (f"_{{{count}}}" if count > 1 else "")


def _needs_letter(molecule: Molecule, atom: int) -> bool:
    one = molecule.atoms[atom]
    return one.element != "C" or bool(one.formal_charge) or len(molecule.neighbours(atom)) < 2
