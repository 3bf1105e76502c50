"""The bench view and the numbered drawing."""

import numpy as np
import pytest
from rdkit import Chem
from rdkit.Geometry import Point3D

from shapeshelf.figures.angle_arcs import key_angles
from shapeshelf.figures.bench import bench_drawing, bench_view
from shapeshelf.figures.describing import describe
from shapeshelf.figures.flat import lay_flat
from shapeshelf.figures.model import Lettering, Role
from shapeshelf.figures.numbers import degrees_text
from shapeshelf.figures.scene import build_scene
from shapeshelf.figures.stereo import stereo_bonds
from shapeshelf.structure.reading import read_smiles

SMALLEST_ON_A_PHONE = 11.0
"""Pixels: what iOS and Android give as their smallest text style (common practice, no source)."""


def letters(drawing, role):
    return [m for m in drawing.marks if isinstance(m, Lettering) and m.role is role]


def test_every_atom_carries_its_symbol(reports):
    """One symbol an atom, never colour alone."""
    for report in reports.values():
        drawn = sorted(mark.text for mark in letters(bench_drawing(report), Role.SYMBOL))
        assert drawn == sorted(atom.element for atom in report.molecule.atoms)


def test_key_angles_are_labelled(reports):
    """Every key angle stands in the picture with the value the report gives, but for the axial
    one of the see-saw, whose arc would run behind both equatorial ligands."""
    for name, report in reports.items():
        labels = [mark.text for mark in letters(bench_drawing(report), Role.LABEL)]
        behind = {"173°"} if name == "sf4" else set()
        assert set(labels) == {degrees_text(row) for row in key_angles(report)} - behind, name


def test_a_straight_angle_is_left_out_beside_others(reports):
    """180 degrees says little beside 90; in a linear molecule it is all there is."""
    assert [round(row.degrees.value) for row in key_angles(reports["sf6"])] == [90]
    assert [round(row.degrees.value) for row in key_angles(reports["xef2"])] == [180]


@pytest.mark.parametrize(("name", "pairs"), [("sf4", 1), ("h2o", 2), ("xef2", 3), ("sf6", 0)])
def test_lone_pairs_are_lobes_with_two_dots(reports, name, pairs):
    """One lobe and two dots for each lone pair at the centre."""
    marks = bench_drawing(reports[name]).marks
    assert sum(mark.role is Role.LOBE for mark in marks) == pairs
    assert sum(mark.role is Role.ELECTRON for mark in marks) == 2 * pairs


def test_lobes_keep_clear_of_bonds(reports):
    """A lone pair points away from every bond: at least 70 degrees, the least of all shapes
    from two to six domains being 90 before repulsion bends it."""
    for report in reports.values():
        scene = build_scene(report)
        for lobe in scene.lobes:
            for stick in scene.sticks:
                bond = scene.points[stick.end] - scene.points[stick.begin]
                cosine = np.array(lobe.direction) @ bond / np.linalg.norm(bond)
                assert np.degrees(np.arccos(cosine)) > 70


def test_it_reads_on_a_phone(reports):
    """At 390 pixels of page width no label is smaller than the smallest text of a phone."""
    for report in reports.values():
        drawing = bench_drawing(report)
        shrunk = min(1.0, 358 / drawing.width)
        assert min(m.size for m in letters(drawing, Role.LABEL)) * shrunk >= SMALLEST_ON_A_PHONE


def test_the_text_alternative_tells_shape_angles_and_lone_pairs(reports):
    """Who does not see the picture learns the same."""
    told = describe(reports["sf4"])
    for part in ("see-saw", "one lone pair", "173°", "≈102°", "C2v"):
        assert part in told
    assert bench_view(reports["sf4"]).description == told


@pytest.mark.parametrize(
    "smiles",
    [
        "C[C@H](N)C(=O)O",
        "C[C@@H](N)C(=O)O",
        "F[C@](Cl)(Br)I",
        "F[C@@](Cl)(Br)I",
        "C[C@H](O)[C@@H](O)C(=O)O",
        "C[S@](=O)c1ccccc1",
        "O[C@H]1CCC[C@@H]1N",
    ],
)
@pytest.mark.parametrize("hidden", [True, False])
def test_wedges_mean_what_rdkit_reads_from_them(smiles, hidden):
    """RDKit, given our flat drawing with our wedges, finds the configuration we started from."""
    molecule = read_smiles(smiles)
    flat = lay_flat(molecule, 46.0, 1 if hidden else 999)
    marked = stereo_bonds(molecule, flat.points, flat.shown)
    assert marked
    editable, kept = Chem.RWMol(), sorted(flat.shown)
    for atom in kept:
        one = Chem.Atom(molecule.atoms[atom].element)
        one.SetFormalCharge(molecule.atoms[atom].formal_charge)
        editable.AddAtom(one)
    kinds = {1: Chem.BondType.SINGLE, 2: Chem.BondType.DOUBLE, 3: Chem.BondType.TRIPLE}
    for bond in molecule.bonds:
        if {bond.begin, bond.end} <= flat.shown:
            stereo = marked.get(frozenset((bond.begin, bond.end)))
            ends = (stereo.narrow, stereo.wide) if stereo else (bond.begin, bond.end)
            editable.AddBond(*(kept.index(end) for end in ends), kinds[bond.order])
            if stereo:
                way = Chem.BondDir.BEGINWEDGE if stereo.towards_viewer else Chem.BondDir.BEGINDASH
                editable.GetBondWithIdx(editable.GetNumBonds() - 1).SetBondDir(way)
    conformer = Chem.Conformer(len(kept))
    for index, atom in enumerate(kept):
        x, y = flat.at(atom)
        conformer.SetAtomPosition(index, Point3D(x / 30, -y / 30, 0.0))
    editable.AddConformer(conformer)
    read = Chem.MolFromMolBlock(Chem.MolToMolBlock(editable, kekulize=False))
    assert Chem.MolToSmiles(Chem.RemoveHs(read)) == Chem.CanonSmiles(smiles)
