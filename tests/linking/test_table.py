"""``catalogue.csv`` in a spreadsheet."""

import csv
import io
from pathlib import Path

import pytest

from shapeshelf.linking.table import FORMULA_SIGNS, catalogue_csv, safe_cell
from shapeshelf.report.checking import report_on_catalogue


@pytest.mark.parametrize(
    ("text", "safe"),
    [
        ("=1+2", "'=1+2"),
        ("+SUM(A1)", "'+SUM(A1)"),
        ("-2+3", "'-2+3"),
        ("@import", "'@import"),
        ("\t=1", "'\t=1"),
        (" =1", "' =1"),
        ("＝1", "'＝1"),
        ("-inf", "'-inf"),
        ("-1", "-1"),
        ("+1.5e-3", "+1.5e-3"),
        ("(+)-camphor", "(+)-camphor"),
        ("sulfur = S", "sulfur = S"),
        ("", ""),
    ],
)
def test_a_formula_becomes_a_text_and_a_number_stays(text: str, safe: str) -> None:
    assert safe_cell(text) == safe


def test_no_cell_of_a_hostile_catalogue_is_a_formula(tmp_path: Path) -> None:
    """Line breaks, quotes and separators in a field add no cell either."""
    hostile = [f'{sign}x"; ,HYPERLINK(1)' for sign in "=+-@"]
    for number, text in enumerate(hostile):
        entry = f"id: c{number}\nname: '{text}{number}'\nstructure: O\n"
        entry += f"kept: '{text}'\ntags: ['{text}']\n"
        (tmp_path / f"c{number}.yml").write_text(entry)
    (tmp_path / "ion.yml").write_text("id: ion\nname: Hydroxide\nstructure: '[OH-]'\n")
    _, reports = report_on_catalogue(tmp_path)
    rows = list(csv.reader(io.StringIO(catalogue_csv(reports, None).decode("utf-8-sig"))))
    assert {len(row) for row in rows} == {len(rows[0])}
    ion = dict(zip(rows[0], rows[-1], strict=True))
    assert (ion["id"], ion["charge"]) == ("ion", "-1")
    cells = [cell for row in rows for cell in row if cell != "-1"]
    assert not any(cell.startswith(FORMULA_SIGNS) for cell in cells)
    kept = rows[0].index("kept")
    assert [row[kept] for row in rows[1:5]] == [f"'{text}" for text in hostile]
