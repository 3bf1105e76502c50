"""The values of a catalogue as published: one compact JSON document, and its reader.

The same document stands in three places: ``values.json`` in the built site (the present
values), ``compounds/released.json`` (the values as last released), and whatever copy of the
former another repository fetches to check its protocols by. Reading it needs no chemistry, so
that checking a protocol starts at once.

    {"schema": 1, "site": "https://…/" or null, "code": "…", "shapes": ["see-saw", …],
     "compounds": {"sf4": {"name": …, "formula": …, "names": […], "formerly": […],
                           "structure": "…", "anchors": […], "facts": {"shape": "see-saw", …},
                           "used_in": ["tb-p01"],
                           "values": {"angle-f-ax-s-f-ax": {"quantity": "angle", "of": …,
                              "labels": […], "value": 173.1, "uncertainty": 0.5,
                              "basis": "measured", "source": …, "measured": 173.1,
                              "calculated": null, "model": 172.0}}}},
     "withdrawn": {"sf5": {… as a compound …}}}

Angles in degrees, lengths in ångström, dipole moments in debye, vibrations in 1/cm.
"""

import json
from collections.abc import Iterator, Mapping
from dataclasses import asdict, dataclass, field, fields
from pathlib import Path
from typing import Any

from shapeshelf.errors import UsageError

SCHEMA = 1
VALUES_FILE = "values.json"
RELEASED_FILE = "released.json"
UNITS = {"angle": "degree", "length": "angstrom", "dipole": "debye", "frequency": "1/cm"}
SYMBOLS = {"angle": "°", "length": " Å", "dipole": " D", "frequency": " cm⁻¹"}


@dataclass(frozen=True, slots=True)
class PublishedValue:
    """One number of a compound's page."""

    quantity: str
    """``angle``, ``length``, ``dipole`` or ``frequency``; the unit follows from it."""
    of: str
    labels: tuple[str, ...]
    """Every spelling that means this value."""
    value: float
    uncertainty: float | None
    basis: str
    source: str | None
    measured: float | None = None
    calculated: float | None = None
    supplied: float | None = None
    model: float | None = None
    calculated_uncertainty: float | None = None


@dataclass(frozen=True, slots=True)
class PublishedCompound:
    """One compound as its page stands."""

    name: str
    formula: str
    structure: str
    """Hash of the structure as the entry gives it."""
    names: tuple[str, ...] = ()
    """Other names and the group's code, by which a text may speak of it."""
    formerly: tuple[str, ...] = ()
    anchors: tuple[str, ...] = ()
    """Every anchor of the page that is not a value's."""
    used_in: tuple[str, ...] = ()
    facts: Mapping[str, str] = field(default_factory=dict)
    """``shape``, ``point group`` and ``polarity`` in words."""
    values: Mapping[str, PublishedValue] = field(default_factory=dict)
    """By anchor."""


@dataclass(frozen=True, slots=True)
class Published:
    """Every compound by id, and those that are withdrawn."""

    compounds: Mapping[str, PublishedCompound]
    withdrawn: Mapping[str, PublishedCompound] = field(default_factory=dict)
    site: str | None = None
    """Address of the site's root, where the configuration names one."""
    code: str = ""
    """Hash of the program's own chemistry: what may change a value though no entry changed."""
    shapes: tuple[str, ...] = ()
    """Last parts of the addresses ``shapes/SHAPE/``."""


def write_published(published: Published, indent: int | None = None) -> str:
    """Return the document as JSON, in a fixed order, for a readable difference."""
    document = {
        "schema": SCHEMA,
        "site": published.site,
        "code": published.code,
        "shapes": sorted(published.shapes),
        "compounds": _sorted(published.compounds),
        "withdrawn": _sorted(published.withdrawn),
    }
    return json.dumps(document, ensure_ascii=False, indent=indent) + "\n"


