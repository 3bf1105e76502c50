"""YAML to plain values, the line of every field kept, and hostile files refused.

The parser is PyYAML's safe one (the compiled one where it is there), read event by event:
so depth, aliases and tags are refused before anything is built from them. Plain words are
typed after the core schema of YAML 1.2 (YAML 1.2.2, section 10.3), narrowed to decimal
numbers: ``NO``, ``on``, ``2024-01-31`` and ``75-10-5`` stay text, as a formula or a CAS
number needs.
"""

import os
import re
from collections.abc import Callable, Iterator
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any, NoReturn

import yaml

from shapeshelf.catalogue.problems import WHOLE_FILE, Document, one_line, quoted, shown
from shapeshelf.errors import CatalogueError, Problem

MAX_BYTES = 256 * 1024
MAX_DEPTH = 12
_MAX_DIGITS = 18
"""Longer runs of digits stay text, so that no number is built from a megabyte of them."""

LOADER: Any = getattr(yaml, "CSafeLoader", yaml.SafeLoader)

# Zeros in front belong to a code, not to a number.
_INTEGER = re.compile(r"[-+]?(0|[1-9][0-9]*)")
_FLOAT = re.compile(r"[-+]?(\.[0-9]+|(0|[1-9][0-9]*)(\.[0-9]*)?)([eE][-+]?[0-9]+)?")
_WORDS = dict.fromkeys(("", "~", "null", "Null", "NULL")) | {
    word: word.lower() == "true" for word in ("true", "True", "TRUE", "false", "False", "FALSE")
}


def read_document(file: Path) -> Document:
    """Return the mapping in ``file`` with the line (from 1) of each field and item.

    Fields are addressed as ``measured[2].value``, items counted from 0. A repeated field is
    noted in ``problems`` and its first value kept. Raises ``CatalogueError`` for a file that
    is too large, not UTF-8, not YAML, too deep, or uses aliases, tags or several documents.
    """
    text = _decoded(file)
    if control := yaml.reader.Reader.NON_PRINTABLE.search(text):
        line = text.count("\n", 0, control.start()) + 1
        _refuse(file, line, WHOLE_FILE, "holds a control character; delete it")
    loader = LOADER(text)
    builder = _Builder(file, loader.get_event)
    try:
        data = builder.document()
    except yaml.MarkedYAMLError as error:
        line, message = _syntax_fault(error, text)
        _refuse(file, line, WHOLE_FILE, message)
    finally:
        loader.dispose()
    return Document(file, data, builder.lines, tuple(builder.problems))


def _decoded(file: Path) -> str:
    """Return the text of ``file``, a byte order mark taken off."""
    if not os.path.isfile(file):  # a pipe would be waited on for ever
        _refuse(file, 1, WHOLE_FILE, "is no ordinary file")
    try:
        with file.open("rb") as stream:
            raw = stream.read(MAX_BYTES + 1)
    except OSError as error:
        _refuse(file, 1, WHOLE_FILE, f"cannot be read: {error.strerror}")
    if len(raw) > MAX_BYTES:
        _refuse(file, 1, WHOLE_FILE, f"is larger than {MAX_BYTES // 1024} kB; split it up")
    try:
        return raw.decode("utf-8-sig")
    except UnicodeDecodeError as error:
        line = raw.count(b"\n", 0, error.start) + 1
        _refuse(file, line, WHOLE_FILE, "is not in UTF-8; save it in that encoding")


