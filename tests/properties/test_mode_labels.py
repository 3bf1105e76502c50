"""Modes by species: as many of each as counting says, and those of small molecules by hand."""

from collections import Counter

import numpy as np
import pytest

from shapeshelf.calculation.units import BOHR_ANGSTROM
from shapeshelf.calculation.vibrations import labelled, vibrations
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.properties.mode_labels import species_of_modes, stretching_shares
from shapeshelf.report.building import report_on_structure

ROUNDING = 1e-6


def springs(place):
    """Return a Hessian (3n, 3n) of springs between all atoms that resist sideways motion too."""
    size = len(place)
    blocks = np.zeros((size, 3, size, 3))
    for i in range(size):
        for j in range(size):
            if i != j:
                vector = place[i] - place[j]
                length = np.linalg.norm(vector)
                block = np.exp(-length) * (np.outer(vector, vector) / length**2 + 0.3 * np.eye(3))
                blocks[i, :, i, :] += block
                blocks[i, :, j, :] -= block
    return blocks.reshape(3 * size, 3 * size)


@pytest.mark.parametrize(
    "smiles",
    [
        "O",
        "N",
        "C",
        "FB(F)F",
        "OB(O)O",
        "O=C=O",
        "C#N",
        "C#C",
        "C=C=C",
        "FS(F)(F)(F)(F)F",
        "FS(F)(F)F",
        "FBr(F)(F)(F)F",
        "FP(F)(F)(F)F",
        "FI(F)(F)(F)(F)(F)F",
        "c1ccccc1",
        "FOOF",
        "[O-][N+](=O)O[N+](=O)[O-]",
    ],
)
def test_labels_agree_with_counting(smiles):
    """Springs between all atoms vibrate in the species that the characters count."""
    report = report_on_structure(smiles)
    symmetry, molecule = report.symmetry, report.molecule
    elements = [atom.element for atom in molecule.atoms]
    place = np.array(symmetry.coordinates_angstrom) / BOHR_ANGSTROM
    slopes = np.zeros((place.size, 3))
    modes, moves = vibrations(elements, place, springs(place), slopes)
    found = Counter(mode.species for mode in labelled(modes, moves, molecule, symmetry))
    counted = {row.species: row.count * row.degeneracy for row in report.spectra.modes}
    assert found == counted


def test_a_mode_of_two_species_has_no_label():
    """Half of one species and half of another is neither."""
    points = np.array([[0, 0, 0.1], [0, 0.76, -0.5], [0, -0.76, -0.5]])
    symmetry = find_symmetry(("O", "H", "H"), points, 0.01)
    both = np.array([[[0, 0, 0], [0, 1, 0], [0, -1, 0]]], float)
    odd = np.array([[[0, 0, 0], [0, 1, 0], [0, 1, 0]]], float)
    assert species_of_modes(symmetry, np.vstack([both, odd, both + odd])) == ("A1", "B2", None)


def test_stretching_share():
    """Carbon dioxide: along the line it stretches, across it bends, in between it does both."""
    points = np.array([[0, 0, 1.16], [0, 0, 0], [0, 0, -1.16]])
    masses = np.array([16.0, 12.0, 16.0])
    stretch = np.array([[0, 0, 1], [0, 0, 0], [0, 0, -1]], float)
    bend = np.array([[1, 0, 0], [-8 / 3, 0, 0], [1, 0, 0]], float)
    shares = stretching_shares(
        [(0, 1), (1, 2)], points, masses, np.array([stretch, bend, stretch + bend])
    )
    mixed = 32 / (32 + 32 + 12 * 64 / 9)
    assert shares == pytest.approx([1.0, 0.0, mixed], abs=ROUNDING)
