"""What the one who keeps the catalogue needs to see: missing, doubtful, unused, twice.

* D1  no measured value at all
* D2  a measured and a calculated value further apart than both ± together
* D3  no record of a calculation that counts: missing, stale, failed or broken
* D4  every measured value set down from memory of its source
* D5  a group known for hazard in the structure, and no H-code
* D6  used in no protocol, and linked to by none
* D7  two entries of one InChIKey
* D8  a protocol whose link or number does not hold
"""

from collections import defaultdict
from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass

from shapeshelf.calculation.states import State, standing_of
from shapeshelf.catalogue.model import Entry, SourceKind
from shapeshelf.catalogue.problems import line_of
from shapeshelf.linking.citing import Checked
from shapeshelf.linking.published import PublishedValue, number_text
from shapeshelf.linking.releasing import Present
from shapeshelf.pages.addresses import compound_address
from shapeshelf.reference.hazard_groups import HAZARD_GROUPS
from shapeshelf.report.cautions import hazard_groups
from shapeshelf.report.model import CompoundReport

Entries = Sequence[tuple[Entry, CompoundReport]]
Rule = Callable[[Entry, CompoundReport], Iterator[tuple[str, str]]]
"""Yields field and message of each point about one entry."""

RECORD_WORDS = {
    State.MISSING: "no calculation is on record",
    State.STALE: "the calculation on record is of an earlier structure",
    State.FAILED: "the calculation on record found no minimum",
    State.BROKEN: "the file on record is no calculation",
}
UNSTATED = {"angle": 0.1, "length": 0.001, "dipole": 0.01, "frequency": 1.0}
"""Taken for a ± that is not stated: one in the last digit usually given (common practice, no
source)."""


@dataclass(frozen=True, slots=True)
class DeskLine:
    """One point for the steward."""

    name: str
    """Of the compound, or of the document."""
    address: str | None
    """From the site's root."""
    file: str
    """Relative to the catalogue."""
    line: int
    field: str
    message: str


@dataclass(frozen=True, slots=True)
class DeskSection:
    """All points of one kind."""

    anchor: str
    title: str
    lines: tuple[DeskLine, ...]


def desk_sections(present: Present, protocols: Sequence[Checked]) -> tuple[DeskSection, ...]:
    """Return every kind of point, empty ones included, in the order of the steward's worry."""
    entries = [(report.entry, report) for report in present.reports if report.entry is not None]
    cited = {item.compound for checked in protocols for item in checked.citations}
    made = _Maker(present)
    kinds = (
        ("protocols-stale", "Protocols whose links or numbers do not hold",
         made.protocol_lines(protocols)),
        ("no-h-code", "A hazardous group and no H-code", made.each(entries, made.uncautioned)),
        ("quarrels", "Measured and calculated apart by more than both ±",
         made.each(entries, made.quarrels)),
        ("duplicates", "One structure twice", made.duplicates(entries)),
        ("not-measured", "No measured value", made.each(entries, made.not_measured)),
        ("not-calculated", "No calculation that counts", made.each(entries, made.not_calculated)),
        ("recalled", "Sources only recalled", made.each(entries, made.only_recalled)),
        ("unused", "Used in no protocol", made.each(entries, made.unused(cited))),
    )  # fmt: skip
    return tuple(DeskSection(anchor, title, tuple(lines)) for anchor, title, lines in kinds)


class _Maker:
    """Writes lines about the entries of one catalogue."""

    def __init__(self, present: Present) -> None:
        self._present = present

    def each(self, entries: Entries, rule: Rule) -> Iterator[DeskLine]:
        for entry, report in entries:
            for field, message in rule(entry, report):
                yield self._line(entry, field, message)

    def not_measured(self, entry: Entry, _: CompoundReport) -> Iterator[tuple[str, str]]:
        if not entry.measured:
            yield "measured", "nothing measured is given"

    def not_calculated(self, entry: Entry, report: CompoundReport) -> Iterator[tuple[str, str]]:
        root, spin = self._present.catalogue.root, report.lewis.multiplicity
        state = standing_of(root, entry.id, report.molecule, spin).state
        if state is not State.FRESH:
            yield "structure", RECORD_WORDS[state]

    def quarrels(self, entry: Entry, _: CompoundReport) -> Iterator[tuple[str, str]]:
        for value in self._present.published.compounds[entry.id].values.values():
            if _quarrel(value):
                measured = number_text(value.quantity, value.measured or 0.0)
                calculated = number_text(value.quantity, value.calculated or 0.0)
                yield (
                    _field_of(entry, value),
                    f"{value.of}: measured {measured}, calculated {calculated}",
                )

    def only_recalled(self, entry: Entry, _: CompoundReport) -> Iterator[tuple[str, str]]:
        sources = self._present.catalogue.sources
        kinds = [sources[item.source].kind for item in entry.measured if item.source in sources]
        if kinds and set(kinds) == {SourceKind.RECALLED}:
            count = len(kinds)
            yield "measured[0].source", f"{count} measured {'value' if count == 1 else 'values'}"

    def uncautioned(self, entry: Entry, report: CompoundReport) -> Iterator[tuple[str, str]]:
        if entry.hazards:
            return
        for key in hazard_groups(report.molecule):
            group = HAZARD_GROUPS[key]
            yield "hazards", f"{group.name}; rule from {group.source}"

    def unused(self, cited: set[str]) -> Rule:
        def rule(entry: Entry, _: CompoundReport) -> Iterator[tuple[str, str]]:
            if not entry.used_in and entry.id not in cited:
                yield "used-in", "no protocol names it or links to it"

        return rule

    def duplicates(self, entries: Entries) -> Iterator[DeskLine]:
        alike: defaultdict[str, list[Entry]] = defaultdict(list)
        for entry, report in entries:
            if report.molecule.inchikey:
                alike[report.molecule.inchikey].append(entry)
        for inchikey, twins in alike.items():
            for entry in twins[1:]:
                yield self._line(entry, "structure", f"is that of {twins[0].id}: {inchikey}")

    def protocol_lines(self, protocols: Sequence[Checked]) -> Iterator[DeskLine]:
        for checked in protocols:
            for finding in checked.findings:
                file = finding.file.relative_to(self._present.catalogue.root).as_posix()
                said = f"{finding.quoted}: {finding.message}" if finding.quoted else finding.message
                yield DeskLine(file, None, file, finding.line, finding.kind, said)

    def _line(self, entry: Entry, field: str, message: str) -> DeskLine:
        file = entry.file.relative_to(self._present.catalogue.root).as_posix()
        address = compound_address(entry.id)
        return DeskLine(entry.name, address, file, line_of(entry.lines, field), field, message)


def _quarrel(value: PublishedValue) -> bool:
    if value.measured is None or value.calculated is None:
        return False
    unstated = UNSTATED[value.quantity]
    both = (value.uncertainty or unstated) + (value.calculated_uncertainty or unstated)
    return abs(value.measured - value.calculated) > both


def _field_of(entry: Entry, value: PublishedValue) -> str:
    """Return the address of the measurement that a value shows."""
    for index, item in enumerate(entry.measured):
        if item.quantity.value == value.quantity and item.value == value.measured:
            return f"measured[{index}].value"
    return "measured"
