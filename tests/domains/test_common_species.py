"""A second table of known centres, as large as the first and with no row in common."""

import csv
from pathlib import Path

import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.structure.reading import read_smiles

# Recalled from memory: Gillespie and Hargittai, The VSEPR Model of Molecular Geometry (1991);
# Greenwood and Earnshaw, Chemistry of the Elements, 2nd ed. (1997); for metals also Kepert,
# Inorganic Stereochemistry (1982) and Hargittai, Chem. Rev. 100 (2000) 2233. Lone pairs left
# empty for metals, whose d electrons are no domains.
TABLE = Path(__file__).parents[1] / "data" / "common_species.csv"
ROWS = list(csv.DictReader(TABLE.read_text(encoding="utf-8").splitlines()))


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_count_and_symbol(row):
    """Neighbours, lone pairs and polyhedral symbol are those of the table."""
    _, centres = analyse(read_smiles(row["smiles"]))
    centre = next(centre for centre in centres if centre.atom == int(row["atom"]))
    assert centre.element == row["element"]
    assert centre.bonded == int(row["bonded"])
    expected = int(row["lone_pairs"]) if row["lone_pairs"] else None
    assert centre.lone_pairs == expected
    assert centre.polyhedral_symbol == row["symbol"]
