"""Arrangements of two to nine equal domains, found by minimising their repulsion.

Nothing is looked up but the names: points on a sphere are relaxed from fixed starts
under repulsion 1 / d^n, n = 1 (soft) and 8 (hard). For seven domains soft and hard repulsion
favour different polyhedra (D. L. Kepert, Inorganic Stereochemistry (1982), recalled from
memory), so both are kept.
"""

import math
from dataclasses import dataclass
from functools import cache

import numpy as np
import numpy.typing as npt

from shapeshelf.domains.repulsion import frames_for, problem_for, relax
from shapeshelf.reference.shapes import ARRANGEMENTS, SITES

Array = npt.NDArray[np.float64]
STARTS, STEPS, SHAKE = 4, 60, 0.3


@dataclass(frozen=True, slots=True)
class Arrangement:
    """One polyhedron: where its sites are, what they are called, how it maps on itself."""

    name: str
    directions: Array
    """(n, 3) unit vectors."""
    sites: tuple[str, ...]
    symmetries: npt.NDArray[np.int64]
    """(g, n) permutations of the sites that keep every distance."""


def arrangement_name(count: int) -> str:
    """Return the name of the usual arrangement of ``count`` domains, 2 to 9."""
    return next(iter(ARRANGEMENTS[count].values()))


@cache
def arrangements(count: int) -> tuple[Arrangement, ...]:
    """Return the arrangements of ``count`` domains, 2 to 9, the softest repulsion's first."""
    found: dict[str, Arrangement] = {}
    for soft in (True, False)[: len(ARRANGEMENTS[count])]:
        arrangement = _describe(_spread(count, soft))
        found.setdefault(arrangement.name, arrangement)
    return tuple(found.values())


def _spread(count: int, soft: bool) -> Array:
    """Return (n, 3) unit vectors of least repulsion among the fixed starts."""
    ones, none = np.ones(count), np.zeros(count)
    problem = problem_for(ones if soft else none, none, ones, ones / 2, float(not soft), 0.0)
    frames, energies = relax(problem, frames_for(_starts(count)), steps=STEPS)
    return np.asarray(frames[int(np.argmin(np.round(energies, 6))), 0])


def _starts(count: int) -> Array:
    """Return (b, n, 3) unit vectors: a spiral from pole to pole, shaken in fixed ways."""
    height = 1 - (2 * np.arange(count) + 1) / count
    around = np.arange(count) * math.pi * (3 - math.sqrt(5))
    ring = np.sqrt(1 - height**2)
    spiral = np.stack([ring * np.cos(around), ring * np.sin(around), height], axis=1)
    shake = np.random.default_rng(count).normal(size=(STARTS, count, 3))
    return _unit(spiral + SHAKE * shake)


def _describe(rough: Array) -> Arrangement:
    cosines = rough @ rough.T
    symmetries = np.array(_automorphisms(np.round(cosines, 3)), dtype=np.int64)
    directions = _exact(cosines, symmetries)
    count = len(directions)
    orbits = [frozenset(symmetries[:, site].tolist()) for site in range(count)]
    sizes = tuple(sorted(len(orbit) for orbit in set(orbits)))
    name = ARRANGEMENTS[count][sizes]
    sites = tuple(SITES.get(name, {}).get(len(orbit), "") for orbit in orbits)
    return Arrangement(name, directions, sites, symmetries)


def _automorphisms(cosines: Array) -> list[list[int]]:
    """Return every permutation of the sites that leaves the table of cosines as it is."""
    partial: list[list[int]] = [[]]
    for site in range(len(cosines)):
        partial = [
            [*images, image]
            for images in partial
            for image in range(len(cosines))
            if image not in images
            and all(abs(cosines[image, images[k]] - cosines[site, k]) < 5e-3 for k in range(site))
        ]
    return partial


def _exact(cosines: Array, symmetries: npt.NDArray[np.int64]) -> Array:
    """Return (n, 3) unit vectors, symmetry exact, the unique axis along z where there is one."""
    mean = np.mean([cosines[np.ix_(row, row)] for row in symmetries], axis=0)
    values, vectors = np.linalg.eigh(mean)
    spread = np.maximum(np.pad(values, (3, 0))[-3:], 0)
    unit = _unit(np.pad(vectors, ((0, 0), (3, 0)))[:, -3:] * np.sqrt(spread))
    order = [1, 2, 0] if spread[1] - spread[0] > spread[2] - spread[1] else [0, 1, 2]
    return np.asarray(unit[:, order])


def _unit(vectors: Array) -> Array:
    return np.asarray(vectors / np.linalg.norm(vectors, axis=-1, keepdims=True))
