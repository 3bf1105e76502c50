import json

import pytest

from shapeshelf.pages.glossary import definitions_json, term_link, term_views


def test_terms_are_in_order_and_each_has_one_address() -> None:
    """Two terms with one anchor would explain each other's words."""
    views = term_views()
    names = [view.name.casefold() for view in views]
    assert names == sorted(names)
    assert len({view.anchor for view in views}) == len(views)
    assert set(json.loads(definitions_json())) == {view.anchor for view in views}


def test_a_link_is_escaped_and_leads_to_its_term() -> None:
    """The text may be any; the term must be one of the glossary's."""
    link = term_link("../", "<lone pairs>", "lone pair")
    assert link == '<a class="term" href="../glossary/#lone-pair">&lt;lone pairs&gt;</a>'
    with pytest.raises(KeyError, match="no such term"):
        term_link("../", "no such term")
