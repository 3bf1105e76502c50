"""Spin-1/2 nuclei that make up all or nearly all of their element.

Natural abundance in percent: IUPAC, Pure Appl. Chem. 83 (2011) 397 (isotopic compositions of
the elements 2009), recalled from memory. Nuclei below 90 percent (195Pt, 129Xe, 119Sn, 77Se,
29Si, 13C) show satellites rather than signals of the whole sample and are left out.
"""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Nucleus:
    """One spin-1/2 nucleus."""

    name: str
    element: str
    abundance_percent: float


ABUNDANT_SPIN_HALF: dict[str, Nucleus] = {
    nucleus.element: nucleus
    for nucleus in (
        Nucleus("1H", "H", 99.99),
        Nucleus("19F", "F", 100.0),
        Nucleus("31P", "P", 100.0),
        Nucleus("89Y", "Y", 100.0),
        Nucleus("103Rh", "Rh", 100.0),
        Nucleus("169Tm", "Tm", 100.0),
    )
}
