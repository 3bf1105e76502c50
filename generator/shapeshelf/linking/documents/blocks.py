"""Lines of a plain-text format to the stretches that belong together."""

import re
from collections.abc import Iterator, Sequence

_ITEM = re.compile(r"\s*(?:[-*+•]|\d+[.)]|[a-z][.)]|#+)\s+")
_ROW = re.compile(r"\s*\|")
_RULE = re.compile(r"\s*[|+]?[\s:|+=-]*(?:---|===)[\s:|+=-]*$")
_QUOTE = re.compile(r"\s*(?:>\s?)+")


def stretches(lines: Sequence[str]) -> Iterator[tuple[str, int]]:
    """Yield paragraphs, list items, headings and table rows, each with its first line's number.

    A paragraph that holds a rule between columns is a table, and each of its lines a row.
    """
    for paragraph, first in _paragraphs(lines):
        is_table = len(paragraph) > 1 and any(_RULE.match(line) for line in paragraph)
        held: list[str] = []
        start = first
        for number, line in enumerate(paragraph, start=first):
            alone = is_table or _ROW.match(line) or _ITEM.match(line)
            if alone and held:
                yield "\n".join(held), start
                held = []
            if not held:
                start = number
            held.append(line)
            if is_table or _ROW.match(line) or line.lstrip().startswith("#"):
                yield line, number
                held = []
        if held:
            yield "\n".join(held), start


def _paragraphs(lines: Sequence[str]) -> Iterator[tuple[list[str], int]]:
    held: list[str] = []
    for number, line in enumerate(lines, start=1):
        bare = _QUOTE.sub("", line, count=1) if line.lstrip().startswith(">") else line
        if bare.strip():
            held.append(bare)
        elif held:
            yield held, number - len(held)
            held = []
    if held:
        yield held, len(lines) - len(held) + 1
