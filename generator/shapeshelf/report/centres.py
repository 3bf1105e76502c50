"""Everything known of each centre, gathered into one record a centre."""

from collections.abc import Mapping

from shapeshelf.domains.model import Centre
from shapeshelf.geometry.deviation import shape_deviation
from shapeshelf.geometry.model import ShapeDeviation, StructureBasis
from shapeshelf.properties.hybridisation import hybridise
from shapeshelf.reference.shapes import SHAPES
from shapeshelf.report.labels import Names
from shapeshelf.report.model import Analysis, AngleRow, CentreReport

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
    analysis: Analysis, names: Names, angles: Mapping[int, tuple[AngleRow, ...]]
) -> tuple[CentreReport, ...]:
    """Return one report a centre, in atom order."""
    return tuple(_centre_report(analysis, centre, names, angles) for centre in analysis.centres)


def _centre_report(
    analysis: Analysis,
    centre: Centre,
    names: Names,
    angles: Mapping[int, tuple[AngleRow, ...]],
) -> CentreReport:
    molecule, coordinates = analysis.molecule, analysis.structure.coordinates_angstrom
    deviation = shape_deviation(
        coordinates[centre.atom], [coordinates[a] for a in molecule.neighbours(centre.atom)]
    )
    shape, symbol = _shape(analysis, centre, deviation)
    return CentreReport(
        centre=centre,
        atom_label=names.centres[centre.atom],
        ligand_labels=names.ligands[centre.atom],
        shape=shape,
        polyhedral_symbol=symbol,
        angles=angles[centre.atom],
        hybridisation=hybridise(molecule, analysis.lewis, centre, coordinates),
        deviation=deviation,
        equivalent=tuple(
            other.atom
            for other in analysis.centres
            if molecule.classes[other.atom] == molecule.classes[centre.atom]
        ),
    )


def _shape(
    analysis: Analysis, centre: Centre, deviation: ShapeDeviation | None
) -> tuple[str | None, str | None]:
    """Return shape and symbol: the model's, or the polyhedron nearest to other coordinates."""
    if centre.shape is not None or analysis.structure.basis is StructureBasis.MODEL:
        return centre.shape, centre.polyhedral_symbol
    if deviation is None or not deviation.measures:
        return None, None
    symbol, measure = deviation.measures[0]
    if measure > SUPPLIED_SHAPE_LIMIT:
        return None, None
    return SHAPE_OF_SYMBOL.get(symbol), symbol
