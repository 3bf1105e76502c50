"""Which number of a text belongs to which link.

* B1  A number within the text of a link is quoted from where the link leads.
* B2  A number with a unit in the same sentence or table row as a link is beside it. It belongs
  to the link it is tied to by a word such as "for" or "in" or by an opening bracket; else to the
  last link before it; else to the next one after it.
* B3  It belongs to no link where another compound is spoken of between the two, or where the
  words next to it say that it is another kind of quantity (a temperature, a pore size, a cone
  angle), an ideal one, or a bound.
* B4  An angle beside a link counts where the link leads to angles, the sentence speaks of an
  angle or names three atoms, or it has a cell of a table to itself; a dipole moment where the link
  leads there, the sentence speaks of it, or the number has decimals or a cell to itself;
  wavenumbers never, since bands are quoted that no page gives.
* B5  As many numbers of a kind as links, all of them before or all after the links, belong to the
  links in their order.
"""

import re
from bisect import bisect
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, replace

from shapeshelf.linking import words
from shapeshelf.linking.documents.model import BARE, Block, Link
from shapeshelf.linking.numbers import OTHER, Quoted, quoted_numbers
from shapeshelf.reference.elements import ELEMENTS


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
    about: bool
    """Whether the text says that the number is a rough one."""


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
        numbers = [_moved(number, start) for number in quoted_numbers(block.text[start:end])]
        sentence = _Sentence(block, start, end, links, numbers)
        for quoted in numbers:
            quote = _within(sentence, quoted) or _beside(sentence, quoted, names, sections)
            if quote is not None:
                yield quote


@dataclass(frozen=True, slots=True)
class _Sentence:
    """A stretch of a block with its links to the reference and its numbers, by offsets in it."""

    block: Block
    start: int
    end: int
    links: Sequence[Link]
    numbers: Sequence[Quoted]

    @property
    def said(self) -> str:
        return self.block.text[self.start : self.end]


class NamesOf:
    """Finds the compounds that a stretch of text speaks of."""

    def __init__(self, names: Mapping[str, str], formulas: Mapping[str, str]) -> None:
        """Take the compounds' ids by every name, in small letters, and their formulas by id."""
        self._ids = names
        self._formulas = formulas
        self._longest = max(map(len, names), default=0)

    def others(self, text: str, own: str | None) -> bool:
        """Tell whether the text speaks of a compound that is not ``own``, a compound's id."""
        if any(self._ids[name] != own for name in self._spoken_of(text.casefold())):
            return True
        formula = self._formulas.get(own or "", "")
        return any(
            match.group() not in formula
            and all(symbol in ELEMENTS for symbol in words.SYMBOL.findall(match.group()))
            for match in words.FORMULA.finditer(text)
        )

    def _spoken_of(self, text: str) -> Iterator[str]:
        """Yield every name in the text that begins and ends where a word does."""
        starts = [match.start() for match in words.WORD_START.finditer(text)]
        ends = [match.start() for match in words.WORD_END.finditer(text)]
        for start in starts:
            first, last = bisect(ends, start), bisect(ends, start + self._longest)
            for end in ends[first:last]:
                if text[start:end] in self._ids:
                    yield text[start:end]


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
    for match in words.SENTENCE_END.finditer(text):
        if not words.ABBREVIATION.search(text[start : match.start()].rstrip("\"')]*_")):
            yield start, match.end()
            start = match.end()
    yield start, len(text)


def _within(sentence: _Sentence, quoted: Quoted) -> Quote | None:
    """Return the quote of a number in the text of a link (rule B1)."""
    inside = (link for link in sentence.links if link.start <= quoted.start < link.end)
    link = next(inside, None)
    if link is None:
        return None
    lead = sentence.block.text[link.start : quoted.start]
    if words.NO_VALUE_BEFORE.search(lead) or words.BOUND_BEFORE.search(lead):
        return None
    return _quote(sentence, link, quoted, within=True)


def _beside(
    sentence: _Sentence, quoted: Quoted, names: NamesOf, sections: SectionOf
) -> Quote | None:
    """Return the quote of a number beside a link (rules B2 to B5)."""
    in_some_link = any(link.start <= quoted.start < link.end for link in sentence.block.links)
    if in_some_link or quoted.quantity in (None, OTHER, "frequency"):
        return None
    link = _owner(sentence, quoted)
    if link is None or max(quoted.start - link.end, link.start - quoted.end) > words.FAR:
        return None
    if _speaks_of_another(sentence, link, quoted, names, sections.compound(link)):
        return None
    if _is_another_kind(sentence, link, quoted):
        return None
    if not _counts(sentence, quoted, sections.quantity(link)):
        return None
    return _quote(sentence, link, quoted, within=False)


