"""The index that the lookup reads, in two files: what a compound is found by, and what the
lookup page filters by. One list a field, and words by number, which compresses better than rows.
"""

import json
from collections.abc import Iterable, Sequence
from typing import Any

from shapeshelf.pages.lookup_rows import LookupRow, lookup_row
from shapeshelf.pages.packed_numbers import packed
from shapeshelf.report.model import CompoundReport

SCHEMA = 2
INDEX = "lookup-index"
FACETS = "lookup-facets"
KEY_BLOCK = 14
"""Letters of an InChIKey's first block, which alone says what is bonded to what."""
USUAL_KEY_END = "-UHFFFAOYSA-N"
"""Of a neutral molecule without stereo or isotope layers; left out, for most keys end so."""

Entry = dict[str, object]


def lookup_rows(reports: Sequence[CompoundReport]) -> list[LookupRow]:
    """Return the rows of all reports in the order of a reader's alphabet."""
    return [lookup_row(report) for report in by_name(reports)]


def by_name(reports: Sequence[CompoundReport]) -> list[CompoundReport]:
    """Return the reports in the order of a reader's alphabet."""
    return sorted(reports, key=lambda report: (report.name.casefold(), report.id or ""))


def shapes_held(report: CompoundReport) -> tuple[str, ...]:
    """Return every shape a compound shows, at whichever centre; the overall one first."""
    own = [report.shape] if report.shape else []
    return tuple(dict.fromkeys([*own, *(c.shape for c in report.centres if c.shape)]))


def lookup_index(
    rows: Sequence[LookupRow], entries: Sequence[Entry] = (), glyphs: dict[str, str] | None = None
) -> bytes:
    """Return what is found: compounds by field, and ``entries``, all that is no compound.

    ``glyphs`` are our own small drawings by the name of the shape.
    """
    shapes, groups = _Words(), _Words()
    polarities, tags, glyph_names = _Words(), _Words(), _Words()
    compounds = {
        "id": [row.id for row in rows],
        "name": [row.name for row in rows],
        "also": [list(row.also) or 0 for row in rows],
        "formula": [row.formula for row in rows],
        "charge": [row.charge for row in rows],
        "cas": [row.cas for row in rows],
        "code": [row.code for row in rows],
        "spelling": [row.spelling for row in rows],
        "smiles": [row.smiles for row in rows],
        "key": [row.inchikey.removesuffix(USUAL_KEY_END) for row in rows],
        "shape": [shapes.number(row.shape) for row in rows],
        "glyph": [glyph_names.number(row.glyph) for row in rows],
        "group": [groups.number(row.group) for row in rows],
        "angle": [row.angle for row in rows],
        "polarity": [polarities.number(row.polarity) for row in rows],
        "tags": [[tags.number(tag) for tag in row.tags] or 0 for row in rows],
    }
    return _json(
        {
            "schema": SCHEMA,
            "compounds": compounds,
            "words": {
                "shape": shapes.known,
                "glyph": glyph_names.known,
                "group": groups.known,
                "polarity": polarities.known,
                "tags": tags.known,
            },
            "entries": list(entries),
            "glyphs": glyphs or {},
        }
    )


def lookup_facets(rows: Sequence[LookupRow]) -> bytes:
    """Return what is filtered by, in the order of ``lookup_index``'s compounds."""
    sites, hazards, bases = _Words(), _Words(), _Words()
    corners, nuclei = _Words(), _Words()
    angles = [_angles(row, corners) for row in rows]
    compounds = {
        "sites": [[sites.number(site) for site in row.sites] for row in rows],
        "hazards": [[hazards.number(code) for code in row.hazards] or 0 for row in rows],
        "bases": [[bases.number(basis) for basis in row.bases] for row in rows],
        "corners": [packed(which) for which, _ in angles],
        "angles": [packed(steps) for _, steps in angles],
        "dipole": [row.dipole_debye for row in rows],
        "mass": [row.molar_mass_g_mol for row in rows],
        "stretches": [row.infrared_stretches for row in rows],
        "signals": [
            _flat((nuclei.number(nucleus), count) for nucleus, count in row.signals) or 0
            for row in rows
        ],
    }
    words = {
        "sites": [[s.shape, s.bonded, s.lone_pairs, s.hybridisation] for s in sites.known],
        "hazards": hazards.known,
        "bases": bases.known,
        "corners": corners.known,
        "nuclei": nuclei.known,
    }
    return _json({"schema": SCHEMA, "compounds": compounds, "words": words})


def as_script(name: str, data: bytes) -> bytes:
    """Return JSON as a script that hands it over: pages opened as files may not fetch.

    The script calls ``shapeshelfData.deliver(NAME, TEXT)`` with the JSON as one string.
    """
    text = json.dumps(data.decode("utf-8"), ensure_ascii=False)
    safe = text.replace("\u2028", "\\u2028").replace("\u2029", "\\u2029")
    return f"shapeshelfData.deliver({json.dumps(name)},{safe});\n".encode()


def _angles(row: LookupRow, corners: "_Words") -> tuple[list[int], list[int]]:
    """Return (corner, how many angles, …) and each corner's angles as steps upwards from nought."""
    held: dict[str, list[int]] = {}
    for corner, tenths in row.corners:
        held.setdefault(corner, []).append(tenths)
    which: list[int] = []
    steps: list[int] = []
    for corner, values in held.items():
        which += [corners.number(corner), len(values)]
        upwards = sorted(values)
        steps += [b - a for a, b in zip([0, *upwards], upwards, strict=False)]
    return which, steps


class _Words:
    """Gives each distinct thing the next number, in the order in which they are met."""

    def __init__(self) -> None:
        self._numbers: dict[object, int] = {}

    def number(self, thing: object) -> int:
        """Return the thing's number."""
        return self._numbers.setdefault(thing, len(self._numbers))

    @property
    def known(self) -> list[Any]:
        """Return every thing met, in the order of their numbers."""
        return list(self._numbers)


def _flat(pairs: Iterable[tuple[int, int]]) -> list[int]:
    return [number for pair in pairs for number in pair]


def _json(content: object) -> bytes:
    return json.dumps(content, ensure_ascii=False, separators=(",", ":")).encode()
