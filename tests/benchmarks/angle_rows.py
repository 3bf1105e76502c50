"""Measured angles of tests/data, each tied to its centre and to two of its domains."""

import csv
from dataclasses import dataclass
from itertools import combinations
from pathlib import Path

from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.directions import angle_degrees
from shapeshelf.domains.model import Centre, DomainKind
from shapeshelf.domains.parameters import DomainTraits
from shapeshelf.domains.placing import traits_of
from shapeshelf.structure.molecule import Molecule, Vector
from shapeshelf.structure.reading import read_smiles

DATA = Path(__file__).parent.parent / "data"
FITTED_ON = DATA / "angles.csv"
CHECKED_ON = DATA / "angles_checked.csv"


@dataclass(frozen=True, slots=True)
class AngleRow:
    """One measured angle and the centre that the model has for it."""

    molecule: str
    smiles: str
    of: str
    measured_degrees: float
    element: str
    traits: tuple[DomainTraits, ...]
    directions: tuple[Vector, ...]
    pair: tuple[int, int]
    """Indices of the two bonds among the domains."""
    atoms: tuple[int, int, int]
    model_degrees: float
    ideal_degrees: float
    uncertainty_degrees: float

    @property
    def bonded(self) -> int:
        """Number of bonds at the centre."""
        return sum(trait.kind is DomainKind.BOND for trait in self.traits)

    @property
    def empty(self) -> int:
        """Number of lone pairs and single electrons at the centre."""
        return len(self.traits) - self.bonded


def read_rows(path: Path) -> list[AngleRow]:
    """Return the rows of a table of angles; of several such angles the nearest is meant."""
    with path.open(encoding="utf-8") as file:
        return [_row(record) for record in csv.DictReader(file)]


def _row(record: dict[str, str]) -> AngleRow:
    molecule = read_smiles(record["smiles"])
    first, centre, last = record["angle"].split("-")
    measured = float(record["value_deg"])
    rows = [
        _tied(record, molecule, found, pair)
        for found in analyse(molecule)[1]
        if found.element == centre and found.placements
        for pair in combinations(range(found.bonded), 2)
        if _ends(molecule, found, pair) == sorted((first, last))
    ]
    return min(rows, key=lambda row: round(abs(row.model_degrees - measured), 6))


def _ends(molecule: Molecule, centre: Centre, pair: tuple[int, int]) -> list[str]:
    neighbours = [centre.domains[k].neighbour for k in pair]
    return sorted(molecule.atoms[atom].element for atom in neighbours if atom is not None)


def _tied(
    record: dict[str, str], molecule: Molecule, centre: Centre, pair: tuple[int, int]
) -> AngleRow:
    best = centre.placements[0]
    ends = [centre.domains[k].neighbour for k in pair]
    angle = next(a for a in centre.angles if {a.atoms[0], a.atoms[2]} == set(ends))
    return AngleRow(
        record["name"],
        record["smiles"],
        record["angle"],
        float(record["value_deg"]),
        centre.element,
        tuple(traits_of(molecule, domain) for domain in centre.domains),
        best.directions,
        pair,
        angle.atoms,
        angle_degrees(*(best.directions[k] for k in pair)),
        angle_degrees(*(best.ideal_directions[k] for k in pair)),
        angle.uncertainty_degrees,
    )
