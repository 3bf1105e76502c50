"""Writing the release: the present values become the published ones."""

import os
import tempfile
from dataclasses import dataclass
from pathlib import Path

from shapeshelf.catalogue.model import Catalogue
from shapeshelf.catalogue.problems import problem_at
from shapeshelf.errors import CatalogueError
from shapeshelf.linking.changes import Comparison, compare, withdrawn_compounds
from shapeshelf.linking.published import (
    RELEASED_FILE,
    Published,
    read_released,
    write_published,
)
from shapeshelf.linking.publishing import published_values, structure_hash
from shapeshelf.linking.standing import Drift, let_stand
from shapeshelf.report.checking import report_on_catalogue
from shapeshelf.report.model import CompoundReport


@dataclass(frozen=True, slots=True)
class Present:
    """A catalogue worked out and held against its last release."""

    catalogue: Catalogue
    reports: tuple[CompoundReport, ...]
    """With released model values standing where they should."""
    published: Published
    comparison: Comparison
    drifts: tuple[Drift, ...]
    released: bool
    """Whether there is a release to compare with."""


def present_values(
    catalogue: Catalogue, reports: tuple[CompoundReport, ...], site: str | None = None
) -> Present:
    """Return the present values of a catalogue beside its last release.

    ``site`` is the address of the site's root. Raises UsageError where ``released.json`` is
    there and cannot be read, CatalogueError where an entry takes the id of a withdrawn one.
    """
    released = read_released(catalogue.root)
    _refuse_reused_ids(catalogue, released)
    standing, drifts = let_stand(reports, released)
    gone = withdrawn_compounds(released, catalogue_ids(catalogue))
    published = published_values(catalogue, standing, site, gone)
    comparison = compare(released, published)
    return Present(catalogue, standing, published, comparison, drifts, released is not None)


def catalogue_ids(catalogue: Catalogue) -> frozenset[str]:
    """Return the ids and the earlier ids of all entries."""
    return frozenset(one for entry in catalogue.entries for one in (entry.id, *entry.formerly))


def _refuse_reused_ids(catalogue: Catalogue, released: Published | None) -> None:
    """Raise CatalogueError where a withdrawn id is given to another structure."""
    withdrawn = released.withdrawn if released else {}
    problems = [
        problem_at(
            entry,
            "id",
            f"{entry.id} was {withdrawn[entry.id].name}, now withdrawn; an id is never given again",
        )
        for entry in catalogue.entries
        if entry.id in withdrawn and structure_hash(entry) != withdrawn[entry.id].structure
    ]
    if problems:
        raise CatalogueError(tuple(problems))


def release(root: Path) -> Present:
    """Write ``released.json`` below ``root`` and return what it changed.

    Raises CatalogueError with every problem of the catalogue; then nothing is written.
    """
    catalogue, reports = report_on_catalogue(root)
    present = present_values(catalogue, reports)
    _write_whole(root / RELEASED_FILE, write_published(present.published, indent=1))
    return present


def _write_whole(path: Path, text: str) -> None:
    """Write a file that is either the old one or the new one, whatever happens between."""
    handle, name = tempfile.mkstemp(prefix=f".{path.name}-", dir=path.parent)
    try:
        with os.fdopen(handle, "w", encoding="utf-8") as file:
            file.write(text)
        Path(name).chmod(0o644)
        Path(name).replace(path)
    except OSError:
        Path(name).unlink(missing_ok=True)
        raise
