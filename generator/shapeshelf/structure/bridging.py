"""Molecule to RDKit and back; RDKit's own log stays silent from here on."""

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt
from rdkit import Chem, rdBase
from rdkit.Geometry import Point3D

from shapeshelf.structure.drawing import Drawing, DrawnBond
from shapeshelf.structure.molecule import DoubleBondStereo, Molecule, TetrahedralStereo, Vector
from shapeshelf.structure.stereo import (
    read_double_bonds,
    read_tetrahedral,
    write_double_bonds,
    write_tetrahedral,
)

# RDKit prints what it refuses; the user gets our one line instead.
rdBase.DisableLog("rdApp.*")

CoordinatesLike = npt.NDArray[np.float64] | Sequence[Vector]

KINDS = {1: Chem.BondType.SINGLE, 2: Chem.BondType.DOUBLE, 3: Chem.BondType.TRIPLE}
ORDERS = {kind: order for order, kind in KINDS.items()}


@dataclass(frozen=True, slots=True)
class Stereo:
    """Both kinds of stereochemistry of one molecule."""

    tetrahedral: tuple[TetrahedralStereo, ...]
    double_bonds: tuple[DoubleBondStereo, ...]


def drawing_of(mol: Chem.Mol) -> Drawing:
    """Return the drawing in ``mol``, which must be Kekulé and have explicit hydrogens."""
    atoms = list(mol.GetAtoms())
    bonds = [
        DrawnBond(
            bond.GetBeginAtomIdx(),
            bond.GetEndAtomIdx(),
            ORDERS.get(bond.GetBondType(), 1),
            bond.GetBondType() == Chem.BondType.DATIVE,
        )
        for bond in mol.GetBonds()
    ]
    return Drawing(
        [atom.GetSymbol() for atom in atoms], [atom.GetFormalCharge() for atom in atoms], bonds
    )


def stereo_of(mol: Chem.Mol) -> Stereo:
    """Return the stereochemistry that the atoms and bonds of ``mol`` carry."""
    return Stereo(read_tetrahedral(mol), read_double_bonds(mol))


def mol_of_drawing(drawing: Drawing, isotopes: list[int], stereo: Stereo) -> Chem.RWMol:
    """Build an RDKit molecule with every hydrogen explicit; only real stereo centres stay."""
    mol = Chem.RWMol()
    for element, charge, isotope in zip(drawing.elements, drawing.charges, isotopes, strict=True):
        atom = Chem.Atom(element)
        atom.SetFormalCharge(charge)
        atom.SetIsotope(isotope)
        atom.SetNoImplicit(True)
        mol.AddAtom(atom)
    for bond in drawing.bonds:
        mol.AddBond(
            bond.begin, bond.end, Chem.BondType.DATIVE if bond.dative else KINDS[bond.order]
        )
    write_tetrahedral(mol, stereo.tetrahedral)
    write_double_bonds(mol, stereo.double_bonds)
    _perceive(mol)
    return mol


def to_rdkit(molecule: Molecule) -> Chem.RWMol:
    """Build the RDKit molecule of ``molecule``: same atom order, Kekulé, hydrogens explicit."""
    drawing = Drawing(
        [atom.element for atom in molecule.atoms],
        [atom.formal_charge for atom in molecule.atoms],
        [DrawnBond(bond.begin, bond.end, bond.order, bond.dative) for bond in molecule.bonds],
    )
    stereo = Stereo(molecule.tetrahedral_stereo, molecule.double_bond_stereo)
    return mol_of_drawing(drawing, [atom.isotope for atom in molecule.atoms], stereo)


def with_coordinates(mol: Chem.RWMol, coordinates: CoordinatesLike) -> Chem.RWMol:
    """Give ``mol`` one conformer with these coordinates (ångström), and return it."""
    conformer = Chem.Conformer(mol.GetNumAtoms())
    conformer.Set3D(True)
    for index, (x, y, z) in enumerate(np.asarray(coordinates, dtype=float)):
        conformer.SetAtomPosition(index, Point3D(float(x), float(y), float(z)))
    mol.RemoveAllConformers()
    mol.AddConformer(conformer, assignId=True)
    return mol


def _perceive(mol: Chem.RWMol) -> None:
    """Do the parts of sanitising that refuse no valence."""
    mol.UpdatePropertyCache(strict=False)
    Chem.AssignRadicals(mol)
    Chem.GetSymmSSSR(mol)
    Chem.SetConjugation(mol)
    Chem.SetHybridization(mol)
    Chem.SetDoubleBondNeighborDirections(mol)
    Chem.AssignStereochemistry(mol, cleanIt=True, force=True)
