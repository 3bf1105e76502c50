"""Units that stand at the head of a table's column, given to the bare numbers below.

A table is a run of blocks with cells between upright strokes; its first row is its head, and so
is any later one of several cells with neither link nor number. A cell takes the unit of its
column where it holds a number and nothing else.
"""

import re
from collections.abc import Iterable, Iterator, Sequence
from dataclasses import replace

from shapeshelf.linking.documents.model import Block
from shapeshelf.linking.numbers import unit_in_head

_CELL = re.compile(r"[^|]+")
_BARE_NUMBER = re.compile(r"[\s*~≈]*\d+(?:[.,]\d+)?(?:\(\d+\))?(?:\s*±\s*\d+(?:[.,]\d+)?)?[\s*]*")


def with_column_units(blocks: Iterable[Block]) -> Iterator[Block]:
    """Yield the blocks, those of table rows with the units of their columns written out."""
    units: dict[int, str] = {}
    in_table = False
    for block in blocks:
        is_row = "|" in block.text
        if is_row and (not in_table or _is_head(block)):
            units = dict(_units(block.text))
        in_table = is_row
        yield _with_units(block, units) if is_row and units else block


def _is_head(block: Block) -> bool:
    cells = [match.group().strip() for _, match in _cells(block.text)]
    worded = [cell for cell in cells if any(character.isalpha() for character in cell)]
    numbered = any(_BARE_NUMBER.fullmatch(cell) for cell in cells)
    return len(worded) > 1 and not block.links and not numbered


def _units(head: str) -> Iterator[tuple[int, str]]:
    for column, match in _cells(head):
        unit = unit_in_head(match.group())
        if unit:
            yield column, unit


def _with_units(block: Block, units: dict[int, str]) -> Block:
    inserts = [
        (match.start() + len(match.group().rstrip()), " " + units[column])
        for column, match in _cells(block.text)
        if column in units and _BARE_NUMBER.fullmatch(match.group())
    ]
    for offset, text in reversed(inserts):
        block = _inserted(block, offset, text)
    return block


def _cells(text: str) -> Sequence[tuple[int, re.Match[str]]]:
    """Return each cell with the number of strokes before it."""
    return [(text.count("|", 0, match.start()), match) for match in _CELL.finditer(text)]


def _inserted(block: Block, offset: int, text: str) -> Block:
    by = len(text)

    def moved(place: int) -> int:
        return place + by if place >= offset else place

    links = tuple(
        replace(link, start=moved(link.start), end=link.end + by if link.end > offset else link.end)
        for link in block.links
    )
    starts = tuple((moved(place), line) for place, line in block.starts)
    return Block(block.text[:offset] + text + block.text[offset:], links, starts)
