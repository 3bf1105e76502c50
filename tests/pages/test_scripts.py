from pathlib import Path

import pytest

from shapeshelf.errors import ShapeshelfError
from shapeshelf.pages.scripts import bundle, site_script


def write(folder: Path, **modules: str) -> Path:
    for name, text in modules.items():
        (folder / f"{name}.js").write_text(text)
    return folder


def test_modules_come_before_their_users_and_once(tmp_path: Path) -> None:
    """Each in a function of its own, so that like names do not meet."""
    text = bundle(
        write(
            tmp_path,
            main='import { a as first } from "./one.js";\n'
            'import { b } from "./two.js";\nfirst(b);\n',
            one='import { b } from "./two.js";\nexport function a() { return b; }\n',
            two="export const b = 1;\n",
        )
    )
    assert text.index("const module_two") < text.index("const module_one")
    assert text.count("const module_two") == 1
    assert "const { a: first } = module_one;" in text
    assert "export" not in text


@pytest.mark.parametrize(
    ("modules", "problem"),
    [
        ({"main": 'import { x } from "./gone.js";\n'}, "gone.js: no such module"),
        ({"main": 'import x from "./one.js";\n'}, "cannot be put into one script"),
        ({"main": "export default 1;\n"}, "cannot be put into one script"),
        (
            {"main": 'import { a } from "./one.js";\n', "one": 'import { b } from "./main.js";\n'},
            "imports itself",
        ),
    ],
)
def test_what_cannot_be_bundled_is_refused(
    tmp_path: Path, modules: dict[str, str], problem: str
) -> None:
    """Rather than a script that fails in the browser."""
    with pytest.raises(ShapeshelfError, match=problem):
        bundle(write(tmp_path, **modules))


def test_the_sites_own_modules_bundle() -> None:
    """No module of the theme is left out of reach."""
    text = site_script().decode()
    assert "const module_lookup" in text
    assert "import {" not in text
