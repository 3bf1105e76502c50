"""Everything the site holds, each page and file with its address."""

import json
from collections.abc import Iterator, Mapping, Sequence
from functools import partial
from pathlib import Path

from shapeshelf.catalogue.model import Catalogue, Entry
from shapeshelf.pages import addresses
from shapeshelf.pages.comparing import COMPARISON, comparison_json
from shapeshelf.pages.compound import NOWHERE, CompoundView, compound_view, source_view
from shapeshelf.pages.drawings import (
    compound_figures,
    scale_figure,
    shape_figure,
    shape_glyph,
)
from shapeshelf.pages.finding import data_file, finding_files
from shapeshelf.pages.glossary import term_views
from shapeshelf.pages.history import Change, last_changes
from shapeshelf.pages.home import CompoundLine, compound_line, home_view
from shapeshelf.pages.json_ld import json_ld
from shapeshelf.pages.lookup_index import by_name
from shapeshelf.pages.methods import methods_view
from shapeshelf.pages.model import SiteFile, SitePage, Standing
from shapeshelf.pages.protocols import (
    ProtocolView,
    document_markup,
    is_markdown,
    protocol_views,
)
from shapeshelf.pages.rendering import fill, render, templates_dir
from shapeshelf.pages.scripts import site_script
from shapeshelf.pages.shapes import ShapeView, overview, shape_views
from shapeshelf.pages.start import start_view
from shapeshelf.pages.structure_files import sdf_text, xyz_text
from shapeshelf.report.json import report_json
from shapeshelf.report.model import CompoundReport
from shapeshelf.report.revision import data_text, revision

Reports = Sequence[CompoundReport]


def site_pages(
    catalogue: Catalogue, reports: Reports, site_name: str, standing: Standing = NOWHERE
) -> Iterator[SitePage]:
    """Yield every generated page; bodies are rendered when they are asked for."""
    shapes = shape_views(reports, catalogue.sources)
    protocols = protocol_views(catalogue)
    changes = last_changes(catalogue.root)
    yield _page("", site_name, "home.html", home=home_view(reports, shapes, changes))
    yield from _finding_pages(catalogue, reports)
    yield _page(addresses.COMPOUNDS, "All compounds", "compounds.html", lines=_lines(reports))
    yield _page(
        addresses.SHAPES, "Shapes", "shapes.html", overview=overview(reports), shapes=shapes
    )
    yield from (_shape_page(shape) for shape in shapes)
    yield _page(addresses.SOURCES, "Sources", "sources.html", sources=_sources(catalogue))
    yield _page(addresses.PROTOCOLS, "Protocols", "protocols.html", protocols=protocols)
    yield from _protocol_pages(catalogue, protocols)
    for report in reports:
        yield from _compound_pages(report, catalogue, changes, standing)


def handwritten_pages() -> Iterator[tuple[str, str]]:
    """Yield each hand-written page: its path, ``methods.md``, and its Markdown.

    A page may import parts and print values of ``methods``, as every part does.
    """
    folder = templates_dir() / "pages"
    for path in sorted(folder.rglob("*.md")):
        name = path.relative_to(folder).as_posix()
        root = addresses.root_from(name.removesuffix(".md") + "/")
        yield name, fill(path.read_text("utf-8"), root=root, methods=methods_view())


def site_files(
    catalogue: Catalogue, reports: Reports, for_files: bool = False
) -> Iterator[SiteFile]:
    """Yield every generated file: data, structures, indexes, the protocols' own documents.

    ``for_files`` is for a site that is opened from a folder, without a server.
    """
    yield from finding_files(catalogue, reports, for_files)
    yield SiteFile("js/site.js", site_script)
    yield SiteFile("catalogue.json", partial(_catalogue_json, reports))
    for report in reports:
        for compound_id in _all_ids(report):
            yield from _compound_files(addresses.compound_address(compound_id), report)
        yield _comparison_file(catalogue, report, for_files)
    for protocol in catalogue.protocols.values():
        if protocol.file is not None and not is_markdown(protocol):
            source = catalogue.root / protocol.file
            address = addresses.protocol_address(protocol.id) + source.name
            yield SiteFile(address, source.read_bytes)


def _comparison_file(catalogue: Catalogue, report: CompoundReport, for_files: bool) -> SiteFile:
    name = addresses.compound_address(_entry(report).id) + COMPARISON
    return data_file(name, partial(comparison_json, report, catalogue.sources), for_files)


