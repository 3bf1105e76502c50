import json
from dataclasses import replace

from shapeshelf.pages.lookup_index import as_script, lookup_facets, lookup_index, lookup_rows
from shapeshelf.pages.lookup_rows import lookup_row
from shapeshelf.report.model import CompoundReport


def test_the_index_holds_what_a_compound_is_found_by(sf4: CompoundReport, renamed) -> None:
    """Columns of equal length, compounds in the order of their names."""
    other = renamed(sf4, id="b", name="another", cas=None, also=())
    index = json.loads(lookup_index(lookup_rows([sf4, other])))
    compounds = index["compounds"]
    assert {len(column) for column in compounds.values()} == {2}
    assert compounds["name"] == ["another", "Sulfur tetrafluoride"]
    row = {key: column[1] for key, column in compounds.items()}
    assert (row["formula"], row["charge"], row["cas"]) == ("SF4", 0, "7783-60-0")
    assert row["angle"] == "173.1"
    assert index["words"]["polarity"][row["polarity"]] == "polar"
    assert index["words"]["shape"][row["shape"]] == "see-saw"


def test_the_usual_end_of_a_key_is_left_out(sf4: CompoundReport) -> None:
    """Any other end stays, so that stereoisomers can be told apart."""
    row = lookup_row(sf4)
    ends = ("-UHFFFAOYSA-N", "-JTQLQIEISA-N")
    rows = [replace(row, inchikey="QHMQWEPBXSHHLH" + end) for end in ends]
    keys = json.loads(lookup_index(rows))["compounds"]["key"]
    assert keys == ["QHMQWEPBXSHHLH", "QHMQWEPBXSHHLH-JTQLQIEISA-N"]


def test_facets_hold_sites_and_angles(sf4: CompoundReport) -> None:
    """One kind of centre, angles between F, S and F in tenths of a degree."""
    row = lookup_row(sf4)
    assert {corner for corner, _ in row.corners} == {"F-S-F"}
    assert 1731 in {tenths for _, tenths in row.corners}
    facets = json.loads(lookup_facets([row]))
    assert facets["words"]["sites"][0][:3] == ["see-saw", 4, 1]
    assert facets["words"]["corners"] == ["F-S-F"]


def test_an_empty_catalogue_has_an_empty_index() -> None:
    """Columns, but nothing in them."""
    index = json.loads(lookup_index([]))
    assert {len(column) for column in index["compounds"].values()} == {0}
    assert index["entries"] == []


def test_data_handed_over_by_a_script_stay_data() -> None:
    """A name that looks like script, quotes and line separators cannot leave their string."""
    name = "</script>\u2028\"';alert(1)//\\"
    script = as_script("x", json.dumps({"name": name}, ensure_ascii=False).encode()).decode()
    assert script.startswith('shapeshelfData.deliver("x","')
    assert "\u2028" not in script
    inner = json.loads(script.removeprefix('shapeshelfData.deliver("x",').removesuffix(");\n"))
    assert json.loads(inner) == {"name": name}
