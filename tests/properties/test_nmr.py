"""NMR signals and first-order patterns, against published spectra."""

import pytest

from shapeshelf.properties.nmr import nmr_signals
from shapeshelf.properties.spectra import expect_spectra

GUENTHER = """H. Guenther, NMR Spectroscopy, 2nd ed. (1995); inorganic fluorides: E. L. Muetterties
and W. D. Phillips, J. Am. Chem. Soc. 79 (1957) 322 and 81 (1959) 1084; all recalled from memory."""

PUBLISHED = [
    # structure, nucleus, [(nuclei, pattern), ...] in the order of atoms
    ("CCO", "1H", [(3, "triplet"), (2, "quartet"), (1, "singlet")]),
    ("CC(C)Cl", "1H", [(6, "doublet"), (1, "septet")]),
    ("COC", "1H", [(6, "singlet")]),
    ("Cc1ccc(C)cc1", "1H", [(6, "singlet"), (4, None)]),
    ("FS(F)(F)F", "19F", [(2, "triplet"), (2, "triplet")]),
    ("FCl(F)F", "19F", [(2, "doublet"), (1, "triplet")]),
    ("FBr(F)(F)(F)F", "19F", [(4, "doublet"), (1, "quintet")]),
    ("FS(F)(F)(F)(F)F", "19F", [(6, "singlet")]),
    ("FS(F)(F)(F)(F)Cl", "19F", [(1, "quintet"), (4, "doublet")]),
    ("FP(F)F", "19F", [(3, "doublet")]),
    ("FP(F)F", "31P", [(1, "quartet")]),
    ("F[P-](F)(F)(F)(F)F", "31P", [(1, "septet")]),
    ("F[P-](F)(F)(F)(F)F", "19F", [(6, "doublet")]),
    ("P", "31P", [(1, "quartet")]),
    ("FP(F)(F)(F)F", "31P", [(1, "triplet of quartets")]),
    ("CN(C)C=O", "1H", [(3, "singlet"), (3, "singlet"), (1, "singlet")]),
    ("c1ccccc1P(c1ccccc1)c1ccccc1", "31P", [(1, None)]),
]


@pytest.mark.parametrize(("smiles", "nucleus", "published"), PUBLISHED)
def test_signals_areas_and_patterns(smiles, nucleus, published, worked_out):
    """Sets, relative areas and first-order patterns as published (GUENTHER)."""
    found = [s for s in nmr_signals(*worked_out(smiles)) if s.nucleus == nucleus]
    areas = sorted(len(signal.atoms) for signal in found)
    assert areas == sorted(area for area, _ in published)
    for area, pattern in published:
        if pattern is not None:
            assert any(s.multiplicity == pattern for s in found if len(s.atoms) == area)


def test_rings_on_a_phosphine_show_three_proton_signals(worked_out):
    """Ortho, meta and para of triphenylphosphine: 6, 6 and 3 (common practice, no source)."""
    signals = nmr_signals(*worked_out("c1ccccc1P(c1ccccc1)c1ccccc1"))
    assert sorted(len(s.atoms) for s in signals if s.nucleus == "1H") == [3, 6, 6]


@pytest.mark.parametrize("smiles", ["FP(F)(F)(F)F", "FS(F)(F)F"])
def test_fluxional_molecules_say_so(smiles, worked_out):
    """PF5 and SF4 exchange sites: a warm sample shows fewer signals (GUENTHER)."""
    note = expect_spectra(*worked_out(smiles)).fluxional_note
    assert note is not None
    assert "averaged" in note


def test_rigid_molecule_has_no_such_note(worked_out):
    assert expect_spectra(*worked_out("FB(F)F")).fluxional_note is None
