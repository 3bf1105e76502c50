"""When each entry was last changed, as the catalogue's own version control tells it."""

import subprocess
from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path

PATIENCE_SECONDS = 20


@dataclass(frozen=True, slots=True)
class Change:
    """The last change of one file."""

    date: str
    """ISO 8601, the day of the commit."""
    commit: str
    """Abbreviated."""


def last_changes(root: Path) -> Mapping[Path, Change]:
    """Return the last change of every file below ``root``; empty outside version control.

    One call for the whole catalogue. An unversioned catalogue is a fair choice, so the absence
    of git, of a repository or of any commit is no error.
    """
    try:
        top = _git(root, "rev-parse", "--show-toplevel").strip()
        log = _git(root, "log", "--format=%x00%cs %h", "--name-only", "--no-renames", "--", ".")
    except (OSError, subprocess.SubprocessError):
        return {}
    return _read_log(Path(top), log)


def _read_log(top: Path, log: str) -> dict[Path, Change]:
    changes: dict[Path, Change] = {}
    for block in log.split("\0")[1:]:
        head, *names = block.splitlines()
        date, commit = head.split()
        for name in filter(None, names):
            changes.setdefault(top / name, Change(date, commit))
    return changes


def _git(root: Path, *arguments: str) -> str:
    return subprocess.run(
        ["git", "-c", "core.quotepath=off", "-C", str(root), *arguments],
        check=True,
        capture_output=True,
        text=True,
        timeout=PATIENCE_SECONDS,
    ).stdout
