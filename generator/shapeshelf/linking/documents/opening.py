"""A path to its blocks, by the ending of its name."""

import os
from collections.abc import Callable, Iterator
from pathlib import Path

from shapeshelf.errors import UsageError
from shapeshelf.linking.documents.addresses import bare_links
from shapeshelf.linking.documents.blocks import stretches
from shapeshelf.linking.documents.docx import docx_blocks
from shapeshelf.linking.documents.html import html_blocks
from shapeshelf.linking.documents.markdown import markdown_blocks
from shapeshelf.linking.documents.model import Block, block_of
from shapeshelf.linking.documents.rest import rest_blocks

DOCX = ".docx"


def text_blocks(text: str) -> Iterator[Block]:
    """Yield the blocks of a plain text, whose links are the addresses in it."""
    for stretch, first in stretches(text.split("\n")):
        yield block_of(bare_links(stretch, first))


READERS: dict[str, Callable[[str], Iterator[Block]]] = {
    ".md": markdown_blocks,
    ".markdown": markdown_blocks,
    ".html": html_blocks,
    ".htm": html_blocks,
    ".xhtml": html_blocks,
    ".rst": rest_blocks,
    ".rest": rest_blocks,
    ".txt": text_blocks,
    ".text": text_blocks,
}


def document_paths(path: Path) -> list[Path]:
    """Return the file itself, or every document below a folder, hidden ones left out.

    Raises UsageError where there is nothing at ``path``.
    """
    if path.is_file():
        return [path]
    if not path.is_dir():
        raise UsageError(f"{path}: there is no such file or folder")
    found = []
    for folder, folders, names in os.walk(path):
        folders[:] = sorted(name for name in folders if not name.startswith("."))
        found += [
            Path(folder) / name
            for name in sorted(names)
            if not name.startswith((".", "~$")) and _is_document(name)
        ]
    return found


def document_blocks(path: Path) -> list[Block]:
    """Return the blocks of a document; a name of another ending is read as plain text.

    Raises UsageError where the file cannot be opened, ShapeshelfError for a DOCX that is none.
    """
    ending = path.suffix.lower()
    try:
        if ending == DOCX:
            return list(docx_blocks(path))
        text = path.read_bytes().decode("utf-8-sig", "replace")
    except OSError as error:
        raise UsageError(f"{path}: {error.strerror}") from error
    lines = text.replace("\r\n", "\n").replace("\r", "\n")
    return list(READERS.get(ending, text_blocks)(lines))


def _is_document(name: str) -> bool:
    ending = Path(name).suffix.lower()
    return ending == DOCX or ending in READERS
