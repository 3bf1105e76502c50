import pytest

from shapeshelf.pages.packed_numbers import packed


@pytest.mark.parametrize(
    ("numbers", "length"), [([0, 55], 2), ([56], 2), ([1679], 2), ([1680], 3), ([1800], 3)]
)
def test_small_numbers_take_one_character(numbers: list[int], length: int) -> None:
    """56 last digits, 29 leading ones; nothing that JSON would escape."""
    text = packed(numbers)
    assert len(text) == length
    assert not set(text) & set('"\\')


def test_a_number_below_nought_is_refused() -> None:
    """It would come back as another."""
    with pytest.raises(ValueError, match="-1"):
        packed([-1])
