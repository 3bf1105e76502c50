"""Time: a cold ``shapeshelf assess``, and the CPU a report takes over many small molecules.

    python tests/benchmarks/speed_of_reports.py [NUMBER]

Small means at most twelve atoms besides hydrogen, drawn with a fixed seed from the identifiers
that the PyPI package ``chemicals`` carries (PubChem).
"""

import random
import resource
import subprocess
import sys
import time

import numpy as np
from random_structures import SAMPLED, SEED, smiles_in
from rdkit import Chem

from shapeshelf.errors import ShapeshelfError
from shapeshelf.report.building import report_on_structure

NUMBER = 1000
MOST_HEAVY_ATOMS = 12
TWENTY_ATOMS = "CC(C)CC(=O)OC"
STARTS = 3


def main() -> None:
    """Print both figures."""
    number = int(sys.argv[1]) if len(sys.argv) > 1 else NUMBER
    cpu, wall = zip(*(cold_start(TWENTY_ATOMS) for _ in range(STARTS)), strict=True)
    print(f"assess from cold, 22 atoms: CPU {min(cpu):.2f} s, wall clock {min(wall):.2f} s")
    milliseconds = np.array([1000 * seconds(smiles) for smiles in small(number)])
    median, high = np.quantile(milliseconds, [0.5, 0.95])
    print(
        f"{len(milliseconds)} small molecules: CPU mean {milliseconds.mean():.0f} ms, "
        f"median {median:.0f} ms, p95 {high:.0f} ms, most {milliseconds.max():.0f} ms"
    )


def cold_start(smiles: str) -> tuple[float, float]:
    """Return CPU and wall-clock seconds of one ``shapeshelf assess`` in its own process."""
    before, started = resource.getrusage(resource.RUSAGE_CHILDREN), time.perf_counter()
    command = [sys.executable, "-m", "shapeshelf.cli", "assess", smiles]
    subprocess.run(command, check=True, stdout=subprocess.DEVNULL)
    after, ended = resource.getrusage(resource.RUSAGE_CHILDREN), time.perf_counter()
    used = after.ru_utime + after.ru_stime - before.ru_utime - before.ru_stime
    return used, ended - started


def small(number: int) -> list[str]:
    """Return ``number`` SMILES of small molecules of one part each."""
    pool = [smiles for name in SAMPLED for smiles in smiles_in(name)]
    random.Random(SEED).shuffle(pool)
    found: list[str] = []
    for smiles in pool:
        mol = Chem.MolFromSmiles(smiles) if "." not in smiles else None
        if mol is not None and 2 <= mol.GetNumHeavyAtoms() <= MOST_HEAVY_ATOMS:
            found.append(smiles)
        if len(found) == number:
            break
    return found


def seconds(smiles: str) -> float:
    """Return the CPU seconds of one report, or of its refusal."""
    started = time.process_time()
    try:
        report_on_structure(smiles)
    except ShapeshelfError as error:
        print(f"refused: {smiles}: {error}")
    return time.process_time() - started


if __name__ == "__main__":
    main()
