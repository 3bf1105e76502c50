"""What counts as a change since the release, and the reason that is given for it."""

from dataclasses import replace

import pytest

from shapeshelf.linking.changes import Reason, compare, withdrawn_compounds
from shapeshelf.linking.published import Published, read_published, write_published

ANGLE = "angle-f-ax-s-f-ax"


def altered(published: Published, anchor: str = ANGLE, structure: str = "", **fields) -> Published:
    """Return the values with those of one of SF4's replaced; ``None`` takes it away."""
    sf4 = published.compounds["sf4"]
    values = dict(sf4.values)
    if fields:
        values[anchor] = replace(values[anchor], **fields)
    else:
        del values[anchor]
    compound = replace(sf4, values=values, structure=structure or sf4.structure)
    return replace(published, compounds={**published.compounds, "sf4": compound})


def as_model(published: Published) -> Published:
    return altered(published, basis="model", measured=None, value=171.8, uncertainty=2.0)


@pytest.mark.parametrize(
    ("was", "now", "reason"),
    [
        ({}, {"value": 172.0, "measured": 172.0}, Reason.MEASUREMENT),
        ({"basis": "calculated"}, {"value": 172.0}, Reason.MEASUREMENT),
        (
            {"basis": "calculated", "measured": None},
            {"basis": "calculated", "measured": None, "value": 171.0},
            Reason.CALCULATION,
        ),
        (
            {"basis": "model", "measured": None},
            {"basis": "model", "measured": None, "value": 171.0},
            Reason.MODEL,
        ),
        (
            {"basis": "model", "measured": None},
            {"basis": "model", "measured": None, "value": 171.0, "structure": "1" * 16},
            Reason.STRUCTURE,
        ),
        (
            {"basis": "supplied", "measured": None},
            {"basis": "supplied", "measured": None, "value": 171.0},
            Reason.STRUCTURE,
        ),
    ],
)
def test_a_value_that_differs_is_listed_with_its_reason(published, was, now, reason) -> None:
    """Old and new value, the anchor, and what changed."""
    before = altered(published, **{"uncertainty": 0.5, **was})
    after = altered(published, **{"uncertainty": 0.5, **now})
    (change,) = compare(before, after).values
    assert (change.compound, change.anchor, change.reason) == ("sf4", ANGLE, reason)
    assert change.old.startswith("173.1°")
    assert change.new.startswith(("171°", "172°"))
    assert change.used_in == ("p1",)


def test_nothing_differs_from_itself_nor_before_the_first_release(published) -> None:
    assert compare(published, published).values == ()
    assert compare(None, published).values == ()
    assert compare(None, published).added == ()


def test_a_value_that_comes_or_goes_is_a_change(published) -> None:
    """It is listed at its section, since its own anchor is gone."""
    without = altered(published)
    (gone,) = compare(published, without).values
    (come,) = compare(without, published).values
    assert (gone.anchor, gone.new) == ("angles", "–")
    assert (come.anchor, come.old) == (ANGLE, "–")


def test_a_changed_shape_is_a_change(published) -> None:
    sf4 = published.compounds["sf4"]
    other = replace(sf4, facts={**sf4.facts, "shape": "tetrahedral"})
    after = replace(published, compounds={**published.compounds, "sf4": other})
    (change,) = compare(published, after).values
    assert (change.of, change.old, change.new) == ("shape", "bent", "tetrahedral")


def test_an_entry_that_moved_is_compared_under_its_new_id(published) -> None:
    """Its earlier id is in ``formerly``, so it is neither added nor withdrawn."""
    compounds = dict(published.compounds)
    compounds["sulfur-fluoride"] = replace(compounds.pop("sf4"), formerly=("sf4",))
    found = compare(published, replace(published, compounds=compounds))
    assert (found.values, found.added, found.withdrawn) == ((), (), ())


def test_an_entry_that_is_gone_is_withdrawn_and_stays_so(published) -> None:
    """Also when it was withdrawn before the last release already."""
    present = replace(published, compounds={"sf4": published.compounds["sf4"]})
    assert compare(published, present).withdrawn == ("bf3", "h2o", "nh3", "so2f2")
    gone = withdrawn_compounds(published, frozenset({"sf4", "h2o", "nh3", "bf3"}))
    assert set(gone) == {"so2f2", "sf5cl"}


def test_what_is_written_reads_back(published, tmp_path) -> None:
    """The document gives the same record again, compact or indented."""
    for indent in (None, 1):
        path = tmp_path / "values.json"
        path.write_text(write_published(published, indent), "utf-8")
        again = read_published(path)
        assert again.compounds == {key: published.compounds[key] for key in again.compounds}
        assert set(again.compounds) == set(published.compounds)
        assert again.withdrawn == published.withdrawn
        assert (again.site, again.code) == (published.site, published.code)
