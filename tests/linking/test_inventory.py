"""``objects.inv`` through Sphinx's own reader, and another one."""

from io import BytesIO
from posixpath import join

import sphobjinv
from sphinx.util.inventory import InventoryFile

from shapeshelf.linking.inventory import inventory

ROOT = "https://shapes.example.org/bench/"


def test_sphinx_finds_compounds_sections_and_values(published) -> None:
    """Address and shown name of each; an earlier id leads to the present page."""
    labels = InventoryFile.load(BytesIO(inventory(published, "Our shapes")), ROOT, join)[
        "std:label"
    ]
    assert labels["sf4"].uri == ROOT + "compounds/sf4/"
    assert labels["sf4"].display_name == "Sulfur tetrafluoride"
    assert labels["sulfur-iv-fluoride.angles"].uri == ROOT + "compounds/sf4/#angles"
    value = labels["sf4.angle-f-ax-s-f-ax"]
    assert value.uri == ROOT + "compounds/sf4/#angle-f-ax-s-f-ax"
    assert value.display_name == "Sulfur tetrafluoride, F(ax)-S-F(ax)"
    assert labels["shapes.see-saw"].uri == ROOT + "shapes/see-saw/"


def test_every_name_is_one_that_ref_can_ask_for(published) -> None:
    """Sphinx puts the target of ``:ref:`` into small letters and takes it up to a space."""
    read = sphobjinv.Inventory(zlib=inventory(published, "Our shapes"))
    assert read.project == "Our shapes"
    names = [item.name for item in read.objects]
    assert len(names) == len(set(names)) > 30
    assert all(name == name.lower() and " " not in name for name in names)
