"""A document as the checks read it, whatever format it came in."""

from bisect import bisect_right
from collections.abc import Iterable
from dataclasses import dataclass

BARE = "\N{OBJECT REPLACEMENT CHARACTER}"
"""Stands in the text for a link that shows nothing but its own address."""


@dataclass(frozen=True, slots=True)
class Piece:
    """A stretch of text as it is read, all of it link or none of it."""

    text: str
    line: int
    """Line of its first character, from 1; in DOCX the number of the paragraph."""
    address: str | None = None


@dataclass(frozen=True, slots=True)
class Link:
    """A link in a block: where its text begins and ends, and where it leads."""

    start: int
    end: int
    address: str
    line: int


@dataclass(frozen=True, slots=True)
class Block:
    """What is read in one go: a paragraph, a list item, a heading, one row of a table."""

    text: str
    links: tuple[Link, ...]
    starts: tuple[tuple[int, int], ...]
    """(offset, line) wherever a new line begins, in order."""

    def line_at(self, offset: int) -> int:
        """Return the line of the document that the character at ``offset`` stands in."""
        index = bisect_right(self.starts, offset, key=lambda start: start[0])
        return self.starts[max(index - 1, 0)][1]


def block_of(pieces: Iterable[Piece]) -> Block:
    """Return the pieces joined; line breaks within a piece count on from its first line."""
    text = ""
    links: list[Link] = []
    starts: list[tuple[int, int]] = []
    for piece in pieces:
        starts.append((len(text), piece.line))
        if piece.address is not None:
            links.append(Link(len(text), len(text) + len(piece.text), piece.address, piece.line))
        breaks = [index for index, character in enumerate(piece.text) if character == "\n"]
        starts += [(len(text) + at + 1, piece.line + n) for n, at in enumerate(breaks, start=1)]
        text += piece.text
    return Block(text, tuple(links), tuple(starts) or ((0, 1),))
