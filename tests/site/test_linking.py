"""Addresses, notices, marks of change and links to copy, in whole builds and in a browser."""

import json
from html.parser import HTMLParser
from pathlib import Path
from urllib.parse import unquote, urljoin, urlsplit
from xml.etree import ElementTree

import pytest
from pyld import jsonld
from rdkit import Chem
from sphinx.util.inventory import InventoryFile

from shapeshelf.linking.citing import Reference
from shapeshelf.linking.published import read_published
from shapeshelf.linking.releasing import release
from shapeshelf.plugin import build_site

SITE_URL = "https://shapes.example.org/bench/"
CONFIG = f"""\
site_name: Five on a bench
site_url: {SITE_URL}
repo_url: https://forge.example.org/bench/
edit_uri: blob/main/compounds/
docs_dir: compounds
theme: {{name: material, font: false}}
plugins: [shapeshelf]
"""
SF4 = """\
id: sf4
formerly: [sulfur-four]
name: Sulfur tetrafluoride
structure: FS(F)(F)F
hazards: [H330]
used-in: [p1]
measured:
  - {quantity: angle, of: F(ax)-S-F(ax), value: 173.1, unit: degree, uncertainty: 0.5, source: book}
  - {quantity: frequency, of: S-F stretch, value: 892, unit: 1/cm, source: book}
"""
ENTRIES = {
    "sf4.yml": SF4,
    "water.yml": "id: water\nname: Water\nstructure: O\n",
    "twin.yml": "id: twin\nname: Oxidane\nstructure: '[H]O[H]'\n",
    "azide.yml": "id: azide\nname: Trimethylsilyl azide\nstructure: C[Si](C)(C)N=[N+]=[N-]\n",
    "carbonyl.yml": (
        "id: carbonyl\nname: Tetracarbonylnickel\n"
        "structure: '[Ni](<-[C-]#[O+])(<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]'\n"
    ),
    "gone.yml": "id: gone\nformerly: [long-gone]\nname: Gone soon\nstructure: S\n",
    "sources.yml": "book: {title: A book, authors: A. Author, year: 1991, kind: recalled}\n",
    "protocols.yml": "p1: {title: Gas cell, file: p1.md}\np2: {title: Trap, file: p2.txt}\n",
    "p1.md": "# Gas cell\n\nThe [173.1°](../../compounds/sf4/#angles) of a see-saw.\n",
    "p2.txt": f"Trap\n\n{SITE_URL}compounds/water/ and {SITE_URL}compounds/nothing/\n",
}
SCHEMA = "https://schema.org/"


class Page(HTMLParser):
    """Links, anchors, data scripts and text of a page."""

    def __init__(self, html: str) -> None:
        super().__init__()
        self.links: list[str] = []
        self.ids: list[str] = []
        self.data_scripts: list[str] = []
        self.text = ""
        self._is_data = False
        self.feed(html)

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        held = dict(attrs)
        self.text += " "
        self.ids += [held["id"]] if held.get("id") else []
        self.links += [value for key in ("href", "src", "action") if (value := held.get(key))]
        self._is_data = held.get("type") == "application/ld+json"

    def handle_data(self, data: str) -> None:
        if self._is_data:
            self.data_scripts.append(data)
        self.text += data
        self._is_data = False


