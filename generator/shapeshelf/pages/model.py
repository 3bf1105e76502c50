"""What the pages room hands over: pages and files of the site, each with its address."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass, field


@dataclass(frozen=True, slots=True)
class SitePage:
    """A page whose body we write ourselves; the theme puts head, header and footer around it."""

    address: str
    """From the site's root, ``compounds/sf4/``; empty for the home page."""
    title: str
    """Plain text; whoever prints it escapes it."""
    description: str
    kind: str
    """``compound``, ``shape``, ``lookup`` …, for the style sheet."""
    html: Callable[[], str]
    """Rendered when the page is written, so that ten thousand need not be held at once."""
    moved_to: str | None = None
    """For an earlier address: where the page stands now, from the site's root."""
    revision: str | None = None


@dataclass(frozen=True, slots=True)
class Standing:
    """What a compound's page tells of its place among the published ones."""

    site_url: str | None = None
    """Address of the site's root, where the configuration names one; ends in a stroke."""
    news: Mapping[str, Mapping[str, str]] = field(default_factory=dict)
    """By id and anchor: what a value was when it was last released."""
    unreleased: frozenset[str] = frozenset()
    """Ids that no release holds yet, where there is a release."""

    def page_url(self, address: str) -> str | None:
        """Return the absolute address of a page, ``None`` where the site's is not known."""
        return None if self.site_url is None else self.site_url + address


@dataclass(frozen=True, slots=True)
class SiteFile:
    """A file that is served as it is."""

    address: str
    content: Callable[[], bytes]
