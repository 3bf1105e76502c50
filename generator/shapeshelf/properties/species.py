"""Symmetry species of every point group, as characters on the group's own operations.

No table is looked up for the axial groups. In the standard frame every operation of an axial
group is a turn by phi about z, or a reflection of the plane, with or without a change of sign
of z: three numbers (phi, m, s), with m the determinant in the plane and s the sign of z. The
one-dimensional species are signs on these, the two-dimensional ones 2 cos(k phi) where m = 1 and
0 where m = -1. Groups with inversion or a horizontal mirror are products. The cubic and
icosahedral groups take their characters from the class of each operation.

Source: R. S. Mulliken, J. Chem. Phys. 23 (1955) 1997 (names and axes); E. B. Wilson,
J. C. Decius and P. C. Cross, Molecular Vibrations (1955), appendix X; recalled from memory.
"""

import re
from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.geometry.model import Symmetry
from shapeshelf.properties.cubic_species import cubic_species

Array = NDArray[np.float64]
LINEAR_NAMES = {
    "A1": "Σ+",
    "E": "Π",
    "A1g": "Σg+",
    "A2u": "Σu+",
    "Eg": "Πg",
    "Eu": "Πu",
}
"""Species of the finite subgroups C4v and D4h by their names in the linear groups."""


@dataclass(frozen=True, slots=True)
class Species:
    """One symmetry species: its name and its character under each operation (k,)."""

    name: str
    degeneracy: int
    characters: Array


@dataclass(frozen=True, slots=True)
class AxialOperations:
    """The operations of an axial group as three numbers each, arrays of shape (k,)."""

    phi: Array
    plane: Array
    sign: Array

    def times_inversion(self, improper: NDArray[np.bool_]) -> "AxialOperations":
        """Return the operations with each improper one replaced by minus itself."""
        return AxialOperations(
            np.where(improper, self.phi + np.pi, self.phi),
            self.plane,
            np.where(improper, -self.sign, self.sign),
        )


def species_of(symmetry: Symmetry) -> tuple[Species, ...]:
    """Return the species of the point group; for linear molecules those of C4v or D4h."""
    matrices = standard_matrices(symmetry)
    symbol = {"Cinfv": "C4v", "Dinfh": "D4h"}.get(symmetry.point_group, symmetry.point_group)
    if symbol[0] in "TOI":
        return tuple(Species(*row) for row in cubic_species(symbol, matrices))
    unmoved = np.array(
        [sum(k == a for k, a in enumerate(op.permutation)) for op in symmetry.operations]
    )
    return _axial_species(symbol, matrices, unmoved)


def standard_matrices(symmetry: Symmetry) -> Array:
    """Return the operations (k, 3, 3) in the group's standard frame."""
    axes = np.array(symmetry.axes)
    return np.array([axes @ np.array(op.matrix) @ axes.T for op in symmetry.operations])


def linear_name(name: str) -> str:
    """Return the name that a species of C4v or D4h bears in the linear group."""
    return LINEAR_NAMES.get(name, name)


def _axial_species(symbol: str, matrices: Array, unmoved: Array) -> tuple[Species, ...]:
    if symbol in ("C1", "Cs", "Ci"):
        return _smallest_groups(symbol, matrices)
    kind, order = _parse(symbol)
    operations = _axial(matrices)
    improper = np.linalg.det(matrices) < 0
    if kind != "Cv":
        unmoved = np.where(improper, 0, unmoved)
    if kind in ("Cv", "D"):
        return tuple(_dihedral(order, operations, unmoved, kind == "D"))
    if kind == "C":
        return tuple(_cyclic(order, operations.phi))
    if kind == "S":
        return tuple(_rotary_reflection(order, operations, improper))
    if kind == "Dd" and order % 2 == 0:
        return tuple(_even_staggered(order, operations))
    inner: Callable[[AxialOperations], list[Species]] = (
        (lambda ops: _cyclic(order, ops.phi))
        if kind == "Ch"
        else (lambda ops: _dihedral(order, ops, unmoved, True))
    )
    if kind in ("Ch", "Dh") and order % 2:
        mirrored = operations.sign != (operations.plane if kind == "Dh" else 1.0)
        return _product(inner(operations), np.where(mirrored, -1.0, 1.0), "'", "''")
    parity = np.where(improper, -1.0, 1.0)
    return _product(inner(operations.times_inversion(improper)), parity, "g", "u")


