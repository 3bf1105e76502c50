"""A catalogue folder to one frozen ``Catalogue``, or every problem of one run."""

import os
from collections.abc import Iterator
from pathlib import Path
from typing import NoReturn

from shapeshelf.catalogue.checks import catalogue_problems, entry_problems, inside
from shapeshelf.catalogue.fields import EntryFields, StructureFields
from shapeshelf.catalogue.freezing import frozen_entry
from shapeshelf.catalogue.lists import read_protocols, read_sources
from shapeshelf.catalogue.model import Catalogue, Entry
from shapeshelf.catalogue.problems import WHOLE_FILE, Document, shown
from shapeshelf.catalogue.validation import validated
from shapeshelf.catalogue.yaml_lines import read_document
from shapeshelf.errors import CatalogueError, Problem

SOURCES = "sources.yml"
PROTOCOLS = "protocols.yml"
RECORDS = "records"
FATAL = frozenset({"structure"} | {f"structure.{name}" for name in StructureFields.model_fields})
"""Fields with a problem that leaves nothing to look at further."""

_SUFFIXES = (".yml", ".yaml")


def read_catalogue(root: Path) -> Catalogue:
    """Return the catalogue below ``root``.

    Every YAML file at any depth is one entry, but for ``sources.yml`` and ``protocols.yml``
    at the top, the folder ``records/`` beside them, and names that begin with ``.`` or ``_``.
    Raises ``CatalogueError`` with all problems of one run. Checked here is all that needs no
    chemistry; whether a structure can be read and agrees with its formula is asked later.
    """
    catalogue, problems = read_catalogue_with_problems(root)
    if problems:
        raise CatalogueError(tuple(problems))
    return catalogue


def read_catalogue_with_problems(root: Path) -> tuple[Catalogue, list[Problem]]:
    """Return what is right in the catalogue below ``root`` and every problem with the rest.

    For whoever has more to check before stopping. An entry with a problem is there without
    the faulty fields, unless it lacks ``id``, ``name`` or a right ``structure`` then. Raises
    ``CatalogueError`` only where the folder, or one in it, cannot be read.
    """
    if not root.is_dir():
        raise CatalogueError((Problem(shown(root), 1, WHOLE_FILE, "there is no such folder"),))
    problems: list[Problem] = []
    sources, source_keys = read_sources(root / SOURCES, problems)
    protocols, protocol_keys = read_protocols(root / PROTOCOLS, problems)
    documents = list(_documents(root, problems))
    entries: list[Entry] = []
    for document in documents:
        fields, found = validated(document, document.data, EntryFields)
        found += document.problems
        found += entry_problems(document, root, source_keys, protocol_keys)
        if fields is not None and not any(problem.field in FATAL for problem in found):
            entries.append(frozen_entry(fields, document))
        problems += found
    problems += catalogue_problems(documents)
    entries.sort(key=lambda entry: entry.id)
    return Catalogue(root, tuple(entries), sources, protocols), problems


def entry_files(root: Path) -> list[Path]:
    """Return the YAML file of each entry below ``root``, in order of path."""
    return sorted(_entry_files(root))


def _entry_files(root: Path) -> Iterator[Path]:
    for folder, folders, names in os.walk(root, onerror=_refuse_folder):
        top = Path(folder) == root
        folders[:] = [
            name for name in folders if name[0] not in "._" and not (top and name == RECORDS)
        ]
        for name in names:
            is_entry = name[0] not in "._" and Path(name).suffix.lower() in _SUFFIXES
            if is_entry and not (top and name in (SOURCES, PROTOCOLS)):
                yield Path(folder) / name


def _refuse_folder(error: OSError) -> NoReturn:
    """Stop: entries in a folder that cannot be read must not vanish without a word."""
    problem = Problem(shown(Path(error.filename)), 1, WHOLE_FILE, f"{error.strerror}")
    raise CatalogueError((problem,))


def _documents(root: Path, problems: list[Problem]) -> Iterator[Document]:
    for file in entry_files(root):
        if file.is_symlink() and not inside(root, file):
            message = f"is a link to a place outside {root.name}/; put the file itself here"
            problems.append(Problem(shown(file), 1, WHOLE_FILE, message))
            continue
        try:
            yield read_document(file)
        except CatalogueError as error:
            problems.extend(error.problems)
