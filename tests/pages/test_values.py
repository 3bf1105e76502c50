from dataclasses import replace

import pytest

from shapeshelf.catalogue.model import Measurement, Source, SourceKind
from shapeshelf.pages.values import ANGSTROM, DEBYE, DEGREE, citation, value_view
from shapeshelf.report.model import Basis, Value


def test_measured_value_names_its_source_and_says_that_it_was_recalled(
    measurement: Measurement, sources: dict[str, Source]
) -> None:
    """The number, its ±, basis, source, phase and method stand together."""
    view = value_view(_measured(measurement), DEGREE, sources)
    assert (view.text, view.plus_minus, view.basis) == ("173.1°", "±\xa00.5°", "measured")
    assert view.recalled
    assert (view.source_text, view.source_anchor) == ("Author 1991", "source-handbook")
    assert (view.phase, view.method) == ("gas", "microwave")
    assert view.others == {"measured": "173.1\xa0±\xa00.5", "model": "172.0\xa0±\xa03.0"}


def test_a_value_that_was_read_is_not_called_recalled(
    measurement: Measurement, sources: dict[str, Source]
) -> None:
    """Only the kind of the source decides."""
    read = {"handbook": replace(sources["handbook"], kind=SourceKind.READ)}
    assert not value_view(_measured(measurement), DEGREE, read).recalled


def test_model_value_is_rounded_to_the_decimals_of_its_unit() -> None:
    """A model's further decimals mean nothing."""
    value = _model(1.63917, 0.0234)
    assert value_view(value, ANGSTROM, {}).text == "1.639\xa0Å"
    assert value_view(value, ANGSTROM, {}).plus_minus == "±\xa00.023\xa0Å"
    assert value_view(_model(0.63, 0.3), DEBYE, {}).text == "0.63\xa0D"


def test_what_symmetry_fixes_says_so_in_place_of_a_half_width() -> None:
    """A half-width of nought is no number to print."""
    view = value_view(_model(109.4712, 0.0), DEGREE, {})
    assert (view.text, view.plus_minus) == ("109.5°", "by\xa0symmetry")
    assert view.others == {"model": "109.5\xa0by\xa0symmetry"}


def test_supplied_value_has_a_basis_of_its_own() -> None:
    """Coordinates that an entry supplies are neither measured nor a model."""
    supplied = replace(_model(109.5, 1.0), basis=Basis.SUPPLIED, supplied=110.2, value=110.2)
    view = value_view(supplied, DEGREE, {})
    assert view.basis == "supplied"
    assert view.others == {"supplied": "110.2", "model": "109.5\xa0±\xa01.0"}


@pytest.mark.parametrize(
    ("authors", "expected"),
    [
        ("A. Author and B. Other", "Author 1991"),
        ("Author, A.; Other, B.", "Author 1991"),
        ("W. M. Haynes (editor)", "Haynes 1991"),
        ("", "A handbook 1991"),
    ],
)
def test_citation_is_surname_and_year(
    authors: str, expected: str, sources: dict[str, Source]
) -> None:
    """Whatever order the names come in."""
    assert citation(replace(sources["handbook"], authors=authors)) == expected


def _measured(item: Measurement) -> Value:
    return Value(173.1, 0.5, Basis.MEASURED, 172.0, 3.0, None, None, 173.1, 0.5, item.source, item)


def _model(number: float, uncertainty: float) -> Value:
    return Value(
        number, uncertainty, Basis.MODEL, number, uncertainty, None, None, None, None, "model"
    )
