"""Parity plots stand true, draw every value and name the worst."""

from dataclasses import replace

import numpy as np
import pytest

from shapeshelf.calculation.parity import (
    QUANTITIES,
    Method,
    ParityPoint,
    averages_of,
    deviations_of,
    furthest,
    methods_in,
    parity_points,
)
from shapeshelf.figures.model import Drawing, Lettering, Role, Stroke
from shapeshelf.figures.overlaps import label_overlaps
from shapeshelf.figures.parity import (
    MOST_NAMED,
    QUANTITY_NAMES,
    amount_text,
    parity_drawings,
    parity_plots,
)

PIXEL = 0.01
"""Rounding of double precision at a few hundred pixels."""


def point(measured, model=None, xtb=None, dft=None, counts=True, quantity="angle"):
    return ParityPoint(
        quantity=quantity,
        name=f"SF{measured:.0f}",
        smiles="S",
        of="F-S-F",
        measured=measured,
        model=model,
        xtb=xtb,
        dft=dft,
        atoms=3,
        source="a book",
        counts=counts,
    )


POINTS = [
    point(90.0, model=91.0, xtb=95.0),
    point(100.0, model=98.0, xtb=100.0),
    point(110.0, model=110.5, xtb=107.0),
    point(120.0, model=121.0, xtb=120.0, counts=False),
    point(130.0, model=129.0, xtb=60.0),
    point(140.0, model=143.0, xtb=139.0),
]


def symbols(drawing):
    """Return the marks of values without those of the legend, which stand below both frames."""
    foot = max(
        y
        for mark in drawing.marks
        if isinstance(mark, Stroke) and mark.role is Role.AXIS
        for _, y in mark.points
    )
    data = (mark for mark in drawing.marks if mark.role is Role.DATA)
    return [mark for mark in data if middle(mark)[1] <= foot]


def middle(mark):
    xs, ys = zip(*mark.points, strict=True)
    return (min(xs) + max(xs)) / 2, (min(ys) + max(ys)) / 2


def outline(mark):
    x, y = middle(mark)
    return tuple((round(px - x, 1), round(py - y, 1)) for px, py in mark.points)


def texts(drawing):
    return {mark.text for mark in drawing.marks if isinstance(mark, Lettering)}


def by_measured(drawing):
    """Return (x, y above, y below) of each value, from the smallest measured one."""
    found = {}
    for mark in symbols(drawing):
        x, y = middle(mark)
        found.setdefault(round(x, 3), []).append(y)
    return [(x, min(ys), max(ys)) for x, ys in sorted(found.items())]


def test_values_stand_true_in_both_frames():
    """As many pixels a degree up as across, read back from the marks; the lower frame is even."""
    rows = by_measured(parity_drawings(POINTS, "angle")[Method.MODEL])
    xs, above, below = (np.array(column) for column in zip(*rows, strict=True))
    measured = np.array([one.measured for one in POINTS])
    found = np.array([one.model for one in POINTS])
    across = np.diff(xs) / np.diff(measured)
    assert np.allclose(across, across[0], atol=PIXEL)
    assert np.allclose(np.diff(above), -across[0] * np.diff(found), atol=PIXEL)
    scale = (below[1] - below[0]) / (1.0 - -2.0)
    assert np.allclose(below - below[0], -scale * (found - measured - 1.0), atol=PIXEL)


def test_all_methods_share_their_scales():
    """The same measured value stands in the same place."""
    model, xtb = (by_measured(one) for one in parity_drawings(POINTS, "angle").values())
    assert [x for x, _, _ in model] == [x for x, _, _ in xtb]


def test_the_band_is_as_wide_as_68_per_cent_of_what_counts():
    """Its height below is the half-width on the scale of the deviations."""
    drawing = parity_drawings(POINTS, "angle")[Method.MODEL]
    band = [mark for mark in drawing.marks if isinstance(mark, Stroke) and is_band(mark)]
    height = abs(band[-1].points[0][1] - band[-1].points[-1][1])
    rows = by_measured(drawing)
    pixels = (rows[1][2] - rows[0][2]) / 3.0
    half_width = averages_of(POINTS, "angle", Method.MODEL).half_width
    assert height == pytest.approx(2 * half_width * pixels, abs=PIXEL)
    assert f"68 % within ±{half_width:.1f}°" in texts(drawing)


