"""The customary x, y, z axes of a point group.

z is the principal axis; a planar C2v molecule lies in yz, x at a right angle to it; a planar
D2h molecule likewise, z passing through the most atoms: R. S. Mulliken, J. Chem. Phys. 23
(1955) 1997 (recalled from memory). Otherwise: Cnv has x in a mirror plane, Dn, Dnh and Dnd
have x along a C2 axis, always the plane or axis with the most atoms; T, Td and Th have the
three C2 axes, O and Oh the three C4 axes, I and Ih z along C5 and x along C2; Cs has z normal
to the mirror; C1 and Ci take the principal axes of inertia.
"""

import numpy as np
from numpy.typing import NDArray

from shapeshelf.geometry.group_names import Element, axes_of_order, is_mirror, parallel
from shapeshelf.geometry.vectors import Array, perpendicular, unit

_ON_ELEMENT_ANGSTROM = 1e-4


def standard_axes(
    point_group: str, elements: list[Element], weights: NDArray[np.float64], points: Array
) -> Array:
    """Return the rows x, y, z (3, 3), right-handed, of a finite group about the origin.

    ``points`` (n, 3) in ångström, symmetrised; ``weights`` (n,) settle ties between axes.
    """
    if point_group[0] in "TOI":
        z, x = _cubic_axes(point_group, elements)
    elif point_group in ("C1", "Ci"):
        z, x = _inertia_axes(weights, points)
    elif point_group in ("D2", "D2h"):
        z, x = _three_twofold_axes(elements, weights, points)
    else:
        z = principal_axis(point_group, elements)
        x = _side_axis(point_group, z, elements, weights, points)
    return np.array([x, np.cross(z, x), z])


def principal_axis(point_group: str, elements: list[Element]) -> Array:
    """Return the unit vector (3,) along the highest axis, for Cs the normal of the mirror.

    Of the three C2 axes of D2d that of the S4 turn.
    """
    if point_group == "Cs":
        return next(np.array(one.axis) for one in elements if is_mirror(one))
    if point_group == "D2d":
        return next(np.array(one.axis) for one in elements if not one.proper and one.order == 4)
    highest = max(one.order for one in elements if one.proper)
    return axes_of_order(elements, highest)[0]


def _cubic_axes(point_group: str, elements: list[Element]) -> tuple[Array, Array]:
    if point_group[0] == "I":
        z = axes_of_order(elements, 5)[0]
        twofold = axes_of_order(elements, 2)
        return z, min(twofold, key=lambda axis: abs(float(axis @ z)))
    axes = axes_of_order(elements, 4 if point_group[0] == "O" else 2)
    return axes[0], axes[1]


def _inertia_axes(weights: NDArray[np.float64], points: Array) -> tuple[Array, Array]:
    """Return z of the largest and x of the smallest moment of inertia."""
    spread = np.einsum("n,ni,nj->ij", weights, points, points)
    _, vectors = np.linalg.eigh(np.trace(spread) * np.eye(3) - spread)
    return _upright(vectors[:, 2]), _upright(vectors[:, 0])


def _three_twofold_axes(
    elements: list[Element], weights: NDArray[np.float64], points: Array
) -> tuple[Array, Array]:
    axes = axes_of_order(elements, 2)
    ranked = sorted(axes, key=lambda axis: _passed(axis, weights, points), reverse=True)
    z = ranked[0]
    flat = [axis for axis in axes if np.abs(points @ axis).max() < _ON_ELEMENT_ANGSTROM]
    x = flat[0] if flat and not parallel(flat[0], z) else ranked[-1]
    return z, x


def _side_axis(
    point_group: str,
    z: Array,
    elements: list[Element],
    weights: NDArray[np.float64],
    points: Array,
) -> Array:
    twofold = [axis for axis in axes_of_order(elements, 2) if abs(float(axis @ z)) < 0.1]
    if twofold:
        return max(twofold, key=lambda axis: _passed(axis, weights, points))
    normals = [np.array(one.axis) for one in elements if is_mirror(one)]
    upright = [normal for normal in normals if abs(float(normal @ z)) < 0.1]
    if not upright:
        return _outward(z, points)
    fullest = max(upright, key=lambda normal: _held(normal, weights, points))
    return fullest if point_group == "C2v" else unit(np.cross(fullest, z))


def _passed(axis: Array, weights: NDArray[np.float64], points: Array) -> tuple[int, float]:
    """Return how many atoms lie on ``axis`` and their weight."""
    on = np.linalg.norm(np.cross(points, axis), axis=1) < _ON_ELEMENT_ANGSTROM
    return int(on.sum()), round(float(weights[on].sum()), 6)


def _held(normal: Array, weights: NDArray[np.float64], points: Array) -> tuple[int, float]:
    """Return how many atoms lie in the plane with this ``normal`` and their weight."""
    on = np.abs(points @ normal) < _ON_ELEMENT_ANGSTROM
    return int(on.sum()), round(float(weights[on].sum()), 6)


def _outward(z: Array, points: Array) -> Array:
    """Return the direction at a right angle to ``z`` of the atom furthest from it."""
    flat = points - np.outer(points @ z, z)
    far = flat[int(np.argmax(np.round(np.linalg.norm(flat, axis=1), 6)))]
    return unit(far) if np.linalg.norm(far) > _ON_ELEMENT_ANGSTROM else perpendicular(z)


def _upright(axis: Array) -> Array:
    lead = axis[np.abs(axis) > 1e-6][0]
    return axis if lead > 0 else -axis
