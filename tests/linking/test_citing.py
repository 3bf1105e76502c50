"""Thirteen protocols with seeded faults: every fault is found, and nothing else."""

from pathlib import Path

import docx
import pytest
from docx.opc.constants import RELATIONSHIP_TYPE
from docx.oxml import OxmlElement
from docx.oxml.ns import qn

from shapeshelf.linking.citing import Reference

PROTOCOLS = Path(__file__).parents[1] / "data" / "protocols"

SEEDED = {
    "dead-link.md": [
        (5, "gone", ""),
        (6, "gone", ""),
        (8, "gone", ""),
        (10, "gone", ""),
        (12, "gone", ""),
    ],
    "moved-id.md": [
        (3, "moved", ""),
        (3, "moved", ""),
        (4, "moved", ""),
        (6, "moved", ""),
        (6, "value", "0.71 D"),
    ],
    "stale-number.md": [
        (3, "value", "179.0°"),
        (4, "value", "103.8°"),
        (8, "value", "107.8°"),
        (10, "value", "1.295 Å"),
        (12, "value", "0.99 Å"),
        (14, "value", "1.94"),
    ],
    "wrong-unit.md": [
        (3, "unit", "0.632 Å"),
        (5, "unit", "154.5 Å"),
        (7, "unit", "1.545 nm"),
        (9, "unit", "106.7 K"),
        (11, "unit", "1.855 Å"),
    ],
    "rounding.md": [],
    "range.md": [
        (6, "value", "104 and 106°"),
        (8, "value", "1.6–1.7 D"),
    ],
    "two-values.md": [
        (4, "value", "176.5°"),
        (4, "value", "1.600 Å"),
        (5, "value", "101.6°"),
        (7, "value", "106.7°"),
        (8, "value", "1.47 D"),
        (9, "value", "1.85 D"),
    ],
    "leak-check.html": [
        (9, "value", "1.746 Å"),
        (13, "value", "1.74 D"),
        (15, "gone", ""),
        (18, "value", "1269 cm-1"),
    ],
    "gas-cell.rst": [
        (8, "value", "99.9°"),
        (9, "moved", ""),
        (14, "value", "1.84 D"),
        (28, "value", "109.5°"),
    ],
    "notes.txt": [
        (6, "value", "107.9 degrees"),
        (10, "gone", ""),
    ],
    "nothing-wrong.md": [],
    "columns.md": [
        (6, "value", "109.7 °"),
        (8, "value", "1.340 Å"),
        (16, "value", "1.47"),
        (17, "value", "107°"),
    ],
    "two-spellings.md": [
        (4, "value", "96.1°"),
        (6, "value", "1.530 Å"),
        (8, "value", "171.9^{\\circ}"),
        (10, "value", "105.4°"),
    ],
}
DOCX_SEEDED = [
    (2, "value", "179.0°"),
    (3, "moved", ""),
    (7, "value", "1.60 D"),
    (8, "gone", ""),
]


@pytest.fixture
def reference(published) -> Reference:
    return Reference(published)


@pytest.mark.parametrize("name", SEEDED)
def test_every_seeded_fault_is_found_and_nothing_else(reference: Reference, name: str) -> None:
    """Line, kind and number of each, in order of line."""
    assert _found(reference, PROTOCOLS / name) == SEEDED[name]


def test_the_faults_of_a_word_processors_document_are_found(
    reference: Reference, tmp_path: Path
) -> None:
    """Links by relation and by field, runs that split a number, a row of a table."""
    path = tmp_path / "gas-desk.docx"
    _write_docx(path)
    assert _found(reference, path) == DOCX_SEEDED


def test_what_is_copied_from_a_page_is_found_right(reference: Reference, tmp_path: Path) -> None:
    """The three forms that the button beside a value copies, of which none is a fault."""
    address = "https://shapes.example.org/bench/compounds/sf4/#angle-f-ax-s-f-ax"
    text = "Sulfur tetrafluoride, F(ax)-S-F(ax): 173.1° ± 0.5° (measured)"
    forms = {
        "a.md": f"[{text}]({address})\n",
        "a.html": f'<a href="{address}">{text}</a>\n',
        "a.txt": f"{text}, {address}\n",
    }
    for name, form in forms.items():
        path = tmp_path / name
        path.write_text(form, "utf-8")
        checked = reference.check(path)
        assert (checked.links, checked.numbers, checked.findings) == (1, 1, ())
        path.write_text(form.replace("173.1°", "176.1°"), "utf-8")
        assert [finding.quoted for finding in reference.check(path).findings] == ["176.1° ± 0.5°"]


def test_a_site_may_have_other_addresses(published, tmp_path: Path) -> None:
    """An address given by hand counts like the configured one."""
    path = tmp_path / "a.md"
    path.write_text("[SF4](http://old-host/shapes/compounds/none/)\n")
    assert Reference(published).check(path).findings == ()
    (found,) = Reference(published, ["http://old-host/shapes"]).check(path).findings
    assert found.kind == "gone"


def _found(reference: Reference, path: Path) -> list[tuple[int, str, str]]:
    return [(item.line, item.kind, item.quoted) for item in reference.check(path).findings]


def _write_docx(path: Path) -> None:
    document = docx.Document()
    document.add_paragraph("Gas desk")
    first = document.add_paragraph("The axial angle of ")
    _link(document, first, ["sulfur tetra", "fluoride"], "../../compounds/sf4/#angles")
    first.add_run(" is 17")
    first.add_run("9.0°, the equatorial one 101.6°.")
    _link(document, document.add_paragraph(), ["SF4"], "../../compounds/sulfur-iv-fluoride/")
    table = document.add_table(rows=2, cols=2)
    for row, (name, key, moment) in enumerate(
        (("Water", "h2o", "1.85 D"), ("NH3", "nh3", "1.60 D"))
    ):
        paragraph = table.rows[row].cells[0].paragraphs[0]
        _link(document, paragraph, [name], f"https://shapes.example.org/bench/compounds/{key}/")
        table.rows[row].cells[1].text = moment
    _field(document.add_paragraph(), 'HYPERLINK "../../compounds/none/"', "an old sheet")
    _field(document.add_paragraph(), 'HYPERLINK "../../compounds/h2o/" \\l "angles"', "104.5°")
    document.save(path)


def _link(document, paragraph, runs: list[str], address: str) -> None:
    relation = document.part.relate_to(address, RELATIONSHIP_TYPE.HYPERLINK, is_external=True)
    link = OxmlElement("w:hyperlink")
    link.set(qn("r:id"), relation)
    for text in runs:
        link.append(_run("w:t", text))
    paragraph._p.append(link)


def _field(paragraph, code: str, shown: str) -> None:
    parts = [("begin", None), (None, ("w:instrText", code)), ("separate", None)]
    parts += [(None, ("w:t", shown)), ("end", None)]
    for kind, content in parts:
        if content:
            paragraph._p.append(_run(*content))
        else:
            run = OxmlElement("w:r")
            mark = OxmlElement("w:fldChar")
            mark.set(qn("w:fldCharType"), kind)
            run.append(mark)
            paragraph._p.append(run)


def _run(tag: str, text: str):
    run, content = OxmlElement("w:r"), OxmlElement(tag)
    content.text = text
    content.set(qn("xml:space"), "preserve")
    run.append(content)
    return run
