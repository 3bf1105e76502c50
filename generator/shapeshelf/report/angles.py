"""The rows of angles at every centre, each with its merged value."""

from collections.abc import Mapping, Sequence

from shapeshelf.catalogue.model import Measurement, Quantity
from shapeshelf.domains.model import Centre
from shapeshelf.geometry.fixed import is_fixed
from shapeshelf.geometry.model import StructureBasis
from shapeshelf.report.labels import Names, angle_label
from shapeshelf.report.matching import Named, kind_of, match
from shapeshelf.report.model import Analysis, AngleRow
from shapeshelf.report.rows import AngleSet, angle_sets
from shapeshelf.report.values import structure_value


def angle_rows(
    analysis: Analysis, names: Names, measured: Sequence[Measurement]
) -> tuple[Mapping[int, tuple[AngleRow, ...]], tuple[Measurement, ...]]:
    """Return the rows of each centre, by its atom, and measured angles that fit no row."""
    sets = [
        (centre, row)
        for centre in analysis.centres
        for row in angle_sets(
            centre,
            names.centres[centre.atom],
            names.ligands[centre.atom],
            analysis.symmetry,
            analysis.structure.coordinates_angstrom,
        )
    ]
    named = [_named(analysis, names, row) for _, row in sets]
    matched, unmatched = match(named, measured, Quantity.ANGLE)
    rows: dict[int, tuple[AngleRow, ...]] = {centre.atom: () for centre in analysis.centres}
    for (centre, row), calls, measurement in zip(sets, named, matched, strict=True):
        rows[centre.atom] += (_row(analysis, centre, row, calls, measurement),)
    return rows, unmatched


def _named(analysis: Analysis, names: Names, row: AngleSet) -> Named:
    mark = row.of[row.of.index(" (") :] if " (" in row.of else ""
    own = dict(enumerate(names.own))
    spelled = [
        angle_label(ends, centre_name, first, last) + mark
        for first, centre, last in row.members
        for ends, centre_name in (
            (names.ligands[centre], names.centres[centre]),
            (own, own[centre]),
        )
    ]
    first = row.members[0]
    return Named(
        labels=tuple(dict.fromkeys((row.of, *spelled))),
        bare="-".join(analysis.molecule.atoms[atom].element for atom in first) + mark,
        centre=first[1],
        kind=kind_of(analysis.molecule.classes, first),
    )


def _row(
    analysis: Analysis,
    centre: Centre,
    row: AngleSet,
    calls: Named,
    measurement: Measurement | None,
) -> AngleRow:
    domain = {frozenset((a.atoms[0], a.atoms[2])): a for a in centre.angles}
    own = [domain[pair] for m in row.members if (pair := frozenset((m[0], m[2]))) in domain]
    own_structure = analysis.structure.basis is StructureBasis.MODEL
    fixed = own_structure and is_fixed(analysis.symmetry, row.members)
    return AngleRow(
        of=row.of,
        atoms=row.members[0],
        members=row.members,
        ideal_degrees=_mean([angle.ideal_degrees for angle in own]),
        degrees=structure_value(
            analysis.structure,
            row.mean_degrees,
            0.0 if fixed else _mean([angle.uncertainty_degrees for angle in own]),
            _mean([angle.model_degrees for angle in own]),
            measurement,
        ),
        labels=calls.labels,
    )


def _mean(values: Sequence[float]) -> float | None:
    return sum(values) / len(values) if values else None
