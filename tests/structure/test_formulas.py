"""Formulas in any spelling, written in one."""

from collections import Counter

import pytest
from hypothesis import given
from hypothesis import strategies as st

from shapeshelf.errors import StructureError
from shapeshelf.structure.formulas import (
    formulas_agree,
    molar_mass_g_mol,
    parse_formula,
    write_formula,
)
from shapeshelf.structure.reading import read_smiles

SULFATE = ({"S": 1, "O": 4}, -2)
PARSED = [
    ("SF4", ({"S": 1, "F": 4}, 0)),
    ("F4S", ({"S": 1, "F": 4}, 0)),
    ("SF₄", ({"S": 1, "F": 4}, 0)),
    ("(NH4)2SO4", ({"N": 2, "H": 8, "S": 1, "O": 4}, 0)),
    ("PF6-", ({"P": 1, "F": 6}, -1)),
    ("[PF6]-", ({"P": 1, "F": 6}, -1)),
    ("SO4^2-", SULFATE),
    ("SO4 2-", SULFATE),
    ("SO42-", SULFATE),
    ("SO₄²⁻", SULFATE),
    ("O4S-2", SULFATE),
    ("[Fe(CN)6]4-", ({"Fe": 1, "C": 6, "N": 6}, -4)),
    ("[Co(NH3)6]3+", ({"Co": 1, "N": 6, "H": 18}, 3)),
    ("NH4+", ({"N": 1, "H": 4}, 1)),
    ("C60-", ({"C": 60}, -1)),
    ("Ca++", ({"Ca": 1}, 2)),
    ("D2O", ({"H": 2, "O": 1}, 0)),
]

# Element sequence: IUPAC Red Book 2005, table VI; Hill (1900) with carbon; both recalled. Acids:
# common practice, no source.
WRITTEN = [
    ("FS(F)(F)F", "SF4"), ("FCl(F)F", "ClF3"), ("FOF", "OF2"), ("N", "NH3"), ("O", "H2O"),
    ("P", "PH3"), ("O=[Xe](=O)(F)F", "XeO2F2"), ("O=S(=O)(F)F", "SO2F2"), ("OS(=O)(=O)O", "H2SO4"),
    ("O[N+](=O)[O-]", "HNO3"), ("OP(O)(O)=O", "H3PO4"), ("O=Cl(=O)F", "ClO2F"), ("Cl", "HCl"),
    ("NN", "N2H4"), ("B1NBNBN1", "B3N3H6"), ("N=[N+]=[N-]", "HN3"), ("ClSSCl", "S2Cl2"),
    ("CCO", "C2H6O"), ("FC(F)(F)Cl", "CClF3"), ("O=C(F)F", "CF2O"), ("[O-]S(=O)(=O)[O-]", "SO4^2-"),
    ("F[P-](F)(F)(F)(F)F", "PF6-"), ("[NH4+]", "NH4+"), ("[SiH3]O[SiH3]", "Si2H6O"),
    ("[NH3]->[Ag+]<-[NH3]", "AgN2H6+"),
]  # fmt: skip


@pytest.mark.parametrize(("text", "expected"), PARSED)
def test_spellings_of_formulas(text: str, expected: tuple[dict[str, int], int]) -> None:
    """Order of elements, subscripts, brackets and charge styles are all read."""
    assert parse_formula(text) == expected


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("", "names no element"),
        ("Xx2", "no element Xx"),
        ("H2O)", "closes nothing"),
        ("(H2O", "a bracket stays open"),
        ("(H2O]", "closes nothing"),
        ("h2o", "'h' is not understood"),
        ("CuSO4·5H2O", "'·' is not understood"),
        ("C0", "0 is no sensible number"),
        ("C99999999", "no sensible number"),
    ],
)
def test_unreadable_formulas(text: str, message: str) -> None:
    """What is no formula is refused in one line."""
    with pytest.raises(StructureError, match=message):
        parse_formula(text)


@pytest.mark.parametrize(("smiles", "formula"), WRITTEN)
def test_formulas_are_written_by_convention(smiles: str, formula: str) -> None:
    """Hill's order with carbon, else electropositive first, hydrogen first in acids."""
    molecule = read_smiles(smiles)
    assert write_formula(molecule) == molecule.formula == formula


@pytest.mark.parametrize(("smiles", "formula"), WRITTEN)
def test_written_formulas_agree_with_their_molecule(smiles: str, formula: str) -> None:
    """A formula agrees with its own molecule and not with one atom more."""
    molecule = read_smiles(smiles)
    assert formulas_agree(formula, molecule)
    assert not formulas_agree("Ar" + formula, molecule)


def test_agreement_looks_at_the_charge() -> None:
    """The same atoms with another charge disagree; both readings of joined digits count."""
    hexafluorophosphate = read_smiles("F[P-](F)(F)(F)(F)F")
    assert formulas_agree("F6P-", hexafluorophosphate)
    assert not formulas_agree("PF6", hexafluorophosphate)
    assert formulas_agree("I3-", read_smiles("I[I-]I"))


@given(st.dictionaries(st.sampled_from(["C", "H", "N", "O", "Fe", "Cl"]), st.integers(1, 99),
                       min_size=1), st.randoms(use_true_random=False))  # fmt: skip
def test_order_of_elements_does_not_matter(counts: dict[str, int], random: object) -> None:
    """Any order of the same terms is the same formula."""
    terms = [f"{element}{count}" for element, count in counts.items()]
    random.shuffle(terms)  # type: ignore[attr-defined]
    assert Counter(parse_formula("".join(terms))[0]) == Counter(counts)


# Molar masses from the CRC Handbook of Chemistry and Physics (recalled from memory), g/mol.
MASSES = [("O", 18.015), ("FC(F)(F)F", 88.004), ("CCO", 46.07), ("[2H]O[2H]", 20.028)]
MASS_TOLERANCE_G_MOL = 0.006
"""Half a unit of the last digit of the shortest entry."""


@pytest.mark.parametrize(("smiles", "mass"), MASSES)
def test_molar_masses(smiles: str, mass: float) -> None:
    """Molar masses add up from standard atomic weights."""
    assert molar_mass_g_mol(read_smiles(smiles)) == pytest.approx(mass, abs=MASS_TOLERANCE_G_MOL)
