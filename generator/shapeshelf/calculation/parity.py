"""Measured values beside what the model, GFN2-xTB and PBE0 say: the rows of ``parity.csv``.

The file is written by ``tests/benchmarks/accuracy_of_methods.py`` and says at its head where the
measured values come from.
"""

import csv
from dataclasses import dataclass
from importlib.resources import files

TABLE = "parity.csv"


@dataclass(frozen=True, slots=True)
class ParityPoint:
    """One measured value and the methods that have a value for it."""

    quantity: str
    """``angle`` in degrees or ``dipole`` in debye."""
    name: str
    smiles: str
    of: str
    """``F-S-F``; empty for a dipole moment."""
    measured: float
    model: float | None
    xtb: float | None
    dft: float | None
    atoms: int
    source: str
    counts: bool
    """False where the measured value is not one of a free molecule: shown, but in no average."""


def parity_points() -> tuple[ParityPoint, ...]:
    """Return every row, in the order of the table."""
    text = (files("shapeshelf.calculation") / TABLE).read_text("utf-8")
    lines = [line for line in text.splitlines() if not line.startswith("#")]
    return tuple(_point(row) for row in csv.DictReader(lines))


def _point(row: dict[str, str]) -> ParityPoint:
    return ParityPoint(
        quantity=row["quantity"],
        name=row["name"],
        smiles=row["smiles"],
        of=row["of"],
        measured=float(row["measured"]),
        model=_number(row["model"]),
        xtb=_number(row["xtb"]),
        dft=_number(row["dft"]),
        atoms=int(row["atoms"]),
        source=row["source"],
        counts=row["counts"] == "yes",
    )


def _number(text: str) -> float | None:
    return float(text) if text else None
