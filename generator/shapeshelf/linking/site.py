"""The pages and files that have to do with linking: changes, the desk, notices, indexes."""

from collections import defaultdict
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import partial

from shapeshelf.errors import ShapeshelfError
from shapeshelf.linking.card import card_svg
from shapeshelf.linking.changes import ValueChange
from shapeshelf.linking.citing import Checked, Citation, Finding, Reference
from shapeshelf.linking.desk import desk_sections
from shapeshelf.linking.inventory import inventory
from shapeshelf.linking.published import (
    VALUES_FILE,
    PublishedCompound,
    value_text,
    write_published,
)
from shapeshelf.linking.qr import qr_svg
from shapeshelf.linking.releasing import Present, catalogue_ids
from shapeshelf.linking.table import catalogue_csv
from shapeshelf.pages.addresses import CHANGES, DESK, compound_address, root_from
from shapeshelf.pages.model import SiteFile, SitePage, Standing
from shapeshelf.pages.protocols import address_of
from shapeshelf.pages.rendering import render
from shapeshelf.pages.structure_files import sdf_text
from shapeshelf.report.model import CompoundReport


@dataclass(frozen=True, slots=True)
class Quoting:
    """A protocol that quotes a changed value."""

    title: str
    address: str | None
    place: str
    """``protocols/tb-p01.md:43`` where a link was found, else empty."""


@dataclass(frozen=True, slots=True)
class ChangeView:
    """One line of the page of changes."""

    change: ValueChange
    address: str
    quoting: tuple[Quoting, ...]


def standing_of(present: Present) -> Standing:
    """Return what the compounds' pages tell of their place among the published ones."""
    news: dict[str, dict[str, str]] = defaultdict(dict)
    for change in present.comparison.values:
        news[change.compound][change.anchor] = change.old
    return Standing(
        site_url=present.published.site,
        news=dict(news),
        unreleased=frozenset(present.comparison.added),
    )


def checked_protocols(present: Present) -> list[Checked]:
    """Return every protocol document of the catalogue held against the present values."""
    reference = Reference(present.published)
    root = present.catalogue.root
    files = [item.file for _, item in sorted(present.catalogue.protocols.items()) if item.file]
    checked = []
    for name in dict.fromkeys(files):
        try:
            checked.append(reference.check(root / name))
        except ShapeshelfError as error:
            fault = Finding(root / name, 1, "unread", "", "", str(error))
            checked.append(Checked((), 0, 0, (fault,)))
    return checked


def linking_pages(
    present: Present, protocols: Sequence[Checked], edit_url: str | None
) -> Iterator[SitePage]:
    """Yield the page of changes, the steward's, and a notice for each withdrawn compound.

    ``edit_url`` is the address under which the catalogue's files can be seen, ``None`` if none.
    """
    changes = [_change_view(change, present, protocols) for change in present.comparison.values]
    yield _page(
        CHANGES,
        "Changes",
        "changes.html",
        changes=changes,
        released=present.released,
        added=_named(present, present.comparison.added),
        withdrawn=sorted(present.published.withdrawn.items()),
        drifts=present.drifts,
    )
    sections = desk_sections(present, protocols)
    yield _page(DESK, "State of the catalogue", "desk.html", sections=sections, edit_url=edit_url)
    ids = catalogue_ids(present.catalogue)
    for compound_id, compound in sorted(present.published.withdrawn.items()):
        for one in (compound_id, *compound.formerly):
            if one not in ids:
                yield _notice(one, compound)


def linking_files(present: Present, site_name: str) -> Iterator[SiteFile]:
    """Yield values, tables and indexes, and the small pictures of each compound."""
    published, reports = present.published, present.reports
    yield SiteFile(VALUES_FILE, lambda: write_published(published).encode())
    yield SiteFile("catalogue.csv", partial(catalogue_csv, reports, published.site))
    yield SiteFile("catalogue.sdf", partial(_catalogue_sdf, reports))
    yield SiteFile("objects.inv", partial(inventory, published, site_name))
    for report in reports:
        if report.entry is None:
            continue
        for one in (report.entry.id, *report.entry.formerly):
            address = compound_address(one)
            yield SiteFile(address + "card.svg", partial(card_svg, report))
        if published.site is not None:
            url = published.site + compound_address(report.entry.id)
            yield SiteFile(compound_address(report.entry.id) + "qr.svg", partial(qr_svg, url))


def _catalogue_sdf(reports: Sequence[CompoundReport]) -> bytes:
    return "".join(sdf_text(report) for report in reports).encode()


def _page(address: str, title: str, part: str, **values: object) -> SitePage:
    body = partial(render, part, root=root_from(address), title=title, **values)
    return SitePage(address, title, "", part.removesuffix(".html"), body)


def _notice(compound_id: str, compound: PublishedCompound) -> SitePage:
    values = [
        (anchor, value.of, value_text(value), value.basis)
        for anchor, value in compound.values.items()
    ]
    address = compound_address(compound_id)
    return _page(
        address, compound.name, "withdrawn.html", id=compound_id, compound=compound, values=values
    )


def _change_view(change: ValueChange, present: Present, protocols: Sequence[Checked]) -> ChangeView:
    address = f"{compound_address(change.compound)}#{change.anchor}"
    return ChangeView(change, address, tuple(_quoting(change, present, protocols)))


def _quoting(
    change: ValueChange, present: Present, protocols: Sequence[Checked]
) -> Iterator[Quoting]:
    """Yield the protocols that link to the compound, and those it says it is used in."""
    known = present.catalogue.protocols
    root = present.catalogue.root
    by_file = {root / item.file: key for key, item in known.items() if item.file}
    linked: dict[str, Citation] = {}
    for checked in protocols:
        for item in checked.citations:
            if item.compound == change.compound:
                linked.setdefault(by_file[item.file], item)
    for key in dict.fromkeys((*linked, *change.used_in)):
        if key in known:
            found = linked.get(key)
            place = f"{found.file.relative_to(root).as_posix()}:{found.line}" if found else ""
            yield Quoting(known[key].title, address_of(known[key]), place)


def _named(present: Present, ids: Sequence[str]) -> list[tuple[str, str]]:
    return [(present.published.compounds[one].name, compound_address(one)) for one in ids]
