"""What the turning picture is drawn from: nothing lost, nothing bent, all within the paper."""

from itertools import combinations

import numpy as np
import pytest

from shapeshelf.figures.bench import choose_view
from shapeshelf.figures.rings import smallest_rings
from shapeshelf.figures.scene import build_scene
from shapeshelf.figures.turning import turn_scene
from shapeshelf.report.building import report_on_structure
from shapeshelf.structure.reading import read_smiles

ROUNDING_ANGSTROM = 2e-4
"""Places carry four decimals; a distance of two of them is off by at most twice that."""
ORTHONORMAL = 1e-9


def places(scene):
    return np.array([atom.place for atom in scene.atoms])


def test_distances_are_those_of_the_bench_view(reports):
    """Every distance of two atoms, so every length and angle, of every hand-made report."""
    for report in reports.values():
        drawn, still = places(turn_scene(report)), build_scene(report).points
        for one, other in combinations(range(len(still)), 2):
            expected = np.linalg.norm(still[one] - still[other])
            found = np.linalg.norm(drawn[one] - drawn[other])
            assert found == pytest.approx(expected, abs=ROUNDING_ANGSTROM)


def test_it_starts_as_the_still_picture_stands(reports):
    """The first view is the bench view's, and every atom and lone pair is there."""
    for report in reports.values():
        scene, still = turn_scene(report), build_scene(report)
        assert np.allclose(scene.view, choose_view(still), atol=ORTHONORMAL)
        assert [atom.letters for atom in scene.atoms] == list(still.elements)
        assert [one.electrons for one in scene.lobes] == [one.electrons for one in still.lobes]


def test_no_turn_leaves_the_paper(reports):
    """The farthest point, seen in perspective from any side, lies within the picture."""
    for report in reports.values():
        scene = turn_scene(report)
        everything = [*places(scene), *(np.array(one.place) for one in scene.lobes)]
        far = max(float(np.linalg.norm(place)) for place in everything) + scene.lobe_radius_angstrom
        slant = np.sqrt(1 - (far / scene.eye_angstrom) ** 2)
        assert far / slant * scene.scale <= scene.height / 2


@pytest.mark.parametrize(
    ("smiles", "letters", "hydrogens"),
    [
        ("c1ccccc1P(c1ccccc1)CCP(c1ccccc1)c1ccccc1", {"", "P1", "P2"}, 0),
        ("CC(=O)C=C(O)C", {"", "O1", "O2", "H"}, 1),
    ],
)
def test_many_atoms_become_a_skeleton(smiles, letters, hydrogens):
    """Carbon is a corner, what stands on carbon alone is left out, the rest has its label."""
    scene = turn_scene(report_on_structure(smiles))
    assert {atom.letters for atom in scene.atoms} == letters
    assert sum(atom.letters == "H" for atom in scene.atoms) == hydrogens
    view = np.array(scene.view)
    assert np.allclose(view @ view.T, np.eye(3), atol=ORTHONORMAL)
    assert np.linalg.det(view) > 0


@pytest.mark.parametrize(
    ("smiles", "sizes"),
    [("c1ccccc1", [6] * 6), ("C1CC1", [3] * 3), ("CCO", []), ("C1CCC2CC2C1", [3] * 3 + [6] * 5)],
)
def test_bonds_know_their_smallest_ring(smiles, sizes):
    """A bond of two rings belongs to the smaller one; a chain has none."""
    assert sorted(len(ring) for ring in smallest_rings(read_smiles(smiles)).values()) == sizes
