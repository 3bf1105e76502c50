"""Which number of a text belongs to which link.

* B1  A number within the text of a link is quoted from where the link leads.
* B2  A number with a unit in the same sentence or table row as a link is beside it. It belongs
  to the link it is tied to by a word such as "for" or "in" or by an opening bracket; else to the
  last link before it; else to the next one after it.
* B3  It belongs to no link where another compound is spoken of between the two, or where the
  words next to it say that it is another kind of quantity (a temperature, a pore size, a cone
  angle), an ideal one, or a bound.
* B4  An angle beside a link counts where the link leads to angles, or the sentence speaks of an
  angle or names three atoms; a dipole moment where the link leads there, the sentence speaks of
  it, or the number has decimals; wavenumbers never, since bands are quoted that no page gives.
"""

import re
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, replace

from shapeshelf.linking.documents.model import BARE, Block, Link
from shapeshelf.linking.numbers import OTHER, Quoted, quoted_numbers
from shapeshelf.reference.elements import ELEMENTS

_SENTENCE_END = re.compile(r"(?<=[.!?])[\"')\]*_]*\s+(?=[\"'(\[*_]*[A-Z\ufffc])")
_ABBREVIATION = re.compile(
    r"(?:\b(?:ca|cf|e\.g|i\.e|vs|resp|approx|no|nos|fig|figs|ref|refs|eq|al))\.$", re.I
)
_TIES = re.compile(
    r"[\s,]*(?:\(|\[|(?:is\s+)?(?:for|in|of|from|by|at|see|cf\.|according to|taken from|as in)\b)"
    r"[\s(\[]*(?:see|the|our|gaseous|gas-phase|free|solid|liquid|from|page of|entry for)?[\s:]*",
    re.IGNORECASE,
)
_FORMULA = re.compile(r"(?<![\w(-])(?:[A-Z][a-z]?\d*){2,}(?![\w-])")
_SYMBOL = re.compile(r"[A-Z][a-z]?")
_NOT_THIS = re.compile(
    r"\b(?:ideal|textbook|instead|rather|than|above|below|under|over|exceed\w*|least|most|less"
    r"|more|not|never|no|nor|formerly|previously|up to|once|old|older|within)\b|[<>≤≥]",
    re.IGNORECASE,
)
_OTHER_KIND_BEFORE = re.compile(
    r"\b(?:turn\w*|rotat\w*|tilt\w*|rock\w*|inclin\w*|quarter|valve|theta|cone|bite|dihedral"
    r"|torsion\w*|twist\w*|contact|Bragg|flip|pulse|incidence|scattering|phase|sieve\w*|pore\w*"
    r"|mesh|lattice|cell|wavelength|resolution|radius|radii|diameter|cut-?off|distance to"
    r"|hydrogen bonds?|intermolecular|optical|specific|latitude|longitude|steps? of)\b|2θ|\[α\]",
    re.IGNORECASE,
)
_OTHER_KIND_AFTER = re.compile(
    r"\s*(?:[-\s]*(?:molecular\s+)?sieves?|[-\s]*MS\b|[-\s]*(?:NMR|printer|printed|view|drawing"
    r"|pulse|bend|elbow|turn|rotation|cone|pores?|resolution)\b)",
    re.IGNORECASE,
)
_NO_VALUE_BEFORE = re.compile(
    r"(?:\b(?:section|sect|table|fig(?:ure)?|step|eq(?:uation)?|ref|no|nr|version|chapter|page"
    r"|scheme|entry|note|part|protocol|appendix|day|rev(?:ision)?)\b\.?|[§#v])\s*$",
    re.IGNORECASE,
)
_ANGLE_WORDS = re.compile(r"\bangles?\b|\bangular\b", re.IGNORECASE)
_THREE_ATOMS = re.compile(r"\b[A-Z][a-z]?\d*(?:\(\w+\))?(?:[-–‐‑−][A-Z][a-z]?\d*(?:\(\w+\))?){2}")
_DIPOLE_WORDS = re.compile(r"\bdipoles?\b|\bmoments?\b|\bpolar\b|\bpolarity\b", re.IGNORECASE)
_NEAR = 40
"""Characters before a number in which a word is next to it."""


@dataclass(frozen=True, slots=True)
class Quote:
    """A number and the link it is quoted from."""

    link: Link
    quoted: Quoted
    within: bool
    """Whether it stands in the text of the link itself (rule B1)."""
    before: str
    """The words that lead up to it, from the last number, link or sentence on."""
    sentence: str


def quotes_in(
    block: Block, ours: Sequence[Link], names: "NamesOf", sections: "SectionOf"
) -> Iterator[Quote]:
    """Yield the quotes of a block; ``ours`` are its links to the reference.

    ``names`` tells the compounds spoken of in a text, ``sections`` the quantity that a link's
    anchor stands for.
    """
    for start, end in _sentences(block.text):
        links = [link for link in ours if start <= link.start < end]
        if not links:
            continue
        numbers = quoted_numbers(block.text[start:end])
        for quoted in (_moved(q, start) for q in numbers):
            quote = _quote(block, (start, end), links, quoted, numbers, names, sections)
            if quote is not None:
                yield quote


