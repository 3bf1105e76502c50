"""Records as files: JSON that diffs line by line, numbers rounded to what is worth printing.

A record is written beside its place and then renamed onto it, so that a process killed at any
moment leaves whole records only. No clock and no host name: the same result is the same file.
"""

import json
import os
import tempfile
from collections.abc import Mapping
from dataclasses import asdict
from pathlib import Path
from typing import Any

from pydantic import TypeAdapter

from shapeshelf.calculation.model import CalculationRecord
from shapeshelf.errors import CalculationError

SCHEMA = 1
FOLDER = "records"
ROUNDED = {
    "coordinates_angstrom": 4,
    "energy_hartree": 6,
    "dipole_debye": 3,
    "wavenumber_per_cm": 1,
    "intensity_km_per_mol": 1,
    "stretching": 2,
    "spin_squared": 3,
    "model_energy": 4,
    "energy_kj_mol": 1,
    "lowest_share": 3,
    "mean_dipole_debye": 3,
    "least_dipole_debye": 3,
    "most_dipole_debye": 3,
}
"""Decimals of each number, by its field."""
NOT_IN_JSON = ("key", "elements", "coordinates_angstrom", "dipole_debye")
RECORD = TypeAdapter(CalculationRecord)


def record_path(catalogue: Path, entry_id: str) -> Path:
    """Return where the record of an entry stands."""
    return catalogue / FOLDER / f"{entry_id}.json"


def write_record(path: Path, record: CalculationRecord) -> None:
    """Write ``record`` to ``path``, whole or not at all."""
    path.parent.mkdir(parents=True, exist_ok=True)
    handle, name = tempfile.mkstemp(prefix=f".{path.stem}-", suffix=".tmp", dir=path.parent)
    try:
        with os.fdopen(handle, "w", encoding="utf-8") as file:
            file.write(record_text(record))
            file.flush()
            os.fsync(file.fileno())
        os.chmod(name, 0o644)
        os.replace(name, path)
    except BaseException:
        Path(name).unlink(missing_ok=True)
        raise


def read_record(path: Path) -> CalculationRecord | None:
    """Return the record at ``path``, ``None`` where there is none.

    Raises CalculationError where the file is no record.
    """
    try:
        text = path.read_text("utf-8")
    except FileNotFoundError:
        return None
    try:
        held = json.loads(text)
        if held.pop("schema") != SCHEMA:
            raise CalculationError(str(path), f"not a record of schema {SCHEMA}; compute it again")
        return RECORD.validate_python(held)
    except (ValueError, KeyError, TypeError, AttributeError) as error:
        raise CalculationError(str(path), "not a record; compute it again") from error


def rounded_record(record: CalculationRecord) -> CalculationRecord:
    """Return the record as a file gives it back, in the digits that are printed."""
    held = json.loads(record_text(record))
    held.pop("schema")
    return RECORD.validate_python(held)


def record_json(record: CalculationRecord) -> dict[str, Any]:
    """Return what scripts may want of a record; the geometry stands among the compound's atoms."""
    held = _rounded(asdict(record))
    return {name: value for name, value in held.items() if name not in NOT_IN_JSON}


def record_text(record: CalculationRecord) -> str:
    """Return the text of a record: one line an atom, a mode or a setting."""
    held = _rounded({"schema": SCHEMA, **asdict(record)})
    lines = [f"  {json.dumps(name)}: {_laid_out(value)}" for name, value in held.items()]
    return "{\n" + ",\n".join(lines) + "\n}\n"


def _rounded(value: Any, digits: int | None = None) -> Any:
    if isinstance(value, Mapping):
        return {name: _rounded(part, ROUNDED.get(name, digits)) for name, part in value.items()}
    if isinstance(value, tuple | list):
        return [_rounded(part, digits) for part in value]
    if isinstance(value, float) and digits is not None:
        return round(value, digits) + 0.0  # no "-0.0"
    return value


def _laid_out(value: Any) -> str:
    """Return a value with the items of a list, and the fields of a mapping, on their own lines."""
    if isinstance(value, dict):
        rows = [f"{json.dumps(k)}: {_line(v)}" for k, v in value.items()]
        return _between("{", rows, "}")
    if isinstance(value, list) and value and isinstance(value[0], list | dict):
        return _between("[", [_line(item) for item in value], "]")
    return _line(value)


def _between(opening: str, rows: list[str], closing: str) -> str:
    return opening + "\n" + ",\n".join(f"    {row}" for row in rows) + "\n  " + closing


def _line(value: Any) -> str:
    return json.dumps(value, ensure_ascii=False)
