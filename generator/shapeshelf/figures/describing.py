"""What a figure shows, in words, for those who do not see it."""

from shapeshelf.figures.lettering import plain, point_group
from shapeshelf.figures.numbers import degrees_text
from shapeshelf.report.model import CentreReport, CompoundReport

MOST_CENTRES = 6


def describe(report: CompoundReport) -> str:
    """Return the shape of every distinct centre, its angles with values, its lone pairs."""
    seen: set[int] = set()
    sentences = []
    for centre in report.centres:
        if centre.centre.atom not in seen:
            sentences.append(_centre_sentence(centre))
        seen |= set(centre.equivalent)
    rest = len(sentences) - MOST_CENTRES
    if rest > 0:
        sentences = [*sentences[:MOST_CENTRES], f"And {rest} more kinds of centre."]
    sentences.append(f"Point group {plain(point_group(report.point_group))}.")
    return " ".join(sentences)


def _centre_sentence(one: CentreReport) -> str:
    parts = [f"{one.atom_label}: {one.shape or 'no named shape'}"]
    if len(one.equivalent) > 1:
        parts[0] += f" ({len(one.equivalent)} alike)"
    parts += [f"{row.of} {degrees_text(row)} ({row.degrees.basis.value})" for row in one.angles]
    parts.append(_electrons(one))
    return ", ".join(part for part in parts if part) + "."


def _electrons(one: CentreReport) -> str:
    words = []
    if one.centre.lone_pairs:
        words.append(_counted(one.centre.lone_pairs, "lone pair"))
    if one.centre.single_electrons:
        words.append(_counted(one.centre.single_electrons, "single electron"))
    if one.centre.lone_pairs == 0 and not words:
        words.append("no lone pair")
    return " and ".join(words)


def _counted(count: int, noun: str) -> str:
    names = ("no", "one", "two", "three", "four")
    return f"{names[count] if count < len(names) else count} {noun}{'' if count == 1 else 's'}"
