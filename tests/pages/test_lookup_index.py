import json

from shapeshelf.pages.lookup_index import lookup_index
from shapeshelf.report.model import CompoundReport


def test_the_index_holds_what_a_compound_is_found_by(sf4: CompoundReport, renamed) -> None:
    """Columns of equal length, compounds in the order of their names, shapes counted."""
    other = renamed(sf4, id="b", name="another", cas=None, also=())
    index = json.loads(lookup_index([sf4, other]))
    compounds = index["compounds"]
    assert {len(column) for column in compounds.values()} == {2}
    assert compounds["name"] == ["another", "Sulfur tetrafluoride"]
    row = {key: column[1] for key, column in compounds.items()}
    assert row["formula"] == "SF₄"
    assert row["cas"] == "7783-60-0"
    assert row["angle"] == "173.1°"
    assert row["polarity"] == "polar"
    assert index["shapes"] == {"name": ["see-saw"], "address": ["shapes/see-saw/"], "count": [2]}


def test_an_empty_catalogue_has_an_empty_index() -> None:
    """No column, no row."""
    assert json.loads(lookup_index([])) == {"schema": 1, "compounds": {}, "shapes": {}}
