"""A structure to the entry that a steward would begin with: what is known filled in, the rest
there to fill.

* D1  Nothing is overwritten, and no id is given that the catalogue holds or ever published.
* D2  What cannot be known stands as a comment in its place; a field without a value would be a
  mistake.
"""

import json
import os
import shutil
from collections.abc import Iterator
from dataclasses import dataclass, field, replace
from pathlib import Path

from shapeshelf.catalogue.checks import RESERVED_IDS, entry_problems, inside
from shapeshelf.catalogue.fields import EntryFields
from shapeshelf.catalogue.model import Quantity
from shapeshelf.catalogue.problems import Document, one_line
from shapeshelf.catalogue.quantities import LIMITS
from shapeshelf.catalogue.reading import read_catalogue_with_problems
from shapeshelf.catalogue.validation import validated
from shapeshelf.errors import CatalogueError, StructureError, UsageError
from shapeshelf.linking.published import read_released
from shapeshelf.pages.anchors import shown_angles
from shapeshelf.pages.typesetting import slug
from shapeshelf.report.building import report_on_structure
from shapeshelf.report.model import CompoundReport
from shapeshelf.structure.reading import FILE_ENDINGS

LONGEST_ID = 64
_LISTS = frozenset(("formerly", "also", "tags", "hazards", "used-in"))


@dataclass(frozen=True, slots=True)
class Wanted:
    """What the user says of a compound to draft."""

    structure: str
    """A SMILES or the path of a structure file."""
    name: str | None = None
    id: str | None = None
    cas: str | None = None
    code: str | None = None


@dataclass(slots=True)
class Taken:
    """Ids and names that are given away; grows as entries are drafted."""

    ids: set[str] = field(default_factory=set)
    names: set[str] = field(default_factory=set)


def taken_in(root: Path) -> Taken:
    """Return what the catalogue below ``root`` holds or has ever published.

    Raises UsageError where there is no such folder.
    """
    if not root.is_dir():
        raise UsageError(f"{root}: there is no such folder; make it, or name another")
    catalogue, _ = read_catalogue_with_problems(root)
    released = read_released(root)
    taken = Taken(set(RESERVED_IDS), set())
    for entry in catalogue.entries:
        taken.ids.update((entry.id, *entry.formerly))
        taken.names.update(map(_folded, (entry.name, *entry.also)))
    for once in (released.compounds, released.withdrawn) if released else ():
        taken.ids.update(once)
    return taken


def draft_entry(wanted: Wanted, root: Path, taken: Taken) -> Path:
    """Write one entry below ``root`` and return its path; adds to ``taken``.

    Raises StructureError or AnalysisError where the structure cannot be worked out,
    CatalogueError where a field is wrong, UsageError where the id asked for is taken.
    """
    report = report_on_structure(wanted.structure)
    name = _free_name(wanted, report, taken)
    entry_id = _free_id(wanted, name, report, taken)
    path = root / f"{entry_id}.yml"
    if path.exists():
        raise UsageError(f"{path}: is there already; draft overwrites nothing")
    source = _structure_file(wanted, report)
    placed = _placed(source, root, entry_id) if source else None
    known = replace(wanted, name=name, id=entry_id)
    values = _values(known, report, root, placed)
    _refuse_faults(path, root, values)
    if source and placed and not placed.exists():
        shutil.copyfile(source, placed)
    with path.open("x", encoding="utf-8") as file:
        file.write(entry_text(values, report))
    taken.ids.add(entry_id)
    taken.names.add(_folded(name))
    return path


def entry_text(values: dict[str, object], report: CompoundReport) -> str:
    """Return the YAML of an entry: every field in its order, unknown ones as comments."""
    lines: list[str] = []
    for python_name, spec in EntryFields.model_fields.items():
        name = spec.alias or python_name
        if name == "measured":
            lines += _measured_lines(report)
        elif name in values:
            lines += _field_lines(name, values[name])
        else:
            lines.append(f"# {name}: []" if name in _LISTS else f"# {name}:")
    return "\n".join([*lines, ""])


def _field_lines(name: str, value: object) -> list[str]:
    if isinstance(value, dict):
        inner = [f"  {key}: {_scalar(item)}" for key, item in value.items()]
        return [f"{name}:", *inner]
    return [f"{name}: {_scalar(value)}"]


