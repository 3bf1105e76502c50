"""Which known departure, if any, a main-group centre falls under."""

from collections.abc import Callable
from dataclasses import dataclass

from shapeshelf.domains.bridges import is_bridge
from shapeshelf.domains.graph import BondGraph
from shapeshelf.domains.model import LewisCount
from shapeshelf.reference import departures as known
from shapeshelf.reference.departures import KnownDeparture

HEAVY_HALIDES = frozenset({"Cl", "Br", "I"})
HALIDES = HEAVY_HALIDES | {"F"}
SILYL = frozenset({"Si", "Ge"})
ALKALI = frozenset({"Li", "Na", "K", "Rb", "Cs"})
INERT_WITH_FLUORINE = frozenset({"Cl", "Br", "Se", "As"})
"""Centres small enough that six fluorines leave the lone pair no room."""
MULTIPLE = 1.1
"""Mean bond order from which a bond counts as part of a pi system."""


@dataclass(frozen=True, slots=True)
class Surroundings:
    """A centre as the table of departures sees it."""

    graph: BondGraph
    lewis: LewisCount
    atom: int

    @property
    def element(self) -> str:
        """The element of the centre."""
        return self.graph.elements[self.atom]

    @property
    def ligands(self) -> list[str]:
        """The elements of the neighbours, sorted."""
        return sorted(self.graph.elements[k] for k in self.graph.neighbours(self.atom))

    @property
    def pairs(self) -> int:
        """Lone pairs that are domains."""
        count = self.lewis.atoms[self.atom]
        return count.lone_pairs - count.delocalised_pairs

    @property
    def singles(self) -> int:
        """Single electrons that are domains."""
        count = self.lewis.atoms[self.atom]
        return count.single_electrons - count.delocalised_singles

    def pi_neighbours(self) -> list[int]:
        """Return the carbon neighbours that have a multiple bond."""
        return [k for k in self.graph.neighbours(self.atom) if self._is_pi_carbon(k)]

    def _is_pi_carbon(self, atom: int) -> bool:
        links = self.graph.links[atom]
        return self.graph.elements[atom] == "C" and any(
            self.lewis.bond_orders[link.bond] > MULTIPLE for link in links
        )


def known_departure(graph: BondGraph, lewis: LewisCount, atom: int) -> KnownDeparture | None:
    """Return the entry of reference/departures.py that ``atom`` falls under."""
    here = Surroundings(graph, lewis, atom)
    for rule in RULES:
        found = rule(here)
        if found:
            return found
    return None


def is_fluxional(domains: int, bonded: int, departure: KnownDeparture | None) -> bool:
    """Tell whether ligands are expected to change sites quickly.

    Five domains with four or five bonds by the pseudorotation of R. S. Berry, J. Chem. Phys. 32
    (1960) 933, seven and more after Gillespie and Hargittai (1991); recalled from memory.
    """
    if departure is known.FLUXIONAL_HEXAFLUORIDE:
        return True
    return (domains == 5 and bonded >= 4) or bonded >= 7


def _inert_pair(here: Surroundings) -> KnownDeparture | None:
    kinds, count = set(here.ligands), len(here.ligands)
    if here.pairs != 1 or count < 6 or not kinds <= HALIDES or len(kinds) > 1:
        return None
    if count == 8:
        return known.INERT_ANTIPRISM
    if count == 7:
        return known.INERT_CAPPED
    if kinds <= HEAVY_HALIDES or here.element in INERT_WITH_FLUORINE:
        return known.INERT_OCTAHEDRON
    return known.FLUXIONAL_HEXAFLUORIDE


def _amine(here: Surroundings) -> KnownDeparture | None:
    if here.element != "N" or here.pairs != 1 or len(here.ligands) != 3:
        return None
    if sum(element in SILYL for element in here.ligands) >= 2:
        return known.PLANAR_SILYLAMINE
    if all(_is_perfluoroalkyl(here.graph, k) for k in here.graph.neighbours(here.atom)):
        return known.PLANAR_PERFLUOROAMINE
    # A small ring holds the pyramid whatever the neighbours would like.
    if any(len(ring) == 3 and here.atom in ring for ring in here.graph.rings):
        return None
    pi_neighbours = len(here.pi_neighbours())
    if pi_neighbours == 3:
        return known.PLANAR_TRIARYLAMINE
    return known.SHALLOW_AMINE if pi_neighbours else None


