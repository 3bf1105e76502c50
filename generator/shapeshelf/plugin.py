"""The one room that speaks mkdocs: it hands our pages over and keeps the last good site whole."""

import logging
import shutil
import tempfile
from collections.abc import Callable
from pathlib import Path
from typing import Any, Literal

from mkdocs.config.base import Config
from mkdocs.config.defaults import MkDocsConfig
from mkdocs.exceptions import Abort
from mkdocs.livereload import LiveReloadServer
from mkdocs.plugins import BasePlugin, event_priority
from mkdocs.structure.files import File, Files, InclusionLevel
from mkdocs.structure.pages import Page
from mkdocs.utils import CountHandler

from shapeshelf.errors import ShapeshelfError
from shapeshelf.pages.assets import stylesheet
from shapeshelf.pages.model import SiteFile, SitePage
from shapeshelf.pages.rendering import templates_dir
from shapeshelf.pages.site import site_files, site_pages
from shapeshelf.report.checking import report_on_catalogue

LOG = logging.getLogger("mkdocs.plugins.shapeshelf")

LAST = -100
"""Other plugins see the site where they expect it, and finish writing before it is swapped in."""
UNUSED_FROM_THEME = ("assets/", "css/", "sitemap.xml")
"""Style sheets go into one; without ``site_url`` a site map would name no address."""
NAVIGATION: list[Any] = [
    {"Lookup": "lookup/index.md"},
    {"Shapes": "shapes/index.md"},
    {"Protocols": "protocols/index.md"},
    {"Sources": "sources/index.md"},
    {"Methods": "methods.md"},
]


class ShapeshelfOptions(Config):
    """The plugin takes no options: what it needs stands in the catalogue."""


class ShapeshelfPlugin(BasePlugin[ShapeshelfOptions]):
    """Generates every page from the catalogue in ``docs_dir``."""

    def __init__(self) -> None:
        self._staging: Path | None = None
        self._final: Path | None = None
        self._serving = False
        self._in_place = False

    def on_startup(self, *, command: Literal["build", "gh-deploy", "serve"], dirty: bool) -> None:
        """Remember how mkdocs was called; a dirty build changes the site where it stands."""
        self._serving = command == "serve"
        self._in_place = dirty

    @event_priority(LAST)
    def on_config(self, config: MkDocsConfig) -> MkDocsConfig:
        """Put our theme before the installed one, and build beside the site that stands."""
        theme = templates_dir() / "theme"
        if str(theme) not in config.theme.dirs:
            config.theme.dirs.insert(1 if config.theme.custom_dir else 0, str(theme))
        config.theme["shapeshelf"] = {"serving": self._serving}
        config.use_directory_urls = True
        config.nav = config.nav or NAVIGATION
        if not config.site_url:
            config.theme.static_templates.discard("sitemap.xml")
        if not self._in_place:
            self._stage(config)
        return config

    def on_files(self, files: Files, *, config: MkDocsConfig) -> Files:
        """Replace the catalogue's own files by the pages made from them."""
        try:
            catalogue, reports = report_on_catalogue(Path(config.docs_dir))
            pages = list(site_pages(catalogue, reports, config.site_name))
            held = list(site_files(catalogue, reports))
        except ShapeshelfError as error:
            raise Abort(str(error)) from error
        kept = [file for file in files if not _is_replaced(file, config)]
        handwritten = _handwritten(config)
        generated = [_page_file(page, config) for page in pages]
        others = [_StaticFile(file, config) for file in [*held, _stylesheet(config)]]
        return Files([*kept, *handwritten, *generated, *others])

    def on_serve(
        self, server: LiveReloadServer, *, config: MkDocsConfig, builder: Callable[..., None]
    ) -> LiveReloadServer:
        """Go on serving the last good site when an edit has a mistake in it."""
        server.builder = _forgiving(server.builder)
        return server

    @event_priority(LAST)
    def on_post_build(self, *, config: MkDocsConfig) -> None:
        """Swap the new site in, unless a strict build is about to refuse it."""
        if self._staging is None or self._final is None:
            return
        if config.strict and _warnings_counted():
            self._discard()
        else:
            swap(self._staging, self._final)
            self._staging = None
        config.site_dir = str(self._final)

    def on_build_error(self, *, error: Exception, **_: object) -> None:
        """Leave nothing of a build that failed."""
        self._discard()

    def on_shutdown(self) -> None:
        """Leave nothing of a build that was interrupted."""
        self._discard()

    def _stage(self, config: MkDocsConfig) -> None:
        self._discard()
        final = Path(config.site_dir)
        final.parent.mkdir(parents=True, exist_ok=True)
        self._final = final
        self._staging = Path(tempfile.mkdtemp(prefix=f".{final.name}-", dir=final.parent))
        config.site_dir = str(self._staging)

    def _discard(self) -> None:
        if self._staging is not None:
            shutil.rmtree(self._staging, ignore_errors=True)
            self._staging = None