def _scalar(value: object) -> str:
    """Return a value as YAML reads it; JSON's quoted strings are YAML's."""
    return json.dumps(value, ensure_ascii=False)


def _measured_lines(report: CompoundReport) -> Iterator[str]:
    """Yield a line for each value that can be measured, to be filled in and freed of its #."""
    yield "# measured:"
    for row in shown_angles(report):
        yield _measured_line(Quantity.ANGLE, row.of)
    for length in report.lengths:
        yield _measured_line(Quantity.LENGTH, length.of)
    if report.dipole_debye is not None:
        yield _measured_line(Quantity.DIPOLE, None)


def _measured_line(quantity: Quantity, label: str | None) -> str:
    of = f"of: {_scalar(label)}, " if label else ""
    unit = LIMITS[quantity].unit
    return (
        f"#   - {{quantity: {quantity.value}, {of}value: , unit: {unit}, uncertainty: , "
        "phase: , method: , source: }"
    )


def _values(
    wanted: Wanted, report: CompoundReport, root: Path, placed: Path | None
) -> dict[str, object]:
    molecule = report.molecule
    structure: str | dict[str, object] = wanted.structure.strip()
    if placed is not None:
        stated = {"charge": molecule.charge or None, "multiplicity": molecule.multiplicity}
        file = os.path.relpath(placed.resolve(), root.resolve())
        structure = {"file": Path(file).as_posix()}
        structure |= {key: item for key, item in stated.items() if item is not None}
    elif wanted.structure.strip().lower().endswith(FILE_ENDINGS):
        structure = molecule.smiles
    values = {
        "id": wanted.id,
        "name": wanted.name,
        "structure": structure,
        "formula": molecule.formula,
        "cas": (wanted.cas or "").strip() or None,
        "code": (wanted.code or "").strip() or None,
    }
    return {name: value for name, value in values.items() if value is not None}


def _structure_file(wanted: Wanted, report: CompoundReport) -> Path | None:
    """Return the file that holds the coordinates, where the structure came with any."""
    if report.molecule.coordinates_angstrom is None:
        return None
    return Path(wanted.structure.strip())


def _placed(source: Path, root: Path, entry_id: str) -> Path:
    """Return where the structure file stands in the catalogue: where it is, or beside the entry.

    Raises UsageError where another file stands there.
    """
    if inside(root, source):
        return source
    placed = root / f"{entry_id}{source.suffix.lower()}"
    if placed.exists():
        raise UsageError(f"{placed}: is there already; draft overwrites nothing")
    return placed


def _refuse_faults(path: Path, root: Path, values: dict[str, object]) -> None:
    """Raise CatalogueError with what ``check`` would say, but of a file not yet copied."""
    document = Document(path, values, {})
    _, problems = validated(document, values, EntryFields)
    problems += [
        problem
        for problem in entry_problems(document, root, None, None)
        if problem.field != "structure.file"
    ]
    if problems:
        raise CatalogueError(tuple(problems))


def _free_name(wanted: Wanted, report: CompoundReport, taken: Taken) -> str:
    """Return the name asked for, the file's own, or the formula; numbered where it is taken.

    Raises StructureError where the name asked for is taken.
    """
    given = one_line(" ".join((wanted.name or "").split()))
    if given:
        if _folded(given) in taken.names:
            raise StructureError(wanted.structure, f"name: {given} is taken; choose another")
        return given
    is_file = wanted.structure.strip().lower().endswith(FILE_ENDINGS)
    name = Path(wanted.structure.strip()).stem if is_file else report.molecule.formula
    return next(
        one
        for one in (name, *(f"{name} ({number})" for number in range(2, len(taken.names) + 3)))
        if _folded(one) not in taken.names
    )


def _free_id(wanted: Wanted, name: str, report: CompoundReport, taken: Taken) -> str:
    if wanted.id is not None:
        if wanted.id in taken.ids:
            raise UsageError(f"the id {wanted.id} is taken, or was once; choose another")
        return wanted.id
    stem = slug(name)[:LONGEST_ID].strip("-") or slug(report.molecule.formula) or "compound"
    numbered = (
        f"{stem[: LONGEST_ID - len(str(number)) - 1].strip('-')}-{number}"
        for number in range(2, len(taken.ids) + 3)
    )
    return next(one for one in (stem, *numbered) if one not in taken.ids)


def _folded(name: str) -> str:
    return " ".join(name.casefold().split())
