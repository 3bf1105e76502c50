"""A compound in the vocabulary of schema.org, as JSON-LD for machines that read the page.

Type and properties: schema.org, MolecularEntity (recalled from memory).
"""

from markupsafe import Markup

from shapeshelf.pages.script_data import script_data
from shapeshelf.pages.typesetting import number_text
from shapeshelf.report.model import CompoundReport

CONTEXT = "https://schema.org"


def json_ld(report: CompoundReport, url: str | None, description: str) -> Markup:
    """Return the JSON-LD of one compound, safe to place within a script element.

    ``url`` is the page's absolute address; without one the page itself is meant.
    """
    return script_data(molecular_entity(report, url, description))


def molecular_entity(
    report: CompoundReport, url: str | None, description: str
) -> dict[str, object]:
    """Return the compound as a MolecularEntity, what is not known left out."""
    entry, molecule = report.entry, report.molecule
    held: dict[str, object] = {
        "@context": CONTEXT,
        "@type": "MolecularEntity",
        "@id": url or "./",
        "url": url or "./",
        "name": report.name,
        "alternateName": list(entry.also) if entry else [],
        "description": description,
        "identifier": _identifiers(report),
        "molecularFormula": molecule.formula,
        "molecularWeight": f"{number_text(report.molar_mass_g_mol, 2)} g/mol",
        "smiles": molecule.smiles,
        "inChIKey": molecule.inchikey,
    }
    return {name: value for name, value in held.items() if value}


def _identifiers(report: CompoundReport) -> list[dict[str, str]]:
    entry = report.entry
    held = {"id": report.id, "CAS": entry.cas if entry else None}
    held["code"] = entry.code if entry else None
    return [
        {"@type": "PropertyValue", "propertyID": name, "value": value}
        for name, value in held.items()
        if value
    ]
