"""Whether a system can be calculated, and whether a result may stand."""

from collections.abc import Sequence
from itertools import combinations

from shapeshelf.calculation.failing import UnusableError
from shapeshelf.calculation.model import Level, Mode, Outcome, System
from shapeshelf.geometry.vectors import Array, distance
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule

MOST_ATOMIC_NUMBER = 86
"""Radon: where the def2 basis sets and GFN2-xTB both end."""
IMAGINARY_PER_CM = -20.0
"""An imaginary mode below this is a way downhill; above it, noise of the grid in a flat one."""
MOST_CONTAMINATION = 0.1
"""Largest excess of <S²> over S(S+1) (common practice, no source)."""
SYMMETRY_TOLERANCE_ANGSTROM = 0.02
"""Above what optimising leaves of the shaking, far below a distortion worth a page."""
BROKEN = 1.45
"""A bond longer than the start's times this is broken."""

MOST_ATOMS_DFT = 10
MOST_ATOMS_SMALL_BASIS = 25
MOST_ATOMS_WITH_METAL = 7
"""Sizes up to which ``auto`` asks for each level: what one core does in minutes."""
SAME_BOHR = 0.1
"""Structures whose sorted distances all agree within this are one."""


def check_system(system: System) -> None:
    """Raise UnusableError where ``system`` cannot be calculated at all."""
    beyond = [s for s in system.elements if ELEMENTS[s].atomic_number > MOST_ATOMIC_NUMBER]
    if beyond:
        raise UnusableError(Outcome.UNSUPPORTED, f"no basis set or parameters for {beyond[0]}")
    electrons = sum(ELEMENTS[s].atomic_number for s in system.elements) - system.charge
    if (electrons - system.multiplicity + 1) % 2:
        raise UnusableError(
            Outcome.WRONG_PARITY,
            f"{electrons} electrons cannot have multiplicity {system.multiplicity}",
        )


def check_spin(system: System, spin_squared: float | None) -> None:
    """Raise UnusableError where <S²> is too far from that of the multiplicity."""
    if spin_squared is None:
        return
    spin = (system.multiplicity - 1) / 2
    excess = spin_squared - spin * (spin + 1)
    if excess > MOST_CONTAMINATION:
        raise UnusableError(
            Outcome.SPIN_CONTAMINATED, f"<S2> exceeds {spin * (spin + 1):.2f} by {excess:.2f}"
        )


def imaginary(modes: Sequence[Mode]) -> bool:
    """Tell whether the lowest mode leads downhill."""
    return bool(modes) and modes[0].wavenumber_per_cm < IMAGINARY_PER_CM


def check_bonds(molecule: Molecule, start: Array, end: Array) -> None:
    """Raise UnusableError where a bond broke between ``start`` and ``end`` (n, 3)."""
    for bond in molecule.bonds:
        pair = [bond.begin, bond.end]
        if distance(*end[pair]) > BROKEN * distance(*start[pair]):
            names = "-".join(molecule.atoms[atom].element for atom in pair)
            raise UnusableError(
                Outcome.OTHER_STRUCTURE, f"a bond {names} of the entry does not hold"
            )


def level_for(molecule: Molecule) -> Level:
    """Return the level that ``auto`` chooses: by size, and GFN2-xTB for larger metal complexes."""
    size = len(molecule.atoms)
    metal = any(_is_transition_metal(atom.element) for atom in molecule.atoms)
    if metal and size > MOST_ATOMS_WITH_METAL:
        return Level.XTB
    if size <= MOST_ATOMS_DFT:
        return Level.DFT
    return Level.DFT_SMALL if size <= MOST_ATOMS_SMALL_BASIS else Level.XTB


def same_structure(elements: Sequence[str], first: Array, second: Array) -> bool:
    """Tell whether two structures (n, 3) in bohr are one, up to mirror image and exchange."""
    pairs = zip(_distances(elements, first), _distances(elements, second), strict=True)
    return all(abs(a[1] - b[1]) <= SAME_BOHR for a, b in pairs)


def _is_transition_metal(symbol: str) -> bool:
    group = ELEMENTS[symbol].group
    return group is None or 3 <= group <= 11


def _distances(elements: Sequence[str], points: Array) -> list[tuple[str, float]]:
    """Return every distance with its pair of elements, sorted."""
    return sorted(
        ("-".join(sorted((elements[i], elements[j]))), distance(points[i], points[j]))
        for i, j in combinations(range(len(points)), 2)
    )
