"""Structures by distance geometry, for ordinary and hypervalent molecules alike."""

import numpy as np
import pytest

from shapeshelf.errors import AnalysisError
from shapeshelf.structure.bounding import loose_bounds
from shapeshelf.structure.embedding import embed, mmff_covers, relax_mmff
from shapeshelf.structure.reading import read_smiles

SEED = 42
HYPERVALENT = ["FCl(F)F", "FBr(F)(F)(F)F", "FI(F)(F)(F)(F)(F)F", "O=[Xe](=O)(=O)=O", "F[Kr]F",
               "F[Xe-](F)(F)(F)F", "FS(F)(F)(F)(F)S(F)(F)(F)(F)F", "N#S(F)(F)F",
               "[O+]#[C-]->[Fe](<-[C-]#[O+])(<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]",
               "F[I-](F)(F)(F)(F)(F)(F)F", "I[I-]I"]  # fmt: skip
BOND_TOLERANCE_ANGSTROM = 0.25
"""Distance geometry starts rough; it is relaxed by whoever asked for it."""


@pytest.mark.parametrize("smiles", HYPERVALENT)
def test_molecules_without_parameters_are_embedded(smiles: str) -> None:
    """Every bond is about as long as its radii say, and no two atoms fall together."""
    molecule = read_smiles(smiles)
    points = embed(molecule, 1, SEED)[0]
    distances = np.linalg.norm(points[:, None] - points[None], axis=-1)
    bounds = loose_bounds(molecule)
    for bond in molecule.bonds:
        low, high = sorted((bond.begin, bond.end))
        middle = (bounds[low, high] + bounds[high, low]) / 2
        assert distances[low, high] == pytest.approx(middle, abs=BOND_TOLERANCE_ANGSTROM)
    assert distances[np.triu_indices(len(points), 1)].min() > 1.0


def test_given_bounds_are_met() -> None:
    """A square-planar XeF4 comes out when the bounds ask for one."""
    molecule = read_smiles("F[Xe](F)(F)F")
    length = 1.94
    corner = length * np.array([(1, 0), (0, 0), (0, 1), (-1, 0), (0, -1)])
    exact = np.linalg.norm(corner[:, None] - corner[None], axis=-1)
    margin = np.triu(np.full((5, 5), 0.005), 1)
    points = embed(molecule, 1, SEED, exact + margin - margin.T)[0]
    found = np.linalg.norm(points[:, None] - points[None], axis=-1)
    # Twice the margin of the bounds, which the error function only approaches.
    assert np.abs(found - exact).max() < 0.02


def test_impossible_bounds_are_refused() -> None:
    """Bounds that no three points meet raise, and name the molecule."""
    impossible = np.array([[0.0, 1.0, 9.0], [1.0, 0.0, 1.0], [8.9, 1.0, 0.0]])
    with pytest.raises(AnalysisError, match="H2O: no three-dimensional structure"):
        embed(read_smiles("O"), 1, SEED, impossible)


@pytest.mark.parametrize("smiles", ["CCCCO", "FCl(F)F"])
def test_same_seed_same_structure(smiles: str) -> None:
    """Embedding depends on the seed alone."""
    molecule = read_smiles(smiles)
    first, again = embed(molecule, 3, SEED), embed(molecule, 3, SEED)
    assert len(first) == 3
    assert all(np.array_equal(a, b) for a, b in zip(first, again, strict=True))
    assert not np.array_equal(first[0], embed(molecule, 1, SEED + 1)[0])


def test_a_lone_atom_stands_at_the_origin() -> None:
    """One atom needs no distances."""
    assert embed(read_smiles("[He]"), 1, SEED)[0].tolist() == [[0.0, 0.0, 0.0]]


@pytest.mark.parametrize(
    ("smiles", "covered"),
    [("CCO", True), ("CS(C)=O", True), ("C[N+](=O)[O-]", True), ("O=S(=O)(O)O", True),
     ("FS(F)(F)F", False), ("FCl(F)F", False), ("[CH3]", False), ("F[C]F", False),
     ("F[W](F)(F)(F)(F)F", False), ("F[Si-](F)(F)(F)F", False)],
)  # fmt: skip
def test_what_mmff_covers(smiles: str, covered: bool) -> None:
    """Hypervalent and open-shell molecules are outside the force field's parametrisation."""
    assert mmff_covers(read_smiles(smiles)) is covered


def test_relaxing_reaches_published_bond_lengths() -> None:
    """Ethane: C-C 1.535 Å (electron diffraction, recalled); MMFF94 is good to some 0.03 Å."""
    ethane = read_smiles("CC")
    points, energy = relax_mmff(ethane, embed(ethane, 1, SEED)[0])
    assert np.linalg.norm(points[0] - points[1]) == pytest.approx(1.535, abs=0.03)
    stretched = points.copy()
    stretched[0] *= 1.2
    assert relax_mmff(ethane, stretched)[1] == pytest.approx(energy, abs=1e-3)


def test_relaxing_what_is_not_covered_is_refused() -> None:
    """No parameters, no energy."""
    sf4 = read_smiles("FS(F)(F)F")
    with pytest.raises(AnalysisError, match="SF4: MMFF94s has no parameters"):
        relax_mmff(sf4, embed(sf4, 1, SEED)[0])
