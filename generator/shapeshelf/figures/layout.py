"""Where the views of a sheet stand and how large a molecule is drawn.

First-angle projection (ISO 5456-2): the top view stands below the front view, the view from
the left to its right; all views share one scale and are aligned. The title block fills the
lower right corner, auxiliary views stand beside the side view or above the title block.
"""

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.frames import Auxiliary, left_of, top_of
from shapeshelf.figures.model import Point
from shapeshelf.figures.scene import LOBE_RADIUS_ANGSTROM, Scene, lobe_ends

Array = NDArray[np.float64]

WIDEST, _NARROWEST = 880.0, 620.0
INSET = 12.0
MARGIN = 42.0
"""Room for dimensions around what is drawn in each view."""
CAPTION = 17.0
BLOCK_WIDTH, BLOCK_HEIGHT = 344.0, 244.0
_TALLEST = 690.0
_LARGEST_SCALE, _SMALLEST_SCALE = 92.0, 30.0


@dataclass(frozen=True, slots=True)
class View:
    """One view on the sheet: atoms on paper in pixels, and how near each is to the viewer."""

    name: str
    frame: Array
    points: Array
    """(n, 2)"""
    depth: Array
    """(n,) in ångström."""
    shown: tuple[int, ...]
    """Atoms drawn here: all, or those of one angle in an auxiliary view."""
    scale: float
    middle: Point
    lobes: bool = True
    auxiliary: Auxiliary | None = None

    def place(self, xyz: Array) -> Array:
        """Return where points (m, 3) of the molecule's frame fall on paper, (m, 2)."""
        seen = xyz @ self.frame[:2].T * self.scale
        return np.column_stack([self.middle[0] + seen[:, 0], self.middle[1] - seen[:, 1]])


@dataclass(frozen=True, slots=True)
class Layout:
    """The whole sheet."""

    width: float
    height: float
    scale: float
    views: tuple[View, ...]
    block: tuple[float, float]
    """Upper left corner of the title block."""


@dataclass(frozen=True, slots=True)
class _Extent:
    """Lowest and highest coordinate drawn along one direction (ångström)."""

    low: float
    high: float

    @property
    def size(self) -> float:
        return self.high - self.low

    @property
    def middle(self) -> float:
        return (self.low + self.high) / 2

    def flipped(self) -> "_Extent":
        """Return the same stretch seen from the other end."""
        return _Extent(-self.high, -self.low)


def lay_out(scene: Scene, front: Array, auxiliaries: list[Auxiliary]) -> Layout | None:
    """Return the sheet's layout, ``None`` where the molecule is too large for one."""
    x, z, y = (_extent(scene, direction) for direction in front)
    partial = [_partial_extents(scene, one) for one in auxiliaries]
    beside = _scale_beside(x, y, z, partial)
    above = _scale_above(x, y, z, partial)
    scale = min(_LARGEST_SCALE, max(beside, above))
    if scale < _SMALLEST_SCALE:
        return None
    return _placed(scene, front, auxiliaries, scale, beside >= min(above, scale) - 1e-9)


def _scale_beside(
    x: _Extent, y: _Extent, z: _Extent, partial: list[tuple[_Extent, _Extent]]
) -> float:
    """Largest scale with the auxiliary views in a column of their own."""
    extra = max((one[0].size for one in partial), default=0.0)
    columns = 3 if partial else 2
    wide = (WIDEST - 2 * INSET - columns * 2 * MARGIN) / (x.size + y.size + extra)
    beside_block = (WIDEST - 2 * INSET - BLOCK_WIDTH - 2 * MARGIN) / x.size
    high = (_TALLEST - 2 * INSET - 4 * MARGIN - 2 * CAPTION) / (z.size + y.size)
    stacked = sum(one[1].size for one in partial)
    room = _TALLEST - 2 * INSET - BLOCK_HEIGHT - len(partial) * (2 * MARGIN + CAPTION)
    return min(wide, beside_block, high, room / stacked if partial else wide)


def _scale_above(
    x: _Extent, y: _Extent, z: _Extent, partial: list[tuple[_Extent, _Extent]]
) -> float:
    """Largest scale with the auxiliary views side by side above the title block."""
    if not partial:
        return 0.0
    wide = (WIDEST - 2 * INSET - 4 * MARGIN) / (x.size + y.size)
    beside_block = (WIDEST - 2 * INSET - BLOCK_WIDTH - 2 * MARGIN) / x.size
    across = sum(one[0].size for one in partial) + x.size
    row = (WIDEST - 2 * INSET - (1 + len(partial)) * 2 * MARGIN) / across
    second = max(one[1].size for one in partial)
    fixed = _TALLEST - 2 * INSET - 4 * MARGIN - 2 * CAPTION
    high = min(fixed / (z.size + y.size), (fixed - BLOCK_HEIGHT) / (z.size + second))
    return min(wide, beside_block, row, high)


