"""Jobs side by side, each in a process of its own with one thread.

The parent alone writes records, whole or not at all. A process that dies takes its own job with
it and nothing else; interrupting or killing the parent ends the children and loses what is in
flight; the next run takes up what has no record.
"""

import multiprocessing
import os
import signal
import threading
from collections.abc import Callable, Iterator, Sequence
from contextlib import contextmanager
from multiprocessing.connection import Connection, wait
from multiprocessing.context import SpawnProcess
from typing import Any

from shapeshelf.calculation.jobs import Job
from shapeshelf.calculation.model import CalculationRecord
from shapeshelf.calculation.progress import Finished
from shapeshelf.calculation.recipe import calculate
from shapeshelf.errors import ShapeshelfError

Staged = Callable[[Job, str], None]
"""Receives a job and the stage it has come to."""
POLL_SECONDS = 5.0
SURROUNDINGS = {
    "OMP_NUM_THREADS": "1",
    "OPENBLAS_NUM_THREADS": "1",
    "MKL_NUM_THREADS": "1",
    "MALLOC_MMAP_MAX_": "0",
    "MALLOC_TRIM_THRESHOLD_": str(10**11),
    "MALLOC_TOP_PAD_": str(2**28),
}
"""One thread a job; and, where the C library is glibc, memory that is kept instead of given back
and asked for again at every step, which took a quarter of the time."""
STAGE, DONE, FAILED = "stage", "done", "failed"


def run_job(job: Job, told: Callable[[str], None] = lambda stage: None) -> CalculationRecord:
    """Return the record of one job; what any process, here or on a cluster, runs."""
    return calculate(job.molecule, job.level, told)


def run_jobs(jobs: Sequence[Job], side_by_side: int, staged: Staged) -> Iterator[Finished]:
    """Yield every job as it ends, at most ``side_by_side`` at a time."""
    for name, value in SURROUNDINGS.items():
        os.environ.setdefault(name, value)
    waiting = list(jobs)
    running: dict[Connection, tuple[Job, SpawnProcess]] = {}
    try:
        while waiting or running:
            while waiting and len(running) < side_by_side:
                job = waiting.pop(0)
                running.update([_started(job)])
                staged(job, "starting")
            for connection in wait(list(running), POLL_SECONDS):
                assert isinstance(connection, Connection)
                finished = _heard(connection, *running[connection], staged)
                if finished is not None:
                    del running[connection]
                    yield finished
    finally:
        for _, process in running.values():
            process.kill()


def _started(job: Job) -> tuple[Connection, tuple[Job, SpawnProcess]]:
    context = multiprocessing.get_context("spawn")
    here, there = context.Pipe(duplex=False)
    process = context.Process(target=_work, args=(job, there), daemon=True)
    with _undisturbed():
        process.start()
    there.close()
    return here, (job, process)


@contextmanager
def _undisturbed() -> Iterator[None]:
    """Hold an interruption back until a child is whole; the child then never hears of it."""
    if not hasattr(signal, "pthread_sigmask"):
        yield
        return
    before = signal.pthread_sigmask(signal.SIG_BLOCK, {signal.SIGINT})
    try:
        yield
    finally:
        signal.pthread_sigmask(signal.SIG_SETMASK, before)


def _heard(
    connection: Connection, job: Job, process: SpawnProcess, staged: Staged
) -> Finished | None:
    """Take one message of a child; return the end of its job where it is one."""
    try:
        kind, content = connection.recv()
    except EOFError:
        process.join()
        return Finished(job, None, f"its process ended with exit code {process.exitcode}")
    if kind == STAGE:
        staged(job, content)
        return None
    process.join()
    return Finished(job, content) if kind == DONE else Finished(job, None, content)


def _work(job: Job, connection: Connection) -> None:
    """Do one job in a child process."""
    signal.signal(signal.SIGINT, signal.SIG_IGN)
    threading.Thread(target=_end_with_parent, daemon=True).start()

    def say(kind: str, content: Any) -> None:
        connection.send((kind, content))

    try:
        say(DONE, run_job(job, lambda stage: say(STAGE, stage)))
    except ShapeshelfError as error:
        say(FAILED, str(error))


def _end_with_parent() -> None:
    """Leave no child behind a parent that was killed."""
    parent = multiprocessing.parent_process()
    if parent is not None:
        parent.join()
        os._exit(1)
