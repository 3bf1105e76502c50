"""Names: an operation from its matrix, a point group from its operations.

Schoenflies' symbols in plain letters. Matrices must be exact to about 1e-8.
"""

from dataclasses import dataclass
from fractions import Fraction

import numpy as np

from shapeshelf.geometry.vectors import Array

_LARGEST_ORDER = 96
_SAME_DIRECTION = 1e-6


@dataclass(frozen=True, slots=True)
class Element:
    """What one matrix does: turn by ``turn`` of a full circle about ``axis``, reflect or not.

    ``axis`` is a tuple of three numbers; for a reflection the normal of the plane, and
    meaningless for the identity and the inversion.
    """

    proper: bool
    turn: Fraction
    axis: tuple[float, float, float]

    @property
    def order(self) -> int:
        """Order of the turn: 3 for C3, C3^2 and S3."""
        return self.turn.denominator


def element(matrix: Array) -> Element:
    """Return the symmetry element of an orthogonal ``matrix`` (3, 3)."""
    proper = bool(np.linalg.det(matrix) > 0)
    rotation = matrix if proper else -matrix
    axis = _axis(rotation)
    cosine = (np.trace(rotation) - 1.0) / 2.0
    sine = 0.5 * axis @ _antisymmetric(rotation)
    turn = _fraction(float(np.arctan2(sine, cosine)) / (2.0 * np.pi))
    if not proper:
        turn = (turn + Fraction(1, 2)) % 1
    return Element(proper, turn, (float(axis[0]), float(axis[1]), float(axis[2])))


def operation_label(operation: Element) -> str:
    """Return ``E``, ``i``, ``sigma``, ``C3``, ``C3^2``, ``S4^3`` and so on."""
    order, power = operation.order, operation.turn.numerator
    if operation.proper:
        return "E" if order == 1 else _powered("C", order, power)
    if order <= 2:
        return "sigma" if order == 1 else "i"
    return _powered("S", order, power if power % 2 else power + order)


def point_group_symbol(elements: list[Element]) -> str:
    """Return the Schoenflies symbol of a finite group given all its elements."""
    turns = [one for one in elements if one.proper]
    improper = [one for one in elements if not one.proper]
    highest = max(one.order for one in turns)
    if len(axes_of_order(turns, 3)) > 1:
        return _cubic_symbol(len(turns), improper)
    if highest == 1:
        return _axisless_symbol(improper)
    return _axial_symbol(highest, len(turns), improper)


def axes_of_order(elements: list[Element], order: int) -> list[Array]:
    """Return one unit vector (3,) for each axis of proper turns of exactly ``order``."""
    axes: list[Array] = []
    for one in elements:
        axis = np.array(one.axis)
        if one.proper and one.order == order and not any(parallel(axis, old) for old in axes):
            axes.append(axis)
    return axes


def parallel(first: Array, second: Array) -> bool:
    """Return whether two unit vectors (3,) share a line, either way round."""
    return float(np.linalg.norm(np.cross(first, second))) < _SAME_DIRECTION


def is_mirror(operation: Element) -> bool:
    """Return whether this is a plain reflection."""
    return not operation.proper and operation.order == 1


def _cubic_symbol(turns: int, improper: list[Element]) -> str:
    letter = {12: "T", 24: "O", 60: "I"}[turns]
    if not improper:
        return letter
    centred = any(one.order == 2 for one in improper)
    return letter + "h" if centred else letter + "d"


def _axisless_symbol(improper: list[Element]) -> str:
    if not improper:
        return "C1"
    return "Cs" if is_mirror(improper[0]) else "Ci"


def _axial_symbol(highest: int, turns: int, improper: list[Element]) -> str:
    """Return Cn, Cnv, Cnh, S2n, Dn, Dnh or Dnd: told apart by how many mirrors there are."""
    dihedral = turns == 2 * highest
    stem = f"{'D' if dihedral else 'C'}{highest}"
    mirrors = sum(1 for one in improper if is_mirror(one))
    if not improper:
        return stem
    if dihedral:
        return stem + ("h" if mirrors == highest + 1 else "d")
    if mirrors == 0:
        return f"S{2 * highest}"
    return stem + ("v" if mirrors == highest else "h")


def _powered(letter: str, order: int, power: int) -> str:
    return f"{letter}{order}" if power == 1 else f"{letter}{order}^{power}"


def _fraction(turn: float) -> Fraction:
    return Fraction(turn).limit_denominator(_LARGEST_ORDER) % 1


def _axis(rotation: Array) -> Array:
    """Return the axis of a rotation, its sign such that the first sizeable component is positive.

    The symmetric part (R + R^T)/2 has the axis as eigenvector to eigenvalue one, the largest.
    """
    _, vectors = np.linalg.eigh((rotation + rotation.T) / 2.0)
    axis: Array = vectors[:, 2]
    lead = next(value for value in axis.tolist() if abs(value) > _SAME_DIRECTION)
    return axis if lead > 0 else -axis


def _antisymmetric(matrix: Array) -> Array:
    return np.array(
        [matrix[2, 1] - matrix[1, 2], matrix[0, 2] - matrix[2, 0], matrix[1, 0] - matrix[0, 1]]
    )
