"""Centres and bonds of one compound with their merged values, measured ones matched by label."""

from collections.abc import Mapping, Sequence

from shapeshelf.catalogue.model import Measurement, Quantity
from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.geometry.deviation import shape_deviation
from shapeshelf.geometry.model import ShapeDeviation, Structure, StructureBasis, Symmetry
from shapeshelf.properties.hybridisation import hybridise
from shapeshelf.reference.shapes import SHAPES
from shapeshelf.report.labels import (
    angle_label,
    bond_ends,
    centre_names,
    ligand_names,
    same_label,
)
from shapeshelf.report.model import AngleRow, CentreReport, LengthRow, Value
from shapeshelf.report.rows import AngleSet, BondSet, angle_sets, bond_sets, ligand_sets
from shapeshelf.report.values import best_value, most_precise
from shapeshelf.structure.molecule import Molecule

LENGTH_UNCERTAINTY_ANGSTROM = 0.03
"""68 % half-width of the model's bond lengths against the geometries of ase.data.g2; measured
by ``tests/benchmarks/``."""
SUPPLIED_SHAPE_LIMIT = 3.0
"""Largest continuous shape measure at which supplied coordinates still name a polyhedron;
below it chemists speak of a distorted one (common practice, no source)."""


SHAPE_OF_SYMBOL = {
    name.polyhedral_symbol: name.shape
    for name in reversed(SHAPES.values())
    if name.polyhedral_symbol
}
"""The first name of each symbol stands: it is the one without lone pairs."""


def centre_reports(
    molecule: Molecule,
    lewis: LewisCount,
    centres: Sequence[Centre],
    structure: Structure,
    symmetry: Symmetry,
    measured: Sequence[Measurement],
) -> tuple[CentreReport, ...]:
    """Return one report a centre, in atom order."""
    names = centre_names(molecule, centres)
    reports = []
    for centre in centres:
        sets = ligand_sets(molecule, centre, symmetry)
        ligands = ligand_names(molecule, centre, names, sets)
        deviation = _deviation(molecule, centre, structure)
        shape, symbol = _shape(centre, structure, deviation)
        rows = angle_sets(
            centre, names[centre.atom], ligands, symmetry, structure.coordinates_angstrom
        )
        reports.append(
            CentreReport(
                centre=centre,
                atom_label=names[centre.atom],
                ligand_labels=ligands,
                shape=shape,
                polyhedral_symbol=symbol,
                angles=tuple(
                    _angle_row(row, centre, names[centre.atom], ligands, structure, measured)
                    for row in rows
                ),
                hybridisation=hybridise(molecule, lewis, centre, structure.coordinates_angstrom),
                deviation=deviation,
                equivalent=tuple(
                    other.atom
                    for other in centres
                    if molecule.classes[other.atom] == molecule.classes[centre.atom]
                ),
            )
        )
    return tuple(reports)


def length_rows(
    molecule: Molecule,
    lewis: LewisCount,
    reports: Sequence[CentreReport],
    structure: Structure,
    symmetry: Symmetry,
    measured: Sequence[Measurement],
) -> tuple[LengthRow, ...]:
    """Return one row a set of equivalent bonds."""
    names = {report.centre.atom: report.atom_label for report in reports}
    ligands = {report.centre.atom: report.ligand_labels for report in reports}
    ends = {
        index: bond_ends(molecule, bond.begin, bond.end, names, ligands)
        for index, bond in enumerate(molecule.bonds)
    }
    rows = bond_sets(molecule, ends, symmetry, structure.coordinates_angstrom)
    return tuple(_length_row(row, molecule, lewis, ends, structure, measured) for row in rows)


def unmatched_measurements(
    reports: Sequence[CentreReport],
    lengths: Sequence[LengthRow],
    measured: Sequence[Measurement],
) -> tuple[Measurement, ...]:
    """Return measured angles and lengths that no row of the compound has taken up."""
    labels = [label for report in reports for row in report.angles for label in row.labels]
    labels += [label for row in lengths for label in row.labels]
    return tuple(
        item
        for item in measured
        if item.quantity in (Quantity.ANGLE, Quantity.LENGTH)
        and not any(same_label(item.of or "", label) for label in labels)
    )


