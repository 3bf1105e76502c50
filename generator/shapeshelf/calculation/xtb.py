"""GFN2-xTB through tblite: energy, gradient, dipole moment, Hessian.

C. Bannwarth, S. Ehlert and S. Grimme, J. Chem. Theory Comput. 15 (2019) 1652,
doi:10.1021/acs.jctc.8b01176. All in atomic units.
"""

from dataclasses import dataclass

import numpy as np

from shapeshelf.calculation.differences import differentiate
from shapeshelf.calculation.failing import UnusableError
from shapeshelf.calculation.minimising import Surface
from shapeshelf.calculation.model import Outcome, System
from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.vectors import Array
from shapeshelf.reference.elements import ELEMENTS

METHOD = "GFN2-xTB"
ACCURACY = 0.01
"""tblite's factor on its thresholds; small for smooth numerical second derivatives."""
DISPLACEMENT = 0.005
"""Bohr, to either side, for the numerical Hessian."""


@dataclass(frozen=True, slots=True)
class XtbPoint:
    """One evaluation."""

    energy: float
    gradient: Array
    """(n, 3)"""
    dipole: Array
    """(3,)"""


def evaluate(system: System, coordinates: Array) -> XtbPoint:
    """Return energy, gradient and dipole moment at ``coordinates`` (n, 3).

    Raises UnusableError where the self-consistent charges do not converge.
    """
    from tblite.exceptions import TBLiteRuntimeError  # an extra: loaded only when asked for
    from tblite.interface import Calculator

    numbers = np.array([ELEMENTS[symbol].atomic_number for symbol in system.elements])
    calculator = Calculator(
        "GFN2-xTB", numbers, coordinates, charge=system.charge, uhf=system.multiplicity - 1
    )
    calculator.set("verbosity", 0)
    calculator.set("accuracy", ACCURACY)
    try:
        result = calculator.singlepoint()
    except TBLiteRuntimeError as error:
        raise UnusableError(Outcome.NOT_CONVERGED, METHOD) from error
    return XtbPoint(
        float(result.get("energy")),
        np.array(result.get("gradient")),
        np.array(result.get("dipole")),
    )


def surface_of(system: System) -> Surface:
    """Return the energy surface of ``system`` for ``minimise``."""

    def surface(coordinates: Array) -> tuple[float, Array]:
        point = evaluate(system, coordinates)
        return point.energy, point.gradient

    return surface


def second_derivatives(
    system: System, coordinates: Array, symmetry: Symmetry
) -> tuple[Array, Array]:
    """Return the Hessian (3n, 3n) and the dipole derivatives (3n, 3), numerical."""

    def evaluated(place: Array) -> tuple[Array, Array]:
        point = evaluate(system, place)
        return point.gradient, point.dipole

    return differentiate(evaluated, coordinates, symmetry, DISPLACEMENT)
