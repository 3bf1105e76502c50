"""Where the domains of a centre go: every distinct placement, relaxed and ranked by repulsion.

P1  The arrangement is the one in which equal domains repel each other least.
P2  Lone pairs, multiple bonds and unlike ligands are laid on its sites in every way that its
    symmetry does not make the same.
P3  Each way is relaxed under the repulsion of its own domains and ligands; the lowest wins.
P4  From seven domains on the energy hardly changes as ligands change places, so the usual
    arrangement, undistorted, stands for the average unless another is clearly lower.
"""

from dataclasses import dataclass
from functools import lru_cache

import numpy as np
import numpy.typing as npt

from shapeshelf.domains.arrangements import Arrangement, arrangement_name, arrangements
from shapeshelf.domains.layouts import layouts
from shapeshelf.domains.model import Domain, DomainKind, LewisCount, Placement
from shapeshelf.domains.parameters import DomainTraits, problem_of
from shapeshelf.domains.relaxing import relax_from, settle
from shapeshelf.domains.repulsion import Problem
from shapeshelf.domains.site_names import shape_of, site_names
from shapeshelf.errors import AnalysisError
from shapeshelf.structure.molecule import Molecule, Vector

__all__ = ["arrangement_name", "place", "traits_of"]

Array = npt.NDArray[np.float64]
KEPT = 6
SAME_ENERGY = 1e-6
FLAT_FROM, FLAT_ENERGY = 7, 0.008
"""Of P4; the spread of the three seven-domain polyhedra of IF7 and TeF7- in this model."""


@dataclass(frozen=True, slots=True)
class _Relaxed:
    """A placement with what ranks it."""

    placement: Placement
    usual: bool
    distortion: float
    """Largest change of a cosine between two domains on relaxing."""


def place(
    molecule: Molecule, lewis: LewisCount, atom: int, domains: tuple[Domain, ...]
) -> tuple[Placement, ...]:
    """Return the placements of ``domains`` round ``atom``, best first, at most six.

    Raises AnalysisError for fewer than two or more than nine domains.
    """
    if not 2 <= len(domains) <= 9:
        subject = f"{molecule.atoms[atom].element} (atom {atom})"
        raise AnalysisError(subject, f"{len(domains)} electron domains; 2 to 9 can be placed")
    traits = tuple(traits_of(molecule, domain) for domain in domains)
    rank = [_rank(molecule, domain) for domain in domains]
    order = sorted(range(len(domains)), key=lambda k: (traits[k], rank[k], k))
    ordered = _placements(molecule.atoms[atom].element, tuple(traits[k] for k in order))
    back = [order.index(k) for k in range(len(domains))]
    return tuple(_reordered(placement, back) for placement in ordered)


def traits_of(molecule: Molecule, domain: Domain) -> DomainTraits:
    """Return what the model knows of one domain of ``molecule``."""
    if domain.neighbour is None:
        return DomainTraits(domain.kind)
    element = molecule.atoms[domain.neighbour].element
    ligands = len(molecule.neighbours(domain.neighbour))
    return DomainTraits(domain.kind, element, round(domain.bond_order, 3), min(ligands, 3))


def _rank(molecule: Molecule, domain: Domain) -> int:
    return -1 if domain.neighbour is None else molecule.classes[domain.neighbour]


def _reordered(placement: Placement, back: list[int]) -> Placement:
    return Placement(
        placement.shape,
        placement.polyhedral_symbol,
        tuple(placement.ideal_directions[k] for k in back),
        tuple(placement.directions[k] for k in back),
        tuple(placement.sites[k] for k in back),
        placement.energy,
    )


@lru_cache(maxsize=4096)
def _placements(element: str, traits: tuple[DomainTraits, ...]) -> tuple[Placement, ...]:
    problem = problem_of(element, traits)
    found = [
        relaxed
        for arrangement in arrangements(len(traits))
        for relaxed in _relaxed(problem, arrangement, traits)
    ]
    best, *others = sorted(_distinct(found), key=_rank_energy)
    # P4: what lies on the same flat stretch of the energy is no placement of its own.
    dearer = [one for one in others if one.usual or one.placement.energy > best.placement.energy]
    return tuple(one.placement for one in (best, *dearer)[:KEPT])


def _distinct(found: list[_Relaxed]) -> list[_Relaxed]:
    """Of placements that relaxed into one another keep the one that had the least way to go."""
    clusters: list[list[_Relaxed]] = []
    for one in sorted(found, key=lambda one: one.placement.energy):
        energy = one.placement.energy
        if clusters and energy - clusters[-1][-1].placement.energy < SAME_ENERGY:
            clusters[-1].append(one)
        else:
            clusters.append([one])
    return [min(cluster, key=lambda one: round(one.distortion, 6)) for cluster in clusters]


def _rank_energy(one: _Relaxed) -> float:
    return one.placement.energy + (0.0 if one.usual else FLAT_ENERGY)


def _relaxed(
    problem: Problem, arrangement: Arrangement, traits: tuple[DomainTraits, ...]
) -> list[_Relaxed]:
    """Relax every placement on one arrangement, first as symmetric as it stands."""
    rows = layouts(arrangement, traits)
    gain = FLAT_ENERGY if len(traits) >= FLAT_FROM else SAME_ENERGY
    frames, energies = settle(problem, *relax_from(problem, arrangement.directions[rows]), gain)
    return [
        _described(arrangement, traits, row, frame[0], float(value))
        for row, frame, value in zip(rows, frames, energies, strict=True)
    ]


def _described(
    arrangement: Arrangement,
    traits: tuple[DomainTraits, ...],
    row: npt.NDArray[np.int64],
    directions: Array,
    energy: float,
) -> _Relaxed:
    empty = [trait.kind is not DomainKind.BOND for trait in traits]
    ideal = arrangement.directions[row]
    name = shape_of(arrangement, row, empty)
    placement = Placement(
        name.shape,
        name.polyhedral_symbol,
        _vectors(ideal),
        _vectors(directions),
        site_names(arrangement, row, empty, name.shape),
        energy,
    )
    distortion = float(np.abs(directions @ directions.T - ideal @ ideal.T).max())
    return _Relaxed(placement, arrangement.name == arrangement_name(len(traits)), distortion)


def _vectors(array: Array) -> tuple[Vector, ...]:
    return tuple((float(x), float(y), float(z)) for x, y, z in array)
