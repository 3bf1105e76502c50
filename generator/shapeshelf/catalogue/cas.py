"""Registry numbers whose last digit checks the others: CAS and ISBN.

CAS: each digit left of the check digit is multiplied by its place counted from the right;
the sum modulo 10 is the check digit (CAS, "Check Digit Verification of CAS Registry
Numbers"; recalled from memory). ISBN: ISO 2108, recalled from memory.
"""

import re

from shapeshelf.catalogue.problems import quoted

_CAS = re.compile(r"(\d{2,7})-(\d{2})-(\d)", re.ASCII)


def cas_check_digit(digits: str) -> int:
    """Return the check digit (0 to 9) of the digits before it, hyphens left out."""
    return sum(place * int(digit) for place, digit in enumerate(reversed(digits), start=1)) % 10


def cas_faults(number: str) -> tuple[str, ...]:
    """Return what is wrong with a CAS number as text, nothing if it is right."""
    match = _CAS.fullmatch(number)
    if match is None:
        return (f"{quoted(number)} is no CAS number; right would be digits as in 7783-60-0",)
    first, second, given = match.groups()
    right = cas_check_digit(first + second)
    if int(given) != right:
        return (
            f"the check digit of `{number}` is wrong: {first}-{second} ends in {right}, "
            f"so {first}-{second}-{right}, unless another digit is mistyped",
        )
    return ()


def isbn_is_valid(number: str) -> bool:
    """Say whether the check digit of an ISBN of 10 or 13 digits is right."""
    digits = number.replace("-", "").replace(" ", "")
    if re.fullmatch(r"\d{9}[\dX]", digits, re.ASCII):
        values = [10 if digit == "X" else int(digit) for digit in digits]
        return (
            sum(weight * value for weight, value in zip(range(10, 0, -1), values, strict=True)) % 11
            == 0
        )
    if re.fullmatch(r"97[89]\d{10}", digits, re.ASCII):
        return sum(int(digit) * (1, 3)[place % 2] for place, digit in enumerate(digits)) % 10 == 0
    return False
