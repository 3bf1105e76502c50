"""What lone pairs do to each shape, and which sites of an arrangement they leave.

The rules are those of R. J. Gillespie and I. Hargittai, The VSEPR Model of Molecular Geometry
(1991), recalled from memory: a lone pair takes more room than a bond, goes where it has most,
and closes the angles beside it. The sentences are ours.
"""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Leaving:
    """A way from an arrangement to a shape: which vertices the lone pairs take."""

    symbol: str
    """Polyhedral symbol of the arrangement, a key of ``polyhedra.POLYHEDRA``."""
    vertices: tuple[int, ...]
    """Vertices of that polyhedron which hold lone pairs."""
    effect: str = ""
    """What the lone pairs do to the angles that are left."""


LEAVINGS: dict[tuple[str, str], Leaving] = {
    ("linear", ""): Leaving("L-2", ()),
    ("trigonal planar", ""): Leaving("TP-3", ()),
    ("trigonal planar", "1"): Leaving(
        "TP-3", (0,), "The lone pair lies in the plane and closes the angle below 120°."
    ),
    ("tetrahedral", ""): Leaving("T-4", ()),
    ("tetrahedral", "1"): Leaving(
        "T-4",
        (0,),
        "The lone pair stands over the three bonds and presses them together, below 109.5°; the"
        " more so, the larger the centre and the more its neighbours draw electrons away.",
    ),
    ("tetrahedral", "2"): Leaving(
        "T-4", (0, 1), "Two lone pairs close the angle further than one would."
    ),
    ("trigonal bipyramidal", ""): Leaving("TBPY-5", ()),
    ("trigonal bipyramidal", "eq"): Leaving(
        "TBPY-5",
        (2,),
        "The lone pair takes an equatorial site, where only two neighbours stand at 90°. The axial"
        " bonds lean away from it and the two equatorial ones close below 120°.",
    ),
    ("trigonal bipyramidal", "eq eq"): Leaving(
        "TBPY-5",
        (2, 3),
        "Both lone pairs are equatorial. They bend the axial bonds towards the third neighbour, so"
        " that the T droops.",
    ),
    ("trigonal bipyramidal", "eq eq eq"): Leaving(
        "TBPY-5", (2, 3, 4), "Three lone pairs fill the equator evenly and bend nothing: 180°."
    ),
    ("octahedral", ""): Leaving("OC-6", ()),
    ("octahedral", "1"): Leaving(
        "OC-6", (0,), "The lone pair pushes the four basal bonds up, towards the apex."
    ),
    ("octahedral", "2, 1 trans"): Leaving(
        "OC-6", (0, 1), "The two lone pairs stand opposite each other and bend nothing: 90°."
    ),
    ("octahedral", "3, 1 trans"): Leaving(
        "OC-6", (0, 1, 2), "Three lone pairs leave a T; no compound that shows it is common."
    ),
    ("octahedral", "4, 2 trans"): Leaving(
        "OC-6", (0, 1, 2, 4), "Four lone pairs lie in one plane and leave 180°."
    ),
    ("pentagonal bipyramidal", ""): Leaving("PBPY-7", ()),
    ("pentagonal bipyramidal", "ax"): Leaving(
        "PBPY-7", (0,), "The lone pair is axial; the five equatorial bonds lean away from it."
    ),
    ("pentagonal bipyramidal", "ax ax"): Leaving(
        "PBPY-7", (0, 1), "Both lone pairs are axial and bend nothing: a flat pentagon, 72°."
    ),
    ("capped octahedral", ""): Leaving("OCF-7", ()),
    ("capped octahedral", "cap"): Leaving(
        "OCF-7",
        (0,),
        "The lone pair stands over one face of the octahedron and opens it; often it moves from"
        " face to face.",
    ),
    ("square antiprismatic", ""): Leaving("SAPR-8", ()),
    ("tricapped trigonal prismatic", ""): Leaving("TPRS-9", ()),
}
"""By the keys of ``shapes.SHAPES``, the placements that lone pairs take; the others are weighed
by the domain model and lose."""
