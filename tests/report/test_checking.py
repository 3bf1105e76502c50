"""A catalogue worked out: what only chemistry can see is reported like everything else."""

import pytest

from shapeshelf.errors import CatalogueError
from shapeshelf.report.checking import report_on_catalogue

SOURCES = "s:\n  title: A table\n  authors: Nobody\n  year: 2000\n  kind: recalled\n"


def catalogue(tmp_path, **entries):
    (tmp_path / "sources.yml").write_text(SOURCES, encoding="utf-8")
    for name, text in entries.items():
        (tmp_path / f"{name}.yml").write_text(text, encoding="utf-8")
    return tmp_path


WATER = "id: water\nname: Water\nstructure: O\n"


def test_reports_come_in_order_of_id(tmp_path):
    root = catalogue(tmp_path, b=WATER, a="id: ammonia\nname: Ammonia\nstructure: N\n")
    _, reports = report_on_catalogue(root)
    assert [report.id for report in reports] == ["ammonia", "water"]


@pytest.mark.parametrize(
    ("text", "line", "field", "words"),
    [
        ("id: a\nname: A\nstructure: 'C(('\n", 3, "structure", "SMILES"),
        ("id: a\nname: A\nstructure: '[He]'\n", 3, "structure", "single atom"),
        (WATER + "formula: H2S\n", 4, "formula", "disagrees with the structure, which is H2O"),
        (
            WATER + "measured:\n- quantity: angle\n  of: H-S-H\n  value: 104.5\n"
            "  unit: degree\n  source: s\n",
            6,
            "measured[0].of",
            "H-S-H names no angle of this structure; nearest is H-O-H",
        ),
    ],
)
def test_problem_names_file_line_field_and_remedy(tmp_path, text, line, field, words):
    root = catalogue(tmp_path, one=text)
    with pytest.raises(CatalogueError) as caught:
        report_on_catalogue(root)
    (problem,) = caught.value.problems
    assert (problem.file.name, problem.line, problem.field) == ("one.yml", line, field)
    assert words in problem.message


def test_problems_of_text_and_chemistry_come_in_one_run(tmp_path):
    root = catalogue(
        tmp_path, a=WATER + "formula: H2S\n", b="id: b\nname: B\nstructure: N\ncolour: red\n"
    )
    with pytest.raises(CatalogueError) as caught:
        report_on_catalogue(root)
    assert {problem.field for problem in caught.value.problems} == {"formula", "colour"}
