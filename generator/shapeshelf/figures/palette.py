"""Colours of every figure: one name each, a value for light and one for dark paper.

Elements are coloured by periodic group with the eight colours of M. Okabe and K. Ito,
"Color Universal Design" (2008), https://jfly.uni-koeln.de/color/ (recalled from memory).
The published hues are kept; where one is too faint or too dark on the paper its luminance is
moved until the contrast that WCAG 2.2 asks for is reached (1.4.3: text 4.5, 1.4.11: graphics
3). The element's symbol is always printed beside the colour.
"""

from dataclasses import dataclass
from functools import cache

from shapeshelf.reference.elements import ELEMENTS

OKABE_ITO = {
    "orange": "#e69f00",
    "sky": "#56b4e9",
    "green": "#009e73",
    "yellow": "#f0e442",
    "blue": "#0072b2",
    "vermillion": "#d55e00",
    "purple": "#cc79a7",
}

TEXT_CONTRAST = 4.5
STROKE_CONTRAST = 3.0


@dataclass(frozen=True, slots=True)
class Colour:
    """One named colour on light and on dark paper, as ``#rrggbb``."""

    light: str
    dark: str


PAPER = Colour("#fffdf8", "#161c22")

_PLAIN = {
    "paper": PAPER,
    "ink": Colour("#1f2a33", "#e8e4da"),
    "soft": Colour("#55626d", "#a9b3bb"),
    "line": Colour("#7c8890", "#77838d"),
    "lobe": Colour("#e6ebee", "#2b353e"),
    "band": Colour("#d9e2e8", "#34414c"),
}

_GROUP_HUES = {1: "sky", 2: "sky", 13: "orange", 15: "purple", 16: "vermillion", 17: "green"}
_NOBLE_GASES, _TETRELS = 18, 14


def element_colour(element: str) -> str:
    """Return the colour name for the element's group; d and f blocks share one."""
    group = ELEMENTS[element].group
    if group == _TETRELS:
        return "ink"
    if group == _NOBLE_GASES:
        return "yellow"
    return _GROUP_HUES.get(group or 0, "blue")


def css_variables(dark: bool) -> str:
    """Return the declarations ``--fig-NAME: #rrggbb;`` for light or dark paper."""
    return "".join(
        f"--fig-{name}:{colour.dark if dark else colour.light};"
        for name, colour in colours().items()
    )


@cache
def colours() -> dict[str, Colour]:
    """Return every named colour a figure may use."""
    hues = {
        name: Colour(
            _reaching(value, PAPER.light, STROKE_CONTRAST),
            _reaching(value, PAPER.dark, STROKE_CONTRAST),
        )
        for name, value in OKABE_ITO.items()
    }
    dipole = Colour(
        _reaching(OKABE_ITO["blue"], PAPER.light, TEXT_CONTRAST),
        _reaching(OKABE_ITO["sky"], PAPER.dark, TEXT_CONTRAST),
    )
    return {**_PLAIN, **hues, "dipole": dipole}


def contrast(one: str, other: str) -> float:
    """Return the contrast ratio of two ``#rrggbb`` colours (WCAG 2.2, 1 to 21)."""
    darker, lighter = sorted((_luminance(one), _luminance(other)))
    return (lighter + 0.05) / (darker + 0.05)


def _reaching(colour: str, paper: str, wanted: float) -> str:
    """Shift ``colour`` away from ``paper`` in small steps until the contrast is reached."""
    target = 255.0 if _luminance(paper) < 0.2 else 0.0
    channels = [float(int(colour[i : i + 2], 16)) for i in (1, 3, 5)]
    while contrast(colour, paper) < wanted:
        channels = [value + 0.02 * (target - value) for value in channels]
        colour = "#" + "".join(f"{round(value):02x}" for value in channels)
    return colour


def _luminance(colour: str) -> float:
    weights = (0.2126, 0.7152, 0.0722)
    channels = [int(colour[i : i + 2], 16) / 255 for i in (1, 3, 5)]
    linear = [c / 12.92 if c <= 0.04045 else ((c + 0.055) / 1.055) ** 2.4 for c in channels]
    return sum(weight * value for weight, value in zip(weights, linear, strict=True))
