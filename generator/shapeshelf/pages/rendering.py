"""Templates to HTML. Autoescaping is on for every part; only ``Markup`` passes through as it is."""

from functools import cache
from pathlib import Path

import jinja2
from jinja2.runtime import Context
from markupsafe import Markup

import shapeshelf
from shapeshelf.errors import ShapeshelfError
from shapeshelf.pages.glossary import term_link

PACKAGE = Path(shapeshelf.__file__).resolve().parent


def templates_dir() -> Path:
    """Return the folder of pages, parts and theme: beside the package, or in the checkout."""
    for place in (PACKAGE / "site_templates", PACKAGE.parents[1] / "site_templates"):
        if (place / "parts").is_dir():
            return place
    raise ShapeshelfError("the site templates are missing from this installation of shapeshelf")


def render(part: str, **values: object) -> str:
    """Return the HTML of ``parts/PART`` with these values."""
    return environment().get_template(part).render(values)


def fill(text: str, **values: object) -> str:
    """Return hand-written text with what it asks of parts and values in its place."""
    return environment().from_string(text).render(values)


@cache
def environment() -> jinja2.Environment:
    """Return the one Jinja environment of all parts; an unknown name is an error."""
    made = jinja2.Environment(
        loader=jinja2.FileSystemLoader(templates_dir() / "parts"),
        autoescape=True,
        undefined=jinja2.StrictUndefined,
        trim_blocks=True,
        lstrip_blocks=True,
        auto_reload=False,
    )
    made.globals["term"] = _term
    return made


@jinja2.pass_context
def _term(context: Context, text: str, name: str | None = None, looks: str = "") -> Markup:
    """Let a part say ``term("Point group")`` for a link to the glossary from where it stands."""
    return term_link(context["root"], text, name, looks)
