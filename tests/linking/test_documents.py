"""Documents that are not what they seem, and the start of the command."""

import json
import subprocess
import sys
import zipfile
from pathlib import Path

import pytest

from shapeshelf.cli import main
from shapeshelf.errors import ShapeshelfError, UsageError
from shapeshelf.linking.citing import Reference, check_paths
from shapeshelf.linking.documents.opening import document_blocks, document_paths
from shapeshelf.linking.published import write_published

HEAD = '<?xml version="1.0"?>'
ENTITIES = f'{HEAD}<!DOCTYPE x [<!ENTITY a "aaaaaaaaaa"><!ENTITY b "&a;&a;&a;">]><x>&b;</x>'
HEAVY = ("rdkit", "numpy", "matplotlib", "mkdocs", "pydantic", "yaml", "scipy", "jinja2")


@pytest.mark.parametrize(
    "parts",
    [
        None,
        {"other.xml": "<x/>"},
        {"word/document.xml": "<x"},
        {"word/document.xml": ENTITIES},
        {"word/document.xml": ENTITIES.encode("utf-16")},
    ],
)
def test_a_docx_that_is_none_is_refused_in_one_line(tmp_path: Path, parts) -> None:
    """No zip, no document, broken XML, declared entities in either encoding."""
    path = tmp_path / "x.docx"
    path.write_bytes(b"not a zip")
    if parts is not None:
        with zipfile.ZipFile(path, "w") as archive:
            for name, content in parts.items():
                archive.writestr(name, content)
    with pytest.raises(ShapeshelfError, match=r"x\.docx: ") as caught:
        document_blocks(path)
    assert "\n" not in str(caught.value)


def test_a_docx_that_unpacks_without_end_is_refused(tmp_path: Path) -> None:
    path = tmp_path / "x.docx"
    with zipfile.ZipFile(path, "w", zipfile.ZIP_DEFLATED) as archive:
        archive.writestr("word/document.xml", HEAD + "<x>" + " " * (51 * 1024 * 1024) + "</x>")
    with pytest.raises(ShapeshelfError, match="larger than a protocol can be"):
        document_blocks(path)


@pytest.mark.parametrize("name", ["a.md", "a.html", "a.rst", "a.txt", "a"])
def test_bytes_that_are_no_text_are_read_all_the_same(tmp_path: Path, name: str) -> None:
    """A link next to them is still found."""
    path = tmp_path / name
    path.write_bytes(b"\xff\xfe\x00 [x](../../compounds/none/) <a href='../compounds/none/'>x</a>\n"
                     b"`x <../compounds/none/>`_ ../compounds/none/\n")  # fmt: skip
    assert any(
        link.address.endswith("compounds/none/") for b in document_blocks(path) for link in b.links
    )


def test_a_marked_section_does_not_stop_the_reader(tmp_path: Path) -> None:
    path = tmp_path / "a.html"
    path.write_text("<![x[_a <a href='../compounds/none/'>x</a>", "utf-8")
    assert [link.address for b in document_blocks(path) for link in b.links] == [
        "../compounds/none/"
    ]


def test_a_folder_is_searched_for_documents(tmp_path: Path, published) -> None:
    """Hidden files and folders, and what is no document, are left out."""
    for name in ("b.md", "a/c.rst", ".git/d.md", "e.png", "~$f.docx"):
        (tmp_path / name).parent.mkdir(exist_ok=True)
        (tmp_path / name).write_text("[x](../compounds/none/)\n")
    found = [path.relative_to(tmp_path).as_posix() for path in document_paths(tmp_path)]
    assert found == ["b.md", "a/c.rst"]
    assert len(check_paths(Reference(published), [tmp_path]).findings) == 1
    with pytest.raises(UsageError, match="no such file"):
        document_paths(tmp_path / "nowhere")


def test_the_command_prints_findings_and_exits_one(tmp_path: Path, published, capsys) -> None:
    """One line each, or one JSON object; 0 where all is well."""
    values, good, bad = tmp_path / "values.json", tmp_path / "good.md", tmp_path / "bad.md"
    values.write_text(write_published(published), "utf-8")
    good.write_text("[173.1°](../compounds/sf4/#angles)\n", "utf-8")
    bad.write_text("\n[171.1°](../compounds/sf4/#angle-f-ax-s-f-ax)\n", "utf-8")
    assert main(["cited", str(good), "--values", str(values)]) == 0
    assert capsys.readouterr().out == ""
    assert main(["cited", str(good), str(bad), "--values", str(values)]) == 1
    assert capsys.readouterr().out.startswith(f"{bad}:2: value: 171.1°: the page has F(ax)-S-F(ax)")
    assert main(["cited", str(bad), "--values", str(values), "--json"]) == 1
    printed = json.loads(capsys.readouterr().out)
    assert (printed["links"], printed["numbers"]) == (1, 1)
    assert printed["findings"][0] | {"file": "", "message": ""} == {
        "file": "",
        "line": 2,
        "kind": "value",
        "link": "../compounds/sf4/#angle-f-ax-s-f-ax",
        "quoted": "171.1°",
        "message": "",
    }


def test_without_values_the_command_says_what_to_do(tmp_path: Path, monkeypatch, capsys) -> None:
    monkeypatch.chdir(tmp_path)
    (tmp_path / "a.md").write_text("x\n")
    assert main(["cited", "a.md"]) == 2
    assert "build the site, or give --values" in capsys.readouterr().err


def test_the_command_loads_nothing_heavy(tmp_path: Path, published) -> None:
    """So that a pre-commit hook starts at once."""
    (tmp_path / "values.json").write_text(write_published(published), "utf-8")
    (tmp_path / "a.md").write_text("[x](../compounds/sf4/)\n")
    script = (
        "import sys; from shapeshelf.cli import main; "
        "status = main(['cited', 'a.md', '--values', 'values.json']); "
        f"print(status, [name for name in {HEAVY!r} if name in sys.modules])"
    )
    run = subprocess.run(
        [sys.executable, "-c", script], cwd=tmp_path, capture_output=True, text=True, check=True
    )
    assert run.stdout.strip() == "0 []"
