"""The hazard statements: word for word where read, combined ones as their parts say."""

import re

import pytest

from shapeshelf.reference.ghs import H_STATEMENTS

# Regulation (EC) No 1272/2008, annex I, tables 2.17.2 and 3.1.3 (label elements), read in the
# consolidated version of 2025 at reachlex.eu; there "desensitising", in the UN's text with z.
DESENSITIZED = "increased risk of explosion if desensitizing agent is reduced"
READ = {
    "H206": "Fire, blast or projection hazard; " + DESENSITIZED,
    "H207": "Fire or projection hazard; " + DESENSITIZED,
    "H208": "Fire hazard; " + DESENSITIZED,
    "H300": "Fatal if swallowed",
    "H301": "Toxic if swallowed",
    "H302": "Harmful if swallowed",
    "H310": "Fatal in contact with skin",
    "H311": "Toxic in contact with skin",
    "H312": "Harmful in contact with skin",
    "H330": "Fatal if inhaled",
    "H331": "Toxic if inhaled",
    "H332": "Harmful if inhaled",
}
ROUTES = {"0": "swallowed", "1": "contact with skin", "3": "inhaled"}


@pytest.mark.parametrize(("code", "text"), READ.items(), ids=READ)
def test_statements_read_at_their_source(code: str, text: str) -> None:
    """Word for word."""
    assert H_STATEMENTS[code] == text


def test_codes_have_the_form_of_codes_and_texts_no_full_stop() -> None:
    """H and three digits of group 2, 3 or 4, joined with ``+``; a letter only in the EU's."""
    for code, text in H_STATEMENTS.items():
        assert re.fullmatch(r"H[234]\d\d([FDfdi]{1,2})?(\+H3\d\d)*", code), code
        assert text == text.strip().rstrip("."), code


def test_combined_statements_name_the_routes_of_their_parts() -> None:
    """H300+H330 speaks of swallowing and inhaling, with the one word for their severity."""
    combined = [code for code in H_STATEMENTS if re.fullmatch(r"H3\d[0-3](\+H3\d[0-3])+", code)]
    assert len(combined) == 16
    for code in combined:
        parts = code.split("+")
        assert all(ROUTES[part[2]] in H_STATEMENTS[code] for part in parts), code
        severities = {re.split(r" (?:if|in) ", H_STATEMENTS[part])[0] for part in parts}
        assert severities == {re.split(r" (?:if|in) ", H_STATEMENTS[code])[0]}, code
