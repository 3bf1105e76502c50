"""DOCX (Office Open XML, ECMA-376) to blocks with their links.

Only text and links are read. A file from elsewhere is not trusted: no entity is expanded, and
what would unpack to more than a protocol can be is refused.
"""

import re
import zipfile
from collections.abc import Iterator
from pathlib import Path
from xml.etree import ElementTree
from xml.etree.ElementTree import Element

from shapeshelf.errors import ShapeshelfError
from shapeshelf.linking.documents.model import BARE, Block, Piece, block_of

MOST_BYTES = 50 * 1024 * 1024
"""Of one part unpacked."""
_WORD = "{http://schemas.openxmlformats.org/wordprocessingml/2006/main}"
_RELATION = "{http://schemas.openxmlformats.org/officeDocument/2006/relationships}id"
_PARTS = ("document", "footnotes", "endnotes")
_FIELD = re.compile(r'HYPERLINK\s+(?:"([^"]*)"|([^\s"\\]+))?(?:.*?\\l\s+"([^"]*)")?', re.DOTALL)


def docx_blocks(path: Path) -> Iterator[Block]:
    """Yield a block a paragraph and a block a table row; "line" is the number of the paragraph.

    Raises ShapeshelfError where the file is no DOCX or not to be trusted.
    """
    try:
        with zipfile.ZipFile(path) as archive:
            names = set(archive.namelist())
            if "word/document.xml" not in names:
                raise ShapeshelfError(f"{path}: not a DOCX document")
            for part in _PARTS:
                if f"word/{part}.xml" in names:
                    yield from _part_blocks(archive, part, names, path)
    except (zipfile.BadZipFile, ElementTree.ParseError, NotImplementedError, RuntimeError) as error:
        raise ShapeshelfError(f"{path}: not a DOCX document that can be read") from error


def _part_blocks(
    archive: zipfile.ZipFile, part: str, names: set[str], path: Path
) -> Iterator[Block]:
    relations: dict[str, str] = {}
    listed = f"word/_rels/{part}.xml.rels"
    if listed in names:
        for item in _xml(archive, listed, path):
            relations[item.get("Id", "")] = item.get("Target", "")
    reader = _Reader(relations)
    for child in _xml(archive, f"word/{part}.xml", path):
        yield from reader.blocks(child)


def _xml(archive: zipfile.ZipFile, name: str, path: Path) -> Element:
    if archive.getinfo(name).file_size > MOST_BYTES:
        raise ShapeshelfError(f"{path}: {name} is larger than a protocol can be")
    with archive.open(name) as file:
        data = file.read(MOST_BYTES + 1)
    declares = b"<!DOCTYPE" in data or b"<!ENTITY" in data or b"\0" in data
    if len(data) > MOST_BYTES or declares:
        raise ShapeshelfError(f"{path}: {name} declares entities or is too large; not read")
    return ElementTree.fromstring(data)


class _Reader:
    """Counts paragraphs and follows fields, which begin and end in separate runs."""

    def __init__(self, relations: dict[str, str]) -> None:
        self._relations = relations
        self._paragraph = 0
        self._code: str | None = None
        self._address: str | None = None

    def blocks(self, element: Element) -> Iterator[Block]:
        if element.tag == _WORD + "p":
            yield block_of(self._paragraph_pieces(element))
        elif element.tag == _WORD + "tr":
            pieces = [
                piece for cell in element.iter(_WORD + "tc") for piece in self._cell_pieces(cell)
            ]
            yield block_of(pieces)
        else:
            for child in element:
                yield from self.blocks(child)

    def _cell_pieces(self, cell: Element) -> Iterator[Piece]:
        for paragraph in cell.iter(_WORD + "p"):
            yield from self._paragraph_pieces(paragraph)
        yield Piece(" | ", self._paragraph)

    def _paragraph_pieces(self, paragraph: Element) -> list[Piece]:
        self._paragraph += 1
        pieces: list[Piece] = []
        self._gather(paragraph, None, pieces)
        return _joined(pieces)

    def _gather(self, element: Element, address: str | None, pieces: list[Piece]) -> None:
        for child in element:
            tag = child.tag.removeprefix(_WORD)
            if tag == "hyperlink":
                self._gather(child, self._target(child) or address, pieces)
            elif tag == "fldSimple":
                self._gather(child, _field_target(child.get(_WORD + "instr", "")), pieces)
            elif tag == "fldChar":
                self._field(child.get(_WORD + "fldCharType", ""))
            elif tag == "instrText":
                self._code = (self._code or "") + (child.text or "")
            elif tag in ("t", "tab", "br", "noBreakHyphen"):
                text = {"t": child.text or "", "noBreakHyphen": "-"}.get(tag, " ")
                pieces.append(Piece(text, self._paragraph, address or self._address))
            elif tag not in ("del", "moveFrom"):
                self._gather(child, address, pieces)

    def _target(self, link: Element) -> str | None:
        address = self._relations.get(link.get(_RELATION, ""), "")
        anchor = link.get(_WORD + "anchor")
        if address and anchor and "#" not in address:
            address += f"#{anchor}"
        return address or None

    def _field(self, kind: str) -> None:
        if kind == "begin":
            self._code = ""
        elif kind == "separate":
            self._address = _field_target(self._code or "")
        else:
            self._code = self._address = None


def _field_target(code: str) -> str | None:
    match = _FIELD.search(code)
    if match is None:
        return None
    address = match.group(1) or match.group(2) or ""
    return (f"{address}#{match.group(3)}" if match.group(3) else address) or None


def _joined(pieces: list[Piece]) -> list[Piece]:
    """Join the runs of one link, which a word processor splits as it likes."""
    joined: list[Piece] = []
    for piece in pieces:
        last = joined[-1] if joined else None
        if last is not None and last.address == piece.address:
            joined[-1] = Piece(last.text + piece.text, last.line, last.address)
        else:
            joined.append(piece)
    return [
        Piece(BARE, piece.line, piece.address) if piece.text.strip() == piece.address else piece
        for piece in joined
    ]
