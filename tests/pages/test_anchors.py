"""Anchors of values: promises to whoever links to them."""

from dataclasses import replace

import pytest

from shapeshelf.catalogue.model import Measurement, Quantity
from shapeshelf.pages.anchors import frequency_anchors, value_anchors
from shapeshelf.report.building import report_on_structure
from shapeshelf.report.model import CompoundReport


@pytest.mark.parametrize(
    ("structure", "expected"),
    [
        (
            "FS(F)(F)F",
            {
                "angle-f-ax-s-f-ax",
                "angle-f-ax-s-f-eq",
                "angle-f-eq-s-f-eq",
                "length-s-f-ax",
                "length-s-f-eq",
            },
        ),
        ("O", {"angle-h-o-h", "length-o-h"}),
        ("F[Xe](F)(F)F", {"angle-f-xe-f", "angle-f-xe-f-trans", "length-xe-f"}),
    ],
)
def test_an_anchor_is_quantity_and_label_in_small_letters(
    structure: str, expected: set[str]
) -> None:
    """Rule A1."""
    assert set(value_anchors(report_on_structure(structure)).values()) == expected


def test_two_rows_of_one_label_have_two_anchors(sf4: CompoundReport) -> None:
    """Rule A2: the first keeps the plain one."""
    first = sf4.lengths[0]
    again = replace(first, atoms=(7, 8))
    third = replace(first, atoms=(8, 9))
    doubled = replace(sf4, lengths=(first, again, third))
    anchors = value_anchors(doubled)
    plain = anchors[first.atoms]
    assert (anchors[(7, 8)], anchors[(8, 9)]) == (f"{plain}-2", f"{plain}-3")


def test_no_two_values_of_a_large_molecule_share_an_anchor() -> None:
    """Many alike ligands and centres, an element symbol within another's letters."""
    report = report_on_structure("CC(C)(C)c1ccc(Cl)c(OC)c1")
    anchors = list(value_anchors(report).values())
    assert len(set(anchors)) == len(anchors) > 20


def test_a_vibration_goes_by_its_label_or_its_number(
    sf4: CompoundReport, measurement: Measurement
) -> None:
    """Rule A3."""
    frequency = replace(measurement, quantity=Quantity.FREQUENCY, value=892.0)
    measured = (replace(frequency, of="S-F stretch A1"), replace(frequency, of=None))
    assert sf4.entry is not None
    report = replace(sf4, entry=replace(sf4.entry, measured=measured))
    anchors = [anchor for _, anchor in frequency_anchors(report)]
    assert anchors == ["frequency-s-f-stretch-a1", "frequency-892"]
