"""The SVG itself: well formed, small, the same every time, safe, themeable."""

import re
import subprocess
import sys
import xml.etree.ElementTree as ET

import pytest

from shapeshelf.figures.canvas import advance_em, render, text_width
from shapeshelf.figures.glyph import glyph
from shapeshelf.figures.model import Drawing, Lettering, Role, Stroke, Style
from shapeshelf.figures.palette import colours

SVG = "{http://www.w3.org/2000/svg}"
HOSTILE = '"><script>alert(1)</script>&'


def drawing(name="A", kind="bench"):
    marks = (
        Stroke(((10, 10), (90, 50)), Style("ink", None, 2.0), Role.BOND),
        Stroke(((10, 20), (90, 60)), Style("ink", None, 2.0), Role.BOND),
        Stroke(((5, 5), (20, 5), (20, 20)), Style("green", "paper"), Role.ATOM, closed=True),
        Lettering(50, 50, f"C_{{2}} {name}", 14, angle_degrees=10),
    )
    return Drawing(kind, 100, 80, marks, f"title {name}", f"description {name}")


def test_it_is_one_well_formed_svg_with_title_and_description():
    """One element with role img, named and described by its own title and desc."""
    root = ET.fromstring(render(drawing()).markup)
    assert root.tag == SVG + "svg"
    assert root.get("role") == "img"
    assert root.find(SVG + "title").text == "title A"
    assert root.find(SVG + "title").get("id") == root.get("aria-labelledby")
    assert root.find(SVG + "desc").get("id") == root.get("aria-describedby")


def test_neighbouring_strokes_of_one_style_become_one_path():
    """Two bonds alike are one path of two pieces."""
    root = ET.fromstring(render(drawing()).markup)
    paths = [path.get("d") for path in root.iter(SVG + "path")]
    assert paths[0] == "M10 10L90 50M10 20L90 60"
    assert len(paths) == 2


def test_hostile_text_stays_text():
    """Names from an entry cannot add elements or attributes."""
    root = ET.fromstring(render(drawing(HOSTILE)).markup)
    assert {element.tag.removeprefix(SVG) for element in root.iter()} <= {
        "svg",
        "title",
        "desc",
        "path",
        "text",
        "tspan",
    }
    assert HOSTILE in "".join(root.itertext())


def test_figures_that_differ_have_ids_that_differ():
    """Several figures can stand in one page."""
    markups = [render(drawing("A")).markup, render(drawing("B")).markup]
    markups += [render(drawing("A", "lewis")).markup, glyph("bent").markup, glyph("linear").markup]
    ids = [found for text in markups for found in re.findall(r' id="([^"]+)"', text)]
    assert len(ids) == len(set(ids))


def test_colours_are_variables_with_the_light_value_to_fall_back_on():
    """No colour is fixed in the SVG."""
    text = render(drawing()).markup
    for value in re.findall(r'(?:fill|stroke)="([^"]+)"', text):
        match = re.fullmatch(r"var\(--fig-(\w+),(#[0-9a-f]{6})\)", value)
        assert value == "none" or colours()[match.group(1)].light == match.group(2)


def test_nothing_but_the_drawing_is_told():
    """No date, no generator, no outside address but the namespace."""
    text = render(drawing()).markup
    assert "matplotlib" not in text.lower()
    assert re.findall(r"https?://[^\"]+", text) == ["http://www.w3.org/2000/svg"]


def test_every_run_gives_the_same_bytes():
    """A fresh process with another hash seed writes the same bytes."""
    script = "from shapeshelf.figures.glyph import shape_drawing as d; print(d('see-saw').markup)"
    runs = {
        subprocess.run(
            [sys.executable, "-c", script],
            capture_output=True,
            check=True,
            env={"PYTHONHASHSEED": seed},
        ).stdout
        for seed in ("1", "2")
    }
    assert len(runs) == 1
    assert len(runs.pop()) > 1000


@pytest.mark.parametrize(("character", "em"), [("0", 0.636), (".", 0.318), ("W", 0.989)])
def test_advance_widths_are_those_of_dejavu_sans(character, em):
    """Advance widths of DejaVu Sans, from the font's own hmtx table (2048 units to the em)."""
    assert advance_em(character, False) == pytest.approx(em, abs=0.001)


def test_scripts_are_narrower():
    """A subscript counts at seven tenths of the size."""
    assert text_width("2", 20) * 0.7 == pytest.approx(text_width("_{2}", 20))
