"""A CSV of names, SMILES, CAS numbers and codes to a whole catalogue in one go."""

import csv
import io
from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path

from shapeshelf.errors import CatalogueError, Problem, ShapeshelfError, UsageError
from shapeshelf.linking.drafting import Taken, Wanted, draft_entry

COLUMNS = ("name", "smiles", "cas", "code")
_ALIASES = {"structure": "smiles", "cas number": "cas", "cas no": "cas", "cas no.": "cas"}
_DELIMITERS = ",;\t"


@dataclass(frozen=True, slots=True)
class Drafted:
    """The entries written, and what kept others from it."""

    written: tuple[Path, ...]
    problems: tuple[Problem, ...]


def draft_one_or_many(wanted: Wanted, root: Path, taken: Taken) -> Drafted:
    """Draft a structure, or every line of a table where a ``.csv`` or ``.tsv`` is named.

    Raises as ``draft_entry`` for a single structure.
    """
    if not wanted.structure.strip().lower().endswith((".csv", ".tsv")):
        return Drafted((draft_entry(wanted, root, taken),), ())
    if wanted.id or wanted.name:
        raise UsageError("a table brings its own names; --id and --name are for one structure")
    return draft_table(Path(wanted.structure.strip()), root, taken)


def draft_table(table: Path, root: Path, taken: Taken) -> Drafted:
    """Write an entry for each line of ``table`` that can be drafted.

    The first line names the columns: ``smiles``, and as far as known ``name``, ``cas`` and
    ``code``. Raises UsageError where the file cannot be read or has no such line.
    """
    written: list[Path] = []
    problems: list[Problem] = []
    for line, wanted in _rows(table):
        try:
            written.append(draft_entry(wanted, root, taken))
        except CatalogueError as error:
            problems += [
                Problem(table, line, fault.field, fault.message) for fault in error.problems
            ]
        except ShapeshelfError as error:
            problems.append(Problem(table, line, "smiles", str(error)))
    return Drafted(tuple(written), tuple(problems))


def _rows(table: Path) -> Iterator[tuple[int, Wanted]]:
    text = _text(table)
    first = text.partition("\n")[0]
    delimiter = max(_DELIMITERS, key=first.count)
    reader = csv.reader(io.StringIO(text), delimiter=delimiter)
    columns = [_column(name) for name in next(reader, [])]
    if "smiles" not in columns:
        raise UsageError(f"{table}: the first line names no column smiles")
    try:
        for cells in reader:
            held = dict(zip(columns, (cell.strip() for cell in cells), strict=False))
            if any(held.values()):
                yield reader.line_num, _wanted(held)
    except csv.Error as error:
        raise UsageError(f"{table}:{reader.line_num}: not a CSV: {error}") from error


def _text(table: Path) -> str:
    try:
        return table.read_text("utf-8-sig")
    except UnicodeDecodeError:
        raise UsageError(f"{table}: not a text file in UTF-8") from None
    except OSError as error:
        raise UsageError(f"{table}: {error.strerror}") from error


def _column(name: str) -> str:
    folded = " ".join(name.casefold().split())
    return _ALIASES.get(folded, folded)


def _wanted(held: dict[str, str]) -> Wanted:
    return Wanted(
        structure=held.get("smiles", ""),
        name=held.get("name") or None,
        cas=held.get("cas") or None,
        code=held.get("code") or None,
    )