@dataclass
class _Builder:
    """One pass over the events of one file."""

    file: Path
    next: Callable[[], Any]
    lines: dict[str, int] = field(default_factory=dict)
    problems: list[Problem] = field(default_factory=list)

    def document(self) -> dict[str, Any]:
        self.next()  # start of the stream
        start = self.next()
        if isinstance(start, yaml.StreamEndEvent):
            _refuse(self.file, 1, WHOLE_FILE, "is empty; it needs fields such as `id: sf4`")
        event = self.next()
        if not isinstance(event, yaml.MappingStartEvent):
            message = "holds no fields; right would be lines such as `id: sf4`"
            _refuse(self.file, _line(event), WHOLE_FILE, message)
        data: dict[str, Any] = self._value(event, "", 1)
        self.next()  # end of the document
        after = self.next()
        if not isinstance(after, yaml.StreamEndEvent):
            _refuse(self.file, _line(after), WHOLE_FILE, "a second document begins; one to a file")
        return data

    def _value(self, event: Any, path: str, depth: int) -> Any:
        self._refuse_extras(event, path)
        if isinstance(event, yaml.ScalarEvent):
            return _typed(event.value) if event.implicit[0] else event.value
        if depth > MAX_DEPTH:
            _refuse(self.file, _line(event), path, f"is nested more than {MAX_DEPTH} deep")
        if isinstance(event, yaml.SequenceStartEvent):
            return list(self._items(path, depth))
        return self._mapping(path, depth)

    def _refuse_extras(self, event: Any, path: str) -> None:
        where = path or WHOLE_FILE
        if isinstance(event, yaml.AliasEvent):
            _refuse(self.file, _line(event), where, "an alias (`*`) is not taken; write it out")
        if event.anchor is not None:
            _refuse(self.file, _line(event), where, "an anchor (`&`) is not taken; write it out")
        if event.tag is not None:
            tag = event.tag.replace("tag:yaml.org,2002:", "!!")
            message = f"the tag {quoted(tag)} is not taken; put the text in quotes"
            _refuse(self.file, _line(event), where, message)

    def _items(self, path: str, depth: int) -> Iterator[Any]:
        index = 0
        while not isinstance(event := self.next(), yaml.SequenceEndEvent):
            place = f"{path}[{index}]"
            self.lines[place] = _line(event)
            yield self._value(event, place, depth + 1)
            index += 1

    def _mapping(self, path: str, depth: int) -> dict[str, Any]:
        data: dict[str, Any] = {}
        while not isinstance(event := self.next(), yaml.MappingEndEvent):
            key = self._key(event, path)
            place = f"{path}.{key}" if path else key
            if key in data:
                message = f"stands twice, first in line {self.lines[place]}; keep one of them"
                self.problems.append(
                    Problem(shown(self.file), _line(event), one_line(place), message)
                )
                self._skip(place, depth)
                continue
            self.lines[place] = _line(event)
            data[key] = self._value(self.next(), place, depth + 1)
        return data

    def _skip(self, place: str, depth: int) -> None:
        """Read past a value, so that its lines do not replace those of the first."""
        kept, self.lines = self.lines, {}
        self._value(self.next(), place, depth + 1)
        self.lines = kept

    def _key(self, event: Any, path: str) -> str:
        self._refuse_extras(event, path)
        if not isinstance(event, yaml.ScalarEvent) or not event.value:
            _refuse(self.file, _line(event), path or WHOLE_FILE, "a field's name must be a word")
        return str(event.value)


def _typed(word: str) -> Any:
    """Return the value of a plain (unquoted) scalar."""
    if word in _WORDS:
        return _WORDS[word]
    if word[0] not in "+-.0123456789":  # most words: spare them the patterns
        return word
    if len(word) > _MAX_DIGITS:
        return word
    if _INTEGER.fullmatch(word):
        return int(word)
    if _FLOAT.fullmatch(word):
        return float(word)
    return word


def _line(event: Any) -> int:
    return int(event.start_mark.line) + 1


def _refuse(file: Path, line: int, path: str, message: str) -> NoReturn:
    problem = Problem(shown(file), line, one_line(path), one_line(message))
    raise CatalogueError((problem,))


def _syntax_fault(error: Any, text: str) -> tuple[int, str]:
    """Return line and message for what the parser refused."""
    mark = error.problem_mark or error.context_mark
    rows = text.split("\n")
    row = rows[mark.line] if mark.line < len(rows) else ""
    # What is never closed is noticed only behind the last line.
    line = min(mark.line, text.rstrip().count("\n")) + 1
    return line, _syntax_hint(str(error.problem), row, row[mark.column : mark.column + 1])


def _syntax_hint(problem: str, row: str, character: str) -> str:
    if character == "\t" or "\t" in row[: len(row) - len(row.lstrip())]:
        return "a tab indents the line; use spaces"
    if re.search(r":\s*\[[^\]]*\]\s*\S", row):
        return "text that begins with `[`, as many SMILES do, must stand in quotes"
    if "mapping values are not allowed" in problem:
        return "a colon and a space inside a text start a new field; put the text in quotes"
    if "cannot start any token" in problem:
        return f"a text that begins with `{character}` must stand in quotes"
    if "escape character" in problem:
        return "a `\\` inside double quotes is an escape; use single quotes"
    return f"is not readable as YAML: {problem}"
