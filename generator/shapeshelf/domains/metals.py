"""Oxidation state, d electrons and spin of a metal centre of the d or f block.

M1  Oxidation state = formal charge + orders of the plain bonds to non-metals; an arrow from a
    donor counts nothing, a donor bridging metals counts once in all. d electrons = group - it.
M2  Unpaired d electrons where no multiplicity is stated: the fewest for metals of periods 5 and
    6, for strong-field donors (carbonyl, cyanide, carbon, phosphorus) and for cobalt(III) but
    its fluoride; the most for everything else of period 4, and for tetrahedral centres.

IUPAC, Comprehensive definition of oxidation state, Pure Appl. Chem. 88 (2016) 831 (recalled);
ligand field after N. N. Greenwood and A. Earnshaw, Chemistry of the Elements, 2nd ed. (1997),
chapter 19 (recalled).
"""

from dataclasses import dataclass
from enum import StrEnum

from shapeshelf.domains.electrons import raw_free
from shapeshelf.domains.graph import BondGraph, Link
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule


class Donor(StrEnum):
    """What kind of ligand atom stands at a site."""

    HALIDE = "halide"
    MULTIPLE = "multiply bonded"
    HYDRIDE = "hydride"
    CARBONYL = "carbonyl"
    CYANIDE = "cyanide"
    CARBON = "carbon"
    PHOSPHORUS = "phosphorus"
    OTHER = "other"


STRONG = frozenset({Donor.CARBONYL, Donor.CYANIDE, Donor.CARBON, Donor.PHOSPHORUS})
LOW_SPIN_OCTAHEDRAL = (0, 1, 2, 3, 2, 1, 0, 1, 2, 1, 0)
"""Unpaired electrons by number of d electrons."""
HALOGENS = frozenset({"F", "Cl", "Br", "I"})


@dataclass(frozen=True, slots=True)
class MetalCentre:
    """A metal atom and what decides its shape."""

    atom: int
    element: str
    period: int
    group: int | None
    oxidation_state: int
    d_electrons: int | None
    """``None`` in the f block, or where the count leaves the range 0 to 10."""
    neighbours: tuple[int, ...]
    donors: tuple[Donor, ...]
    obstacle: str | None
    """Why no rule can apply, such as a bond to another metal; else ``None``."""

    @property
    def coordination(self) -> int:
        """The number of neighbours."""
        return len(self.neighbours)


def metal_centre(molecule: Molecule, graph: BondGraph, atom: int) -> MetalCentre:
    """Return what is known of the metal ``atom``, by M1."""
    element = graph.elements[atom]
    row = ELEMENTS[element]
    state = molecule.atoms[atom].formal_charge + sum(
        _taken(molecule, graph, link) for link in graph.links[atom]
    )
    whole = round(state)
    count = None if row.group is None else row.group - whole
    obstacle = _obstacle(graph, atom)
    if abs(state - whole) > 1e-6 or (count is not None and not 0 <= count <= 10):
        obstacle = obstacle or "its oxidation state cannot be read from the drawing"
        count = None
    return MetalCentre(
        atom,
        element,
        row.period,
        row.group,
        whole,
        count,
        graph.neighbours(atom),
        tuple(_donor(molecule, graph, link) for link in graph.links[atom]),
        obstacle,
    )


def unpaired_d_electrons(molecule: Molecule, graph: BondGraph) -> tuple[int, ...]:
    """Return the unpaired d electrons of every metal centre, by M2."""
    centres = (
        metal_centre(molecule, graph, atom) for atom, metal in enumerate(graph.metals) if metal
    )
    return tuple(unpaired_at(centre) for centre in centres)


def unpaired_at(centre: MetalCentre) -> int:
    """Return the unpaired d electrons of one metal centre, by M2."""
    count = centre.d_electrons
    if count is None or centre.coordination == 0:
        return 0
    if is_low_spin(centre):
        return LOW_SPIN_OCTAHEDRAL[count] if centre.coordination == 6 else count % 2
    return min(count, 10 - count)


def is_low_spin(centre: MetalCentre) -> bool:
    """Tell whether the ligand field pairs the d electrons, by M2."""
    if centre.period >= 5:
        return True
    strong = sum(donor in STRONG for donor in centre.donors)
    if 2 * strong >= centre.coordination:
        return True
    fluorides = [donor for donor in centre.donors if donor is Donor.HALIDE]
    cobalt = centre.element == "Co" and centre.d_electrons == 6 and centre.coordination == 6
    return cobalt and len(fluorides) < 6


def _taken(molecule: Molecule, graph: BondGraph, link: Link) -> float:
    """Return the electrons that a bond hands to the ligand when it is cut in ions."""
    bond = graph.bonds[link.bond]
    if bond.dative or graph.metals[link.atom]:
        return 0.0
    given = 0.0
    if raw_free(graph, link.atom, molecule.atoms[link.atom].formal_charge) % 2:
        plain = [k for k in graph.links[link.atom] if graph.metals[k.atom]]
        given = 1.0 / len(plain)
    return bond.order - given


def _obstacle(graph: BondGraph, atom: int) -> str | None:
    around = graph.neighbours(atom)
    if any(graph.metals[k] for k in around):
        return "it is bonded to another metal"
    haptic = any(
        graph.elements[k] == "C" and other in around and graph.elements[other] == "C"
        for k in around
        for other in graph.neighbours(k)
    )
    return "a ligand is bonded through a pi system" if haptic else None


def _donor(molecule: Molecule, graph: BondGraph, link: Link) -> Donor:
    element = graph.elements[link.atom]
    bond = graph.bonds[link.bond]
    terminal = graph.degree(link.atom) == 1
    if element in HALOGENS and terminal:
        return Donor.HALIDE
    if element == "H":
        return Donor.HYDRIDE
    if bond.order > 1 or (element == "O" and terminal and not bond.dative):
        return Donor.MULTIPLE
    if element == "C":
        return _carbon_donor(graph, link)
    return Donor.PHOSPHORUS if element in ("P", "As", "Sb") else Donor.OTHER


def _carbon_donor(graph: BondGraph, link: Link) -> Donor:
    """A carbon bonded to the metal and one more atom is a carbonyl, a cyanide or the like."""
    others = [k for k in graph.links[link.atom] if not graph.metals[k.atom]]
    if len(others) == 1 and graph.bonds[others[0].bond].order == 3:
        element = graph.elements[others[0].atom]
        if element == "O":
            return Donor.CARBONYL
        if element == "N" and graph.degree(others[0].atom) == 1:
            return Donor.CYANIDE
    return Donor.CARBON
