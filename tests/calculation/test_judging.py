"""What cannot be calculated, what may not stand, and which level suits which size."""

import numpy as np
import pytest

from shapeshelf.calculation.failing import UnusableError
from shapeshelf.calculation.judging import (
    check_bonds,
    check_spin,
    check_system,
    imaginary,
    level_for,
    same_structure,
)
from shapeshelf.calculation.model import Level, Mode, System
from shapeshelf.structure.reading import read_smiles


@pytest.mark.parametrize(
    ("system", "message"),
    [
        (System(("U", *"FFFFFF"), 0, 1), "no basis set or parameters for U"),
        (System(("O", "H", "H"), 0, 2), "10 electrons cannot have multiplicity 2"),
        (System(("O", "N", "O"), 0, 1), "23 electrons cannot have multiplicity 1"),
    ],
)
def test_refused_systems(system, message):
    """An element beyond radon, and electrons that cannot pair as the multiplicity says."""
    with pytest.raises(UnusableError, match=message):
        check_system(system)


@pytest.mark.parametrize(
    "system", [System(("O", "N", "O"), 0, 2), System(("O", "O"), 0, 3), System(("C", "N"), -1, 1)]
)
def test_accepted_systems(system):
    """Nitrogen dioxide, dioxygen and cyanide are in order."""
    check_system(system)


@pytest.mark.parametrize(("found", "refused"), [(None, False), (0.7534, False), (0.9, True)])
def test_spin_contamination(found, refused):
    """A doublet has <S2> 0.75; more than a tenth above it is another state."""
    system = System(("O", "N", "O"), 0, 2)
    if refused:
        with pytest.raises(UnusableError, match=r"<S2> exceeds 0\.75 by 0\.15"):
            check_spin(system, found)
    else:
        check_spin(system, found)


def test_a_bond_that_breaks():
    """The record says which bond of the entry does not hold."""
    molecule = read_smiles("O")
    start = np.array([[0.0, 0, 0], [1.8, 0, 0], [0, 1.8, 0]])
    check_bonds(molecule, start, start * 1.1)
    with pytest.raises(UnusableError, match="a bond O-H of the entry does not hold"):
        check_bonds(molecule, start, start * np.array([1, 2, 1]))


@pytest.mark.parametrize(("wavenumber", "leads"), [(-300.0, True), (-5.0, False), (40.0, False)])
def test_imaginary_modes(wavenumber, leads):
    """A few wavenumbers below nought are the grid's noise."""
    assert imaginary([Mode(wavenumber, 0.0), Mode(500.0, 1.0)]) is leads


@pytest.mark.parametrize(
    ("smiles", "level"),
    [
        ("O", Level.DFT),
        ("FP(F)(F)(F)F", Level.DFT),
        ("F[W](F)(F)(F)(F)F", Level.DFT),
        ("c1ccncc1", Level.DFT_SMALL),
        ("[O+]#[C-]->[Ni](<-[C-]#[O+])(<-[C-]#[O+])<-[C-]#[O+]", Level.XTB),
        ("c1ccc(cc1)P(c1ccccc1)c1ccccc1", Level.XTB),
    ],
)
def test_level_by_size(smiles, level):
    """Small molecules get the full basis, middling ones the small, large ones GFN2-xTB."""
    assert level_for(read_smiles(smiles)) is level


def test_same_structure_up_to_exchange_and_mirror():
    """Turned, mirrored and renumbered it is the same; bent further it is not."""
    points = np.array([[0.0, 0, 0], [1.8, 0, 0.2], [0.3, 1.9, 0], [-1.0, -1.0, 1.2]])
    elements = ("N", "H", "H", "H")
    other = (points * np.array([-1, 1, 1]))[[0, 2, 1, 3]]
    assert same_structure(elements, points, other)
    bent = points.copy()
    bent[3] = [-1.0, 0.6, 1.5]
    assert not same_structure(elements, points, bent)
