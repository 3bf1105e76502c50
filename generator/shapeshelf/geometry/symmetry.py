"""The point group of a set of atoms, within a stated tolerance."""

from collections.abc import Sequence
from itertools import permutations as orderings
from itertools import product

import numpy as np
from numpy.typing import ArrayLike, NDArray

from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.group_names import Element, element, operation_label, point_group_symbol
from shapeshelf.geometry.model import Matrix, Symmetry, SymmetryOperation
from shapeshelf.geometry.operations import Indices, averaged, closed_operations
from shapeshelf.geometry.standard_axes import standard_axes
from shapeshelf.geometry.vectors import Array, perpendicular, unit
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Vector

DEFAULT_TOLERANCE_ANGSTROM = 0.05
"""Above the noise of optimised and well-measured structures, below any real distortion."""


def find_symmetry(
    elements: Sequence[str],
    coordinates_angstrom: ArrayLike,
    tolerance_angstrom: float = DEFAULT_TOLERANCE_ANGSTROM,
) -> Symmetry:
    """Return the point group, all its operations and the structure symmetrised under them.

    ``elements`` n symbols (isotopes count as one element), ``coordinates_angstrom`` (n, 3).
    An operation counts where no atom lands further than ``tolerance_angstrom`` from its image
    and the operations kept form a group. ``K`` (the symbol of the full rotation group with
    inversion) stands for a single atom, whose ``operations`` are those of Oh.
    Raises AnalysisError for no atoms, an unknown element or coinciding atoms.
    """
    given = np.asarray(coordinates_angstrom, float)
    numbers, weights = _checked(elements, given, tolerance_angstrom)
    centre = weights @ given / weights.sum()
    points = given - centre
    if len(points) == 1:
        return _of_single_atom(centre, tolerance_angstrom)
    line = _common_line(points)
    if _is_linear(points, line, tolerance_angstrom):
        return _of_linear(numbers, weights, points, line, centre, tolerance_angstrom)
    return _of_solid(numbers, weights, points, centre, tolerance_angstrom)


def symmetrised(
    elements: Sequence[str], coordinates_angstrom: ArrayLike, tolerance_angstrom: float
) -> tuple[Array, int]:
    """Return the coordinates (n, 3) averaged over the group, and how many operations it has.

    What ``find_symmetry`` gives, in a third of its time: without names and axes; for a linear
    molecule the operations of C4v or D4h count. Raises AnalysisError as that does.
    """
    given = np.asarray(coordinates_angstrom, float)
    numbers, weights = _checked(elements, given, tolerance_angstrom)
    centre = weights @ given / weights.sum()
    points = given - centre
    if len(points) == 1 or _is_linear(points, _common_line(points), tolerance_angstrom):
        found = find_symmetry(elements, given, tolerance_angstrom)
        return np.array(found.coordinates_angstrom), len(found.operations)
    group = closed_operations(numbers, points, tolerance_angstrom)
    return averaged(points, group.matrices, group.permutations) + centre, len(group.matrices)


def _checked(
    elements: Sequence[str], points: Array, tolerance: float
) -> tuple[Indices, NDArray[np.float64]]:
    """Return atomic numbers (n,) and atomic weights (n,), having refused what has no symmetry."""
    if len(elements) == 0 or points.shape != (len(elements), 3):
        raise AnalysisError("symmetry", f"{len(elements)} elements but coordinates {points.shape}")
    if not np.isfinite(points).all() or tolerance <= 0:
        raise AnalysisError("symmetry", "coordinates and tolerance must be finite and positive")
    unknown = sorted(set(elements) - set(ELEMENTS))
    if unknown:
        raise AnalysisError("symmetry", f"unknown element {unknown[0]}")
    apart = np.linalg.norm(points[:, None] - points, axis=2) + 9.0 * np.eye(len(points))
    if apart.min() < 0.1:
        first, second = np.unravel_index(int(np.argmin(apart)), apart.shape)
        raise AnalysisError("symmetry", f"atoms {first} and {second} coincide")
    known = [ELEMENTS[symbol] for symbol in elements]
    return (
        np.array([one.atomic_number for one in known]),
        np.array([one.atomic_weight for one in known]),
    )


def _common_line(points: Array) -> Array:
    """Return the unit vector (3,) along which the points spread most."""
    _, vectors = np.linalg.eigh(points.T @ points)
    axis = vectors[:, 2]
    lead = axis[np.abs(axis) > 1e-6][0]
    return np.asarray(axis if lead > 0 else -axis)


def _is_linear(points: Array, line: Array, tolerance: float) -> bool:
    aside = np.linalg.norm(points - np.outer(points @ line, line), axis=1)
    return bool(aside.max() <= tolerance / 2)


