import pytest

from shapeshelf.pages.protocols import document_markup


def test_a_document_is_set_with_tables_and_links() -> None:
    """Links to compounds keep their anchors."""
    html = document_markup("# A\n\n| x |\n| - |\n| [SF4](../../compounds/sf4/#angles) |\n")
    assert '<a href="../../compounds/sf4/#angles">SF4</a>' in html
    assert "<table>" in html


@pytest.mark.parametrize(
    "text",
    [
        "<script>alert(1)</script>",
        "a <img src=x onerror=alert(1)> b",
        "<div onclick=alert(1)>\n\nx\n\n</div>",
        "[x](javascript:alert(1))",
        "[x](JaVaScRiPt:alert(1))",
        "[x](data:text/html,<script>alert(1)</script>)",
        "<javascript:alert(1)>",
        "![x](https://elsewhere.example/pixel.png)",
    ],
)
def test_nothing_in_a_document_runs_or_fetches(text: str) -> None:
    """Raw HTML is shown as text; addresses that run a script or fetch from afar are dropped."""
    html = document_markup(text).lower()
    for forbidden in ("<script", "<img src=x", "<div", 'href="java', 'href="data', 'src="http'):
        assert forbidden not in html
