"""Addresses that stand in a text as they are, without markup round them."""

import re
from collections.abc import Iterator

from shapeshelf.linking.documents.model import BARE, Piece

URL = r"https?://[^\s<>\"'\]|`]+"
RELATIVE = (
    r"(?:\.{0,2}/)*(?:compounds|shapes)/[a-z0-9][a-z0-9-]*(?:/[^\s<>\"'\]|`),;]*)?(?:#[\w-]+)?"
)
_BARE = re.compile(rf"(?<![\w/.-])(?:{URL}|{RELATIVE})")
_TRAILING = ".,;:!?)*_"


def bare_links(text: str, line: int) -> Iterator[Piece]:
    """Yield the text in pieces, every address that stands in it as a link of its own."""
    place = 0
    for match in _BARE.finditer(text):
        address = trimmed(match.group())
        yield Piece(text[place : match.start()], line + text.count("\n", 0, place))
        yield Piece(BARE, line + text.count("\n", 0, match.start()), address)
        place = match.start() + len(address)
    yield Piece(text[place:], line + text.count("\n", 0, place))


def trimmed(address: str) -> str:
    """Return an address without the punctuation of the sentence it ends."""
    while address and address[-1] in _TRAILING:
        if address[-1] == ")" and address.count("(") >= address.count(")"):
            break
        address = address[:-1]
    return address
