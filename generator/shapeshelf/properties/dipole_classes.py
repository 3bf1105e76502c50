"""Which class of molecule a dipole moment belongs to: each class has earned its own ±.

    unfitted      a bond between elements that no molecule of the fit has
    ionic         a metal, or a bond between elements 1.7 or more apart, and no carbon
    hypervalent   an atom with more than four electron domains
    inorganic     anything else without carbon
    organic       carbon, at most six atoms besides hydrogen
    large         carbon, more than six

The ± of each class (charge_parameters.py) is the 68 % quantile of the cross-validated residuals.
"""

from collections.abc import Container

from shapeshelf.properties.charges import ChargeGraph, electronegativity

S_P_DOMAINS = 4
SMALL_MOLECULE = 6
IONIC_DIFFERENCE = 1.7
METALS_BELOW = 1.85
"""Electronegativity under which an element counts as a metal; silicon stands at 1.90."""


def dipole_class(graph: ChargeGraph, fitted: Container[str]) -> str:
    """Return the class; ``fitted`` holds the names of the fitted terms (charges.py)."""
    elements = graph.elements
    if not _pairs(graph) <= {pair for pair in _pairs(graph) if f"bond {pair}" in fitted}:
        return "unfitted"
    if "C" not in elements and _is_ionic(graph):
        return "ionic"
    if max(graph.domains) > S_P_DOMAINS:
        return "hypervalent"
    if "C" not in elements:
        return "inorganic"
    heavy = sum(element != "H" for element in elements)
    return "organic" if heavy <= SMALL_MOLECULE else "large"


def _pairs(graph: ChargeGraph) -> set[str]:
    """Return the pairs of unlike elements that are bonded, as in ``C-O``."""
    names = graph.elements
    return {
        "-".join(sorted((names[a], names[b])))
        for a, around in enumerate(graph.orders)
        for b in around
        if names[a] != names[b]
    }


def _is_ionic(graph: ChargeGraph) -> bool:
    values = [electronegativity(element) for element in graph.elements]
    apart = max(
        (abs(values[a] - values[b]) for a, around in enumerate(graph.orders) for b in around),
        default=0.0,
    )
    return min(values) < METALS_BELOW or apart >= IONIC_DIFFERENCE
