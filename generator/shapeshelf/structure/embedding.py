"""Three-dimensional coordinates by distance geometry, and their relaxation by MMFF94s.

Distance geometry with torsion preferences: S. Riniker and G. A. Landrum, J. Chem. Inf. Model. 55
(2015) 2562, doi:10.1021/acs.jcim.5b00654. Force field: T. A. Halgren, J. Comput. Chem. 20 (1999)
720 (both recalled).
"""

from collections.abc import Sequence
from typing import Any

import numpy as np
import numpy.typing as npt
from rdkit import Chem, DistanceGeometry
from rdkit.Chem import rdDistGeom, rdForceFieldHelpers
from rdkit.Geometry import Point3D

from shapeshelf.errors import AnalysisError
from shapeshelf.structure.bridging import to_rdkit
from shapeshelf.structure.molecule import Molecule, Vector

Coordinates = npt.NDArray[np.float64]
CoordinatesLike = Coordinates | Sequence[Vector]

MOST_STEPS = 2000


def embed(
    molecule: Molecule, count: int, seed: int, bounds: Coordinates | None = None
) -> list[Coordinates]:
    """Return up to ``count`` conformers, each (n, 3) in ångström; same seed, same result.

    ``bounds`` (n, n) in ångström holds upper bounds above the diagonal and lower bounds below
    it; with it, RDKit's own bounds and torsion preferences are left out. Stereochemistry is
    respected. Raises AnalysisError where nothing fits the bounds.
    """
    mol = to_rdkit(molecule)
    if mol.GetNumAtoms() == 1:
        return [np.zeros((1, 3))]
    for random_start in (False, True):
        settings = _settings(seed, random_start)
        if bounds is not None:
            _use_bounds(settings, bounds)
        found = _conformers(mol, count, settings)
        if found:
            return found
    raise AnalysisError(molecule.formula, "no three-dimensional structure fits the distances")


def mmff_covers(molecule: Molecule) -> bool:
    """Tell whether MMFF94s has parameters for every atom."""
    return _covers(to_rdkit(molecule))


def relax_mmff(molecule: Molecule, coordinates: CoordinatesLike) -> tuple[Coordinates, float]:
    """Return coordinates (n, 3) in ångström at the nearest MMFF94s minimum, and its energy.

    The energy is in kcal/mol. Raises AnalysisError where MMFF94s has no parameters.
    """
    mol = with_coordinates(to_rdkit(molecule), coordinates)
    if not _covers(mol):
        raise AnalysisError(molecule.formula, "MMFF94s has no parameters for all of its atoms")
    properties = rdForceFieldHelpers.MMFFGetMoleculeProperties(mol, mmffVariant="MMFF94s")
    field: Any = rdForceFieldHelpers.MMFFGetMoleculeForceField(mol, properties)
    field.Initialize()
    field.Minimize(maxIts=MOST_STEPS)
    return _positions(mol.GetConformer()), float(field.CalcEnergy())


def with_coordinates(mol: Chem.RWMol, coordinates: CoordinatesLike) -> Chem.RWMol:
    """Give ``mol`` one conformer with these coordinates (ångström), and return it."""
    conformer = Chem.Conformer(mol.GetNumAtoms())
    conformer.Set3D(True)
    for index, (x, y, z) in enumerate(np.asarray(coordinates, dtype=float)):
        conformer.SetAtomPosition(index, Point3D(float(x), float(y), float(z)))
    mol.RemoveAllConformers()
    mol.AddConformer(conformer, assignId=True)
    return mol


def _settings(seed: int, random_start: bool) -> Any:
    settings: Any = rdDistGeom.ETKDGv3()
    settings.randomSeed = seed
    settings.numThreads = 1
    settings.useSmallRingTorsions = True
    settings.useRandomCoords = random_start
    settings.ignoreSmoothingFailures = True
    settings.trackFailures = False
    return settings


def _use_bounds(settings: Any, bounds: Coordinates) -> None:
    smoothed = np.array(bounds, dtype=np.float64)
    DistanceGeometry.DoTriangleSmoothing(smoothed)
    settings.SetBoundsMat(smoothed)
    # Torsion and planarity preferences belong to ordinary valences and would pull the other way.
    settings.useExpTorsionAnglePrefs = False
    settings.useBasicKnowledge = False
    settings.useSmallRingTorsions = False
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
    return bool(rdForceFieldHelpers.MMFFHasAllMoleculeParams(mol))
