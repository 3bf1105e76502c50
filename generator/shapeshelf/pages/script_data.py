"""Data that stand in a page's script element, where markup is not read."""

import json

from markupsafe import Markup


def script_data(value: object) -> Markup:
    """Return ``value`` as JSON that is safe to place within a script element."""
    text = json.dumps(value, ensure_ascii=False, separators=(",", ":"))
    # Within a script element only these could end or alter it; in JSON they mean the same.
    for character in "<>&\u2028\u2029":
        text = text.replace(character, f"\\u{ord(character):04x}")
    return Markup(text)
