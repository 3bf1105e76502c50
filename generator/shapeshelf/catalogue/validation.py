"""One document against the models of its fields; pydantic's findings put into our words."""

import contextlib
import copy
from collections.abc import Collection, Iterator
from typing import Any, TypeVar

from pydantic import BaseModel, ValidationError

from shapeshelf.catalogue.fields import (
    DOI_PATTERN,
    ID_PATTERN,
    SMILES_PATTERN,
    MeasuredFields,
    StructureFields,
)
from shapeshelf.catalogue.problems import Document, nearest, quoted
from shapeshelf.errors import Problem

Fields = TypeVar("Fields", bound=BaseModel)

_EMPTY = "is empty; give a value or delete the line"

_INNER: dict[str, type[BaseModel]] = {"measured": MeasuredFields, "structure": StructureFields}

_WANTED = {
    "string_type": "a text",
    "int_type": "a whole number",
    "int_from_float": "a whole number",
    "float_type": "a number",
    "list_type": "a list",
    "model_type": "a group of fields",
}


def validated(
    document: Document, value: Any, model: type[Fields], under: str = ""
) -> tuple[Fields | None, list[Problem]]:
    """Return ``value`` as a ``model`` and what is wrong with it, each with its line.

    ``under`` is the address of ``value`` in the document, empty for the whole. Where there
    are problems, the model holds what is right, so that later checks of it find their own
    problems in the same run; it is ``None`` where that is not enough.
    """
    try:
        return model.model_validate(value), list(_empty_fields(document, value, under))
    except ValidationError as error:
        findings = error.errors(include_url=False)
    problems = [_problem(document, finding, model, under) for finding in findings]
    problems += _empty_fields(document, value, under, {problem.field for problem in problems})
    return _what_is_right(value, findings, model), problems


def _empty_fields(
    document: Document, value: Any, under: str, known: Collection[str] = ()
) -> Iterator[Problem]:
    """Yield a problem for each field or item that is there without a value.

    The models take ``None`` for absent, but a name with nothing after it is a slip.
    """
    if value is None and under not in known:
        yield document.problem(under, _EMPTY)
    if isinstance(value, dict):
        for name, item in value.items():
            yield from _empty_fields(document, item, f"{under}.{name}" if under else name, known)
    if isinstance(value, list):
        for index, item in enumerate(value):
            yield from _empty_fields(document, item, f"{under}[{index}]", known)


def _what_is_right(value: Any, findings: list[Any], model: type[Fields]) -> Fields | None:
    """Return ``value`` without what the findings name, or without ``measured`` at all."""
    if not isinstance(value, dict):
        return None
    kept = copy.deepcopy(value)
    for finding in reversed(findings):
        _remove(kept, _steps(finding["loc"]))
    for attempt in (kept, {name: kept[name] for name in kept if name != "measured"}):
        with contextlib.suppress(ValidationError):
            return model.model_validate(attempt)
    return None


def _remove(value: Any, steps: list[Any]) -> None:
    """Delete from ``value`` what stands at ``steps``, if it is there."""
    if steps[0] == "measured" and len(steps) == 2:
        steps = steps[:1]  # to delete one item would give the others a wrong line
    for step in steps[:-1]:
        if isinstance(value, dict) and step not in value:
            return
        value = value[step]
    if isinstance(value, list) or steps[-1] in value:
        del value[steps[-1]]


def _problem(document: Document, finding: Any, model: type[BaseModel], under: str) -> Problem:
    field = _address(document, under, finding["loc"])
    if finding["type"] == "extra_forbidden":
        return document.problem(field, _unknown(str(finding["loc"][-1]), finding, model))
    return document.problem(field, _message(finding))


def _address(document: Document, under: str, location: tuple[int | str, ...]) -> str:
    """Return ``measured[2].value`` for ``("measured", 2, "value")``."""
    address = under
    for step in _steps(location):
        if isinstance(step, int):
            address += f"[{step}]"
        else:
            address += f".{step}" if address else step
    return address


def _steps(location: tuple[int | str, ...]) -> list[int | str]:
    """Return ``location`` without the form of ``structure``."""
    if location[:1] == ("structure",) and location[1:2] in (("smiles",), ("mapping",)):
        return [location[0], *location[2:]]
    return list(location)


def _unknown(name: str, finding: Any, model: type[BaseModel]) -> str:
    inner = _model_at(model, finding["loc"][:-1])
    names = [field.alias or name for name, field in inner.model_fields.items()]
    return f"unknown field{nearest(name, names)}"


def _model_at(model: type[BaseModel], location: tuple[int | str, ...]) -> type[BaseModel]:
    """Return the model that holds the fields at ``location``."""
    return _INNER.get(str(location[0]), model) if location else model


def _message(finding: Any) -> str:
    kind, given, context = finding["type"], finding["input"], finding.get("ctx", {})
    if kind == "missing":
        return "is missing and must be given"
    if given is None:
        return _EMPTY
    if kind in _WANTED:
        return _wrong_type(_WANTED[kind], given)
    if kind == "catalogue":
        return str(context["message"])
    if kind == "string_pattern_mismatch":
        return _wrong_pattern(str(given), context["pattern"])
    return _out_of_bounds(kind, given, context, finding["msg"])


def _wrong_type(wanted: str, given: Any) -> str:
    if isinstance(given, list):
        hint = ""
        if wanted == "a text":
            hint = "; a text that begins with `[`, as many SMILES do, must stand in quotes"
        return f"is a list where {wanted} is wanted{hint}"
    if isinstance(given, dict):
        return f"is a group of fields where {wanted} is wanted"
    if wanted == "a text":
        return f"{quoted(given)} is not read as a text; put it in quotes"
    if wanted == "a list":
        return f"{quoted(given)} is no list; right would be [{str(given)[:20]}]"
    return f"{quoted(given)} is {_kind(given)} where {wanted} is wanted"


def _kind(given: Any) -> str:
    if isinstance(given, bool):
        return "a truth value"
    return "a text" if isinstance(given, str) else "a number"


def _wrong_pattern(given: str, pattern: str) -> str:
    if pattern == ID_PATTERN:
        return f"{quoted(given)} holds more than lower-case letters, digits and single hyphens"
    if pattern == DOI_PATTERN:
        return f"{quoted(given)} is no DOI; right would be 10.1000/182, without https://doi.org/"
    if pattern == SMILES_PATTERN:
        return f"{quoted(given)} holds a sign that SMILES has not; use single quotes round a `\\`"
    if "\n" in given:
        return "runs over several lines; it must stand in one"
    return f"{quoted(given)} holds a control character; delete it"


def _out_of_bounds(kind: str, given: Any, context: dict[str, Any], message: str) -> str:
    if kind == "string_too_short":
        return _EMPTY
    if kind == "string_too_long":
        return f"is longer than {context['max_length']} characters"
    if kind == "finite_number":
        return f"{quoted(given)} is no finite number"
    if kind == "greater_than_equal":
        return f"{quoted(given)} is too small; the least is {context['ge']:g}"
    if kind == "less_than_equal":
        return f"{quoted(given)} is too large; the most is {context['le']:g}"
    return message[:1].lower() + message[1:]