def _parse(symbol: str) -> tuple[str, int]:
    match = re.fullmatch(r"([CDS])(\d+)([vhd]?)", symbol)
    assert match is not None, symbol
    return match[1] + match[3], int(match[2])


def _axial(matrices: Array) -> AxialOperations:
    plane = np.sign(np.linalg.det(matrices[:, :2, :2]))
    return AxialOperations(
        np.arctan2(matrices[:, 1, 0], matrices[:, 0, 0]), plane, np.sign(matrices[:, 2, 2])
    )


def _smallest_groups(symbol: str, matrices: Array) -> tuple[Species, ...]:
    one, sign = np.ones(len(matrices)), np.sign(np.linalg.det(matrices))
    if symbol == "C1":
        return (Species("A", 1, one),)
    names = ("A'", "A''") if symbol == "Cs" else ("Ag", "Au")
    return Species(names[0], 1, one), Species(names[1], 1, sign)


def _cyclic(order: int, phi: Array) -> list[Species]:
    """Cn: A, B where n is even, and pairs of complex species taken together as E."""
    species = [Species("A", 1, np.ones_like(phi))]
    if order % 2 == 0:
        species.append(Species("B", 1, _whole(np.cos(order / 2 * phi))))
    return species + _doubles(order, phi, np.ones_like(phi))


def _rotary_reflection(
    order: int, operations: AxialOperations, improper: NDArray[np.bool_]
) -> tuple[Species, ...]:
    """S2n: n odd is Cn with inversion, n even is cyclic in the improper turn itself."""
    if order % 4 == 2:
        inner = _cyclic(order // 2, operations.times_inversion(improper).phi)
        return _product(inner, np.where(improper, -1.0, 1.0), "g", "u")
    return tuple(_cyclic(order, operations.phi))


def _dihedral(
    order: int, operations: AxialOperations, unmoved: Array, rotations: bool
) -> list[Species]:
    """Cnv and Dn: A1, A2, for even n also B1, B2, and E(k)."""
    phi, plane = operations.phi, operations.plane
    one = np.ones_like(phi)
    if rotations and order == 2:
        return _three_axes(operations)
    species = [Species("A1", 1, one), Species("A2", 1, plane)]
    if order % 2 == 0:
        wave = _whole(np.cos(order / 2 * phi))
        if order > 2:
            wave = _first_set_holds_more_atoms(wave, plane, unmoved)
        species += [Species("B1", 1, wave), Species("B2", 1, wave * plane)]
    return species + _doubles(order, phi, plane)


def _first_set_holds_more_atoms(wave: Array, plane: Array, unmoved: Array) -> Array:
    """B1 keeps its sign under the planes (or twofold axes) that pass through more atoms."""
    first = unmoved[(plane < 0) & (wave > 0)].sum()
    second = unmoved[(plane < 0) & (wave < 0)].sum()
    return wave * plane if second > first else wave


def _three_axes(operations: AxialOperations) -> list[Species]:
    """D2: B1, B2, B3 keep their sign under the twofold axes z, y, x."""
    about_z = operations.plane
    about_x = _whole(np.cos(operations.phi))
    return [
        Species("A", 1, np.ones_like(about_z)),
        Species("B1", 1, about_z),
        Species("B2", 1, about_x * about_z),
        Species("B3", 1, about_x),
    ]


def _even_staggered(order: int, operations: AxialOperations) -> list[Species]:
    """Dnd with n even: as a dihedral group of twice the order, led by S2n."""
    phi, plane, sign = operations.phi, operations.plane, operations.sign
    wave = np.where(plane > 0, _whole(np.cos(order * phi)), -sign)
    return [
        Species("A1", 1, np.ones_like(phi)),
        Species("A2", 1, plane),
        Species("B1", 1, wave),
        Species("B2", 1, wave * plane),
        *_doubles(2 * order, phi, plane),
    ]


def _doubles(order: int, phi: Array, plane: Array) -> list[Species]:
    count = (order - 1) // 2
    return [
        Species(
            f"E{k}" if order > 4 else "E",
            2,
            np.where(plane > 0, 2 * np.cos(k * phi), 0.0),
        )
        for k in range(1, count + 1)
    ]


def _product(inner: list[Species], parity: Array, even: str, odd: str) -> tuple[Species, ...]:
    return tuple(
        Species(row.name + mark, row.degeneracy, row.characters * factor)
        for mark, factor in ((even, np.ones_like(parity)), (odd, parity))
        for row in inner
    )


def _whole(values: Array) -> Array:
    return np.asarray(np.rint(values), dtype=np.float64)
