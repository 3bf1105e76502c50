"""The fields of a catalogue as its YAML spells them: the one place that says what is allowed.

Reading checks entries against these models, and the JSON Schema for editors is written from
them. They are strict: a number is no text and a text no number.
"""

from collections.abc import Callable
from typing import Annotated, Any

from pydantic import (
    AfterValidator,
    BaseModel,
    ConfigDict,
    Discriminator,
    Field,
    StringConstraints,
    Tag,
    WithJsonSchema,
)
from pydantic_core import PydanticCustomError

from shapeshelf.catalogue.cas import cas_faults, isbn_is_valid
from shapeshelf.catalogue.model import Quantity, SourceKind
from shapeshelf.catalogue.problems import nearest, quoted
from shapeshelf.catalogue.quantities import LIMITS
from shapeshelf.reference.ghs import H_STATEMENTS

ID_PATTERN = r"^[a-z0-9]+(-[a-z0-9]+)*$"
LINE_PATTERN = r"^[^\x00-\x1f\x7f-\x9f\u2028\u2029]*$"
TEXT_PATTERN = r"^[^\x00-\x08\x0b-\x1f\x7f-\x9f]*$"
SMILES_PATTERN = r"^[!-~]+$"
DOI_PATTERN = r"^10\.\d{4,9}/\S+$"
PHASES = ("gas", "liquid", "solid", "solution", "matrix")
STRUCTURE_SUFFIXES = (".xyz", ".mol", ".sdf")


def _one_of(choices: tuple[str, ...], what: str) -> tuple[Any, ...]:
    """Return the annotations of a text that must be one of ``choices``."""

    def check(text: str) -> str:
        if text not in choices:
            raise _fault(f"{quoted(text)} is no {what}{nearest(text, choices)}")
        return text

    return AfterValidator(check), WithJsonSchema({"type": "string", "enum": list(choices)})


def _refuse_with(faults: Callable[[str], tuple[str, ...]]) -> AfterValidator:
    """Return a validator that refuses a text for which ``faults`` finds any."""

    def check(text: str) -> str:
        for message in faults(text):
            raise _fault(message)
        return text

    return AfterValidator(check)


def _fault(message: str) -> PydanticCustomError:
    # Braces in the user's text would be read as a template.
    return PydanticCustomError("catalogue", "{message}", {"message": message})


def _isbn_faults(number: str) -> tuple[str, ...]:
    if isbn_is_valid(number):
        return ()
    return (f"{quoted(number)} is no ISBN: its check digit or its length is wrong",)


def _hazard_faults(code: str) -> tuple[str, ...]:
    if code in H_STATEMENTS:
        return ()
    if code.upper().startswith("EUH"):
        return (f"{quoted(code)} is not one of the GHS; put it in `notes`",)
    tidy = code.replace(" ", "").upper()
    known = nearest(tidy, H_STATEMENTS) if tidy in H_STATEMENTS else ""
    return (
        f"{quoted(code)} is no H-code of the GHS{known or '; right would be one such as H330'}",
    )


Line = Annotated[
    str,
    StringConstraints(strip_whitespace=True, min_length=1, max_length=300, pattern=LINE_PATTERN),
]
# Not stripped: a space at its end is an escape such as `\N` in double quotes gone wrong.
Smiles = Annotated[str, StringConstraints(min_length=1, max_length=4000, pattern=SMILES_PATTERN)]
Text = Annotated[
    str,
    StringConstraints(strip_whitespace=True, min_length=1, max_length=20_000, pattern=TEXT_PATTERN),
]
Identifier = Annotated[str, StringConstraints(pattern=ID_PATTERN, max_length=64)]
Cas = Annotated[
    str,
    _refuse_with(cas_faults),
    WithJsonSchema({"type": "string", "pattern": r"^\d{2,7}-\d{2}-\d$"}),
]
Hazard = Annotated[
    str,
    _refuse_with(_hazard_faults),
    WithJsonSchema({"type": "string", "enum": list(H_STATEMENTS)}),
]
QuantityName = Annotated[str, *_one_of(tuple(Quantity), "quantity")]
# Whether a unit is one of its quantity is checked with the quantity, not here.
UnitName = Annotated[
    Line,
    WithJsonSchema({"type": "string", "enum": [limit.unit for limit in LIMITS.values()]}),
]
PhaseName = Annotated[str, *_one_of(PHASES, "phase")]
KindName = Annotated[str, *_one_of(tuple(SourceKind), "kind of source")]
Number = Annotated[float, Field(allow_inf_nan=False)]


