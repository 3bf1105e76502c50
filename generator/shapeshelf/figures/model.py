"""What the figures room hands out, and the marks a drawing is made of.

A figure is first a ``Drawing``: plain data that can be measured (do labels overlap, is an
angle true). ``canvas.render`` turns it into an ``Svg``. Lengths are pixels, y runs downwards.
"""

from dataclasses import dataclass
from enum import StrEnum

Point = tuple[float, float]


class Role(StrEnum):
    """What a mark stands for, so that a drawing can be checked."""

    ATOM = "atom"
    BOND = "bond"
    LOBE = "lobe"
    SYMBOL = "symbol"
    LABEL = "label"
    DIMENSION = "dimension"
    LEADER = "leader"
    AXIS = "axis"
    FRAME = "frame"
    ELECTRON = "electron"
    DATA = "data"


@dataclass(frozen=True, slots=True)
class Style:
    """How a path is drawn; colours are names of ``palette.COLOURS``."""

    stroke: str | None = "ink"
    fill: str | None = None
    width: float = 1.0
    dash: tuple[float, ...] = ()
    round_ends: bool = False


@dataclass(frozen=True, slots=True)
class Stroke:
    """A path through ``points``, or with ``curved`` a chain of cubic Bézier segments
    (end, control, control, end, control, control, end …)."""

    points: tuple[Point, ...]
    style: Style
    role: Role
    curved: bool = False
    closed: bool = False


@dataclass(frozen=True, slots=True)
class Lettering:
    """One line of text on its baseline; ``X_{2}`` sets a subscript, ``X^{-}`` a superscript."""

    x: float
    y: float
    text: str
    size: float
    role: Role = Role.LABEL
    colour: str = "ink"
    anchor: str = "middle"
    """``start``, ``middle`` or ``end``."""
    angle_degrees: float = 0.0
    """Turned anticlockwise about (x, y)."""
    bold: bool = False
    halo: bool = False
    """Kept readable over lines by a rim of paper."""


Mark = Stroke | Lettering


@dataclass(frozen=True, slots=True)
class Link:
    """A rectangle behind the marks that leads to another page."""

    address: str
    name: str
    """What a screen reader and a pointer that rests on it are told."""
    x: float
    y: float
    width: float
    height: float


@dataclass(frozen=True, slots=True)
class Drawing:
    """A finished figure as data."""

    kind: str
    """``bench``, ``lewis``, ``sheet`` …: begins the ids inside the SVG."""
    width: float
    height: float
    marks: tuple[Mark, ...]
    title: str
    description: str
    links: tuple[Link, ...] = ()


@dataclass(frozen=True, slots=True)
class Svg:
    """A figure ready for a page: ``markup`` is one ``<svg>`` element that stands alone."""

    markup: str
    title: str
    description: str
    width: float
    height: float
