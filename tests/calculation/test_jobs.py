"""What a run plans: which entries, at which level, in which order."""

import pytest

from shapeshelf.calculation.jobs import plan_of
from shapeshelf.calculation.model import Level, Outcome
from shapeshelf.calculation.records import record_path, write_record
from shapeshelf.catalogue.reading import read_catalogue
from shapeshelf.errors import UsageError


def test_cheapest_first(folder):
    """The small ones are done while the large ones wait."""
    root = folder(
        {
            "sf6": "FS(F)(F)(F)(F)F",
            "water": "O",
            "triphenylphosphane": "c1ccc(cc1)P(c1ccccc1)c1ccccc1",
        }
    )
    plan = plan_of(read_catalogue(root), [], None, False)
    assert [(job.id, job.level) for job in plan.jobs] == [
        ("water", Level.DFT),
        ("triphenylphosphane", Level.XTB),
        ("sf6", Level.DFT),
    ]


@pytest.mark.parametrize(
    ("level", "again", "kept"),
    [
        (None, False, ("water",)),
        (Level.DFT, False, ("water",)),
        (Level.XTB, False, ()),
        (None, True, ()),
    ],
)
def test_what_has_a_record_is_kept(folder, record_of, level, again, kept):
    """A record counts at any level unless one is asked for, or everything again."""
    root = folder({"water": "O"})
    write_record(record_path(root, "water"), record_of())
    plan = plan_of(read_catalogue(root), [], level, again)
    assert plan.kept == kept
    assert [job.id for job in plan.jobs] == ([] if kept else ["water"])


def test_a_failure_is_a_result_and_a_stale_record_none(folder, record_of):
    """What failed is not tried again unasked; what changed is."""
    root = folder({"water": "O", "sulfane": "S"})
    write_record(
        record_path(root, "water"), record_of(outcome=Outcome.NO_MINIMUM, failure="80 steps")
    )
    write_record(record_path(root, "sulfane"), record_of("O"))
    plan = plan_of(read_catalogue(root), [], None, False)
    assert (plan.kept, [job.id for job in plan.jobs]) == (("water",), ["sulfane"])


def test_named_entries_only(folder):
    """Each once, however often it is named."""
    root = folder({"water": "O", "sulfane": "S"})
    plan = plan_of(read_catalogue(root), ["sulfane", "sulfane"], None, False)
    assert [job.id for job in plan.jobs] == ["sulfane"]


def test_an_unknown_id_is_wrong_usage(folder):
    """With the nearest id that exists."""
    with pytest.raises(UsageError, match="watr: no entry has this id; did you mean water"):
        plan_of(read_catalogue(folder({"water": "O"})), ["watr"], None, False)


def test_an_entry_that_cannot_be_analysed_is_named(folder):
    """It stops nothing else."""
    root = folder({"argon": "[Ar]", "wrong": "C(C)(C)(C)(C)C", "water": "O"})
    plan = plan_of(read_catalogue(root), [], Level.XTB, False)
    assert "wrong" in dict(plan.refused)
    assert "water" in [job.id for job in plan.jobs]
