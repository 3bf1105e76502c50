"""The shape that a placement shows, and the names of its sites."""

import numpy as np
import numpy.typing as npt

from shapeshelf.domains.arrangements import Arrangement
from shapeshelf.reference.shapes import SHAPES, ShapeName

Array = npt.NDArray[np.float64]
IRREGULAR = ShapeName("irregular", None)
OPPOSITE = -0.999


def shape_of(
    arrangement: Arrangement, layout: npt.NDArray[np.int64], empty: list[bool]
) -> ShapeName:
    """Return the shape of the bonds when the domains marked ``empty`` are not looked at."""
    return SHAPES.get((arrangement.name, _pattern(arrangement, layout, empty)), IRREGULAR)


def site_names(
    arrangement: Arrangement, layout: npt.NDArray[np.int64], empty: list[bool], shape: str
) -> tuple[str, ...]:
    """Return ``ax``, ``eq``, ``ap``, ``bas`` or nothing for each domain.

    Bonds that all stand on one kind of site need no telling apart and get no name.
    """
    if shape == "square pyramidal":
        return _pyramid_sites(arrangement.directions[layout], empty)
    names = [arrangement.sites[site] for site in layout]
    if "cap" in names:
        return ("",) * len(names)
    bonded = {name for name, bare in zip(names, empty, strict=True) if not bare}
    if len(bonded) > 1:
        return tuple(names)
    return tuple(name if bare else "" for name, bare in zip(names, empty, strict=True))


def _pattern(arrangement: Arrangement, layout: npt.NDArray[np.int64], empty: list[bool]) -> str:
    """Say which sites hold no bond, in the words of the table of shapes."""
    sites = [int(site) for site, bare in zip(layout, empty, strict=True) if bare]
    names = sorted(arrangement.sites[site] for site in sites)
    if any(names) or not sites:
        return " ".join(names)
    chosen = arrangement.directions[sites]
    trans = int(np.count_nonzero(np.triu(chosen @ chosen.T < OPPOSITE)))
    return f"{len(sites)}, {trans} trans" if trans else str(len(sites))


def _pyramid_sites(directions: Array, empty: list[bool]) -> tuple[str, ...]:
    across = directions @ directions[empty.index(True)] < OPPOSITE
    return tuple(
        "" if bare else "ap" if apex else "bas" for bare, apex in zip(empty, across, strict=True)
    )
