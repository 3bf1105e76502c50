"""Canonical SMILES and InChIKey of a normalised drawing."""

from typing import Any

from rdkit import Chem
from rdkit.Chem import rdinchi


def canonical_smiles(mol: Chem.Mol) -> str:
    """Return RDKit's canonical SMILES of ``mol`` with hydrogens folded in."""
    return str(Chem.MolToSmiles(without_hydrogens(mol)))


def inchikey(mol: Chem.Mol) -> str | None:
    """Return the standard InChIKey, ``None`` where InChI cannot describe ``mol``.

    Arrows are cut first: standard InChI disconnects metals, and RDKit passes it no arrows.
    """
    copy = Chem.RWMol(mol)
    for bond in mol.GetBonds():
        if bond.GetBondType() == Chem.BondType.DATIVE:
            copy.RemoveBond(bond.GetBeginAtomIdx(), bond.GetEndAtomIdx())
    copy.UpdatePropertyCache(strict=False)
    return str(rdinchi.MolToInchiKey(copy)) or None


def without_hydrogens(mol: Chem.Mol) -> Chem.Mol:
    """Return a copy with aromatic rings marked and ordinary hydrogens folded into counts."""
    copy = Chem.Mol(mol)
    # RDKit also calls rings of single bonds aromatic, tetraphosphorus for one.
    double = Chem.BondType.DOUBLE
    if any(bond.IsInRing() and bond.GetBondType() == double for bond in copy.GetBonds()):
        Chem.SetAromaticity(copy)
    parameters: Any = Chem.RemoveHsParameters()
    parameters.showWarnings = False
    return Chem.RemoveHs(copy, parameters, sanitize=False)
