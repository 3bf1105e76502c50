"""What a record adds to a report, and when it does not count."""

import json
import subprocess
import sys
from dataclasses import replace

import pytest

from shapeshelf.calculation.accuracy import ACCURACY
from shapeshelf.calculation.keys import structure_key
from shapeshelf.calculation.model import CalculationRecord, Level, Mode, Outcome
from shapeshelf.calculation.records import record_path, write_record
from shapeshelf.catalogue.model import Entry, Measurement, Quantity, StructureInput
from shapeshelf.report.building import report_on_entry
from shapeshelf.report.calculated import vibrations_of
from shapeshelf.report.json import report_json
from shapeshelf.report.model import Basis
from shapeshelf.structure.reading import read_smiles

WATER = ((0.0, 0.757, -0.521), (0.0, -0.757, -0.521), (0.0, 0.0, 0.0656))
"""Settled order: hydrogens first. 104.4 degrees and 0.958 Å, by trigonometry."""
SHAPE_DEGREES, SHAPE_ANGSTROM = 0.1, 0.001
MEASURED = Measurement(
    Quantity.ANGLE, "H-O-H", 104.5, "degree", 0.1, "gas", None, "handbook", None, 1
)
WITHOUT_PROGRAMS = """
import sys
for name in ("pyscf", "tblite", "dask", "distributed"):
    sys.modules[name] = None
from pathlib import Path
from shapeshelf.report.checking import report_on_catalogue
from shapeshelf.report.json import report_json
import json
_, reports = report_on_catalogue(Path(sys.argv[1]))
print(json.dumps([report_json(report) for report in reports], ensure_ascii=False))
"""


def water_record(**changes):
    values = {
        "key": structure_key(read_smiles("O"), 1),
        "level": Level.DFT,
        "method": "PBE0/def2-TZVP",
        "engines": (),
        "settings": (),
        "outcome": Outcome.MINIMUM,
        "elements": ("H", "H", "O"),
        "coordinates_angstrom": WATER,
        "dipole_debye": (0.0, 0.0, -1.86),
        "modes": (Mode(1623.4, 81.9), Mode(3852.2, 6.5), Mode(3960.3, 50.2)),
        "point_group": "C2v",
    }
    return CalculationRecord(**{**values, **changes})


@pytest.fixture
def report(tmp_path):
    """Return a function that writes a record and gives the report of an entry beside it."""

    def make(record=None, smiles="O", measured=()):
        if record is not None:
            write_record(record_path(tmp_path, "water"), record)
        structure = StructureInput(smiles=smiles, file=None)
        entry = Entry("water", "Water", structure, tmp_path / "water.yml", measured=measured)
        return report_on_entry(entry, tmp_path)

    return make


def test_calculated_beats_model(report):
    """Angle, length, moment and point group rest on the record; the model stands beside."""
    found = report(water_record())
    angle, length = found.centres[0].angles[0].degrees, found.lengths[0].angstrom
    assert (angle.basis, length.basis, found.dipole_debye.basis) == (Basis.CALCULATED,) * 3
    assert angle.value == pytest.approx(104.4, abs=SHAPE_DEGREES)
    assert length.value == pytest.approx(0.958, abs=SHAPE_ANGSTROM)
    assert found.dipole_debye.value == pytest.approx(1.86)
    assert angle.uncertainty == ACCURACY[Level.DFT].angle_degrees
    assert angle.source == "PBE0/def2-TZVP"
    assert angle.model is not None
    assert angle.model != angle.value
    assert (found.point_group, found.point_group_basis) == ("C2v", Basis.CALCULATED)
    assert [band.wavenumber_per_cm for band in found.frequencies.bands] == [1623.4, 3852.2, 3960.3]


def test_what_the_point_group_fixes_has_a_half_width_of_nought(report):
    """Carbon dioxide: its angle and its lack of a moment, in the record and in the model."""
    line = ((0.0, 0.0, 0.0), (0.0, 0.0, -1.16), (0.0, 0.0, 1.16))
    record = water_record(
        key=structure_key(read_smiles("O=C=O"), 1),
        elements=("C", "O", "O"),
        coordinates_angstrom=line,
        dipole_debye=(0.0, 0.0, 1e-6),
        modes=(),
        point_group="Dinfh",
    )
    found = report(record, "O=C=O")
    angle, moment = found.centres[0].angles[0].degrees, found.dipole_debye
    assert (angle.basis, angle.calculated_uncertainty, angle.model_uncertainty) == (
        Basis.CALCULATED,
        0.0,
        0.0,
    )
    assert (moment.basis, moment.value, moment.uncertainty) == (Basis.CALCULATED, 0.0, 0.0)


