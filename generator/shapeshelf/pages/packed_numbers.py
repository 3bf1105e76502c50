"""Whole numbers as a short text that JSON need not escape and that compresses well.

A number is any number of leading digits (base 29 without a nought, ``]`` to ``y``) and one last
digit (base 56, ``$`` to ``[``): below 56 one character, below 1680 two. ``packed.js`` reads it.
"""

from collections.abc import Iterable

LAST_DIGITS, LEADING_DIGITS = 56, 29
_FIRST_LAST, _FIRST_LEADING = ord("$"), ord("]")


def packed(numbers: Iterable[int]) -> str:
    """Return the text of whole numbers; raises ValueError for one below nought."""
    return "".join(_one(number) for number in numbers)


def _one(number: int) -> str:
    if number < 0:
        raise ValueError(f"{number}: only whole numbers from nought on can be packed")
    rest, last = divmod(number, LAST_DIGITS)
    text = chr(_FIRST_LAST + last)
    while rest:
        rest, digit = divmod(rest - 1, LEADING_DIGITS)
        text = chr(_FIRST_LEADING + digit) + text
    return text
