"""``catalogue.csv``: one line a compound, for a spreadsheet.

A cell that a spreadsheet would take for a formula begins with an apostrophe instead, which it
does not show; numbers stay numbers. The signs are those that OWASP's note "CSV Injection" names
(recalled from memory), and their full-width forms.
"""

import csv
import io
from collections.abc import Sequence

from shapeshelf.pages.addresses import compound_address
from shapeshelf.pages.anchors import shown_angles
from shapeshelf.pages.compound import shape_words
from shapeshelf.pages.properties import polarity_word
from shapeshelf.report.model import CompoundReport, Value

FORMULA_SIGNS = ("=", "+", "-", "@", "\t", "\r", "\n", "＝", "＋", "－", "＠")
BYTE_ORDER_MARK = "\ufeff"
"""By which spreadsheets know UTF-8."""


def catalogue_csv(reports: Sequence[CompoundReport], site_url: str | None) -> bytes:
    """Return the catalogue as CSV in UTF-8, every text quoted."""
    text = io.StringIO()
    writer = csv.writer(text, quoting=csv.QUOTE_NONNUMERIC, lineterminator="\r\n")
    rows = [_row(report, site_url or "") for report in reports]
    writer.writerow(_row_names())
    writer.writerows([_safe(cell) for cell in row.values()] for row in rows)
    return (BYTE_ORDER_MARK + text.getvalue()).encode()


def safe_cell(text: str) -> str:
    """Return a text that no spreadsheet takes for a formula; a number stays as it is."""
    if not text.lstrip(" \u00a0").startswith(FORMULA_SIGNS) or _is_number(text):
        return text
    return "'" + text


def _safe(cell: str | float | None) -> str | float:
    if cell is None:
        return ""
    return safe_cell(cell) if isinstance(cell, str) else cell


def _is_number(text: str) -> bool:
    try:
        float(text)
    except ValueError:
        return False
    return not text.strip().lower().lstrip("+-").startswith(("inf", "nan"))


def _row_names() -> list[str]:
    return [
        "id", "name", "formula", "charge", "cas", "code", "kept", "owner", "shape", "point_group",
        "polarity", "dipole_debye", "dipole_uncertainty_debye", "dipole_basis", "angles_degrees",
        "molar_mass_g_mol", "smiles", "inchikey", "hazards", "tags", "used_in", "address",
    ]  # fmt: skip


def _row(report: CompoundReport, site_url: str) -> dict[str, str | float | None]:
    entry, molecule, dipole = report.entry, report.molecule, report.dipole_debye
    assert entry is not None
    cells: tuple[str | float | None, ...] = (
        entry.id,
        entry.name,
        molecule.formula,
        molecule.charge,
        entry.cas,
        entry.code,
        entry.kept,
        entry.owner,
        shape_words(report),
        report.point_group,
        polarity_word(report),
        round(dipole.value, 3) if dipole else None,
        round(dipole.uncertainty, 3) if dipole and dipole.uncertainty is not None else None,
        dipole.basis.value if dipole else None,
        "; ".join(f"{row.of} {_number(row.degrees)}" for row in shown_angles(report)),
        round(report.molar_mass_g_mol, 3),
        molecule.smiles,
        molecule.inchikey,
        " ".join(entry.hazards),
        ", ".join(entry.tags),
        " ".join(entry.used_in),
        site_url + compound_address(entry.id),
    )
    return dict(zip(_row_names(), cells, strict=True))


def _number(value: Value) -> str:
    spread = "" if value.uncertainty is None else f" ± {value.uncertainty:.1f}"
    return f"{value.value:.1f}{spread} ({value.basis.value})"