def test_the_half_width_reaches_every_member_of_a_row(report):
    """Water bent out of shape: bonds of 0.958 and 1.058 Å are one row, 0.05 Å from its mean."""
    stretched = (WATER[0], tuple(1.1044 * h - 0.1044 * o for h, o in zip(*WATER[1:], strict=True)))
    value = report(water_record(coordinates_angstrom=(*stretched, WATER[2]))).lengths[0].angstrom
    assert value.calculated == pytest.approx(1.008, abs=SHAPE_ANGSTROM)
    assert value.uncertainty == pytest.approx(0.05, abs=SHAPE_ANGSTROM)


def test_measured_beats_calculated(report):
    """The calculated value stays beside it."""
    value = report(water_record(), measured=(MEASURED,)).centres[0].angles[0].degrees
    assert (value.basis, value.value, value.source) == (Basis.MEASURED, 104.5, "handbook")
    assert value.calculated == pytest.approx(104.4, abs=SHAPE_DEGREES)


@pytest.mark.parametrize("smiles", ["O", "[H]O[H]", "[OH2]"])
def test_every_spelling_has_the_record(report, smiles):
    """The record's atoms find their place."""
    value = report(water_record(), smiles).centres[0].angles[0].degrees
    assert value.calculated == pytest.approx(104.4, abs=SHAPE_DEGREES)


@pytest.mark.parametrize(
    ("record", "smiles"),
    [
        (None, "O"),
        (water_record(), "S"),
        (water_record(outcome=Outcome.NO_MINIMUM, failure="80 steps", dipole_debye=None), "O"),
    ],
)
def test_without_a_record_that_counts_the_model_stands(report, record, smiles):
    """None, one of another structure, or a failure: no calculated value anywhere."""
    found = report(record, smiles)
    assert found.centres[0].angles[0].degrees.basis is Basis.MODEL
    assert found.point_group_basis is Basis.MODEL
    assert found.frequencies is None


def test_a_failure_is_told(report):
    """The report carries the record, so that a page can say why there is no value."""
    found = report(water_record(outcome=Outcome.NO_MINIMUM, failure="80 steps"))
    assert report_json(found)["calculation"]["failure"] == "80 steps"


def test_labels_do_not_depend_on_a_record(report):
    """A protocol's quotation of a row survives the record's coming and going."""
    with_record, without = (
        report(water_record()),
        report(replace(water_record(), key=structure_key(read_smiles("S"), 1))),
    )
    assert [row.of for row in with_record.centres[0].angles] == [
        row.of for row in without.centres[0].angles
    ]


def test_the_programs_make_no_difference_to_a_build(tmp_path):
    """Reports of one catalogue are equal with the extra and without it."""
    (tmp_path / "water.yml").write_text("id: water\nname: Water\nstructure: O\n", "utf-8")
    write_record(record_path(tmp_path, "water"), water_record())
    with_extra = WITHOUT_PROGRAMS.replace("sys.modules[name] = None", "__import__(name)")
    outputs = [
        subprocess.run(
            [sys.executable, "-c", script, str(tmp_path)],
            capture_output=True,
            text=True,
            check=True,
        ).stdout
        for script in (WITHOUT_PROGRAMS, with_extra)
    ]
    assert outputs[0] == outputs[1]
    assert json.loads(outputs[0])[0]["point_group"]["basis"] == "calculated"


def test_members_of_a_degenerate_mode_are_one_band():
    """Their intensities add up; modes of other species stay apart, however near."""
    modes = (
        Mode(523.4, 0.0, "T2g", 0.1),
        Mode(523.6, 1.0, "T1u", 0.3),
        Mode(523.6, 2.0, "T1u", 0.3),
        Mode(900.0, 5.0),
        Mode(900.0, 6.0),
    )
    bands = vibrations_of(water_record(modes=modes)).bands
    assert [(band.species, band.degeneracy) for band in bands] == [
        ("T2g", 1),
        ("T1u", 2),
        (None, 1),
        (None, 1),
    ]
    assert [band.intensity_km_per_mol for band in bands] == [0.0, 3.0, 5.0, 6.0]
