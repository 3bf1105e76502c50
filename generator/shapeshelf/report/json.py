"""The report as the JSON of the contract: plain dictionaries, nothing rounded away unsaid.

Angles in degrees to 0.01, lengths in ångström to 0.0001, dipole moments in debye to 0.001.
"""

from typing import Any

from shapeshelf.calculation.records import record_json
from shapeshelf.catalogue.model import Entry
from shapeshelf.properties.model import ExpectedSpectra
from shapeshelf.report.model import AngleRow, CentreReport, CompoundReport, LengthRow, Value

SCHEMA = 1
Json = dict[str, Any]


def report_json(report: CompoundReport) -> Json:
    """Return the JSON object of one compound, the entry's own fields beside it."""
    return {
        "schema": SCHEMA,
        "id": report.id,
        "name": report.name,
        "formula": report.molecule.formula,
        "charge": report.molecule.charge,
        "multiplicity": report.lewis.multiplicity,
        "smiles": report.molecule.smiles,
        "inchikey": report.molecule.inchikey,
        "shape": report.shape,
        "point_group": {
            "value": report.point_group,
            "basis": report.point_group_basis.value,
            "tolerance_angstrom": report.symmetry.tolerance_angstrom,
        },
        "polar": report.dipole_model.polar,
        "dipole": _dipole(report),
        "centres": [_centre(centre) for centre in report.centres],
        "lengths": [_length(row) for row in report.lengths],
        "atoms": _atoms(report),
        "bonds": _bonds(report),
        "spectra": _spectra(report.spectra),
        "symmetry": {
            "rotational_number": report.symmetry.rotational_number,
            "chiral": report.symmetry.chiral,
            "equivalent_atoms": [list(group) for group in report.symmetry.equivalent_atoms],
        },
        "structure": {
            "basis": report.structure.basis.value,
            "method": report.structure.method,
        },
        "calculation": record_json(report.calculation) if report.calculation else None,
        "molar_mass": round(report.molar_mass_g_mol, 3),
        "topological_polar_surface_area": _rounded(report.topological_polar_surface_area, 2),
        "crippen_log_p": _rounded(report.crippen_log_p, 2),
        "cautions": [
            f"{caution.code}: {caution.text}" if caution.code else caution.text
            for caution in report.cautions
        ],
        **(_entry(report.entry) if report.entry else {}),
    }


def _value(value: Value, digits: int) -> Json:
    return {
        "value": round(value.value, digits),
        "uncertainty": _rounded(value.uncertainty, digits),
        "basis": value.basis.value,
        "model": _rounded(value.model, digits),
        "calculated": _rounded(value.calculated, digits),
        "measured": _rounded(value.measured, digits),
        "supplied": _rounded(value.supplied, digits),
        "source": value.source,
    }


def _dipole(report: CompoundReport) -> Json | None:
    if report.dipole_debye is None:
        return None
    vector = report.dipole_model.vector_debye
    return {
        **_value(report.dipole_debye, 3),
        "vector": None if vector is None else [round(part, 3) for part in vector],
        "reason": report.dipole_model.reason,
    }


def _centre(report: CentreReport) -> Json:
    centre = report.centre
    return {
        "atom": centre.atom,
        "element": centre.element,
        "label": centre.label,
        "bonded": centre.bonded,
        "lone_pairs": centre.lone_pairs,
        "single_electrons": centre.single_electrons,
        "notation": centre.notation,
        "arrangement": centre.arrangement,
        "shape": report.shape,
        "polyhedral_symbol": report.polyhedral_symbol,
        "hybridisation": _hybridisation(report),
        "angles": [_angle(row) for row in report.angles],
        "shape_measures": _shape_measures(report),
        "departs": centre.departure.sentence if centre.departure else None,
        "fluxional": centre.fluxional,
        "placements": [
            {
                "shape": placement.shape,
                "polyhedral_symbol": placement.polyhedral_symbol,
                "energy_above_best": round(placement.energy - centre.placements[0].energy, 4),
            }
            for placement in centre.placements
        ],
        "trace": [{"rule": step.rule, "text": step.text} for step in centre.trace],
        "equivalent": list(report.equivalent),
    }


