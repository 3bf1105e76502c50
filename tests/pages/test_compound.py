import json
from dataclasses import replace
from html.parser import HTMLParser
from pathlib import Path

import pytest

from shapeshelf.catalogue.model import Catalogue, Protocol, Source
from shapeshelf.pages.compound import compound_view
from shapeshelf.pages.properties import reason_markup, with_inverse
from shapeshelf.pages.site import site_files, site_pages
from shapeshelf.report.model import Band, CalculatedVibrations, CompoundReport

ANCHORS = ("shape", "angles", "polarity", "hybridisation", "symmetry", "sources", "centre-S1")
"""The contract's fixed anchors on a compound's page."""

HOSTILE = "\"'><script>alert(1)</script><img src=x onerror=alert(2)>{{7*7}}</title>&amp;"


DATA = ("application/ld+json", "application/json")
"""Script elements of these types hold data; no browser runs them."""


class Reader(HTMLParser):
    """Collects tags, their attributes, and the text between them."""

    def __init__(self, html: str) -> None:
        super().__init__()
        self.tags: list[tuple[str, dict[str, str | None]]] = []
        self.text = ""
        self.feed(html)

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        self.tags.append((tag, dict(attrs)))

    def handle_data(self, data: str) -> None:
        self.text += data

    @property
    def is_led_astray(self) -> bool:
        handlers = [name for _, attrs in self.tags for name in attrs if name.startswith("on")]
        foreign = [
            tag
            for tag, attrs in self.tags
            if tag in ("script", "img", "iframe") and attrs.get("type") not in DATA
        ]
        return bool(handlers) or bool(foreign)

    @property
    def ids(self) -> list[str]:
        return [attrs["id"] for _, attrs in self.tags if attrs.get("id")]


@pytest.fixture
def page(sf4: CompoundReport, catalogue_of) -> Reader:
    return Reader(_pages(sf4, catalogue_of)["compounds/sf4/"])


def test_the_fixed_anchors_stand_once_each(page: Reader) -> None:
    """Protocols link to them."""
    for anchor in ANCHORS:
        assert page.ids.count(anchor) == 1
    assert len(page.ids) == len(set(page.ids))


def test_what_is_asked_most_stands_before_the_details(page: Reader) -> None:
    """Name, shape, angle with its ±, polarity, point group, cautions, then the sections."""
    wanted = ["Sulfur tetrafluoride", "see-saw", "173.1°", "±\xa00.5°", "polar", "Fatal if inhaled"]
    places = [page.text.index(text) for text in wanted]
    assert places == sorted(places)
    assert places[-1] < page.text.index("Arrangement")


def test_a_recalled_value_says_so(page: Reader) -> None:
    """At the value and at its source."""
    assert page.text.count("recalled") >= 3


def test_tables_have_captions_and_scopes(page: Reader) -> None:
    """So that a screen reader can name rows and columns."""
    tags = [tag for tag, _ in page.tags]
    assert tags.count("caption") == tags.count("table") > 0
    assert all("scope" in attrs for tag, attrs in page.tags if tag == "th")


def test_an_earlier_address_leads_to_the_present_one(sf4: CompoundReport, catalogue_of) -> None:
    """And its data and structure files stay where they were."""
    catalogue = catalogue_of(sf4)
    pages = {page.address: page for page in site_pages(catalogue, [sf4], "Bench")}
    files = {file.address: file for file in site_files(catalogue, [sf4])}
    assert pages["compounds/sulfur-four/"].moved_to == "compounds/sf4/"
    assert (
        files["compounds/sulfur-four/data.json"].content()
        == files["compounds/sf4/data.json"].content()
    )


def test_revision_follows_the_data(sf4: CompoundReport, renamed, catalogue_of) -> None:
    """The same data give the same mark, other data another."""
    first, again = (_revision(sf4, catalogue_of) for _ in range(2))
    changed = _revision(renamed(sf4, notes="other"), catalogue_of)
    assert first == again != changed


@pytest.mark.parametrize(
    "field", ["name", "also", "cas", "code", "kept", "owner", "tags", "start_here", "notes"]
)
def test_nothing_from_an_entry_becomes_markup(
    field: str, sf4: CompoundReport, renamed, catalogue_of
) -> None:
    """Hostile text in any field shows as text, and adds no element and no handler."""
    value = (HOSTILE,) if field in ("also", "tags") else HOSTILE
    pages = [Reader(html) for html in _pages(renamed(sf4, **{field: value}), catalogue_of).values()]
    assert any(HOSTILE in page.text for page in pages)
    assert not any(page.is_led_astray for page in pages)


