"""A site is built beside the one that stands, and takes its place when it is whole."""

import shutil
import tempfile
from dataclasses import dataclass
from pathlib import Path

READABLE = 0o755
"""A temporary folder is its owner's alone; a site is for whoever serves it."""


@dataclass(frozen=True, slots=True)
class Staging:
    """The folder a site is built in, and the place it is meant for."""

    folder: Path
    final: Path


def stage(final: Path) -> Staging:
    """Make a folder beside ``final``, on the same file system, to build in."""
    final.parent.mkdir(parents=True, exist_ok=True)
    return Staging(Path(tempfile.mkdtemp(prefix=f".{final.name}-", dir=final.parent)), final)


def discard(staging: Staging) -> None:
    """Remove what was built; the site that stands is left as it is."""
    shutil.rmtree(staging.folder, ignore_errors=True)


def swap(staging: Staging) -> None:
    """Put the new site in the place of the old one, which is put back if that fails."""
    final = staging.final
    aside = Path(tempfile.mkdtemp(prefix=f".{final.name}-old-", dir=final.parent))
    earlier = aside / final.name
    if final.exists():
        final.rename(earlier)
    try:
        staging.folder.chmod(READABLE)
        staging.folder.rename(final)
    except OSError:
        if earlier.exists():
            earlier.rename(final)
        raise
    finally:
        shutil.rmtree(aside, ignore_errors=True)
