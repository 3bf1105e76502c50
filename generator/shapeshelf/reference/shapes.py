"""Names of electron arrangements and of the shapes left when lone pairs are not looked at.

Polyhedral symbols: IUPAC, Nomenclature of Inorganic Chemistry: Recommendations 2005 (the
"Red Book"), ISBN 0-85404-438-8, tables IR-9.2 and IR-9.3, recalled from memory; ``None``
where the tables have no symbol. Names of shapes: R. J. Gillespie and I. Hargittai, The VSEPR
Model of Molecular Geometry (1991), recalled from memory. The names of what is left of
arrangements that no known molecule shows are common practice, no source.
"""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class ShapeName:
    """The name the trade uses, and IUPAC's symbol where there is one."""

    shape: str
    polyhedral_symbol: str | None


ARRANGEMENTS: dict[int, dict[tuple[int, ...], str]] = {
    2: {(2,): "linear"},
    3: {(3,): "trigonal planar"},
    4: {(4,): "tetrahedral"},
    5: {(2, 3): "trigonal bipyramidal"},
    6: {(6,): "octahedral"},
    7: {(2, 5): "pentagonal bipyramidal", (1, 3, 3): "capped octahedral"},
    8: {(8,): "square antiprismatic"},
    9: {(3, 6): "tricapped trigonal prismatic"},
}
"""Electron arrangements by number of domains and by how many sites are alike, the usual first."""

SITES: dict[str, dict[int, str]] = {
    "trigonal bipyramidal": {2: "ax", 3: "eq"},
    "pentagonal bipyramidal": {2: "ax", 5: "eq"},
    "capped octahedral": {1: "cap"},
}
"""Names of the sites of an arrangement, by how many sites are alike."""

SHAPES: dict[tuple[str, str], ShapeName] = {
    ("linear", ""): ShapeName("linear", "L-2"),
    ("trigonal planar", ""): ShapeName("trigonal planar", "TP-3"),
    ("trigonal planar", "1"): ShapeName("bent", "A-2"),
    ("tetrahedral", ""): ShapeName("tetrahedral", "T-4"),
    ("tetrahedral", "1"): ShapeName("trigonal pyramidal", "TPY-3"),
    ("tetrahedral", "2"): ShapeName("bent", "A-2"),
    ("trigonal bipyramidal", ""): ShapeName("trigonal bipyramidal", "TBPY-5"),
    ("trigonal bipyramidal", "eq"): ShapeName("see-saw", "SS-4"),
    ("trigonal bipyramidal", "ax"): ShapeName("trigonal pyramid of four", None),
    ("trigonal bipyramidal", "eq eq"): ShapeName("T-shaped", "TS-3"),
    ("trigonal bipyramidal", "ax ax"): ShapeName("trigonal planar", "TP-3"),
    ("trigonal bipyramidal", "ax eq"): ShapeName("trigonal pyramidal", "TPY-3"),
    ("trigonal bipyramidal", "eq eq eq"): ShapeName("linear", "L-2"),
    ("trigonal bipyramidal", "ax ax eq"): ShapeName("bent", "A-2"),
    ("trigonal bipyramidal", "ax eq eq"): ShapeName("bent", "A-2"),
    ("octahedral", ""): ShapeName("octahedral", "OC-6"),
    ("octahedral", "1"): ShapeName("square pyramidal", "SPY-5"),
    ("octahedral", "2, 1 trans"): ShapeName("square planar", "SP-4"),
    ("octahedral", "2"): ShapeName("see-saw", "SS-4"),
    ("octahedral", "3, 1 trans"): ShapeName("T-shaped", "TS-3"),
    ("octahedral", "3"): ShapeName("trigonal pyramidal", "TPY-3"),
    ("octahedral", "4, 1 trans"): ShapeName("bent", "A-2"),
    ("octahedral", "4, 2 trans"): ShapeName("linear", "L-2"),
    ("pentagonal bipyramidal", ""): ShapeName("pentagonal bipyramidal", "PBPY-7"),
    ("pentagonal bipyramidal", "ax"): ShapeName("pentagonal pyramidal", None),
    ("pentagonal bipyramidal", "ax ax"): ShapeName("pentagonal planar", None),
    ("capped octahedral", ""): ShapeName("capped octahedral", "OCF-7"),
    ("capped octahedral", "cap"): ShapeName("distorted octahedral", "OC-6"),
    ("square antiprismatic", ""): ShapeName("square antiprismatic", "SAPR-8"),
    ("tricapped trigonal prismatic", ""): ShapeName("tricapped trigonal prismatic", "TPRS-9"),
}
"""Shape by arrangement and the pattern of the sites that hold no bond."""
