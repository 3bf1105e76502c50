"""What the runner tells while it works: one line for the state of things, one for each end."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass

from shapeshelf.calculation.jobs import Job
from shapeshelf.calculation.model import CalculationRecord, Outcome

MINUTE, HOUR = 60, 3600


@dataclass(frozen=True, slots=True)
class Finished:
    """One job at its end: a record, or the reason why there is none."""

    job: Job
    record: CalculationRecord | None
    reason: str = ""


def progress_line(
    done: Sequence[Finished], running: Mapping[str, str], unfinished: Sequence[Job], seconds: float
) -> str:
    """Return the line that stands while jobs run; ``running`` gives the stage of each id."""
    total = len(done) + len(unfinished)
    stages = "; ".join(f"{one}: {stage}" for one, stage in running.items())
    return f"[{len(done)}/{total}] {stages}{_left(done, unfinished, seconds)}"


def end_line(finished: Finished) -> str:
    """Return the line that a finished job leaves."""
    record = finished.record
    if record is None:
        return f"{finished.job.id}: no record: {finished.reason}"
    if record.outcome is not Outcome.MINIMUM:
        return f"{finished.job.id}: {record.method}: {record.outcome.value}: {record.failure}"
    notes = "".join(f"; {warning}" for warning in record.warnings)
    return f"{finished.job.id}: {record.method}, {record.point_group}{notes}"


def summary_line(done: Sequence[Finished], kept: int) -> str:
    """Return the last line of a run."""
    records = [one.record for one in done if one.record is not None]
    minima = sum(record.outcome is Outcome.MINIMUM for record in records)
    parts = [f"{minima} computed", f"{len(records) - minima} without a result"]
    if len(records) < len(done):
        parts.append(f"{len(done) - len(records)} without a record")
    return ", ".join([*parts, f"{kept} kept"])


def _left(done: Sequence[Finished], unfinished: Sequence[Job], seconds: float) -> str:
    """Return the time left, judged from the costs of what is done; nothing before that."""
    spent = sum(one.job.cost for one in done)
    if not spent:
        return ""
    return f"; about {_duration(seconds * sum(job.cost for job in unfinished) / spent)} left"


def _duration(seconds: float) -> str:
    if seconds < MINUTE:
        return "a minute"
    if seconds < HOUR:
        return f"{round(seconds / MINUTE)} min"
    return f"{seconds / HOUR:.1f} h"
