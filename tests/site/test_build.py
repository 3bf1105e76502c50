"""Whole builds of a three-compound catalogue: what stands where, and what a mistake leaves."""

import json
from html.parser import HTMLParser
from pathlib import Path
from urllib.parse import unquote, urljoin, urlsplit

import pytest
from mkdocs.exceptions import Abort

from shapeshelf import plugin
from shapeshelf.errors import CatalogueError, UsageError
from shapeshelf.pages.staging import Staging, swap

ADDRESSES = (
    "index.html",
    "lookup/index.html",
    "compounds/index.html",
    "compounds/sf4/index.html",
    "compounds/sf4/data.json",
    "compounds/sf4/structure.xyz",
    "compounds/sf4/structure.sdf",
    "compounds/water/index.html",
    "compounds/nitrate/index.html",
    "shapes/index.html",
    "shapes/see-saw/index.html",
    "sources/index.html",
    "methods/index.html",
    "protocols/p1/index.html",
    "catalogue.json",
)


class Links(HTMLParser):
    """Every address a page refers to, and every anchor it offers."""

    def __init__(self, html: str) -> None:
        super().__init__()
        self.links: list[str] = []
        self.anchors: set[str] = set()
        self.feed(html)

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        held = dict(attrs)
        if held.get("id"):
            self.anchors.add(str(held["id"]))
        self.links += [value for key in ("href", "src", "action") if (value := held.get(key))]


@pytest.mark.parametrize("address", ADDRESSES)
def test_the_promised_addresses_are_there(three: Path, address: str) -> None:
    """Section 4 of the contract, as far as it goes yet."""
    assert (three / address).stat().st_size > 0


def test_every_link_and_anchor_resolves(three: Path) -> None:
    """From every page, within the site."""
    pages = {path: Links(path.read_text("utf-8")) for path in three.rglob("*.html")}
    broken = [
        f"{path.relative_to(three)}: {link}"
        for path, found in pages.items()
        for link in found.links
        if not _resolves(three, path, link, pages)
    ]
    assert broken == []


def test_nothing_is_loaded_from_another_host(three: Path) -> None:
    """No src, and no style sheet or script, names a host."""
    for path in three.rglob("*.html"):
        html = path.read_text("utf-8")
        assert 'src="http' not in html
        assert 'stylesheet" href="http' not in html
    css = (three / "css/site.css").read_text("utf-8")
    assert "@import" not in css
    assert "url(http" not in css.replace('"', "").replace("'", "")


def test_no_file_of_the_catalogue_itself_is_published(three: Path) -> None:
    """Entries are the group's working files."""
    assert list(three.rglob("*.yml")) == []
    assert {path.suffix for path in three.rglob("*") if path.is_file()} <= {
        ".html",
        ".css",
        ".js",
        ".json",
        ".svg",
        ".xyz",
        ".sdf",
        ".xml",
        ".gz",
        ".csv",
        ".inv",
    }


def test_data_carry_the_entry_beside_the_contract(three: Path) -> None:
    """Shape and angle from the chemistry, code and hazards from the entry."""
    data = json.loads((three / "compounds/sf4/data.json").read_text("utf-8"))
    assert data["shape"] == "see-saw"
    assert (data["cas"], data["code"], data["hazards"]) == ("7783-60-0", "TB-017", ["H330"])
    angles = {angle["of"]: angle for angle in data["centres"][0]["angles"]}
    assert angles["F(ax)-S-F(ax)"]["measured"] == 173.1


def test_a_mistake_prints_its_line_and_leaves_the_last_good_site(bench: Path, rebuilt) -> None:
    """Exit status 1, the old site byte for byte, nothing half-built beside it."""
    rebuilt(bench)
    before = _content(bench / "site")
    (bench / "compounds/water.yml").write_text("id: water\nname: Water\nstructre: O\n")
    with pytest.raises(Abort, match=r"water\.yml:3: structre: ") as stopped:
        rebuilt(bench)
    assert stopped.value.exit_code == 1
    assert _content(bench / "site") == before
    assert sorted(path.name for path in bench.iterdir()) == ["compounds", "mkdocs.yml", "site"]


