"""The one room that speaks mkdocs: it hands our pages over and keeps the last good site whole."""

import logging
from collections.abc import Callable
from pathlib import Path
from typing import Any, Literal

from mkdocs.commands.build import build
from mkdocs.commands.serve import serve
from mkdocs.config import load_config
from mkdocs.config.base import Config
from mkdocs.config.config_options import Type
from mkdocs.config.defaults import MkDocsConfig
from mkdocs.exceptions import Abort, ConfigurationError
from mkdocs.livereload import LiveReloadServer
from mkdocs.plugins import BasePlugin, event_priority
from mkdocs.structure.files import File, Files, InclusionLevel
from mkdocs.structure.pages import Page
from mkdocs.utils import CountHandler

from shapeshelf.errors import ShapeshelfError, UsageError
from shapeshelf.linking.releasing import present_values
from shapeshelf.linking.site import (
    checked_protocols,
    linking_files,
    linking_pages,
    standing_of,
)
from shapeshelf.linking.telling import change_lines, drift_lines
from shapeshelf.pages.assets import stylesheet
from shapeshelf.pages.for_files import link_to_files
from shapeshelf.pages.model import SiteFile, SitePage
from shapeshelf.pages.rendering import templates_dir
from shapeshelf.pages.site import handwritten_pages, site_files, site_pages
from shapeshelf.pages.staging import Staging, discard, stage, swap
from shapeshelf.report.checking import report_on_catalogue

LOG = logging.getLogger("mkdocs.plugins.shapeshelf")

LAST = -100
"""Other plugins see the site where they expect it, and finish writing before it is swapped in."""
UNUSED_FROM_THEME = ("assets/", "css/", "sitemap.xml")
"""Style sheets go into one; without ``site_url`` a site map would name no address."""
PLAIN_SCRIPTS = ("js/face.js", "js/moved.js")
"""Loaded as they are; all other scripts of the theme are modules and go into one."""
NAVIGATION: list[Any] = [
    {"Start here": "start/index.md"},
    {"Lookup": "lookup/index.md"},
    {"Compare": "compare/index.md"},
    {"Shapes": "shapes/index.md"},
    {"Protocols": "protocols/index.md"},
    {"Sources": "sources/index.md"},
    {"Methods": "methods.md"},
]


def build_site(config_file: Path, strict: bool = False, for_files: bool = False) -> None:
    """Build the site as ``mkdocs build`` does; ``for_files`` sets the option of that name.

    Raises CatalogueError with all problems of the catalogue, UsageError where the configuration
    cannot be used, ShapeshelfError where a strict build met a warning.
    """
    _speak()
    try:
        config = load_config(str(config_file), strict=strict)
        if for_files:
            config.plugins["shapeshelf"].config["for_files"] = True
        config.plugins.on_startup(command="build", dirty=False)
        try:
            build(config)
        finally:
            config.plugins.on_shutdown()
    except (Abort, ConfigurationError, FileNotFoundError) as error:
        raise _as_ours(error) from error


def serve_site(config_file: Path, address: str = "127.0.0.1:8000") -> None:
    """Show the site at ``HOST:PORT`` and follow changes, as ``mkdocs serve`` does.

    Raises as ``build_site``, for the first build; later mistakes are reported and waited out.
    """
    _speak()
    try:
        serve(str(config_file), dev_addr=address)
    except (Abort, ConfigurationError, FileNotFoundError) as error:
        raise _as_ours(error) from error


class ShapeshelfOptions(Config):  # type: ignore[no-untyped-call]
    """What a group may set in ``mkdocs.yml``; all else stands in the catalogue."""

    for_files = Type(bool, default=False)
    """The site is opened from a shared folder, without a server."""


