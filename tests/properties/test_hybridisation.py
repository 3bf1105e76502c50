"""Hybridisation: labels, Coulson's theorem against coupling constants, Bent, Haddon."""

from itertools import permutations

import numpy as np
import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.assembly import assemble
from shapeshelf.properties.hybridisation import hybridise, pyramidalisation_degrees
from shapeshelf.structure.reading import read_smiles

MULLER = """N. Muller and D. E. Pritchard, J. Chem. Phys. 31 (1959) 768: per cent s-character of the
C-H bond = 1J(CH)/Hz / 5; couplings as tabulated in NMR textbooks; recalled from memory."""
COUPLINGS = [
    # structure, 1J(CH) in hertz
    ("C", 125),
    ("C=C", 156),
    ("C#C", 249),
    ("C1CC1", 161),
]
S_CHARACTER_PERCENT = 3.5
"""Chain hydrocarbons meet the rule within 1.5. Cyclopropane sets the figure: the measured H-C-H
of 115.1 degrees (recalled) gives 29.8 against 32.2, and the model's angle is a degree narrower."""

DIRECT = 1e-9
"""Sums and symmetric cases are exact but for rounding."""
LEAST_SQUARES = 1e-3
"""What the pull towards equal s-characters may move."""

GILLESPIE = (
    "R. J. Gillespie and I. Hargittai, The VSEPR Model of Molecular Geometry (1991); recalled"
)
LABELS = [
    # structure, atom, label, customary only
    ("O=C=O", 1, "sp", False),
    ("FB(F)F", 1, "sp2", False),
    ("N", 0, "sp3", False),
    ("CC(N)=O", 2, "sp2", False),
    ("FP(F)(F)(F)F", 1, "sp3d", True),
    ("FCl(F)F", 1, "sp3d", True),
    ("F[Xe](F)(F)F", 1, "sp3d2", True),
    ("FI(F)(F)(F)(F)(F)F", 1, "sp3d3", True),
    ("[CH3]", 0, "sp2", False),
]

BENT = """H. A. Bent, Chem. Rev. 61 (1961) 275: fluoromethane, dimethyl ether, phosphorus(III) and
lone pairs are among his examples; recalled from memory."""
ODD_CASES = [
    "C1CC1",
    "C1=CC1",
    "C1CO1",
    "P12P3P1P23",
    "C12C3C4C1C5C2C3C45",
    "F[Xe](F)(F)(F)(F)F",
    "F[Xe-](F)(F)(F)F",
    "FS(F)(F)F",
    "F[Xe]F",
    "O=Cl[O]",
    "CC(=O)N(C)C",
    "c1ccccc1P(c1ccccc1)c1ccccc1",
]


def analysed(smiles):
    molecule = read_smiles(smiles)
    lewis, centres = analyse(molecule)
    return molecule, lewis, centres, assemble(molecule, lewis, centres).coordinates_angstrom


def hybridised(smiles, atom):
    molecule, lewis, centres, coordinates = analysed(smiles)
    centre = next(centre for centre in centres if centre.atom == atom)
    return molecule, hybridise(molecule, lewis, centre, coordinates)


def shares_to(smiles, atom, element):
    molecule, found = hybridised(smiles, atom)
    return [
        hybrid.s_character
        for hybrid in found.hybrids
        if (molecule.atoms[hybrid.neighbour].element if hybrid.neighbour is not None else "")
        == element
    ]


@pytest.mark.parametrize(("smiles", "coupling_hz"), COUPLINGS)
def test_hydrocarbons_agree_with_their_coupling_constants(smiles, coupling_hz):
    """s-character of C-H from the angles is J/5 per cent (MULLER)."""
    percent = 100 * np.mean(shares_to(smiles, 0, "H"))
    assert percent == pytest.approx(coupling_hz / 5, abs=S_CHARACTER_PERCENT)


def test_the_rule_of_couplings_overshoots_chloroform():
    """209 Hz would be 42 % s: chlorine raises the coupling by more than s-character (MULLER).

    Angles of a carbon with four neighbours cannot give more than a third, so the rule and the
    angles must part here; what is held is that they do.
    """
    percent = 100 * np.mean(shares_to("ClC(Cl)Cl", 1, "H"))
    assert 20 < percent < 34 < 209 / 5


@pytest.mark.parametrize(("smiles", "atom", "label", "customary"), LABELS)
def test_label_counts_domains(smiles, atom, label, customary):
    """Number of electron domains to customary label (GILLESPIE); d labels marked as customary."""
    _, found = hybridised(smiles, atom)
    assert (found.label, found.customary_only) == (label, customary)
    assert ("no part of d" in found.basis) == customary


@pytest.mark.parametrize("smiles", ODD_CASES)
def test_every_centre_has_one_s_orbital(smiles):
    """s-characters of all hybrids add up to one, none outside 0 to 1, whatever the angles."""
    molecule, lewis, centres, coordinates = analysed(smiles)
    for centre in centres:
        found = hybridise(molecule, lewis, centre, coordinates)
        shares = [hybrid.s_character for hybrid in found.hybrids]
        assert sum(shares) == pytest.approx(1, abs=DIRECT)
        assert all(-DIRECT <= share <= 1 + DIRECT for share in shares)
        assert [hybrid.neighbour for hybrid in found.hybrids] == [
            domain.neighbour for domain in centre.domains
        ]


