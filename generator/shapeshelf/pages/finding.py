"""Everything the lookup reads: the two index files, comparison data, definitions of terms."""

import re
from collections import Counter
from collections.abc import Callable, Iterator, Sequence
from functools import cache, partial

from shapeshelf.catalogue.model import Catalogue
from shapeshelf.pages import addresses
from shapeshelf.pages.drawings import shape_glyph
from shapeshelf.pages.glossary import definitions_json, term_views
from shapeshelf.pages.lookup_index import (
    FACETS,
    INDEX,
    Entry,
    as_script,
    lookup_facets,
    lookup_index,
    lookup_rows,
    shapes_held,
)
from shapeshelf.pages.lookup_rows import LookupRow, group_words
from shapeshelf.pages.model import SiteFile
from shapeshelf.pages.protocols import address_of
from shapeshelf.pages.rendering import templates_dir
from shapeshelf.pages.shape_notes import notations
from shapeshelf.reference.shapes import SHAPES
from shapeshelf.report.model import CompoundReport

GENERATED = (
    ("Start here", addresses.START, ("first week", "newcomer", "introduction")),
    ("Lookup", addresses.LOOKUP, ("search", "filter", "ask by observation")),
    ("Compare compounds", addresses.COMPARE, ("side by side", "comparison")),
    ("Shapes", addresses.SHAPES, ("overview of shapes",)),
    ("All compounds", addresses.COMPOUNDS, ("list",)),
    ("Sources", addresses.SOURCES, ("literature", "references")),
    ("Protocols", addresses.PROTOCOLS, ()),
    ("Glossary", addresses.GLOSSARY, ("terms", "definitions")),
)
_HEADING = re.compile(r"^# +(.+)$", re.MULTILINE)


def finding_files(
    catalogue: Catalogue, reports: Sequence[CompoundReport], for_files: bool = False
) -> Iterator[SiteFile]:
    """Yield the data that scripts of the site read.

    With ``for_files`` each is a script that hands its data over, because a page opened as a
    file may not fetch another file.
    """
    rows = cache(partial(lookup_rows, reports))
    yield data_file(INDEX, lambda: _index(catalogue, reports, rows()), for_files)
    yield data_file(FACETS, lambda: lookup_facets(rows()), for_files)
    yield data_file("glossary", definitions_json, for_files)


def data_file(name: str, content: Callable[[], bytes], for_files: bool) -> SiteFile:
    """Return the file ``NAME.json``, or ``NAME.js`` that hands the same data over."""
    if for_files:
        return SiteFile(f"{name}.js", lambda: as_script(name, content()))
    return SiteFile(f"{name}.json", content)


def entries(catalogue: Catalogue, reports: Sequence[CompoundReport]) -> list[Entry]:
    """Return all that the field finds beside compounds: shapes, groups, terms, pages, protocols."""
    return [
        *_shape_entries(reports),
        *_group_entries(reports),
        *_term_entries(),
        *_page_entries(),
        *_protocol_entries(catalogue),
    ]


def _index(
    catalogue: Catalogue, reports: Sequence[CompoundReport], rows: Sequence[LookupRow]
) -> bytes:
    held = {row.glyph for row in rows if row.glyph} | {known.shape for known in SHAPES.values()}
    glyphs = {shape: str(shape_glyph(shape)) for shape in sorted(held)}
    return lookup_index(rows, entries(catalogue, reports), glyphs)


def _shape_entries(reports: Sequence[CompoundReport]) -> list[Entry]:
    counted = Counter(shape for report in reports for shape in shapes_held(report))
    names = dict.fromkeys([*(known.shape for known in SHAPES.values()), *sorted(counted)])
    symbols = {
        name: [v.polyhedral_symbol for v in SHAPES.values() if v.shape == name] for name in names
    }
    return [
        _entry(
            "shape",
            name,
            addresses.shape_address(name),
            [*(symbol for symbol in dict.fromkeys(symbols[name]) if symbol), *notations(name)],
            _compounds(counted[name]),
        )
        for name in names
    ]


def _group_entries(reports: Sequence[CompoundReport]) -> list[Entry]:
    counted = Counter(report.point_group for report in reports)
    return [
        _entry(
            "group",
            group_words(group),
            f"{addresses.LOOKUP}?group={group}",
            [group],
            _compounds(count),
        )
        for group, count in sorted(counted.items())
    ]


def _term_entries() -> list[Entry]:
    return [
        _entry("term", view.name, f"{addresses.GLOSSARY}#{view.anchor}", view.also, view.text)
        for view in term_views()
    ]


def _page_entries() -> list[Entry]:
    folder = templates_dir() / "pages"
    written = []
    for path in sorted(folder.rglob("*.md")):
        heading = _HEADING.search(path.read_text("utf-8"))
        address = path.relative_to(folder).with_suffix("").as_posix().removesuffix("index")
        name = heading.group(1) if heading else address
        written.append((name, f"{address.rstrip('/')}/", ()))
    return [_entry("page", name, address, also) for name, address, also in (*GENERATED, *written)]


def _protocol_entries(catalogue: Catalogue) -> list[Entry]:
    found = ((protocol, address_of(protocol)) for protocol in catalogue.protocols.values())
    return [
        _entry("protocol", protocol.title, address, [protocol.id])
        for protocol, address in found
        if address
    ]


def _entry(kind: str, name: str, address: str, also: Sequence[str] = (), note: str = "") -> Entry:
    return {"kind": kind, "name": name, "address": address, "also": list(also), "note": note}


def _compounds(count: int) -> str:
    return "1 compound" if count == 1 else f"{count} compounds"
