"""What a page needs to draw the bench view again at any turn: plain numbers, no marks.

The numbers are those of the bench view itself, so that the first picture turned is the still
one: the same frame of principal axes, the same radii, the same first view.
"""

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from shapeshelf.figures.bench import MOST_ATOMS, choose_view
from shapeshelf.figures.palette import element_colour
from shapeshelf.figures.projection import VIEWPOINT_RADII
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
_SMALLEST_RING = 14.0
"""Pixels: a symbol in it can still be read on a phone."""


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
    ends = lobe_ends(scene)
    everything = np.concatenate([scene.points, ends])
    middle = everything.mean(axis=0)
    span = float(np.linalg.norm(everything - middle, axis=1).max()) + 0.3
    scale = min(_LARGEST_SCALE, (HEIGHT / 2 - _EDGE) / span / _PERSPECTIVE_GROWTH)
    letters = _letters(report, kept, scene.lobes) if many else scene.elements
    return TurnScene(
        atoms=_atoms(scene, letters, middle, _SMALLEST_RING / scale),
        bonds=scene.sticks,
        lobes=tuple(
            TurnLobe(one.atom, _vector(end - middle), one.electrons)
            for one, end in zip(scene.lobes, ends, strict=True)
        ),
        lobe_radius_angstrom=LOBE_RADIUS_ANGSTROM,
        view=_rows(choose_view(scene)),
        eye_angstrom=round(VIEWPOINT_RADII * span, 4),
        scale=round(scale, 3),
    )


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


def _atoms(
    scene: Scene, letters: tuple[str, ...], middle: Array, smallest: float
) -> tuple[TurnAtom, ...]:
    return tuple(
        TurnAtom(
            text,
            _vector(point - middle),
            round(max(float(size), smallest), 4) if text else 0.0,
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
