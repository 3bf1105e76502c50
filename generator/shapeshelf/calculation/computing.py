"""The command ``compute``: plan, run, write each record as it comes."""

import sys
import time
from collections.abc import Iterator, Sequence
from pathlib import Path
from typing import TextIO

from shapeshelf.calculation.cluster import run_on_cluster
from shapeshelf.calculation.engines import require_engines
from shapeshelf.calculation.jobs import Job, Plan, plan_of
from shapeshelf.calculation.model import Level
from shapeshelf.calculation.progress import Finished, end_line, progress_line, summary_line
from shapeshelf.calculation.records import record_path, write_record
from shapeshelf.calculation.runner import run_jobs
from shapeshelf.catalogue.model import Catalogue

CLEAR_LINE = "\r\x1b[K"


def compute(
    catalogue: Catalogue,
    ids: Sequence[str],
    level: Level | None,
    side_by_side: int,
    scheduler: str | None,
    again: bool,
    out: TextIO = sys.stdout,
    show: TextIO = sys.stderr,
) -> bool:
    """Compute and write the records that ``ids`` need; tell whether every job left one.

    Raises UsageError for an unknown id, CalculationError where a program is not installed.
    """
    plan = plan_of(catalogue, ids, level, again)
    for entry_id, reason in plan.refused:
        print(f"{entry_id}: no record: {reason}", file=out)
    if scheduler is None:
        for wanted in {job.level for job in plan.jobs}:
            require_engines(wanted)
    done = _run(catalogue.root, plan, side_by_side, scheduler, out, show)
    print(summary_line(done, len(plan.kept)), file=out)
    return not plan.refused and all(one.record is not None for one in done)


def _run(
    root: Path, plan: Plan, side_by_side: int, scheduler: str | None, out: TextIO, show: TextIO
) -> list[Finished]:
    display = _Display(plan.jobs, show)
    if scheduler is None:
        ends = run_jobs(plan.jobs, side_by_side, display.staged)
    else:
        ends = run_on_cluster(plan.jobs, scheduler, display.staged)
    return list(_written(root, ends, display, out))


def _written(
    root: Path, ends: Iterator[Finished], display: "_Display", out: TextIO
) -> Iterator[Finished]:
    for finished in ends:
        if finished.record is not None:
            write_record(record_path(root, finished.job.id), finished.record)
        display.ended(finished)
        print(end_line(finished), file=out, flush=True)
        yield finished


class _Display:
    """The line of progress on a terminal; nothing where the output goes elsewhere."""

    def __init__(self, jobs: Sequence[Job], show: TextIO) -> None:
        self._unfinished = {job.id: job for job in jobs}
        self._running: dict[str, str] = {}
        self._done: list[Finished] = []
        self._began = time.monotonic()
        self._show = show

    def staged(self, job: Job, stage: str) -> None:
        self._running[job.id] = stage
        self._print()

    def ended(self, finished: Finished) -> None:
        self._running.pop(finished.job.id, None)
        self._unfinished.pop(finished.job.id, None)
        self._done.append(finished)
        if self._show.isatty():
            print(CLEAR_LINE, end="", file=self._show, flush=True)

    def _print(self) -> None:
        if self._show.isatty():
            seconds = time.monotonic() - self._began
            rest = list(self._unfinished.values())
            line = progress_line(self._done, self._running, rest, seconds)
            print(CLEAR_LINE + line, end="", file=self._show, flush=True)