def _angle(row: AngleRow) -> Json:
    return {
        "of": row.of,
        "atoms": list(row.atoms),
        "count": len(row.members),
        "ideal": _rounded(row.ideal_degrees, 2),
        **_value(row.degrees, 2),
    }


def _length(row: LengthRow) -> Json:
    return {
        "of": row.of,
        "atoms": list(row.atoms),
        "count": len(row.members),
        "bond_order": round(row.bond_order, 3),
        **_value(row.angstrom, 4),
    }


def _hybridisation(report: CentreReport) -> Json | None:
    hybridisation = report.hybridisation
    if hybridisation is None:
        return None
    named: dict[str, list[float]] = {}
    for hybrid in hybridisation.hybrids:
        label = "lone pair" if hybrid.neighbour is None else report.ligand_labels[hybrid.neighbour]
        named.setdefault(label, []).append(hybrid.s_character)
    return {
        "label": hybridisation.label,
        "customary_only": hybridisation.customary_only,
        "s_character": {
            label: round(sum(values) / len(values), 3) for label, values in named.items()
        },
        "bent_rule": hybridisation.bent_rule,
        "pyramidalisation": _rounded(hybridisation.pyramidalisation_degrees, 1),
    }


def _shape_measures(report: CentreReport) -> Json | None:
    deviation = report.deviation
    if deviation is None:
        return None
    return {
        "measures": {symbol: round(value, 2) for symbol, value in deviation.measures},
        "tau4": _rounded(deviation.tau4, 2),
        "tau5": _rounded(deviation.tau5, 2),
    }


def _atoms(report: CompoundReport) -> list[Json]:
    return [
        {
            "element": atom.element,
            "lone_pairs": count.lone_pairs,
            "single_electrons": count.single_electrons,
            "formal_charge": count.formal_charge,
            "xyz": [round(part, 4) for part in xyz],
        }
        for atom, count, xyz in zip(
            report.molecule.atoms,
            report.lewis.atoms,
            report.structure.coordinates_angstrom,
            strict=True,
        )
    ]


def _bonds(report: CompoundReport) -> list[Json]:
    return [
        {"atoms": [bond.begin, bond.end], "order": round(order, 3), "dative": bond.dative}
        for bond, order in zip(report.molecule.bonds, report.lewis.bond_orders, strict=True)
    ]


def _spectra(spectra: ExpectedSpectra) -> Json:
    return {
        "modes": [
            {
                "species": mode.species,
                "degeneracy": mode.degeneracy,
                "count": mode.count,
                "stretches": mode.stretches,
                "infrared": mode.infrared,
                "raman": mode.raman,
            }
            for mode in spectra.modes
        ],
        "infrared_bands": spectra.infrared_bands,
        "raman_bands": spectra.raman_bands,
        "coincidences": spectra.coincidences,
        "infrared_stretches": spectra.infrared_stretches,
        "raman_stretches": spectra.raman_stretches,
        "microwave_axes": list(spectra.microwave_axes),
        "nmr": [
            {
                "nucleus": signal.nucleus,
                "atoms": list(signal.atoms),
                "multiplicity": signal.multiplicity,
                "partners": list(signal.partners),
            }
            for signal in spectra.nmr
        ],
        "fluxional_note": spectra.fluxional_note,
    }


def _entry(entry: Entry) -> Json:
    return {
        "formerly": list(entry.formerly),
        "also": list(entry.also),
        "cas": entry.cas,
        "code": entry.code,
        "kept": entry.kept,
        "owner": entry.owner,
        "tags": list(entry.tags),
        "start-here": entry.start_here,
        "hazards": list(entry.hazards),
        "used-in": list(entry.used_in),
        "notes": entry.notes,
        "measured": [
            {
                "quantity": item.quantity.value,
                "of": item.of,
                "value": item.value,
                "unit": item.unit,
                "uncertainty": item.uncertainty,
                "phase": item.phase,
                "method": item.method,
                "source": item.source,
                "note": item.note,
            }
            for item in entry.measured
        ],
    }


def _rounded(value: float | None, digits: int) -> float | None:
    return None if value is None else round(value, digits)
