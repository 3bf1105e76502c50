"""Where things stand in the site. These addresses are promises: protocols link to them."""

from shapeshelf.pages.typesetting import slug

LOOKUP = "lookup/"
SHAPES = "shapes/"
SOURCES = "sources/"
PROTOCOLS = "protocols/"
COMPOUNDS = "compounds/"
METHODS = "methods/"
COMPARE = "compare/"
START = "start/"
GLOSSARY = "glossary/"
CHANGES = "changes/"
DESK = "catalogue/"


def compound_address(compound_id: str) -> str:
    """Return ``compounds/ID/``."""
    return f"{COMPOUNDS}{compound_id}/"


def shape_address(shape: str) -> str:
    """Return ``shapes/SHAPE/``."""
    return f"{SHAPES}{slug(shape)}/"


def protocol_address(protocol_id: str) -> str:
    """Return ``protocols/ID/``."""
    return f"{PROTOCOLS}{protocol_id}/"


def source_address(key: str) -> str:
    """Return the line of one source on the page of sources."""
    return f"{SOURCES}#{source_anchor(key)}"


def source_anchor(key: str) -> str:
    """Return the anchor of a source, safe in an attribute whatever the key."""
    return f"source-{slug(key)}"


def root_from(address: str) -> str:
    """Return the way from a page to the site's root: ``../../`` from ``compounds/sf4/``."""
    return "../" * address.count("/") or "./"