def test_a_new_build_takes_the_place_of_the_old_one(bench: Path, rebuilt) -> None:
    """A compound that is gone from the catalogue is gone from the site."""
    rebuilt(bench)
    (bench / "compounds/water.yml").unlink()
    rebuilt(bench)
    assert not (bench / "site/compounds/water").exists()
    assert (bench / "site/compounds/sf4/index.html").exists()
    assert sorted(path.name for path in bench.iterdir()) == ["compounds", "mkdocs.yml", "site"]


def test_two_builds_of_the_same_catalogue_are_the_same_bytes(bench: Path, rebuilt) -> None:
    """No clock, no host name, no order of chance."""
    rebuilt(bench)
    first = _content(bench / "site")
    rebuilt(bench)
    assert _content(bench / "site") == first


def test_a_swap_that_fails_puts_the_old_site_back(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    """Where the new folder cannot be moved in, the old one stands again."""
    staging, final = tmp_path / "new", tmp_path / "site"
    for folder in (staging, final):
        folder.mkdir()
        (folder / "index.html").write_text(folder.name)
    move = Path.rename

    def fail_for_the_new(self: Path, target: Path) -> Path:
        if self == staging:
            raise OSError("no room")
        return move(self, target)

    monkeypatch.setattr(Path, "rename", fail_for_the_new)
    with pytest.raises(OSError, match="no room"):
        swap(Staging(staging, final))
    assert (final / "index.html").read_text() == "site"


def test_the_command_and_mkdocs_build_the_same_site(bench: Path, rebuilt) -> None:
    """Two ways in, one site."""
    rebuilt(bench)
    by_mkdocs = _content(bench / "site")
    plugin.build_site(bench / "mkdocs.yml")
    assert _content(bench / "site") == by_mkdocs


def test_the_command_raises_errors_of_our_own(bench: Path) -> None:
    """So that the command line prints one line each and no traceback."""
    with pytest.raises(UsageError, match="nowhere"):
        plugin.build_site(bench / "nowhere.yml")
    (bench / "compounds/water.yml").write_text("id: water\nname: Water\nstructre: O\n")
    with pytest.raises(CatalogueError, match="structre"):
        plugin.build_site(bench / "mkdocs.yml")


def test_a_strict_build_with_a_warning_leaves_the_last_good_site(
    bench: Path, rebuilt, monkeypatch: pytest.MonkeyPatch
) -> None:
    """What mkdocs is about to refuse is not swapped in."""
    rebuilt(bench)
    before = _content(bench / "site")
    (bench / "compounds/water.yml").unlink()
    pages = plugin.site_pages

    def warning(*arguments: object) -> object:
        plugin.LOG.warning("something is odd")
        return pages(*arguments)  # type: ignore[arg-type]

    monkeypatch.setattr(plugin, "site_pages", warning)
    with pytest.raises(Abort, match="strict"):
        rebuilt(bench, strict=True)
    assert _content(bench / "site") == before


def test_serving_goes_on_when_an_edit_has_a_mistake(bench: Path, rebuilt) -> None:
    """The wrapped builder reports the mistake and returns, so the server answers as before."""
    calls = []

    def broken() -> None:
        calls.append(1)
        raise Abort("compounds/water.yml:3: structre: no such field")

    class Server:
        builder = staticmethod(broken)

    server = plugin.ShapeshelfPlugin().on_serve(Server(), config=None, builder=broken)  # type: ignore[arg-type]
    server.builder()
    assert calls == [1]


def _resolves(site: Path, page: Path, link: str, pages: dict[Path, Links]) -> bool:
    parts = urlsplit(link)
    if parts.scheme in ("http", "https", "mailto", "data"):
        return True
    here = "/" + page.relative_to(site).as_posix()
    target = urlsplit(urljoin(here, link))
    path = site / unquote(target.path).lstrip("/")
    if path.is_dir():
        path = path / "index.html"
    if not path.is_file():
        return False
    return not target.fragment or path.suffix != ".html" or target.fragment in pages[path].anchors


def _content(folder: Path) -> dict[str, bytes]:
    return {
        path.relative_to(folder).as_posix(): path.read_bytes()
        for path in sorted(folder.rglob("*"))
        if path.is_file()
    }