class _Fields(BaseModel):
    model_config = ConfigDict(extra="forbid", strict=True, frozen=True)


class StructureFields(_Fields):
    """A structure as a mapping: a SMILES string or a file, never both."""

    smiles: Smiles | None = Field(None, description="A SMILES string, in quotes.")
    file: Line | None = Field(
        None, description="A .xyz, .mol or .sdf file, relative to this entry, below compounds/."
    )
    charge: int | None = Field(None, ge=-50, le=50, description="Total charge.")
    multiplicity: int | None = Field(None, ge=1, le=21, description="Spin multiplicity, 2S + 1.")


class MeasuredFields(_Fields):
    """One measured value with its source."""

    quantity: QuantityName = Field(description="What was measured.")
    of: Line | None = Field(
        None, description="The label the page prints: F(ax)-S-F(ax) for an angle, S-F(ax) a length."
    )
    value: Number = Field(description="The number, in the unit of the quantity.")
    unit: UnitName = Field(description="degree, angstrom, debye or 1/cm.")
    uncertainty: Number | None = Field(None, ge=0, description="Same unit as the value.")
    phase: PhaseName | None = Field(None, description="What the sample was.")
    method: Line | None = Field(None, description="Such as microwave or electron diffraction.")
    source: Line = Field(description="A key of sources.yml.")
    note: Text | None = Field(None, description="Plain text.")


def _structure_form(value: Any) -> str:
    return "mapping" if isinstance(value, dict | StructureFields) else "smiles"


StructureField = Annotated[
    Annotated[Smiles, Tag("smiles")] | Annotated[StructureFields, Tag("mapping")],
    Discriminator(_structure_form),
]


class EntryFields(_Fields):
    """One compound of the catalogue."""

    id: Identifier = Field(description="The permanent address: never changed, never reused.")
    formerly: list[Identifier] = Field([], description="Earlier ids, whose addresses keep working.")
    name: Line = Field(description="The name to show.")
    also: list[Line] = Field([], description="Other names and spellings to find it by.")
    structure: StructureField = Field(
        description="A SMILES string in quotes, or a mapping with smiles or file."
    )
    formula: Line | None = Field(None, description="Checked against the structure.")
    cas: Cas | None = Field(None, description="CAS Registry Number; its check digit is verified.")
    code: Line | None = Field(None, description="The group's own code.")
    kept: Line | None = Field(None, description="Where it is kept.")
    owner: Line | None = Field(None, description="Who looks after it.")
    tags: list[Line] = Field([], description="Free words to filter by.")
    start_here: Line | None = Field(
        None, alias="start-here", description="A sentence; puts it on the newcomers' page."
    )
    hazards: list[Hazard] = Field([], description="H-codes of the GHS, from the data sheet.")
    used_in: list[Line] = Field(
        [], alias="used-in", description="Protocols that use it, by their id in protocols.yml."
    )
    notes: Text | None = Field(None, description="Plain text, shown as it stands.")
    measured: list[MeasuredFields] = Field([], description="Measured values with their sources.")


class SourceFields(_Fields):
    """One source of sources.yml."""

    title: Line
    authors: Line
    year: int = Field(ge=1600, le=2200)
    kind: KindName
    where: Line | None = None
    doi: Annotated[str, StringConstraints(pattern=DOI_PATTERN)] | None = None
    isbn: Annotated[str, _refuse_with(_isbn_faults)] | None = None
    note: Text | None = None


class ProtocolFields(_Fields):
    """One protocol of protocols.yml."""

    title: Line
    file: Line | None = None
