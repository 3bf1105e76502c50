"""Centres as the rest of the house sees them: labels, domains, departures, the working."""

import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.model import DomainKind
from shapeshelf.domains.uncertainty import CROSS_VALIDATED, class_uncertainty_degrees
from shapeshelf.structure.reading import read_smiles

ANGLE_DIGITS = 3
"""Angles of one kind agree to the rounding of the polyhedron's tabulated vertices."""


def centres_of(smiles, multiplicity=None):
    return analyse(read_smiles(smiles, multiplicity=multiplicity))[1]


def only_centre(smiles, multiplicity=None):
    (centre,) = centres_of(smiles, multiplicity)
    return centre


def test_labels():
    """A centre is called by its element and its number among that element, in atom order."""
    assert [centre.label for centre in centres_of("CCO")] == ["C1", "C2", "O1"]


def test_terminal_atoms_are_no_centres():
    """Two atoms have no centre; the count is there all the same."""
    lewis, centres = analyse(read_smiles("Cl"))
    assert centres == ()
    assert [atom.lone_pairs for atom in lewis.atoms] == [3, 0]


def test_one_angle_for_every_pair_of_neighbours():
    """Four neighbours make six angles, each once."""
    centre = only_centre("FC(F)(Cl)Br")
    pairs = {frozenset((angle.atoms[0], angle.atoms[2])) for angle in centre.angles}
    assert len(centre.angles) == len(pairs) == 6
    assert {angle.atoms[1] for angle in centre.angles} == {centre.atom}


@pytest.mark.parametrize(
    "smiles",
    ["FS(F)(F)F", "[SiH3]N([SiH3])[SiH3]", "Cl[Te-2](Cl)(Cl)(Cl)(Cl)Cl", "F[Ca]F", "[CH3]"],
)
def test_placements_match_the_domains(smiles):
    """Every placement has a direction and a site for each domain of the centre."""
    for centre in centres_of(smiles):
        for placement in centre.placements:
            assert len(placement.directions) == len(centre.domains)
            assert len(placement.ideal_directions) == len(centre.domains)
            assert len(placement.sites) == len(centre.domains)


# Sources stand in reference/departures.py, all recalled from memory.
@pytest.mark.parametrize(
    ("smiles", "symbol", "words"),
    [
        ("Br[Te-2](Br)(Br)(Br)(Br)Br", "OC-6", "lone pair is inactive"),
        ("F[Xe-](F)(F)(F)(F)(F)F", "OCF-7", "lone pair is inactive"),
        ("F[Xe-2](F)(F)(F)(F)(F)(F)F", "SAPR-8", "lone pair is inactive"),
        ("Cl[In-2](Cl)(Cl)(Cl)Cl", "SPY-5", "square pyramid"),
        ("[GeH3]N([GeH3])[GeH3]", "TP-3", "planar although it has a lone pair"),
        ("c1ccc(cc1)N(c1ccccc1)c1ccccc1", "TP-3", "nearly planar"),
        ("Nc1ccccc1", "TPY-3", "shallower"),
        ("F[Sr]F", "A-2", "bent"),
        ("[Na]O[Na]", "L-2", "linear"),
        ("[SiH3]N=C=O", "A-2", "wider"),
        ("[CH3]", "TP-3", "planar"),
    ],
)
def test_known_departure(smiles, symbol, words):
    """Centres of the table do what it says, and say so with its source."""
    departing = [centre for centre in centres_of(smiles) if centre.departure]
    assert len(departing) == 1
    centre = departing[0]
    assert centre.polyhedral_symbol == symbol
    assert words in centre.departure.sentence
    assert centre.departure.sentence.endswith(f"({centre.departure.source}).")
    assert any(step.rule == "departure" for step in centre.trace)


