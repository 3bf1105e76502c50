"""What a page needs to draw the bench view again at any turn: plain numbers, no marks.

The numbers are those of the bench view itself, so that the first picture turned is the still
one: the same frame of principal axes, the same radii, the same first view.
"""

from dataclasses import dataclass, replace

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.bench import MOST_ATOMS, choose_view
from shapeshelf.figures.palette import element_colour
from shapeshelf.figures.projection import VIEWPOINT_RADII
from shapeshelf.figures.rings import smallest_rings
from shapeshelf.figures.scene import (
    LOBE_RADIUS_ANGSTROM,
    Lobe,
    Scene,
    Stick,
    build_scene,
    lobe_ends,
)
from shapeshelf.report.labels import atom_labels
from shapeshelf.report.model import CompoundReport
from shapeshelf.structure.molecule import Molecule, Vector

Array = NDArray[np.float64]

WIDTH, HEIGHT = 480.0, 400.0
_EDGE = 8.0
_LARGEST_SCALE = 108.0
_PERSPECTIVE_GROWTH = 1.03
"""How far beyond its distance from the middle perspective can draw a point: at most
1/sin(arccos(1/VIEWPOINT_RADII)), 1.021."""
_OUTERMOST = 0.3
"""Ångström beyond the middles of atoms and lobes that their outlines reach."""
_SMALLEST_RING, _SMALLEST_LOBE = 16.0, 12.0
"""Radii in pixels at which letters and electrons can still be read on a phone."""


@dataclass(frozen=True, slots=True)
class TurnAtom:
    """One atom: its letters (none for a corner of the carbon skeleton), place and size."""

    letters: str
    place: Vector
    """In ångström, from the middle of the drawing."""
    radius_angstrom: float
    colour: str


@dataclass(frozen=True, slots=True)
class TurnLobe:
    """One lone pair or single electron: its atom and the middle of its round end."""

    atom: int
    place: Vector
    electrons: int


@dataclass(frozen=True, slots=True)
class TurnScene:
    """A molecule ready to be turned."""

    atoms: tuple[TurnAtom, ...]
    bonds: tuple[Stick, ...]
    rings: tuple[tuple[int, ...], ...]
    """For each bond the atoms of its smallest ring, none where it lies in none."""
    lobes: tuple[TurnLobe, ...]
    lobe_radius_angstrom: float
    view: tuple[Vector, Vector, Vector]
    """Unit vectors that point right, up and towards the viewer at first."""
    eye_angstrom: float
    scale: float
    """Pixels an ångström at the depth of the middle."""
    width: float = WIDTH
    height: float = HEIGHT


def turn_scene(report: CompoundReport) -> TurnScene:
    """Return the molecule of a report ready to be turned; one of many atoms with carbon as
    corners and without the hydrogens on it, as the numbered drawing has them."""
    many = len(report.molecule.atoms) > MOST_ATOMS
    kept = _kept(report.molecule, many)
    scene = _part(build_scene(report), kept)
    scale = _scale(scene)
    if many:
        scene = replace(scene, radii=np.maximum(scene.radii, _SMALLEST_RING / scale))
    ends = lobe_ends(scene)
    middle = _middle(scene)
    letters = _letters(report, kept, scene.lobes) if many else scene.elements
    return TurnScene(
        atoms=_atoms(scene, letters, middle),
        bonds=scene.sticks,
        rings=_rings(report.molecule, kept, scene.sticks),
        lobes=tuple(
            TurnLobe(one.atom, _vector(end - middle), one.electrons)
            for one, end in zip(scene.lobes, ends, strict=True)
        ),
        lobe_radius_angstrom=round(max(LOBE_RADIUS_ANGSTROM, _SMALLEST_LOBE / scale), 4),
        view=_rows(_flattest(scene) if many else choose_view(scene)),
        eye_angstrom=round(VIEWPOINT_RADII * _span(scene), 4),
        scale=round(scale, 3),
    )