def _is_perfluoroalkyl(graph: BondGraph, atom: int) -> bool:
    around = [graph.elements[k] for k in graph.neighbours(atom)]
    return graph.elements[atom] == "C" and len(around) == 4 and around.count("F") >= 2


def _oxygen_bridge(here: Surroundings) -> KnownDeparture | None:
    if here.element != "O" or here.pairs != 2 or len(here.ligands) != 2:
        return None
    if set(here.ligands) <= ALKALI:
        return known.LINEAR_ALKALI_OXIDE
    in_ring = any(here.atom in ring for ring in here.graph.rings)
    return known.WIDE_DISILOXANE if set(here.ligands) <= SILYL and not in_ring else None


def _cumulated(here: Surroundings) -> KnownDeparture | None:
    if len(here.ligands) != 2:
        return None
    heteroallene = [k for k in here.pi_neighbours() if here.graph.degree(k) == 2]
    if here.element == "N" and here.pairs == 1 and heteroallene and set(here.ligands) & SILYL:
        return known.WIDE_SILYL_ISOCYANATE
    oxides = [k for k in heteroallene if _ends_in_oxygen(here.graph, k)]
    return known.FLOPPY_CUMULENE if here.element == "C" and len(oxides) == 2 else None


def _ends_in_oxygen(graph: BondGraph, atom: int) -> bool:
    return any(graph.elements[k] == "O" and graph.degree(k) == 1 for k in graph.neighbours(atom))


def _alkaline_earth(here: Surroundings) -> KnownDeparture | None:
    kinds = set(here.ligands)
    if len(here.ligands) != 2 or len(kinds) != 1:
        return None
    return known.BENT_ALKALINE_EARTH.get((here.element, min(kinds)))


def _three_centre_bridge(here: Surroundings) -> KnownDeparture | None:
    if here.element == "C" and is_bridge(here.graph, here.atom):
        return known.BRIDGING_CARBON
    bridging = here.element == "H" and len(here.ligands) == 2
    # Between electronegative atoms it is a hydrogen bond, and straight.
    shared = bridging and set(here.ligands) <= {"B", "Be", "Al", "Ga"}
    return known.BRIDGING_HYDROGEN if shared else None


def _planar_radical(here: Surroundings) -> KnownDeparture | None:
    if here.singles != 1 or here.pairs or len(here.ligands) != 3:
        return None
    small = here.element in ("B", "C", "N")
    electronegative = sum(element in ("F", "O", "Cl", "N") for element in here.ligands)
    return known.PLANAR_RADICAL if small and electronegative <= 1 else None


def _five_without_pair(here: Surroundings) -> KnownDeparture | None:
    if len(here.ligands) != 5 or here.pairs or here.singles:
        return None
    if here.element in ("In", "Tl") and set(here.ligands) == {"Cl"}:
        return known.SQUARE_INDATE
    if here.element in ("Sb", "Bi") and len(here.pi_neighbours()) == 5:
        return known.SQUARE_PENTAARYL
    return None


def _trans_bent(here: Surroundings) -> KnownDeparture | None:
    heavy = ("Ge", "Sn", "Pb")
    doubled = any(
        here.graph.elements[link.atom] in heavy and here.lewis.bond_orders[link.bond] > 1.5
        for link in here.graph.links[here.atom]
    )
    return known.TRANS_BENT if here.element in heavy and doubled else None


RULES: tuple[Callable[[Surroundings], KnownDeparture | None], ...] = (
    _inert_pair,
    _amine,
    _oxygen_bridge,
    _cumulated,
    _alkaline_earth,
    _three_centre_bridge,
    _planar_radical,
    _five_without_pair,
    _trans_bent,
)
"""The order does not matter: no centre meets two of them."""
