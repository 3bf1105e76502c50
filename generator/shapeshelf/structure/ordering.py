"""Bond orders and charges for known bonds: an integer programme over all Lewis drawings.

Every bond gets pi bonds, every atom a charge, an open place in its shell and at most one single
electron; bonds between a ligand and a metal may be plain or arrows. The cheapest drawing wins:
single electrons and open shells cost most, charges less, and less on atoms that bear them well
by electronegativity; among equals, pi bonds go where the bond is short. The costs are our own
choice; only their order matters, since the rules of normalising.py follow.
"""

from collections.abc import Sequence

import numpy as np
import numpy.typing as npt
from scipy.optimize import Bounds, LinearConstraint, milp
from scipy.sparse import coo_array

from shapeshelf.errors import StructureError
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.drawing import (
    Drawing,
    DrawnBond,
    electronegativity,
    is_metal,
    valence_electrons,
)

COST_CHARGE = 12.0
COST_METAL_CHARGE = 1.0
COST_SINGLE_ELECTRON = 14.0
COST_OPEN_PLACE = {13: 0.5, 14: 12.4, 15: 25.0, 16: 25.0, 17: 30.0}
COST_OPEN_PLACE_HEAVY = 2.0
COST_PI = 1.0
PER_ATOM = 5
"""Variables of an atom: negative charge, positive charge, single electron, open places, pairs."""
MOST_CHARGE = 4
SECONDS = 20.0


def assign_orders(
    name: str,
    elements: Sequence[str],
    pairs: Sequence[tuple[int, int]],
    lengths_angstrom: Sequence[float],
    charge: int,
) -> Drawing:
    """Return the cheapest drawing with these bonds and this total charge.

    Raises StructureError where there is none.
    """
    programme = _Programme(elements, pairs, lengths_angstrom, charge)
    values = programme.solve()
    if values is None:
        raise StructureError(
            name, f"{name}: no bond orders fit these atoms with charge {charge}; state the charge"
        )
    return programme.drawing(values)


