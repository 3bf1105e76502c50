"""Flat coordinates for Lewis drawings."""

import numpy as np
import pytest

from shapeshelf.structure.depicting import flat_coordinates
from shapeshelf.structure.reading import read_smiles


@pytest.mark.parametrize("smiles", ["O", "FS(F)(F)F", "FCl(F)F", "c1ccncc1", "CC(=O)O", "[He]",
                                    "FI(F)(F)(F)(F)(F)F", "N->[Pt](<-N)(Cl)Cl"])  # fmt: skip
def test_drawings_keep_atoms_apart(smiles: str) -> None:
    """Every atom has its place, bonds are of one length, twice gives the same drawing."""
    molecule = read_smiles(smiles)
    flat = flat_coordinates(molecule)
    assert flat.shape == (len(molecule.atoms), 2)
    lengths = [float(np.linalg.norm(flat[b.begin] - flat[b.end])) for b in molecule.bonds]
    assert all(1.0 < length < 2.0 for length in lengths)
    apart = np.linalg.norm(flat[:, None] - flat[None], axis=-1) + 9 * np.eye(len(flat))
    assert apart.min() > 0.4
    assert np.array_equal(flat, flat_coordinates(molecule))
