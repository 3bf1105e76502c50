"""What the page on methods takes from the program: how far each method is off, and its settings."""

from collections.abc import Sequence
from dataclasses import dataclass
from functools import cache

from markupsafe import Markup

from shapeshelf.calculation import conformers, judging
from shapeshelf.calculation.accuracy import ACCURACY
from shapeshelf.calculation.methods import NAMES, settings_of
from shapeshelf.calculation.model import Level
from shapeshelf.calculation.parity import (
    Averages,
    Deviation,
    Method,
    ParityPoint,
    averages_of,
    charge_in,
    deviations_of,
    furthest,
    is_formula,
    known_to_all,
    methods_in,
    parity_points,
    spoken_name,
)
from shapeshelf.figures.parity import METHOD_NAMES, MOST_NAMED, amount_text
from shapeshelf.pages.drawings import parity_figures
from shapeshelf.pages.typesetting import formula_markup, label_markup, sentence_case


@dataclass(frozen=True, slots=True)
class AverageView:
    """One line of the averages, every number as it is printed."""

    method: str
    values: int
    molecules: int
    most_atoms: int
    mean: str
    half_width: str
    largest: str


@dataclass(frozen=True, slots=True)
class OutlierView:
    """One value that a method misses by far."""

    molecule: Markup
    of: Markup
    """Empty for a dipole moment."""
    measured: str
    found: str
    off: str
    counts: bool


@dataclass(frozen=True, slots=True)
class PanelView:
    """One method: its plot and what it misses by most."""

    method: str
    figure: Markup
    outliers: tuple[OutlierView, ...]


@dataclass(frozen=True, slots=True)
class QuantityView:
    """Everything about one quantity."""

    name: str
    averages: tuple[AverageView, ...]
    common: tuple[AverageView, ...]
    """Over the values that every method has; empty where these are all."""
    panels: tuple[PanelView, ...]
    has_of: bool
    """Whether a molecule has several values, so that each says what it is of."""


@dataclass(frozen=True, slots=True)
class LevelView:
    """One level of calculation: what it is for and how far its values may be off."""

    name: str
    sizes: str
    angle: str
    length: str
    dipole: str


@dataclass(frozen=True, slots=True)
class MethodsView:
    """What ``methods.md`` asks for."""

    angles: QuantityView
    dipoles: QuantityView
    sources: tuple[tuple[str, str, int], ...]
    """(source, quantity, values)."""
    levels: tuple[LevelView, ...]
    settings: tuple[tuple[str, tuple[str, ...]], ...]
    """(setting, its value at each level), in the order of ``levels``; empty where it has none."""
    temperature: str
    window: str


QUANTITY_TITLES = {"angle": "Bond angles", "dipole": "Dipole moments"}


@cache
def methods_view() -> MethodsView:
    """Return the values of the page on methods."""
    points = parity_points()
    return MethodsView(
        angles=quantity_view(points, "angle"),
        dipoles=quantity_view(points, "dipole"),
        sources=_sources(points),
        levels=tuple(_level(level) for level in Level),
        settings=_settings(),
        temperature=f"{conformers.TEMPERATURE_KELVIN:g}",
        window=f"{conformers.WINDOW_KJ_MOL:g}",
    )


def quantity_view(points: Sequence[ParityPoint], quantity: str) -> QuantityView:
    """Return plots, averages and outliers of ``angle`` or ``dipole``."""
    figures = parity_figures(points, quantity)
    everything = _averages(points, quantity)
    common = _averages(known_to_all(points, quantity), quantity)
    return QuantityView(
        name=QUANTITY_TITLES[quantity],
        averages=everything,
        common=common if common != everything else (),
        panels=tuple(
            PanelView(
                sentence_case(METHOD_NAMES[method]), figure, _outliers(points, quantity, method)
            )
            for method, figure in figures.items()
        ),
        has_of=any(point.of for point in points if point.quantity == quantity),
    )


def _averages(points: Sequence[ParityPoint], quantity: str) -> tuple[AverageView, ...]:
    found = (averages_of(points, quantity, method) for method in methods_in(points, quantity))
    return tuple(_average(one, quantity) for one in found if one)


def _average(one: Averages, quantity: str) -> AverageView:
    return AverageView(
        method=sentence_case(METHOD_NAMES[one.method]),
        values=one.values,
        molecules=one.molecules,
        most_atoms=one.most_atoms,
        mean=amount_text(quantity, one.mean),
        half_width=amount_text(quantity, one.half_width),
        largest=amount_text(quantity, one.largest),
    )


def _outliers(
    points: Sequence[ParityPoint], quantity: str, method: Method
) -> tuple[OutlierView, ...]:
    worst = furthest(deviations_of(points, quantity, method), MOST_NAMED)
    return tuple(_outlier(one) for one in worst)


def _outlier(one: Deviation) -> OutlierView:
    point = one.point
    return OutlierView(
        molecule=_molecule(point.name),
        of=label_markup(point.of),
        measured=amount_text(point.quantity, point.measured),
        found=amount_text(point.quantity, one.found),
        off=amount_text(point.quantity, one.off, signed=True),
        counts=point.counts,
    )


def _molecule(name: str) -> Markup:
    spoken = spoken_name(name)
    if is_formula(spoken):
        return formula_markup(spoken, charge_in(spoken))
    return Markup.escape(sentence_case(spoken))


def _sources(points: Sequence[ParityPoint]) -> tuple[tuple[str, str, int], ...]:
    counts: dict[tuple[str, str], int] = {}
    for point in points:
        key = (point.source, QUANTITY_TITLES[point.quantity])
        counts[key] = counts.get(key, 0) + 1
    return tuple((source, quantity, count) for (source, quantity), count in counts.items())


def _level(level: Level) -> LevelView:
    accuracy = ACCURACY[level]
    most, least = judging.MOST_ATOMS_SMALL_BASIS, judging.MOST_ATOMS_DFT
    sizes = {
        Level.DFT: f"up to {least} atoms",
        Level.DFT_SMALL: f"{least + 1} to {most} atoms",
        Level.XTB: f"more than {most} atoms; complexes of a transition metal, "
        f"more than {judging.MOST_ATOMS_WITH_METAL}",
    }
    return LevelView(
        name=NAMES[level],
        sizes=sizes[level],
        angle=f"{accuracy.angle_degrees:g}°",
        length=f"{accuracy.length_angstrom:g} Å",
        dipole=f"{accuracy.dipole_debye:g} D",
    )


def _settings() -> tuple[tuple[str, tuple[str, ...]], ...]:
    held = [dict(settings_of(level)) for level in Level]
    names = dict.fromkeys(name for settings in held for name in settings)
    return tuple((name, tuple(one.get(name, "") for one in held)) for name in names)
