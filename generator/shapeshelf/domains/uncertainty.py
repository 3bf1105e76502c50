"""How far a model angle may be off: 68 % half-widths from residuals in cross-validation.

Classes of centre: period (2, or 3 and below), number of bonds, number of lone pairs and single
electrons. The 68 % quantile of a class is drawn towards that of its period, and that towards the
quantile of all, the more so the fewer residuals the class has.
"""

from collections import defaultdict
from dataclasses import dataclass

import numpy as np

from shapeshelf.reference.elements import ELEMENTS

COVERED = 0.68
SHRINKAGE = 8
"""How many residuals of its own a class needs to weigh as much as the wider class."""

CentreClass = tuple[str, int, int]
"""Element, number of bonds, number of lone pairs and single electrons."""


@dataclass(frozen=True, slots=True)
class HalfWidths:
    """Half-widths in degrees; a class that is not listed takes its period's."""

    by_class: dict[tuple[bool, int, int], float]
    by_period: dict[bool, float]
    overall: float

    def of(self, element: str, bonded: int, empty: int) -> float:
        """Return the half-width, in degrees, of a centre with ``bonded`` and ``empty`` domains."""
        heavy = ELEMENTS[element].period >= 3
        wider = self.by_period.get(heavy, self.overall)
        return self.by_class.get((heavy, bonded, empty), wider)


CROSS_VALIDATED = HalfWidths(
    by_class={
        (False, 2, 1): 2.2,
        (False, 2, 2): 1.94,
        (False, 3, 0): 2.67,
        (False, 3, 1): 2.5,
        (False, 4, 0): 1.65,
        (True, 2, 1): 2.0,
        (True, 2, 2): 2.03,
        (True, 3, 1): 1.99,
        (True, 3, 2): 1.77,
        (True, 4, 0): 1.8,
        (True, 4, 1): 2.12,
        (True, 5, 0): 1.85,
        (True, 5, 1): 2.4,
        (True, 6, 0): 1.68,
    },
    by_period={False: 2.23, True: 1.99},
    overall=2.02,
)
"""Printed by tests/benchmarks/fit_domain_model.py."""


def class_uncertainty_degrees(element: str, bonded: int, empty: int) -> float:
    """Return the 68 % half-width, in degrees, of the model angles at a main-group centre.

    ``empty`` counts lone pairs and single electrons.
    """
    return CROSS_VALIDATED.of(element, bonded, empty)


def half_widths_degrees(residuals: list[tuple[CentreClass, float]]) -> HalfWidths:
    """Return the half-widths that held-back ``residuals`` (class, absolute degrees) support."""
    by_class: dict[tuple[bool, int, int], list[float]] = defaultdict(list)
    by_period: dict[bool, list[float]] = defaultdict(list)
    for (element, bonded, empty), size in residuals:
        heavy = ELEMENTS[element].period >= 3
        by_class[heavy, bonded, empty].append(size)
        by_period[heavy].append(size)
    overall = float(np.quantile([size for _, size in residuals], COVERED))
    periods = {heavy: _drawn(sizes, overall) for heavy, sizes in by_period.items()}
    classes = {key: _drawn(sizes, periods[key[0]]) for key, sizes in sorted(by_class.items())}
    return HalfWidths(classes, periods, round(overall, 2))


def _drawn(sizes: list[float], wider: float) -> float:
    own = float(np.quantile(sizes, COVERED))
    return round((len(sizes) * own + SHRINKAGE * wider) / (len(sizes) + SHRINKAGE), 2)
