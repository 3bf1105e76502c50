"""The page on methods prints what the table and the settings of the program say."""

import re

import numpy as np
import pytest

from shapeshelf.calculation.judging import level_for
from shapeshelf.calculation.methods import NAMES
from shapeshelf.calculation.model import Level
from shapeshelf.calculation.parity import QUANTITIES, ParityPoint, parity_points
from shapeshelf.pages.methods import methods_view, quantity_view
from shapeshelf.pages.site import handwritten_pages
from shapeshelf.structure.reading import read_smiles


@pytest.fixture(scope="module")
def page() -> str:
    return dict(handwritten_pages())["methods.md"]


def point(name: str, measured: float, model: float, **given: object) -> ParityPoint:
    fields = {"xtb": None, "dft": None, "atoms": 3, "source": "a book", "counts": True}
    return ParityPoint(
        quantity="angle",
        name=name,
        smiles=name,
        of="F-S-F",
        measured=measured,
        model=model,
        **{**fields, **given},
    )


def test_an_outlier_is_printed_with_what_it_is_of() -> None:
    """Formula set, unit and sign with the numbers, and whether it counts."""
    points = [point("SF2", 98.0, 99.0), point("XeF5+", 79.0, 84.0, counts=False)]
    (panel,) = quantity_view(points, "angle").panels
    worst, other = panel.outliers
    assert worst.molecule == "XeF<sub>5</sub><sup>+</sup>"
    assert (worst.of, worst.measured, worst.found, worst.off) == (
        "F-S-F", "79.0°", "84.0°", "+5.0°",
    )  # fmt: skip
    assert (worst.counts, other.counts) == (False, True)


def test_common_values_are_averaged_apart_only_where_they_differ() -> None:
    """Two methods, one of which lacks a value."""
    both = [point("SF2", 98.0, 99.0, xtb=98.5), point("OF2", 103.0, 102.0, xtb=104.0)]
    assert quantity_view(both, "angle").common == ()
    more = quantity_view([*both, point("H2O", 104.5, 108.5)], "angle")
    assert [one.values for one in more.averages] == [3, 2]
    assert [(one.values, one.mean) for one in more.common] == [(2, "1.0°"), (2, "0.8°")]


@pytest.mark.parametrize("quantity", QUANTITIES)
def test_printed_averages_are_those_of_the_table(page: str, quantity: str) -> None:
    """Recomputed here from the rows that count, for each method that has any."""
    unit, digits = {"angle": ("°", 1), "dipole": (" D", 2)}[quantity]
    rows = [one for one in parity_points() if one.quantity == quantity and one.counts]
    printed = re.findall(r"<tr>.*?</tr>", page)
    methods = {"model": "Domain model", "xtb": NAMES[Level.XTB], "dft": NAMES[Level.DFT]}
    for key, method in methods.items():
        held = [one for one in rows if getattr(one, key) is not None]
        if not held:
            continue
        errors = np.abs([getattr(one, key) - one.measured for one in held])
        numbers = (errors.mean(), np.quantile(errors, 0.68), errors.max())
        cells = [
            *(f"{number:.{digits}f}{unit}" for number in numbers),
            len(held),
            len({one.smiles for one in held}),
            max(one.atoms for one in held),
        ]
        row = "".join(f'<td class="num">{cell}</td>' for cell in cells)
        assert f'<tr><th scope="row">{method}</th>{row}</tr>' in printed


def test_every_method_with_values_has_a_plot_with_words(page: str) -> None:
    """And each source of the table is named with how many values it gave."""
    view = methods_view()
    panels = [*view.angles.panels, *view.dipoles.panels]
    assert page.count('class="fig fig-parity"') == len(panels) > 0
    assert page.count("Furthest off: ") == len(panels)
    assert sum(count for _, _, count in view.sources) == len(parity_points())


@pytest.mark.parametrize("smiles", ["O", "CC", "CCC", "C" * 8, "C" * 9, "F[Ti](F)(F)F"])
def test_sizes_are_told_as_they_are_chosen(smiles: str) -> None:
    """The level that is chosen for a molecule is the first whose line holds its size."""
    molecule = read_smiles(smiles)
    told = [view.name for view in methods_view().levels if holds(view.sizes, len(molecule.atoms))]
    assert told[0] == NAMES[level_for(molecule)]


def test_large_complexes_of_metals_are_told_apart() -> None:
    """Eight atoms of a metal complex are calculated as many more of another molecule are."""
    assert level_for(read_smiles("F[Re](F)(F)(F)(F)(F)F")) is Level.XTB
    assert methods_view().levels[-1].sizes.endswith("complexes of a transition metal, more than 7")


def holds(sizes: str, atoms: int) -> bool:
    """Tell whether ``up to 10 atoms``, ``11 to 25 atoms``, ``more than 25 atoms`` holds a size."""
    bounds = [int(number) for number in re.findall(r"\d+", sizes)]
    if sizes.startswith("up to"):
        return atoms <= bounds[0]
    if sizes.startswith("more than"):
        return atoms > bounds[0]
    return bounds[0] <= atoms <= bounds[1]


def test_nothing_is_left_unfilled(page: str) -> None:
    """No mark of a template reaches the page, and the title stands first."""
    assert "{{" not in page
    assert "{%" not in page
    assert page.lstrip().startswith("# Methods")
