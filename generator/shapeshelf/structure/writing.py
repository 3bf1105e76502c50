"""XYZ and SDF text that other programs read."""

from collections.abc import Mapping

import numpy as np
from rdkit import Chem

from shapeshelf.structure.bridging import CoordinatesLike, to_rdkit, with_coordinates
from shapeshelf.structure.molecule import Molecule

TITLE_LENGTH = 80
"""A MOL file's first line holds no more."""


def write_xyz(molecule: Molecule, coordinates: CoordinatesLike, title: str) -> str:
    """Return an XYZ file: coordinates (n, 3) in ångström, charge and title on line two."""
    points = np.asarray(coordinates, dtype=float)
    rows = [
        f"{atom.element:<2} {x:14.8f} {y:14.8f} {z:14.8f}"
        for atom, (x, y, z) in zip(molecule.atoms, points, strict=True)
    ]
    comment = f"{_one_line(title)} charge={molecule.charge}"
    if molecule.multiplicity is not None:
        comment += f" multiplicity={molecule.multiplicity}"
    return "\n".join([str(len(rows)), comment.strip(), *rows]) + "\n"


def write_sdf(
    molecule: Molecule,
    coordinates: CoordinatesLike,
    title: str,
    properties: Mapping[str, object] | None = None,
) -> str:
    """Return one SDF record: coordinates (n, 3) in ångström, then the data fields.

    The format has no arrows that every program reads: a donor's bond is written as a single one
    with its charges, plus at the donor and minus at the acceptor.
    """
    mol = with_coordinates(_without_arrows(to_rdkit(molecule)), coordinates)
    mol.SetProp("_Name", _one_line(title)[:TITLE_LENGTH])
    block = Chem.MolToMolBlock(mol, kekulize=False, includeStereo=True)
    fields = "".join(
        f">  <{_field_name(name)}>\n{_one_line(str(value))}\n\n"
        for name, value in (properties or {}).items()
    )
    return f"{block}{fields}$$$$\n"


def _without_arrows(mol: Chem.RWMol) -> Chem.RWMol:
    for bond in mol.GetBonds():
        if bond.GetBondType() == Chem.BondType.DATIVE:
            donor, acceptor = bond.GetBeginAtom(), bond.GetEndAtom()
            if not _drawn_as_cumulene(bond, donor):
                donor.SetFormalCharge(donor.GetFormalCharge() + 1)
                acceptor.SetFormalCharge(acceptor.GetFormalCharge() - 1)
                bond.SetBondType(Chem.BondType.SINGLE)
    mol.UpdatePropertyCache(strict=False)
    return mol


def _drawn_as_cumulene(bond: Chem.Bond, donor: Chem.Atom) -> bool:
    """Draw a carbonyl's arrow as M=C=O, the form without charges; of any other, say no."""
    for inner in donor.GetBonds():
        end = inner.GetOtherAtom(donor)
        if inner.GetBondType() == Chem.BondType.TRIPLE and end.GetFormalCharge() == 1:
            donor.SetFormalCharge(donor.GetFormalCharge() + 1)
            end.SetFormalCharge(0)
            inner.SetBondType(Chem.BondType.DOUBLE)
            bond.SetBondType(Chem.BondType.DOUBLE)
            return True
    return False


def _one_line(text: str) -> str:
    """Fold white space, so that no text can break the file apart."""
    return " ".join(text.replace("$$$$", " ").split())


def _field_name(name: str) -> str:
    return _one_line(name).replace("<", "").replace(">", "")
