"""The group's protocols: the list, and each Markdown document as a page of the site.

A document is the group's own text, but raw HTML in it is shown, not obeyed, and only ordinary
links are kept.
"""

from dataclasses import dataclass
from pathlib import Path
from urllib.parse import urlsplit
from xml.etree.ElementTree import Element

from markdown import Markdown  # type: ignore[import-untyped]
from markdown.treeprocessors import Treeprocessor  # type: ignore[import-untyped]
from markupsafe import Markup

from shapeshelf.catalogue.model import Catalogue, Protocol
from shapeshelf.pages.addresses import compound_address, protocol_address

MARKDOWN_SUFFIXES = (".md", ".markdown")
SAFE_SCHEMES = ("", "http", "https", "mailto")


@dataclass(frozen=True, slots=True)
class ProtocolView:
    """One protocol and the compounds that say they are used in it."""

    id: str
    title: str
    address: str | None
    """Its page, or its file as it is; ``None`` where the group keeps it elsewhere."""
    compounds: tuple[tuple[str, str], ...]
    """(name, address)."""


def protocol_views(catalogue: Catalogue) -> tuple[ProtocolView, ...]:
    """Return every protocol of the group, in order of id."""
    return tuple(
        ProtocolView(
            id=protocol.id,
            title=protocol.title,
            address=address_of(protocol),
            compounds=tuple(
                (entry.name, compound_address(entry.id))
                for entry in catalogue.entries
                if protocol.id in entry.used_in
            ),
        )
        for _, protocol in sorted(catalogue.protocols.items())
    )


def address_of(protocol: Protocol) -> str | None:
    """Return where the protocol's document stands in the site."""
    if protocol.file is None:
        return None
    if is_markdown(protocol):
        return protocol_address(protocol.id)
    return protocol_address(protocol.id) + Path(protocol.file).name


def is_markdown(protocol: Protocol) -> bool:
    """Tell whether the document is one we can set as a page."""
    return protocol.file is not None and protocol.file.lower().endswith(MARKDOWN_SUFFIXES)


def document_markup(text: str) -> Markup:
    """Return a Markdown document as HTML, with everything in it that is HTML already escaped."""
    reader = Markdown(extensions=["tables", "sane_lists", "def_list", "toc"], output_format="html")
    reader.preprocessors.deregister("html_block")
    reader.inlinePatterns.deregister("html")
    reader.treeprocessors.register(_OrdinaryLinks(reader), "ordinary_links", 0)
    return Markup(reader.convert(text))


class _OrdinaryLinks(Treeprocessor):  # type: ignore[misc]
    """Takes the address off every link and picture that would run a script or fetch from afar."""

    def run(self, root: Element) -> None:
        for element in root.iter():
            for attribute in ("href", "src"):
                address = element.get(attribute)
                if address is not None and not _is_ordinary(address, attribute):
                    del element.attrib[attribute]


def _is_ordinary(address: str, attribute: str) -> bool:
    try:
        parts = urlsplit(address.strip())
    except ValueError:
        return False
    if attribute == "src":
        return not parts.scheme and not parts.netloc
    return parts.scheme.lower() in SAFE_SCHEMES
