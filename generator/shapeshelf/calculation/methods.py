"""The levels as the recipe uses them: optimise roughly, finely, differentiate twice, dipole.

C2  Rough optimisations are PBE0/def2-SVP on a coarse grid, from GFN2-xTB's Hessian.
C3  Fine ones are PBE0/def2-TZVP, tighter, from the Hessian and density at hand.
C6  The level ``dft-small`` stays with def2-SVP, tighter and on the finer grid; the level ``xtb``
    does everything with GFN2-xTB and numerical second derivatives.
"""

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from shapeshelf.calculation import dft, xtb
from shapeshelf.calculation.minimising import Minimum, Tolerances, minimise
from shapeshelf.calculation.model import Level, System
from shapeshelf.calculation.units import BOHR_ANGSTROM
from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.geometry.vectors import Array

ROUGH = dft.Treatment("def2-svp", 1)
FINE = {
    Level.DFT: dft.Treatment("def2-tzvp", 2),
    Level.DFT_SMALL: dft.Treatment("def2-svp", 2),
}
DIFFUSE = dft.Treatment("def2-tzvpd", 3)
ROUGH_TOLERANCES = Tolerances(gradient=1e-3, step=1e-2, most_steps=80)
FINE_TOLERANCES = Tolerances(gradient=1e-4, step=2e-3, most_steps=80)
XTB_TOLERANCES = Tolerances(gradient=3e-5, step=1e-3, most_steps=400)
EXACT_ANGSTROM = 1e-4
"""Atoms within this of a symmetric structure are in it."""
NAMES = {
    Level.DFT: "PBE0/def2-TZVP",
    Level.DFT_SMALL: "PBE0/def2-SVP",
    Level.XTB: xtb.METHOD,
}


@dataclass(frozen=True, slots=True)
class Method:
    """One level for one system. Coordinates (n, 3) in bohr; what it solved last it remembers."""

    roughly: Callable[[Array], Minimum]
    """From a start to a rough minimum; its density is where ``finely`` begins."""
    energy: Callable[[Array], float]
    """Energy as ``finely`` sees it, without moving."""
    finely: Callable[[Array, Array], Minimum]
    """From coordinates and a Hessian to the minimum."""
    second_derivatives: Callable[[Array, Symmetry], tuple[Array, Array]]
    """Hessian (3n, 3n) and dipole derivatives (3n, 3)."""
    dipole: Callable[[Array], Array]
    """Dipole moment (3,) from the origin."""
    spin_squared: Callable[[], float | None]


def method_for(level: Level, system: System) -> Method:
    """Return the functions of ``level`` for ``system``."""
    return _xtb_method(system) if level is Level.XTB else _dft_method(level, system)


def settings_of(level: Level) -> tuple[tuple[str, str], ...]:
    """Return every setting of ``level`` that bears on its numbers, as a record holds them."""
    if level is Level.XTB:
        return (
            ("method", xtb.METHOD),
            ("accuracy", str(xtb.ACCURACY)),
            ("optimisation", _tolerances_text(XTB_TOLERANCES)),
            ("hessian", f"numerical, steps of {xtb.DISPLACEMENT} bohr"),
        )
    return (
        ("functional", dft.METHOD),
        ("two-electron integrals", "density fitting"),
        ("self-consistent field", f"{dft.ENERGY_TOLERANCE:g} hartree"),
        ("first optimisation", f"{_treatment_text(ROUGH)}, {_tolerances_text(ROUGH_TOLERANCES)}"),
        (
            "optimisation",
            f"{_treatment_text(FINE[level])}, {_tolerances_text(FINE_TOLERANCES)}",
        ),
        ("gradient", f"of the grid too from period {dft.CORE_POTENTIAL_FROM_PERIOD} down"),
        (
            "hessian",
            f"{_treatment_text(FINE[level])}, analytic, free of translation, response on grid "
            f"{dft.RESPONSE_GRID}; where symmetry leaves at most {dft.MOST_EVALUATIONS_PER_ATOM} "
            f"gradients an atom, their differences over {dft.DISPLACEMENT} bohr",
        ),
        ("dipole", _treatment_text(DIFFUSE)),
    )


def _dft_method(level: Level, system: System) -> Method:
    held: dict[str, dft.Solver] = {}

    def roughly(start: Array) -> Minimum:
        symmetry = find_symmetry(system.elements, start * BOHR_ANGSTROM, EXACT_ANGSTROM)
        guess, _ = xtb.second_derivatives(system, start, symmetry)
        held["now"] = dft.solver_of(system, ROUGH, start)
        return minimise(dft.surface_of(held["now"]), start, guess, ROUGH_TOLERANCES)

    def energy(place: Array) -> float:
        return dft.solve(dft.solver_of(system, FINE[level], place, held["now"]), place)

    def finely(start: Array, hessian: Array) -> Minimum:
        held["now"] = dft.solver_of(system, FINE[level], start, held.get("now"))
        return minimise(dft.surface_of(held["now"]), start, hessian, FINE_TOLERANCES)

    def second_derivatives(place: Array, symmetry: Symmetry) -> tuple[Array, Array]:
        return dft.second_derivatives(held["now"], place, symmetry)

    def dipole(place: Array) -> Array:
        solver = dft.solver_of(system, DIFFUSE, place, held["now"])
        dft.solve(solver, place)
        return dft.dipole(solver)

    def spin_squared() -> float | None:
        return dft.spin_squared(held["now"])

    return Method(roughly, energy, finely, second_derivatives, dipole, spin_squared)


def _xtb_method(system: System) -> Method:
    surface = xtb.surface_of(system)

    def roughly(start: Array) -> Minimum:
        return minimise(surface, start, guessed_hessian(start), XTB_TOLERANCES)

    def energy(place: Array) -> float:
        return surface(place)[0]

    def finely(start: Array, hessian: Array) -> Minimum:
        return minimise(surface, start, hessian, XTB_TOLERANCES)

    def second_derivatives(place: Array, symmetry: Symmetry) -> tuple[Array, Array]:
        return xtb.second_derivatives(system, place, symmetry)

    def dipole(place: Array) -> Array:
        return xtb.evaluate(system, place).dipole

    return Method(roughly, energy, finely, second_derivatives, dipole, lambda: None)


def guessed_hessian(place: Array) -> Array:
    """Return a Hessian (3n, 3n) of springs between all pairs of atoms (n, 3), in atomic units.

    Springs of a bond are 0.4 hartree/bohr² and fall off with distance; they stand for bends and
    torsions too. A guess of ours; only the number of steps depends on it.
    """
    size = len(place)
    blocks = np.zeros((size, 3, size, 3))
    for i in range(size):
        for j in range(i):
            vector = place[i] - place[j]
            length = float(np.linalg.norm(vector))
            spring = 0.4 * np.exp(min(0.0, 0.35 * (2.6**2 - length**2)))
            block = spring * np.outer(vector, vector) / length**2
            for a, b, sign in ((i, i, 1), (j, j, 1), (i, j, -1), (j, i, -1)):
                blocks[a, :, b, :] += sign * block
    return blocks.reshape(3 * size, 3 * size)


def _treatment_text(treatment: dft.Treatment) -> str:
    return f"{treatment.basis}, grid {treatment.grid}"


def _tolerances_text(tolerances: Tolerances) -> str:
    return f"gradient {tolerances.gradient:g}, step {tolerances.step:g} (atomic units)"
