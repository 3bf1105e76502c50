import pytest

from shapeshelf.pages.for_files import link_to_files


@pytest.mark.parametrize(
    ("given", "expected"),
    [
        ('href="../shapes/"', 'href="../shapes/index.html"'),
        ('href="../../compounds/sf4/#angles"', 'href="../../compounds/sf4/index.html#angles"'),
        ('href="compare/?ids=a,b"', 'href="compare/index.html?ids=a,b"'),
        ('action="../lookup/"', 'action="../lookup/index.html"'),
        ('href=".."', 'href="../index.html"'),
        ('href="."', 'href="./index.html"'),
        ('data-to="../../compounds/sf4/"', 'data-to="../../compounds/sf4/index.html"'),
        ('content="0; url=../sf4/"', 'content="0; url=../sf4/index.html"'),
        ('href="data.json"', 'href="data.json"'),
        ('href="#angles"', 'href="#angles"'),
        ('href="https://doi.org/"', 'href="https://doi.org/"'),
        ('href="mailto:a@b/"', 'href="mailto:a@b/"'),
    ],
)
def test_links_to_folders_lead_to_their_files(given: str, expected: str) -> None:
    """What a server would find by itself is written out; all else stays."""
    assert link_to_files(f"<a {given}>") == f"<a {expected}>"
