"""Protocols against the present values: every link to the reference, every number quoted."""

from collections.abc import Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from pathlib import Path

from shapeshelf.errors import UsageError
from shapeshelf.linking.attribution import NamesOf, SectionOf, quotes_in
from shapeshelf.linking.documents.model import BARE, Block, Link
from shapeshelf.linking.documents.opening import document_blocks, document_paths
from shapeshelf.linking.documents.tables import with_column_units
from shapeshelf.linking.judging import judge
from shapeshelf.linking.published import (
    RELEASED_FILE,
    VALUES_FILE,
    Published,
    read_published,
)
from shapeshelf.linking.targets import Target, find_target

SITE, CATALOGUE = "site", "compounds"


@dataclass(frozen=True, slots=True)
class Finding:
    """One thing wrong in a protocol."""

    file: Path
    line: int
    """In DOCX the number of the paragraph."""
    kind: str
    """``gone``, ``moved``, ``value`` or ``unit``."""
    address: str
    """As the document has it."""
    quoted: str
    """The number as the document has it; empty for a finding about the link."""
    message: str

    def __str__(self) -> str:
        what = f"{self.quoted}: " if self.quoted else ""
        return f"{self.file}:{self.line}: {self.kind}: {what}{self.message} [{self.address}]"


@dataclass(frozen=True, slots=True)
class Citation:
    """One link of a document to a compound, whether or not anything is wrong with it."""

    file: Path
    line: int
    compound: str
    anchor: str


@dataclass(frozen=True, slots=True)
class Checked:
    """A document checked."""

    citations: tuple[Citation, ...]
    links: int
    """To the reference, compounds and others."""
    numbers: int
    """Quoted and checked."""
    findings: tuple[Finding, ...]


class Reference:
    """The present values, ready to check documents by."""

    def __init__(self, published: Published, sites: Sequence[str] = ()) -> None:
        """``sites`` are addresses of the site's root beside the configured one."""
        self._published = published
        self._sites = [*([published.site] if published.site else []), *sites]
        formulas = {key: compound.formula for key, compound in published.compounds.items()}
        self._names = NamesOf(_names(published), formulas)

    def check(self, path: Path) -> Checked:
        """Return what one document cites and what is wrong with it.

        Raises UsageError where the file cannot be opened, ShapeshelfError for a DOCX that is none.
        """
        citations: list[Citation] = []
        findings: list[Finding] = []
        links = numbers = 0
        for block in with_column_units(document_blocks(path)):
            targets = self._targets(block)
            links += len(targets)
            citations += _citations(path, targets)
            findings += _link_findings(path, targets)
            count, found = self._number_findings(path, block, targets)
            numbers += count
            findings += found
        findings.sort(key=lambda finding: finding.line)
        return Checked(tuple(citations), links, numbers, tuple(findings))

    def _targets(self, block: Block) -> dict[Link, Target]:
        found = {
            link: find_target(link.address, self._published, self._sites) for link in block.links
        }
        return {link: target for link, target in found.items() if target is not None}

    def _number_findings(
        self, path: Path, block: Block, targets: Mapping[Link, Target]
    ) -> tuple[int, list[Finding]]:
        sound = {link: target for link, target in targets.items() if target.compound is not None}
        sections = SectionOf(
            {link: (target.compound_id, target.quantity) for link, target in sound.items()}
        )
        count, findings = 0, []
        for quote in quotes_in(block, list(sound), self._names, sections):
            count += quote.quoted.quantity is not None
            verdict = judge(quote, sound[quote.link])
            if verdict is not None:
                quoted = " ".join(block.text[quote.quoted.start : quote.quoted.end].split())
                line = block.line_at(quote.quoted.start)
                findings.append(
                    Finding(path, line, verdict.kind, quote.link.address, quoted, verdict.message)
                )
        return count, findings


def check_paths(reference: Reference, paths: Iterable[Path]) -> Checked:
    """Return what all documents at the paths and below them say together."""
    found = [reference.check(path) for given in paths for path in document_paths(given)]
    return Checked(
        citations=tuple(item for one in found for item in one.citations),
        links=sum(one.links for one in found),
        numbers=sum(one.numbers for one in found),
        findings=tuple(item for one in found for item in one.findings),
    )


def present_reference(
    values: Path | None, sites: Sequence[str], folder: Path = Path()
) -> tuple[Reference, tuple[str, ...]]:
    """Return the reference to check by, and notes on how far it can be trusted.

    ``values`` is the ``values.json`` of a built site; left out, that of ``site/`` below
    ``folder``, else what was last released. Raises UsageError where there is neither.
    """
    built, released = folder / SITE / VALUES_FILE, folder / CATALOGUE / RELEASED_FILE
    if values is not None:
        return Reference(read_published(values), sites), ()
    if built.is_file():
        late = _newer_entry(folder / CATALOGUE, built.stat().st_mtime)
        note = f"{late} has changed since the site was built; build again to check by it"
        return Reference(read_published(built), sites), (note,) if late else ()
    if released.is_file():
        note = f"no built site; checking by the release in {released}"
        return Reference(read_published(released), sites), (note,)
    raise UsageError(f"neither {built} nor {released} is there; build the site, or give --values")


def finding_json(finding: Finding) -> dict[str, object]:
    """Return a finding as a script reads it."""
    return {
        "file": str(finding.file),
        "line": finding.line,
        "kind": finding.kind,
        "link": finding.address,
        "quoted": finding.quoted,
        "message": finding.message,
    }


def _newer_entry(root: Path, built: float) -> Path | None:
    """Return an entry that was written after the site was built."""
    entries = (path for path in sorted(root.rglob("*.yml")) if path.stat().st_mtime > built)
    return next(entries, None)


def _citations(path: Path, targets: Mapping[Link, Target]) -> Iterator[Citation]:
    for link, target in targets.items():
        if target.compound_id is not None:
            yield Citation(path, link.line, target.compound_id, target.anchor)


def _link_findings(path: Path, targets: Mapping[Link, Target]) -> Iterator[Finding]:
    for link, target in targets.items():
        if target.fault is not None:
            yield Finding(
                path, link.line, target.fault.kind, link.address, "", target.fault.message
            )


def _names(published: Published) -> dict[str, str]:
    """Return the id of each compound by all it is called, in small letters."""
    names: dict[str, str] = {}
    for compound_id, compound in published.compounds.items():
        for name in (compound.name, compound.formula, *compound.names):
            if BARE not in name and len(name) > 1:
                names.setdefault(name.casefold(), compound_id)
    return names
