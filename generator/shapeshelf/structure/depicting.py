"""Flat coordinates for a Lewis drawing."""

import numpy as np
import numpy.typing as npt
from rdkit.Chem import rdDepictor

from shapeshelf.structure.bridging import to_rdkit
from shapeshelf.structure.molecule import Molecule


def flat_coordinates(molecule: Molecule) -> npt.NDArray[np.float64]:
    """Return (n, 2) coordinates of a drawing, hydrogens included; a bond is about 1.5 long."""
    mol = to_rdkit(molecule)
    rdDepictor.SetPreferCoordGen(False)
    rdDepictor.Compute2DCoords(mol, canonOrient=True)
    return np.array(mol.GetConformer().GetPositions()[:, :2], dtype=np.float64)
