"""The lines of a run in words."""

import pytest

from shapeshelf.calculation.jobs import Job
from shapeshelf.calculation.model import Level, Outcome
from shapeshelf.calculation.progress import Finished, end_line, progress_line, summary_line
from shapeshelf.structure.reading import read_smiles


def job(entry_id, cost=1.0):
    return Job(entry_id, entry_id.upper(), read_smiles("O"), Level.DFT, cost)


def test_progress_names_compound_stage_and_time_left(record_of):
    """One job of cost 1 took a minute: the two left, of cost 3 and 6, take nine."""
    done = [Finished(job("h2o"), record_of())]
    line = progress_line(done, {"sf4": "vibrations"}, [job("sf4", 3.0), job("sf6", 6.0)], 60.0)
    assert line == "[1/3] sf4: vibrations; about 9 min left"


def test_no_time_left_before_anything_is_done():
    """There is nothing to judge from."""
    assert progress_line([], {"sf4": "starting"}, [job("sf4")], 5.0) == "[0/1] sf4: starting"


@pytest.mark.parametrize(("cost", "words"), [(0.1, "a minute"), (30.0, "30 min"), (150.0, "2.5 h")])
def test_times_in_words(record_of, cost, words):
    """Minutes, or hours with a decimal."""
    line = progress_line([Finished(job("h2o"), record_of())], {}, [job("x", cost)], 60.0)
    assert line.endswith(f"about {words} left")


def test_ends(record_of):
    """A result, a failure, and a job that left nothing."""
    failed = record_of(outcome=Outcome.NOT_CONVERGED, failure="PBE0 after 120 cycles")
    ends = [
        Finished(job("a"), record_of(warnings=("imaginary modes followed downhill: 1",))),
        Finished(job("b"), failed),
        Finished(job("c"), None, "its process ended with exit code -9"),
    ]
    assert [end_line(end) for end in ends] == [
        "a: PBE0/def2-TZVP, C2v; imaginary modes followed downhill: 1",
        "b: PBE0/def2-TZVP: self-consistent field not converged: PBE0 after 120 cycles",
        "c: no record: its process ended with exit code -9",
    ]
    assert summary_line(ends, 4) == "1 computed, 1 without a result, 1 without a record, 4 kept"
