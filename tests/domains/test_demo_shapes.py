"""The demo catalogue shows every count of neighbours and lone pairs that the model covers."""

from pathlib import Path

import pytest

from shapeshelf.catalogue.reading import read_catalogue
from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.model import Centre
from shapeshelf.structure.reading import read_structure

COMPOUNDS = Path(__file__).parents[2] / "compounds"

# Electron counts and examples: N. N. Greenwood and A. Earnshaw, Chemistry of the Elements,
# 2nd ed. (1997); R. J. Gillespie and I. Hargittai, The VSEPR Model of Molecular Geometry (1991);
# recalled from memory.
EXAMPLES = {
    (2, 0): "becl2",
    (2, 1): "so2",
    (2, 2): "h2o",
    (2, 3): "xef2",
    (3, 0): "bf3",
    (3, 1): "nh3",
    (3, 2): "clf3",
    (4, 0): "ch4",
    (4, 1): "sf4",
    (4, 2): "xef4",
    (5, 0): "pf5",
    (5, 1): "brf5",
    (5, 2): "pentafluoroxenate",
    (6, 0): "sf6",
    (6, 1): "xef6",
    (7, 0): "if7",
    (7, 1): "heptafluoroxenate",
    (8, 0): "octafluoroiodate",
}
SINGLE_ELECTRON = {"no2", "clo2", "nf2"}
SEVERAL_KINDS_OF_CENTRE = {"hno3", "dmso", "ammonia-borane", "trisilylamine", "tmsn3", "h2so4"}
CHOSEN = sorted(set(EXAMPLES.values()) | SINGLE_ELECTRON | SEVERAL_KINDS_OF_CENTRE)


@pytest.fixture(scope="module")
def centres() -> dict[str, tuple[Centre, ...]]:
    entries = {entry.id: entry for entry in read_catalogue(COMPOUNDS).entries}
    return {key: analyse(read_structure(entries[key].structure))[1] for key in CHOSEN}


@pytest.mark.parametrize(("counts", "key"), EXAMPLES.items(), ids=EXAMPLES.values())
def test_every_count_of_neighbours_and_lone_pairs_has_its_compound(
    counts: tuple[int, int], key: str, centres: dict[str, tuple[Centre, ...]]
) -> None:
    """From two to eight neighbours, with and without lone pairs, by textbook count."""
    (centre,) = centres[key]
    assert (centre.bonded, centre.lone_pairs) == counts


@pytest.mark.parametrize("key", sorted(SINGLE_ELECTRON))
def test_radicals_keep_one_single_electron(
    key: str, centres: dict[str, tuple[Centre, ...]]
) -> None:
    """Three odd-electron molecules, the electron at the only centre."""
    (centre,) = centres[key]
    assert centre.single_electrons == 1


@pytest.mark.parametrize("key", sorted(SEVERAL_KINDS_OF_CENTRE))
def test_some_compounds_have_several_kinds_of_centre(
    key: str, centres: dict[str, tuple[Centre, ...]]
) -> None:
    """At least two elements are centres."""
    assert len({centre.element for centre in centres[key]}) > 1
