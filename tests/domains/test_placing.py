"""Lone pairs, multiple bonds and unlike ligands go where the known molecules have them."""

import numpy as np
import pytest

from shapeshelf.domains.counting import domains_at
from shapeshelf.domains.lewis import count_electrons
from shapeshelf.domains.model import Domain, DomainKind
from shapeshelf.domains.placing import place
from shapeshelf.errors import AnalysisError
from shapeshelf.structure.reading import read_smiles

STRAIGHT_DEGREES = 0.01
"""Angles that symmetry makes straight or right are so to rounding."""
MOST_KEPT = 6

# R. J. Gillespie and I. Hargittai, The VSEPR Model of Molecular Geometry (1991); Greenwood and
# Earnshaw, Chemistry of the Elements, 2nd ed. (1997); both recalled from memory.
SHAPES = [
    ("FS(F)(F)F", 1, "see-saw", "SS-4", {"F": ["ax", "ax", "eq", "eq"]}),
    ("FCl(F)F", 1, "T-shaped", "TS-3", {"F": ["ax", "ax", "eq"]}),
    ("F[Xe]F", 1, "linear", "L-2", {"F": ["", ""]}),
    ("F[Xe](F)(F)F", 1, "square planar", "SP-4", {"F": [""] * 4}),
    ("FBr(F)(F)(F)F", 1, "square pyramidal", "SPY-5", {"F": ["ap", *["bas"] * 4]}),
    ("O=S(F)(F)(F)F", 1, "trigonal bipyramidal", "TBPY-5", {"O": ["eq"]}),
    ("C=S(F)(F)(F)F", 1, "trigonal bipyramidal", "TBPY-5", {"C": ["eq"]}),
    ("FP(F)(F)(Cl)Cl", 1, "trigonal bipyramidal", "TBPY-5", {"Cl": ["eq", "eq"]}),
    ("FP(F)(F)(F)Cl", 1, "trigonal bipyramidal", "TBPY-5", {"Cl": ["eq"]}),
    ("CP(C)(F)(F)F", 1, "trigonal bipyramidal", "TBPY-5", {"C": ["eq", "eq"]}),
    ("CP(F)(F)(F)F", 1, "trigonal bipyramidal", "TBPY-5", {"C": ["eq"]}),
    ("O=[Xe](=O)(F)F", 1, "see-saw", "SS-4", {"O": ["eq", "eq"], "F": ["ax", "ax"]}),
    ("O=[Xe](=O)(=O)(F)F", 1, "trigonal bipyramidal", "TBPY-5", {"F": ["ax", "ax"]}),
    ("O=[Xe](F)F", 1, "T-shaped", "TS-3", {"O": ["eq"]}),
    ("O=Cl(F)(F)F", 1, "see-saw", "SS-4", {"O": ["eq"], "F": ["ax", "ax", "eq"]}),
    ("O=[I-](=O)(F)F", 1, "see-saw", "SS-4", {"O": ["eq", "eq"]}),
    ("O=I(F)(F)(F)(F)F", 1, "octahedral", "OC-6", {"O": [""]}),
    ("O=[Xe](F)(F)(F)F", 1, "square pyramidal", "SPY-5", {"O": ["ap"]}),
    ("F[Xe-](F)(F)(F)F", 1, "pentagonal planar", None, {"F": [""] * 5}),
    ("FI(F)(F)(F)(F)(F)F", 1, "pentagonal bipyramidal", "PBPY-7", {"F": ["ax"] * 2 + ["eq"] * 5}),
    ("O=[I-](F)(F)(F)(F)(F)F", 1, "pentagonal bipyramidal", "PBPY-7", {"O": ["ax"]}),
    ("F[I-](F)(F)(F)(F)(F)(F)F", 1, "square antiprismatic", "SAPR-8", {"F": [""] * 8}),
]


def placements_at(smiles, atom):
    molecule = read_smiles(smiles)
    lewis = count_electrons(molecule)
    domains = domains_at(molecule, lewis, atom)
    return molecule, domains, place(molecule, lewis, atom, domains)


def sites_of(molecule, domains, placement, element):
    """Return the site names of the bonds to ``element``, sorted."""
    pairs = zip(domains, placement.sites, strict=True)
    return sorted(
        site
        for domain, site in pairs
        if domain.neighbour is not None and molecule.atoms[domain.neighbour].element == element
    )


