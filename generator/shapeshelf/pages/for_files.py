"""A site to be opened from a folder, without a server that finds ``index.html`` by itself."""

import re

_LINK = re.compile(r'\b(href|action|data-to)="([^"#?:]*)([^":]*)"')
_REFRESH = re.compile(r'(content="\d+; url=)([^"#?:]*)([^":]*")')
INDEX = "index.html"


def link_to_files(html: str) -> str:
    """Return a page with every link to a folder of the site leading to the file in it.

    Addresses with a scheme, anchors of the same page and links to files stay as they are.
    """
    html = _LINK.sub(lambda m: f'{m.group(1)}="{_file(m.group(2))}{m.group(3)}"', html)
    return _REFRESH.sub(lambda m: m.group(1) + _file(m.group(2)) + m.group(3), html)


def _file(path: str) -> str:
    if path in (".", "..") or path.endswith(("/.", "/..")):
        return f"{path}/{INDEX}"
    return path + INDEX if path.endswith("/") else path
