"""What differs between the values last released and the present ones, and why."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from enum import StrEnum

from shapeshelf.linking.published import (
    Published,
    PublishedCompound,
    PublishedValue,
    value_text,
)

NOTHING = "–"


class Reason(StrEnum):
    """Why a value differs."""

    STRUCTURE = "structure"
    MEASUREMENT = "measurement"
    CALCULATION = "calculation"
    MODEL = "model"


@dataclass(frozen=True, slots=True)
class ValueChange:
    """One value or fact that differs from what was released."""

    compound: str
    """Id of the entry, as it is now."""
    name: str
    anchor: str
    """On the compound's page; of the nearest section for a value that is gone."""
    of: str
    old: str
    new: str
    reason: Reason
    used_in: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class Comparison:
    """The present catalogue against the last release."""

    values: tuple[ValueChange, ...] = ()
    added: tuple[str, ...] = ()
    """Ids that were never released."""
    withdrawn: tuple[str, ...] = ()
    """Ids that the release still had as compounds and the catalogue has no longer."""


def compare(released: Published | None, present: Published) -> Comparison:
    """Return everything that differs; before the first release there is nothing to compare."""
    if released is None:
        return Comparison()
    earlier = {
        old: compound_id
        for compound_id, compound in present.compounds.items()
        for old in compound.formerly
    }
    changes: list[ValueChange] = []
    known: set[str] = set()
    for old_id, old in released.compounds.items():
        now = old_id if old_id in present.compounds else earlier.get(old_id)
        if now is not None:
            known.add(now)
            changes += _compound_changes(now, old, present.compounds[now])
    return Comparison(
        values=tuple(changes),
        added=tuple(sorted(set(present.compounds) - known)),
        withdrawn=tuple(
            sorted(
                compound_id
                for compound_id in released.compounds
                if compound_id not in present.compounds and compound_id not in earlier
            )
        ),
    )


def withdrawn_compounds(
    released: Published | None, entry_ids: Mapping[str, object] | frozenset[str]
) -> dict[str, PublishedCompound]:
    """Return every compound once published that no entry, under any of its ids, is now.

    ``entry_ids`` holds the ids and the earlier ids of the present entries.
    """
    if released is None:
        return {}
    once = {**released.withdrawn, **released.compounds}
    return {key: compound for key, compound in once.items() if key not in entry_ids}


def _compound_changes(
    compound_id: str, old: PublishedCompound, new: PublishedCompound
) -> Iterator[ValueChange]:
    structure_changed = old.structure != new.structure
    for name in dict.fromkeys((*old.facts, *new.facts)):
        before, after = old.facts.get(name, NOTHING), new.facts.get(name, NOTHING)
        if before != after:
            reason = Reason.STRUCTURE if structure_changed else Reason.MODEL
            anchor = {"point group": "symmetry"}.get(name, name)
            yield ValueChange(
                compound_id, new.name, anchor, name, before, after, reason, new.used_in
            )
    for anchor in dict.fromkeys((*old.values, *new.values)):
        was, now = old.values.get(anchor), new.values.get(anchor)
        if _differ(was, now):
            yield ValueChange(
                compound_id,
                new.name,
                anchor if now else _section(was),
                (now or was).of,  # type: ignore[union-attr]
                value_text(was) if was else NOTHING,
                value_text(now) if now else NOTHING,
                _reason(was, now, structure_changed),
                new.used_in,
            )


def _differ(was: PublishedValue | None, now: PublishedValue | None) -> bool:
    if was is None or now is None:
        return was is not now
    return (was.value, was.uncertainty, was.basis) != (now.value, now.uncertainty, now.basis)


def _reason(
    was: PublishedValue | None, now: PublishedValue | None, structure_changed: bool
) -> Reason:
    bases = {value.basis for value in (was, now) if value is not None}
    if "measured" in bases and not (structure_changed and None in (was, now)):
        return Reason.MEASUREMENT
    if structure_changed or "supplied" in bases:
        return Reason.STRUCTURE
    return Reason.CALCULATION if "calculated" in bases else Reason.MODEL


def _section(value: PublishedValue | None) -> str:
    sections = {"angle": "angles", "length": "lengths", "dipole": "polarity"}
    return sections.get(value.quantity if value else "", "symmetry")
