"""MOL, SDF and XYZ files."""

from pathlib import Path

from rdkit import Chem

from shapeshelf.errors import StructureError
from shapeshelf.structure.assembling import assemble
from shapeshelf.structure.checking import check_parts
from shapeshelf.structure.molecule import Molecule, Vector
from shapeshelf.structure.perceiving import read_xyz

MOST_BYTES = 2_000_000
FLAT_ANGSTROM = 1e-3
"""A drawing in the plane has no z beyond this."""


def read_file(path: Path, charge: int | None = None, multiplicity: int | None = None) -> Molecule:
    """Return the normalised molecule of an ``.xyz``, ``.mol`` or ``.sdf`` file.

    An SDF may hold one record only. Coordinates are kept untouched where they are
    three-dimensional. Raises StructureError.
    """
    kind = path.suffix.lower()
    if kind not in (".xyz", ".mol", ".sdf"):
        raise StructureError(str(path), f"{path.name}: .xyz, .mol and .sdf files can be read")
    text = _text(path)
    if kind == ".xyz":
        return read_xyz(text, path.name, charge, multiplicity)
    return _read_mol_block(text, path.name, charge, multiplicity)


def _text(path: Path) -> str:
    try:
        if path.stat().st_size > MOST_BYTES:
            raise StructureError(str(path), f"{path.name}: larger than {MOST_BYTES} bytes")
        return path.read_text(encoding="utf-8", errors="strict")
    except UnicodeDecodeError:
        raise StructureError(str(path), f"{path.name}: not a text file in UTF-8") from None
    except OSError as error:
        reason = error.strerror or "cannot be opened"
        raise StructureError(str(path), f"{path.name}: {reason}") from None


def _read_mol_block(text: str, name: str, charge: int | None, multiplicity: int | None) -> Molecule:
    records = [part for part in text.split("$$$$") if part.strip()]
    if len(records) > 1:
        raise StructureError(name, f"{name}: {len(records)} records; one molecule is wanted")
    mol = _parse_block(text)
    if mol is None:
        raise StructureError(name, f"{name}: not a readable MOL file")
    check_parts(name, mol)
    coordinates = _coordinates(mol)
    _fill(mol)
    implied = sum(atom.GetNumExplicitHs() for atom in mol.GetAtoms())
    if coordinates and implied:
        raise StructureError(
            name,
            f"{name}: {implied} hydrogens have no coordinates; add them, or give a flat drawing",
        )
    if coordinates:
        Chem.AssignStereochemistryFrom3D(mol)
    return assemble(name, mol, charge, multiplicity, coordinates)


def _parse_block(text: str) -> Chem.RWMol | None:
    try:
        mol = Chem.MolFromMolBlock(text, sanitize=False, removeHs=False, strictParsing=False)
    except (RuntimeError, ValueError):
        return None
    return None if mol is None else Chem.RWMol(mol)


def _fill(mol: Chem.RWMol) -> None:
    """Turn the hydrogens that the format implies into counts."""
    mol.UpdatePropertyCache(strict=False)
    for atom in mol.GetAtoms():
        atom.SetNumExplicitHs(atom.GetTotalNumHs())
        atom.SetNoImplicit(True)


def _coordinates(mol: Chem.RWMol) -> tuple[Vector, ...] | None:
    if mol.GetNumConformers() == 0:
        return None
    positions = mol.GetConformer().GetPositions()
    if abs(positions[:, 2]).max() < FLAT_ANGSTROM and not mol.GetConformer().Is3D():
        return None
    return tuple((float(x), float(y), float(z)) for x, y, z in positions)
