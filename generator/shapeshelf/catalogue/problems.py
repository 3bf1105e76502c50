"""How problems are addressed and worded: file, line, field, and the nearest right word."""

import difflib
import os
import re
from collections.abc import Iterable
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from shapeshelf.catalogue.model import Entry
from shapeshelf.errors import Problem

WHOLE_FILE = "file"
"""The field of a problem that is one of the file and of no field in it."""

_LONGEST_QUOTE = 60
_MOST_CHOICES = 20
_CONTROL = re.compile(r"[\x00-\x1f\x7f-\x9f\u2028\u2029]")


@dataclass(frozen=True, slots=True)
class Document:
    """One YAML file as plain values, before anything is checked."""

    file: Path
    data: dict[str, Any]
    lines: dict[str, int]
    """Line of each field and item, addressed as ``measured[2].value``."""
    problems: tuple[Problem, ...] = ()
    """Found while reading: fields that stand twice."""

    def problem(self, field: str, message: str) -> Problem:
        """Return a problem with ``field``, or with what holds it where it is missing."""
        line = line_of(self.lines, field)
        return Problem(shown(self.file), line, one_line(field or WHOLE_FILE), one_line(message))


def problem_at(entry: Entry, field: str, message: str) -> Problem:
    """Return a problem with a field of ``entry``, addressed as ``measured[2].value``.

    Items count from 0. A field that is absent takes the line of what would hold it.
    """
    line = line_of(entry.lines, field)
    return Problem(shown(entry.file), line, one_line(field), one_line(message))


def line_of(lines: dict[str, int], field: str) -> int:
    """Return the line of ``field`` or of the nearest thing around it, else 1."""
    while field and field not in lines:
        field = field[: max(field.rfind("."), field.rfind("["), 0)]
    return lines.get(field, 1)


def shown(file: Path) -> Path:
    """Return ``file`` relative to the current folder where it lies below it."""
    absolute = Path.cwd() / file
    near = absolute.relative_to(Path.cwd()) if absolute.is_relative_to(Path.cwd()) else file
    # A name that is not in UTF-8 would make printing it fail.
    return Path(one_line(os.fsencode(near).decode("utf-8", "replace")))


def quoted(text: object) -> str:
    """Return a user's text as a message quotes it: in backticks, cut short if long."""
    written = str(text).lower() if isinstance(text, bool) else str(text)
    return f"`{written}`" if len(written) <= _LONGEST_QUOTE else f"`{written[:_LONGEST_QUOTE]}…`"


def one_line(text: str) -> str:
    """Return ``text`` with control characters, line breaks among them, written as escapes."""
    return _CONTROL.sub(lambda match: match.group().encode("unicode_escape").decode(), text)


def nearest(word: str, right: Iterable[str]) -> str:
    """Return the part of a sentence that names the likely word, or what there is.

    ``; did you mean `source`?`` for a near miss, ``; right would be one of: …`` else.
    """
    words = list(right)
    folded = {choice.casefold(): choice for choice in words}
    key = re.sub(r"[\s_]+", "-", word.strip()).casefold()
    close = difflib.get_close_matches(key, folded, n=1, cutoff=0.6)
    if close:
        return f"; did you mean `{folded[close[0]]}`?"
    if len(words) > _MOST_CHOICES:
        return ""
    return "; right would be one of: " + ", ".join(words) if words else ""
