"""reStructuredText to blocks with their links."""

import re
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field

from shapeshelf.linking.documents.addresses import URL, trimmed
from shapeshelf.linking.documents.blocks import stretches
from shapeshelf.linking.documents.model import BARE, Block, Piece, block_of

INVENTORY = "inventory:"
"""Begins the address of a link by name, which the inventory of the site resolves."""

_TARGET = re.compile(r"^\s*\.\.\s+_(?:`([^`]+)`|([^:`]+)):\s+(\S+)\s*$")
_ANONYMOUS = re.compile(r"^\s*(?:\.\.\s+__:|__)\s+(\S+)\s*$")
_LITERAL = re.compile(r"^(\s*)\.\.\s+(?:code|code-block|sourcecode|math|raw|highlight)::")
_COMMENT = re.compile(r"^(\s*)\.\.(?:\s+(?![\w-]+(?::[\w-]+)*::|_|\[|\|).*)?$")
_DIRECTIVE = re.compile(r"^\s*\.\.\s+[\w:-]+::")
_INLINE = re.compile(
    rf"""
      ``(?P<literal>.+?)``
    | :(?P<role>[\w+.:-]+):`(?P<content>[^`]+)`
    | `(?P<text>[^`<>]*?)\s*<(?P<address>[^<>`]+)>`__?
    | `(?P<phrase>[^`]+)`(?P<marks>__?)
    | (?P<bare>{URL})
    | (?<![\w`])(?P<word>[A-Za-z0-9](?:[\w.-]*[A-Za-z0-9])?)_(?![\w`])
    | (?P<emphasis>\*+)
    """,
    re.VERBOSE | re.DOTALL,
)


@dataclass(slots=True)
class _Targets:
    """Named targets of the document, and the anonymous ones in order."""

    named: dict[str, str] = field(default_factory=dict)
    anonymous: list[str] = field(default_factory=list)


def rest_blocks(text: str) -> Iterator[Block]:
    """Yield the blocks of a reStructuredText document; literal blocks and comments are left out."""
    lines, targets = _read_targets(_without_literals(text.split("\n")))
    for stretch, first in stretches(lines):
        yield block_of(_pieces(stretch, first, targets))


def _without_literals(lines: list[str]) -> list[str]:
    kept: list[str] = []
    skipping: int | None = None
    for line in lines:
        indent = len(line) - len(line.lstrip())
        if skipping is not None and (not line.strip() or indent > skipping):
            kept.append("")
            continue
        skipping = None
        is_target = _TARGET.match(line) or _ANONYMOUS.match(line)
        if not is_target and (_LITERAL.match(line) or _COMMENT.match(line)):
            skipping = indent
            kept.append("")
        else:
            if line.rstrip().endswith("::") and not _DIRECTIVE.match(line):
                skipping = indent
            kept.append(line)
    return kept


def _read_targets(lines: list[str]) -> tuple[list[str], _Targets]:
    targets = _Targets()
    kept = []
    for line in lines:
        named, anonymous = _TARGET.match(line), _ANONYMOUS.match(line)
        if named:
            name = named.group(1) or named.group(2)
            targets.named.setdefault(_folded(name), named.group(3))
        elif anonymous:
            targets.anonymous.append(anonymous.group(1))
        kept.append("" if named or anonymous else _DIRECTIVE.sub("", line))
    return kept, targets


def _pieces(text: str, line: int, targets: _Targets) -> Iterator[Piece]:
    place = 0
    for match in _INLINE.finditer(text):
        yield Piece(text[place : match.start()], line + text.count("\n", 0, place))
        yield _piece(match, line + text.count("\n", 0, match.start()), targets)
        place = match.end()
        if match.group("bare"):
            place = match.start() + len(trimmed(match.group("bare")))
    yield Piece(text[place:], line + text.count("\n", 0, place))


def _piece(match: re.Match[str], line: int, targets: _Targets) -> Piece:
    held = {name: part for name, part in match.groupdict().items() if part is not None}
    if "role" in held:
        return _by_role(held, line)
    if "address" in held:
        address = held["address"].strip()
        if address.endswith("_"):
            address = targets.named.get(_folded(address[:-1]), address)
        return Piece(held["text"] or BARE, line, "".join(address.split()))
    if "phrase" in held:
        return Piece(held["phrase"], line, _target_of(held, targets))
    if "word" in held:
        known = targets.named.get(_folded(held["word"]))
        return Piece(held["word"] if known else match.group(), line, known)
    if "bare" in held:
        return Piece(BARE, line, trimmed(held["bare"]))
    return Piece(held.get("literal", ""), line)


def _target_of(held: Mapping[str, str], targets: _Targets) -> str | None:
    if held["marks"] == "__":
        return targets.anonymous.pop(0) if targets.anonymous else None
    return targets.named.get(_folded(held["phrase"]))


def _by_role(held: Mapping[str, str], line: int) -> Piece:
    """Links by name to another documentation; other roles show their text."""
    shown, _, target = held["content"].rstrip(">").rpartition("<")
    text, name = (shown.strip(), target) if shown else (held["content"], held["content"])
    refers = held["role"].rpartition(":")[2] in ("ref", "numref") or held["role"].endswith("label")
    if not refers:
        return Piece(text, line)
    return Piece(text if shown else BARE, line, INVENTORY + name.strip().lstrip("!").lower())


def _folded(name: str) -> str:
    return " ".join(name.casefold().replace("\\", "").split())
