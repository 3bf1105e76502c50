"""PBE0 through PySCF: energy, gradient, Hessian, dipole moment and its derivatives.

* Functional PBE0: C. Adamo and V. Barone, J. Chem. Phys. 110 (1999) 6158.
* Basis sets def2-SVP, def2-TZVP and effective core potentials from period 5 down: F. Weigend and
  R. Ahlrichs, Phys. Chem. Chem. Phys. 7 (2005) 3297; diffuse functions of def2-TZVPD:
  D. Rappoport and F. Furche, J. Chem. Phys. 133 (2010) 134105.
* PySCF: Q. Sun et al., J. Chem. Phys. 153 (2020) 024109.

All in atomic units. Open shells are unrestricted.
"""

from collections.abc import Iterable, Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from typing import Any

import numpy as np

from shapeshelf.calculation.differences import (
    averaged_derivatives,
    differentiate,
    displacements_of,
    evaluations_of,
)
from shapeshelf.calculation.failing import UnusableError
from shapeshelf.calculation.minimising import Surface
from shapeshelf.calculation.model import Outcome, System
from shapeshelf.geometry.model import Symmetry
from shapeshelf.geometry.vectors import Array
from shapeshelf.reference.elements import ELEMENTS

FUNCTIONAL = "pbe0"
METHOD = "PBE0"
ENERGY_TOLERANCE = 1e-9
MOST_CYCLES = 120
RESPONSE_GRID = 0
"""For the coupled-perturbed equations; coarse and fine grids agree."""
MOST_EVALUATIONS_PER_ATOM = 2
"""Up to so many gradients for each atom take less time than the analytic second derivatives."""
DISPLACEMENT = 0.01
"""Bohr, to either side."""
ENERGY_TOLERANCE_OF_DIFFERENCES = 1e-10
CORE_POTENTIAL_FROM_PERIOD = 5
"""From here down gradients also follow the grid as it moves with the atoms; without that, those of
XeO3 are wrong by 0.0005 hartree/bohr and its optimisation does not end."""


@dataclass(frozen=True, slots=True)
class Treatment:
    """One way to solve for the electrons: basis set and integration grid."""

    basis: str
    grid: int
    """PySCF's level, 0 coarsest."""


@dataclass(slots=True)
class Solver:
    """A mean field that remembers its last density, where the next one starts."""

    field: Any
    density: Any = None


def solver_of(
    system: System, treatment: Treatment, coordinates: Array, earlier: Solver | None = None
) -> Solver:
    """Return a solver at ``coordinates`` (n, 3), with the density of an ``earlier`` one."""
    from pyscf import dft, lib, scf  # an extra: loaded only when asked for

    lib.num_threads(1)
    scf.hf.MUTE_CHKFILE = True  # it would leave a temporary file open
    molecule = _molecule(system, treatment.basis, coordinates)
    kind = dft.RKS if system.multiplicity == 1 else dft.UKS
    field = kind(molecule, xc=FUNCTIONAL).density_fit()
    field.grids.level = treatment.grid
    field.conv_tol = ENERGY_TOLERANCE
    field.max_cycle = MOST_CYCLES
    solver = Solver(field)
    if earlier is not None and earlier.field.mo_coeff is not None:
        project = scf.addons.project_dm_nr2nr
        solver.density = project(earlier.field.mol, earlier.field.make_rdm1(), molecule)
    return solver


def surface_of(solver: Solver) -> Surface:
    """Return the energy surface of ``solver`` for ``minimise``.

    It raises UnusableError where the self-consistent field does not converge.
    """

    def surface(coordinates: Array) -> tuple[float, Array]:
        energy = solve(solver, coordinates)
        slopes = solver.field.nuc_grad_method()
        slopes.verbose = 0
        slopes.grid_response = bool(_heavy(solver.field.mol.elements))
        return energy, np.array(slopes.kernel())

    return surface


def solve(solver: Solver, coordinates: Array) -> float:
    """Return the energy at ``coordinates`` (n, 3); ``solver`` holds the solution afterwards.

    Raises UnusableError where neither damping nor second-order steps bring convergence.
    """
    field = solver.field
    moved = field.mol.set_geom_(coordinates, unit="Bohr", inplace=False)
    field.reset(moved)
    field.kernel(dm0=solver.density)
    if not field.converged:
        _second_order(field)
    if not field.converged:
        raise UnusableError(Outcome.NOT_CONVERGED, f"{METHOD} after {MOST_CYCLES} cycles")
    solver.density = field.make_rdm1()
    return float(field.e_tot)


def dipole(solver: Solver) -> Array:
    """Return the dipole moment (3,) of the solution, taken from the origin."""
    return np.array(solver.field.dip_moment(unit="AU", verbose=0))


def spin_squared(solver: Solver) -> float | None:
    """Return <S²> of an unrestricted solution, ``None`` for a restricted one."""
    field = solver.field
    return float(field.spin_square()[0]) if np.ndim(field.mo_occ) > 1 else None


def second_derivatives(
    solver: Solver, coordinates: Array, symmetry: Symmetry
) -> tuple[Array, Array]:
    """Return the Hessian (3n, 3n) and dipole derivatives (3n, 3) at ``coordinates`` (n, 3).

    Analytic, but from differences of gradients where symmetry leaves few to compute.
    """
    wanted = evaluations_of(displacements_of(coordinates, symmetry))
    if wanted <= MOST_EVALUATIONS_PER_ATOM * len(coordinates):
        return _differences(solver, coordinates, symmetry)
    solve(solver, coordinates)
    return averaged_derivatives(*analytic_second_derivatives(solver), symmetry)


