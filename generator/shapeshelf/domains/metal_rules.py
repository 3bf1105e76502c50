"""Which polyhedron a metal centre takes, by numbered rules; outside them nothing is guessed.

M10 two neighbours: d10 linear; dihalides of period 4 with d electrons linear; actinyl linear.
M11 three: d10 and trihalides of period 4 trigonal planar; d8 of periods 5 and 6 T-shaped.
M12 four: d0 and d10 tetrahedral; d8 square planar in periods 5 and 6 and for copper(III), and
    for nickel(II) with strong-field or chelating donors; d9 square planar but for the halides
    of copper; other halides and oxides tetrahedral.
M13 five: one multiply bonded ligand at the apex of a square pyramid (d0 to d2); other d0, d10
    and 18-electron d8 trigonal bipyramidal; low-spin d6 and d7 square pyramidal.
M14 six: octahedral; d0 with six carbon or hydrogen ligands a trigonal prism.
M15 seven to nine: the table of reference/metal_shapes.py, by observation.
M16 an actinyl group stays linear, the other ligands stand round its waist.

Sources stand with the sentences, in reference/metal_shapes.py.
"""

from collections.abc import Callable
from dataclasses import dataclass

from shapeshelf.domains.graph import BondGraph
from shapeshelf.domains.metals import STRONG, Donor, MetalCentre, is_low_spin
from shapeshelf.reference.metal_shapes import GREENWOOD, HARGITTAI, HIGH_COORDINATION, KAUPP, KEPERT


@dataclass(frozen=True, slots=True)
class MetalShape:
    """The polyhedron that a rule gives."""

    rule: str
    symbol: str
    reason: str
    source: str
    departs: str | None = None
    """A sentence where the centre is known to leave the plain rule; its source follows."""


Answer = MetalShape | None


def metal_shape(graph: BondGraph, centre: MetalCentre) -> Answer:
    """Return the polyhedron of a metal centre, or ``None`` outside every rule."""
    if centre.obstacle:
        return None
    if centre.group is None:
        return _f_block(graph, centre)
    if centre.d_electrons is None:
        return None
    if centre.coordination >= 7:
        return _table(graph, centre)
    rule = BY_COORDINATION.get(centre.coordination)
    return rule(graph, centre, centre.d_electrons) if rule else None


def _f_block(graph: BondGraph, centre: MetalCentre) -> Answer:
    oxo = sum(
        donor is Donor.MULTIPLE and graph.elements[atom] == "O"
        for donor, atom in zip(centre.donors, centre.neighbours, strict=True)
    )
    symbol = {2: "L-2", 6: "OC-6", 7: "PBPY-7", 8: "HBPY-8"}.get(centre.coordination)
    if centre.element in ("U", "Np", "Pu", "Am") and oxo == 2 and symbol:
        return MetalShape("M16", symbol, "the actinyl group O=M=O is linear", GREENWOOD)
    halides = centre.donors.count(Donor.HALIDE)
    if centre.element in ("Th", "Pa", "U", "Np", "Pu") and halides == centre.coordination == 6:
        return MetalShape("M14", "OC-6", "hexahalides are octahedral", GREENWOOD)
    return _table(graph, centre)


def _table(graph: BondGraph, centre: MetalCentre) -> Answer:
    """M15."""
    kinds = {graph.elements[atom] for atom in centre.neighbours}
    key = (centre.element, min(kinds), centre.oxidation_state, centre.coordination)
    if len(kinds) > 1 or key not in HIGH_COORDINATION:
        return None
    symbol, source = HIGH_COORDINATION[key]
    return MetalShape("M15", symbol, "as observed for this ion or molecule", source)


def _two(graph: BondGraph, centre: MetalCentre, d: int) -> Answer:
    """M10."""
    if d == 10:
        return MetalShape("M10", "L-2", "d10 with two neighbours is linear", GREENWOOD)
    if centre.period == 4 and d > 0 and _all(centre, Donor.HALIDE):
        return MetalShape("M10", "L-2", "gaseous dihalides of this row are linear", HARGITTAI)
    return None


def _three(graph: BondGraph, centre: MetalCentre, d: int) -> Answer:
    """M11."""
    if d == 10:
        return MetalShape("M11", "TP-3", "d10 with three neighbours is trigonal planar", GREENWOOD)
    if centre.period == 4 and _all(centre, Donor.HALIDE):
        return MetalShape("M11", "TP-3", "gaseous trihalides of this row are planar", HARGITTAI)
    if d == 8 and centre.period >= 5:
        return MetalShape("M11", "TS-3", "d8 with three neighbours is T-shaped", KEPERT)
    return None