def read_published(path: Path) -> Published:
    """Return the document in ``path``.

    Raises UsageError where the file is absent or is none of ours.
    """
    try:
        document = json.loads(path.read_text("utf-8"))
        if document["schema"] != SCHEMA:
            raise UsageError(f"{path}: written by another version of shapeshelf")
        return Published(
            compounds={key: _compound(item) for key, item in document["compounds"].items()},
            withdrawn={key: _compound(item) for key, item in document["withdrawn"].items()},
            site=document["site"],
            code=document["code"],
            shapes=tuple(document["shapes"]),
        )
    except OSError as error:
        raise UsageError(f"{path}: {error.strerror}") from error
    except (ValueError, KeyError, TypeError, AttributeError) as error:
        raise UsageError(f"{path}: not a file of published values") from error


def read_released(root: Path) -> Published | None:
    """Return what was last released of the catalogue ``root``; ``None`` before the first time."""
    path = root / RELEASED_FILE
    return read_published(path) if path.exists() else None


def number_text(quantity: str, value: float) -> str:
    """Return a number with its unit, to the decimals that a page shows at most."""
    decimals = {"angle": 2, "length": 4, "dipole": 3, "frequency": 1}[quantity]
    text = f"{value:.{decimals}f}".rstrip("0").rstrip(".")
    return ("0" if text == "-0" else text) + SYMBOLS[quantity]


def value_text(value: PublishedValue) -> str:
    """Return ``173.1° ± 0.5°``."""
    text = number_text(value.quantity, value.value)
    if value.uncertainty is None:
        return text
    return f"{text} ± {number_text(value.quantity, value.uncertainty)}"


def _sorted(compounds: Mapping[str, PublishedCompound]) -> dict[str, Any]:
    return {key: _plain(compounds[key]) for key in sorted(compounds)}


def _plain(compound: PublishedCompound) -> dict[str, Any]:
    """Return a compound as JSON holds it, empty parts left out."""
    held: dict[str, Any] = {item.name: getattr(compound, item.name) for item in fields(compound)}
    held["facts"] = dict(compound.facts)
    held["values"] = {anchor: _plain_value(value) for anchor, value in compound.values.items()}
    return {name: item for name, item in held.items() if item}


def _plain_value(value: PublishedValue) -> dict[str, Any]:
    held = asdict(value)
    if value.labels == (value.of,):
        del held["labels"]
    return {name: item for name, item in held.items() if item is not None}


def _compound(held: Mapping[str, Any]) -> PublishedCompound:
    values = _Values(held.get("values", {}))
    lists = {
        name: tuple(held.get(name, ())) for name in ("names", "formerly", "anchors", "used_in")
    }
    return PublishedCompound(
        name=held["name"],
        formula=held["formula"],
        structure=held["structure"],
        facts=dict(held.get("facts", {})),
        values=values,
        **lists,
    )


class _Values(Mapping[str, PublishedValue]):
    """Values made when they are asked for: a check of one protocol needs few of many."""

    def __init__(self, held: Mapping[str, Any]) -> None:
        self._held = dict(held)

    def __getitem__(self, anchor: str) -> PublishedValue:
        held = self._held[anchor]
        try:
            return _value(held)
        except (KeyError, TypeError, ValueError) as error:
            raise UsageError(f"the published value {anchor} is not complete") from error

    def __iter__(self) -> Iterator[str]:
        return iter(self._held)

    def __len__(self) -> int:
        return len(self._held)


def _value(held: Mapping[str, Any]) -> PublishedValue:
    numbers = {
        name: held.get(name)
        for name in (
            "uncertainty",
            "source",
            "measured",
            "calculated",
            "supplied",
            "model",
            "calculated_uncertainty",
        )
    }
    return PublishedValue(
        quantity=held["quantity"],
        of=held["of"],
        labels=tuple(held.get("labels", (held["of"],))),
        value=float(held["value"]),
        basis=held["basis"],
        **numbers,
    )
