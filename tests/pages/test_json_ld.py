"""The JSON-LD in a compound's page."""

import json

from shapeshelf.pages.json_ld import json_ld, molecular_entity
from shapeshelf.report.model import CompoundReport

URL = "https://shapes.example.org/compounds/sf4/"


def test_it_is_a_molecular_entity_of_schema_org(sf4: CompoundReport) -> None:
    """Type and identifiers, each under the vocabulary's own name (recalled from memory)."""
    held = json.loads(json_ld(sf4, URL, "A see-saw."))
    assert (held["@context"], held["@type"]) == ("https://schema.org", "MolecularEntity")
    assert (held["@id"], held["url"]) == (URL, URL)
    assert held["smiles"] == sf4.molecule.smiles
    assert held["inChIKey"] == sf4.molecule.inchikey
    assert {"@type": "PropertyValue", "propertyID": "CAS", "value": "7783-60-0"} in (
        held["identifier"]
    )


def test_nothing_in_it_can_end_the_script(sf4: CompoundReport, renamed) -> None:
    """Hostile text comes back from the JSON exactly, and never stands in it as markup."""
    hostile = "</script><!--<script>&amp;\u2028"
    text = str(json_ld(renamed(sf4, name=hostile), URL, hostile))
    assert "<" not in text
    assert ">" not in text
    held = json.loads(text)
    assert (held["name"], held["description"]) == (hostile, hostile)


def test_without_an_address_the_page_itself_is_meant(sf4: CompoundReport) -> None:
    assert molecular_entity(sf4, None, "")["@id"] == "./"
