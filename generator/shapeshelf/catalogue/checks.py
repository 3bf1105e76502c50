"""What one field cannot know: references, names and ids across entries, files, units.

The checks read documents as they stand, so that a mistake in one field hides none in another.
"""

import math
import os
import re
from collections.abc import Callable, Collection, Iterator, Sequence
from pathlib import Path
from typing import Any

from shapeshelf.catalogue.fields import STRUCTURE_SUFFIXES
from shapeshelf.catalogue.model import Quantity
from shapeshelf.catalogue.problems import Document, nearest, quoted, shown
from shapeshelf.catalogue.quantities import LIMITS, Limit
from shapeshelf.errors import Problem

MAX_STRUCTURE_BYTES = 1024 * 1024

RESERVED_IDS = frozenset(
    # Addresses of the site itself.
    ["index", "records", "sources", "protocols", "schema", "data"]
    # Names that a folder cannot bear under Windows (Microsoft, "Naming Files, Paths, and
    # Namespaces"; recalled from memory).
    + ["con", "prn", "aux", "nul"]
    + [f"{port}{number}" for port in ("com", "lpt") for number in range(1, 10)]
)

UNITS = tuple(limit.unit for limit in LIMITS.values())

_ADD_IT = "; add it there, or correct the word"

_LABEL_DASHES = re.compile(r"[‐‑‒–—−]")


def entry_problems(
    document: Document,
    root: Path,
    sources: Collection[str] | None,
    protocols: Collection[str] | None,
) -> Iterator[Problem]:
    """Yield what is wrong with one entry beyond the type of its fields.

    ``sources`` and ``protocols`` are the known keys, ``None`` where their file is unreadable.
    """
    yield from _reserved(document)
    yield from _structure(document, root)
    for index, item in enumerate(_list(document.data, "measured")):
        if isinstance(item, dict):
            yield from _measured(document, f"measured[{index}]", item, sources)
    yield from _unknown_protocols(document, protocols)


def catalogue_problems(documents: Sequence[Document]) -> Iterator[Problem]:
    """Yield every id and name that stands twice, at its later place."""
    yield from _repeated(documents, ("id", "formerly"), lambda word: word, "id")
    yield from _repeated(documents, ("name", "also"), _folded_name, "name")


def inside(root: Path, file: Path) -> bool:
    """Say whether ``file``, its links followed, lies below ``root``."""
    if "\0" in str(file):
        return False
    return Path(os.path.realpath(file)).is_relative_to(os.path.realpath(root))


def structure_path(entry_file: Path, name: str) -> Path:
    """Return the path that the structure file ``name`` of an entry stands for."""
    return Path(os.path.normpath(entry_file.parent / name))


def _repeated(
    documents: Sequence[Document],
    fields: tuple[str, ...],
    fold: Callable[[str], str],
    what: str,
) -> Iterator[Problem]:
    first: dict[str, tuple[Document, str]] = {}
    for document in documents:
        for field, word in _words(document, fields):
            key = fold(word)
            if key in first:
                taker, place = first[key]
                where = f"{shown(taker.file)}:{taker.lines[place]}"
                message = f"the {what} {quoted(word)} is taken in {where}; choose another"
                yield document.problem(field, message)
            first.setdefault(key, (document, field))


def _words(document: Document, fields: tuple[str, ...]) -> Iterator[tuple[str, str]]:
    """Yield address and text of each non-empty text in ``fields`` and their lists."""
    for field in fields:
        value = document.data.get(field)
        items = [(field, value)]
        if isinstance(value, list):
            items = [(f"{field}[{index}]", item) for index, item in enumerate(value)]
        for address, item in items:
            if isinstance(item, str) and item.strip():
                yield address, item.strip()


def _folded_name(name: str) -> str:
    return " ".join(name.casefold().split())


def _reserved(document: Document) -> Iterator[Problem]:
    for field, word in _words(document, ("id", "formerly")):
        if word in RESERVED_IDS:
            yield document.problem(field, f"{quoted(word)} is reserved; choose another id")


def _structure(document: Document, root: Path) -> Iterator[Problem]:
    structure = document.data.get("structure")
    if not isinstance(structure, dict):
        return
    given = [form for form in ("smiles", "file") if form in structure]
    if len(given) != 1:
        fault = "both `smiles` and `file` are given" if given else "neither is given"
        yield document.problem("structure", f"{fault}; right would be one of `smiles` and `file`")
    if isinstance(structure.get("file"), str) and structure["file"].strip():
        for message in _file_faults(document.file, structure["file"].strip(), root):
            yield document.problem("structure.file", message)


