"""Numbers as figures print them.

A measured or calculated value stands to a tenth of a degree or a thousandth of an ångström; a
model value that its own ± would contradict is rounded and marked ``≈``; a value that symmetry
fixes is written without decimals it does not need.
"""

import math

from shapeshelf.report.model import AngleRow, Basis, Value

_FIXED_DEGREES = 0.05
MINUS = "−"


def degrees_text(row: AngleRow) -> str:
    """Return an angle as a label: ``173.1°``, ``≈172°``, ``120°``."""
    value = row.degrees
    ideal = row.ideal_degrees
    if value.basis is not Basis.MODEL:
        return f"{value.value:.1f}°"
    if ideal is not None and abs(ideal - value.value) < _FIXED_DEGREES:
        return f"{value.value:.1f}".removesuffix(".0") + "°"
    return f"≈{value.value:.0f}°" if _coarse(value, 0.5) else f"{value.value:.1f}°"


def angstrom_text(value: Value) -> str:
    """Return a bond length as a dimension, ``1.646``, or ``≈1.65`` from the model."""
    if value.basis is Basis.MODEL:
        return f"≈{value.value:.2f}"
    return f"{value.value:.3f}"


def debye_text(value: Value) -> str:
    """Return a dipole moment with its unit, ``0.63 D``."""
    mark = "≈" if value.basis is Basis.MODEL and value.value else ""
    return f"{mark}{value.value:.{1 if mark else 2}f} D"


def plus_minus_text(uncertainty: float | None) -> str:
    """Return `` ± 0.5``, nothing where it is not known: one significant digit, of a 1 two.

    Rounding ± 1.2 to ± 1 would hide a fifth of it (common practice, no source).
    """
    if not uncertainty:
        return ""
    magnitude = math.floor(math.log10(uncertainty))
    leads_with_one = uncertainty < 2 * 10.0**magnitude
    decimals = max(0, leads_with_one - magnitude)
    return f" ± {uncertainty:.{decimals}f}"


def _coarse(value: Value, step: float) -> bool:
    return value.uncertainty is None or value.uncertainty >= step
