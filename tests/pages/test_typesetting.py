import pytest

from shapeshelf.pages import typesetting


@pytest.mark.parametrize(
    ("formula", "charge", "markup", "text"),
    [
        ("SF4", 0, "SF<sub>4</sub>", "SF₄"),
        ("C10H8N2", 0, "C<sub>10</sub>H<sub>8</sub>N<sub>2</sub>", "C₁₀H₈N₂"),
        ("SO42-", -2, "SO<sub>4</sub><sup>2−</sup>", "SO₄²⁻"),
        ("O4S-2", -2, "O<sub>4</sub>S<sup>2−</sup>", "O₄S²⁻"),
        ("NO2-", -1, "NO<sub>2</sub><sup>−</sup>", "NO₂⁻"),
        ("NO2", -1, "NO<sub>2</sub><sup>−</sup>", "NO₂⁻"),
        ("CoN6H183+", 3, "CoN<sub>6</sub>H<sub>18</sub><sup>3+</sup>", "CoN₆H₁₈³⁺"),
        ("<b>2", 0, "&lt;b&gt;<sub>2</sub>", "<b>₂"),
    ],
)
def test_formula_is_set_with_numbers_below_and_charge_above(
    formula: str, charge: int, markup: str, text: str
) -> None:
    """A number of atoms is never read as a charge, and the other way round."""
    assert typesetting.formula_markup(formula, charge) == markup
    assert typesetting.formula_text(formula, charge) == text


@pytest.mark.parametrize(
    ("symbol", "below"),
    [("C2v", "2v"), ("D3h", "3h"), ("Dinfh", "∞h"), ("Td", "d"), ("Oh", "h"), ("C1", "1")],
)
def test_point_group_has_its_indices_below(symbol: str, below: str) -> None:
    """The letter is italic and everything after it stands below the line."""
    expected = f'<span class="pg"><i>{symbol[0]}</i><sub>{below}</sub></span>'
    assert typesetting.point_group_markup(symbol) == expected


@pytest.mark.parametrize(
    ("species", "markup"),
    [
        ("A1", "<i>A</i><sub>1</sub>"),
        ("B2u", "<i>B</i><sub>2u</sub>"),
        ("E'", "<i>E</i><sup>′</sup>"),
        ("A2''", "<i>A</i><sub>2</sub><sup>″</sup>"),
        ("Sigma_g+", "<i>Σ</i><sub>g</sub><sup>+</sup>"),
        ("Sigma-", "<i>Σ</i><sup>−</sup>"),
        ("<i>", "&lt;i&gt;"),
    ],
)
def test_symmetry_species_are_set_as_tables_of_characters_print_them(
    species: str, markup: str
) -> None:
    """Greek letters, primes and signs stand where Mulliken's notation has them."""
    assert typesetting.species_markup(species) == markup


@pytest.mark.parametrize(
    ("label", "markup"),
    [
        ("E", "<i>E</i>"),
        ("C3^2", "<i>C</i><sub>3</sub><sup>2</sup>"),
        ("sigma", "<i>σ</i>"),
        ("i", "<i>i</i>"),
    ],
)
def test_operations_are_set_with_order_and_power(label: str, markup: str) -> None:
    """The order of an axis stands below, a power above."""
    assert typesetting.operation_markup(label) == markup


@pytest.mark.parametrize(
    ("number", "decimals", "text"),
    [(-1.25, 2, "−1.25"), (-0.001, 2, "0.00"), (109.4712, 1, "109.5"), (0.0, 1, "0.0")],
)
def test_numbers_carry_a_true_minus_and_nothing_has_no_sign(
    number: float, decimals: int, text: str
) -> None:
    """A hyphen never stands for a minus sign."""
    assert typesetting.number_text(number, decimals) == text


@pytest.mark.parametrize(
    ("value", "text"), [(173.1, "173.1"), (104.48, "104.48"), (180.0, "180.0"), (1.23456, "1.23")]
)
def test_measured_values_keep_the_decimals_they_were_stated_with(value: float, text: str) -> None:
    """Between one decimal and two."""
    assert typesetting.as_stated_text(value, 1, 2) == text


def test_label_copies_as_it_is_written_in_the_catalogue() -> None:
    """The site is set smaller, but the text stays the label that ``of`` takes."""
    markup = typesetting.label_markup("F(ax)-S-F(eq)")
    assert markup.striptags() == "F(ax)-S-F(eq)"
    assert '<span class="site">(ax)</span>' in markup


@pytest.mark.parametrize(
    ("text", "expected"),
    [("T-shaped", "t-shaped"), ("square pyramidal", "square-pyramidal"), ("see-saw", "see-saw")],
)
def test_shape_names_become_addresses(text: str, expected: str) -> None:
    """Lower case with hyphens."""
    assert typesetting.slug(text) == expected


def test_hybrid_labels_have_their_numbers_above() -> None:
    """sp3d2 is read as sp³d²."""
    assert typesetting.hybrid_markup("sp3d2") == "sp<sup>3</sup>d<sup>2</sup>"
