"""Markdown (CommonMark with tables) to blocks with their links."""

import re
from collections.abc import Iterator, Mapping
from html import unescape

from shapeshelf.linking.documents.addresses import URL, trimmed
from shapeshelf.linking.documents.blocks import stretches
from shapeshelf.linking.documents.model import BARE, Block, Piece, block_of

_FENCE = re.compile(r"^\s*(?:>\s*)*(`{3,}|~{3,})")
_COMMENT = re.compile(r"<!--.*?-->", re.DOTALL)
_DEFINITION = re.compile(r"^ {0,3}\[([^\[\]]+)\]:\s*<?([^\s<>]+)>?(?:\s+[\"'(].*[\"')])?\s*$")
_LABEL = r"(?:[^\[\]\\]|\\.|\[(?:[^\[\]\\]|\\.)*\])*"
_INLINE = re.compile(
    rf"""
      (?P<ticks>`+)(?P<code>.{{1,2000}}?)(?P=ticks)(?!`)
    | \\(?P<escaped>[!-/:-@\[-`{{-~])
    | (?P<image>!\[{_LABEL}\](?:\([^()]*(?:\([^()]*\))?[^()]*\)|\[[^\]]*\])?)
    | \[(?P<text>{_LABEL})\]\(\s*
        (?:<(?P<wrapped>[^<>]*)>|(?P<address>(?:[^\s()\\]|\\.|\([^\s()]*\))*))
        (?:\s+(?:"[^"]*"|'[^']*'|\([^)]*\)))?\s*\)
    | \[(?P<shown>{_LABEL})\]\[(?P<reference>[^\[\]]*)\]
    | \[(?P<shortcut>[^\[\]]+)\]
    | <(?P<auto>https?://[^<>\s]+)>
    | <a\s[^<>]*?href\s*=\s*(?P<quote>["'])(?P<href>[^<>]*?)(?P=quote)[^<>]*>
        (?P<anchor>.{{0,2000}}?)</a\s*>
    | (?P<bare>{URL})
    | (?P<tag></?[A-Za-z][^<>]*>)
    | (?P<emphasis>\*+|(?<!\w)_+|_+(?!\w)|~~)
    """,
    re.VERBOSE | re.DOTALL,
)


def markdown_blocks(text: str) -> Iterator[Block]:
    """Yield the blocks of a Markdown document; code blocks and comments are left out."""
    lines = _without_code(_COMMENT.sub(_blank, text).split("\n"))
    references: dict[str, str] = {}
    for number, line in enumerate(lines):
        definition = _DEFINITION.match(line)
        if definition:
            references.setdefault(_folded(definition.group(1)), definition.group(2))
            lines[number] = ""
    for stretch, first in stretches(lines):
        yield block_of(_pieces(stretch, first, references))


def _without_code(lines: list[str]) -> list[str]:
    fence = ""
    kept = []
    for line in lines:
        mark = _FENCE.match(line)
        if fence:
            closes = mark is not None and mark.group(1).startswith(fence)
            fence = "" if closes else fence
            kept.append("")
        elif mark:
            fence = mark.group(1)
            kept.append("")
        else:
            kept.append(line)
    return kept


def _pieces(text: str, line: int, references: Mapping[str, str]) -> Iterator[Piece]:
    place = 0
    for match in _INLINE.finditer(text):
        yield Piece(unescape(text[place : match.start()]), line + text.count("\n", 0, place))
        here = line + text.count("\n", 0, match.start())
        yield _piece(match, here, references)
        place = match.end()
        if match.group("bare"):
            place = match.start() + len(trimmed(match.group("bare")))
            yield Piece(text[place : match.end()], here)
            place = match.end()
    yield Piece(unescape(text[place:]), line + text.count("\n", 0, place))


def _piece(match: re.Match[str], line: int, references: Mapping[str, str]) -> Piece:
    held = {name: part for name, part in match.groupdict().items() if part is not None}
    if "text" in held:
        address = held.get("wrapped", held.get("address", ""))
        return Piece(_plain(held["text"]), line, unescape(re.sub(r"\\(.)", r"\1", address)))
    if "href" in held:
        return Piece(_plain(held["anchor"]), line, unescape(held["href"]))
    if "auto" in held or "bare" in held:
        return Piece(BARE, line, trimmed(held.get("auto") or held["bare"]))
    if "shown" in held or "shortcut" in held:
        return _referring(match, held, line, references)
    return Piece(held.get("code") or held.get("escaped") or _breaks(match.group()), line)


def _referring(
    match: re.Match[str], held: Mapping[str, str], line: int, references: Mapping[str, str]
) -> Piece:
    shown = held.get("shown", held.get("shortcut", ""))
    address = references.get(_folded(held.get("reference") or shown))
    return Piece(match.group() if address is None else _plain(shown), line, address)


def _plain(text: str) -> str:
    """Return the text of a link without the markup in it."""
    return unescape(re.sub(r"`|\*+|<[^<>]*>|\\(?=[!-/:-@\[-`{-~])", "", text))


def _breaks(text: str) -> str:
    return "\n" * text.count("\n")


def _blank(match: re.Match[str]) -> str:
    return _breaks(match.group())


def _folded(label: str) -> str:
    return " ".join(label.casefold().split())