def swap(staging: Path, final: Path) -> None:
    """Put the folder ``staging`` in the place of ``final``, which is put back if that fails."""
    staging.chmod(0o755)
    aside = Path(tempfile.mkdtemp(prefix=f".{final.name}-old-", dir=final.parent))
    earlier = aside / final.name
    if final.exists():
        final.rename(earlier)
    try:
        staging.rename(final)
    except OSError:
        if earlier.exists():
            earlier.rename(final)
        raise
    finally:
        shutil.rmtree(aside, ignore_errors=True)


class _HtmlPage(Page):
    """A page whose body is ready-made HTML, rendered once, when the theme prints it."""

    def __init__(self, site_page: SitePage, file: File, config: MkDocsConfig) -> None:
        super().__init__(site_page.title, file, config)
        self._site_page = site_page

    def read_source(self, config: MkDocsConfig) -> None:
        page = self._site_page
        self.markdown = ""
        self.meta = {
            "title": page.title,
            "description": page.description,
            "kind": page.kind,
            "moved_to": page.moved_to,
            "revision": page.revision,
        }

    def render(self, config: MkDocsConfig, files: Files) -> None:
        self.content = _LateHtml(self._site_page.html)
        self.present_anchor_ids = None


class _LateHtml(str):
    """Stands where mkdocs keeps a page's HTML; the text is made when it is printed."""

    __slots__ = ("_make",)

    def __new__(cls, make: Callable[[], str]) -> "_LateHtml":
        late = super().__new__(cls)
        late._make = make
        return late

    def __str__(self) -> str:
        return self._make()


class _StaticFile(File):
    """A file whose bytes are made when they are written."""

    def __init__(self, site_file: SiteFile, config: MkDocsConfig) -> None:
        super().__init__(
            site_file.address,
            None,
            config.site_dir,
            use_directory_urls=True,
            dest_uri=site_file.address,
            inclusion=InclusionLevel.NOT_IN_NAV,
        )
        self.generated_by = "shapeshelf"
        self._make = site_file.content

    @property
    def content_bytes(self) -> bytes:
        return self._make()

    def copy_file(self, dirty: bool = False) -> None:
        target = Path(self.abs_dest_path)
        target.parent.mkdir(parents=True, exist_ok=True)
        target.write_bytes(self._make())


def _page_file(page: SitePage, config: MkDocsConfig) -> File:
    """Return the mkdocs file of a page; compounds and shapes stay out of the navigation."""
    file = File.generated(
        config,
        _source_name(page.address),
        content="",
        inclusion=InclusionLevel.NOT_IN_NAV,
    )
    _HtmlPage(page, file, config)
    return file


def _source_name(address: str) -> str:
    return f"{address}index.md"


def _handwritten(config: MkDocsConfig) -> list[File]:
    folder = templates_dir() / "pages"
    return [
        File.generated(
            config,
            path.relative_to(folder).as_posix(),
            content=path.read_text("utf-8"),
            inclusion=InclusionLevel.NOT_IN_NAV,
        )
        for path in sorted(folder.rglob("*.md"))
    ]


def _is_replaced(file: File, config: MkDocsConfig) -> bool:
    """Tell whether a file is the catalogue's, or an asset of the theme that our face has no use for."""
    if file.src_dir is not None and Path(file.src_dir) == Path(config.docs_dir):
        return True
    return file.src_uri.startswith(UNUSED_FROM_THEME)


def _stylesheet(config: MkDocsConfig) -> SiteFile:
    installed = [Path(folder) for folder in config.theme.dirs]
    return SiteFile("css/site.css", lambda: stylesheet(installed).encode())


def _warnings_counted() -> bool:
    handlers = logging.getLogger("mkdocs").handlers
    return any(
        count
        for handler in handlers
        if isinstance(handler, CountHandler)
        for _, count in handler.get_counts()
    )


def _forgiving(builder: Callable[[], None]) -> Callable[[], None]:
    def build() -> None:
        try:
            builder()
        except Abort as error:
            for line in str(error).splitlines():
                LOG.error(line)

    return build
