"""Main-group centres known not to follow the electron-domain rule, and what they do instead.

Each entry: the sentence for the page without its source, the source, the shape and symbol taken
instead (``None``: the rule's own shape stays), and where one angle tells the shape, that angle in
degrees (for a pyramid the mean of the three). All values and sources are recalled from memory.
"""

from dataclasses import dataclass

GILLESPIE = (
    "Gillespie and Hargittai, The VSEPR Model of Molecular Geometry (1991), recalled from memory"
)
GREENWOOD = "Greenwood and Earnshaw, Chemistry of the Elements (1997), recalled from memory"
HARGITTAI = "Hargittai, Chem. Rev. 100 (2000) 2233, recalled from memory"
CALDER = "Calder et al., J. Chem. Phys. 51 (1969) 2093, recalled from memory"
KAUPP = "Kaupp, Schleyer, Stoll and Preuss, J. Chem. Phys. 94 (1991) 1360, recalled from memory"
HERZBERG = "Herzberg, Electronic Spectra of Polyatomic Molecules (1966), recalled from memory"
HEDBERG = "Hedberg, J. Am. Chem. Soc. 77 (1955) 6491, recalled from memory"
ALMENNINGEN = (
    "Almenningen, Bastiansen, Ewing, Hedberg and Traetteberg, Acta Chem. Scand. 17 (1963) 2455, "
    "recalled from memory"
)


@dataclass(frozen=True, slots=True)
class KnownDeparture:
    """What a kind of centre does instead of following the rule."""

    sentence: str
    source: str
    shape: str | None = None
    symbol: str | None = None
    angle_degrees: float | None = None
    polyhedron: str | None = None
    """IUPAC symbol of the polyhedron of all domains, its first vertex that of the lone pair."""


