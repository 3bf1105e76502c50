"""HTML to blocks with their links."""

from collections.abc import Iterator
from html.parser import HTMLParser

from shapeshelf.linking.documents.model import BARE, Block, Piece, block_of

_BLOCKS = frozenset(
    (
        "address", "article", "aside", "blockquote", "body", "caption", "center", "dd", "details",
        "div", "dl", "dt", "figcaption", "figure", "footer", "form", "h1", "h2", "h3", "h4", "h5",
        "h6", "header", "hr", "legend", "li", "main", "nav", "ol", "p", "pre", "section", "summary",
        "table", "tbody", "tfoot", "thead", "tr", "ul",
    )
)  # fmt: skip
_CELLS = frozenset(("td", "th"))
_UNSEEN = frozenset(("head", "script", "style", "template", "noscript"))


def html_blocks(text: str) -> Iterator[Block]:
    """Yield the blocks of an HTML document; what no reader sees is left out."""
    reader = _Reader()
    # Python's reader stops at a marked section that it does not know; as text it does no harm.
    reader.feed(text.replace("<![", "&lt;!["))
    reader.close()
    yield from reader.finished()


class _Reader(HTMLParser):
    """Gathers pieces until a block ends."""

    def __init__(self) -> None:
        super().__init__(convert_charrefs=True)
        self._blocks: list[Block] = []
        self._pieces: list[Piece] = []
        self._address: str | None = None
        self._link: list[Piece] = []
        self._unseen = 0

    def finished(self) -> list[Block]:
        self._end_block()
        return self._blocks

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        if tag in _UNSEEN:
            self._unseen += 1
        elif tag in _BLOCKS:
            self._end_block()
        elif tag in _CELLS:
            self._add(" | ")
        elif tag == "br":
            self._add(" ")
        elif tag == "a" and not self._unseen:
            self._end_link()
            self._address = dict(attrs).get("href")

    def handle_endtag(self, tag: str) -> None:
        if tag in _UNSEEN:
            self._unseen = max(0, self._unseen - 1)
        elif tag in _BLOCKS:
            self._end_block()
        elif tag == "a":
            self._end_link()

    def handle_data(self, data: str) -> None:
        if not self._unseen:
            self._add(data)

    def _add(self, text: str) -> None:
        piece = Piece(text, self.getpos()[0])
        (self._pieces if self._address is None else self._link).append(piece)

    def _end_link(self) -> None:
        if self._address is not None:
            text = "".join(piece.text for piece in self._link)
            line = self._link[0].line if self._link else self.getpos()[0]
            shown = BARE if text.strip() == self._address else text
            self._pieces.append(Piece(shown, line, self._address))
        self._address, self._link = None, []

    def _end_block(self) -> None:
        self._end_link()
        if any(piece.address is not None or piece.text.strip() for piece in self._pieces):
            self._blocks.append(block_of(self._pieces))
        self._pieces = []