@pytest.mark.parametrize(("smiles", "atom", "shape", "symbol", "sites"), SHAPES)
def test_the_best_placement_is_that_of_the_known_molecule(smiles, atom, shape, symbol, sites):
    """Shape, polyhedral symbol and sites of the lowest placement are the observed ones."""
    molecule, domains, placements = placements_at(smiles, atom)
    best = placements[0]
    assert (best.shape, best.polyhedral_symbol) == (shape, symbol)
    for element, wanted in sites.items():
        assert sites_of(molecule, domains, best, element) == sorted(wanted)


@pytest.mark.parametrize("smiles", ["FS(F)(F)F", "FCl(F)F", "FP(F)(F)(Cl)Cl", "F[Xe](F)(F)F"])
def test_runners_up_cost_energy(smiles):
    """Other placements are kept, at most six, in order of rising energy."""
    placements = placements_at(smiles, 1)[2]
    energies = [placement.energy for placement in placements]
    assert 2 <= len(placements) <= MOST_KEPT
    assert energies == sorted(energies)
    assert energies[1] > energies[0]


@pytest.mark.parametrize("smiles", ["FI(F)(F)(F)(F)(F)F", "F[Te-](F)(F)(F)(F)(F)F"])
def test_seven_equal_ligands_have_one_placement(smiles):
    """Polyhedra that seven ligands pass through freely are one placement, the bipyramid."""
    assert [p.polyhedral_symbol for p in placements_at(smiles, 1)[2]] == ["PBPY-7"]


def test_every_placement_of_two_unlike_domains_on_a_bipyramid():
    """Three chlorines and two fluorines have three placements: both, one or no fluorine axial."""
    molecule, domains, placements = placements_at("FP(F)(Cl)(Cl)Cl", 1)
    found = sorted(sites_of(molecule, domains, placement, "F") for placement in placements)
    assert found == [["ax", "ax"], ["ax", "eq"], ["eq", "eq"]]


@pytest.mark.parametrize(
    ("smiles", "angle"),
    [("F[Xe]F", 180.0), ("FB(F)F", 120.0), ("C", 109.4712), ("O=C=O", 180.0), ("C=C=C", 180.0)],
)
def test_angles_that_symmetry_fixes_stay(smiles, angle):
    """Relaxing keeps the symmetry of the start to rounding."""
    molecule = read_smiles(smiles)
    atom = max(range(len(molecule.atoms)), key=lambda k: len(molecule.neighbours(k)))
    atom = 1 if smiles == "C=C=C" else atom
    domains = domains_at(molecule, count_electrons(molecule), atom)
    best = place(molecule, count_electrons(molecule), atom, domains)[0]
    first, second = (np.array(best.directions[k]) for k in range(2))
    cosine = np.clip(first @ second, -1, 1)
    assert np.degrees(np.arccos(cosine)) == pytest.approx(angle, abs=STRAIGHT_DEGREES)


def test_directions_are_unit_vectors():
    """Relaxed and ideal directions have length one."""
    for placement in placements_at("O=S(F)(F)(F)F", 1)[2]:
        for directions in (placement.directions, placement.ideal_directions):
            assert np.linalg.norm(directions, axis=1) == pytest.approx(1.0)


@pytest.mark.parametrize("count", [1, 10])
def test_too_few_and_too_many_domains_are_refused_in_one_line(count):
    """Fewer than two or more than nine domains cannot be placed."""
    molecule = read_smiles("O")
    domains = (Domain(DomainKind.LONE_PAIR),) * count
    with pytest.raises(AnalysisError, match=f"^O \\(atom 0\\): {count} electron domains; 2 to 9"):
        place(molecule, count_electrons(molecule), 0, domains)


def test_nine_unlike_ligands_are_still_placed():
    """More kinds of ligand than can be told apart are told apart less finely, not refused."""
    molecule, domains, placements = placements_at("F[I-2](Cl)(Br)(I)(C)(N)(O)(S)[SiH3]", 1)
    assert len(domains) == len(molecule.neighbours(1)) == 9
    assert placements[0].polyhedral_symbol == "TPRS-9"
