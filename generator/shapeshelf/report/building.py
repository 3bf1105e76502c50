"""One compound, worked out once: from an entry or a bare structure to the frozen report.

Order of work: structure read and normalised; electrons counted and centres analysed; the
molecule assembled (supplied coordinates stand as they are); symmetry; properties; then every
number merged with what was measured and what was calculated.
"""

from collections.abc import Sequence
from dataclasses import replace
from pathlib import Path

from shapeshelf.calculation.model import CalculationRecord, Outcome
from shapeshelf.calculation.states import standing_of
from shapeshelf.catalogue.model import Entry, Measurement, Quantity
from shapeshelf.domains.analysis import analyse
from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.properties.model import DipoleModel
from shapeshelf.properties.polarity import MODEL_NAME, dipole
from shapeshelf.properties.spectra import expect_spectra
from shapeshelf.report.angles import angle_rows
from shapeshelf.report.calculated import (
    Calculated,
    calculated_of,
    vibrations_of,
    with_calculated_angles,
    with_calculated_lengths,
    with_calculated_moment,
)
from shapeshelf.report.cautions import cautions_of
from shapeshelf.report.centres import centre_reports
from shapeshelf.report.labels import Names, name_everything
from shapeshelf.report.lengths import length_rows
from shapeshelf.report.model import Analysis, Basis, CentreReport, CompoundReport, Value
from shapeshelf.report.rows import ligand_sets
from shapeshelf.report.values import best_value, most_precise
from shapeshelf.structure.describing import (
    crippen_log_p,
    is_organic,
    topological_polar_surface_area,
)
from shapeshelf.structure.formulas import molar_mass_g_mol
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.reading import read_argument, read_structure

SINGLE_ATOM = 1
DIATOMIC = 2


def report_on_entry(entry: Entry, catalogue: Path | None = None) -> CompoundReport:
    """Return the report of a catalogue entry, with its record below ``catalogue`` where it counts.

    Raises StructureError where the structure cannot be read, AnalysisError where it is read
    but lies outside what can be analysed.
    """
    return _report(read_structure(entry.structure), entry, catalogue)


def report_on_structure(text: str) -> CompoundReport:
    """Return the report of a SMILES string or structure file. Raises as ``report_on_entry``."""
    return _report(read_argument(text), None)


def _report(
    molecule: Molecule, entry: Entry | None, catalogue: Path | None = None
) -> CompoundReport:
    model = _analysis(molecule)
    record = _record(model, entry, catalogue)
    found = calculated_of(model, record) if record and _counts(record) else None
    best = replace(model, structure=found.structure, symmetry=found.symmetry) if found else model
    measured = entry.measured if entry else ()
    names = _names(model)
    angles, unknown_angles = angle_rows(model, names, measured)
    lengths, unknown_lengths = length_rows(model, names, measured)
    if found:
        angles, lengths = (
            with_calculated_angles(angles, found),
            with_calculated_lengths(lengths, found),
        )
    centres = centre_reports(best, names, angles)
    polarity = _polarity(model, best)
    organic = is_organic(molecule)
    return CompoundReport(
        id=entry.id if entry else None,
        name=entry.name if entry else molecule.formula,
        entry=entry,
        molecule=molecule,
        lewis=model.lewis,
        structure=best.structure,
        symmetry=best.symmetry,
        centres=centres,
        shape=_overall_shape(molecule, centres),
        point_group=best.symmetry.point_group,
        point_group_basis=Basis(best.structure.basis.value),
        lengths=lengths,
        dipole_model=polarity,
        dipole_debye=_dipole_value(polarity, measured, found),
        spectra=expect_spectra(molecule, model.lewis, model.centres, best.symmetry),
        molar_mass_g_mol=molar_mass_g_mol(molecule),
        topological_polar_surface_area=(
            topological_polar_surface_area(molecule) if organic else None
        ),
        crippen_log_p=crippen_log_p(molecule) if organic else None,
        cautions=cautions_of(molecule, entry),
        unmatched=unknown_angles + unknown_lengths,
        frequencies=vibrations_of(found.record) if found else None,
        calculation=record,
    )


def _record(
    model: Analysis, entry: Entry | None, catalogue: Path | None
) -> CalculationRecord | None:
    """Return the record that belongs to the structure as it is now, failed or not."""
    if entry is None or catalogue is None:
        return None
    return standing_of(catalogue, entry.id, model.molecule, model.lewis.multiplicity).record


def _counts(record: CalculationRecord) -> bool:
    return record.outcome is Outcome.MINIMUM


def _polarity(model: Analysis, best: Analysis) -> DipoleModel:
    """Return the charge model's moment in the model's structure, unless symmetry says otherwise."""
    own, other = (
        dipole(one.molecule, one.lewis, one.centres, one.structure, one.symmetry)
        for one in (model, best)
    )
    return own if own.polar == other.polar else other


def _analysis(molecule: Molecule) -> Analysis:
    if len(molecule.atoms) == SINGLE_ATOM:
        raise AnalysisError(molecule.formula, "a single atom has no shape")
    lewis, centres = analyse(molecule)
    structure = assemble(molecule, lewis, centres)
    elements = [atom.element for atom in molecule.atoms]
    symmetry = find_symmetry(elements, structure.coordinates_angstrom)
    return Analysis(molecule, lewis, centres, structure, symmetry)


def _names(analysis: Analysis) -> Names:
    sets = {
        centre.atom: ligand_sets(analysis.molecule, centre, analysis.symmetry)
        for centre in analysis.centres
    }
    return name_everything(analysis.molecule, analysis.centres, sets)


def _overall_shape(molecule: Molecule, reports: tuple[CentreReport, ...]) -> str | None:
    """The shape of the only centre; two atoms lie on a line; several centres have none."""
    if len(molecule.atoms) == DIATOMIC:
        return "linear"
    return reports[0].shape if len(reports) == 1 else None


def _dipole_value(
    model: DipoleModel, measured: Sequence[Measurement], calculated: Calculated | None
) -> Value | None:
    """The moment with its bases; ``None`` for an ion, which has none to measure."""
    found = [item for item in measured if item.quantity is Quantity.DIPOLE]
    if model.moment_debye is None:
        return None
    value = best_value(
        model.moment_debye, model.uncertainty_debye, most_precise(found), model_name=MODEL_NAME
    )
    return with_calculated_moment(value, calculated) if calculated else value
