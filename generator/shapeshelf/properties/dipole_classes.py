"""Which class of molecule a dipole moment belongs to: each class has earned its own ±.

    unfitted      a bond between elements that no molecule of the fit has
    hypervalent   an atom with more than four electron domains
    metal         an element below 1.85 in electronegativity
    inorganic     anything else without carbon
    organic       carbon, at most six atoms besides hydrogen
    large         carbon, more than six

The ± of each class (charge_parameters.py) is the 68 % quantile of the cross-validated residuals.
"""

from collections.abc import Container

from shapeshelf.properties.charges import ChargeGraph, electronegativity

CLASSES = ("unfitted", "hypervalent", "metal", "inorganic", "organic", "large")
S_P_DOMAINS = 4
SMALL_MOLECULE = 6
METALS_BELOW = 1.85
"""Gallium stands at 1.81, silicon at 1.90."""


def dipole_class(graph: ChargeGraph, fitted: Container[str]) -> str:
    """Return the class; ``fitted`` holds the names of the fitted terms (charges.py)."""
    elements = graph.elements
    if any(f"bond {pair}" not in fitted for pair in _pairs(graph)):
        return "unfitted"
    if max(graph.domains) > S_P_DOMAINS:
        return "hypervalent"
    if min(electronegativity(element) for element in elements) < METALS_BELOW:
        return "metal"
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
