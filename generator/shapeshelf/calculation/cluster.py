"""The same jobs on a Dask cluster.

Dask gives a job whose worker died to another worker; the records are written where the command
runs, so that the workers share no file system with it.
"""

from collections.abc import Iterator, Sequence

from shapeshelf.calculation.engines import CLUSTER, require_package
from shapeshelf.calculation.jobs import Job
from shapeshelf.calculation.progress import Finished
from shapeshelf.calculation.runner import Staged, run_job
from shapeshelf.errors import CalculationError, ShapeshelfError

CONNECT_SECONDS = 20


def run_on_cluster(jobs: Sequence[Job], address: str, staged: Staged) -> Iterator[Finished]:
    """Yield every job as it ends on the cluster whose scheduler listens at ``address``.

    Raises CalculationError where Dask is not installed or no scheduler answers.
    """
    require_package("distributed", CLUSTER)
    from distributed import Client, as_completed  # an extra: loaded only when asked for

    try:
        client = Client(address, timeout=CONNECT_SECONDS)
    except (OSError, TimeoutError, ValueError) as error:
        raise CalculationError(address, "no scheduler answers there") from error
    with client:
        futures = {client.submit(run_job, job, pure=False): job for job in jobs}
        for job in jobs:
            staged(job, "on the cluster")
        for future in as_completed(list(futures)):
            yield _finished(futures[future], future)


def _finished(job: Job, future: object) -> Finished:
    failure = future.exception()  # type: ignore[attr-defined]
    if failure is None:
        return Finished(job, future.result())  # type: ignore[attr-defined]
    if isinstance(failure, ShapeshelfError):
        return Finished(job, None, str(failure))
    return Finished(job, None, f"{type(failure).__name__} on the cluster")
