"""Colours: enough contrast on both papers, one colour a periodic group."""

import pytest

from shapeshelf.figures.palette import (
    PAPER,
    STROKE_CONTRAST,
    TEXT_CONTRAST,
    colours,
    contrast,
    css_variables,
    element_colour,
)
from shapeshelf.reference.elements import ELEMENTS

TEXT_COLOURS = ("ink", "soft", "dipole")
STROKE_COLOURS = ("orange", "sky", "green", "yellow", "blue", "vermillion", "purple", "line")


def test_contrast_of_black_on_white_is_21():
    """WCAG 2.2 gives 21 : 1 as the largest contrast there is (definition of contrast ratio)."""
    assert contrast("#000000", "#ffffff") == pytest.approx(21.0)
    assert contrast("#777777", "#ffffff") == pytest.approx(4.48, abs=0.01)  # recalled from memory


@pytest.mark.parametrize("name", TEXT_COLOURS)
def test_text_can_be_read(name):
    """Text reaches 4.5 : 1 on light and dark paper (WCAG 2.2, 1.4.3)."""
    colour = colours()[name]
    assert contrast(colour.light, PAPER.light) >= TEXT_CONTRAST
    assert contrast(colour.dark, PAPER.dark) >= TEXT_CONTRAST


@pytest.mark.parametrize("name", STROKE_COLOURS)
def test_strokes_can_be_seen(name):
    """Strokes reach 3 : 1 on light and dark paper (WCAG 2.2, 1.4.11)."""
    colour = colours()[name]
    assert contrast(colour.light, PAPER.light) >= STROKE_CONTRAST
    assert contrast(colour.dark, PAPER.dark) >= STROKE_CONTRAST


@pytest.mark.parametrize("pair", [("O", "S"), ("F", "I"), ("N", "P"), ("C", "Si"), ("Fe", "Pt")])
def test_a_group_has_one_colour(pair):
    """Elements of one group (or block) share a colour."""
    assert element_colour(pair[0]) == element_colour(pair[1])


def test_neighbouring_groups_differ():
    """The p-block groups 13 to 18 all differ."""
    assert len({element_colour(name) for name in ("B", "C", "N", "O", "F", "Xe")}) == 6


def test_every_element_has_a_colour():
    """No element is left without a named colour."""
    assert {element_colour(name) for name in ELEMENTS} <= set(colours())


@pytest.mark.parametrize("dark", [False, True])
def test_the_style_sheet_declares_every_colour(dark):
    """One declaration a colour, with the value for that paper."""
    declared = css_variables(dark)
    for name, colour in colours().items():
        assert f"--fig-{name}:{colour.dark if dark else colour.light};" in declared