@pytest.fixture(scope="module")
def changed(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """A site, built after a release, a changed value, a compound added and one withdrawn."""
    folder = tmp_path_factory.mktemp("changed")
    (folder / "mkdocs.yml").write_text(CONFIG)
    root = folder / "compounds"
    root.mkdir()
    for name, text in ENTRIES.items():
        (root / name).write_text(text, "utf-8")
    release(root)
    (root / "gone.yml").unlink()
    (root / "sf4.yml").write_text(SF4.replace("173.1", "171.0"))
    (root / "new.yml").write_text("id: new\nname: Ammonia\nstructure: N\n")
    build_site(folder / "mkdocs.yml")
    return folder / "site"


@pytest.fixture(scope="module")
def pages(changed: Path) -> dict[str, Page]:
    return {
        path.relative_to(changed).as_posix(): Page(path.read_text("utf-8"))
        for path in changed.rglob("*.html")
    }


def test_every_link_resolves_anchors_included(changed: Path, pages: dict[str, Page]) -> None:
    """On every page, and no page has an anchor twice."""
    broken = [
        (name, link)
        for name, page in pages.items()
        for link in page.links
        if not _resolves(changed, name, link, pages)
    ]
    assert broken == []
    assert [name for name, page in pages.items() if len(set(page.ids)) != len(page.ids)] == []


def test_every_published_anchor_is_on_its_page(changed: Path, pages: dict[str, Page]) -> None:
    """What ``cited`` and the inventory promise, the pages keep."""
    published = read_published(changed / "values.json")
    assert set(published.compounds) == {"sf4", "water", "twin", "azide", "carbonyl", "new"}
    for compound_id, compound in published.compounds.items():
        promised = {*compound.anchors, *compound.values}
        assert promised <= set(pages[f"compounds/{compound_id}/index.html"].ids)


def test_a_changed_value_is_listed_and_marked(pages: dict[str, Page]) -> None:
    """Old, new, reason, and the protocol that quotes it with its line."""
    listed = " ".join(pages["changes/index.html"].text.split())
    for words in ("173.1° ± 0.5°", "171° ± 0.5°", "measurement", "Gas cell p1.md:3", "Ammonia"):
        assert words in listed
    assert "new, was 173.1° ± 0.5°" in pages["compounds/sf4/index.html"].text
    assert "new, was" not in pages["compounds/water/index.html"].text
    assert "not yet" in pages["compounds/new/index.html"].text


def test_a_withdrawn_compound_keeps_its_page_as_a_notice(pages: dict[str, Page]) -> None:
    """Under every id it had, with its last values at their anchors."""
    for name in ("gone", "long-gone"):
        page = pages[f"compounds/{name}/index.html"]
        assert "no longer in the catalogue" in page.text
        assert {"angles", "angle-h-s-h", "dipole"} <= set(page.ids)


def test_the_desk_names_file_and_field_of_each_point(pages: dict[str, Page]) -> None:
    """Each kind of point once, with a link to the file's line in the repository."""
    page = pages["catalogue/index.html"]
    said = " ".join(page.text.split())
    for words in (
        "azide; rule from Bretherick's Handbook of Reactive Chemical Hazards (recalled) "
        "azide.yml:1 hazards",
        "is that of twin: XLYOFNOQVPJJNP-UHFFFAOYSA-N water.yml:3 structure",
        "nothing measured is given water.yml:1 measured",
        "no calculation is on record sf4.yml:4 structure",
        "2 measured values sf4.yml:8 measured[0].source",
        "no protocol names it or links to it twin.yml:1 used-in",
        "there is no compound nothing p2.txt:3 gone",
        "173.1°: the page has F(ax)-S-F(ax) 171° ± 0.5°",
        "p1.md:3 value",
    ):
        assert words in said
    assert "it or links to it water.yml" not in said
    assert "https://forge.example.org/bench/blob/main/compounds/azide.yml#L1" in page.links


def test_the_json_ld_of_each_page_parses_as_such(pages: dict[str, Page]) -> None:
    """By a JSON-LD processor, with the vocabulary put in its place: tests ask no network."""
    (data,) = pages["compounds/sf4/index.html"].data_scripts
    document = json.loads(data)
    assert document["@context"] == "https://schema.org"
    (expanded,) = jsonld.expand(document | {"@context": {"@vocab": SCHEMA}})
    assert expanded["@id"] == SITE_URL + "compounds/sf4/"
    assert expanded["@type"] == [SCHEMA + "MolecularEntity"]
    assert expanded[SCHEMA + "molecularFormula"] == [{"@value": "SF4"}]


def test_the_catalogue_sdf_reads_back_with_the_same_keys(changed: Path) -> None:
    """By RDKit as it comes, metal carbonyls included."""
    supplier = Chem.SDMolSupplier(str(changed / "catalogue.sdf"), removeHs=False)
    molecules = {molecule.GetProp("ID"): molecule for molecule in supplier}
    data = json.loads((changed / "catalogue.json").read_text("utf-8"))["compounds"]
    assert len(molecules) == len(data) == 6
    for item in data:
        assert Chem.MolToInchiKey(molecules[item["id"]]) == item["inchikey"]


def test_the_inventory_leads_to_anchors_that_exist(changed: Path, pages: dict[str, Page]) -> None:
    """Every entry of it, read by Sphinx."""
    with (changed / "objects.inv").open("rb") as file:
        labels = InventoryFile.load(file, SITE_URL, urljoin)["std:label"]
    assert len(labels) > 100
    for label in labels.values():
        assert _resolves(changed, "index.html", label.uri.removeprefix(SITE_URL), pages)


def test_cards_and_codes_stand_alone(changed: Path) -> None:
    """Well-formed SVG that fetches nothing; a card at the earlier address too."""
    for name in ("sf4/card.svg", "sulfur-four/card.svg", "azide/card.svg", "sf4/qr.svg"):
        svg = ElementTree.parse(changed / "compounds" / name).getroot()
        assert svg.tag == "{http://www.w3.org/2000/svg}svg"
        values = [value for element in svg.iter() for value in element.attrib.values()]
        assert not any("//" in value or value.startswith("data:") for value in values)


@pytest.mark.parametrize("has_clipboard", [True, False])
def test_the_button_copies_links_that_hold(
    changed: Path, browser, serve, tmp_path: Path, has_clipboard: bool
) -> None:
    """In three forms, by the clipboard or without one; ``cited`` finds each right."""
    page = browser.new_page()
    page.add_init_script(
        "window.copied = [];"
        "Object.defineProperty(navigator, 'clipboard', {value: "
        + (
            "{writeText: async (text) => { window.copied.push(text); }}"
            if has_clipboard
            else "null"
        )
        + "}); document.execCommand = () => {"
        " window.copied.push(document.activeElement.value); return true; };"
    )
    page.goto(serve(changed) + "compounds/sf4/")
    for form in ("Markdown", "HTML", "Text"):
        page.click("#angle-f-ax-s-f-ax summary")
        page.click(f"#angle-f-ax-s-f-ax button:text-is('{form}')")
        assert page.wait_for_selector(f"text={form} link copied", state="attached")
    markdown, html, text = page.evaluate("window.copied")
    page.close()
    address = SITE_URL + "compounds/sf4/#angle-f-ax-s-f-ax"
    said = "Sulfur tetrafluoride, F(ax)-S-F(ax): 171.0° ± 0.5° (measured)"
    assert markdown == f"[{said}]({address})"
    assert html == f'<a href="{address}">{said}</a>'
    assert text == f"{said}, {address}"
    reference = Reference(read_published(changed / "values.json"))
    for ending, form in ((".md", markdown), (".html", html), (".txt", text)):
        path = tmp_path / f"a{ending}"
        path.write_text(form, "utf-8")
        checked = reference.check(path)
        assert (checked.links, checked.numbers, checked.findings) == (1, 1, ())


def test_an_earlier_address_keeps_the_anchor(changed: Path, browser, serve) -> None:
    page = browser.new_page()
    root = serve(changed)
    page.goto(root + "compounds/sulfur-four/#angle-f-ax-s-f-ax")
    page.wait_for_url(root + "compounds/sf4/#angle-f-ax-s-f-ax")
    page.close()


def _resolves(site: Path, name: str, link: str, pages: dict[str, Page]) -> bool:
    link = link.replace(urlsplit(SITE_URL).path, "/", 1) if link.startswith("/") else link
    parts = urlsplit(link)
    if parts.scheme in ("http", "https", "mailto", "data"):
        return True
    target = urlsplit(urljoin("/" + name, link))
    path = site / unquote(target.path).lstrip("/")
    path = path / "index.html" if path.is_dir() else path
    if not path.is_file():
        return False
    found = pages.get(path.relative_to(site).as_posix())
    return not target.fragment or found is None or unquote(target.fragment) in found.ids
