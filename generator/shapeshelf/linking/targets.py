"""An address in a protocol to what it leads to: there, moved, gone, or none of ours."""

import difflib
import re
from collections.abc import Sequence
from dataclasses import dataclass
from urllib.parse import unquote, urlsplit

from shapeshelf.linking.documents.rest import INVENTORY
from shapeshelf.linking.published import Published, PublishedCompound

_COMPOUND = re.compile(r"compounds/([a-z0-9]+(?:-[a-z0-9]+)*)(?:/(.*))?")
_SHAPE = re.compile(r"shapes/([a-z0-9-]+)(?:/(?:index\.html)?)?")
_FILES = frozenset(("", "index.html", "data.json", "card.svg", "structure.xyz", "structure.sdf"))
_PAGES = frozenset(
    f"{name}{ending}"
    for name in (
        "", "lookup", "shapes", "compounds", "sources", "protocols", "methods", "changes",
        "catalogue", "start", "compare",
    )
    for ending in ("", "/", "/index.html")
) | {"index.html", "catalogue.json", "catalogue.csv", "catalogue.sdf", "objects.inv"}  # fmt: skip
_PERHAPS = frozenset(("drawing", "protocols", "content"))
"""Anchors that a page has or not, which no published value tells."""
_SECTION_QUANTITY = {
    "angles": "angle",
    "lengths": "length",
    "polarity": "dipole",
}


@dataclass(frozen=True, slots=True)
class Fault:
    """What is wrong with where a link leads."""

    kind: str
    """``moved`` or ``gone``."""
    message: str


@dataclass(frozen=True, slots=True)
class Target:
    """A page of the reference that a link leads to."""

    compound_id: str | None
    """Present id, for a compound's page that is still there."""
    compound: PublishedCompound | None
    anchor: str
    fault: Fault | None = None

    @property
    def quantity(self) -> str | None:
        """What the values at the anchor are values of, where it names one value or section."""
        if self.compound is None:
            return None
        value = self.compound.values.get(self.anchor)
        return value.quantity if value else _SECTION_QUANTITY.get(self.anchor)


def find_target(address: str, published: Published, sites: Sequence[str]) -> Target | None:
    """Return what ``address`` leads to, ``None`` where it is no address of the reference.

    ``sites`` are the addresses of the site's root. A relative address is one of the reference
    where, its ``../`` taken off, it begins with ``compounds/ID`` or ``shapes/SHAPE``.
    """
    if address.startswith(INVENTORY):
        return _by_name(address.removeprefix(INVENTORY), published)
    found = _path_in_site(address, sites)
    if found is None:
        return None
    path, anchor, absolute = found
    compound = _COMPOUND.fullmatch(path)
    if compound and (compound.group(2) or "") in _FILES:
        return _compound_target(compound.group(1), anchor, published)
    shape = _SHAPE.fullmatch(path)
    if shape:
        return _shape_target(shape.group(1), published)
    if absolute and path not in _PAGES and path.startswith(("compounds/", "shapes/")):
        return _gone(f"there is no page {path}")
    return None


def _path_in_site(address: str, sites: Sequence[str]) -> tuple[str, str, bool] | None:
    """Return path from the root, anchor, and whether the address named the host."""
    try:
        parts = urlsplit(address.strip())
    except ValueError:
        return None
    anchor = unquote(parts.fragment)
    if not parts.scheme and not parts.netloc:
        path = re.sub(r"^(?:\.{0,2}/)+", "", unquote(parts.path))
        return path, anchor, False
    for site in sites:
        root = urlsplit(site if site.endswith("/") else site + "/")
        same_host = parts.netloc.casefold() == root.netloc.casefold()
        if same_host and parts.path.startswith(root.path):
            return unquote(parts.path.removeprefix(root.path)), anchor, True
    return None


def _by_name(name: str, published: Published) -> Target | None:
    """Resolve ``sf4`` or ``sf4.angle-f-ax-s-f-ax``; other names are other documentations'."""
    compound_id, _, anchor = name.partition(".")
    known = compound_id in published.compounds or compound_id in published.withdrawn
    earlier = any(compound_id in item.formerly for item in published.compounds.values())
    return _compound_target(compound_id, anchor, published) if known or earlier else None


def _compound_target(compound_id: str, anchor: str, published: Published) -> Target:
    compound = published.compounds.get(compound_id)
    if compound is not None:
        return Target(compound_id, compound, anchor, _anchor_fault(compound, anchor))
    for present, candidate in published.compounds.items():
        if compound_id in candidate.formerly:
            moved = Fault("moved", f"{compound_id} has moved to compounds/{present}/")
            fault = _anchor_fault(candidate, anchor) or moved
            return Target(present, candidate, anchor, fault)
    if compound_id in published.withdrawn:
        name = published.withdrawn[compound_id].name
        return _gone(f"{compound_id} ({name}) was withdrawn from the catalogue")
    near = difflib.get_close_matches(compound_id, published.compounds, n=1)
    hint = f"; did you mean {near[0]}?" if near else ""
    return _gone(f"there is no compound {compound_id}{hint}")


def _anchor_fault(compound: PublishedCompound, anchor: str) -> Fault | None:
    if not anchor or anchor in _PERHAPS or anchor in {*compound.values, *compound.anchors}:
        return None
    near = difflib.get_close_matches(anchor, [*compound.values, *compound.anchors], n=1, cutoff=0)
    return Fault("gone", f"the page has no #{anchor}; nearest is #{near[0]}")


def _shape_target(shape: str, published: Published) -> Target:
    if shape in published.shapes:
        return Target(None, None, "")
    near = difflib.get_close_matches(shape, published.shapes, n=1)
    hint = f"; did you mean {near[0]}?" if near else ""
    return _gone(f"there is no shape {shape}{hint}")


def _gone(message: str) -> Target:
    return Target(None, None, "", Fault("gone", message))
