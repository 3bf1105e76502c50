"""The two lists beside the entries: ``sources.yml`` and ``protocols.yml``."""

import os
import re
from collections.abc import Callable
from pathlib import Path
from typing import Any, TypeVar

from pydantic import BaseModel

from shapeshelf.catalogue.checks import inside
from shapeshelf.catalogue.fields import ID_PATTERN, ProtocolFields, SourceFields
from shapeshelf.catalogue.model import Protocol, Source, SourceKind
from shapeshelf.catalogue.problems import Document, quoted
from shapeshelf.catalogue.validation import validated
from shapeshelf.catalogue.yaml_lines import read_document
from shapeshelf.errors import CatalogueError, Problem

Fields = TypeVar("Fields", bound=BaseModel)
Item = TypeVar("Item")


def read_sources(
    file: Path, problems: list[Problem]
) -> tuple[dict[str, Source], frozenset[str] | None]:
    """Return the sources by key, and all keys that stand there, right or wrong.

    Adds to ``problems``. A file that is absent holds nothing; the keys are ``None`` where it
    cannot be read.
    """
    return _read(file, SourceFields, _source, problems)


def read_protocols(
    file: Path, problems: list[Problem]
) -> tuple[dict[str, Protocol], frozenset[str] | None]:
    """Return the protocols by id, and all ids that stand there; else as ``read_sources``.

    Each document must exist below the folder of ``file``.
    """
    return _read(file, ProtocolFields, _protocol, problems)


def _read(
    file: Path,
    model: type[Fields],
    freeze: Callable[[str, Fields], Item],
    problems: list[Problem],
) -> tuple[dict[str, Item], frozenset[str] | None]:
    if not file.exists():
        return {}, frozenset()
    try:
        document = read_document(file)
    except CatalogueError as error:
        problems.extend(error.problems)
        return {}, None
    problems.extend(document.problems)
    items = {}
    for key, value in document.data.items():
        fields, found = validated(document, value, model, key)
        problems += [*found, *_key_problems(document, key)]
        if model is ProtocolFields:
            problems += _missing_file(document, key, value)
        if fields is not None:
            items[key] = freeze(key, fields)
    return items, frozenset(document.data)


def _key_problems(document: Document, key: str) -> list[Problem]:
    if re.fullmatch(ID_PATTERN, key):
        return []
    message = "this key holds more than lower-case letters, digits and single hyphens"
    return [document.problem(key, message)]


def _missing_file(document: Document, key: str, value: Any) -> list[Problem]:
    """Return a problem if the ``file`` of a protocol is absent or outside the catalogue."""
    name = value.get("file") if isinstance(value, dict) else None
    if not isinstance(name, str) or not name.strip():
        return []
    root = document.file.parent
    if not inside(root, root / name.strip()):
        message = f"{quoted(name)} lies outside {root.name}/; right would be a path relative to it"
    elif not os.path.isfile(root / name.strip()):
        message = f"there is no file {quoted(name)} below {root.name}/"
    else:
        return []
    return [document.problem(f"{key}.file", message)]


def _source(key: str, fields: SourceFields) -> Source:
    return Source(
        key=key,
        title=fields.title,
        authors=fields.authors,
        year=fields.year,
        kind=SourceKind(fields.kind),
        where=fields.where,
        doi=fields.doi,
        isbn=fields.isbn,
        note=fields.note,
    )


def _protocol(key: str, fields: ProtocolFields) -> Protocol:
    return Protocol(id=key, title=fields.title, file=fields.file)