def test_hexafluoridoxenon():
    """XeF6 keeps its lone pair over one face of the octahedron (C3v), and is fluxional."""
    centre = only_centre("F[Xe](F)(F)(F)(F)F")
    assert (centre.notation, centre.arrangement) == ("AX6E", "capped octahedral")
    assert centre.shape == "distorted octahedral"
    # Threefold: 15 angles of five kinds, three of each.
    values = [round(angle.model_degrees, ANGLE_DIGITS) for angle in centre.angles]
    assert sorted(values.count(value) for value in set(values)) in ([3, 3, 3, 6], [3, 3, 3, 3, 3])
    assert centre.fluxional
    assert "fluxional" in centre.departure.sentence


@pytest.mark.parametrize(
    ("smiles", "fluxional"),
    [
        ("FP(F)(F)(F)F", True),
        ("FS(F)(F)F", True),
        ("FI(F)(F)(F)(F)(F)F", True),
        ("FBr(F)(F)(F)F", False),
        ("FS(F)(F)(F)(F)F", False),
        ("Cl[Te-2](Cl)(Cl)(Cl)(Cl)Cl", False),
        ("FCl(F)F", False),
    ],
)
def test_fluxional(smiles, fluxional):
    """Five domains and seven bonds exchange sites quickly; four and six do not."""
    assert only_centre(smiles).fluxional is fluxional


@pytest.mark.parametrize(
    ("smiles", "multiplicity", "singles", "shape"),
    [
        # Methylene: Herzberg (1966), recalled; both states are bent.
        ("[CH2]", 3, 2, "bent"),
        ("O=[N]=O", None, 1, "bent"),
        ("F[C](F)F", None, 1, "trigonal pyramidal"),
        ("[CH3]", None, 1, "trigonal planar"),
    ],
)
def test_single_electrons(smiles, multiplicity, singles, shape):
    """A single electron fills a domain, but for the planar radicals."""
    centre = only_centre(smiles, multiplicity)
    assert centre.single_electrons == singles
    assert centre.shape == shape


def test_inactive_pair_is_no_domain_but_counted():
    """The lone pair of TeCl6(2-) stands in the count and has no direction."""
    centre = only_centre("Cl[Te-2](Cl)(Cl)(Cl)(Cl)Cl")
    assert (centre.lone_pairs, centre.notation, centre.arrangement) == (1, "AX6E", "octahedral")
    assert all(domain.kind is DomainKind.BOND for domain in centre.domains)


def test_the_working():
    """Electrons, domains, arrangement, placement and shifts come in that order, with numbers."""
    steps = only_centre("FS(F)(F)F").trace
    assert [step.rule for step in steps[:5]] == ["C1", "C", "P1", "P2", "P2"]
    assert "six valence electrons; 4 go into its bonds, 2 stay: one lone pair" in steps[0].text
    assert "four bonds, one lone pair" in steps[1].text
    assert "trigonal bipyramidal; the four bonds are see-saw" in steps[2].text
    shifts = [step.text for step in steps if step.rule == "P3"]
    assert any(text.startswith("F(eq)-S-F(eq) closes by") for text in shifts)
    assert all("lone pair" in text for text in shifts)


def test_more_domains_than_can_be_placed():
    """Ten neighbours of a main-group atom: counted, and a sentence instead of a shape."""
    crowded = centres_of("[K+]" + "(<-O)" * 9 + "<-O")[0]
    assert (crowded.element, crowded.bonded, crowded.shape) == ("K", 10, None)
    assert "2 to 9 can be placed" in crowded.trace[0].text


@pytest.mark.parametrize("smiles", ["FS(F)(F)F", "O", "CC(=O)N"])
def test_uncertainty_is_that_of_the_class(smiles):
    """A model angle carries the half-width of its class of centre."""
    for centre in centres_of(smiles):
        empty = len(centre.domains) - centre.bonded
        width = class_uncertainty_degrees(centre.element, centre.bonded, empty)
        assert {angle.uncertainty_degrees for angle in centre.angles} == {width}


def test_uncertainty_without_a_fit():
    """Angles of a metal or of a departure claim less than any fitted class."""
    widest = max(CROSS_VALIDATED.by_class.values())
    for smiles in ("Cl[Ba]Cl", "Cl[Pt-2](Cl)(Cl)Cl"):
        assert all(a.uncertainty_degrees > widest for a in only_centre(smiles).angles)