INERT_OCTAHEDRON = KnownDeparture(
    "The lone pair is inactive: the six ligands stand octahedrally, where seven domains would "
    "leave no regular octahedron",
    GILLESPIE,
    "octahedral",
    "OC-6",
)
INERT_CAPPED = KnownDeparture(
    "The lone pair is inactive: the seven ligands form a capped octahedron",
    GREENWOOD,
    "capped octahedral",
    "OCF-7",
)
INERT_ANTIPRISM = KnownDeparture(
    "The lone pair is inactive: the eight ligands form a square antiprism",
    GREENWOOD,
    "square antiprismatic",
    "SAPR-8",
)
FLUXIONAL_HEXAFLUORIDE = KnownDeparture(
    "The lone pair only distorts the octahedron, through one face (C3v), and wanders quickly from "
    "face to face: the free molecule is fluxional",
    GILLESPIE,
    "distorted octahedral",
    "OC-6",
    polyhedron="OCF-7",
)
PLANAR_SILYLAMINE = KnownDeparture(
    "Nitrogen with two or more silyl or germyl groups is planar although it has a lone pair "
    "(trisilylamine Si-N-Si 119.7 degrees)",
    HEDBERG,
    "trigonal planar",
    "TP-3",
)
PLANAR_PERFLUOROAMINE = KnownDeparture(
    "Nitrogen with three perfluoroalkyl groups is nearly planar although it has a lone pair "
    "(C-N-C 117.9 degrees in tris(trifluoromethyl)amine)",
    GILLESPIE,
    "trigonal planar",
    "TP-3",
)
PLANAR_TRIARYLAMINE = KnownDeparture(
    "Nitrogen with three aryl groups is nearly planar although it has a lone pair, a propeller",
    "common practice, no source",
    "trigonal planar",
    "TP-3",
)
SHALLOW_AMINE = KnownDeparture(
    "The lone pair leans towards the neighbouring pi system: a pyramid shallower than that of an "
    "alkylamine, easily flattened (H-N-H 113 degrees in aniline, the three angles about 345 in sum)",
    GILLESPIE,
    angle_degrees=115.0,
)
WIDE_DISILOXANE = KnownDeparture(
    "The angle at oxygen between two silicon or germanium atoms is far wider than two lone pairs "
    "allow (Si-O-Si 144 degrees in disiloxane)",
    ALMENNINGEN,
    "bent",
    "A-2",
    144.0,
)
WIDE_SILYL_ISOCYANATE = KnownDeparture(
    "The angle at nitrogen between silicon or germanium and a cumulated carbon is far wider than "
    "a lone pair allows, with almost no force against straightening",
    GREENWOOD,
    "bent",
    "A-2",
    152.0,
)
FLOPPY_CUMULENE = KnownDeparture(
    "Linear as electron domains ask, but bending costs next to nothing: in carbon suboxide the "
    "molecule is bent at the middle on average",
    GREENWOOD,
)
LINEAR_ALKALI_OXIDE = KnownDeparture(
    "Oxygen between two alkali metal atoms is linear, the bonds being ionic",
    HERZBERG,
    "linear",
    "L-2",
    180.0,
)
BRIDGING_HYDROGEN = KnownDeparture(
    "The bridging hydrogen shares one pair with both neighbours (three-centre bond) and is bent "
    "(B-H-B about 83 degrees in diborane)",
    GREENWOOD,
    "bent",
    "A-2",
    83.0,
)
BRIDGING_CARBON = KnownDeparture(
    "The bridging carbon shares one pair with both metal atoms (three-centre bond): five "
    "neighbours but four pairs, and a sharp angle between the metals (Al-C-Al about 75 degrees in "
    "the dimer of trimethylaluminium)",
    GREENWOOD,
    "irregular",
)
PLANAR_RADICAL = KnownDeparture(
    "The single electron stays in a p orbital: the radical is planar, like methyl",
    HERZBERG,
    "trigonal planar",
    "TP-3",
)
SQUARE_INDATE = KnownDeparture(
    "The pentachloride ion is a square pyramid in its tetraethylammonium salt, where electron "
    "domains ask for a trigonal bipyramid",
    GREENWOOD,
    "square pyramidal",
    "SPY-5",
)
SQUARE_PENTAARYL = KnownDeparture(
    "The pentaphenyl compound is a square pyramid in the crystal, where electron domains ask for "
    "a trigonal bipyramid",
    GREENWOOD,
    "square pyramidal",
    "SPY-5",
)
TRANS_BENT = KnownDeparture(
    "Double bonds between germanium, tin or lead atoms are trans-bent: the centre is pyramidal, "
    "where the electron domains ask for a plane",
    GREENWOOD,
)


def _bent(text: str, angle: float, source: str) -> KnownDeparture:
    sentence = f"The free molecule is bent ({text}) where two electron domains ask for a line"
    return KnownDeparture(sentence, source, "bent", "A-2", angle)


BENT_ALKALINE_EARTH: dict[tuple[str, str], KnownDeparture] = {
    ("Ca", "F"): _bent("about 140 degrees", 140.0, CALDER),
    ("Sr", "F"): _bent("about 108 degrees", 108.0, CALDER),
    ("Ba", "F"): _bent("about 100 degrees", 100.0, CALDER),
    ("Sr", "Cl"): _bent("about 130 degrees, floppy", 130.0, HARGITTAI),
    ("Ba", "Cl"): _bent("about 120 degrees, floppy", 120.0, HARGITTAI),
    ("Ba", "Br"): _bent("about 120 degrees, floppy", 120.0, HARGITTAI),
    ("Ba", "I"): _bent("about 120 degrees, floppy", 120.0, HARGITTAI),
    ("Ca", "H"): _bent("about 157 degrees, calculated", 157.0, KAUPP),
    ("Sr", "H"): _bent("about 140 degrees, calculated", 140.0, KAUPP),
    ("Ba", "H"): _bent("about 118 degrees, calculated", 118.0, KAUPP),
}
"""By metal and the element of both neighbours."""
