"""Three-centre bonds and bridges: counts, shapes and angles."""

import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.bond_lengths import bond_length_angstrom
from shapeshelf.structure.reading import read_smiles

ANGLE_TOLERANCE_DEGREES = 6.0
"""Twice the half-width of the model's angles at a four-bonded centre of period 2, and some."""
LENGTH_TOLERANCE_ANGSTROM = 0.04
"""About the mean error of the rule for ordinary bonds, and half as much again."""

# Terminal angle at the bridged atom: B2H6 121.8 degrees (CRC Handbook, 95th ed., recalled).
TERMINAL = [("[BH2]1[H][BH2][H]1", 0, (4, 5), 121.8)]
# Lengths of bridges in ångström: N. N. Greenwood and A. Earnshaw, Chemistry of the Elements, 2nd
# ed. (1997), and for Ga2H6 A. J. Downs and co-workers (1989); all recalled from memory.
BRIDGES = [("B", "H", 1.314), ("Ga", "H", 1.71), ("Al", "C", 2.125), ("F", "H", 1.138)]


@pytest.mark.parametrize(
    ("smiles", "atom", "symbol", "halves"),
    [
        ("[BH2]1[H][BH2][H]1", 0, "T-4", 2),
        ("[GaH2]1[H][GaH2][H]1", 0, "T-4", 2),
        ("C[Al]1(C)[CH3][Al](C)(C)[CH3]1", 1, "T-4", 2),
        ("F[H-]F", 1, "L-2", 2),
        ("[BH2]1[H][BH2][H]1", 1, "A-2", 2),
        ("Cl[Al]1(Cl)[Cl][Al](Cl)(Cl)[Cl]1", 1, "T-4", 0),
        ("Cl[I]1(Cl)[Cl][I](Cl)(Cl)[Cl]1", 1, "SP-4", 0),
    ],
)
def test_bridged_centres(smiles, atom, symbol, halves):
    """A three-centre bridge counts one half on either side; one by a lone pair counts whole."""
    lewis, centres = analyse(read_smiles(smiles))
    centre = next(c for c in centres if c.atom == atom)
    assert centre.polyhedral_symbol == symbol
    assert [domain.bond_order for domain in centre.domains].count(0.5) == halves
    assert lewis.multiplicity == 1
    assert all(row.single_electrons == 0 for row in lewis.atoms)


@pytest.mark.parametrize(("smiles", "atom", "ends", "degrees"), TERMINAL)
def test_half_a_bond_repels_less(smiles, atom, ends, degrees):
    """Two whole bonds opposite two halves stand wider apart than a tetrahedron's."""
    _, centres = analyse(read_smiles(smiles))
    angles = next(c for c in centres if c.atom == atom).angles
    found = next(a.model_degrees for a in angles if {a.atoms[0], a.atoms[2]} == set(ends))
    assert found == pytest.approx(degrees, abs=ANGLE_TOLERANCE_DEGREES)


@pytest.mark.parametrize(("first", "second", "length"), BRIDGES)
def test_lengths_of_half_bonds(first, second, length):
    """Bridging bonds are longer than whole ones by the published amounts."""
    found = bond_length_angstrom(first, second, 0.5)
    assert found == pytest.approx(length, abs=LENGTH_TOLERANCE_ANGSTROM)


def test_bridging_carbon_departs():
    """Five neighbours with four pairs are no trigonal bipyramid, and the page says so."""
    _, centres = analyse(read_smiles("C[Al]1(C)[CH3][Al](C)(C)[CH3]1"))
    carbon = next(c for c in centres if c.atom == 3)
    assert carbon.departure is not None
    assert "three-centre bond" in carbon.departure.sentence
    assert carbon.polyhedral_symbol is None
