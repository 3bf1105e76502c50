"""The site shows the records of the catalogue, whether or not the programs are installed."""

import shutil
import subprocess
import sys
from pathlib import Path

ROOT = Path(__file__).parents[2]
PROGRAMS = ("pyscf", "tblite", "dask", "distributed")
BUILD = """
import sys
for name in sys.argv[2:]:
    sys.modules[name] = None  # importing it fails, as where it is not installed
from pathlib import Path
from shapeshelf.plugin import build_site
build_site(Path(sys.argv[1]))
"""


def built(bench: Path, *absent: str) -> dict[str, bytes]:
    """Build in a process of its own, some programs absent; return every file's content."""
    command = [sys.executable, "-c", BUILD, str(bench / "mkdocs.yml"), *absent]
    subprocess.run(command, check=True, capture_output=True)
    site = bench / "site"
    files = sorted(path for path in site.rglob("*") if path.is_file())
    return {path.relative_to(site).as_posix(): path.read_bytes() for path in files}


def test_the_site_is_the_same_without_the_programs(bench: Path) -> None:
    """Byte for byte, with a calculated value on the page either way."""
    records = bench / "compounds" / "records"
    records.mkdir()
    shutil.copy(ROOT / "compounds" / "records" / "h2o.json", records / "water.json")
    without, with_programs = built(bench, *PROGRAMS), built(bench)
    assert without == with_programs
    assert b"PBE0/def2-TZVP" in without["compounds/water/index.html"]
