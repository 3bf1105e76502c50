"""A folder served on this machine, and a headless Chromium to open it, for benchmarks."""

import functools
import http.server
import shutil
import threading
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import Any

from playwright.sync_api import sync_playwright

BROWSERS = ("chromium", "chromium-browser", "google-chrome", "chrome")
FLAGS = ("--no-sandbox", "--disable-gpu", "--no-first-run", "--disable-background-networking")


@contextmanager
def served(folder: Path) -> Iterator[str]:
    """Serve a folder on a free port; gives its address."""
    handler = functools.partial(_Quiet, directory=str(folder))
    server = http.server.ThreadingHTTPServer(("127.0.0.1", 0), handler)
    threading.Thread(target=server.serve_forever, daemon=True).start()
    try:
        yield f"http://127.0.0.1:{server.server_address[1]}/"
    finally:
        server.shutdown()
        server.server_close()


@contextmanager
def launched() -> Iterator[Any]:
    """Start the first Chromium on the path."""
    found = next(path for name in BROWSERS if (path := shutil.which(name)))
    with sync_playwright() as playwright:
        browser = playwright.chromium.launch(executable_path=found, args=list(FLAGS))
        yield browser
        browser.close()


class _Quiet(http.server.SimpleHTTPRequestHandler):
    def log_message(self, *_: object) -> None:
        pass