def _flattest(scene: Scene) -> Array:
    """Return the view onto the plane in which a molecule spreads most, lone pairs upwards."""
    _, _, axes = np.linalg.svd(scene.points - scene.points.mean(axis=0))
    right, up = axes[0], axes[1]
    above = np.sum([one.direction for one in scene.lobes], axis=0) if scene.lobes else -right
    up = up if up @ above >= 0 else -up
    return np.array([right, up, np.cross(right, up)])


def _middle(scene: Scene) -> Array:
    return np.asarray(np.concatenate([scene.points, lobe_ends(scene)]).mean(axis=0))


def _span(scene: Scene) -> float:
    everything = np.concatenate([scene.points, lobe_ends(scene)]) - _middle(scene)
    return float(np.linalg.norm(everything, axis=1).max()) + _OUTERMOST


def _scale(scene: Scene) -> float:
    return min(_LARGEST_SCALE, (HEIGHT / 2 - _EDGE) / _span(scene) / _PERSPECTIVE_GROWTH)


def _kept(molecule: Molecule, many: bool) -> list[int]:
    return [atom for atom in range(len(molecule.atoms)) if not (many and _folds(molecule, atom))]


def _folds(molecule: Molecule, atom: int) -> bool:
    """Tell whether an atom is a hydrogen that stands on nothing but one carbon."""
    others = [molecule.atoms[other].element for other in molecule.neighbours(atom)]
    return molecule.atoms[atom].element == "H" and others == ["C"]


def _part(scene: Scene, kept: list[int]) -> Scene:
    """Return the scene with only the atoms ``kept``, numbered anew."""
    new = {atom: index for index, atom in enumerate(kept)}
    sticks = [s for s in scene.sticks if s.begin in new and s.end in new]
    lobes = [one for one in scene.lobes if one.atom in new]
    return Scene(
        elements=tuple(scene.elements[atom] for atom in kept),
        points=scene.points[kept],
        radii=scene.radii[kept],
        sticks=tuple(Stick(new[s.begin], new[s.end], s.order, s.dative) for s in sticks),
        lobes=tuple(Lobe(new[one.atom], one.direction, one.electrons) for one in lobes),
    )


def _letters(report: CompoundReport, kept: list[int], lobes: tuple[Lobe, ...]) -> tuple[str, ...]:
    """Return label or symbol of each kept atom, nothing for a corner of the skeleton."""
    labels = atom_labels(report.molecule)
    with_lobe = {one.atom for one in lobes}
    elements = [report.molecule.atoms[atom].element for atom in kept]
    return tuple(
        {"C": labels[atom] if index in with_lobe else "", "H": "H"}.get(element, labels[atom])
        for index, (atom, element) in enumerate(zip(kept, elements, strict=True))
    )


def _rings(
    molecule: Molecule, kept: list[int], sticks: tuple[Stick, ...]
) -> tuple[tuple[int, ...], ...]:
    rings = smallest_rings(molecule)
    new = {atom: index for index, atom in enumerate(kept)}
    found = [rings.get(frozenset((kept[s.begin], kept[s.end])), ()) for s in sticks]
    return tuple(tuple(new[atom] for atom in ring) for ring in found)


def _atoms(scene: Scene, letters: tuple[str, ...], middle: Array) -> tuple[TurnAtom, ...]:
    return tuple(
        TurnAtom(
            text,
            _vector(point - middle),
            round(float(size), 4) if text else 0.0,
            element_colour(element),
        )
        for text, point, size, element in zip(
            letters, scene.points, scene.radii, scene.elements, strict=True
        )
    )


def _vector(point: Array) -> Vector:
    x, y, z = (round(float(number), 4) + 0.0 for number in point)
    return (x, y, z)


def _rows(view: Array) -> tuple[Vector, Vector, Vector]:
    right, up, toward = ((float(a), float(b), float(c)) for a, b, c in view)
    return (right, up, toward)
