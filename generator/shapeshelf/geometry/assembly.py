"""A three-dimensional structure for a whole molecule.

A1  Supplied coordinates stand as they are.
A2  One centre and its neighbours: the directions of the best placement times the bond lengths,
    which know axial from equatorial (site_lengths.py), as those of A4 do.
A3  Several centres, carbon among the atoms, and MMFF94s has parameters for all: conformers by
    ETKDG, relaxed by MMFF94s; of those as low as the lowest within the force field's own error
    the most symmetric.
A4  Several centres otherwise: conformers by distance geometry on our own bounds, relaxed under
    lengths, angles, contacts and torsion rules (forces.py, torsions.py), the lowest one.
A5  The result is symmetrised: atoms that miss their image by less than a tolerance are put on it,
    a smaller one where the larger would make unlike bonds alike (cyclobutadiene).

In A3 and A4 the atoms are first put in an order that does not depend on the spelling, and seeds
are fixed: the same molecule always gives the same structure.
"""

from collections.abc import Sequence

import numpy as np

from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.choosing import SNAP_ANGSTROM
from shapeshelf.geometry.conformers import Conformers, by_force_field, by_rules
from shapeshelf.geometry.model import Structure, StructureBasis
from shapeshelf.geometry.site_lengths import site_lengths_angstrom
from shapeshelf.geometry.surroundings import surroundings_of
from shapeshelf.geometry.symmetry import symmetrised
from shapeshelf.geometry.targets import handedness
from shapeshelf.geometry.vectors import Array
from shapeshelf.structure.embedding import mmff_covers
from shapeshelf.structure.molecule import Molecule

FINE_SNAP_ANGSTROM = 0.02
KEPT_LENGTH_ANGSTROM = 0.03
"""Noise of an assembled bond length; the two lengths of cyclobutadiene differ by 0.2."""


def assemble(molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre]) -> Structure:
    """Return coordinates of every atom of ``molecule``, in its order, and how they came about.

    Raises AnalysisError for a centre whose shape only supplied coordinates can tell, and where
    no structure fits the distances.
    """
    if molecule.coordinates_angstrom is not None:
        return Structure(
            molecule.coordinates_angstrom, StructureBasis.SUPPLIED, "coordinates as supplied"
        )
    _refuse_unplaced(molecule, centres)
    if len(centres) <= 1:
        points = _single_centre(molecule, lewis, centres)
        method = "directions of the domain model, bond lengths from covalent radii and site terms"
        return _structure(molecule, points, method, 1)
    found = _conformers(molecule, lewis, centres)
    return _structure(molecule, found.best, found.method, found.tried)


def _refuse_unplaced(molecule: Molecule, centres: Sequence[Centre]) -> None:
    for centre in centres:
        if not centre.placements:
            raise AnalysisError(
                molecule.formula,
                f"no rule gives the shape at {centre.label}; supply coordinates (XYZ, MOL or SDF)",
            )


def _single_centre(molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre]) -> Array:
    """Return coordinates (n, 3) for one atom, two atoms, or one centre with its neighbours (A2)."""
    points = np.zeros((len(molecule.atoms), 3))
    lengths = site_lengths_angstrom(molecule, lewis, centres)
    if not centres:
        for bond, length in zip(molecule.bonds, lengths, strict=True):
            points[bond.end, 2] = length
        return points
    centre = centres[0]
    ends = (({bond.begin, bond.end} - {centre.atom}).pop() for bond in molecule.bonds)
    length_to = dict(zip(ends, lengths, strict=True))
    for domain, direction in zip(centre.domains, centre.placements[0].directions, strict=True):
        if domain.neighbour is not None:
            points[domain.neighbour] = length_to[domain.neighbour] * np.array(direction)
    return _handed(molecule, points)


def _handed(molecule: Molecule, points: Array) -> Array:
    """Return the structure or its mirror image, as the drawing's wedge says."""
    for stereo in molecule.tetrahedral_stereo:
        vectors = points[list(stereo.neighbours[:3])] - points[stereo.atom]
        if float(np.linalg.det(vectors)) * handedness(stereo) < 0:
            return np.asarray(points * np.array([-1.0, 1.0, 1.0]))
    return points


def _conformers(molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre]) -> Conformers:
    known = surroundings_of(molecule, lewis, centres)
    organic = any(atom.element == "C" for atom in molecule.atoms)
    if organic and mmff_covers(molecule):
        return by_force_field(molecule, known)
    return by_rules(molecule, known)


def _structure(molecule: Molecule, points: Array, method: str, tried: int) -> Structure:
    """Return the structure symmetrised (A5)."""
    symmetric = _snapped(molecule, points)
    rows = (symmetric - symmetric.mean(axis=0)).tolist()
    return Structure(tuple((x, y, z) for x, y, z in rows), StructureBasis.MODEL, method, tried)


def _snapped(molecule: Molecule, points: Array) -> Array:
    """Return the coordinates (n, 3) under the largest tolerance that keeps the bonds' lengths."""
    elements = [atom.element for atom in molecule.atoms]
    before = _skeleton_lengths(molecule, points)
    for tolerance in (SNAP_ANGSTROM, FINE_SNAP_ANGSTROM):
        symmetric, _ = symmetrised(elements, points, tolerance)
        if (
            np.abs(_skeleton_lengths(molecule, symmetric) - before).max(initial=0.0)
            < KEPT_LENGTH_ANGSTROM
        ):
            return symmetric
    return points


def _skeleton_lengths(molecule: Molecule, points: Array) -> Array:
    """Return the lengths (m,) of the bonds between atoms other than hydrogen."""
    ends = [(bond.begin, bond.end) for bond in molecule.bonds]
    heavy = [pair for pair in ends if all(molecule.atoms[k].element != "H" for k in pair)]
    rows = np.array(heavy, dtype=np.int64).reshape(-1, 2)
    return np.asarray(np.linalg.norm(points[rows[:, 0]] - points[rows[:, 1]], axis=1))
