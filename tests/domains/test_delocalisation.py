"""Lone pairs in pi systems, rule by rule (D1 to D7 in domains/delocalisation.py)."""

import pytest

from shapeshelf.domains.counting import domains_at, notation_of
from shapeshelf.domains.lewis import count_electrons
from shapeshelf.structure.reading import read_smiles


def empty_domains(smiles, atom):
    """Return how many domains of an atom hold no bond, and how many of its pairs lie in pi."""
    molecule = read_smiles(smiles)
    lewis = count_electrons(molecule)
    domains = domains_at(molecule, lewis, atom)
    return sum(domain.neighbour is None for domain in domains), lewis.atoms[atom].delocalised_pairs


# Textbook facts: Pauling, The Nature of the Chemical Bond, 3rd ed. (1960); Gillespie and
# Hargittai (1991); recalled from memory.
@pytest.mark.parametrize(
    ("rule", "smiles", "atom", "empty", "in_pi"),
    [
        ("D1 enolate carbon", "[CH2-]C=O", 0, 0, 1),
        ("D1 amidinium", "NC=[NH2+]", 0, 0, 1),
        ("D1 acetylacetonate", "CC(=O)[CH-]C(C)=O", 3, 0, 1),
        ("D1 imidazolide", "c1c[n-]cn1", 2, 1, 1),
        ("D1 carbene's nitrogen", "CN1C=CN(C)[C]1", 1, 0, 1),
        ("D2 pyrrole", "c1cc[nH]c1", 3, 0, 1),
        ("D2 furan", "c1ccoc1", 3, 1, 1),
        ("D2 carbazole", "c1ccc2c(c1)[nH]c1ccccc12", 6, 0, 1),
        ("D2 not in 1,2-dihydropyridine", "C1C=CC=CN1", 5, 1, 0),
        ("D2 4-pyridone", "O=c1cc[nH]cc1", 4, 0, 1),
        ("D2 not in 1H-azepine", "N1C=CC=CC=C1", 0, 1, 0),
        ("D3 vinylogous amide", "CC(=O)C=CN", 5, 0, 1),
        ("D3 not an enamine", "NC=C", 0, 1, 0),
        ("D3 thioamide", "CC(N)=S", 2, 0, 1),
        ("D3 imide", "O=C1CCC(=O)N1", 6, 0, 1),
        ("D3 not 2-aminopyridine", "Nc1ccccn1", 0, 1, 0),
        ("D3 not cyanamide", "NC#N", 0, 1, 0),
        ("D3 not an aziridine", "CC(=O)N1CC1", 3, 1, 0),
        ("D4 nitramine", "CN(C)[N+](=O)[O-]", 1, 0, 1),
        ("D4 triazene", "CN(C)N=NC", 1, 0, 1),
        ("D5 aminoborane", "NB", 0, 0, 1),
        ("D5 borazine", "B1NBNBN1", 1, 0, 1),
        ("D5 metal amide", "CN(C)[Ti](N(C)C)(N(C)C)N(C)C", 1, 0, 1),
        ("D6 nitroxide", "CN(C)[O]", 1, 0, 1),
        ("D7 aniline", "Nc1ccccc1", 0, 1, 0),
        ("D7 hydrazine", "NN", 0, 1, 0),
        ("D7 sulfonamide", "CS(N)(=O)=O", 2, 1, 0),
        ("D7 ester oxygen", "COC(C)=O", 1, 2, 0),
        ("D7 phosphole", "C1=CC=CP1", 4, 1, 0),
    ],
)
def test_pair_in_the_plane_or_in_pi(rule, smiles, atom, empty, in_pi):
    """Each rule takes the pairs it names out of the plane and leaves the others."""
    assert empty_domains(smiles, atom) == (empty, in_pi), rule


@pytest.mark.parametrize(
    ("bonded", "pairs", "singles", "notation"),
    [
        (4, 1, 0, "AX4E"),
        (3, 2, 0, "AX3E2"),
        (6, 0, 0, "AX6"),
        (2, 0, 1, "AX2E"),
        (2, 1, 1, "AX2E2"),
    ],
)
def test_notation(bonded, pairs, singles, notation):
    """A single electron that is a domain is an E like a lone pair."""
    assert notation_of(bonded, pairs, singles) == notation
