"""Measured values beside what the model, GFN2-xTB and PBE0 say: the rows of ``parity.csv``.

The file is written by ``tests/benchmarks/accuracy_of_methods.py`` and says at its head where the
measured values come from.
"""

import csv
import re
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from enum import StrEnum
from importlib.resources import files

import numpy as np

from shapeshelf.domains.uncertainty import COVERED

TABLE = "parity.csv"
QUANTITIES = ("angle", "dipole")

_TRANS = re.compile(r"((?:[A-Z][a-z]?\d*)+)t")
_SINGLET = "_1A"
_WORD = re.compile(r"[A-Z](?=[a-z])")
_FORMULA = re.compile(r"(?:[A-Z][a-z]?\d*|\(|\)\d*)+[+-]?")


class Method(StrEnum):
    """Who says a value, quickest first."""

    MODEL = "model"
    """The electron-domain model."""
    XTB = "xtb"
    """GFN2-xTB."""
    DFT = "dft"
    """PBE0."""


@dataclass(frozen=True, slots=True)
class ParityPoint:
    """One measured value and the methods that have a value for it."""

    quantity: str
    """``angle`` in degrees or ``dipole`` in debye."""
    name: str
    smiles: str
    of: str
    """``F-S-F``; empty for a dipole moment."""
    measured: float
    model: float | None
    xtb: float | None
    dft: float | None
    atoms: int
    source: str
    counts: bool
    """False where the measured value is not one of a free molecule: shown, but in no average."""


@dataclass(frozen=True, slots=True)
class Deviation:
    """What one method says of one measured value, in the unit of its quantity."""

    point: ParityPoint
    found: float
    off: float
    """Found minus measured."""


@dataclass(frozen=True, slots=True)
class Averages:
    """How far one method is off, in the unit of its quantity, over the values that count."""

    method: Method
    values: int
    molecules: int
    most_atoms: int
    """Size of the largest of these molecules."""
    mean: float
    """Mean absolute error."""
    half_width: float
    """68 % of the values are off by no more."""
    largest: float


def parity_points() -> tuple[ParityPoint, ...]:
    """Return every row, in the order of the table."""
    text = (files("shapeshelf.calculation") / TABLE).read_text("utf-8")
    lines = [line for line in text.splitlines() if not line.startswith("#")]
    return tuple(_point(row) for row in csv.DictReader(lines))


def deviations_of(
    points: Iterable[ParityPoint], quantity: str, method: Method
) -> tuple[Deviation, ...]:
    """Return what ``method`` says of each value of ``quantity`` that it has one for."""
    return tuple(
        Deviation(point, found, found - point.measured)
        for point in points
        if point.quantity == quantity and (found := _value(point, method)) is not None
    )


def methods_in(points: Sequence[ParityPoint], quantity: str) -> tuple[Method, ...]:
    """Return the methods that have any value of ``quantity``, quickest first."""
    return tuple(method for method in Method if deviations_of(points, quantity, method))


def known_to_all(points: Sequence[ParityPoint], quantity: str) -> tuple[ParityPoint, ...]:
    """Return the points of ``quantity`` that every method with any value has a value for."""
    methods = methods_in(points, quantity)
    return tuple(
        point
        for point in points
        if point.quantity == quantity
        and all(_value(point, method) is not None for method in methods)
    )


def averages_of(points: Iterable[ParityPoint], quantity: str, method: Method) -> Averages | None:
    """Return how far ``method`` is off on average, ``None`` where no value of it counts."""
    counted = [one for one in deviations_of(points, quantity, method) if one.point.counts]
    if not counted:
        return None
    errors = np.abs([one.off for one in counted])
    return Averages(
        method,
        values=len(counted),
        molecules=len({one.point.smiles for one in counted}),
        most_atoms=max(one.point.atoms for one in counted),
        mean=float(errors.mean()),
        half_width=float(np.quantile(errors, COVERED)),
        largest=float(errors.max()),
    )


def furthest(deviations: Iterable[Deviation], most: int) -> tuple[Deviation, ...]:
    """Return the values a method misses by most, the worst first."""
    return tuple(sorted(deviations, key=lambda one: -abs(one.off))[:most])


def spoken_name(name: str) -> str:
    """Return the name of a molecule in the table as one says it.

    ``Methane, nitro-`` is nitromethane, ``N2H2t`` trans-N2H2 and ``CHF_1A``, the singlet, CHF.
    """
    trans = _TRANS.fullmatch(name)
    if trans:
        return f"trans-{trans.group(1)}"
    if is_formula(name.removesuffix(_SINGLET)):
        return name.removesuffix(_SINGLET)
    parent, *prefixes = _WORD.sub(lambda letter: letter.group().lower(), name).split(", ")
    for prefix in prefixes:
        keeps_its_hyphen = prefix.endswith(")-") or parent[0].isdigit()
        parent = (prefix if keeps_its_hyphen else prefix.removesuffix("-")) + parent
    return parent


def is_formula(name: str) -> bool:
    """Tell whether ``name`` is a formula, in which numbers stand below the line."""
    return _FORMULA.fullmatch(name.removeprefix("trans-")) is not None


def charge_in(formula: str) -> int:
    """Return the charge that a formula of the table ends in: -1 of ``NO2-``."""
    return {"+": 1, "-": -1}.get(formula[-1], 0)


def _value(point: ParityPoint, method: Method) -> float | None:
    return {Method.MODEL: point.model, Method.XTB: point.xtb, Method.DFT: point.dft}[method]


def _point(row: dict[str, str]) -> ParityPoint:
    return ParityPoint(
        quantity=row["quantity"],
        name=row["name"],
        smiles=row["smiles"],
        of=row["of"],
        measured=float(row["measured"]),
        model=_number(row["model"]),
        xtb=_number(row["xtb"]),
        dft=_number(row["dft"]),
        atoms=int(row["atoms"]),
        source=row["source"],
        counts=row["counts"] == "yes",
    )


def _number(text: str) -> float | None:
    return float(text) if text else None
