"""From a ``Drawing`` to SVG: the one file that speaks matplotlib.

One artist on a bare ``Figure`` draws all marks in order; no pyplot, no Axes. Nothing that
comes out depends on clock, host or hash seed.
"""

import io
from functools import cache
from pathlib import Path as FilePath
from typing import Any

import matplotlib
from matplotlib.artist import Artist
from matplotlib.backends.backend_svg import RendererSVG
from matplotlib.colors import to_rgb
from matplotlib.figure import Figure
from matplotlib.font_manager import FontProperties, get_font
from matplotlib.path import Path
from matplotlib.transforms import Affine2D

from shapeshelf.figures.finishing import batches, finish
from shapeshelf.figures.lettering import SCRIPT_SIZE, plain, runs
from shapeshelf.figures.model import Drawing, Lettering, Point, Stroke, Svg
from shapeshelf.figures.palette import colours

_POINTS_PER_INCH = 72
_SETTINGS: Any = {"svg.fonttype": "none", "svg.hashsalt": "shapeshelf", "path.simplify": False}


def render(drawing: Drawing) -> Svg:
    """Return ``drawing`` as one ``<svg>`` element of a few kilobytes."""
    return Svg(
        markup=finish(_written(drawing), drawing),
        title=drawing.title,
        description=drawing.description,
        width=drawing.width,
        height=drawing.height,
    )


def text_width(text: str, size: float, bold: bool = False) -> float:
    """Return the width of a line of lettering in pixels, scripts included.

    Measured in DejaVu Sans, which is wider than the faces of the stack: what fits here fits
    everywhere.
    """
    return sum(
        advance_em(character, bold) * size * (SCRIPT_SIZE if kind else 1.0)
        for kind, letters in runs(text)
        for character in letters
    )


@cache
def advance_em(character: str, bold: bool) -> float:
    """Return the advance width of one character of DejaVu Sans, in em."""
    name = "DejaVuSans-Bold.ttf" if bold else "DejaVuSans.ttf"
    font = get_font(str(FilePath(matplotlib.get_data_path()) / "fonts" / "ttf" / name))
    font.set_size(100, _POINTS_PER_INCH)
    return float(font.load_char(ord(character)).linearHoriAdvance) / 65536 / 100


def _written(drawing: Drawing) -> str:
    buffer = io.StringIO()
    size_inches = (drawing.width / _POINTS_PER_INCH, drawing.height / _POINTS_PER_INCH)
    with matplotlib.rc_context(_SETTINGS):
        figure = Figure(figsize=size_inches, dpi=_POINTS_PER_INCH)
        figure.patch.set_visible(False)
        figure.add_artist(_Marks(drawing))
        figure.draw(_renderer(drawing, buffer))
    return buffer.getvalue()


def _renderer(drawing: Drawing, buffer: io.StringIO) -> RendererSVG:
    make: Any = RendererSVG
    renderer: RendererSVG = make(drawing.width, drawing.height, buffer, image_dpi=_POINTS_PER_INCH)
    return renderer


class _Marks(Artist):
    """All marks of a drawing as one figure artist."""

    def __init__(self, drawing: Drawing) -> None:
        super().__init__()
        self._drawing = drawing

    def draw(self, renderer: Any) -> None:
        """Draw every mark in order; y runs downwards in a drawing, upwards in matplotlib."""
        flip = Affine2D().scale(1, -1).translate(0, self._drawing.height)
        for batch in batches(self._drawing.marks):
            if isinstance(batch, Lettering):
                _draw_lettering(renderer, batch)
            else:
                _draw_strokes(renderer, batch, flip)


def _draw_strokes(renderer: Any, strokes: list[Stroke], flip: Affine2D) -> None:
    style = strokes[0].style
    context = renderer.new_gc()
    context.set_linewidth(style.width if style.stroke else 0)
    context.set_foreground(_light(style.stroke or "ink"))
    if style.dash:
        context.set_dashes(0, style.dash)
    face = to_rgb(_light(style.fill)) if style.fill else None
    renderer.draw_path(context, _path(strokes), flip, face)


def _path(strokes: list[Stroke]) -> Path:
    points: list[Point] = []
    codes: list[Any] = []
    for stroke in strokes:
        points += stroke.points
        step = Path.CURVE4 if stroke.curved else Path.LINETO
        codes += [Path.MOVETO] + [step] * (len(stroke.points) - 1)
        if stroke.closed:
            points.append(stroke.points[0])
            codes.append(Path.CLOSEPOLY)
    return Path(points, codes)


def _draw_lettering(renderer: Any, mark: Lettering) -> None:
    context = renderer.new_gc()
    context.set_foreground(_light(mark.colour))
    font = _font(mark.size, mark.bold)
    renderer.draw_text(context, mark.x, mark.y, plain(mark.text), font, mark.angle_degrees, False)


@cache
def _font(size: float, bold: bool) -> FontProperties:
    return FontProperties(family="DejaVu Sans", size=size, weight="bold" if bold else "normal")


def _light(name: str) -> str:
    return colours()[name].light
