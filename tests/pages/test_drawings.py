"""Figures of a page are drawn once for each content."""

from dataclasses import replace

from shapeshelf.pages.drawings import compound_figures
from shapeshelf.report.model import CompoundReport
from shapeshelf.report.revision import revision


def test_a_report_that_says_the_same_is_not_drawn_again(sf4: CompoundReport) -> None:
    """An equal report gets the very figures; another name gets its own."""
    first = compound_figures(sf4)
    assert compound_figures(replace(sf4)) is first
    other = compound_figures(replace(sf4, name="Another name"))
    assert other is not first
    assert "Another name" in other.bench
    assert "Another name" not in first.bench


def test_sheet_and_page_carry_one_revision(sf4: CompoundReport) -> None:
    """The mark in the title block of the drawing is the one at the foot of the page."""
    assert f"{sf4.id} · {revision(sf4)}" in compound_figures(sf4).sheet
