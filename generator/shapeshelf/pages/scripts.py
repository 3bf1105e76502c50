"""One script for every page, put together from the modules of the theme.

A page opened as a file may load a script but no module, so the modules are written one after
another, each in a function of its own that returns what it exports. The modules keep to the
plainest forms: ``import { a, b } from "./x.js"``, ``export function``, ``export const``.
"""

import re
from pathlib import Path

from shapeshelf.errors import ShapeshelfError
from shapeshelf.pages.rendering import templates_dir

ENTRANCE = "main.js"
_IMPORT = re.compile(r'^import \{([^}]*)\} from "\./([\w-]+\.js)";\n', re.MULTILINE)
_EXPORT = re.compile(r"^export ((?:async )?function|const|class) (\w+)", re.MULTILINE)
_LEFT_OVER = re.compile(r"^(?:import|export)\b.*$", re.MULTILINE)


def site_script() -> bytes:
    """Return the script of the site."""
    return bundle(templates_dir() / "theme" / "js").encode()


def bundle(folder: Path, entrance: str = ENTRANCE) -> str:
    """Return all modules that ``entrance`` needs as one plain script, each before its users.

    Raises ShapeshelfError for a module that is missing, imports in a circle, or is written in
    a form that is not bundled.
    """
    texts: dict[str, str] = {}
    _collect(folder, entrance, texts, ())
    body = "".join(_wrapped(name, text) for name, text in texts.items())
    return f'"use strict";\n(() => {{\n{body}}})();\n'


def _collect(folder: Path, name: str, texts: dict[str, str], path: tuple[str, ...]) -> None:
    if name in path:
        raise ShapeshelfError(f"{name}: imports itself by way of {', '.join(path)}")
    if name in texts:
        return
    if not (folder / name).is_file():
        raise ShapeshelfError(f"{name}: no such module, asked for by {', '.join(path)}")
    text = (folder / name).read_text("utf-8")
    for match in _IMPORT.finditer(text):
        _collect(folder, match.group(2), texts, (*path, name))
    texts[name] = text


def _wrapped(name: str, text: str) -> str:
    exported = [match.group(2) for match in _EXPORT.finditer(text)]
    body = _EXPORT.sub(r"\1 \2", _IMPORT.sub(_destructured, text))
    if found := _LEFT_OVER.search(body):
        raise ShapeshelfError(f"{name}: cannot be put into one script: {found.group()}")
    return (
        f"const {_variable(name)} = (() => {{\n{body}return {{ {', '.join(exported)} }};\n}})();\n"
    )


def _destructured(match: re.Match[str]) -> str:
    names = match.group(1).replace(" as ", ": ").strip()
    return f"const {{ {names} }} = {_variable(match.group(2))};\n"


def _variable(name: str) -> str:
    return "module_" + re.sub(r"\W", "_", name.removesuffix(".js"))
