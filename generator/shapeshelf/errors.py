"""The error tree.

    ShapeshelfError
    ├── CatalogueError      problems in the catalogue, all of one run
    ├── StructureError      a structure that cannot be read
    ├── AnalysisError       a structure that is read but cannot be analysed
    ├── CalculationError    a quantum-chemistry engine that is absent or failed
    └── UsageError          a command called in a way it does not take

Every message is one line a user can act on; the offending thing travels with it.
"""

from dataclasses import dataclass
from pathlib import Path


@dataclass(frozen=True, slots=True, order=True)
class Problem:
    """One thing wrong in a catalogue: where it stands and what would be right."""

    file: Path
    line: int
    field: str
    message: str

    def __str__(self) -> str:
        return f"{self.file}:{self.line}: {self.field}: {self.message}"


class ShapeshelfError(Exception):
    """Anything that Shapeshelf refuses, in one line."""


class CatalogueError(ShapeshelfError):
    """The catalogue has problems; ``problems`` holds all of them, in file order."""

    def __init__(self, problems: tuple[Problem, ...]) -> None:
        self.problems = tuple(sorted(problems))
        super().__init__("\n".join(str(problem) for problem in self.problems))


class StructureError(ShapeshelfError):
    """A structure that cannot be read: ``given`` is the text or file received."""

    def __init__(self, given: str, message: str) -> None:
        self.given = given
        super().__init__(message)


class AnalysisError(ShapeshelfError):
    """A molecule outside what can be analysed: ``subject`` names the molecule or atom."""

    def __init__(self, subject: str, message: str) -> None:
        self.subject = subject
        super().__init__(f"{subject}: {message}")


class CalculationError(ShapeshelfError):
    """A quantum-chemistry engine that is absent or failed on ``subject``."""

    def __init__(self, subject: str, message: str) -> None:
        self.subject = subject
        super().__init__(f"{subject}: {message}")


class UsageError(ShapeshelfError):
    """A command called in a way it does not take."""
