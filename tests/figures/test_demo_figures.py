"""All figures of the demo catalogue: none fails, no label overlaps, all stay small."""

from functools import cache
from pathlib import Path

import pytest

from shapeshelf.catalogue.reading import read_catalogue
from shapeshelf.figures.bench import bench_drawing
from shapeshelf.figures.canvas import render
from shapeshelf.figures.lewis import lewis_drawing
from shapeshelf.figures.overlaps import label_overlaps
from shapeshelf.figures.sheet import sheet_data
from shapeshelf.figures.strip import strip_drawing
from shapeshelf.report.building import report_on_entry

ROOT = Path(__file__).parents[2] / "compounds"
LARGEST_BYTES = 60_000
"""Four figures of a page must compress to far less than 150 kB; SVG shrinks to about a sixth."""


@cache
def entries():
    return {entry.id: entry for entry in read_catalogue(ROOT).entries}


@pytest.mark.parametrize("name", sorted(entries()))
def test_figures_of_the_demo(name):
    """Bench view, Lewis structure, sheet and strip of one compound."""
    report = report_on_entry(entries()[name])
    made = sheet_data(report)
    drawings = [bench_drawing(report), lewis_drawing(report), strip_drawing(report)]
    drawings.append(made.drawing if made else None)
    for drawing in filter(None, drawings):
        assert label_overlaps(drawing) == [], drawing.title
        assert len(render(drawing).markup) < LARGEST_BYTES