class NamesOf:
    """Finds the compounds that a stretch of text speaks of."""

    def __init__(self, names: Mapping[str, str], formulas: Mapping[str, str]) -> None:
        """Take the compounds' ids by every name, in small letters, and their formulas by id."""
        self._ids = names
        self._formulas = formulas
        words = sorted(map(re.escape, names), key=len, reverse=True)
        self._any = (
            re.compile(rf"(?<![\w-])(?:{'|'.join(words)})(?![\w-])", re.I) if words else None
        )

    def others(self, text: str, own: str | None) -> bool:
        """Tell whether the text speaks of a compound that is not ``own``, a compound's id."""
        found = self._any.finditer(text) if self._any else ()
        if any(self._ids[match.group().casefold()] != own for match in found):
            return True
        formula = self._formulas.get(own or "", "")
        return any(
            match.group() not in formula
            and all(symbol in ELEMENTS for symbol in _SYMBOL.findall(match.group()))
            for match in _FORMULA.finditer(text)
        )


class SectionOf:
    """What each link of a block leads to."""

    def __init__(self, sections: Mapping[Link, tuple[str | None, str | None]]) -> None:
        """Take compound id and quantity of the anchor, by link."""
        self._sections = sections

    def compound(self, link: Link) -> str | None:
        """Return the id of the compound."""
        return self._sections[link][0]

    def quantity(self, link: Link) -> str | None:
        """Return the quantity at the anchor."""
        return self._sections[link][1]


def _sentences(text: str) -> Iterator[tuple[int, int]]:
    start = 0
    for match in _SENTENCE_END.finditer(text):
        if not _ABBREVIATION.search(text[start : match.start()].rstrip("\"')]*_")):
            yield start, match.end()
            start = match.end()
    yield start, len(text)


def _quote(
    block: Block,
    sentence: tuple[int, int],
    links: Sequence[Link],
    quoted: Quoted,
    numbers: Sequence[Quoted],
    names: NamesOf,
    sections: SectionOf,
) -> Quote | None:
    text = block.text
    inside = next((ln for ln in links if ln.start <= quoted.start < ln.end), None)
    if any(ln.start <= quoted.start < ln.end for ln in block.links) and inside is None:
        return None
    before = _lead(text, sentence[0], quoted, numbers)
    words = text[sentence[0] : sentence[1]]
    if inside is not None:
        is_value = not _NO_VALUE_BEFORE.search(text[inside.start : quoted.start])
        return Quote(inside, quoted, True, before, words) if is_value else None
    if quoted.quantity in (None, OTHER, "frequency"):
        return None
    link = _owner(text, links, quoted, numbers, sentence[0])
    between = text[min(link.end, quoted.end) : max(link.start, quoted.start)].rpartition("|")[2]
    near = text[max(sentence[0], quoted.start - _NEAR) : quoted.start]
    speaks = _ANGLE_WORDS.search(words) or _THREE_ATOMS.search(words)
    if (
        names.others(between, sections.compound(link))
        or names.others(_before_link(text, link, quoted, sentence[0]), sections.compound(link))
        or _NOT_THIS.search(_clause(near))
        or _OTHER_KIND_BEFORE.search(_clause(near))
        or _OTHER_KIND_AFTER.match(text, quoted.end)
    ):
        return None
    section = sections.quantity(link)
    if quoted.quantity == "angle" and not speaks and section != "angle":
        return None
    polar = _DIPOLE_WORDS.search(words) or section == "dipole" or quoted.decimals
    if quoted.quantity == "dipole" and not polar:
        return None
    return Quote(link, quoted, False, before, words)


def _owner(
    text: str, links: Sequence[Link], quoted: Quoted, numbers: Sequence[Quoted], start: int
) -> Link:
    """Return the link a number beside links belongs to (rule B2)."""
    earlier = [link for link in links if link.end <= quoted.start]
    later = [link for link in links if link.start >= quoted.end]
    if later and _tied(text, quoted, later[0], numbers, start):
        return later[0]
    return earlier[-1] if earlier else later[0]


def _tied(text: str, quoted: Quoted, link: Link, numbers: Sequence[Quoted], start: int) -> bool:
    """Tell whether only numbers, and then a word that ties, stand between number and link."""
    between = text[quoted.end : link.start]
    for other in reversed(numbers):
        if quoted.end <= other.start + start and other.end + start <= link.start:
            begin, end = other.start + start - quoted.end, other.end + start - quoted.end
            between = between[:begin] + between[end:]
    between = re.sub(r"^(?:[\s,/&]|and\b|or\b)+(?=for|in|of|\(|\[)", " ", between)
    return _TIES.fullmatch(between) is not None


def _before_link(text: str, link: Link, quoted: Quoted, start: int) -> str:
    """Return what stands before a number whose link comes after it: its subject may be there."""
    return text[start : quoted.start] if link.start >= quoted.end else ""


def _lead(text: str, start: int, quoted: Quoted, numbers: Sequence[Quoted]) -> str:
    """Return the words before a number, from the last number on; a label may be among them."""
    units = [
        other.end + start
        for other in numbers
        if other.quantity and other.end + start <= quoted.start
    ]
    begin = max([start, *units])
    return text[begin : quoted.start].replace(BARE, " ")


def _clause(near: str) -> str:
    """Return what belongs to the number's own clause: from the last comma or link on."""
    return re.split(r"[;:|]|,\s|\ufffc|\)", near)[-1]


def _moved(quoted: Quoted, by: int) -> Quoted:
    return replace(quoted, start=quoted.start + by, end=quoted.end + by)
