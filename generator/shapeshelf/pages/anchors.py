"""The anchor of every value on a compound's page. These too are promises: protocols link to them.

* A1  A value's anchor is its quantity and its label in lower case: ``angle-f-ax-s-f-ax``.
* A2  Of two rows with one label the first on the page keeps the plain anchor, the next ends in
  ``-2``, and so on.
* A3  The dipole moment has ``dipole``; a vibration without a label goes by its wavenumber.
"""

from collections.abc import Iterator

from shapeshelf.catalogue.model import Measurement, Quantity
from shapeshelf.pages.typesetting import slug
from shapeshelf.report.model import AngleRow, CentreReport, CompoundReport

DIPOLE = "dipole"
SECTIONS = (
    "name",
    "shape",
    "angles",
    "lengths",
    "polarity",
    "hybridisation",
    "symmetry",
    "working",
    "sources",
    "record",
)
"""Anchors of every compound's page, ``lengths`` where it has bonds, which is always."""


def value_anchors(report: CompoundReport) -> dict[tuple[int, ...], str]:
    """Return the anchor of each row of angles and lengths that the page shows, by its atoms."""
    anchors: dict[tuple[int, ...], str] = {}
    taken: dict[str, int] = {}
    for row in shown_angles(report):
        anchors[row.atoms] = _numbered(f"angle-{slug(row.of)}", taken)
    for length in report.lengths:
        anchors[length.atoms] = _numbered(f"length-{slug(length.of)}", taken)
    return anchors


def frequency_anchors(report: CompoundReport) -> list[tuple[Measurement, str]]:
    """Return the measured vibrations of a compound, each with its anchor."""
    measured = report.entry.measured if report.entry else ()
    taken: dict[str, int] = {}
    return [
        (item, _numbered(f"frequency-{slug(item.of or f'{item.value:g}')}", taken))
        for item in measured
        if item.quantity is Quantity.FREQUENCY
    ]


def shown_angles(report: CompoundReport) -> Iterator[AngleRow]:
    """Yield the rows of angles that the page shows: of equivalent centres, the first one's."""
    for centre in shown_centres(report):
        yield from centre.angles


def shown_centres(report: CompoundReport) -> Iterator[CentreReport]:
    """Yield the first centre of each set of equivalent ones, in atom order."""
    by_atom = {centre.centre.atom: centre for centre in report.centres}
    seen: set[int] = set()
    for centre in report.centres:
        if centre.centre.atom not in seen:
            members = [atom for atom in centre.equivalent if atom in by_atom]
            seen.update(members or [centre.centre.atom])
            yield by_atom[members[0]] if members else centre


def _numbered(anchor: str, taken: dict[str, int]) -> str:
    taken[anchor] = taken.get(anchor, 0) + 1
    return anchor if taken[anchor] == 1 else _numbered(f"{anchor}-{taken[anchor]}", taken)