def _file_faults(entry_file: Path, name: str, root: Path) -> Iterator[str]:
    file = structure_path(entry_file, name)
    if file.suffix.lower() not in STRUCTURE_SUFFIXES:
        suffixes = " or ".join(STRUCTURE_SUFFIXES)
        yield f"{quoted(name)} is no structure file; right would be {suffixes}"
    # Asked before the file is looked for: what lies outside is nobody's to learn here.
    elif Path(name).is_absolute() or not inside(root, file):
        yield f"{quoted(name)} lies outside {root.name}/; right would be relative to this entry"
    elif not os.path.isfile(file):
        yield f"there is no file {quoted(name)} beside this entry"
    elif file.stat().st_size > MAX_STRUCTURE_BYTES:
        yield f"{quoted(name)} is larger than {MAX_STRUCTURE_BYTES // 1024} kB"


def _measured(
    document: Document, place: str, item: dict[str, Any], sources: Collection[str] | None
) -> Iterator[Problem]:
    quantity = item.get("quantity")
    if isinstance(quantity, str) and quantity in set(Quantity):
        limit = LIMITS[Quantity(quantity)]
        for field, message in _value_faults(item, quantity, limit):
            yield document.problem(f"{place}.{field}", message)
    elif isinstance(unit := item.get("unit"), str) and unit not in UNITS:
        yield document.problem(f"{place}.unit", f"{quoted(unit)} is no unit{nearest(unit, UNITS)}")
    source: Any = item.get("source")
    named = isinstance(source, str) and bool(source.strip())
    if named and sources is not None and source.strip() not in sources:
        message = f"{quoted(source)} is not in sources.yml{nearest(source, sources) or _ADD_IT}"
        yield document.problem(f"{place}.source", message)


def _value_faults(item: dict[str, Any], quantity: str, limit: Limit) -> Iterator[tuple[str, str]]:
    unit: Any = item.get("unit")
    value: Any = item.get("value")
    if isinstance(unit, str) and unit.strip() != limit.unit:
        if unit.strip():
            yield "unit", f"{quoted(unit)} is no unit for {quantity}; right would be {limit.unit}"
    elif _is_number(value) and not limit.least <= float(value) <= limit.most:
        span = f"{limit.least:g} to {limit.most:g} {limit.unit}"
        yield "value", f"{value:g} lies outside what this quantity ({quantity}) can be, {span}"
    yield from _label_faults(item.get("of"), quantity, limit)


def _is_number(value: Any) -> bool:
    return isinstance(value, int | float) and not isinstance(value, bool) and math.isfinite(value)


def _label_faults(label: Any, quantity: str, limit: Limit) -> Iterator[tuple[str, str]]:
    if limit.atoms_in_label is None:
        return
    right = f"right would be a label such as {limit.example}"
    if label is None:
        yield "of", f"is missing: which {quantity}? {right}"
    elif isinstance(label, str) and label.strip():
        if _LABEL_DASHES.search(label):
            yield "of", f"{quoted(label)} holds a dash; join the atoms with the plain hyphen `-`"
        elif not _joins(label.strip(), limit.atoms_in_label):
            yield "of", f"{quoted(label)} does not join {limit.atoms_in_label} atoms; {right}"


def _joins(label: str, atoms: int) -> bool:
    """Say whether ``label`` is ``atoms`` labels such as ``F(ax)``, joined with hyphens."""
    parts = re.split(r"-(?![^(]*\))", label)
    return len(parts) == atoms and all(re.match(r"[A-Z]", part) for part in parts)


def _unknown_protocols(document: Document, protocols: Collection[str] | None) -> Iterator[Problem]:
    for field, word in _words(document, ("used-in",)) if protocols is not None else ():
        if protocols is not None and word not in protocols:
            message = f"{quoted(word)} is not in protocols.yml{nearest(word, protocols) or _ADD_IT}"
            yield document.problem(field, message)


def _list(data: dict[str, Any], field: str) -> list[Any]:
    value = data.get(field)
    return value if isinstance(value, list) else []
