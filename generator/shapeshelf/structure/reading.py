"""SMILES, MOL, SDF and XYZ to a normalised molecule."""

import re
from pathlib import Path
from typing import Any

from rdkit import Chem

from shapeshelf.catalogue.model import StructureInput
from shapeshelf.errors import StructureError
from shapeshelf.structure.assembling import assemble
from shapeshelf.structure.checking import MOST_CHARACTERS, check_parts
from shapeshelf.structure.filing import read_file
from shapeshelf.structure.hydrogens import fill_hydrogens
from shapeshelf.structure.molecule import Molecule

FILE_ENDINGS = (".xyz", ".mol", ".sdf")

__all__ = ["read_argument", "read_file", "read_smiles", "read_structure"]


def read_structure(structure: StructureInput) -> Molecule:
    """Return the molecule of an entry's ``structure`` field. Raises StructureError."""
    if structure.smiles is not None:
        return read_smiles(structure.smiles, structure.charge, structure.multiplicity)
    if structure.file is not None:
        return read_file(structure.file, structure.charge, structure.multiplicity)
    raise StructureError("", "neither a SMILES nor a file is given")


def read_argument(text: str) -> Molecule:
    """Return the molecule of a command-line argument: a file that exists, or a SMILES.

    Raises StructureError.
    """
    if text.strip().lower().endswith(FILE_ENDINGS):
        return read_file(Path(text.strip()))
    return read_smiles(text)


def read_smiles(text: str, charge: int | None = None, multiplicity: int | None = None) -> Molecule:
    """Return the normalised molecule of a SMILES string.

    A stated ``charge`` must be that of the SMILES; ``multiplicity`` must fit its electrons.
    Raises StructureError.
    """
    stripped = text.strip()
    if not stripped:
        raise StructureError(text, "the SMILES is empty")
    if len(stripped) > MOST_CHARACTERS:
        raise StructureError(
            text, f"{len(stripped)} characters; a SMILES of at most {MOST_CHARACTERS} can be read"
        )
    mol = _parse(stripped)
    check_parts(stripped, mol)
    fill_hydrogens(mol)
    return assemble(stripped, mol, charge, multiplicity)


def _parse(text: str) -> Chem.RWMol:
    parameters: Any = Chem.SmilesParserParams()
    parameters.sanitize = False
    parameters.removeHs = False
    parameters.parseName = False
    parameters.allowCXSMILES = False
    complaint = _syntax_problem(text)
    mol = None if complaint else Chem.MolFromSmiles(text, parameters)
    if mol is None:
        raise StructureError(text, f"not a SMILES: {complaint or 'its syntax is wrong'}")
    return Chem.RWMol(mol)


def _syntax_problem(text: str) -> str | None:
    """Name the usual mistakes, which RDKit reports by position alone."""
    if re.search(r"\s", text):
        return "it contains a space"
    strange = re.search(r"[^\x21-\x7e]", text)
    if strange:
        return f"the character {strange.group()!r} has no meaning in it"
    outside = re.sub(r"\[[^\[\]]*\]", "A", text)
    if "[" in outside or "]" in outside:
        return "a square bracket is not closed"
    if outside.count("(") != outside.count(")"):
        return "the round brackets do not pair"
    return _unknown_element(text) or _open_ring(outside)


def _unknown_element(text: str) -> str | None:
    table = Chem.GetPeriodicTable()
    for symbol in re.findall(r"\[\d*([A-Z][a-z]?)", text):
        known = {table.GetElementSymbol(number) for number in range(1, 119)}
        if symbol not in known and symbol[0] not in known:
            return f"there is no element {symbol}"
    return None


def _open_ring(outside: str) -> str | None:
    labels = re.findall(r"%\((\d+)\)|%(\d\d)|(\d)", outside)
    numbers = [next(part for part in label if part) for label in labels]
    for number in numbers:
        if numbers.count(number) % 2:
            return f"ring bond {number} is not closed"
    return None
