"""A whole catalogue worked out: every report, and every problem only chemistry can see.

The catalogue room finds what is wrong in the text; here structures are read, formulas held
against them and measured labels against the angles and bonds that exist.
"""

from collections.abc import Sequence
from difflib import get_close_matches
from pathlib import Path

from shapeshelf.calculation.states import State, standing_of
from shapeshelf.catalogue.model import Catalogue, Entry, Measurement, Quantity
from shapeshelf.catalogue.problems import problem_at
from shapeshelf.catalogue.reading import read_catalogue_with_problems
from shapeshelf.errors import AnalysisError, CatalogueError, Problem, StructureError
from shapeshelf.report.building import report_on_entry
from shapeshelf.report.model import CompoundReport
from shapeshelf.structure.formulas import formulas_agree

MOST_NAMED = 12
RECORD_WORDS = {
    State.BROKEN: "with a file that is no record",
    State.STALE: "whose record belongs to another structure",
    State.MISSING: "without calculated values",
}


def report_on_catalogue(root: Path) -> tuple[Catalogue, tuple[CompoundReport, ...]]:
    """Return the catalogue below ``root`` and one report an entry, in order of id.

    Raises CatalogueError with every problem of the run, of text and of chemistry alike.
    """
    catalogue, problems = read_catalogue_with_problems(root)
    reports = []
    for entry in catalogue.entries:
        found = _report_or_problems(entry, catalogue.root)
        if isinstance(found, CompoundReport):
            reports.append(found)
        else:
            problems += _new(found, problems)
    if problems:
        raise CatalogueError(tuple(problems))
    return catalogue, tuple(reports)


def record_notes(catalogue: Catalogue, reports: Sequence[CompoundReport]) -> list[str]:
    """Return a line for each kind of record that does not count, with the command that helps."""
    found: dict[State, list[str]] = {}
    for report in reports:
        if report.id is not None:
            standing = standing_of(
                catalogue.root, report.id, report.molecule, report.lewis.multiplicity
            )
            found.setdefault(standing.state, []).append(report.id)
    return [
        f"{len(found[state])} {words}: shapeshelf compute {_named(found[state])}".rstrip()
        for state, words in RECORD_WORDS.items()
        if state in found
    ]


def _named(ids: Sequence[str]) -> str:
    """Return the ids to put on a command line; none where all of them would be too many."""
    return " ".join(ids) if len(ids) <= MOST_NAMED else ""


def _new(found: list[Problem], known: list[Problem]) -> list[Problem]:
    """Leave out what the catalogue room has said of the same field already."""
    said = {(problem.file, problem.line, problem.field) for problem in known}
    return [item for item in found if (item.file, item.line, item.field) not in said]


def _report_or_problems(entry: Entry, root: Path) -> CompoundReport | list[Problem]:
    try:
        report = report_on_entry(entry, root)
    except (StructureError, AnalysisError) as error:
        return [problem_at(entry, "structure", str(error))]
    problems = _formula_problems(entry, report) + _label_problems(entry, report)
    return problems or report


def _formula_problems(entry: Entry, report: CompoundReport) -> list[Problem]:
    if entry.formula is None or formulas_agree(entry.formula, report.molecule):
        return []
    return [
        problem_at(
            entry,
            "formula",
            f"{entry.formula} disagrees with the structure, which is {report.molecule.formula}",
        )
    ]


def _label_problems(entry: Entry, report: CompoundReport) -> list[Problem]:
    return [_label_problem(entry, report, item) for item in report.unmatched]


def _label_problem(entry: Entry, report: CompoundReport, item: Measurement) -> Problem:
    labels = _labels(report, item.quantity)
    near = get_close_matches(item.of or "", labels, n=1, cutoff=0.0) or ["none"]
    number = entry.measured.index(item)
    return problem_at(
        entry,
        f"measured[{number}].of",
        f"{item.of} names no {item.quantity} of this structure; nearest is {near[0]} "
        f"(all: {', '.join(labels) or 'none'})",
    )


def _labels(report: CompoundReport, quantity: Quantity) -> list[str]:
    if quantity is Quantity.LENGTH:
        return [row.of for row in report.lengths]
    return [row.of for centre in report.centres for row in centre.angles]
