"""Which measured value belongs to which row.

* K1  A label that names a row outright, in any of its spellings, means that row.
* K2  A label in bare elements (``H-O-S``) means the rows it can be read as, where these are of
  one kind and no centre has two of them; else it means none.
"""

from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass

from shapeshelf.catalogue.model import Measurement, Quantity
from shapeshelf.report.labels import same_label
from shapeshelf.report.values import most_precise


@dataclass(frozen=True, slots=True)
class Named:
    """What a row can be called: every spelling, the one in bare elements, and its kind."""

    labels: tuple[str, ...]
    bare: str
    centre: int
    kind: tuple[int, ...]
    """Classes of its atoms, the same read from either end."""


def match(
    rows: Sequence[Named], measured: Sequence[Measurement], quantity: Quantity
) -> tuple[list[Measurement | None], tuple[Measurement, ...]]:
    """Return the measurement of each row (the most precise of several), and those of no row."""
    found: list[list[Measurement]] = [[] for _ in rows]
    unmatched = []
    for item in (item for item in measured if item.quantity is quantity):
        meant = _rows_meant(rows, item.of or "")
        for number in meant:
            found[number].append(item)
        if not meant:
            unmatched.append(item)
    return [most_precise(items) for items in found], tuple(unmatched)


def kind_of(classes: Sequence[int], atoms: Sequence[int]) -> tuple[int, ...]:
    """Return the classes of ``atoms``, in the direction that reads smaller."""
    forward = tuple(classes[atom] for atom in atoms)
    return min(forward, forward[::-1])


def _rows_meant(rows: Sequence[Named], label: str) -> list[int]:
    outright = [
        number
        for number, row in enumerate(rows)
        if any(same_label(label, spelling) for spelling in row.labels)
    ]
    if outright:
        return outright
    read = [number for number, row in enumerate(rows) if same_label(label, row.bare)]
    kinds = {rows[number].kind for number in read}
    most_at_one_centre = max(Counter(rows[number].centre for number in read).values(), default=0)
    return read if len(kinds) == 1 and most_at_one_centre == 1 else []
