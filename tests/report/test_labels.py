"""Names of atoms, angles and bonds, as the page prints them and measured values refer to them."""

import pytest

from shapeshelf.report.building import report_on_structure
from shapeshelf.report.labels import same_label

ANGLES = [
    ("FS(F)(F)F", {"F(ax)-S-F(ax)": 1, "F(ax)-S-F(eq)": 4, "F(eq)-S-F(eq)": 1}),
    ("FP(F)(F)(F)F", {"F(ax)-P-F(ax)": 1, "F(ax)-P-F(eq)": 6, "F(eq)-P-F(eq)": 3}),
    ("FS(F)(F)(F)(F)F", {"F-S-F": 12, "F-S-F (trans)": 3}),
    ("F[Xe](F)(F)F", {"F-Xe-F": 4, "F-Xe-F (trans)": 2}),
    (
        "FBr(F)(F)(F)F",
        {"F(ap)-Br-F(bas)": 4, "F(bas)-Br-F(bas)": 4, "F(bas)-Br-F(bas) (trans)": 2},
    ),
    ("O=S(F)F", {"F-S-F": 1, "F-S-O": 2}),
    ("[O-][O+]=O", {"O-O-O": 1}),
    ("O[N+](=O)[O-]", {"N-O1-H": 1, "O1-N-O2": 1, "O1-N-O3": 1, "O2-N-O3": 1}),
    ("CCO", {"C2-C1-H": 3, "H-C1-H": 3, "C1-C2-H": 2, "C1-C2-O": 1, "C2-O-H": 1}),
    ("FS(F)(F)(F)(F)Cl", {"Cl-S-F(ax)": 1, "Cl-S-F(eq)": 4, "F(ax)-S-F(eq)": 4}),
]


@pytest.mark.parametrize(("smiles", "expected"), ANGLES)
def test_rows_of_angles(smiles, expected):
    """Each row has one label and holds as many angles as symmetry makes alike."""
    report = report_on_structure(smiles)
    found = {row.of: len(row.members) for centre in report.centres for row in centre.angles}
    assert expected.items() <= found.items()


@pytest.mark.parametrize("smiles", [smiles for smiles, _ in ANGLES])
def test_labels_are_distinct_at_a_centre(smiles):
    for centre in report_on_structure(smiles).centres:
        labels = [row.of for row in centre.angles]
        assert len(labels) == len(set(labels))


@pytest.mark.parametrize("smiles", [smiles for smiles, _ in ANGLES])
def test_every_pair_of_neighbours_stands_in_one_row(smiles):
    for centre in report_on_structure(smiles).centres:
        members = [member for row in centre.angles for member in row.members]
        count = centre.centre.bonded
        assert len(members) == len(set(members)) == count * (count - 1) // 2


@pytest.mark.parametrize(
    ("smiles", "expected"),
    [
        ("FS(F)(F)F", {"S-F(ax)": 2, "S-F(eq)": 2}),
        ("FP(F)(F)(F)F", {"P-F(ax)": 2, "P-F(eq)": 3}),
        ("FBr(F)(F)(F)F", {"Br-F(ap)": 1, "Br-F(bas)": 4}),
        ("O=S(F)(F)(F)F", {"S-F(ax)": 2, "S-F(eq)": 2, "S-O": 1}),
        ("F[Xe](F)(F)F", {"Xe-F": 4}),
        ("CCO", {"C1-C2": 1, "C1-H": 3, "C2-H": 2, "C2-O": 1, "O-H": 1}),
        ("F", {"F-H": 1}),
    ],
)
def test_rows_of_lengths(smiles, expected):
    found = {row.of: len(row.members) for row in report_on_structure(smiles).lengths}
    assert found == expected


@pytest.mark.parametrize(
    ("left", "right", "same"),
    [
        ("H-O-N", "N-O-H", True),
        ("F\u2013S\u2013F", "F-S-F", True),
        ("F(ax)-S-F(eq)", "F(eq) - S - F(ax)", True),
        ("F(ax)-S-F(ax)", "F(ax)-S-F(eq)", False),
        ("F-S-O", "F-O-S", False),
    ],
)
def test_labels_read_from_either_end(left, right, same):
    assert same_label(left, right) is same
