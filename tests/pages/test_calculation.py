"""The record of a calculation in the words of a page."""

import pytest

from shapeshelf.calculation.model import (
    CalculationRecord,
    ConformerResult,
    Level,
    Outcome,
    PlacementResult,
    StructureKey,
)
from shapeshelf.pages.calculation import calculation_view

PLACEMENTS = (
    PlacementResult("square planar", "", 0.0, 0.0, 0, True),
    PlacementResult("see-saw", "F, F axial", 0.05, 173.12, 1, False),
    PlacementResult("see-saw", "F, lone pair axial", 0.06, 0.0, 0, True),
    PlacementResult("irregular", "", 0.07, None, 3, False),
)


def record(**changes):
    values = {
        "key": StructureKey("F[Xe](F)(F)F", 0, 1, None, "0" * 16),
        "level": Level.DFT,
        "method": "PBE0/def2-TZVP",
        "engines": (("pyscf", "2.14.0"), ("tblite", "0.8.0")),
        "settings": (("functional", "PBE0"),),
        "outcome": Outcome.MINIMUM,
    }
    return CalculationRecord(**{**values, **changes})


def test_no_record_no_view():
    """Nothing is printed."""
    assert calculation_view(None) is None


def test_method_and_programs():
    """With versions."""
    view = calculation_view(record(spin_squared=0.75344, warnings=("a note",)))
    assert (view.method, view.failure, view.spin) == ("PBE0/def2-TZVP", "", "0.753")
    assert view.programs.replace("\u00a0", " ") == "pyscf 2.14.0, tblite 0.8.0"
    assert view.warnings == ("a note",)


def test_placements_say_which_wins():
    """Its energy, the structure that it ends in, or that none was found."""
    lines = calculation_view(record(placements=PLACEMENTS)).placements
    assert [line.energy.replace("\u00a0", " ") for line in lines] == [
        "0.0 kJ/mol",
        "173.1 kJ/mol",
        "becomes square planar",
        "no minimum found",
    ]
    assert [line.shape for line in lines][1:3] == [
        "see-saw, F, F axial",
        "see-saw, F, lone pair axial",
    ]
    assert [line.wins for line in lines] == [True, False, True, False]


@pytest.mark.parametrize(
    ("count", "words"), [(1, "one conformer within"), (3, "3 conformers within")]
)
def test_conformers_in_one_sentence(count, words):
    """How many, how much the lowest weighs, and the moment with its spread."""
    found = ConformerResult(Level.XTB, count, 15.0, 298.15, 0.314, 1.25, 0.0, 3.02)
    text = calculation_view(record(conformers=found)).conformers.replace("\u00a0", " ")
    assert text.startswith(words)
    assert "the lowest 31% at 298.15 K" in text
    assert "1.25 D on average, 0.00 to 3.02 D" in text


def test_a_failure_says_why():
    """No value, one reason."""
    view = calculation_view(record(outcome=Outcome.NO_MINIMUM, failure="not found in 80 steps"))
    assert view.failure == "no minimum found: not found in 80 steps"
