"""Which quantum-chemistry programs are installed, and their versions."""

from importlib.metadata import version
from importlib.util import find_spec

from shapeshelf.calculation.model import Level
from shapeshelf.errors import CalculationError

CALCULATED = "shapeshelf[calculated]"
CLUSTER = "shapeshelf[cluster]"
PROGRAMS = {
    Level.DFT: ("pyscf", "tblite"),
    Level.DFT_SMALL: ("pyscf", "tblite"),
    Level.XTB: ("tblite",),
}


def require_engines(level: Level) -> None:
    """Raise CalculationError, naming what to install, where ``level`` lacks a program."""
    for program in PROGRAMS[level]:
        require_package(program, CALCULATED)


def require_package(package: str, extra: str) -> None:
    """Raise CalculationError where ``package`` is not installed; ``extra`` brings it."""
    if find_spec(package) is None:
        raise CalculationError(package, f"not installed; run: pip install '{extra}'")


def engine_versions(level: Level) -> tuple[tuple[str, str], ...]:
    """Return (program, version) of every program that ``level`` uses."""
    return tuple((program, version(program)) for program in PROGRAMS[level])