def _deviation(molecule: Molecule, centre: Centre, structure: Structure) -> ShapeDeviation | None:
    xyz = structure.coordinates_angstrom
    neighbours = molecule.neighbours(centre.atom)
    return shape_deviation(xyz[centre.atom], [xyz[atom] for atom in neighbours])


def _shape(
    centre: Centre, structure: Structure, deviation: ShapeDeviation | None
) -> tuple[str | None, str | None]:
    """Return shape and symbol: the model's, or the nearest polyhedron to supplied coordinates."""
    if centre.shape is not None or structure.basis is not StructureBasis.SUPPLIED:
        return centre.shape, centre.polyhedral_symbol
    if deviation is None or not deviation.measures:
        return None, None
    symbol, measure = deviation.measures[0]
    if measure > SUPPLIED_SHAPE_LIMIT:
        return None, None
    return SHAPE_OF_SYMBOL[symbol], symbol


def _angle_row(
    row: AngleSet,
    centre: Centre,
    centre_name: str,
    ligands: Mapping[int, str],
    structure: Structure,
    measured: Sequence[Measurement],
) -> AngleRow:
    domain = {frozenset((a.atoms[0], a.atoms[2])): a for a in centre.angles}
    own = [domain[pair] for m in row.members if (pair := frozenset((m[0], m[2]))) in domain]
    labels = _all_labels(row, centre_name, ligands)
    found = [
        item
        for item in measured
        if item.quantity is Quantity.ANGLE
        and any(same_label(item.of or "", label) for label in labels)
    ]
    return AngleRow(
        of=row.of,
        atoms=row.members[0],
        members=row.members,
        ideal_degrees=_mean([angle.ideal_degrees for angle in own]),
        degrees=_value(
            row.mean_degrees,
            _mean([angle.uncertainty_degrees for angle in own]),
            _mean([angle.model_degrees for angle in own]),
            structure,
            most_precise(found),
        ),
        labels=labels,
    )


def _all_labels(row: AngleSet, centre_name: str, ligands: Mapping[int, str]) -> tuple[str, ...]:
    """Return every spelling that means this row: any member's label, with the row's mark."""
    mark = row.of[row.of.index(" (") :] if " (" in row.of else ""
    spelled = (angle_label(ligands, centre_name, m[0], m[2]) + mark for m in row.members)
    return tuple(dict.fromkeys((row.of, *spelled)))


def _length_row(
    row: BondSet,
    molecule: Molecule,
    lewis: LewisCount,
    ends: Mapping[int, tuple[str, str]],
    structure: Structure,
    measured: Sequence[Measurement],
) -> LengthRow:
    labels = tuple(dict.fromkeys("-".join(ends[index]) for index in row.members))
    found = [
        item
        for item in measured
        if item.quantity is Quantity.LENGTH
        and any(same_label(item.of or "", label) for label in labels)
    ]
    members = tuple((molecule.bonds[i].begin, molecule.bonds[i].end) for i in row.members)
    return LengthRow(
        of=row.of,
        atoms=members[0],
        members=members,
        bond_order=lewis.bond_orders[row.members[0]],
        angstrom=_value(
            row.mean_angstrom,
            LENGTH_UNCERTAINTY_ANGSTROM,
            None,
            structure,
            most_precise(found),
        ),
        labels=labels,
    )


def _value(
    in_structure: float,
    uncertainty: float | None,
    domain_model: float | None,
    structure: Structure,
    measurement: Measurement | None,
) -> Value:
    """Merge the bases; what the structure shows is the model's unless it was supplied."""
    if structure.basis is StructureBasis.SUPPLIED:
        return best_value(
            domain_model,
            uncertainty if domain_model is not None else None,
            measurement,
            supplied=in_structure,
        )
    return best_value(in_structure, uncertainty, measurement)


def _mean(values: Sequence[float]) -> float | None:
    return sum(values) / len(values) if values else None
