"""The rows of bond lengths, each with its merged value."""

from collections.abc import Sequence

from shapeshelf.catalogue.model import Measurement, Quantity
from shapeshelf.domains.graph import is_d_or_f_block
from shapeshelf.report.labels import Names, bond_label
from shapeshelf.report.matching import Named, kind_of, match
from shapeshelf.report.model import Analysis, LengthRow
from shapeshelf.report.rows import BondSet, bond_sets
from shapeshelf.report.values import structure_value

FORCE_FIELD = "MMFF94s"
FORCE_FIELD_ANGSTROM = 0.01
"""68 % half-width of a force field's bond lengths, as ``tests/benchmarks/lengths_of_the_demo.py``
measures it against the demo's measured bonds."""
HYDROGEN_ANGSTROM = 0.02
MAIN_GROUP_ANGSTROM = 0.03
METAL_ANGSTROM = 0.05
"""68 % half-widths of the model's own bond lengths, as ``tests/benchmarks/fit_bond_lengths.py``
measures them on bonds held back from the fit: to hydrogen, to a metal of the d or f block, and
all others. The numbers were held back, the forms of the terms were not: they were chosen with
the whole table in view, so bonds of a kind not in it may be off by more. Of the demo's bonds,
most of which are in the table, 68 % are within 0.015 Å."""


def length_rows(
    analysis: Analysis, names: Names, measured: Sequence[Measurement]
) -> tuple[tuple[LengthRow, ...], tuple[Measurement, ...]]:
    """Return one row a set of equivalent bonds, and measured lengths that fit no row."""
    molecule = analysis.molecule
    labels = [bond_label(molecule, names, bond.begin, bond.end) for bond in molecule.bonds]
    sets = bond_sets(molecule, labels, analysis.symmetry, analysis.structure.coordinates_angstrom)
    named = [_named(analysis, names, labels, row) for row in sets]
    matched, unmatched = match(named, measured, Quantity.LENGTH)
    rows = tuple(
        _row(analysis, row, calls, measurement)
        for row, calls, measurement in zip(sets, named, matched, strict=True)
    )
    return rows, unmatched


def _named(analysis: Analysis, names: Names, labels: Sequence[str], row: BondSet) -> Named:
    bonds = [analysis.molecule.bonds[index] for index in row.members]
    spelled = [labels[index] for index in row.members]
    spelled += [f"{names.own[bond.begin]}-{names.own[bond.end]}" for bond in bonds]
    ends = (bonds[0].begin, bonds[0].end)
    return Named(
        labels=tuple(dict.fromkeys((row.of, *spelled))),
        bare="-".join(analysis.molecule.atoms[atom].element for atom in ends),
        centre=min(ends, key=lambda atom: (atom not in names.centres, atom)),
        kind=kind_of(analysis.molecule.classes, ends),
    )


def _row(
    analysis: Analysis, row: BondSet, calls: Named, measurement: Measurement | None
) -> LengthRow:
    bonds = [analysis.molecule.bonds[index] for index in row.members]
    members = tuple((bond.begin, bond.end) for bond in bonds)
    return LengthRow(
        of=row.of,
        atoms=members[0],
        members=members,
        bond_order=analysis.lewis.bond_orders[row.members[0]],
        angstrom=structure_value(
            analysis.structure,
            row.mean_angstrom,
            _half_width_angstrom(analysis, members[0]),
            None,
            measurement,
        ),
        labels=calls.labels,
    )


def _half_width_angstrom(analysis: Analysis, ends: tuple[int, int]) -> float:
    if FORCE_FIELD in analysis.structure.method:
        return FORCE_FIELD_ANGSTROM
    elements = [analysis.molecule.atoms[atom].element for atom in ends]
    if "H" in elements:
        return HYDROGEN_ANGSTROM
    return METAL_ANGSTROM if any(map(is_d_or_f_block, elements)) else MAIN_GROUP_ANGSTROM
