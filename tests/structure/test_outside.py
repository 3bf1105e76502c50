"""Read against a published database: structures and keys of PubChem."""

import csv
import random
from functools import cache
from pathlib import Path

import chemicals
import pytest

from shapeshelf.errors import StructureError
from shapeshelf.structure.reading import read_smiles

# PubChem identifiers as carried by the PyPI package chemicals (C. Bell and contributors); columns:
# PubChem number, CAS number, formula, molar mass, SMILES, InChI, InChIKey, names.
TABLE = Path(chemicals.__file__).parent / "Identifiers" / "chemical identifiers pubchem small.tsv"
SEED = 20240501
SAMPLE = 300


@cache
def rows() -> list[list[str]]:
    with TABLE.open(encoding="utf-8", newline="") as file:
        table = list(csv.reader(file, delimiter="\t", quoting=csv.QUOTE_NONE))
    return random.Random(SEED).sample(table, SAMPLE)


def test_keys_are_those_of_the_database() -> None:
    """Every structure that is read has the published InChIKey; the rest are several parts."""
    read, refused = 0, []
    for row in rows():
        try:
            molecule = read_smiles(row[4])
        except StructureError as error:
            refused.append(str(error))
            continue
        assert molecule.inchikey == row[6], row[4]
        read += 1
    assert all("separate parts" in message for message in refused)
    assert read > SAMPLE // 2


@pytest.mark.parametrize("seed", range(40))
def test_damaged_structures_never_crash(seed: int) -> None:
    """Characters struck out, doubled or swapped: a molecule or a StructureError, nothing else."""
    chance = random.Random(seed)
    text = list(chance.choice(rows())[4])
    for _ in range(chance.randint(1, 4)):
        place = chance.randrange(len(text))
        text[place] = chance.choice("CNOPSFI[]()=#$+-@/\\.:%123456789*HclnosrBe~>< \u00e9")
    damaged = "".join(text)
    outcome = smiles_or_reason(damaged)
    if outcome.startswith("refused: "):
        assert "\n" not in outcome
    else:
        assert read_smiles(outcome).smiles == outcome


def smiles_or_reason(text: str) -> str:
    try:
        return read_smiles(text).smiles
    except StructureError as error:
        return f"refused: {error}"
