"""Calculated infrared bands as a stick spectrum; wavenumbers grow to the left, as printed."""

import math
from collections.abc import Sequence

from shapeshelf.figures.canvas import render, text_width
from shapeshelf.figures.lettering import symmetry_species
from shapeshelf.figures.model import Drawing, Lettering, Mark, Role, Stroke, Style, Svg
from shapeshelf.report.model import Band, CompoundReport

WIDTH = 420.0
_HEIGHT, _LEFT, _RIGHT, _BASE, _TOP = 210.0, 20.0, 400.0, 166.0, 62.0
_NOTE = 12.5
_LEAST_LEADER = 14.0
_FAINTEST, _MOST_LABELS, _LEVELS, _LEVEL = 0.01, 8, 3, 17.0


def infrared_sticks(report: CompoundReport) -> Svg | None:
    """Return the calculated infrared bands as sticks, ``None`` where none is on record."""
    drawing = infrared_drawing(report)
    return render(drawing) if drawing else None


def infrared_drawing(report: CompoundReport) -> Drawing | None:
    """Return the stick spectrum as data."""
    calculated = report.frequencies.bands if report.frequencies else ()
    bands = [band for band in calculated if band.wavenumber_per_cm > 0]
    strongest = max((band.intensity_km_per_mol for band in bands), default=0.0)
    if report.frequencies is None or not strongest:
        return None
    limit = 500.0 * math.ceil(bands[-1].wavenumber_per_cm / 500.0 + 0.1)
    marks = [*_axis(limit), *(_stick(band, strongest, limit) for band in bands)]
    marks += _labels(bands, strongest, limit)
    words = f"{report.frequencies.method}: {_in_words(bands)}."
    title = f"{report.name}, calculated infrared bands"
    return Drawing("infrared", WIDTH, _HEIGHT, tuple(marks), title, words)


def _stick(band: Band, strongest: float, limit: float) -> Stroke:
    x = _x_of(band.wavenumber_per_cm, limit)
    points = ((x, _BASE), (x, _top_of(band, strongest)))
    return Stroke(points, Style("ink", None, 2.0), Role.DATA)


def _top_of(band: Band, strongest: float) -> float:
    return _BASE - (_BASE - _TOP) * band.intensity_km_per_mol / strongest


def _x_of(wavenumber: float, limit: float) -> float:
    return _RIGHT - (_RIGHT - _LEFT) * wavenumber / limit


def _axis(limit: float) -> list[Mark]:
    marks: list[Mark] = [Stroke(((_LEFT, _BASE), (_RIGHT, _BASE)), Style("line"), Role.AXIS)]
    step = 500.0 if limit <= 2500 else 1000.0
    for count in range(int(limit / step) + 1):
        x = _x_of(count * step, limit)
        marks.append(Stroke(((x, _BASE), (x, _BASE + 5)), Style("line"), Role.AXIS))
        anchor = "end" if count == 0 else "middle"
        text = f"{count * step:.0f}"
        marks.append(Lettering(x, _BASE + 19, text, _NOTE, colour="soft", anchor=anchor))
    unit = Lettering(_RIGHT, _BASE + 37, "cm^{−1}", _NOTE, colour="soft", anchor="end")
    return [*marks, unit]


def _labels(bands: Sequence[Band], strongest: float, limit: float) -> list[Mark]:
    """Label the strongest bands, each at the lowest level where it is free."""
    chosen = sorted(bands, key=lambda band: -band.intensity_km_per_mol)[:_MOST_LABELS]
    taken: list[tuple[float, float, int]] = []
    marks: list[Mark] = []
    for band in chosen:
        if band.intensity_km_per_mol < _FAINTEST * strongest:
            continue
        text = f"{band.wavenumber_per_cm:.0f} {symmetry_species(band.species or '')}".strip()
        half = text_width(text, _NOTE) / 2 + 3
        x = min(max(_x_of(band.wavenumber_per_cm, limit), half), WIDTH - half)
        level = _free_level(taken, x - half, x + half)
        if level is not None:
            taken.append((x - half, x + half, level))
            marks.append(Lettering(x, _TOP - 10 - _LEVEL * level, text, _NOTE))
            if level == 0:
                marks += _leader(band, x, strongest, limit)
    return marks


def _leader(band: Band, label_x: float, strongest: float, limit: float) -> list[Mark]:
    """Return a thin line from a label down to its stick, none where they nearly touch."""
    x, top = _x_of(band.wavenumber_per_cm, limit), _top_of(band, strongest)
    if top - _TOP < _LEAST_LEADER:
        return []
    return [Stroke(((label_x, _TOP - 4), (x, top - 4)), Style("line", None, 0.7), Role.AXIS)]


def _free_level(taken: Sequence[tuple[float, float, int]], low: float, high: float) -> int | None:
    for level in range(_LEVELS):
        if all(other != level or high < left or low > right for left, right, other in taken):
            return level
    return None


def _in_words(bands: Sequence[Band]) -> str:
    return ", ".join(
        f"{band.wavenumber_per_cm:.0f} cm⁻¹ ({_species_in_words(band)}"
        f"{band.intensity_km_per_mol:.0f} km/mol)"
        for band in bands
        if band.intensity_km_per_mol > 0.5
    )


def _species_in_words(band: Band) -> str:
    return f"{band.species}, " if band.species else ""
