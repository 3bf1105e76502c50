"""The JSON of one compound keeps the promises of the contract."""

import json

import pytest

from shapeshelf.report.building import report_on_structure
from shapeshelf.report.json import report_json

TOP = {
    "schema",
    "id",
    "name",
    "formula",
    "charge",
    "multiplicity",
    "smiles",
    "inchikey",
    "shape",
    "point_group",
    "polar",
    "dipole",
    "centres",
    "atoms",
    "cautions",
}
CENTRE = {
    "atom",
    "element",
    "label",
    "bonded",
    "lone_pairs",
    "single_electrons",
    "notation",
    "arrangement",
    "shape",
    "polyhedral_symbol",
    "hybridisation",
    "angles",
    "departs",
}
ANGLE = {
    "of",
    "atoms",
    "count",
    "ideal",
    "model",
    "calculated",
    "measured",
    "value",
    "uncertainty",
    "basis",
    "source",
}
SMILES = ["FS(F)(F)F", "CCO", "[O-][N+](=O)[O-]", "F", "FP(F)(F)(F)F", "C[Hg]C"]


@pytest.mark.parametrize("smiles", SMILES)
def test_promised_fields_are_there(smiles):
    found = report_json(report_on_structure(smiles))
    assert found.keys() >= TOP
    for centre in found["centres"]:
        assert centre.keys() >= CENTRE
        for angle in centre["angles"]:
            assert angle.keys() >= ANGLE
            assert angle["basis"] in ("measured", "calculated", "model")
            assert 0 < angle["value"] <= 180


@pytest.mark.parametrize("smiles", SMILES)
def test_it_is_plain_json(smiles):
    """It survives a round trip, with no number that JSON has no word for."""
    found = report_json(report_on_structure(smiles))
    assert json.loads(json.dumps(found, allow_nan=False)) == found


def test_sulfur_tetrafluoride_as_promised():
    """The contract's own example, apart from its numbers."""
    found = report_json(report_on_structure("FS(F)(F)F"))
    assert found["formula"] == "SF4"
    assert found["shape"] == "see-saw"
    assert found["point_group"]["value"] == "C2v"
    assert found["polar"] is True
    (centre,) = found["centres"]
    assert (centre["atom"], centre["label"]) == (1, "S1")
    assert (centre["bonded"], centre["lone_pairs"], centre["single_electrons"]) == (4, 1, 0)
    assert (centre["notation"], centre["polyhedral_symbol"]) == ("AX4E", "SS-4")
    assert centre["arrangement"] == "trigonal bipyramidal"
    assert centre["departs"] is None
    assert [atom["lone_pairs"] for atom in found["atoms"]] == [3, 1, 3, 3, 3]


def test_ion_has_no_dipole_and_is_neither_polar_nor_not():
    found = report_json(report_on_structure("[O-][N+](=O)[O-]"))
    assert found["polar"] is None
    assert found["dipole"] is None


def test_two_atoms_are_linear_and_have_no_centre():
    found = report_json(report_on_structure("F"))
    assert (found["shape"], found["centres"]) == ("linear", [])


def test_several_centres_have_no_shape_in_common():
    assert report_json(report_on_structure("CCO"))["shape"] is None


def test_added_hydrogens_come_after_the_atoms_of_the_smiles():
    found = report_json(report_on_structure("OCl"))
    assert [atom["element"] for atom in found["atoms"]] == ["O", "Cl", "H"]
