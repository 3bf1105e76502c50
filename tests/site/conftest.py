"""Sites built for the tests, and the browser that opens them."""

import functools
import http.server
import json
import os
import shutil
import subprocess
import threading
from collections.abc import Iterator
from pathlib import Path

import pytest
from mkdocs.commands.build import build
from mkdocs.config import load_config

from shapeshelf.cli import main

ROOT = Path(__file__).parents[2]
MODULES = ROOT / "site_templates" / "theme" / "js"
BROWSERS = ("chromium", "chromium-browser", "google-chrome", "chrome")
FLAGS = (
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
)

CONFIG = """\
site_name: Three on a bench
docs_dir: compounds
theme:
  name: material
  font: false
plugins:
  - shapeshelf
"""

ENTRIES = {
    "sf4.yml": """\
id: sf4
formerly: [sulfur-four]
name: Sulfur tetrafluoride
also: [sulfur(IV) fluoride]
structure: FS(F)(F)F
cas: 7783-60-0
code: TB-017
hazards: [H330]
used-in: [p1]
start-here: The see-saw.
measured:
  - {quantity: angle, of: F(ax)-S-F(ax), value: 173.1, unit: degree, source: book}
""",
    "water.yml": "id: water\nname: Water\nstructure: O\ncas: 7732-18-5\n",
    "ions/nitrate.yml": "id: nitrate\nname: Nitrate ion\nstructure: '[O-][N+](=O)[O-]'\n",
    "sources.yml": """\
book:
  title: A handbook
  authors: A. Author
  year: 1991
  kind: recalled
""",
    "protocols.yml": "p1:\n  title: Gas cell\n  file: protocols/p1.md\n",
    "protocols/p1.md": "# Gas cell\n\nThe [see-saw](../../compounds/sf4/#angles).\n",
}


@pytest.fixture
def bench(tmp_path: Path) -> Path:
    """A folder with only mkdocs.yml and compounds/, as a group would start one."""
    return write_bench(tmp_path)


@pytest.fixture(scope="session")
def three(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """The built site of the three compounds."""
    folder = write_bench(tmp_path_factory.mktemp("three"))
    build_site(folder)
    return folder / "site"


@pytest.fixture(scope="session")
def demo(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """The built demo site."""
    site = tmp_path_factory.mktemp("demo") / "site"
    build_site(ROOT, site)
    return site


@pytest.fixture
def rebuilt():
    """Build a bench's site again; an mkdocs Abort comes through."""
    return build_site


@pytest.fixture(scope="session")
def chromium() -> str:
    """The path of a Chromium; without one the browser tests are left out, but never in CI."""
    found = next((path for name in BROWSERS if (path := shutil.which(name))), None)
    if found is None and os.environ.get("CI") == "true":
        pytest.fail("no Chromium on the path: the browser tests cannot run")
    if found is None:
        pytest.skip("no Chromium on the path")
    return found


@pytest.fixture(scope="session")
def browser(chromium: str) -> Iterator[object]:
    sync_api = pytest.importorskip("playwright.sync_api")
    with sync_api.sync_playwright() as playwright:
        launched = playwright.chromium.launch(executable_path=chromium, args=list(FLAGS))
        yield launched
        launched.close()


@pytest.fixture(scope="session")
def in_node(tmp_path_factory: pytest.TempPathFactory):
    """Run a piece of script that may import the site's modules; returns what it ``tell``s.

    Without Node the tests of modules are left out, but never in CI.
    """
    node = shutil.which("node")
    if node is None and os.environ.get("CI") == "true":
        pytest.fail("no node on the path: the modules cannot be tested")
    if node is None:
        pytest.skip("no node on the path")
    folder = tmp_path_factory.mktemp("modules")
    shutil.copytree(MODULES, folder / "js")
    (folder / "package.json").write_text('{"type": "module"}')

    def run(script: str, given: object = None) -> object:
        text = (
            'import { readFileSync } from "node:fs";'
            'const given = JSON.parse(readFileSync(0, "utf8"));'
            "const tell = (told) => process.stdout.write(JSON.stringify(told));\n" + script
        )
        (folder / "run.js").write_text(text)
        done = subprocess.run(
            [node, "run.js"],
            cwd=folder,
            input=json.dumps(given),
            capture_output=True,
            text=True,
            timeout=60,
            check=False,
        )
        assert done.returncode == 0, done.stderr
        return json.loads(done.stdout)

    return run


@pytest.fixture(scope="session")
def three_for_files(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """Three compounds built by the command to be opened from a folder."""
    folder = write_bench(tmp_path_factory.mktemp("files"))
    assert main(["build", "--for-files", "--config", str(folder / "mkdocs.yml")]) == 0
    return folder / "site"


@pytest.fixture(scope="session")
def serve() -> Iterator[object]:
    """Serve a folder on a free port of this machine; returns its address."""
    servers = []

    def start(folder: Path) -> str:
        handler = functools.partial(_Quiet, directory=str(folder))
        server = http.server.ThreadingHTTPServer(("127.0.0.1", 0), handler)
        threading.Thread(target=server.serve_forever, daemon=True).start()
        servers.append(server)
        return f"http://127.0.0.1:{server.server_address[1]}/"

    yield start
    for server in servers:
        server.shutdown()
        server.server_close()


def write_bench(folder: Path) -> Path:
    (folder / "mkdocs.yml").write_text(CONFIG)
    for name, text in ENTRIES.items():
        path = folder / "compounds" / name
        path.parent.mkdir(parents=True, exist_ok=True)
        path.write_text(text)
    return folder


def build_site(folder: Path, site: Path | None = None, **options: object) -> None:
    """Build as ``mkdocs build`` does, in this process."""
    config = load_config(
        str(folder / "mkdocs.yml"), site_dir=str(site or folder / "site"), **options
    )
    config.plugins.on_startup(command="build", dirty=False)
    try:
        build(config)
    finally:
        config.plugins.on_shutdown()


class _Quiet(http.server.SimpleHTTPRequestHandler):
    def log_message(self, *_: object) -> None:
        pass
