"""Normal modes by symmetry species: counted, and told infrared-active from Raman-active.

The displacements of all atoms span the representation chi(R) = u(R) tr(R), u the number of
atoms that R leaves in place; translations tr(R) and rotations det(R) tr(R) are taken off. Bond
stretches span the number of bonds that R leaves in place. A species is infrared-active where it
occurs in the vector representation, Raman-active where it occurs in its symmetric square
(tr(R)^2 + tr(R^2)) / 2.

Source: E. B. Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations (1955), recalled from
memory.
"""

import numpy as np
from numpy.typing import NDArray

from shapeshelf.geometry.model import Symmetry
from shapeshelf.properties.model import ModeSpecies
from shapeshelf.properties.species import Species, linear_name, species_of, standard_matrices
from shapeshelf.structure.molecule import Molecule

Array = NDArray[np.float64]


def mode_species(molecule: Molecule, symmetry: Symmetry) -> tuple[ModeSpecies, ...]:
    """Return every species that vibrates, in the order of the group's species."""
    matrices = standard_matrices(symmetry)
    linear = symmetry.point_group in ("Cinfv", "Dinfh")
    vibrations = _vibrations(symmetry, matrices, linear)
    stretches = _unmoved_bonds(molecule, symmetry)
    traces = np.trace(matrices, axis1=1, axis2=2)
    squares = np.trace(matrices @ matrices, axis1=1, axis2=2)
    rows = (
        ModeSpecies(
            species=linear_name(one.name) if linear else one.name,
            degeneracy=one.degeneracy,
            count=_occurrences(one, vibrations),
            stretches=min(_occurrences(one, stretches), _occurrences(one, vibrations)),
            infrared=_occurrences(one, traces) > 0,
            raman=_occurrences(one, (traces**2 + squares) / 2) > 0,
        )
        for one in species_of(symmetry)
    )
    return tuple(row for row in rows if row.count)


def _vibrations(symmetry: Symmetry, matrices: Array, linear: bool) -> Array:
    permutations = np.array([operation.permutation for operation in symmetry.operations])
    unmoved = (permutations == np.arange(permutations.shape[1])).sum(1)
    traces = np.trace(matrices, axis1=1, axis2=2)
    turns = np.linalg.det(matrices) * traces
    if linear:
        turns -= np.linalg.det(matrices) * matrices[:, 2, 2]
    return np.asarray(unmoved * traces - traces - turns)


def _unmoved_bonds(molecule: Molecule, symmetry: Symmetry) -> Array:
    bonds = [frozenset((bond.begin, bond.end)) for bond in molecule.bonds]
    return np.array(
        [
            sum(frozenset(operation.permutation[atom] for atom in bond) == bond for bond in bonds)
            for operation in symmetry.operations
        ],
        float,
    )


def _occurrences(species: Species, characters: Array) -> int:
    """Return how often a species occurs; pairs of complex species count as one of norm two."""
    norm = float(species.characters @ species.characters)
    return round(float(species.characters @ characters) / norm)
