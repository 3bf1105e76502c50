"""Dipole moment of a molecule from bond charges and lone pairs, within its symmetry.

    mu = P ( -4.80320 sum_i q_i r_i  +  sum_k m_k d_k )        debye, angstrom

q are the partial charges (charges.py, Q1 to Q6), m the lone-pair moments along their directions d
(lone_pair_moments.py, Q7), and P, the mean of all symmetry operations, takes away what symmetry
forbids, exactly. The vector points from positive to negative. The coefficients are fitted to open
values by ridge regression (A. E. Hoerl and R. W. Kennard, Technometrics 12 (1970) 55; recalled
from memory), each ± is the 68 % quantile of cross-validated residuals of its class of molecule.
"""

from collections.abc import Sequence

import numpy as np

from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.geometry.model import Structure, Symmetry
from shapeshelf.geometry.vectors import Array
from shapeshelf.properties.charge_parameters import COEFFICIENTS, UNCERTAINTY_DEBYE
from shapeshelf.properties.charges import (
    ChargeGraph,
    charge_graph,
    electronegativity,
    partial_charges,
    transfers,
)
from shapeshelf.properties.dipole_classes import dipole_class
from shapeshelf.properties.lone_pair_moments import lone_moments
from shapeshelf.properties.model import BondPolarity, DipoleModel
from shapeshelf.properties.polarity_reasons import reason_for
from shapeshelf.structure.molecule import Molecule

MODEL_NAME = "bond-charge model"
"""What a page calls this model."""
DEBYE_PER_ELECTRON_ANGSTROM = 4.80320
"""e times 1 angstrom in debye (CODATA)."""
ALLOWED = 1e-6
"""Above rounding, below any real direction: is there a vector that symmetry leaves alone?"""


def dipole(
    molecule: Molecule,
    lewis: LewisCount,
    centres: Sequence[Centre],
    structure: Structure,
    symmetry: Symmetry,
) -> DipoleModel:
    """Return the model's dipole moment in debye, its ±, and the reason for it in words.

    The vector stands in the frame of ``structure``. Without a moment for an ion; exactly zero
    where the point group allows none.
    """
    graph = charge_graph(molecule, lewis)
    moved = transfers(molecule, graph)
    charges = partial_charges(graph, moved, COEFFICIENTS)
    bonds = tuple(_bond_polarity(graph, bond.begin, bond.end) for bond in molecule.bonds)
    allowed = symmetry_projection(symmetry)
    polar = can_be_polar(symmetry)
    coordinates = np.array(symmetry.coordinates_angstrom)
    vector = allowed @ _free_moment(graph, charges, coordinates) if polar else np.zeros(3)
    uncertainty = UNCERTAINTY_DEBYE[dipole_class(graph, COEFFICIENTS)] if polar else 0.0
    reason = reason_for(molecule, symmetry, vector, uncertainty)
    rounded = tuple(float(charge) for charge in charges)
    if molecule.charge:
        return DipoleModel(None, None, None, None, reason, rounded, bonds)
    return DipoleModel(
        moment_debye=float(np.linalg.norm(vector)),
        vector_debye=(float(vector[0]), float(vector[1]), float(vector[2])),
        uncertainty_debye=uncertainty,
        polar=polar,
        reason=reason,
        partial_charges=rounded,
        bonds=bonds,
    )


def can_be_polar(symmetry: Symmetry) -> bool:
    """Tell whether the point group allows a dipole moment."""
    return bool(np.abs(symmetry_projection(symmetry)).max() > ALLOWED)


def symmetry_projection(symmetry: Symmetry) -> Array:
    """Return the matrix (3, 3) that keeps of a vector what every operation leaves alone."""
    return np.asarray(np.mean([np.array(one.matrix) for one in symmetry.operations], axis=0))


def _free_moment(graph: ChargeGraph, charges: Array, coordinates: Array) -> Array:
    total = -DEBYE_PER_ELECTRON_ANGSTROM * (charges @ coordinates)
    for lone in lone_moments(graph, coordinates):
        total = total + COEFFICIENTS.get(lone.term, 0.0) * lone.direction
    return np.asarray(total)


def _bond_polarity(graph: ChargeGraph, begin: int, end: int) -> BondPolarity:
    """Return which end is negative after Pauling; of like elements the second counts."""
    difference = electronegativity(graph.elements[end]) - electronegativity(graph.elements[begin])
    positive, negative = (begin, end) if difference >= 0 else (end, begin)
    return BondPolarity(positive, negative, round(abs(difference), 2))
