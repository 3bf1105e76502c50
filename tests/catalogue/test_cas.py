"""Check digits of CAS and ISBN numbers."""

import pytest
from chemicals.identifiers import pubchem_db

from shapeshelf.catalogue.cas import cas_check_digit, cas_faults, isbn_is_valid

# CRC Handbook of Chemistry and Physics; recalled from memory.
KNOWN = {
    "water": "7732-18-5",
    "ammonia": "7664-41-7",
    "sulfur tetrafluoride": "7783-60-0",
    "sulfur hexafluoride": "2551-62-4",
    "caffeine": "58-08-2",
    "triphenylphosphine": "603-35-0",
}


@pytest.mark.parametrize("number", KNOWN.values(), ids=KNOWN)
def test_a_known_number_is_right_and_every_other_last_digit_is_wrong(number: str) -> None:
    """Exactly one last digit fits, and the message names it."""
    assert cas_faults(number) == ()
    for other in set("0123456789") - {number[-1]}:
        (message,) = cas_faults(number[:-1] + other)
        assert number in message


def test_check_digit_agrees_with_an_open_dataset() -> None:
    """Every number in the compound list of the package ``chemicals`` has our check digit."""
    pubchem_db.finish_loading()
    numbers = [str(number) for number in pubchem_db.CAS_index]
    wrong = [digits for digits in numbers if cas_check_digit(digits[:-1]) != int(digits[-1])]
    assert len(numbers) > 50_000
    assert wrong == []


@pytest.mark.parametrize(
    "text",
    [
        "",
        "7783-60",
        "7783600",
        "7783-600",
        "1-23-4",
        "77836000-60-0",
        "７７８３-60-0",
        "7783-60-0\n",
    ],
)
def test_what_has_not_the_form_of_a_number_is_refused(text: str) -> None:
    """The message shows what a number looks like."""
    (message,) = cas_faults(text)
    assert "is no CAS number" in message


@pytest.mark.parametrize(
    ("number", "valid"),
    [
        # International ISBN Agency, ISBN Users' Manual, worked example; recalled from memory.
        ("978-0-306-40615-7", True),
        ("0-306-40615-2", True),
        ("0-8044-2957-X", True),
        ("978-0-306-40615-8", False),
        ("0-306-40615-3", False),
        ("977-0-306-40615-7", False),
        ("", False),
    ],
)
def test_isbn(number: str, valid: bool) -> None:
    """Ten and thirteen digits, each with its own rule."""
    assert isbn_is_valid(number) is valid
