"""The glossary: terms with their addresses, and the links to them that other pages set."""

import json
from dataclasses import dataclass

from markupsafe import Markup

from shapeshelf.pages.addresses import GLOSSARY
from shapeshelf.pages.typesetting import slug
from shapeshelf.reference.terms import TERMS


@dataclass(frozen=True, slots=True)
class TermView:
    """One term as the glossary prints it."""

    name: str
    anchor: str
    text: str
    also: tuple[str, ...]


def term_views() -> tuple[TermView, ...]:
    """Return every term in the order of the alphabet."""
    views = (TermView(t.name, term_anchor(t.name), t.text, t.also) for t in TERMS)
    return tuple(sorted(views, key=lambda view: view.name.casefold()))


def term_anchor(name: str) -> str:
    """Return ``bents-rule`` for ``Bent's rule``."""
    return slug(name.replace("'", ""))


def term_link(root: str, text: str, name: str | None = None, looks: str = "") -> Markup:
    """Return ``text`` as a link to the term of that name; without one the text names the term.

    ``looks`` are further classes: a basis is set in a box. Raises KeyError for a term the
    glossary does not have, so that no link goes nowhere.
    """
    anchor = _BY_NAME[(name or text).casefold()].anchor
    classes = f"term {looks}".rstrip()
    link = '<a class="{}" href="{}{}#{}">{}</a>'
    return Markup(link).format(classes, root, GLOSSARY, anchor, text)


def definitions_json() -> bytes:
    """Return the definitions by anchor, for the notes shown where a term stands."""
    texts = {view.anchor: view.text for view in term_views()}
    return json.dumps(texts, ensure_ascii=False, separators=(",", ":")).encode()


_BY_NAME = {view.name.casefold(): view for view in term_views()}
