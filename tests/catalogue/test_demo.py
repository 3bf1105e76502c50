"""The demo catalogue: read whole, and held against an open dataset and its own protocols."""

import re
from pathlib import Path

import pytest
from chemicals import dipole_moment, search_chemical

from shapeshelf.catalogue.model import Catalogue, Entry, Quantity, SourceKind
from shapeshelf.catalogue.reading import read_catalogue
from shapeshelf.structure.formulas import parse_formula

COMPOUNDS = Path(__file__).parents[2] / "compounds"
DIPOLE_SOURCE = "cccbdb-dipoles"
DIPOLE_TOLERANCE_DEBYE = 0.0005
"""Half a unit of the last digit that the dataset carries."""
DATASET_LACKS = {"imes", "iof5", "xeo2f2"}
"""CAS numbers that the package ``chemicals`` does not list; recalled from memory."""
DATASET_DIFFERS = {"ammonia-borane"}
"""Listed there as BH3N, three hydrogens short of the adduct BH3.NH3 that bears the number."""

LINK = re.compile(r"\[([^\]]*)\]\(\.\./\.\./compounds/([a-z0-9-]+)/(?:#[\w-]+)?\)")
NUMBER = re.compile(r"([\d.]+) ?(°|Å|D)(?!\w)")
QUANTITY = {"°": Quantity.ANGLE, "Å": Quantity.LENGTH, "D": Quantity.DIPOLE}


@pytest.fixture(scope="module")
def catalogue() -> Catalogue:
    return read_catalogue(COMPOUNDS)


@pytest.fixture(scope="module")
def entries(catalogue: Catalogue) -> dict[str, Entry]:
    return {entry.id: entry for entry in catalogue.entries}


def test_the_demo_is_large_enough_and_every_source_is_cited(catalogue: Catalogue) -> None:
    """At least 48 compounds, no source without a value, all three kinds of source present."""
    cited = {item.source for entry in catalogue.entries for item in entry.measured}
    assert len(catalogue.entries) >= 48
    assert cited == set(catalogue.sources)
    assert {source.kind for source in catalogue.sources.values()} == set(SourceKind)


def test_cas_numbers_name_compounds_of_the_stated_composition(entries: dict[str, Entry]) -> None:
    """The package ``chemicals`` (PubChem identifiers) gives each CAS number our composition."""
    numbered = {key: entry for key, entry in entries.items() if entry.cas and entry.formula}
    theirs = {key: _dataset_counts(str(entry.cas)) for key, entry in numbered.items()}
    unlisted = {key for key, counts in theirs.items() if counts is None}
    disagreeing = {
        key
        for key in set(numbered) - unlisted - DATASET_DIFFERS
        if theirs[key] != dict(parse_formula(str(numbered[key].formula))[0])
    }
    assert len(numbered) > 70
    assert unlisted <= DATASET_LACKS
    assert disagreeing == set()


def test_dipole_moments_are_those_of_the_dataset(entries: dict[str, Entry]) -> None:
    """NIST CCCBDB (Standard Reference Database 101) as carried by the package ``chemicals``."""
    found = {
        key: (item.value, dipole_moment(entry.cas, method="CCCBDB"))
        for key, entry in entries.items()
        for item in entry.measured
        if item.source == DIPOLE_SOURCE
    }
    assert len(found) >= 20
    for ours, theirs in found.values():
        assert ours == pytest.approx(theirs, abs=DIPOLE_TOLERANCE_DEBYE)


def test_protocols_link_to_compounds_and_quote_their_measured_values(
    catalogue: Catalogue, entries: dict[str, Entry]
) -> None:
    """Each number inside a link is a measured value of the compound, rounded as quoted."""
    quoted = 0
    for protocol in catalogue.protocols.values():
        text = (COMPOUNDS / str(protocol.file)).read_text(encoding="utf-8")
        for words, key in LINK.findall(text):
            assert key in entries, f"{protocol.id} links to {key}"
            for number, unit in NUMBER.findall(words):
                assert _is_measured(entries[key], number, unit), f"{protocol.id}: {words}"
                quoted += 1
    assert quoted >= 8


def test_compounds_named_by_a_protocol_are_linked_in_it(catalogue: Catalogue) -> None:
    """``used-in`` and the documents agree."""
    links = {
        key: {
            target
            for _, target in LINK.findall(
                (COMPOUNDS / str(protocol.file)).read_text(encoding="utf-8")
            )
        }
        for key, protocol in catalogue.protocols.items()
    }
    missing = {
        (entry.id, protocol)
        for entry in catalogue.entries
        for protocol in entry.used_in
        if entry.id not in links[protocol]
    }
    assert missing == set()


def _dataset_counts(cas: str) -> dict[str, int] | None:
    try:
        listed = search_chemical(cas).formula
    except ValueError:
        return None
    formula = re.sub(r"[+-]\d*$", "", listed)
    return {
        element: int(count or 1) for element, count in re.findall(r"([A-Z][a-z]?)(\d*)", formula)
    }


def _is_measured(entry: Entry, number: str, unit: str) -> bool:
    decimals = len(number.partition(".")[2])
    return any(
        round(item.value, decimals) == float(number)
        for item in entry.measured
        if item.quantity is QUANTITY[unit]
    )
