"""The index that the lookup reads: one list a field, which compresses better than rows."""

import json
from collections import Counter
from collections.abc import Sequence

from shapeshelf.pages.addresses import shape_address
from shapeshelf.pages.compound import shape_words
from shapeshelf.pages.properties import polarity_word
from shapeshelf.pages.typesetting import formula_text, point_group_text
from shapeshelf.pages.values import DEGREE, value_view
from shapeshelf.report.model import CompoundReport

SCHEMA = 1


def lookup_index(reports: Sequence[CompoundReport]) -> bytes:
    """Return the index as compact JSON: ``compounds`` by field, ``shapes`` by field."""
    index = {
        "schema": SCHEMA,
        "compounds": _columns([_compound_row(report) for report in by_name(reports)]),
        "shapes": _columns(_shape_rows(reports)),
    }
    return json.dumps(index, ensure_ascii=False, separators=(",", ":")).encode()


def by_name(reports: Sequence[CompoundReport]) -> list[CompoundReport]:
    """Return the reports in the order of a reader's alphabet."""
    return sorted(reports, key=lambda report: (report.name.casefold(), report.id or ""))


def shapes_held(report: CompoundReport) -> tuple[str, ...]:
    """Return every shape a compound shows, at whichever centre; the overall one first."""
    own = [report.shape] if report.shape else []
    return tuple(dict.fromkeys([*own, *(c.shape for c in report.centres if c.shape)]))


def _compound_row(report: CompoundReport) -> dict[str, object]:
    entry = report.entry
    assert entry is not None
    return {
        "id": entry.id,
        "name": entry.name,
        "also": list(entry.also),
        "formula": formula_text(report.molecule.formula, report.molecule.charge),
        "cas": entry.cas or "",
        "code": entry.code or "",
        "shape": shape_words(report),
        "group": point_group_text(report.point_group),
        "angle": _first_angle(report),
        "polarity": polarity_word(report),
        "tags": list(entry.tags),
    }


def _first_angle(report: CompoundReport) -> str:
    """Return the angle that stands for a compound of one kind of centre, measured if it can be."""
    kinds = {min(centre.equivalent, default=centre.centre.atom) for centre in report.centres}
    if len(kinds) != 1:
        return ""
    rows = sorted(report.centres[0].angles, key=lambda row: row.degrees.basis != "measured")
    return value_view(rows[0].degrees, DEGREE, {}).text if rows else ""


def _shape_rows(reports: Sequence[CompoundReport]) -> list[dict[str, object]]:
    counted = Counter(shape for report in reports for shape in shapes_held(report))
    return [
        {"name": shape, "address": shape_address(shape), "count": count}
        for shape, count in sorted(counted.items())
    ]


def _columns(rows: Sequence[dict[str, object]]) -> dict[str, list[object]]:
    return {key: [row[key] for row in rows] for key in rows[0]} if rows else {}
