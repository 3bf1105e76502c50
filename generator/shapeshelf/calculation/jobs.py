"""Which calculations a catalogue asks for, cheapest first."""

from collections.abc import Sequence
from dataclasses import dataclass
from difflib import get_close_matches
from pathlib import Path

from shapeshelf.calculation.judging import level_for
from shapeshelf.calculation.model import Level
from shapeshelf.calculation.states import Standing, State, standing_of
from shapeshelf.catalogue.model import Catalogue, Entry
from shapeshelf.domains.analysis import analyse
from shapeshelf.errors import AnalysisError, StructureError, UsageError
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.reading import read_structure

COST_OF_LEVEL = {Level.DFT: 1.0, Level.DFT_SMALL: 0.4, Level.XTB: 0.004}
"""Time a level takes, relative to ``dft``; only the estimate of the time left uses it."""


@dataclass(frozen=True, slots=True)
class Job:
    """One calculation to do."""

    id: str
    name: str
    molecule: Molecule
    level: Level
    cost: float
    """In units of its own, proportional to the time it takes."""


@dataclass(frozen=True, slots=True)
class Plan:
    """What there is to do."""

    jobs: tuple[Job, ...]
    kept: tuple[str, ...]
    """Ids whose record stands."""
    refused: tuple[tuple[str, str], ...]
    """(id, why): entries that cannot be analysed."""


def plan_of(catalogue: Catalogue, ids: Sequence[str], level: Level | None, again: bool) -> Plan:
    """Return the calculations that ``ids`` (all entries where empty) are in need of.

    ``level`` ``None`` lets every entry have the level that suits its size, and leaves a record at
    any level alone. ``again`` computes what has a record too. Raises UsageError for an unknown id.
    """
    jobs, kept, refused = [], [], []
    for entry in _chosen(catalogue, ids):
        try:
            molecule = read_structure(entry.structure)
            standing = standing_of_entry(catalogue.root, entry, molecule)
        except (StructureError, AnalysisError) as error:
            refused.append((entry.id, str(error)))
            continue
        wanted = level or level_for(molecule)
        if not again and _stands(standing, level):
            kept.append(entry.id)
        else:
            jobs.append(Job(entry.id, entry.name, molecule, wanted, cost_of(molecule, wanted)))
    jobs.sort(key=lambda job: (job.cost, job.id))
    return Plan(tuple(jobs), tuple(kept), tuple(refused))


def standing_of_entry(root: Path, entry: Entry, molecule: Molecule) -> Standing:
    """Return the state of an entry's record. Raises AnalysisError as the domain model does."""
    lewis, _ = analyse(molecule)
    return standing_of(root, entry.id, molecule, lewis.multiplicity)


def cost_of(molecule: Molecule, level: Level) -> float:
    """Return a guess at the time a calculation takes, in units of its own.

    Second derivatives dominate: atoms times the square of the basis functions.
    """
    functions = sum(6 if atom.element == "H" else 31 for atom in molecule.atoms)
    functions += sum(8 for atom in molecule.atoms if ELEMENTS[atom.element].period > 2)
    return COST_OF_LEVEL[level] * len(molecule.atoms) * functions**2


def _chosen(catalogue: Catalogue, ids: Sequence[str]) -> tuple[Entry, ...]:
    known = {entry.id: entry for entry in catalogue.entries}
    for wanted in ids:
        if wanted not in known:
            near = get_close_matches(wanted, known, n=1)
            hint = f"; did you mean {near[0]}?" if near else ""
            raise UsageError(f"{wanted}: no entry has this id{hint}")
    return tuple(known[one] for one in dict.fromkeys(ids)) if ids else catalogue.entries


def _stands(standing: Standing, level: Level | None) -> bool:
    if standing.state not in (State.FRESH, State.FAILED) or standing.record is None:
        return False
    return level is None or standing.record.level is level