def _of_single_atom(centre: Array, tolerance: float) -> Symmetry:
    matrices = np.array(
        [
            np.eye(3)[list(order)] * np.array(signs)[:, None]
            for order in orderings(range(3))
            for signs in product((1.0, -1.0), repeat=3)
        ]
    )
    identity_first = sorted(matrices, key=lambda matrix: -float(np.trace(matrix)))
    turns = np.array(identity_first)
    images = np.zeros((len(turns), 1), dtype=np.int64)
    elements = [element(matrix) for matrix in turns]
    still = np.zeros((1, 3))
    return _record("K", 1, False, elements, turns, images, still, centre, np.eye(3), tolerance)


def _of_linear(
    numbers: Indices,
    weights: NDArray[np.float64],
    points: Array,
    line: Array,
    centre: Array,
    tolerance: float,
) -> Symmetry:
    """Return Dinfh where the atoms read the same from both ends, Cinfv otherwise."""
    order = np.argsort(points @ line)
    places = (points @ line)[order]
    kinds = numbers[order]
    mirrored = -places[::-1]
    two_ended = bool((kinds == kinds[::-1]).all() and np.abs(places - mirrored).max() <= tolerance)
    reversal = np.empty_like(order)
    reversal[order] = order[::-1]
    x = perpendicular(line)
    axes = np.array([x, np.cross(line, x), line])
    matrices, flips = _finite_subgroup(axes, two_ended)
    images = np.array([reversal if flip else np.arange(len(order)) for flip in flips])
    on_line = np.outer(points @ line, line)
    exact = averaged(on_line, matrices, images)
    name = "Dinfh" if two_ended else "Cinfv"
    turns = 2 if two_ended else 1
    elements = [element(matrix) for matrix in matrices]
    return _record(name, turns, False, elements, matrices, images, exact, centre, axes, tolerance)


def _finite_subgroup(axes: Array, two_ended: bool) -> tuple[Array, list[bool]]:
    """Return the matrices of C4v or D4h about ``axes``, and which of them reverse z."""
    quarter = np.array([[0.0, -1.0], [1.0, 0.0]])
    turns = [np.linalg.matrix_power(quarter, power) for power in range(4)]
    flat = turns + [turn @ np.diag([1.0, -1.0]) for turn in turns]
    matrices, flips = [], []
    for sign in (1.0, -1.0) if two_ended else (1.0,):
        for block in flat:
            matrix = np.diag([0.0, 0.0, sign])
            matrix[:2, :2] = block
            matrices.append(axes.T @ matrix @ axes)
            flips.append(sign < 0)
    return np.array(matrices), flips


def _of_solid(
    numbers: Indices,
    weights: NDArray[np.float64],
    points: Array,
    centre: Array,
    tolerance: float,
) -> Symmetry:
    group = closed_operations(numbers, points, tolerance)
    exact = averaged(points, group.matrices, group.permutations)
    elements = [element(matrix) for matrix in group.matrices]
    name = point_group_symbol(elements)
    turns = sum(1 for one in elements if one.proper)
    axes = standard_axes(name, elements, weights, exact)
    return _record(
        name,
        turns,
        turns == len(elements),
        elements,
        group.matrices,
        group.permutations,
        exact,
        centre,
        axes,
        tolerance,
    )


def _record(
    name: str,
    turns: int,
    chiral: bool,
    elements: list[Element],
    matrices: Array,
    permutations: Indices,
    points: Array,
    centre: Array,
    axes: Array,
    tolerance: float,
) -> Symmetry:
    operations = tuple(
        SymmetryOperation(operation_label(one), _rows(matrix), tuple(images))
        for one, matrix, images in zip(elements, matrices, permutations.tolist(), strict=True)
    )
    return Symmetry(
        point_group=name,
        tolerance_angstrom=tolerance,
        operations=operations,
        rotational_number=turns,
        chiral=chiral,
        equivalent_atoms=_orbits(permutations),
        centre_angstrom=_vector(centre),
        axes=_rows(np.array([unit(axis) for axis in axes])),
        coordinates_angstrom=tuple(_vector(point + centre) for point in points),
    )


def _orbits(permutations: Indices) -> tuple[tuple[int, ...], ...]:
    """Return the sets of atoms that the operations exchange, in order of their first atom."""
    sets = {
        tuple(sorted({int(k) for k in permutations[:, atom]}))
        for atom in range(permutations.shape[1])
    }
    return tuple(sorted(sets))


def _vector(values: Array) -> Vector:
    return (float(values[0]), float(values[1]), float(values[2]))


def _rows(matrix: Array) -> Matrix:
    return (_vector(matrix[0]), _vector(matrix[1]), _vector(matrix[2]))
