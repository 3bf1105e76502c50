import json

from shapeshelf.catalogue.model import Source
from shapeshelf.pages.comparing import compared_rows, comparison_json
from shapeshelf.report.model import CompoundReport


def test_rows_line_up_by_keys_without_the_centre(
    sf4: CompoundReport, sources: dict[str, Source]
) -> None:
    """F(ax)-S-F(ax) of one compound stands beside F(ax)-Cl-F(ax) of another."""
    rows = {row.key: row for row in compared_rows(sf4, sources)}
    angle = rows["angle F(ax)-•-F(ax)"]
    assert (angle.value, angle.uncertainty, angle.basis) == (173.1, 0.5, "recalled")
    assert rows["shape"].text == "see-saw"
    assert rows["neighbours"].text == "4"


def test_the_file_holds_the_drawing_and_its_size(
    sf4: CompoundReport, sources: dict[str, Source]
) -> None:
    """Everything the page needs of one compound."""
    content = json.loads(comparison_json(sf4, sources))
    assert content["drawing"].startswith("<svg ")
    assert content["width"] > 0 < content["height"]
    assert content["address"] == "compounds/sf4/"
