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
    """Return one SDF record: coordinates (n, 3) in ångström, then the data fields."""
    mol = with_coordinates(to_rdkit(molecule), coordinates)
    mol.SetProp("_Name", _one_line(title)[:TITLE_LENGTH])
    block = Chem.MolToMolBlock(mol, kekulize=False, includeStereo=True)
    fields = "".join(
        f">  <{_field_name(name)}>\n{_one_line(str(value))}\n\n"
        for name, value in (properties or {}).items()
    )
    return f"{block}{fields}$$$$\n"


def _one_line(text: str) -> str:
    """Fold white space, so that no text can break the file apart."""
    return " ".join(text.replace("$$$$", " ").split())


def _field_name(name: str) -> str:
    return _one_line(name).replace("<", "").replace(">", "")