def _finding_pages(catalogue: Catalogue, reports: Reports) -> Iterator[SitePage]:
    """Yield the pages one finds and learns by: lookup, comparison, first hour, glossary."""
    yield _page(addresses.LOOKUP, "Lookup", "lookup.html")
    yield _page(addresses.COMPARE, "Compare", "compare.html")
    yield _page(addresses.START, "Start here", "start.html", start=start_view(catalogue, reports))
    yield _page(addresses.GLOSSARY, "Glossary", "glossary.html", terms=term_views())


def data_json(report: CompoundReport) -> bytes:
    """Return the contract's JSON of one compound, the entry's fields beside it."""
    return data_text(report).encode()


def _page(address: str, title: str, part: str, **values: object) -> SitePage:
    kind = part.removesuffix(".html")
    root = addresses.root_from(address)
    body = partial(render, part, root=root, title=title, glyph=shape_glyph, **values)
    return SitePage(address, title, "", kind, body)


def _shape_page(shape: ShapeView) -> SitePage:
    title = shape.name[:1].upper() + shape.name[1:]
    figures = {
        "figure": shape_figure(shape.name),
        "scale": scale_figure(shape.name, shape.scale, shape.ideals),
    }
    return _page(shape.address, title, "shape.html", shape=shape, **figures)


def _compound_pages(
    report: CompoundReport,
    catalogue: Catalogue,
    changes: Mapping[Path, Change],
    standing: Standing,
) -> Iterator[SitePage]:
    entry = _entry(report)
    address = addresses.compound_address(entry.id)
    mark = revision(report)
    view = compound_view(report, catalogue, mark, changes.get(entry.file.resolve()), standing)
    body = partial(_compound_html, report, view)
    yield SitePage(address, entry.name, view.description, "compound", body, revision=mark)
    for earlier in entry.formerly:
        yield _moved_page(addresses.compound_address(earlier), address, entry)


def _compound_html(report: CompoundReport, view: CompoundView) -> str:
    figures = compound_figures(report)
    root = addresses.root_from(view.address)
    return render(
        "compound.html",
        root=root,
        compound=view,
        figures=figures,
        glyph=shape_glyph,
        json_ld=json_ld(report, view.url, view.description),
    )


def _moved_page(earlier: str, address: str, entry: Entry) -> SitePage:
    body = partial(
        render,
        "moved.html",
        root=addresses.root_from(earlier),
        address=address,
        name=entry.name,
    )
    return SitePage(earlier, entry.name, "", "moved", body, moved_to=address)


def _protocol_pages(catalogue: Catalogue, views: Sequence[ProtocolView]) -> Iterator[SitePage]:
    for view in views:
        protocol = catalogue.protocols[view.id]
        if protocol.file is not None and is_markdown(protocol):
            address = addresses.protocol_address(view.id)
            text = (catalogue.root / protocol.file).read_text("utf-8")
            yield _page(
                address, view.title, "protocol.html", protocol=view, document=document_markup(text)
            )


def _compound_files(address: str, report: CompoundReport) -> Iterator[SiteFile]:
    yield SiteFile(address + "data.json", partial(data_json, report))
    yield SiteFile(address + "structure.xyz", lambda: xyz_text(report).encode())
    yield SiteFile(address + "structure.sdf", lambda: sdf_text(report).encode())


def _catalogue_json(reports: Reports) -> bytes:
    rows = [report_json(report) for report in reports]
    return json.dumps({"schema": 1, "compounds": rows}, ensure_ascii=False).encode()


def _sources(catalogue: Catalogue) -> list[tuple[object, list[tuple[str, str]]]]:
    """Return every source with the compounds that cite it."""
    citing: dict[str, dict[str, str]] = {key: {} for key in sorted(catalogue.sources)}
    for entry in catalogue.entries:
        for item in entry.measured:
            citing[item.source][entry.name] = addresses.compound_address(entry.id)
    return [
        (source_view(catalogue.sources[key]), list(names.items())) for key, names in citing.items()
    ]


def _lines(reports: Reports) -> list[CompoundLine]:
    return [compound_line(report, report.shape or "") for report in by_name(reports)]


def _all_ids(report: CompoundReport) -> tuple[str, ...]:
    entry = _entry(report)
    return (entry.id, *entry.formerly)


def _entry(report: CompoundReport) -> Entry:
    if report.entry is None:
        raise ValueError(f"{report.name}: only a catalogue entry has a page")
    return report.entry
