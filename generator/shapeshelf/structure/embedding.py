"""Three-dimensional coordinates by distance geometry, and their relaxation by MMFF94s.

Distance geometry with torsion preferences: S. Riniker and G. A. Landrum, J. Chem. Inf. Model. 55
(2015) 2562, doi:10.1021/acs.jcim.5b00654. Force field: T. A. Halgren, J. Comput. Chem. 20 (1999)
720 (both recalled).
"""

from collections.abc import Callable
from typing import Any

import numpy as np
import numpy.typing as npt
from rdkit import Chem, DistanceGeometry
from rdkit.Chem import rdDistGeom, rdForceFieldHelpers

from shapeshelf.errors import AnalysisError
from shapeshelf.structure.bounding import loose_bounds
from shapeshelf.structure.bridging import (
    CoordinatesLike,
    drawing_of,
    to_rdkit,
    with_coordinates,
)
from shapeshelf.structure.drawing import Drawing, is_heavy_p_block, is_metal, shell_electrons
from shapeshelf.structure.molecule import Molecule

Coordinates = npt.NDArray[np.float64]
Relaxer = Callable[[CoordinatesLike], tuple[Coordinates, float]]
"""Coordinates (n, 3) to relaxed coordinates in ångström and their energy in kcal/mol."""

MOST_STEPS = 2000
MOST_ATOM_STEPS = 40_000
"""Of a relaxation: atoms times steps; beyond some hundred atoms the last steps change little."""
FIRST_TRIES, MOST_TRIES = 5, 30
"""Starts for one conformer before the next way is tried; more for the last way."""
MOST_FOR_ORDERLY_START = 80
"""Larger molecules seldom fold into their distances from an orderly start; random ones do."""
PLACEHOLDER = 74
MOST_NEIGHBOURS = 4
"""RDKit's own distances hold for ordinary centres only."""


def embed(
    molecule: Molecule, count: int, seed: int, bounds: Coordinates | None = None
) -> list[Coordinates]:
    """Return up to ``count`` conformers, each (n, 3) in ångström; same seed, same result.

    ``bounds`` (n, n) in ångström holds upper bounds above the diagonal and lower bounds below
    it; with it, RDKit's own bounds and torsion preferences are left out. Without it they are
    used where RDKit has them, and ``loose_bounds`` elsewhere. Stereochemistry is respected.
    Raises AnalysisError where nothing fits the bounds.
    """
    if len(molecule.atoms) == 1:
        return [np.zeros((1, 3))]
    found = [] if bounds is not None else _by_preferences(molecule, count, seed)
    if not found:
        limits = loose_bounds(molecule) if bounds is None else bounds
        found = _by_bounds(molecule, count, seed, limits)
    if not found:
        raise AnalysisError(molecule.formula, "no three-dimensional structure fits the distances")
    return found


def mmff_covers(molecule: Molecule) -> bool:
    """Tell whether MMFF94s has parameters for every atom."""
    return _covers(to_rdkit(molecule))


def relax_mmff(molecule: Molecule, coordinates: CoordinatesLike) -> tuple[Coordinates, float]:
    """Return coordinates (n, 3) in ångström at the nearest MMFF94s minimum, and its energy.

    The energy is in kcal/mol. Raises AnalysisError where MMFF94s has no parameters.
    """
    return mmff_relaxer(molecule)(coordinates)


