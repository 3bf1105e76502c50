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
from shapeshelf.domains.repulsion import Problem, frames_for, relax, stable, turn
from shapeshelf.domains.site_names import shape_of, site_names
from shapeshelf.errors import AnalysisError
from shapeshelf.structure.molecule import Molecule, Vector

__all__ = ["arrangement_name", "place", "traits_of"]

Array = npt.NDArray[np.float64]
KEPT = 6
SAME_ENERGY = 1e-6
FLAT_FROM, FLAT_ENERGY = 7, 0.008
NUDGE_RADIANS = 0.02


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
    ranked = sorted(_distinct(found), key=_rank_energy)
    return tuple(one.placement for one in ranked[:KEPT])


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
    frames, energies = _best_split(problem, arrangement.directions[rows])
    frames, energies = _settled(problem, frames, energies)
    return [
        _described(arrangement, traits, row, frame[0], float(value))
        for row, frame, value in zip(rows, frames, energies, strict=True)
    ]


def _best_split(problem: Problem, ideal: Array) -> tuple[Array, Array]:
    """Relax (b, n, 3) directions with double bonds split either way, and keep the lower."""
    towards = _towards_nearest(ideal)
    starts = [frames_for(ideal, np.cross(ideal, towards))]
    if len(problem.owner) > ideal.shape[1] > 3:
        starts.append(frames_for(ideal, towards))
    frames, energies = relax(problem, starts[0])
    for start in starts[1:]:
        other, value = relax(problem, start)
        lower = value < energies - SAME_ENERGY
        frames = np.where(lower[:, None, None, None], other, frames)
        energies = np.where(lower, value, energies)
    return frames, energies


def _towards_nearest(directions: Array) -> Array:
    """Return (b, n, 3) unit vectors across each direction towards the domain nearest to it.

    For a domain whose nearest lies straight across, any perpendicular, turned by a quarter from
    one such domain to the next, as the pi planes of a cumulene are.
    """
    cosines = np.round(directions @ directions.transpose(0, 2, 1), 6)
    nearest = np.argmax(cosines - 3 * np.eye(directions.shape[1]), axis=2)
    toward = np.take_along_axis(directions, nearest[..., None], axis=1)
    straight = np.abs((toward * directions).sum(-1, keepdims=True)) > 0.999
    axes = np.eye(3)[np.argsort(np.abs(directions), axis=-1)[..., :2]]
    aside = np.where((np.arange(directions.shape[1]) % 2)[:, None], axes[:, :, 1], axes[:, :, 0])
    toward = np.where(straight, aside, toward)
    toward = toward - (toward * directions).sum(-1, keepdims=True) * directions
    return np.asarray(toward / np.linalg.norm(toward, axis=-1, keepdims=True))


def _settled(problem: Problem, frames: Array, energies: Array) -> tuple[Array, Array]:
    """Let the best placement leave a saddle that its symmetry held it on (but see P4)."""
    best = int(np.argmin(np.round(energies, 9)))
    chosen = frames[best : best + 1]
    if stable(problem, chosen)[0]:
        return frames, energies
    random = np.random.default_rng(0).normal(size=(1, frames.shape[2], 3))
    moved, value = relax(problem, turn(chosen, NUDGE_RADIANS * random))
    gain = FLAT_ENERGY if frames.shape[2] >= FLAT_FROM else SAME_ENERGY
    if value[0] < energies[best] - gain:
        frames[best], energies[best] = moved[0], value[0]
    return frames, energies


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
