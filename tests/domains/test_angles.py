"""Model angles against measured ones, with their stated uncertainty."""

import csv
from itertools import combinations
from pathlib import Path

import numpy as np
import pytest

from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.parameters import Parameters
from shapeshelf.structure.reading import read_smiles

DATA = Path(__file__).parent.parent / "data"
# angles.csv: recalled from memory of the electron-diffraction and microwave literature as
# tabulated in Gillespie and Hargittai, The VSEPR Model of Molecular Geometry (1991), Gillespie,
# Coord. Chem. Rev. 252 (2008) 1315, and the CRC Handbook's table of free molecules. The model is
# fitted on it. angles_checked.csv: as its own column says; the model is not fitted on it.
MEAN_DEGREES, PERCENTILE_DEGREES, LARGEST_DEGREES = 2.0, 4.5, 12.0
"""What the project promises in cross-validation; the fit itself must keep it too."""
CHECKED_MEAN_DEGREES, CHECKED_PERCENTILE_DEGREES = 2.3, 4.5
"""Molecules the fit never saw may do a little worse on average."""
COVERED = (0.55, 0.80)
"""Around 68 %, with two standard deviations of a binomial share of 67 rows."""
MOST_PARAMETERS = 12


def angles_of(smiles, element, ends):
    """Return (model degrees, half-width) of every angle that the words could mean."""
    molecule = read_smiles(smiles)
    return [
        (angle.model_degrees, angle.uncertainty_degrees)
        for centre in analyse(molecule)[1]
        if centre.element == element
        for angle in centre.angles
        if sorted(molecule.atoms[angle.atoms[k]].element for k in (0, 2)) == sorted(ends)
    ]


def errors_in(table):
    """Return (n, 2): model minus measured, and the half-width, of the nearest angle meant."""
    found = []
    with (DATA / table).open(encoding="utf-8") as file:
        for row in csv.DictReader(file):
            first, centre, last = row["angle"].split("-")
            measured = float(row["value_deg"])
            angles = angles_of(row["smiles"], centre, (first, last))
            found.append(min(((a - measured, w) for a, w in angles), key=lambda e: abs(e[0])))
    return np.array(found)


def test_the_angles_it_was_fitted_on():
    """Mean, 90th percentile and largest error are within the promise."""
    errors = np.abs(errors_in("angles.csv")[:, 0])
    assert len(errors) == 138
    assert errors.mean() <= MEAN_DEGREES
    assert np.quantile(errors, 0.9) <= PERCENTILE_DEGREES
    assert errors.max() <= LARGEST_DEGREES


def test_angles_it_was_not_fitted_on():
    """Molecules outside the fit do as well, and the stated half-widths cover two thirds."""
    found = errors_in("angles_checked.csv")
    errors = np.abs(found[:, 0])
    assert errors.mean() <= CHECKED_MEAN_DEGREES
    assert np.quantile(errors, 0.9) <= CHECKED_PERCENTILE_DEGREES
    assert COVERED[0] <= (errors <= found[:, 1]).mean() <= COVERED[1]


def test_few_parameters():
    """The model has at most twelve fitted parameters."""
    assert len(Parameters.__dataclass_fields__) <= MOST_PARAMETERS


# Orders of angles that the textbooks explain; Gillespie and Hargittai (1991), recalled.
ORDERS = [
    ("N", "N", ("H", "H"), "FN(F)F", "N", ("F", "F")),
    ("ClOCl", "O", ("Cl", "Cl"), "FOF", "O", ("F", "F")),
    ("ClP(Cl)Cl", "P", ("Cl", "Cl"), "FP(F)F", "P", ("F", "F")),
    ("FP(F)F", "P", ("F", "F"), "P", "P", ("H", "H")),
    ("C", "C", ("H", "H"), "N", "N", ("H", "H")),
    ("O", "O", ("H", "H"), "S", "S", ("H", "H")),
    ("C=C", "C", ("C", "H"), "C=C", "C", ("H", "H")),
    ("O=S(=O)(F)F", "S", ("O", "O"), "O=S(=O)(F)F", "S", ("F", "F")),
    ("O=[N]=O", "N", ("O", "O"), "[O-]N=O", "N", ("O", "O")),
]


@pytest.mark.parametrize(
    ("wide", "wide_at", "wide_ends", "narrow", "narrow_at", "narrow_ends"), ORDERS
)
def test_the_wider_of_two_angles(wide, wide_at, wide_ends, narrow, narrow_at, narrow_ends):
    """Trends that are explained by repulsion come out the right way round."""
    assert min(angles_of(wide, wide_at, wide_ends)) > max(angles_of(narrow, narrow_at, narrow_ends))


def test_the_angles_at_a_centre_do_not_depend_on_atom_order():
    """Two spellings of a molecule of five unlike ligands have the same angles."""
    spellings = ("O=S(F)(Cl)(Br)C", "CS(Br)(=O)(F)Cl")
    first, second = (
        sorted(
            round(angles_of(spelling, "S", ends)[0][0], 6)
            for ends in combinations(["O", "F", "Cl", "Br", "C"], 2)
        )
        for spelling in spellings
    )
    assert first == second