class ShapeshelfPlugin(BasePlugin[ShapeshelfOptions]):  # type: ignore[no-untyped-call]
    """Generates every page from the catalogue in ``docs_dir``."""

    def __init__(self) -> None:
        self._staging: Staging | None = None
        self._serving = False
        self._in_place = False

    def on_startup(self, *, command: Literal["build", "gh-deploy", "serve"], dirty: bool) -> None:
        """Remember how mkdocs was called; a dirty build changes the site where it stands."""
        self._serving = command == "serve"
        self._in_place = dirty

    @event_priority(LAST)
    def on_config(self, config: MkDocsConfig) -> MkDocsConfig:
        """Put our theme before the installed one, and build beside the site that stands."""
        theme = str(templates_dir() / "theme")
        if theme not in config.theme.dirs:
            config.theme.dirs.insert(1 if config.theme.custom_dir else 0, theme)
        config.theme["shapeshelf"] = {
            "serving": self._serving,
            "for_files": self.config.for_files,
        }
        config.use_directory_urls = True
        config.nav = config.nav or NAVIGATION
        if not config.site_url:
            config.theme.static_templates.discard("sitemap.xml")
        if not self._in_place:
            self._discard()
            self._staging = stage(Path(config.site_dir))
            config.site_dir = str(self._staging.folder)
        return config

    def on_files(self, files: Files, *, config: MkDocsConfig) -> Files:
        """Replace the catalogue's own files by the pages made from them."""
        try:
            catalogue, reports = report_on_catalogue(Path(config.docs_dir))
            present = present_values(catalogue, reports, config.site_url or None)
            protocols = checked_protocols(present)
            pages = [
                *site_pages(catalogue, present.reports, config.site_name, standing_of(present)),
                *linking_pages(present, protocols, _files_url(config)),
            ]
            ready = [
                *site_files(catalogue, present.reports, self.config.for_files),
                *linking_files(present, config.site_name),
                _stylesheet(config),
            ]
        except ShapeshelfError as error:
            raise Abort(str(error)) from error
        for line in (*change_lines(present.comparison), *drift_lines(present)):
            LOG.info(line)
        kept = [file for file in files if not _is_replaced(file, config)]
        generated = [_page_file(page, config) for page in pages]
        others = [_StaticFile(file, config) for file in ready]
        return Files([*kept, *_handwritten(config), *generated, *others])

    def on_post_page(self, output: str, *, page: Page, config: MkDocsConfig) -> str:
        """Lead links to files where there is no server to do it."""
        return link_to_files(output) if self.config.for_files else output

    def on_serve(
        self, server: LiveReloadServer, *, config: MkDocsConfig, builder: Callable[..., None]
    ) -> LiveReloadServer:
        """Go on serving the last good site when an edit has a mistake in it."""
        server.builder = _forgiving(server.builder)
        return server

    @event_priority(LAST)
    def on_post_build(self, *, config: MkDocsConfig) -> None:
        """Swap the new site in, unless a strict build is about to refuse it."""
        if self._staging is None:
            return
        config.site_dir = str(self._staging.final)
        if config.strict and _warnings_counted():
            self._discard()
        else:
            swap(self._staging)
            self._staging = None
            LOG.info("The site stands in %s", config.site_dir)

    def on_build_error(self, *, error: Exception, **_: object) -> None:
        """Leave nothing of a build that failed."""
        self._discard()

    def on_shutdown(self) -> None:
        """Leave nothing of a build that was interrupted."""
        self._discard()

    def _discard(self) -> None:
        if self._staging is not None:
            discard(self._staging)
            self._staging = None


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

    _make: Callable[[], str]

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

    @property  # type: ignore[misc]
    def content_bytes(self) -> bytes:
        return self._make()

    def copy_file(self, dirty: bool = False) -> None:
        target = Path(self.abs_dest_path)
        target.parent.mkdir(parents=True, exist_ok=True)
        target.write_bytes(self._make())


def _page_file(page: SitePage, config: MkDocsConfig) -> File:
    """Return the mkdocs file of a page; what the navigation does not name stays out of it."""
    file = _virtual_file(f"{page.address}index.md", "", config)
    _HtmlPage(page, file, config)
    return file


def _handwritten(config: MkDocsConfig) -> list[File]:
    return [_virtual_file(name, text, config) for name, text in handwritten_pages()]


def _virtual_file(name: str, content: str, config: MkDocsConfig) -> File:
    return File.generated(config, name, content=content, inclusion=InclusionLevel.NOT_IN_NAV)


def _is_replaced(file: File, config: MkDocsConfig) -> bool:
    """Tell whether a file is the catalogue's, or one of the theme's that our face leaves out."""
    if file.src_dir is not None and Path(file.src_dir) == Path(config.docs_dir):
        return True
    if file.src_uri.startswith("js/"):
        return file.src_uri not in PLAIN_SCRIPTS
    return file.src_uri.startswith(UNUSED_FROM_THEME)


def _files_url(config: MkDocsConfig) -> str | None:
    """Return where the catalogue's files can be seen: the repository that the site names."""
    if not config.repo_url or not config.edit_uri:
        return None
    return f"{config.repo_url.rstrip('/')}/{config.edit_uri.strip('/')}/"


def _stylesheet(config: MkDocsConfig) -> SiteFile:
    installed = [Path(folder) for folder in config.theme.dirs]
    return SiteFile("css/site.css", lambda: stylesheet(installed).encode())


def _warnings_counted() -> bool:
    handlers = logging.getLogger("mkdocs").handlers
    counters = [handler for handler in handlers if isinstance(handler, CountHandler)]
    return any(count for counter in counters for _, count in counter.get_counts())


def _forgiving(builder: Callable[[], None]) -> Callable[[], None]:
    """Wrap a builder of the server; an exception would leave every request waiting."""

    def build_or_report() -> None:
        try:
            builder()
        except Abort as error:
            for line in str(error).splitlines():
                LOG.error(line)

    return build_or_report


def _as_ours(error: Exception) -> ShapeshelfError:
    """Return the error of our own tree that an error of mkdocs stands for."""
    if isinstance(error.__cause__, ShapeshelfError):
        return error.__cause__
    if isinstance(error, Abort):
        return ShapeshelfError(str(error))
    return UsageError(" ".join(str(error).split()))


def _speak() -> None:
    """Let mkdocs' own messages be seen where no command of its own has arranged for that."""
    logger = logging.getLogger("mkdocs")
    if not logger.handlers:
        handler = logging.StreamHandler()
        handler.setFormatter(logging.Formatter("%(message)s"))
        logger.addHandler(handler)
        logger.setLevel(logging.INFO)
        logger.propagate = False
