from dataclasses import replace
from pathlib import Path

from shapeshelf.catalogue.model import Catalogue, Source
from shapeshelf.pages.home import first_compounds
from shapeshelf.pages.start import start_view
from shapeshelf.report.model import CompoundReport


def test_the_first_compounds_build_on_each_other(sf4: CompoundReport, renamed) -> None:
    """Few domains before many, no lone pair before one; without a reason none is named."""
    counts = {"b": (3, 1), "a": (4, 1), "c": (4, 0), "d": (2, 0)}
    reports = [_with_centre(_wanted(renamed(sf4, id=key)), *counts[key]) for key in counts]
    lines = first_compounds([*reports, renamed(sf4, id="e", start_here=None)])
    assert [line.address for line in lines] == [f"compounds/{key}/" for key in "dcba"]


def test_a_sheet_is_explained_on_a_measured_angle(
    sf4: CompoundReport, sources: dict[str, Source]
) -> None:
    """With the anchor it has on the compound's page, so that it can be cited as shown."""
    catalogue = Catalogue(Path("compounds"), (), sources, {})
    example = start_view(catalogue, [sf4]).example
    assert example is not None
    assert example.angle is not None
    assert (example.angle.value.basis, example.angle.anchor) == ("measured", "angle-f-ax-s-f-ax")
    assert example.notation == "AX<sub>4</sub>E"


def _wanted(report: CompoundReport) -> CompoundReport:
    assert report.entry is not None
    return replace(report, entry=replace(report.entry, start_here="A reason."))


def _with_centre(report: CompoundReport, bonded: int, lone_pairs: int) -> CompoundReport:
    (one,) = report.centres
    counted = replace(one.centre, bonded=bonded, lone_pairs=lone_pairs)
    return replace(report, centres=(replace(one, centre=counted),))
