"""Canonical SMILES and InChIKey of a normalised drawing."""

from typing import Any

from rdkit import Chem
from rdkit.Chem import rdinchi

DOUBLE = Chem.BondType.DOUBLE


def canonical_smiles(mol: Chem.Mol) -> str:
    """Return RDKit's canonical SMILES of ``mol`` with hydrogens folded in."""
    copy = Chem.Mol(mol)
    # RDKit also calls rings of single bonds aromatic, tetraphosphorus for one.
    if any(bond.IsInRing() and bond.GetBondType() == DOUBLE for bond in copy.GetBonds()):
        Chem.SetAromaticity(copy)
    parameters: Any = Chem.RemoveHsParameters()
    parameters.showWarnings = False
    return str(Chem.MolToSmiles(Chem.RemoveHs(copy, parameters, sanitize=False)))


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