def _placed(
    scene: Scene, front: Array, auxiliaries: list[Auxiliary], scale: float, beside: bool
) -> Layout:
    x, z, y = (_extent(scene, direction) for direction in front)
    partial = [_partial_extents(scene, one) for one in auxiliaries]
    cells = [
        _Cell(one[0].size * scale + 2 * MARGIN, one[1].size * scale + 2 * MARGIN) for one in partial
    ]
    left, right = x.size * scale + 2 * MARGIN, y.size * scale + 2 * MARGIN
    first_row, second_row = (size * scale + 2 * MARGIN + CAPTION for size in (z.size, y.size))
    third = max((cell.width for cell in cells), default=0.0) if beside else 0.0
    lower = max(BLOCK_WIDTH, 0.0 if beside else sum(cell.width for cell in cells))
    needed = max(left + right + third, left + lower) + 2 * INSET
    width = min(WIDEST, max(_NARROWEST, needed))
    spare = max(0.0, width - 2 * INSET - left - right - third)
    gap = spare / (3 if third else 2)
    indent = min(gap / 2, max(0.0, width - 2 * INSET - left - lower))
    middles = _Middles(
        left=INSET + indent + left / 2,
        right=INSET + left + gap * 1.5 + right / 2,
        upper=INSET + MARGIN + z.size * scale / 2,
        lower=INSET + first_row + MARGIN + y.size * scale / 2,
    )
    block_left = width - INSET - BLOCK_WIDTH
    if beside:
        spots, foot = _stacked(cells, width - INSET - third / 2 - gap / 2)
        foot = max(foot, INSET + first_row)
    else:
        room = (INSET + left, width - INSET)
        spots, foot = _in_a_row(cells, room, INSET + first_row)
    bottom = max(INSET + first_row + second_row, foot + BLOCK_HEIGHT)
    height = float(np.ceil(bottom + INSET))
    views = _principal_views(scene, front, scale, middles, (x, y, z))
    for letter, one, spot, extents in zip("AB", auxiliaries, spots, partial, strict=False):
        name = f"view {letter}"
        views.append(_view(scene, name, one.frame, one.trio, scale, spot, extents, one))
    return Layout(
        float(np.ceil(width)),
        height,
        scale,
        tuple(views),
        (block_left, height - INSET - BLOCK_HEIGHT),
    )


@dataclass(frozen=True, slots=True)
class _Cell:
    """Room for one view with its dimensions, without its caption."""

    width: float
    height: float


@dataclass(frozen=True, slots=True)
class _Middles:
    """Where the middles of the two columns and rows of views lie."""

    left: float
    right: float
    upper: float
    lower: float


def _stacked(cells: list[_Cell], x: float) -> tuple[list[Point], float]:
    """Return the middles of auxiliary views below one another, and where the last one ends."""
    spots: list[Point] = []
    y = INSET
    for cell in cells:
        spots.append((x, y + cell.height / 2))
        y += cell.height + CAPTION
    return spots, y


def _in_a_row(
    cells: list[_Cell], room: tuple[float, float], top: float
) -> tuple[list[Point], float]:
    """Return the middles of auxiliary views side by side, and where the highest ends."""
    gap = max(0.0, room[1] - room[0] - sum(cell.width for cell in cells)) / (len(cells) + 1)
    spots: list[Point] = []
    x = room[0] + gap
    for cell in cells:
        spots.append((x + cell.width / 2, top + cell.height / 2))
        x += cell.width + gap
    return spots, top + max(cell.height for cell in cells) + CAPTION


def _principal_views(
    scene: Scene,
    front: Array,
    scale: float,
    middles: _Middles,
    extents: tuple[_Extent, _Extent, _Extent],
) -> list[View]:
    x, y, z = extents
    everything = tuple(range(len(scene.points)))
    places = (
        ("front", front, (middles.left, middles.upper), (x, z)),
        ("top", top_of(front), (middles.left, middles.lower), (x, y.flipped())),
        ("side", left_of(front), (middles.right, middles.upper), (y, z)),
    )
    return [
        _view(scene, name, frame, everything, scale, spot, drawn)
        for name, frame, spot, drawn in places
    ]


def _view(
    scene: Scene,
    name: str,
    frame: Array,
    shown: tuple[int, ...],
    scale: float,
    spot: Point,
    extents: tuple[_Extent, _Extent],
    auxiliary: Auxiliary | None = None,
) -> View:
    """Return a view whose drawn extent is centred on ``spot``."""
    middle = (spot[0] - extents[0].middle * scale, spot[1] + extents[1].middle * scale)
    seen = scene.points @ frame.T
    points = np.column_stack([middle[0] + seen[:, 0] * scale, middle[1] - seen[:, 1] * scale])
    return View(name, frame, points, seen[:, 2], shown, scale, middle, auxiliary is None, auxiliary)


def _extent(scene: Scene, direction: Array) -> _Extent:
    along = scene.points @ direction
    low, high = float((along - scene.radii).min()), float((along + scene.radii).max())
    ends = lobe_ends(scene) @ direction if scene.lobes else np.array([])
    if len(ends):
        low = min(low, float(ends.min()) - LOBE_RADIUS_ANGSTROM)
        high = max(high, float(ends.max()) + LOBE_RADIUS_ANGSTROM)
    return _Extent(low, high)


def _partial_extents(scene: Scene, one: Auxiliary) -> tuple[_Extent, _Extent]:
    atoms = list(one.trio)
    seen, radii = scene.points[atoms] @ one.frame.T, scene.radii[atoms]
    across, up = seen[:, 0], seen[:, 1]
    return (
        _Extent(float((across - radii).min()), float((across + radii).max())),
        _Extent(float((up - radii).min()), float((up + radii).max())),
    )
