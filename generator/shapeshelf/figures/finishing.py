"""The SVG that the canvas wrote, made small, themeable, selectable and accessible."""

import hashlib
import re
from html import escape

from shapeshelf.figures.lettering import markup
from shapeshelf.figures.model import Drawing, Lettering, Link, Mark, Stroke, Style
from shapeshelf.figures.palette import colours

FONT_STACK = (
    "var(--fig-font,Bahnschrift,'DIN Alternate','Segoe UI',Roboto,'Noto Sans',"
    "'Liberation Sans',Arial,sans-serif)"
)

_HALO_WIDTH = 4
_ELEMENT = re.compile(r'<path d="([^"]*)"|<text ')
_NUMBER = re.compile(r"-?\d+\.\d+")


def batches(marks: tuple[Mark, ...]) -> list[Lettering | list[Stroke]]:
    """Return lettering, and neighbouring strokes of one style together: they make one path."""
    found: list[Lettering | list[Stroke]] = []
    for mark in marks:
        last = found[-1] if found else None
        if isinstance(mark, Lettering):
            found.append(mark)
        elif isinstance(last, list) and last[0].style == mark.style:
            last.append(mark)
        else:
            found.append([mark])
    return found


def finish(written: str, drawing: Drawing) -> str:
    """Return one ``<svg>`` element from what the canvas wrote for ``drawing``.

    Colours become CSS variables with a fallback. The ids derive from the content: figures
    that differ can stand in one page.
    """
    paths = [match.group(1) for match in _ELEMENT.finditer(written)]
    pairs = zip(batches(drawing.marks), paths, strict=True)
    body = "".join(_element(batch, path) for batch, path in pairs)
    return _frame(_linked(body, drawing.links) if drawing.links else body, drawing)


def colour(name: str) -> str:
    """Return the CSS value of a named colour."""
    return f"var(--fig-{name},{colours()[name].light})"


def _linked(body: str, links: tuple[Link, ...]) -> str:
    """Return the links with the marks over them, which let every pointer through."""
    return "".join(map(_link, links)) + f'<g pointer-events="none">{body}</g>'


def _link(link: Link) -> str:
    x, y, width, height = map(_round, (link.x, link.y, link.width, link.height))
    return (
        f'<a href="{escape(link.address)}"><title>{escape(link.name, quote=False)}</title>'
        f'<rect x="{x}" y="{y}" width="{width}" height="{height}" fill="transparent"/></a>'
    )


def _element(batch: Lettering | list[Stroke], path: str | None) -> str:
    if isinstance(batch, Lettering):
        return _text(batch)
    return f'<path d="{_short(path or "")}"{_attributes(batch[0].style)}/>'


def _attributes(style: Style) -> str:
    fill = colour(style.fill) if style.fill else "none"
    parts = [f'fill="{fill}"']
    if style.stroke:
        parts += [f'stroke="{colour(style.stroke)}"', f'stroke-width="{style.width:g}"']
    if style.dash:
        parts.append(f'stroke-dasharray="{" ".join(f"{length:g}" for length in style.dash)}"')
    if style.round_ends:
        parts.append('stroke-linecap="round" stroke-linejoin="round"')
    return " " + " ".join(parts)


def _text(mark: Lettering) -> str:
    x, y = _round(mark.x), _round(mark.y)
    parts = [f'x="{x}" y="{y}" font-size="{mark.size:g}" fill="{colour(mark.colour)}"']
    if mark.anchor != "start":
        parts.append(f'text-anchor="{mark.anchor}"')
    if mark.angle_degrees:
        parts.append(f'transform="rotate({_round(-mark.angle_degrees)} {x} {y})"')
    if mark.bold:
        parts.append('font-weight="700"')
    if mark.halo:
        parts.append(
            f'paint-order="stroke" stroke="{colour("paper")}" stroke-width="{_HALO_WIDTH}" '
            'stroke-linejoin="round"'
        )
    return f"<text {' '.join(parts)}>{markup(mark.text)}</text>"


def _frame(body: str, drawing: Drawing) -> str:
    """Return the element; one with links is no single picture to a screen reader."""
    role = "group" if drawing.links else "img"
    size = f"{drawing.width:g} {drawing.height:g}"
    name = f"{drawing.kind}-{hashlib.sha256((drawing.title + body).encode()).hexdigest()[:8]}"
    return (
        f'<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 {size}" '
        f'width="{drawing.width:g}" height="{drawing.height:g}" class="fig fig-{drawing.kind}" '
        f'role="{role}" aria-labelledby="{name}-t" aria-describedby="{name}-d" '
        f'font-family="{FONT_STACK}">'
        f'<title id="{name}-t">{escape(drawing.title, quote=False)}</title>'
        f'<desc id="{name}-d">{escape(drawing.description, quote=False)}</desc>'
        f"{body}</svg>"
    )


def _short(path: str) -> str:
    """Round coordinates to a hundredth of a pixel and drop needless white space."""
    rounded = _NUMBER.sub(lambda match: _round(float(match.group())), path)
    return re.sub(r"\s*([MLCQz])\s*", r"\1", rounded.replace("\n", " ")).strip()


def _round(value: float) -> str:
    return f"{round(value, 2) + 0.0:g}" if abs(value) < 1e4 else f"{value:.0f}"