def analytic_second_derivatives(solver: Solver) -> tuple[Array, Array]:
    """Return the analytic Hessian (3n, 3n) and dipole derivatives (3n, 3) of the solution."""
    second = solver.field.Hessian()
    second.verbose = 0
    kept: list[Any] = []
    answered = second.solve_mo1

    def remembering(*arguments: Any, **options: Any) -> Any:
        with _grid(solver.field, RESPONSE_GRID):
            kept[:] = answered(*arguments, **options)
        return tuple(kept)

    second.solve_mo1 = remembering
    blocks = np.array(second.kernel())
    _free_translation(blocks)
    size = 3 * len(blocks)
    hessian = blocks.transpose(0, 2, 1, 3).reshape(size, size)
    return (hessian + hessian.T) / 2, _dipole_derivatives(solver.field, kept[0])


def _free_translation(blocks: Array) -> None:
    """Set each atom's block with itself (n, n, 3, 3) so that shifting the molecule costs nothing.

    PySCF's second derivatives leave out how the grid moves with the atoms. Near a nucleus, where
    the density is steep, that spoils the block of an atom with itself and hardly any other.
    """
    for atom, row in enumerate(blocks):
        row[atom] = 0.0
        row[atom] = -row.sum(axis=0)


def _differences(solver: Solver, coordinates: Array, symmetry: Symmetry) -> tuple[Array, Array]:
    field = solver.field
    field.conv_tol = ENERGY_TOLERANCE_OF_DIFFERENCES
    solve(solver, coordinates)
    centre = solver.density

    def evaluated(place: Array) -> tuple[Array, Array]:
        solver.density = centre
        _, gradient = surface_of(solver)(place)
        return gradient, dipole(solver)

    try:
        return differentiate(evaluated, coordinates, symmetry, DISPLACEMENT)
    finally:
        field.conv_tol = ENERGY_TOLERANCE
        solve(solver, coordinates)


@contextmanager
def _grid(field: Any, level: int) -> Iterator[None]:
    """Integrate on another grid meanwhile."""
    from pyscf import dft

    usual = field.grids
    field.grids = dft.Grids(field.mol)
    field.grids.level = level
    field.grids.build()
    try:
        yield
    finally:
        field.grids = usual


def _molecule(system: System, basis: str, coordinates: Array) -> Any:
    from pyscf import gto

    heavy = _heavy(system.elements)
    return gto.M(
        atom=list(zip(system.elements, coordinates.tolist(), strict=True)),
        unit="Bohr",
        basis=basis,
        ecp=dict.fromkeys(sorted(heavy), basis),
        charge=system.charge,
        spin=system.multiplicity - 1,
        symmetry=False,
        verbose=0,
    )


def _heavy(elements: Iterable[str]) -> set[str]:
    """Return the elements that have a core potential; with these the grid moves with the atoms."""
    return {one for one in elements if ELEMENTS[one].period >= CORE_POTENTIAL_FROM_PERIOD}


def _second_order(field: Any) -> None:
    """Go on from a field that did not converge with second-order steps."""
    newton = field.newton()
    newton.verbose = 0
    newton.max_cycle = MOST_CYCLES
    newton.kernel(dm0=field.make_rdm1())
    for name in ("mo_coeff", "mo_energy", "mo_occ", "e_tot", "converged"):
        setattr(field, name, getattr(newton, name))


def _dipole_derivatives(field: Any, first_order: Any) -> Array:
    """Return dμ/dR (3n, 3) from the first-order orbitals of the coupled-perturbed equations.

    μ = Σ Z R - Tr(D r): the nuclei move, the density changes, and the basis functions go along.
    """
    molecule = field.mol
    dipoles = molecule.intor_symmetric("int1e_r", comp=3)
    moving = molecule.intor("int1e_irp", comp=9).reshape(3, 3, *dipoles.shape[1:])
    density = np.array(field.make_rdm1())
    density = density.sum(axis=0) if density.ndim == 3 else density
    slopes = np.zeros((molecule.natm, 3, 3))
    for atom, (_, _, first, last) in enumerate(molecule.aoslice_by_atom()):
        response = _density_response(field, first_order, atom)
        slopes[atom] = np.eye(3) * molecule.atom_charge(atom)
        slopes[atom] -= np.einsum("xpq,rpq->xr", response, dipoles)
        carried = moving[:, :, :, first:last]
        slopes[atom] += 2 * np.einsum("rxpq,pq->xr", carried, density[:, first:last])
    return slopes.reshape(-1, 3)


def _density_response(field: Any, first_order: Any, atom: int) -> Array:
    """Return the change of the density matrix (3, nao, nao) as ``atom`` moves, basis fixed."""
    if np.ndim(field.mo_occ) == 1:
        channels = [(first_order[atom], field.mo_coeff, field.mo_occ, 2.0)]
    else:
        channels = [
            (first_order[spin][atom], field.mo_coeff[spin], field.mo_occ[spin], 1.0)
            for spin in (0, 1)
        ]
    total = 0.0
    for response, orbitals, occupied, weight in channels:
        half = weight * np.einsum("xpi,qi->xpq", response, orbitals[:, occupied > 0])
        total = total + half + half.transpose(0, 2, 1)
    return np.asarray(total)
