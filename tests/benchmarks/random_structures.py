"""Structures drawn at random: what share is analysed, what is refused and why, and the time.

    python tests/benchmarks/random_structures.py [NUMBER] [FIRST]

Draws from the identifiers that the PyPI package ``chemicals`` carries (PubChem), its inorganic
ones all included. Anything but a report or one clear sentence is listed as a crash.
"""

import random
import sys
import time
from collections import Counter
from pathlib import Path

import chemicals
import numpy as np

from shapeshelf.errors import ShapeshelfError
from shapeshelf.report.building import report_on_structure

TABLES = Path(chemicals.__file__).parent / "Identifiers"
WHOLE = ("Inorganic db.tsv", "Cation db.tsv", "Anion db.tsv")
SAMPLED = ("chemical identifiers pubchem small.tsv", "chemical identifiers pubchem large.tsv")
SMILES_COLUMN = 4
NUMBER, SEED = 5000, 20261
SLOW_SECONDS = 3.0

# What the sentences of refusals have in common, in the order they are looked for.
REASONS = (
    "separate parts",
    "single atom",
    "wildcard",
    "beyond curium",
    "no rule gives the shape",
    "at most",
    "electrons",
    "no three-dimensional structure",
    "no arrangement of double bonds",
)


def main() -> None:
    """Run the reports and print shares, times, slow ones and crashes."""
    number = int(sys.argv[1]) if len(sys.argv) > 1 else NUMBER
    first = int(sys.argv[2]) if len(sys.argv) > 2 else 0
    outcomes: Counter[str] = Counter()
    seconds = []
    for smiles in drawn(NUMBER)[first : first + number]:
        started = time.process_time()
        outcome = outcome_of(smiles)
        seconds.append(time.process_time() - started)
        outcomes[outcome] += 1
        if seconds[-1] > SLOW_SECONDS:
            print(f"slow: {seconds[-1]:.1f} s  {smiles}", flush=True)
    for outcome, count in outcomes.most_common():
        print(f"{100 * count / sum(outcomes.values()):6.2f} %  {count:5d}  {outcome}")
    milliseconds = 1000 * np.array(seconds)
    median, high = np.quantile(milliseconds, [0.5, 0.95])
    print(
        f"CPU a structure: median {median:.0f} ms, p95 {high:.0f} ms, {milliseconds.max():.0f} most"
    )


def drawn(number: int) -> list[str]:
    """Return ``number`` SMILES: all of the small tables, the rest at random by a fixed seed."""
    whole = [smiles for name in WHOLE for smiles in smiles_in(name)]
    pool = [smiles for name in SAMPLED for smiles in smiles_in(name)]
    chosen = random.Random(SEED).sample(pool, max(number - len(whole), 0))
    together = whole + chosen
    random.Random(SEED).shuffle(together)
    return together[:number]


def smiles_in(name: str) -> list[str]:
    """Return the SMILES of one table, where it has them."""
    lines = (TABLES / name).read_text(encoding="utf-8").splitlines()
    return [cells[SMILES_COLUMN] for line in lines if (cells := line.split("\t"))[SMILES_COLUMN]]


def outcome_of(smiles: str) -> str:
    """Say how the report of ``smiles`` ended."""
    try:
        report_on_structure(smiles)
    except ShapeshelfError as error:
        reason = next((reason for reason in REASONS if reason in str(error)), str(error))
        return f"refused: {reason}"
    except Exception as error:
        print(f"crash: {error!r}  {smiles}", flush=True)
        return f"crash: {type(error).__name__}"
    return "analysed"


if __name__ == "__main__":
    main()
