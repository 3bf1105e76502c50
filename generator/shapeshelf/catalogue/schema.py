"""The JSON Schema of an entry, from the same models that reading checks with.

An editor that knows it completes field names, H-codes and units while an entry is written.
"""

import json
from pathlib import Path
from typing import Any

from shapeshelf.catalogue.fields import EntryFields
from shapeshelf.catalogue.quantities import LIMITS, Limit

DIALECT = "https://json-schema.org/draft/2020-12/schema"


def catalogue_schema() -> dict[str, Any]:
    """Return the schema (JSON Schema, draft 2020-12) of one entry file."""
    schema = _tidy(EntryFields.model_json_schema(by_alias=True))
    schema["$defs"]["MeasuredFields"]["allOf"] = [
        _rule(quantity.value, limit) for quantity, limit in LIMITS.items()
    ]
    schema["$defs"]["StructureFields"]["oneOf"] = [
        {"required": ["smiles"]},
        {"required": ["file"]},
    ]
    return {"$schema": DIALECT, **schema, "title": "A compound of the catalogue"}


def schema_text() -> str:
    """Return the schema as the text of its file."""
    return json.dumps(catalogue_schema(), indent=2, ensure_ascii=False) + "\n"


def write_schema(root: Path) -> Path:
    """Write the schema to ``schema.json`` in the catalogue folder ``root``; return its path."""
    file = root / "schema.json"
    file.write_text(schema_text(), encoding="utf-8")
    return file


def _rule(quantity: str, limit: Limit) -> dict[str, Any]:
    """Return what follows from a quantity: its unit, its range, whether it needs a label."""
    then: dict[str, Any] = {
        "properties": {
            "unit": {"const": limit.unit},
            "value": {"minimum": limit.least, "maximum": limit.most},
        }
    }
    if limit.atoms_in_label is not None:
        then["required"] = ["of"]
    given = {"properties": {"quantity": {"const": quantity}}, "required": ["quantity"]}
    return {"if": given, "then": then}


def _tidy(node: Any) -> Any:
    """Return ``node`` without the nulls that only mark a field as optional.

    In YAML a null is a field left empty, which reading refuses.
    """
    if isinstance(node, list):
        return [_tidy(item) for item in node]
    if not isinstance(node, dict):
        return node
    kept = {key: _tidy(item) for key, item in node.items() if not _is_noise(key, item)}
    choices = kept.get("anyOf")
    if choices and {"type": "null"} in choices:
        (only,) = [choice for choice in choices if choice != {"type": "null"}]
        del kept["anyOf"]
        kept = {**only, **kept}
    return kept


def _is_noise(key: str, item: Any) -> bool:
    return (key == "default" and item in (None, [])) or (key == "title" and isinstance(item, str))
