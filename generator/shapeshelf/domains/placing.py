"""Where the domains of a centre go: every distinct placement, relaxed and ranked by repulsion.

P1  The arrangement is the one in which equal domains repel each other least.
P2  Lone pairs, multiple bonds and unlike ligands are laid on its sites in every way that its
    symmetry does not make the same.
P3  Each way is relaxed under the repulsion of its own domains and ligands; the lowest wins.
"""

from collections.abc import Iterator
from functools import lru_cache

import numpy as np
import numpy.typing as npt

from shapeshelf.domains.arrangements import Arrangement, arrangement_name, arrangements
from shapeshelf.domains.model import Domain, DomainKind, LewisCount, Placement
from shapeshelf.domains.parameters import DomainTraits, problem_of
from shapeshelf.domains.repulsion import Problem, frames_for, relax, stable, turn
from shapeshelf.errors import AnalysisError
from shapeshelf.reference.shapes import SHAPES, ShapeName
from shapeshelf.structure.molecule import Molecule, Vector

__all__ = ["arrangement_name", "place", "traits_of"]

Array = npt.NDArray[np.float64]
KEPT = 6
ENUMERATED = 400
SAME_ENERGY = 1e-6
IRREGULAR = ShapeName("irregular", None)


def place(
    molecule: Molecule, lewis: LewisCount, atom: int, domains: tuple[Domain, ...]
) -> tuple[Placement, ...]:
    """Return the placements of ``domains`` round ``atom``, best first, at most six.

    Raises AnalysisError for fewer than two or more than nine domains.
    """
    if not 2 <= len(domains) <= 9:
        subject = f"{molecule.atoms[atom].element} (atom {atom})"
        raise AnalysisError(subject, f"{len(domains)} electron domains; 2 to 9 can be placed")
    traits = tuple(traits_of(molecule, lewis, domain) for domain in domains)
    rank = [_rank(molecule, domain) for domain in domains]
    order = sorted(range(len(domains)), key=lambda k: (traits[k], rank[k], k))
    ordered = _placements(molecule.atoms[atom].element, tuple(traits[k] for k in order))
    back = [order.index(k) for k in range(len(domains))]
    return tuple(_reordered(placement, back) for placement in ordered)


def traits_of(molecule: Molecule, lewis: LewisCount, domain: Domain) -> DomainTraits:
    """Return what the model knows of one domain of ``molecule``."""
    if domain.neighbour is None:
        return DomainTraits(domain.kind)
    neighbour = molecule.atoms[domain.neighbour].element
    return DomainTraits(domain.kind, neighbour, round(domain.bond_order, 3))


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
        placement
        for arrangement in arrangements(len(traits))
        for placement in _relaxed(problem, arrangement, traits)
    ]
    found.sort(key=lambda placement: placement.energy)
    kept: list[Placement] = []
    for placement in found:
        if all(placement.energy - other.energy > SAME_ENERGY for other in kept):
            kept.append(placement)
    return tuple(kept[:KEPT])


def _relaxed(
    problem: Problem, arrangement: Arrangement, traits: tuple[DomainTraits, ...]
) -> list[Placement]:
    """Relax every placement on one arrangement, first as symmetric as it stands."""
    layouts = np.array(list(_layouts(arrangement, traits)))
    ideal = arrangement.directions[layouts]
    frames, energies = relax(problem, frames_for(ideal))
    frames, energies = _settled(problem, frames, energies)
    return [
        _described(arrangement, traits, layout, frame[0], float(value))
        for layout, frame, value in zip(layouts, frames, energies, strict=True)
    ]


def _settled(problem: Problem, frames: Array, energies: Array) -> tuple[Array, Array]:
    """Let the best placement leave a saddle that its symmetry held it on."""
    best = int(np.argmin(np.round(energies, 9)))
    if stable(problem, frames[best : best + 1])[0]:
        return frames, energies
    nudge = 0.02 * np.random.default_rng(0).normal(size=(1, frames.shape[2], 3))
    start = turn(frames[best : best + 1], nudge)
    moved, value = relax(problem, start)
    if value[0] < energies[best]:
        frames[best], energies[best] = moved[0], value[0]
    return frames, energies


def _layouts(
    arrangement: Arrangement, traits: tuple[DomainTraits, ...]
) -> Iterator[tuple[int, ...]]:
    """Yield, for each distinct placement, the site of each domain."""
    kinds = sorted(set(traits))
    colours = [kinds.index(trait) for trait in traits]
    seen: set[tuple[int, ...]] = set()
    for painting in _paintings(tuple(colours)):
        if painting in seen:
            continue
        seen.update(tuple(painting[k] for k in row) for row in arrangement.symmetries.tolist())
        yield _sites_of(painting, colours)


def _paintings(colours: tuple[int, ...]) -> Iterator[tuple[int, ...]]:
    """Yield every distinct order of ``colours``, the smallest first."""
    if not colours:
        yield ()
    for colour in sorted(set(colours)):
        index = colours.index(colour)
        for rest in _paintings(colours[:index] + colours[index + 1 :]):
            yield (colour, *rest)


def _sites_of(painting: tuple[int, ...], colours: list[int]) -> tuple[int, ...]:
    free = {colour: [k for k, c in enumerate(painting) if c == colour] for colour in set(colours)}
    return tuple(free[colour].pop(0) for colour in colours)


def _described(
    arrangement: Arrangement,
    traits: tuple[DomainTraits, ...],
    layout: npt.NDArray[np.int64],
    directions: Array,
    value: float,
) -> Placement:
    empty = [trait.kind is not DomainKind.BOND for trait in traits]
    name = SHAPES.get((arrangement.name, _pattern(arrangement, layout, empty)), IRREGULAR)
    return Placement(
        name.shape,
        name.polyhedral_symbol,
        _vectors(arrangement.directions[layout]),
        _vectors(directions),
        _site_names(arrangement, layout, empty, name.shape),
        value,
    )


def _vectors(array: Array) -> tuple[Vector, ...]:
    return tuple((float(x), float(y), float(z)) for x, y, z in array)


def _pattern(arrangement: Arrangement, layout: npt.NDArray[np.int64], empty: list[bool]) -> str:
    """Say which sites hold no bond, in the words of the table of shapes."""
    sites = [int(site) for site, bare in zip(layout, empty, strict=True) if bare]
    names = sorted(arrangement.sites[site] for site in sites)
    if any(names) or not sites:
        return " ".join(names)
    chosen = arrangement.directions[sites]
    trans = int(np.count_nonzero(np.triu(chosen @ chosen.T < -0.999)))
    return f"{len(sites)}, {trans} trans" if trans else str(len(sites))


def _site_names(
    arrangement: Arrangement, layout: npt.NDArray[np.int64], empty: list[bool], shape: str
) -> tuple[str, ...]:
    if shape == "square pyramidal":
        return _pyramid_sites(arrangement.directions[layout], empty)
    names = [arrangement.sites[site] for site in layout]
    if "cap" in names:
        return ("",) * len(names)
    bonded = {name for name, bare in zip(names, empty, strict=True) if not bare}
    if len(bonded) > 1:
        return tuple(names)
    # Bonds that all stand on one kind of site need no telling apart.
    return tuple(name if bare else "" for name, bare in zip(names, empty, strict=True))


def _pyramid_sites(directions: Array, empty: list[bool]) -> tuple[str, ...]:
    bare = directions[empty.index(True)]
    across = directions @ bare < -0.999
    return tuple(
        "" if hollow else "ap" if apex else "bas"
        for hollow, apex in zip(empty, across, strict=True)
    )
