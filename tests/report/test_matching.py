"""A measured value goes to the row its label means, and to no other."""

from pathlib import Path

import pytest

from shapeshelf.catalogue.model import Entry, Measurement, Quantity, StructureInput
from shapeshelf.report.building import report_on_entry
from shapeshelf.report.model import Basis


def entry_with(smiles, *labels, quantity=Quantity.ANGLE):
    return Entry(
        id="probe",
        name="Probe",
        structure=StructureInput(smiles, None),
        file=Path("probe.yml"),
        measured=tuple(
            Measurement(quantity, label, value, "degree", spread, None, None, "s", None, 1)
            for label, value, spread in labels
        ),
    )


def measured_rows(report):
    return {
        row.of: row.degrees.measured
        for centre in report.centres
        for row in centre.angles
        if row.degrees.measured is not None
    }


@pytest.mark.parametrize(
    ("smiles", "label", "row"),
    [
        ("FS(F)(F)F", "F(eq)-S-F(ax)", "F(ax)-S-F(eq)"),
        ("FS(F)(F)F", "F(ax)-S-F(ax)", "F(ax)-S-F(ax)"),
        ("O[N+](=O)[O-]", "H-O-N", "N-O1-H"),
        ("O[N+](=O)[O-]", "O3-N-O2", "O2-N-O3"),
        ("F[Xe](F)(F)F", "F-Xe-F", "F-Xe-F"),
        ("CC(C)O", "C3-C2-O", "C1-C2-O"),
    ],
)
def test_label_finds_its_row(smiles, label, row):
    """Either end first, own labels of any member, bare elements where only one row fits."""
    report = report_on_entry(entry_with(smiles, (label, 100.0, None)))
    assert measured_rows(report) == {row: 100.0}
    assert report.unmatched == ()


@pytest.mark.parametrize(
    ("smiles", "label"),
    [("FS(F)(F)F", "F-S-F"), ("O[N+](=O)[O-]", "O-N-O"), ("O", "H-S-H")],
)
def test_label_that_could_mean_several_rows_means_none(smiles, label):
    report = report_on_entry(entry_with(smiles, (label, 100.0, None)))
    assert measured_rows(report) == {}
    assert [item.of for item in report.unmatched] == [label]


def test_the_most_precise_of_two_measurements_is_shown():
    report = report_on_entry(entry_with("O", ("H-O-H", 104.0, 1.0), ("H-O-H", 104.5, 0.1)))
    assert measured_rows(report) == {"H-O-H": 104.5}


def test_measured_beats_model_and_both_stay():
    """The best basis gives the value; the model's stands beside it."""
    report = report_on_entry(entry_with("O", ("H-O-H", 104.5, 0.1)))
    value = report.centres[0].angles[0].degrees
    assert (value.basis, value.value, value.uncertainty) == (Basis.MEASURED, 104.5, 0.1)
    assert value.model is not None
    assert value.model != value.value
