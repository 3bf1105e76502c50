"""The demo's own protocols: every link and number in them holds."""

import shutil
from pathlib import Path

import pytest

from shapeshelf.linking.citing import Reference, check_paths
from shapeshelf.linking.releasing import present_values
from shapeshelf.report.checking import report_on_catalogue

DEMO = Path(__file__).parents[2] / "compounds"
CITED = (
    "main-group/sf6.yml",
    "main-group/sf4.yml",
    "main-group/sof2.yml",
    "main-group/so2f2.yml",
    "main-group/bf3.yml",
    "main-group/nh3.yml",
    "main-group/h2o.yml",
    "hydrides/ammonia-borane.yml",
    "ligands-solvents/pyridine.yml",
    "metals/hexaamminecobalt.yml",
)
NUMBERS = {"tb-p01.md": 9, "tb-p02.md": 5, "tb-p03.md": 5}
"""Angles, lengths and dipole moments that each quotes, counted by eye."""


@pytest.fixture(scope="module")
def root(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """The part of the demo that its protocols cite."""
    root = tmp_path_factory.mktemp("demo") / "compounds"
    shutil.copytree(DEMO / "protocols", root / "protocols")
    for name in (*CITED, "sources.yml", "protocols.yml"):
        (root / name).parent.mkdir(exist_ok=True)
        shutil.copyfile(DEMO / name, root / name)
    return root


@pytest.fixture(scope="module")
def reference(root: Path) -> Reference:
    return Reference(present_values(*report_on_catalogue(root)).published)


@pytest.mark.parametrize("name", NUMBERS)
def test_every_number_is_read_and_holds(reference: Reference, root: Path, name: str) -> None:
    checked = reference.check(root / "protocols" / name)
    assert (checked.numbers, checked.findings) == (NUMBERS[name], ())
    assert checked.links == (root / "protocols" / name).read_text("utf-8").count("](../../")


@pytest.mark.parametrize(
    ("right", "wrong", "kind"),
    [
        ("173.1°", "177.1°", "value"),
        ("equatorial one of 101.6°", "equatorial one of 104.6°", "value"),
        ("1.646 Å axial", "1.746 Å axial", "value"),
        ("[0.63 D]", "[0.93 D]", "value"),
        ("[0.63 D]", "[0.63 Å]", "unit"),
        ("1.313 Å", "1.313 pm", "unit"),
        ("[106.7° in NH3]", "[109.5° in NH3]", "value"),
        ("compounds/bf3/", "compounds/bf33/", "gone"),
        ("compounds/nh3/#polarity", "compounds/nh3/#dipoles", "gone"),
        ("compounds/sf4/#angles", "compounds/sulfur-iv-fluoride/#angles", "moved"),
    ],
)
def test_a_fault_put_in_is_the_one_that_is_found(
    reference: Reference, root: Path, tmp_path: Path, right: str, wrong: str, kind: str
) -> None:
    """In whichever protocol has the words, once."""
    for path in (root / "protocols").iterdir():
        text = path.read_text("utf-8")
        if right in text:
            (tmp_path / path.name).write_text(text.replace(right, wrong, 1), "utf-8")
    found = check_paths(reference, [tmp_path]).findings
    assert [finding.kind for finding in found] == [kind]