def is_band(mark):
    return mark.style.fill == "band"


def test_nothing_is_told_by_colour_alone():
    """Each method has its own symbol, what does not count another, the named ones are filled."""
    points = [replace(one, dft=one.model) for one in POINTS]
    drawings = parity_drawings(points, "angle").values()
    shapes = [[outline(mark) for mark in symbols(one)] for one in drawings]
    assert len({max(set(one), key=one.count) for one in shapes}) == 3
    crosses = [mark for one in drawings for mark in symbols(one) if not mark.closed]
    assert len(crosses) == 2 * 3
    assert all("not a free molecule" in texts(one) for one in drawings)


def test_what_lies_beyond_the_lower_frame_points_out_of_it():
    """70 degrees too narrow: an arrowhead at the foot of the frame, with its meaning."""
    many = [point(90.0 + k / 2, model=90.5 + k / 2) for k in range(60)]
    drawing = parity_drawings([*many, point(130.0, model=100.0)], "angle")[Method.MODEL]
    (arrow,) = [mark for mark in symbols(drawing) if mark.style.stroke is None]
    assert arrow.points[0][1] > arrow.points[1][1]
    assert "beyond ±0.5°" in texts(drawing)


def test_a_method_without_values_is_left_out():
    """And a quantity without any is not drawn at all."""
    assert list(parity_drawings(POINTS, "angle")) == [Method.MODEL, Method.XTB]
    assert parity_drawings(POINTS, "dipole") == {}


def test_a_single_value_that_does_not_count_is_drawn_without_a_band():
    """There is nothing to average."""
    drawing = parity_drawings([point(100.0, model=100.0, counts=False)], "angle")[Method.MODEL]
    assert len(symbols(drawing)) == 2
    assert not any(is_band(mark) for mark in drawing.marks if isinstance(mark, Stroke))


def test_words_say_the_same():
    """How many, how far off, and which are named."""
    told = parity_plots(POINTS, "angle")[Method.XTB].description
    assert told.startswith("6 values, measured from 90.0° to 140.0°. Off by 15.8° on average")
    assert "SF130 F-S-F −70.0°" in told


@pytest.mark.parametrize(
    ("quantity", "value", "signed", "text"),
    [
        ("angle", -35.42, True, "−35.4°"),
        ("angle", 0.04, True, "0.0°"),
        ("dipole", 0.625, True, "+0.62 D"),
        ("dipole", 0.62, False, "0.62 D"),
    ],
)
def test_amounts_carry_their_unit(quantity, value, signed, text):
    """True minus signs, no sign before nothing."""
    assert amount_text(quantity, value, signed) == text


@pytest.mark.parametrize("quantity", QUANTITIES)
def test_every_row_of_the_table_is_drawn_twice_and_the_worst_are_named(quantity):
    """Whatever stands in it: a symbol in each frame for each value, no name on anything."""
    points = parity_points()
    drawings = parity_drawings(points, quantity)
    assert tuple(drawings) == methods_in(points, quantity)
    for method, drawing in drawings.items():
        found = deviations_of(points, quantity, method)
        assert len(symbols(drawing)) == 2 * len(found)
        assert QUANTITY_NAMES[quantity] in drawing.title
        for one in furthest(found, MOST_NAMED):
            assert amount_text(quantity, one.off, signed=True) in drawing.description
        assert struck(drawing) == []


def struck(drawing: Drawing):
    """Return the overlaps of lettering with lettering and with the symbols of values."""
    solid = [
        replace(mark, role=Role.ATOM) if mark.role is Role.DATA else mark for mark in drawing.marks
    ]
    return label_overlaps(replace(drawing, marks=tuple(solid)))
