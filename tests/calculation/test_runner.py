"""Jobs in processes of their own: what is lost when one of them, or the parent, is killed."""

import multiprocessing
import os
import random
import signal
import subprocess
import sys
import time

from shapeshelf.calculation.jobs import Job
from shapeshelf.calculation.model import Level, Outcome
from shapeshelf.calculation.recipe import calculate
from shapeshelf.calculation.records import read_record, record_text
from shapeshelf.calculation.runner import run_jobs
from shapeshelf.structure.reading import read_smiles

KILLS = 10
SMALL = {
    "ammonia": "N",
    "methane": "C",
    "phosphane": "P",
    "sf4": "FS(F)(F)F",
    "sulfane": "S",
    "water": "O",
}
COMMAND = [sys.executable, "-m", "shapeshelf.cli", "compute", "--basis", "xtb", "--jobs", "2"]


def job(entry_id, smiles):
    return Job(entry_id, entry_id, read_smiles(smiles), Level.XTB, 1.0)


def test_jobs_side_by_side_give_what_one_alone_gives():
    """Two processes, the same records."""
    jobs = [job("water", "O"), job("ammonia", "N")]
    ends = {end.job.id: end.record for end in run_jobs(jobs, 2, lambda one, stage: None)}
    for one in jobs:
        alone = calculate(one.molecule, Level.XTB, lambda stage: None)
        assert record_text(ends[one.id]) == record_text(alone)


def test_a_process_that_dies_takes_its_own_job_only():
    """The others end with their records; the dead one says how it ended."""
    jobs = [job("large", "C" * 12), job("water", "O")]

    def kill_large(one, stage):
        if one.id == "large" and stage == "conformers":
            for child in multiprocessing.active_children():
                os.kill(child.pid, signal.SIGKILL)

    ends = {end.job.id: end for end in run_jobs(jobs, 1, kill_large)}
    assert ends["large"].record is None
    assert ends["large"].reason == "its process ended with exit code -9"
    assert ends["water"].record.outcome is Outcome.MINIMUM


def test_killed_at_random_ten_times_only_whole_records_stand(folder):
    """SIGKILL at any moment leaves records that read back; the last run finishes the rest."""
    root = folder(SMALL)
    moments = random.Random(8)
    command = [*COMMAND, "--catalogue", str(root)]
    for _ in range(KILLS):
        process = subprocess.Popen(
            command, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL, start_new_session=True
        )
        time.sleep(moments.uniform(0.2, 4.0))
        process.kill()
        process.wait()
        for path in (root / "records").glob("*.json"):
            assert read_record(path).outcome is Outcome.MINIMUM
    finished = subprocess.run(command, capture_output=True, text=True, check=True)
    assert {path.stem for path in (root / "records").glob("*.json")} == set(SMALL)
    assert (
        f"{len(SMALL)} kept"
        in subprocess.run(command, capture_output=True, text=True, check=True).stdout
    ), finished.stdout


def test_interrupting_loses_only_what_is_in_flight(folder):
    """Ctrl-C ends with one line and exit status 1; what was written stays."""
    root = folder({**SMALL, "large": "C" * 16})
    process = subprocess.Popen(
        [*COMMAND[:-1], "1", "--catalogue", str(root)],
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        text=True,
    )
    for _ in range(len(SMALL)):
        process.stdout.readline()
    process.send_signal(signal.SIGINT)
    _, said = process.communicate(timeout=60)
    assert (process.returncode, said.strip()) == (1, "stopped")
    assert {path.stem for path in (root / "records").glob("*.json")} == set(SMALL)
    assert not list((root / "records").glob(".*"))