@pytest.mark.parametrize("angle_degrees", [92.0, 100.0, 107.0])
def test_pyramid_obeys_coulson_exactly(angle_degrees):
    """Three equal angles fix s = cos/(cos - 1) for each bond, the lone pair has the rest."""
    molecule, lewis, centres, _ = analysed("N")
    coordinates = pyramid(molecule, angle_degrees)
    hybrids = hybridise(molecule, lewis, centres[0], coordinates).hybrids
    cosine = np.cos(np.radians(angle_degrees))
    bonds = [h.s_character for h in hybrids if h.neighbour is not None]
    lone = next(h.s_character for h in hybrids if h.neighbour is None)
    assert bonds == pytest.approx([cosine / (cosine - 1)] * 3, abs=LEAST_SQUARES)
    assert lone == pytest.approx(1 - 3 * cosine / (cosine - 1), abs=3 * LEAST_SQUARES)


def test_angle_under_ninety_leaves_the_bonds_to_p():
    """No two s-p hybrids come closer than 90 degrees: the lone pair keeps s."""
    molecule, lewis, centres, _ = analysed("P")
    hybrids = hybridise(molecule, lewis, centres[0], pyramid(molecule, 80.0)).hybrids
    assert [h.s_character for h in hybrids if h.neighbour is not None] == pytest.approx(
        [0, 0, 0], abs=LEAST_SQUARES
    )


def pyramid(molecule, angle_degrees):
    """Coordinates of AX3 with three equal angles; the centre is atom 0."""
    sine = 2 / np.sqrt(3) * np.sin(np.radians(angle_degrees / 2))
    height = np.sqrt(1 - sine**2)
    turns = np.radians([0, 120, 240])
    return [(0.0, 0.0, 0.0)] + [(sine * np.cos(t), sine * np.sin(t), height) for t in turns]


@pytest.mark.parametrize(
    ("smiles", "atom", "rich", "poor"),
    [("CF", 0, "H", "F"), ("N", 0, "", "H"), ("P", 0, "", "H"), ("C1CC1", 0, "H", "C")],
)
def test_bents_rule_holds_where_bent_found_it(smiles, atom, rich, poor):
    """More s towards the less electronegative partner, most in lone pairs (BENT)."""
    assert min(shares_to(smiles, atom, rich)) > max(shares_to(smiles, atom, poor))
    _, found = hybridised(smiles, atom)
    assert "the numbers agree" in found.bent_rule


def test_bents_rule_is_silent_where_all_partners_are_alike():
    assert hybridised("C", 0)[1].bent_rule is None


def test_bents_rule_says_so_where_the_numbers_disagree():
    """H-C-H wider than F-C-H is what the rule wants; the other way round it must say no."""
    molecule, lewis, centres, coordinates = analysed("CF")
    fluorine = next(k for k, atom in enumerate(molecule.atoms) if atom.element == "F")
    hydrogen = next(k for k, atom in enumerate(molecule.atoms) if atom.element == "H")
    swapped = list(coordinates)
    swapped[fluorine], swapped[hydrogen] = swapped[hydrogen], swapped[fluorine]
    centre = centres[0]
    assert "do not follow" in hybridise(molecule, lewis, centre, swapped).bent_rule


def test_axial_pair_is_p_alone():
    """Three-centre four-electron pair of SF4: no s; the equatorial bonds have some."""
    shares = sorted(shares_to("FS(F)(F)F", 1, "F"))
    assert shares[:2] == [0.0, 0.0]
    assert 0.1 < shares[2] < 1 / 3


def test_transition_metal_has_no_label():
    molecule, lewis, centres, coordinates = analysed("Cl[Ti](Cl)(Cl)Cl")
    found = hybridise(molecule, lewis, centres[0], coordinates)
    assert (found.label, found.hybrids) == (None, ())


def buckminsterfullerene():
    """The 60 corners of a truncated icosahedron, edges of equal length."""
    golden = (1 + np.sqrt(5)) / 2
    seeds = [(0, 1, 3 * golden), (1, 2 + golden, 2 * golden), (golden, 2, golden**3)]
    even = [p for p in permutations(range(3)) if np.linalg.det(np.eye(3)[list(p)]) > 0]
    signs = np.array(np.meshgrid(*[[1, -1]] * 3)).reshape(3, -1).T
    corners = {tuple(s * np.array(seed)[list(p)]) for seed in seeds for p in even for s in signs}
    return np.array(sorted(corners))


def test_pi_axis_of_buckminsterfullerene():
    """11.6 degrees at every carbon (R. C. Haddon, Acc. Chem. Res. 21 (1988) 243; recalled)."""
    corners = buckminsterfullerene()
    assert len(corners) == 60
    near = corners[np.argsort(np.linalg.norm(corners - corners[0], axis=1))[1:4]] - corners[0]
    directions = near / np.linalg.norm(near, axis=1)[:, None]
    assert pyramidalisation_degrees(directions) == pytest.approx(11.6, abs=0.1)


def test_planar_centre_has_no_pyramidalisation():
    assert hybridised("C=C", 0)[1].pyramidalisation_degrees == pytest.approx(0, abs=0.01)