class _Programme:
    """The integer programme: columns are atoms' variables, then pi bonds, then plain bonds."""

    def __init__(
        self,
        elements: Sequence[str],
        pairs: Sequence[tuple[int, int]],
        lengths: Sequence[float],
        charge: int,
    ) -> None:
        self.elements, self.pairs, self.lengths = elements, pairs, lengths
        self.charge = charge
        self.first_pi = PER_ATOM * len(elements)
        self.first_plain = self.first_pi + len(pairs)
        self.columns = self.first_plain + len(pairs)
        self.entries: list[tuple[int, int, float]] = []
        self.low: list[float] = []
        self.high: list[float] = []

    def solve(self) -> npt.NDArray[np.int64] | None:
        """Return the best value of every column, ``None`` where nothing is feasible."""
        self._balance_charge()
        for atom in range(len(self.elements)):
            self._count_electrons(atom)
            self._fill_shell(atom)
        rows, columns, factors = zip(*self.entries, strict=True)
        matrix = coo_array((factors, (rows, columns)), shape=(len(self.low), self.columns))
        result = milp(
            self._costs(),
            integrality=np.ones(self.columns),
            bounds=Bounds(self._floors(), self._limits()),
            constraints=LinearConstraint(matrix.tocsc(), self.low, self.high),
            options={"time_limit": SECONDS},
        )
        return None if result.x is None else np.rint(result.x).astype(np.int64)

    def drawing(self, values: npt.NDArray[np.int64]) -> Drawing:
        """Return the drawing that the columns' values describe."""
        atoms = range(len(self.elements))
        charges = [int(values[PER_ATOM * i + 1] - values[PER_ATOM * i]) for i in atoms]
        bonds = [self._bond(number, values) for number in range(len(self.pairs))]
        return Drawing(list(self.elements), charges, bonds)

    def _bond(self, number: int, values: npt.NDArray[np.int64]) -> DrawnBond:
        first, second = self.pairs[number]
        if values[self.first_plain + number]:
            return DrawnBond(first, second, 1 + int(values[self.first_pi + number]))
        donor, metal = (second, first) if is_metal(self.elements[first]) else (first, second)
        return DrawnBond(donor, metal, 1, dative=True)

    def _row(self, entries: Sequence[tuple[int, float]], low: float, high: float) -> None:
        self.entries += [(len(self.low), column, factor) for column, factor in entries]
        self.low.append(low)
        self.high.append(high)

    def _balance_charge(self) -> None:
        entries = [
            (PER_ATOM * atom + sign, float(2 * sign - 1))
            for atom in range(len(self.elements))
            for sign in (0, 1)
        ]
        self._row(entries, self.charge, self.charge)

    def _count_electrons(self, atom: int) -> None:
        """Valence electrons = plain bonds + pi bonds + charge + pairs + a single electron."""
        electrons = valence_electrons(self.elements[atom])
        if electrons is None:
            return
        start = PER_ATOM * atom
        own = [(start, -1.0), (start + 1, 1.0), (start + 2, 1.0), (start + 4, 2.0)]
        shared = [(column, 1.0) for n in self._at(atom) for column in self._bond_columns(n)]
        self._row(own + shared, electrons, electrons)
        if not is_metal(self.elements[atom]):
            # Every arrow takes one of the atom's pairs: pairs >= bonds - plain bonds.
            arrows = [(self.first_plain + n, 1.0) for n in self._at(atom)]
            self._row([(start + 4, 1.0), *arrows], len(self._at(atom)), np.inf)

    def _fill_shell(self, atom: int) -> None:
        """Pairs and bonds make an octet, or more than one from period 3 on."""
        element = self.elements[atom]
        if is_metal(element):
            return
        start = PER_ATOM * atom
        own = [(start + 2, 1.0), (start + 3, 1.0), (start + 4, 2.0)]
        shared = [(column, 2.0) for n in self._at(atom) for column in self._bond_columns(n)]
        shell = 2.0 if element in ("H", "He") else 8.0
        heavy = ELEMENTS[element].period > 2
        self._row(own + shared, shell, np.inf if heavy else shell)

    def _at(self, atom: int) -> list[int]:
        return [number for number, pair in enumerate(self.pairs) if atom in pair]

    def _bond_columns(self, number: int) -> tuple[int, int]:
        return self.first_pi + number, self.first_plain + number

    def _costs(self) -> npt.NDArray[np.float64]:
        costs = np.zeros(self.columns)
        for atom, element in enumerate(self.elements):
            costs[PER_ATOM * atom : PER_ATOM * (atom + 1)] = _atom_costs(element)
        for number, pair in enumerate(self.pairs):
            radii = sum(ELEMENTS[self.elements[i]].single_radius_angstrom or 1.7 for i in pair)
            costs[self.first_pi + number] = COST_PI * self.lengths[number] / radii
        return costs

    def _floors(self) -> npt.NDArray[np.float64]:
        """Only a bond between a metal and a ligand may be an arrow; all others are plain."""
        plain = [
            float(is_metal(self.elements[i]) == is_metal(self.elements[j])) for i, j in self.pairs
        ]
        return np.concatenate([np.zeros(self.first_plain), plain])

    def _limits(self) -> npt.NDArray[np.float64]:
        atoms = np.tile([MOST_CHARGE, MOST_CHARGE, 1.0, 8.0, 8.0], len(self.elements))
        for atom, element in enumerate(self.elements):
            group = ELEMENTS[element].group or 3
            if is_metal(element):
                atoms[PER_ATOM * atom : PER_ATOM * atom + 2] = 8.0
            elif self._at(atom) and (group == 17 or (group > 13 and ELEMENTS[element].period == 2)):
                atoms[PER_ATOM * atom : PER_ATOM * atom + 2] = 1.0
        pi = [2.0 if self._may_be_multiple(pair) else 0.0 for pair in self.pairs]
        plain = np.ones(len(self.pairs))
        return np.concatenate([atoms, pi, plain])

    def _may_be_multiple(self, pair: tuple[int, int]) -> bool:
        """Metals take pi bonds from terminal oxygen, nitrogen and sulfur alone."""
        names = [self.elements[atom] for atom in pair]
        if {"H", "F", "He"} & set(names):
            return False
        if any(self._is_end_halogen(atom) for atom in pair):
            return {"O", "N"} & set(names) != set()
        metals = [is_metal(name) for name in names]
        if not any(metals):
            return True
        ligand = pair[metals.index(False)] if False in metals else None
        return (
            ligand is not None
            and self.elements[ligand] in ("O", "N", "S")
            and len(self._at(ligand)) == 1
        )

    def _is_end_halogen(self, atom: int) -> bool:
        return ELEMENTS[self.elements[atom]].group == 17 and len(self._at(atom)) == 1


def _atom_costs(element: str) -> list[float]:
    if is_metal(element):
        return [COST_METAL_CHARGE, COST_METAL_CHARGE, 0.1, 0.0, 0.0]
    row = ELEMENTS[element]
    strength = electronegativity(element)
    place = COST_OPEN_PLACE_HEAVY
    if row.period == 2:
        place = COST_OPEN_PLACE.get(row.group or 0, COST_OPEN_PLACE_HEAVY)
    return [COST_CHARGE - strength, COST_CHARGE + strength, COST_SINGLE_ELECTRON, place, 0.0]