def _four(graph: BondGraph, centre: MetalCentre, d: int) -> Answer:
    """M12."""
    if d in (0, 10):
        return MetalShape("M12", "T-4", f"d{d} with four neighbours is tetrahedral", GREENWOOD)
    if d == 8 and _is_planar_d8(graph, centre):
        return MetalShape("M12", "SP-4", "d8 with four neighbours here is square planar", GREENWOOD)
    if d == 9 and not _all(centre, Donor.HALIDE):
        return MetalShape("M12", "SP-4", "d9 with four neighbours is square planar", GREENWOOD)
    weak = sum(donor in (Donor.HALIDE, Donor.MULTIPLE) for donor in centre.donors)
    nickel_halide = d == 8 and centre.element == "Ni" and weak >= 2
    if (_all(centre, Donor.HALIDE, Donor.MULTIPLE) and centre.period == 4) or nickel_halide:
        sentence = _flattened(centre, d)
        return MetalShape(
            "M12", "T-4", "weak-field ligands leave it tetrahedral", GREENWOOD, sentence
        )
    if _all(centre, Donor.MULTIPLE) or (d == 1 and _all(centre, Donor.HALIDE)):
        return MetalShape("M12", "T-4", f"d{d} with four such ligands is tetrahedral", GREENWOOD)
    return None


def _flattened(centre: MetalCentre, d: int) -> str | None:
    if d == 9 or (d == 4 and centre.period == 4):
        return (
            f"The d{d} tetrahedron is flattened by the Jahn-Teller effect; "
            "how far, up to square planar, depends on the counter-ion"
        )
    return None


def _is_planar_d8(graph: BondGraph, centre: MetalCentre) -> bool:
    if centre.period >= 5 or centre.element == "Cu":
        return True
    if centre.element != "Ni":
        return False
    halides = centre.donors.count(Donor.HALIDE)
    if halides:
        # Aryl phosphines leave the halide tetrahedral, alkyl phosphines make it planar.
        strong = sum(donor in STRONG for donor in centre.donors)
        return strong >= 2 and halides <= 2 and not _has_aryl_phosphine(graph, centre)
    strong = sum(donor in STRONG for donor in centre.donors)
    sulfur = sum(graph.elements[atom] == "S" for atom in centre.neighbours)
    return strong >= 2 or sulfur == 4 or _is_chelated(graph, centre)


def _has_aryl_phosphine(graph: BondGraph, centre: MetalCentre) -> bool:
    return any(
        graph.elements[atom] == "P"
        and any(
            graph.elements[carbon] == "C" and graph.degree(carbon) == 3
            for carbon in graph.neighbours(atom)
        )
        for atom in centre.neighbours
    )


def _is_chelated(graph: BondGraph, centre: MetalCentre) -> bool:
    rings = [ring for ring in graph.rings if centre.atom in ring and len(ring) in (5, 6)]
    return len(rings) >= 2


def _five(graph: BondGraph, centre: MetalCentre, d: int) -> Answer:
    """M13."""
    multiple = centre.donors.count(Donor.MULTIPLE)
    if multiple == 1 and d <= 2:
        return MetalShape(
            "M13", "SPY-5", "the multiply bonded ligand is the apex of a square pyramid", GREENWOOD
        )
    if d == 0 and _all(centre, Donor.CARBON, Donor.HYDRIDE):
        sentence = (
            "With sigma-bonded carbon or hydrogen only, d0 centres of five neighbours are square "
            "pyramidal, where electron domains ask for a trigonal bipyramid"
        )
        return MetalShape("M13", "SPY-5", "d0 without pi donors", KAUPP, sentence)
    if d in (0, 10) or (d == 1 and _all(centre, Donor.HALIDE)):
        return MetalShape("M13", "TBPY-5", f"d{d} with five neighbours", KEPERT)
    if d == 8 and not _all(centre, Donor.HALIDE, Donor.MULTIPLE):
        return MetalShape("M13", "TBPY-5", "d8 with five neighbours has 18 electrons", KEPERT)
    if d == 9 and _all(centre, Donor.HALIDE):
        return MetalShape("M13", "TBPY-5", "pentahalidocuprate(II) is a bipyramid", GREENWOOD)
    if d in (6, 7) and is_low_spin(centre):
        return MetalShape("M13", "SPY-5", f"low-spin d{d} with five neighbours", KEPERT)
    return None


def _six(graph: BondGraph, centre: MetalCentre, d: int) -> Answer:
    """M14."""
    if d <= 1 and _all(centre, Donor.CARBON, Donor.HYDRIDE):
        sentence = (
            "With sigma-bonded carbon or hydrogen only, d0 and d1 centres of six neighbours are "
            "trigonal prisms, where electron domains ask for an octahedron"
        )
        return MetalShape("M14", "TPR-6", f"d{d} without pi donors", KAUPP, sentence)
    sentence_or_none = _jahn_teller(centre, d)
    return MetalShape("M14", "OC-6", "six neighbours are octahedral", KEPERT, sentence_or_none)


def _jahn_teller(centre: MetalCentre, d: int) -> str | None:
    """Say which octahedra stretch: one or three electrons in the e_g orbitals."""
    low = is_low_spin(centre)
    if d == 9 or (d == 4 and not low) or (d == 7 and low):
        spin = "" if d == 9 else "low-spin " if low else "high-spin "
        return (
            f"The {spin}d{d} octahedron is stretched by the Jahn-Teller effect, "
            "as a rule to two long bonds opposite each other"
        )
    return None


def _all(centre: MetalCentre, *kinds: Donor) -> bool:
    return all(donor in kinds for donor in centre.donors)


BY_COORDINATION: dict[int, Callable[[BondGraph, MetalCentre, int], Answer]] = {
    2: _two,
    3: _three,
    4: _four,
    5: _five,
    6: _six,
}
