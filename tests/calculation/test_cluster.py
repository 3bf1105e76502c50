"""The same jobs on a Dask cluster; a worker that is killed loses nothing."""

import os
import signal

import pytest

from shapeshelf.calculation.cluster import run_on_cluster
from shapeshelf.calculation.jobs import Job
from shapeshelf.calculation.model import Level, Outcome
from shapeshelf.errors import CalculationError
from shapeshelf.structure.reading import read_smiles

distributed = pytest.importorskip("distributed", reason="the extra 'cluster' is not installed")
SMILES = ("O", "N", "C", "S", "P", "FS(F)(F)F", "FCl(F)F", "CC", "CO", "CN")


# Dask warns of its own sockets while a killed worker is cleared away.
@pytest.mark.filterwarnings("ignore")
def test_one_of_two_workers_killed_mid_run():
    """Every job ends with its record."""
    jobs = [Job(f"job-{k}", s, read_smiles(s), Level.XTB, 1.0) for k, s in enumerate(SMILES)]
    with distributed.LocalCluster(
        n_workers=2, threads_per_worker=1, processes=True, dashboard_address=None
    ) as cluster:
        ends = {}
        for end in run_on_cluster(jobs, cluster.scheduler_address, lambda job, stage: None):
            if not ends:
                worker = next(iter(cluster.workers.values()))
                os.kill(worker.process.pid, signal.SIGKILL)
            ends[end.job.id] = end.record
    assert set(ends) == {job.id for job in jobs}
    assert all(record.outcome is Outcome.MINIMUM for record in ends.values())


@pytest.mark.filterwarnings("ignore")
def test_no_scheduler(monkeypatch):
    """One line that names the address."""
    monkeypatch.setattr("shapeshelf.calculation.cluster.CONNECT_SECONDS", 1)
    with pytest.raises(CalculationError, match=r"tcp://127\.0\.0\.1:9: no scheduler answers"):
        list(run_on_cluster([], "tcp://127.0.0.1:9", lambda job, stage: None))
