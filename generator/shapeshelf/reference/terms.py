"""Terms that a sheet uses, each defined in a sentence or two of our own.

Where IUPAC recommends a meaning it was kept: Compendium of Chemical Terminology (the "Gold
Book") and Nomenclature of Inorganic Chemistry: Recommendations 2005, ISBN 0-85404-438-8, both
recalled from memory; the words are ours. The terms about bases, pages and records are this
project's own.
"""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Term:
    """One term of the glossary."""

    name: str
    text: str
    also: tuple[str, ...] = ()
    """Other words it is looked up by."""


TERMS: tuple[Term, ...] = (
    Term(
        "angle strip",
        "The degree scale on a sheet that sets every value of an angle side by side, whatever it"
        " rests on.",
    ),
    Term(
        "arrangement",
        "Where all electron domains of a centre point, lone pairs included: tetrahedral for four"
        " domains, octahedral for six. The shape is what is left of it when only atoms are looked"
        " at.",
        ("electron arrangement", "domain geometry"),
    ),
    Term(
        "axial",
        "On the main axis of a trigonal or pentagonal bipyramid: the two sites at its ends,"
        " written (ax).",
        ("ax", "apical site"),
    ),
    Term(
        "AXE notation",
        "A formula for a centre: A the central atom, X a bonded neighbour, E a lone pair. AX4E has"
        " four neighbours and one lone pair.",
        ("AXE", "AXnEm"),
    ),
    Term(
        "basis",
        "What a value rests on: measured, calculated, supplied or model. Every number on a sheet"
        " carries its basis.",
        ("basis of a value",),
    ),
    Term(
        "Bent's rule",
        "An atom gives more s character to its bonds with electropositive neighbours, and more p"
        " character to those with electronegative ones.",
        ("Bent rule",),
    ),
    Term(
        "bond angle",
        "The angle between two bonds at the atom they share, in degrees.",
        ("angle",),
    ),
    Term(
        "calculated",
        "Obtained by quantum chemistry from the structure, with the method named beside the value.",
        ("quantum chemistry", "computed"),
    ),
    Term(
        "caution",
        "A line about danger on a sheet: an H-statement that the group entered, or a line that the"
        " structure itself raises. No caution says nothing about safety; the safety data sheet,"
        " local rules and licensed practice decide.",
        ("safety", "hazard"),
    ),
    Term(
        "centre",
        "An atom with at least two neighbours, which therefore has a shape.",
        ("central atom",),
    ),
    Term(
        "departure",
        "A centre known not to follow the electron-domain rule; its sheet says what it does"
        " instead and who reported it.",
        ("departs", "exception"),
    ),
    Term(
        "dipole moment",
        "How far the centres of positive and negative charge stand apart, times the charge; in"
        " debye. An ion's depends on the origin, so none is given.",
        ("dipole", "debye", "moment"),
    ),
    Term(
        "distorted",
        "Near an ideal shape but not on it; the shape measure says how near.",
        ("distortion",),
    ),
    Term(
        "electron domain",
        "A region of electrons around a centre that counts once: a single, double or triple bond, a"
        " lone pair, or a single electron. Domains keep as far apart as they can.",
        ("domain", "electron group"),
    ),
    Term(
        "electronegativity",
        "How strongly an atom in a molecule draws electrons to itself, on Pauling's scale.",
        ("Pauling scale",),
    ),
    Term(
        "equatorial",
        "In the plane across the main axis of a trigonal or pentagonal bipyramid, written (eq)."
        " Lone pairs take equatorial sites in a trigonal bipyramid.",
        ("eq", "basal"),
    ),
    Term(
        "equivalent",
        "Of atoms, bonds or angles: exchanged by a symmetry operation of the molecule, and"
        " therefore equal.",
        ("symmetry-equivalent",),
    ),
    Term(
        "fluxional",
        "Exchanging its ligands between sites so quickly that slow methods such as NMR see an"
        " average.",
        ("pseudorotation", "Berry mechanism"),
    ),
    Term(
        "formal charge",
        "The charge an atom would have if the electrons of each bond were shared equally.",
    ),
    Term(
        "half-width",
        "The ± of a value. For the model, two of three predictions of molecules that it had not been"
        " fitted to, of the same class, were within it. In its place stands “by symmetry” where the"
        " point group shown alone gives the number.",
        ("uncertainty", "plus minus", "error bar"),
    ),
    Term(
        "hybridisation",
        "The mixing of s and p orbitals at an atom into ones that point along bonds. The customary"
        " label follows the number of domains; the s character is worked out from angles.",
        ("hybridization", "hybrid", "sp3"),
    ),
    Term(
        "hypervalent",
        "With more bonds than eight electrons allow for in the simplest drawing, as sulfur in SF₆."
        " The label names d orbitals by custom; that they take part is not implied.",
        ("expanded octet", "customary label"),
    ),
    Term(
        "ideal angle",
        "The angle of the undistorted arrangement, all domains alike: 109.5° for four, 120° for"
        " three.",
        ("ideal",),
    ),
    Term(
        "infrared-active",
        "Of a vibration: changing the dipole moment, so that it absorbs infrared light. Symmetry"
        " decides.",
        ("infrared", "IR", "IR-active"),
    ),
    Term(
        "lone pair",
        "Two valence electrons of one atom that form no bond. They take more room than a bond and"
        " close the angles beside them.",
        ("nonbonding pair", "lone electron pair"),
    ),
    Term(
        "measured",
        "Published from an experiment; the source stands on the sheet, with phase and method where"
        " they are known.",
        ("experimental",),
    ),
    Term(
        "model",
        "Worked out from the structure alone by electron domains and their repulsion. It knows"
        " nothing of the compound itself.",
        ("domain model", "VSEPR"),
    ),
    Term(
        "neighbours",
        "The atoms bonded to a centre, counted once each whatever the bond order.",
        ("coordination number", "bonded atoms"),
    ),
    Term(
        "placement",
        "One way of setting lone pairs and ligands on the sites of an arrangement; the one with the"
        " least repulsion is taken.",
        ("isomer of sites",),
    ),
    Term(
        "point group",
        "The set of all symmetry operations of a molecule, by its Schoenflies symbol: C2v for"
        " water, Td for methane.",
        ("symmetry group", "Schoenflies symbol", "symmetry"),
    ),
    Term(
        "polar",
        "With a dipole moment that symmetry does not forbid. Polar bonds can cancel, as in CO₂.",
        ("polarity", "non-polar"),
    ),
    Term(
        "polyhedral symbol",
        "IUPAC's short name for the shape around a centre: letters for the polyhedron, a number for"
        " the neighbours. SS-4 is see-saw.",
        ("polyhedral symbols",),
    ),
    Term(
        "Raman-active",
        "Of a vibration: changing the polarisability, so that it scatters light at shifted"
        " wavelength. Symmetry decides.",
        ("Raman",),
    ),
    Term(
        "recalled",
        "Of a measured value: set down from memory of its source and not yet read there again. Read"
        " the source before a protocol depends on it.",
    ),
    Term(
        "resonance form",
        "One of several drawings of equal standing for the same molecule; bond orders on a sheet are"
        " their average.",
        ("mesomeric form", "delocalisation"),
    ),
    Term(
        "revision",
        "A short mark made from all data of a sheet. The same mark means the same data.",
    ),
    Term(
        "s character",
        "The share of s orbital in a hybrid: a quarter in sp³, a third in sp², a half in sp. More s"
        " character goes with wider angles.",
    ),
    Term(
        "shape",
        "How the neighbours stand around a centre, lone pairs not looked at.",
        ("molecular shape", "geometry"),
    ),
    Term(
        "shape measure",
        "How far a centre is from an ideal polyhedron, from 0 (exactly it) to 100.",
        ("continuous shape measure",),
    ),
    Term(
        "supplied",
        "Read off coordinates that the entry brings along, such as those of a crystal structure.",
    ),
    Term(
        "three-centre bond",
        "Two electrons, or four, that hold three atoms in a row or a triangle together.",
        ("bridging hydrogen", "3c-2e", "3c-4e"),
    ),
    Term(
        "trace",
        "The numbered rules that led to a centre's shape, in the order in which they were applied.",
        ("working", "how it was worked out"),
    ),
)
