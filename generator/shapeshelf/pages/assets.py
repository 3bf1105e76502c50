"""The one style sheet of the site, put together from its parts."""

from collections.abc import Sequence
from pathlib import Path

from shapeshelf.errors import ShapeshelfError
from shapeshelf.figures.palette import css_variables

PARTS = (
    "tokens.css",
    "page.css",
    "header.css",
    "prose.css",
    "sheet.css",
    "parts.css",
    "turn.css",
    "tables.css",
    "lists.css",
    "lookup.css",
    "filters.css",
    "compare.css",
    "learning.css",
    "methods.css",
    "links.css",
    "print.css",
)
DARK_FACE = "blueprint.css"
BELOW = "assets/stylesheets/main.*.min.css"


def stylesheet(theme_dirs: Sequence[Path]) -> str:
    """Return the whole style sheet.

    The installed theme's own styles come first, in a cascade layer of their own, so that any
    rule of ours stands above any of theirs however specific it is.
    """
    return "\n".join([_layered(theme_dirs), _faces(theme_dirs), *_own(theme_dirs)])


def _layered(theme_dirs: Sequence[Path]) -> str:
    found = [path for folder in theme_dirs for path in sorted(folder.glob(BELOW))]
    if not found:
        return ""
    text = found[0].read_text("utf-8").removeprefix('@charset "UTF-8";')
    text = text.partition("/*# sourceMappingURL")[0]
    return f"@layer installed{{{text}}}"


def _faces(theme_dirs: Sequence[Path]) -> str:
    """Return the colours of both faces: the figures' own, and what the dark one changes."""
    light = css_variables(dark=False)
    changed = _first(theme_dirs, DARK_FACE).read_text("utf-8").partition(":root {")[2]
    dark = css_variables(dark=True) + changed.rpartition("}")[0]
    return (
        f":root{{{light}}}"
        f"@media screen and (prefers-color-scheme:dark){{:root:not([data-face=paper]){{{dark}}}}}"
        f"@media screen{{:root[data-face=blueprint]{{{dark}}}}}"
    )


def _own(theme_dirs: Sequence[Path]) -> list[str]:
    return [_first(theme_dirs, name).read_text("utf-8") for name in PARTS]


def _first(theme_dirs: Sequence[Path], name: str) -> Path:
    for folder in theme_dirs:
        if (folder / "css" / name).is_file():
            return folder / "css" / name
    raise ShapeshelfError(f"the style sheet css/{name} is missing from the theme")
