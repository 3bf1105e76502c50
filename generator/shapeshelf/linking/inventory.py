"""``objects.inv``, by which other internal documentation links to the reference by name.

The format is version 2 of Sphinx's inventory: four lines of head, then zlib-compressed lines of
name, domain and role, priority, address and shown name (as Sphinx itself reads and writes it).
Names are in small letters, as Sphinx's ``:ref:`` asks for: ``sf4`` a compound, ``sf4.angles`` a
section of its page, ``sf4.angle-f-ax-s-f-ax`` a value, ``shapes.see-saw`` a shape.
"""

import zlib
from collections.abc import Iterator

from shapeshelf.linking.published import Published, PublishedCompound
from shapeshelf.pages.addresses import compound_address

ROLE = "std:label -1"


def inventory(published: Published, project: str) -> bytes:
    """Return the inventory of the whole site; ``project`` is the site's name."""
    head = (
        "# Sphinx inventory version 2\n"
        f"# Project: {' '.join(project.split())}\n"
        "# Version: \n"
        "# The remainder of this file is compressed using zlib.\n"
    )
    lines = "".join(f"{line}\n" for line in _lines(published))
    return head.encode() + zlib.compress(lines.encode(), 9)


def _lines(published: Published) -> Iterator[str]:
    for compound_id, compound in sorted(published.compounds.items()):
        address = compound_address(compound_id)
        for name in (compound_id, *compound.formerly):
            yield f"{name} {ROLE} {address} {_one_line(compound.name)}"
            yield from _anchor_lines(name, address, compound)
    for shape in published.shapes:
        yield f"shapes.{shape} {ROLE} shapes/{shape}/ {shape.replace('-', ' ')}"


def _anchor_lines(name: str, address: str, compound: PublishedCompound) -> Iterator[str]:
    said = _one_line(compound.name)
    for anchor, value in compound.values.items():
        yield f"{name}.{anchor} {ROLE} {address}#{anchor} {said}, {_one_line(value.of)}"
    for anchor in compound.anchors:
        yield f"{name}.{anchor.lower()} {ROLE} {address}#{anchor} {said}, {anchor}"


def _one_line(text: str) -> str:
    return " ".join(text.split())
