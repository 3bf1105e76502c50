"""Calculated normal modes by symmetry species and by what moves.

A mode belongs to the species onto which its displacements project: P = (d / sum chi(R)^2) sum
chi(R) R, R moving every atom's displacement to the place and direction where the operation takes
it. A pair of complex species counts as one of twice the norm. How much of a mode is stretching is
the part of its mass-weighted displacement within the space that bond stretches alone span.

Source: E. B. Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations (1955), recalled from
memory.
"""

from collections.abc import Sequence

import numpy as np
from numpy.typing import NDArray

from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.operations import carried
from shapeshelf.properties.species import linear_name, species_of

Array = NDArray[np.float64]
CLEAR = 0.8
"""Share of a mode that has to be of one species; two modes that happen to coincide may mix."""


def species_of_modes(symmetry: Symmetry, displacements: Array) -> tuple[str | None, ...]:
    """Return the species of each mode, ``None`` where it is of no single one.

    ``displacements`` (modes, n, 3) in the frame of ``symmetry``, mass-weighted or not, any length.
    """
    linear = symmetry.point_group in ("Cinfv", "Dinfh")
    species = species_of(symmetry)
    images = np.array([carried(displacements, one) for one in symmetry.operations])
    overlaps = np.einsum("kmax,max->km", images, displacements)
    norms = (displacements**2).sum(axis=(1, 2))
    shares = np.array(
        [
            one.degeneracy / (one.characters @ one.characters) * one.characters @ overlaps / norms
            for one in species
        ]
    )
    names = [linear_name(one.name) if linear else one.name for one in species]
    best = shares.argmax(axis=0)
    return tuple(
        names[row] if shares[row, mode] >= CLEAR else None for mode, row in enumerate(best)
    )


def stretching_shares(
    bonds: Sequence[tuple[int, int]], points: Array, masses: Array, displacements: Array
) -> Array:
    """Return how much of each mode is bond stretching, 0 to 1, shape (modes,).

    ``points`` (n, 3), ``masses`` (n,), Cartesian ``displacements`` (modes, n, 3), any units.
    """
    roots = np.sqrt(masses)[:, None]
    stretches = np.zeros((len(bonds), *points.shape))
    for row, (begin, end) in enumerate(bonds):
        along = points[end] - points[begin]
        along = along / np.linalg.norm(along)
        stretches[row, begin], stretches[row, end] = -along, along
    flat = (stretches / roots).reshape(len(bonds), -1)
    _, sizes, basis = np.linalg.svd(flat, full_matrices=False)
    basis = basis[sizes > 1e-8 * sizes[0]]
    weighted = (displacements * roots).reshape(len(displacements), -1)
    weighted /= np.linalg.norm(weighted, axis=1, keepdims=True)
    return np.asarray(((weighted @ basis.T) ** 2).sum(axis=1))
