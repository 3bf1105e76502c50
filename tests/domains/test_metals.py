"""Metal centres: oxidation state, d electrons, and the numbered rules M10 to M16."""

import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.graph import graph_of
from shapeshelf.domains.metals import metal_centre
from shapeshelf.structure.reading import read_smiles

CO = "<-[C-]#[O+]"


def metal_of(smiles):
    molecule = read_smiles(smiles)
    graph = graph_of(molecule)
    return metal_centre(molecule, graph, graph.metals.index(True))


def centre_of(smiles):
    _, centres = analyse(read_smiles(smiles))
    return next(centre for centre in centres if centre.lone_pairs is None)


@pytest.mark.parametrize(
    ("smiles", "state", "d_electrons"),
    [
        # Oxidation states by IUPAC's definition (Pure Appl. Chem. 88 (2016) 831, recalled).
        ("[Ni-2](C#N)(C#N)(C#N)C#N", 2, 8),
        ("[NH3]->[Ag+]<-[NH3]", 1, 10),
        (f"[Ni]({CO})({CO})({CO}){CO}", 0, 10),
        (f"[Fe-2]({CO})({CO})({CO}){CO}", -2, 10),
        ("O=[Os](=O)(=O)=O", 8, 0),
        ("[O-][Mn](=O)(=O)=O", 7, 0),
        ("C[W](C)(C)(C)(C)C", 6, 0),
        ("Cl[Au-](Cl)(Cl)Cl", 3, 8),
        ("[NH3+][Pt-2](Cl)(Cl)[NH3+]", 2, 8),
        ("[H][Co](<-[C-]#[O+])(<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]", 1, 8),
    ],
)
def test_oxidation_state_and_d_electrons(smiles, state, d_electrons):
    """Plain bonds count for the ligand, arrows for nobody (rule M1)."""
    metal = metal_of(smiles)
    assert (metal.oxidation_state, metal.d_electrons) == (state, d_electrons)


# Greenwood and Earnshaw (1997), recalled from memory.
@pytest.mark.parametrize(
    ("smiles", "symbol"),
    [
        ("Cl[Ni](Cl)(<-P(C)(C)C)<-P(C)(C)C", "SP-4"),
        ("Cl[Ni](Cl)(<-P(c1ccccc1)(c1ccccc1)c1ccccc1)<-P(c1ccccc1)(c1ccccc1)c1ccccc1", "T-4"),
        ("[O-][Cr](=O)(=O)[O-]", "T-4"),
        ("Cl[V](Cl)(Cl)Cl", "T-4"),
        ("[O-][V](=O)([O-])[O-]", "T-4"),
        ("O=[Re](Cl)(Cl)(Cl)Cl", "SPY-5"),
        ("N#C[Co-3](C#N)(C#N)(C#N)C#N", "SPY-5"),
        ("Cl[Cu-3](Cl)(Cl)(Cl)Cl", "TBPY-5"),
        ("O=[U+2](=O)(<-O)(<-O)(<-O)(<-O)<-O", "PBPY-7"),
        ("O=[Os](=O)(F)(F)(F)F", "OC-6"),
    ],
)
def test_shape_by_rule(smiles, symbol):
    """Coordination, d electrons and kind of ligand decide."""
    assert centre_of(smiles).polyhedral_symbol == symbol


@pytest.mark.parametrize(
    ("smiles", "reason"),
    [
        ("Cl[La](Cl)Cl", "no rule covers"),
        ("Cl[Fe](Cl)(<-N)(<-N)<-N", "no rule covers"),
        (f"[Mn]({CO})({CO})({CO})({CO})({CO})[Mn]({CO})({CO})({CO})({CO}){CO}", "another metal"),
        ("[Pt-](Cl)(Cl)(Cl)1CC1", "pi system"),
    ],
)
def test_outside_every_rule(smiles, reason):
    """No shape is guessed: the centre says why it has none."""
    centre = centre_of(smiles)
    assert centre.shape is None
    assert centre.polyhedral_symbol is None
    assert centre.placements == ()
    assert centre.angles == ()
    assert centre.departure is not None
    assert reason in centre.departure.sentence
    assert "No shape by rule" in centre.trace[-1].text


@pytest.mark.parametrize(
    ("smiles", "words"),
    [
        ("[OH2]->[Cu+2](<-O)(<-O)(<-O)(<-O)<-O", "d9 octahedron is stretched by the Jahn-Teller"),
        ("[OH2]->[Cr+2](<-O)(<-O)(<-O)(<-O)<-O", "high-spin d4 octahedron is stretched"),
        ("Cl[Cu-2](Cl)(Cl)Cl", "d9 tetrahedron is flattened by the Jahn-Teller"),
        ("C[W](C)(C)(C)(C)C", "trigonal prisms"),
        ("C[Ta](C)(C)(C)C", "square pyramidal"),
    ],
)
def test_departure_of_a_metal(smiles, words):
    """Known departures say what the centre does and end with their source."""
    departure = centre_of(smiles).departure
    assert departure is not None
    assert words in departure.sentence
    assert departure.sentence.endswith(f"({departure.source}).")


@pytest.mark.parametrize("smiles", ["Cl[Fe](Cl)(<-O)(<-O)(<-O)<-O", "F[Mo](F)(F)(F)(F)F"])
def test_no_departure_without_cause(smiles):
    """An ordinary octahedron departs from nothing."""
    assert centre_of(smiles).departure is None


def test_both_isomers_of_a_square_plane():
    """Cis and trans are both kept; the charged ligands stand apart in the first."""
    centre = centre_of("Cl[Pt](Cl)(<-[NH3])<-[NH3]")
    assert len(centre.placements) == 2
    chlorines = {0, 2}
    angle = next(a for a in centre.angles if {a.atoms[0], a.atoms[2]} == chlorines)
    assert angle.model_degrees == pytest.approx(180)


def test_chelate_stays_together():
    """The two donors of one chelate ring are next to each other."""
    centre = centre_of("Cl[Pt]1(Cl)<-[NH2]CC[NH2]->1")
    nitrogens = [a for a in centre.angles if 3 <= min(a.atoms[0], a.atoms[2]) <= 6]
    assert [a.model_degrees for a in nitrogens if a.atoms[1] == 1] == [pytest.approx(90)]


def test_oxo_ligand_at_the_apex():
    """A multiply bonded ligand stands at the apex of a square pyramid (rule S2)."""
    centre = centre_of("F[W](F)(F)(F)=O")
    sites = dict(
        zip((d.neighbour for d in centre.domains), centre.placements[0].sites, strict=True)
    )
    assert [sites[k] for k in sorted(sites)] == ["bas", "bas", "bas", "bas", "ap"]
