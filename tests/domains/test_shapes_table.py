"""Every row of the table of known shapes, through the whole analysis."""

import csv
from pathlib import Path

import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.structure.reading import read_smiles

# Gillespie and Hargittai, The VSEPR Model of Molecular Geometry (1991); Greenwood and Earnshaw,
# Chemistry of the Elements, 2nd ed. (1997); recalled from memory.
TABLE = Path(__file__).parents[1] / "data" / "shapes.csv"
ROWS = list(csv.DictReader(TABLE.read_text(encoding="utf-8").splitlines()))


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_count_and_symbol(row):
    """Neighbours, lone pairs and polyhedral symbol are those of the table."""
    _, centres = analyse(read_smiles(row["smiles"]))
    centre = next(centre for centre in centres if centre.atom == int(row["atom"]))
    assert centre.element == row["element"]
    assert centre.bonded == int(row["bonded"])
    if row["lone_pairs"]:
        assert centre.lone_pairs == int(row["lone_pairs"])
    assert (centre.polyhedral_symbol or "") in row["symbol"].split("|")
