"""One compound, worked out once: from an entry or a bare structure to the frozen report.

Order of work: structure read and normalised; electrons counted and centres analysed; the
molecule assembled (supplied coordinates stand as they are); symmetry; properties; then every
number merged with what was measured and what was calculated.
"""

from shapeshelf.catalogue.model import Entry, Quantity
from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.errors import AnalysisError
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.model import Structure, Symmetry
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.properties.model import DipoleModel
from shapeshelf.properties.polarity import dipole
from shapeshelf.properties.spectra import expect_spectra
from shapeshelf.report.cautions import cautions_of
from shapeshelf.report.centres import centre_reports, length_rows, unmatched_measurements
from shapeshelf.report.model import Basis, CentreReport, CompoundReport, Value
from shapeshelf.report.values import best_value, most_precise
from shapeshelf.structure.describing import (
    crippen_log_p,
    is_organic,
    topological_polar_surface_area,
)
from shapeshelf.structure.formulas import molar_mass_g_mol
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.reading import read_argument, read_structure

CHARGE_MODEL = "charge model"
SINGLE_ATOM = 1
DIATOMIC = 2


def report_on_entry(entry: Entry) -> CompoundReport:
    """Return the report of a catalogue entry.

    Raises StructureError where the structure cannot be read, AnalysisError where it is read
    but lies outside what can be analysed.
    """
    return _report(read_structure(entry.structure), entry)


def report_on_structure(text: str) -> CompoundReport:
    """Return the report of a SMILES string or structure file. Raises as ``report_on_entry``."""
    return _report(read_argument(text), None)


def _report(molecule: Molecule, entry: Entry | None) -> CompoundReport:
    if len(molecule.atoms) == SINGLE_ATOM:
        raise AnalysisError(molecule.formula, "a single atom has no shape")
    lewis, centres = analyse(molecule)
    structure = assemble(molecule, lewis, centres)
    symmetry = find_symmetry(
        [atom.element for atom in molecule.atoms], structure.coordinates_angstrom
    )
    return _complete(molecule, entry, lewis, centres, structure, symmetry)


def _complete(
    molecule: Molecule,
    entry: Entry | None,
    lewis: LewisCount,
    centres: tuple[Centre, ...],
    structure: Structure,
    symmetry: Symmetry,
) -> CompoundReport:
    measured = entry.measured if entry else ()
    reports = centre_reports(molecule, lewis, centres, structure, symmetry, measured)
    lengths = length_rows(molecule, lewis, reports, structure, symmetry, measured)
    dipole_model = dipole(molecule, lewis, centres, structure, symmetry)
    organic = is_organic(molecule)
    return CompoundReport(
        id=entry.id if entry else None,
        name=entry.name if entry else molecule.formula,
        entry=entry,
        molecule=molecule,
        lewis=lewis,
        structure=structure,
        symmetry=symmetry,
        centres=reports,
        shape=_overall_shape(molecule, reports),
        point_group=symmetry.point_group,
        point_group_basis=_basis(structure),
        lengths=lengths,
        dipole_model=dipole_model,
        dipole_debye=_dipole_value(dipole_model, entry),
        spectra=expect_spectra(molecule, lewis, centres, symmetry),
        molar_mass_g_mol=molar_mass_g_mol(molecule),
        topological_polar_surface_area=(
            topological_polar_surface_area(molecule) if organic else None
        ),
        crippen_log_p=crippen_log_p(molecule) if organic else None,
        cautions=cautions_of(molecule, entry),
        unmatched=unmatched_measurements(reports, lengths, measured),
    )


def _overall_shape(molecule: Molecule, reports: tuple[CentreReport, ...]) -> str | None:
    """The shape of the only centre; two atoms lie on a line; several centres have none."""
    if len(molecule.atoms) == DIATOMIC:
        return "linear"
    return reports[0].shape if len(reports) == 1 else None


def _basis(structure: Structure) -> Basis:
    return Basis(structure.basis.value)


def _dipole_value(model: DipoleModel, entry: Entry | None) -> Value | None:
    """The moment with its bases; ``None`` for an ion, which has none to measure."""
    found = [item for item in (entry.measured if entry else ()) if item.quantity is Quantity.DIPOLE]
    if model.moment_debye is None:
        return None
    return best_value(
        model.moment_debye, model.uncertainty_debye, most_precise(found), model_name=CHARGE_MODEL
    )
