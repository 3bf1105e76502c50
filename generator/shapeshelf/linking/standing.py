"""Released values stand until something of ours changes them.

* S1  Where neither the entry's structure nor the program's own chemistry changed since the
  release, the model's value stands as released, whatever another version of a package makes
  of it today.
* S2  A model value that moved by less than a page can show stands as released, so that no last
  digit flickers.

Measured and calculated numbers come from the catalogue's own files and need no such rule.
"""

from collections.abc import Sequence
from dataclasses import dataclass, replace

from shapeshelf.linking.published import Published, PublishedCompound, PublishedValue
from shapeshelf.linking.publishing import code_hash, structure_hash
from shapeshelf.pages.anchors import DIPOLE, value_anchors
from shapeshelf.report.model import Basis, CompoundReport, Value

SHOWN = {"angle": 0.05, "length": 0.0005, "dipole": 0.005}
"""Half of the last digit that a page prints of a model value: degrees, ångström, debye."""


@dataclass(frozen=True, slots=True)
class Drift:
    """A model value that the packages of today would change, and that stands as released."""

    compound: str
    anchor: str
    released: float
    today: float


def let_stand(
    reports: Sequence[CompoundReport], released: Published | None
) -> tuple[tuple[CompoundReport, ...], tuple[Drift, ...]]:
    """Return the reports with released model values put back, and those that had drifted."""
    if released is None:
        return tuple(reports), ()
    same_code = code_hash() == released.code
    standing: list[CompoundReport] = []
    drifts: list[Drift] = []
    for report in reports:
        known = released.compounds.get(report.id or "")
        if known is None:
            standing.append(report)
            continue
        kept = _Kept(report, known, same_code)
        standing.append(kept.report())
        drifts += kept.drifts
    return tuple(standing), tuple(drifts)


class _Kept:
    """One report against its released values; remembers what had drifted."""

    def __init__(self, report: CompoundReport, known: PublishedCompound, same_code: bool) -> None:
        self._report = report
        self._known = known
        self._same = (
            same_code
            and report.entry is not None
            and structure_hash(report.entry) == known.structure
        )
        self.drifts: list[Drift] = []

    def report(self) -> CompoundReport:
        anchors = value_anchors(self._report)
        centres = tuple(
            replace(
                centre,
                angles=tuple(
                    replace(row, degrees=self._value(row.degrees, "angle", anchors.get(row.atoms)))
                    for row in centre.angles
                ),
            )
            for centre in self._report.centres
        )
        lengths = tuple(
            replace(row, angstrom=self._value(row.angstrom, "length", anchors[row.atoms]))
            for row in self._report.lengths
        )
        moment = self._report.dipole_debye
        dipole = self._value(moment, "dipole", DIPOLE) if moment else None
        return replace(self._report, centres=centres, lengths=lengths, dipole_debye=dipole)

    def _value(self, value: Value, quantity: str, anchor: str | None) -> Value:
        old = self._known.values.get(anchor or "")
        if old is None or old.model is None or value.model is None or anchor is None:
            return value
        moved = abs(value.model - old.model)
        if not self._same and moved >= SHOWN[quantity]:
            return value
        if moved >= SHOWN[quantity]:
            self.drifts.append(Drift(self._report.id or "", anchor, old.model, value.model))
        return _with_model(value, old)


def _with_model(value: Value, old: PublishedValue) -> Value:
    spread = old.uncertainty if old.basis == Basis.MODEL else value.model_uncertainty
    if value.basis is not Basis.MODEL:
        return replace(value, model=old.model)
    assert old.model is not None
    return replace(
        value, value=old.model, uncertainty=spread, model=old.model, model_uncertainty=spread
    )
