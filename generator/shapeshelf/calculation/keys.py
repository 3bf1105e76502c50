"""What a result belongs to: a key that every spelling of a structure shares.

Records hold their atoms in the settled order of the structure, so that a result outlives a new
spelling of the entry's SMILES, and is dropped where anything that matters changes.
"""

import hashlib
import json
from dataclasses import replace

from shapeshelf.calculation.model import StructureKey
from shapeshelf.geometry.ordering import renumbered, settled_order
from shapeshelf.structure.molecule import Molecule

DIGEST_DIGITS = 16


def settled(molecule: Molecule) -> Molecule:
    """Return the molecule in its settled order, supplied coordinates carried along."""
    order = settled_order(molecule)
    moved = renumbered(molecule, order)
    if molecule.coordinates_angstrom is None:
        return moved
    given = molecule.coordinates_angstrom
    return replace(moved, coordinates_angstrom=tuple(given[atom] for atom in order))


def structure_key(molecule: Molecule, multiplicity: int) -> StructureKey:
    """Return the key of ``molecule``, in any order of its atoms.

    ``multiplicity`` is that of the Lewis count, which fills in what the entry leaves out.
    Supplied coordinates are no part of it: they are a start, not the structure.
    """
    one = settled(molecule)
    parts = [
        [[atom.element, atom.isotope] for atom in one.atoms],
        [sorted((bond.begin, bond.end)) for bond in one.bonds],
        [one.charge, multiplicity, molecule.smiles],
    ]
    digest = hashlib.sha256(json.dumps(parts).encode()).hexdigest()[:DIGEST_DIGITS]
    return StructureKey(molecule.smiles, molecule.charge, multiplicity, molecule.inchikey, digest)