def test_nothing_from_a_source_or_protocol_becomes_markup(
    sf4: CompoundReport, sources: dict[str, Source]
) -> None:
    """Titles, authors, places, notes and identifiers of sources, titles of protocols."""
    assert sf4.entry is not None
    words = dict.fromkeys(("title", "authors", "where", "note", "doi", "isbn"), HOSTILE)
    catalogue = Catalogue(
        Path("nowhere"),
        (sf4.entry,),
        {"handbook": replace(sources["handbook"], **words)},
        {"p1": Protocol("p1", HOSTILE)},
    )
    pages = [Reader(page.html()) for page in site_pages(catalogue, [sf4], HOSTILE)]
    assert any(HOSTILE in page.text for page in pages)
    assert not any(page.is_led_astray for page in pages)


def test_data_survive_hostile_text(sf4: CompoundReport, renamed, catalogue_of) -> None:
    """JSON gives back exactly what the entry says."""
    hostile = renamed(sf4, notes=HOSTILE)
    files = {file.address: file for file in site_files(catalogue_of(hostile), [hostile])}
    assert json.loads(files["compounds/sf4/data.json"].content())["notes"] == HOSTILE


def _pages(report: CompoundReport, catalogue_of) -> dict[str, str]:
    pages = site_pages(catalogue_of(report), [report], "Bench")
    return {page.address: page.html() for page in pages}


def _revision(report: CompoundReport, catalogue_of) -> str | None:
    pages = {page.address: page for page in site_pages(catalogue_of(report), [report], "Bench")}
    return pages["compounds/sf4/"].revision


def test_description_is_one_plain_sentence(sf4: CompoundReport, catalogue_of) -> None:
    """For the head of the page."""
    view = compound_view(sf4, catalogue_of(sf4), "0")
    assert view.description == "Sulfur tetrafluoride (SF₄): see-saw, C2v."


def test_telling_centres_come_before_plain_carbon(sf4: CompoundReport, catalogue_of) -> None:
    """A phosphorus is asked for before the carbons that come before it in the SMILES."""
    (first,) = sf4.centres
    kinds = [("C", 0), ("C", 0), ("C", 1), ("P", 1)]
    centres = tuple(
        replace(
            first,
            centre=replace(
                first.centre, atom=atom, element=element, label=f"{element}{atom}", lone_pairs=pairs
            ),
            equivalent=(atom,),
        )
        for atom, (element, pairs) in enumerate(kinds)
    )
    view = compound_view(replace(sf4, centres=centres, shape=None), catalogue_of(sf4), "0")
    assert [centre.labels[0] for centre in view.key_centres] == ["C2", "P3", "C0", "C1"]


@pytest.mark.parametrize(
    ("label", "counted_as"),
    [
        ("C4^3", "C4"),
        ("C3^2", "C3"),
        ("C5^3", "C5^2"),
        ("S6^5", "S6"),
        ("S3^5", "S3"),
        ("C2", "C2"),
        ("Cinf", "Cinf"),
        ("sigma_h", "sigma_h"),
        ("E", "E"),
    ],
)
def test_an_operation_is_counted_with_its_inverse(label: str, counted_as: str) -> None:
    """Character tables write 8 C3 and 6 C4 for the octahedron, not 4 C3, 4 C3^2, 3 C4, 3 C4^3
    (P. Atkins and J. de Paula, Physical Chemistry, recalled from memory)."""
    assert with_inverse(label) == counted_as


@pytest.mark.parametrize(
    ("reason", "symbols"),
    [
        ("Symmetry C2v allows a dipole moment along the C2 axis.", ["C2v", "C2"]),
        ("The C2 axes across the C5 axis (D5h) forbid a dipole moment", ["C2", "C5", "D5h"]),
        ("The inversion centre (Dinfh) forbids a dipole moment", ["D∞h"]),
        ("Symmetry Oh forbids it: it cannot lie along several C3 axes.", ["Oh", "C3"]),
        ("The negative end is on the side of O1 and C2 (F).", []),
    ],
)
def test_symbols_of_symmetry_are_set_in_a_reason(reason: str, symbols: list[str]) -> None:
    """Groups and axes have their subscripts, atoms stay as they are, words are not changed."""
    page = Reader(str(reason_markup(reason)))
    assert page.text.replace("∞", "inf") == reason
    groups = str(reason_markup(reason)).split('class="pg"')[1:]
    assert [Reader("<b" + group.split("</span>")[0]).text for group in groups] == symbols


def test_calculated_bands_are_drawn_where_on_record(sf4: CompoundReport, catalogue_of) -> None:
    """With the method below, and no picture without a record."""
    vibrations = CalculatedVibrations(
        "a method", (Band(730.0, 200.0, "B2", 1, 0.97), Band(890.0, 160.0, "A1", 1, 0.1))
    )
    with_record = _pages(replace(sf4, frequencies=vibrations), catalogue_of)["compounds/sf4/"]
    assert "fig-infrared" in with_record
    assert "a method, harmonic, unscaled" in with_record
    table = Reader(with_record).text.partition("Calculated vibrations")[2]
    assert table.index("bend or torsion") < table.index("730") < table.index("stretch")
    assert "fig-infrared" not in _pages(sf4, catalogue_of)["compounds/sf4/"]
