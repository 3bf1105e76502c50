"""Releases and changes in the words of a terminal."""

from collections.abc import Iterator

from shapeshelf.linking.changes import Comparison
from shapeshelf.linking.published import RELEASED_FILE
from shapeshelf.linking.releasing import Present


def change_lines(comparison: Comparison) -> Iterator[str]:
    """Yield one line a value that differs from the released one: old, new, why, who quotes it."""
    for change in comparison.values:
        quoted = f"; used in {', '.join(change.used_in)}" if change.used_in else ""
        yield (
            f"{change.compound}#{change.anchor}: {change.of}: {change.old} -> {change.new} "
            f"({change.reason.value} changed){quoted}"
        )


def withdrawn_lines(present: Present) -> list[str]:
    """Return a line for each compound that was published and is in the catalogue no longer."""
    return [
        f"{present.catalogue.root / RELEASED_FILE}: {compound_id} ({compound.name}) was published "
        "and is withdrawn; its page stays as a notice"
        for compound_id, compound in sorted(present.published.withdrawn.items())
    ]


def summary(present: Present) -> str:
    """Return the release in one line."""
    counted = len(present.published.compounds)
    values = sum(len(item.values) for item in present.published.compounds.values())
    changed, added = len(present.comparison.values), len(present.comparison.added)
    if not present.released:
        return f"{counted} compounds, {values} values: first release"
    return f"{counted} compounds, {values} values: {changed} changed, {added} compounds new"


def drift_lines(present: Present) -> list[str]:
    """Return a line for each model value that packages would change and that stands."""
    return [
        f"{drift.compound}#{drift.anchor}: stands as released, {drift.released:g}; "
        f"the packages of today give {drift.today:g}"
        for drift in present.drifts
    ]
