"""The table of shapes is whole and keeps to IUPAC's symbols."""

import re

from shapeshelf.reference.shapes import ARRANGEMENTS, SHAPES, SITES

# Red Book 2005, tables IR-9.2 and IR-9.3, recalled from memory.
IUPAC = {
    *("L-2", "A-2", "TP-3", "TPY-3", "TS-3", "T-4", "SP-4", "SPY-4", "SS-4", "TBPY-5", "SPY-5"),
    *("OC-6", "TPR-6", "PBPY-7", "OCF-7", "TPRS-7", "CU-8", "SAPR-8", "DD-8", "HBPY-8"),
    *("OCT-8", "TPRT-8", "TPRS-8", "TPRS-9", "HBPY-9"),
}


def test_every_symbol_is_one_of_iupac():
    """No symbol is made up."""
    assert {name.polyhedral_symbol for name in SHAPES.values()} - {None} <= IUPAC


def test_every_arrangement_has_a_shape_without_lone_pairs():
    """With nothing but bonds, each arrangement names the shape and its number of vertices."""
    for count, names in ARRANGEMENTS.items():
        for name in names.values():
            symbol = SHAPES[name, ""].polyhedral_symbol
            assert symbol is not None
            assert re.fullmatch(rf"[A-Z]+-{count}", symbol)


def test_named_sites_belong_to_arrangements():
    """Sites are named for arrangements that exist, by numbers of sites that they have."""
    known = {name: sizes for names in ARRANGEMENTS.values() for sizes, name in names.items()}
    for name, sites in SITES.items():
        assert set(sites) <= set(known[name])