def _quote(sentence: _Sentence, link: Link, quoted: Quoted, within: bool) -> Quote:
    lead = sentence.block.text[sentence.start : quoted.start]
    about = words.ABOUT.search(lead) is not None
    return Quote(link, quoted, within, _lead(sentence, quoted), sentence.said, about)


def _speaks_of_another(
    sentence: _Sentence, link: Link, quoted: Quoted, names: NamesOf, own: str | None
) -> bool:
    """Tell whether another compound is spoken of between number and link (rule B3)."""
    between = _between(sentence, link, quoted)
    # Where the link comes after the number, the number's subject may stand before both.
    before = sentence.block.text[sentence.start : quoted.start] if link.start >= quoted.end else ""
    return names.others(between, own) or names.others(before, own)


def _is_another_kind(sentence: _Sentence, link: Link, quoted: Quoted) -> bool:
    """Tell whether the words next to a number say that it is no value of the page (rule B3)."""
    text = sentence.block.text
    near = _clause(text[max(sentence.start, quoted.start - words.NEAR) : quoted.start])
    return bool(
        words.NOT_THIS.search(near)
        or words.OTHER_KIND_BEFORE.search(near)
        or words.OTHER_KIND_AFTER.match(text, quoted.end)
        or (link.start >= quoted.end and words.CONTRAST.search(_between(sentence, link, quoted)))
    )


def _counts(sentence: _Sentence, quoted: Quoted, section: str | None) -> bool:
    """Tell whether a number beside a link is meant as one of its values (rule B4)."""
    if quoted.quantity == section or _fills_cell(sentence.block.text, quoted):
        return True
    if quoted.quantity == "angle":
        return bool(
            words.ANGLE_WORDS.search(sentence.said) or words.THREE_ATOMS.search(sentence.said)
        )
    if quoted.quantity == "dipole":
        return bool(quoted.decimals or words.DIPOLE_WORDS.search(sentence.said))
    return True


def _between(sentence: _Sentence, link: Link, quoted: Quoted) -> str:
    """Return the text between link and number, other links left out; in a table, of one cell."""
    text = sentence.block.text
    for other in sentence.links:
        text = text[: other.start] + " " * (other.end - other.start) + text[other.end :]
    return text[min(link.end, quoted.end) : max(link.start, quoted.start)].rpartition("|")[2]


def _fills_cell(text: str, quoted: Quoted) -> bool:
    """Tell whether a number has a cell of a table for itself."""
    before, after = text[: quoted.start].rstrip(" *~≈"), text[quoted.end :].lstrip(" *")
    return before.endswith("|") and (not after or after.startswith("|"))


def _owner(sentence: _Sentence, quoted: Quoted) -> Link | None:
    """Return the link a number beside links belongs to (rules B2 and B5), if it is beside any."""
    links = sentence.links
    alike = [one.start for one in sentence.numbers if one.quantity == quoted.quantity]
    paired = len(links) == len(alike) > 1
    if paired and (links[-1].end <= min(alike) or max(alike) < links[0].start):
        return links[alike.index(quoted.start)]
    earlier = [link for link in links if link.end <= quoted.start]
    later = [link for link in links if link.start >= quoted.end]
    if later and _tied(sentence, quoted, later[0]):
        return later[0]
    return next(iter((*earlier[-1:], *later)), None)


def _tied(sentence: _Sentence, quoted: Quoted, link: Link) -> bool:
    """Tell whether only numbers, and then a word that ties, stand between number and link."""
    between = sentence.block.text[quoted.end : link.start]
    for other in reversed(sentence.numbers):
        if quoted.end <= other.start and other.end <= link.start:
            between = between[: other.start - quoted.end] + between[other.end - quoted.end :]
    between = re.sub(r"^(?:[\s,/&]|and\b|or\b)+(?=for|in|of|\(|\[)", " ", between)
    return words.TIES.fullmatch(between) is not None


def _lead(sentence: _Sentence, quoted: Quoted) -> str:
    """Return the words before a number, from the last value on; a label may be among them."""
    ends = [one.end for one in sentence.numbers if one.quantity and one.end <= quoted.start]
    begin = max([sentence.start, *ends])
    return sentence.block.text[begin : quoted.start].replace(BARE, " ")


def _clause(near: str) -> str:
    """Return what belongs to the number's own clause: from the last comma or link on."""
    return re.split(r"[;:|]|,\s|\ufffc|\)", near)[-1]


def _moved(quoted: Quoted, by: int) -> Quoted:
    return replace(quoted, start=quoted.start + by, end=quoted.end + by)
