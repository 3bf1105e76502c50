"""What the pages room hands over: pages and files of the site, each with its address."""

from collections.abc import Callable
from dataclasses import dataclass


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
class SiteFile:
    """A file that is served as it is."""

    address: str
    content: Callable[[], bytes]
