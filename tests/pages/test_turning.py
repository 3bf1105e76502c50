"""The numbers on a page from which its drawing is turned."""

import json

import pytest

from shapeshelf.pages.script_data import script_data
from shapeshelf.pages.turning import turn_data


@pytest.mark.parametrize("text", ["</script><b>", "<!--", "a & b", "\u2028\u2029", 'say "no"'])
def test_data_cannot_end_their_element(text):
    """Nothing in them reads as markup, and they come back as they were."""
    written = str(script_data({"text": text}))
    assert not set("<>&\u2028\u2029") & set(written)
    assert json.loads(written) == {"text": text}


def test_the_page_carries_every_atom(sf4):
    """As many atoms and bonds as the molecule has, all nearer than the eye."""
    data = json.loads(turn_data(sf4))
    assert [atom[0] for atom in data["atoms"]] == [atom.element for atom in sf4.molecule.atoms]
    assert [bond[:2] for bond in data["bonds"]] == [[b.begin, b.end] for b in sf4.molecule.bonds]
    assert all(len(row) == 3 for row in data["view"])
    assert data["eye"] > max(sum(x * x for x in atom[1]) ** 0.5 for atom in data["atoms"])