def mmff_relaxer(molecule: Molecule) -> Relaxer:
    """Return ``relax_mmff`` for many structures of one molecule.

    Raises AnalysisError where MMFF94s has no parameters.
    """
    mol = to_rdkit(molecule)
    if not _covers(mol):
        raise AnalysisError(molecule.formula, "MMFF94s has no parameters for all of its atoms")
    properties = rdForceFieldHelpers.MMFFGetMoleculeProperties(mol, mmffVariant="MMFF94s")

    steps = min(MOST_STEPS, MOST_ATOM_STEPS // len(molecule.atoms))

    def relax(coordinates: CoordinatesLike) -> tuple[Coordinates, float]:
        with_coordinates(mol, coordinates)
        field: Any = rdForceFieldHelpers.MMFFGetMoleculeForceField(mol, properties)
        field.Initialize()
        field.Minimize(maxIts=steps)
        return _positions(mol.GetConformer()), float(field.CalcEnergy())

    return relax


def _by_preferences(molecule: Molecule, count: int, seed: int) -> list[Coordinates]:
    mol = to_rdkit(molecule)
    atoms: Any = mol.GetAtoms()
    if any(
        atom.HasValenceViolation()
        or atom.GetDegree() > MOST_NEIGHBOURS
        or is_metal(atom.GetSymbol())
        for atom in atoms
    ):
        return []
    strained = _settings(seed, True)
    strained.maxIterations = MOST_TRIES
    _leave_out_preferences(strained)
    orderly = () if len(molecule.atoms) > MOST_FOR_ORDERLY_START else (_settings(seed, False),)
    tries = (*orderly, _settings(seed, True), strained)
    return next((found for try_ in tries if (found := _conformers(mol, count, try_))), [])


def _by_bounds(molecule: Molecule, count: int, seed: int, bounds: Coordinates) -> list[Coordinates]:
    mol = _with_placeholders(to_rdkit(molecule))
    for random_start in (False, True):
        settings = _settings(seed, random_start)
        settings.maxIterations = MOST_TRIES
        _use_bounds(settings, bounds)
        found = _conformers(mol, count, settings)
        if found:
            return found
    return []


def _with_placeholders(mol: Chem.RWMol) -> Chem.RWMol:
    """Put a metal, whose valence RDKit does not limit, where it would refuse the valence.

    With bounds given, the element no longer matters to distance geometry.
    """
    atoms: Any = mol.GetAtoms()
    for atom in atoms:
        if atom.HasValenceViolation():
            atom.SetAtomicNum(PLACEHOLDER)
            atom.SetFormalCharge(0)
    mol.UpdatePropertyCache(strict=False)
    return mol


def _settings(seed: int, random_start: bool) -> Any:
    settings: Any = rdDistGeom.ETKDGv3()
    settings.randomSeed = seed
    settings.numThreads = 1
    settings.useRandomCoords = random_start
    settings.ignoreSmoothingFailures = True
    settings.maxIterations = FIRST_TRIES
    return settings


def _use_bounds(settings: Any, bounds: Coordinates) -> None:
    smoothed = np.array(bounds, dtype=np.float64)
    DistanceGeometry.DoTriangleSmoothing(smoothed)
    settings.SetBoundsMat(smoothed)
    _leave_out_preferences(settings)


def _leave_out_preferences(settings: Any) -> None:
    """Torsion and planarity preferences belong to ordinary, unstrained centres."""
    settings.useExpTorsionAnglePrefs = False
    settings.useBasicKnowledge = False
    settings.useMacrocycleTorsions = False


def _conformers(mol: Chem.RWMol, count: int, settings: Any) -> list[Coordinates]:
    mol.RemoveAllConformers()
    try:
        numbers = list(rdDistGeom.EmbedMultipleConfs(mol, count, settings))
    except (RuntimeError, ValueError):
        return []
    return [_positions(mol.GetConformer(number)) for number in numbers]


def _positions(conformer: Any) -> Coordinates:
    return np.array(conformer.GetPositions(), dtype=np.float64)


def _covers(mol: Chem.RWMol) -> bool:
    """MMFF94 invents parameters for hypervalent and open-shell atoms; those do not count."""
    drawing = drawing_of(mol)
    ordinary = all(_has_octet_form(drawing, atom) for atom in range(len(drawing.elements)))
    return ordinary and bool(rdForceFieldHelpers.MMFFHasAllMoleculeParams(mol))


def _has_octet_form(drawing: Drawing, atom: int) -> bool:
    """Tell whether splitting multiple bonds into charges can give the atom an octet."""
    if drawing.elements[atom] == "H":
        return len(drawing.at[atom]) == 1
    shell = shell_electrons(drawing, atom)
    pi = sum(bond.order - 1 for bond in drawing.at[atom])
    if not is_heavy_p_block(drawing.elements[atom]):
        pi = 0
    return shell % 2 == 0 and shell - 2 * pi <= 8 <= shell
