"""Releases of a small catalogue, worked out by the real chemistry."""

import json
from dataclasses import replace
from pathlib import Path

import pytest

from shapeshelf.cli import main
from shapeshelf.errors import UsageError
from shapeshelf.linking import standing
from shapeshelf.linking.changes import Reason
from shapeshelf.linking.published import read_released
from shapeshelf.linking.releasing import present_values, release
from shapeshelf.linking.site import standing_of
from shapeshelf.report.checking import report_on_catalogue

SF4 = """\
id: sf4
name: Sulfur tetrafluoride
structure: FS(F)(F)F
measured:
  - {quantity: angle, of: F(ax)-S-F(ax), value: 173.1, unit: degree, source: book}
"""
SOURCES = "book: {title: A book, authors: A. Author, year: 1991, kind: read}\n"


@pytest.fixture
def root(tmp_path: Path) -> Path:
    (tmp_path / "sf4.yml").write_text(SF4)
    (tmp_path / "water.yml").write_text("id: water\nname: Water\nstructure: O\n")
    (tmp_path / "sources.yml").write_text(SOURCES)
    return tmp_path


def present(root: Path):
    return present_values(*report_on_catalogue(root))


def test_a_release_twice_is_the_same_file(root: Path) -> None:
    """And nothing differs from it."""
    release(root)
    first = (root / "released.json").read_bytes()
    release(root)
    assert (root / "released.json").read_bytes() == first
    assert present(root).comparison.values == ()
    assert sorted(path.name for path in root.iterdir()) == [
        "released.json",
        "sf4.yml",
        "sources.yml",
        "water.yml",
    ]


def test_another_measured_value_is_new_until_released(root: Path) -> None:
    """The page of the compound says what it was."""
    release(root)
    (root / "sf4.yml").write_text(SF4.replace("173.1", "172.6"))
    changed = present(root)
    (change,) = changed.comparison.values
    assert change.reason is Reason.MEASUREMENT
    assert standing_of(changed).news == {"sf4": {"angle-f-ax-s-f-ax": "173.1°"}}
    release(root)
    assert standing_of(present(root)).news == {}


def test_another_structure_is_named_as_the_reason(root: Path) -> None:
    release(root)
    (root / "water.yml").write_text("id: water\nname: Water\nstructure: S\n")
    reasons = {change.reason for change in present(root).comparison.values}
    assert reasons == {Reason.STRUCTURE}


def test_an_entry_added_is_not_released_yet(root: Path) -> None:
    release(root)
    (root / "nh3.yml").write_text("id: nh3\nname: Ammonia\nstructure: N\n")
    found = present(root)
    assert found.comparison.added == ("nh3",)
    assert standing_of(found).unreleased == {"nh3"}


def test_check_says_what_was_withdrawn(root: Path, capsys) -> None:
    """And goes on saying it after the next release; the exit status stays 0."""
    release(root)
    (root / "water.yml").unlink()
    for _ in range(2):
        assert main(["check", "--catalogue", str(root)]) == 0
        assert "released.json: water (Water) was published and is withdrawn" in (
            capsys.readouterr().out
        )
        release(root)


def test_a_withdrawn_id_is_not_given_again(root: Path, capsys) -> None:
    """To another structure; the entry that comes back as it was is welcome."""
    before = (root / "water.yml").read_text()
    release(root)
    (root / "water.yml").unlink()
    release(root)
    (root / "water.yml").write_text("id: water\nname: Hydrogen sulfide\nstructure: S\n")
    assert main(["check", "--catalogue", str(root)]) == 1
    assert "water.yml:1: id: water was Water, now withdrawn" in capsys.readouterr().err
    (root / "water.yml").write_text(before)
    assert main(["check", "--catalogue", str(root)]) == 0


@pytest.mark.parametrize(
    ("same_code", "moved", "stands"),
    [(True, 3.0, True), (True, 0.01, True), (False, 3.0, False), (False, 0.01, True)],
)
def test_unchanged_input_never_changes_a_value(
    root: Path, monkeypatch: pytest.MonkeyPatch, same_code: bool, moved: float, stands: bool
) -> None:
    """A package that computes another number moves none that is released (S1, S2)."""
    release(root)
    released = read_released(root)
    assert released is not None
    catalogue, reports = report_on_catalogue(root)
    drifted = tuple(_moved(report, moved) for report in reports)
    if not same_code:
        monkeypatch.setattr(standing, "code_hash", lambda: "another")
    found = present_values(catalogue, drifted)
    water = found.published.compounds["water"].values["angle-h-o-h"]
    assert (water == released.compounds["water"].values["angle-h-o-h"]) is stands
    assert bool(found.drifts) is (same_code and moved > 1)
    assert bool(found.comparison.values) is not stands


def _moved(report, by: float):
    """Return a report as if other packages had made the model's angles wider."""
    centres = tuple(
        replace(
            centre,
            angles=tuple(
                replace(
                    row,
                    degrees=replace(
                        row.degrees,
                        model=row.degrees.model + by,
                        value=row.degrees.value + (by if row.degrees.basis == "model" else 0.0),
                    ),
                )
                for row in centre.angles
            ),
        )
        for centre in report.centres
    )
    return replace(report, centres=centres)


@pytest.mark.parametrize("text", ["", "{}", "[1]", '{"schema": 9}', "nonsense"])
def test_a_release_that_cannot_be_read_is_one_line(root: Path, text: str, capsys) -> None:
    (root / "released.json").write_text(text)
    with pytest.raises(UsageError, match=r"released\.json"):
        present(root)
    assert main(["check", "--catalogue", str(root)]) == 2
    assert len(capsys.readouterr().err.strip().splitlines()) == 1


def test_a_release_with_a_value_cut_short_is_one_line(root: Path) -> None:
    release(root)
    text = (root / "released.json").read_text("utf-8")
    (root / "released.json").write_text(text.replace('"quantity": "dipole",', "", 1), "utf-8")
    with pytest.raises(UsageError, match="dipole is not complete"):
        present(root)


def test_the_command_lists_what_it_changes(root: Path, capsys) -> None:
    assert main(["release", "--catalogue", str(root)]) == 0
    assert "first release" in capsys.readouterr().out
    (root / "sf4.yml").write_text(SF4.replace("173.1", "172.6"))
    assert main(["release", "--catalogue", str(root), "--json"]) == 0
    printed = json.loads(capsys.readouterr().out)
    assert printed["changes"] == [
        "sf4#angle-f-ax-s-f-ax: F(ax)-S-F(ax): 173.1° -> 172.6° (measurement changed)"
    ]
