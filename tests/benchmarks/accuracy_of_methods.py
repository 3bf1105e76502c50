"""How far the model, GFN2-xTB and PBE0 are from measured angles and dipole moments.

    python tests/benchmarks/accuracy_of_methods.py compute [--most N]
    python tests/benchmarks/accuracy_of_methods.py table
    python tests/benchmarks/accuracy_of_methods.py small [--most N]
    python tests/benchmarks/accuracy_of_methods.py lengths

The first computes with PBE0 what neither ``tests/data/methods/`` nor the demo's records hold,
cheapest first. The second computes GFN2-xTB afresh (a
minute or two), prints the averages and the outliers, and writes ``parity.csv`` of the calculation
room, which the site's page draws. The third computes N molecules afresh with the smaller basis
set, cheapest first, and prints its averages. The fourth holds bond lengths of every record, and of
GFN2-xTB, against ``tests/data/lengths.csv``.
"""

import argparse
import csv
import re
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cache
from itertools import combinations
from pathlib import Path

import numpy as np
from scipy.optimize import linear_sum_assignment

from shapeshelf.calculation.conformers import turning_bonds
from shapeshelf.calculation.jobs import cost_of
from shapeshelf.calculation.keys import settled, structure_key
from shapeshelf.calculation.model import CalculationRecord, Level, Outcome
from shapeshelf.calculation.recipe import calculate
from shapeshelf.calculation.records import read_record, write_record
from shapeshelf.domains.analysis import analyse
from shapeshelf.geometry.vectors import angle_degrees, distance
from shapeshelf.report.building import report_on_structure
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.reading import read_smiles

ROOT = Path(__file__).parent.parent.parent
DATA = ROOT / "tests" / "data"
KEPT = DATA / "methods"
DEMO = ROOT / "compounds" / "records"
PARITY = ROOT / "generator" / "shapeshelf" / "calculation" / "parity.csv"
HEADER = """\
# Written by tests/benchmarks/accuracy_of_methods.py. Measured values:
# angles: tests/data/angles.csv and angles_checked.csv (recalled from memory of the
#   electron-diffraction and microwave literature), degrees; rows marked "crystal" do not count.
# dipoles: tests/data/dipoles.csv and those rows of dipoles_fit.csv that a published table holds
#   (NIST CCCBDB, SRD 101, and others as carried by the package chemicals), rigid molecules only,
#   debye; a moment of nought, which symmetry decides, is left out.
"""
DIPOLES = {
    "dipoles.csv": {"": "NIST CCCBDB"},
    "dipoles_fit.csv": {
        "cccbdb": "NIST CCCBDB",
        "muller": "Muller, in chemicals",
        "poling": "Poling, in chemicals",
    },
}
"""Of each table the sources that count, and what they are called."""
MOST_ATOMS = {Level.DFT: 8, Level.XTB: 12}
APART_DEGREES = 1.0
"""Angles of one kind further apart are two rows."""


@dataclass(frozen=True)
class Measured:
    quantity: str
    name: str
    smiles: str
    of: str
    value: float
    source: str
    counts: bool


def main() -> None:
    """Run the part that is asked for."""
    parser = argparse.ArgumentParser()
    parser.add_argument("part", choices=["compute", "table", "small", "lengths"])
    parser.add_argument("--most", type=int, default=10_000)
    options = parser.parse_args()
    if options.part == "compute":
        compute(options.most)
    elif options.part == "table":
        write_table()
    elif options.part == "small":
        print_small(options.most)
    else:
        print_lengths()


def measured_values() -> list[Measured]:
    """Return every measured value of the tables, angles first."""
    return [*_angles("angles.csv"), *_angles("angles_checked.csv"), *_dipoles()]


def compute(most: int) -> None:
    """Compute the PBE0 records that are missing, cheapest first, ``most`` of them."""
    for molecule in _cheapest_first():
        if most and _record(molecule) is None:
            most -= 1
            record = calculate(molecule, Level.DFT, lambda stage: None)
            write_record(_path(molecule), record)
            print(_path(molecule).stem, record.outcome.value, record.point_group, flush=True)


def print_small(most: int) -> None:
    """Compute ``most`` molecules with PBE0/def2-SVP and print how far they are off."""
    records: dict[str, CalculationRecord] = {}
    for molecule in _cheapest_first():
        if len(records) < most and len(molecule.atoms) > 2:
            record = calculate(molecule, Level.DFT_SMALL, lambda stage: None)
            if _minimum(record):
                records[_digest(molecule)] = record
    errors: dict[str, list[float]] = {"angle": [], "dipole": []}
    for group in _groups(measured_values()):
        molecule = read_smiles(group[0].smiles)
        record = records.get(_digest(molecule))
        if record and group[0].counts:
            errors[group[0].quantity] += [
                found - one.value
                for found, one in zip(_said(molecule, record, group), group, strict=True)
                if found is not None
            ]
    for quantity, found in errors.items():
        print(f"{quantity}: {len(found)} values, {_spread(found)}")


def write_table() -> None:
    """Print the averages and write the rows that the site draws."""
    rows = [_row(group) for group in _groups(measured_values())]
    flat = [row for group in rows for row in group]
    with PARITY.open("w", encoding="utf-8", newline="") as file:
        file.write(HEADER)
        writer = csv.DictWriter(file, list(flat[0]), lineterminator="\n")
        writer.writeheader()
        writer.writerows(flat)
    for quantity in ("angle", "dipole"):
        for most_atoms in (8, 12):
            _print_averages(flat, quantity, most_atoms)


def print_lengths() -> None:
    """Print, for each level, how far calculated bond lengths are from the measured ones."""
    records = [read_record(path) for folder in (DEMO, KEPT) for path in folder.glob("*.json")]
    known = {record.key.digest: record for record in records if _minimum(record)}
    errors: dict[Level, list[tuple[float, str, str]]] = {level: [] for level in Level}
    for row in _table("lengths.csv"):
        molecule = read_smiles(row["smiles"])
        for record in (known.get(_digest(molecule)), _with_xtb(row["smiles"])):
            found = _lengths(molecule, record, row["bond"]) if record else []
            if found and record:
                error = min((x - float(row["length_angstrom"]) for x in found), key=abs)
                errors[record.level].append((error, row["name"], row["bond"]))
    for level, rows in errors.items():
        if rows:
            print(f"{level}: {len(rows)} bonds, {_spread([error for error, *_ in rows])} (Å)")
        for error, name, bond in sorted(rows, key=lambda row: -abs(row[0]))[:6]:
            print(f"    {error:+.3f}  {name}  {bond}")


def _lengths(molecule: Molecule, record: CalculationRecord, bond: str) -> list[float]:
    """Return the calculated lengths of the bonds between two elements, ``S-F`` or ``S=O``."""
    wanted = sorted(re.split("[-=#:]", bond))
    there = settled(molecule)
    points = record.coordinates_angstrom
    return [
        distance(points[one.begin], points[one.end])
        for one in there.bonds
        if sorted(there.atoms[atom].element for atom in (one.begin, one.end)) == wanted
    ]


def _cheapest_first() -> list[Molecule]:
    """Return the molecules of the tables that are small enough, each once."""
    molecules = [read_smiles(smiles) for smiles in {one.smiles for one in measured_values()}]
    fitting = {_digest(m): m for m in molecules if len(m.atoms) <= MOST_ATOMS[Level.DFT]}
    return sorted(fitting.values(), key=lambda m: (cost_of(m, Level.DFT), _digest(m)))


def _angles(name: str) -> Iterator[Measured]:
    for row in _table(name):
        free = "crystal" not in row["note"]
        yield Measured(
            "angle",
            row["name"],
            row["smiles"],
            row["angle"],
            float(row["value_deg"]),
            f"tests/data/{name}",
            free,
        )


def _dipoles() -> Iterator[Measured]:
    seen: set[str] = set()
    for name, sources in DIPOLES.items():
        for row in _table(name):
            source = sources.get(row.get("source", ""))
            molecule = read_smiles(row["smiles"])
            if row["rotors"] != "0" or not source or turning_bonds(molecule):
                continue
            digest, value = _digest(molecule), float(row["dipole_D"])
            if value and digest not in seen:
                yield Measured("dipole", row["name"], row["smiles"], "", value, source, True)
            seen.add(digest)


def _table(name: str) -> list[dict[str, str]]:
    with (DATA / name).open(encoding="utf-8") as file:
        return list(csv.DictReader(line for line in file if not line.startswith("#")))


def _path(molecule: Molecule) -> Path:
    formula = molecule.formula.replace("+", "p").replace("-", "m")
    return KEPT / f"{formula}-{_digest(molecule)[:6]}.json"


def _digest(molecule: Molecule) -> str:
    return structure_key(molecule, analyse(molecule)[0].multiplicity).digest


def _record(molecule: Molecule) -> CalculationRecord | None:
    """Return the PBE0 record of a molecule, from here or from the demo."""
    return read_record(_path(molecule)) or _demo_records().get(_digest(molecule))


@cache
def _demo_records() -> dict[str, CalculationRecord]:
    records = [read_record(path) for path in sorted(DEMO.glob("*.json"))]
    return {one.key.digest: one for one in records if one and one.level is Level.DFT}


def _groups(measured: list[Measured]) -> list[list[Measured]]:
    """Return the values that have to be told apart together: one kind in one molecule."""
    groups: dict[tuple[str, str, str], list[Measured]] = {}
    for one in measured:
        groups.setdefault((one.quantity, one.smiles, one.of), []).append(one)
    return list(groups.values())


def _row(group: list[Measured]) -> list[dict[str, object]]:
    molecule = read_smiles(group[0].smiles)
    records = (_with_xtb(group[0].smiles), _minimum(_record(molecule)))
    columns = [_said(molecule, record, group) for record in records]
    if group[0].quantity == "dipole":
        model = _model_moment(group[0].smiles) * len(group)
    else:
        wanted = [one.value for one in group]
        model = _matched(_model_angles(group[0].smiles, group[0].of), wanted)
    return [
        {
            "quantity": one.quantity,
            "name": one.name,
            "smiles": one.smiles,
            "of": one.of,
            "measured": f"{one.value:g}",
            "model": _text(one.quantity, model[k]),
            "xtb": _text(one.quantity, columns[0][k]),
            "dft": _text(one.quantity, columns[1][k]),
            "atoms": len(molecule.atoms),
            "source": one.source,
            "counts": "yes" if one.counts else "no",
        }
        for k, one in enumerate(group)
    ]


@cache
def _with_xtb(smiles: str) -> CalculationRecord | None:
    molecule = read_smiles(smiles)
    if len(molecule.atoms) > MOST_ATOMS[Level.XTB]:
        return None
    return _minimum(calculate(molecule, Level.XTB, lambda stage: None))


def _minimum(record: CalculationRecord | None) -> CalculationRecord | None:
    return record if record and record.outcome is Outcome.MINIMUM else None


def _said(
    molecule: Molecule, record: CalculationRecord | None, group: list[Measured]
) -> list[float | None]:
    """Return what a record says of the values of one kind in a molecule."""
    if group[0].quantity == "dipole":
        return _moments(record) * len(group)
    return _calculated(molecule, record, group[0].of, [one.value for one in group])


def _spread(errors: list[float]) -> str:
    sizes = np.abs(errors)
    return (
        f"mean {sizes.mean():.3f}, median {np.median(sizes):.3f}, "
        f"68 % within {np.quantile(sizes, 0.68):.3f}, largest {sizes.max():.3f}"
    )


def _moments(record: CalculationRecord | None) -> list[float | None]:
    return [float(np.linalg.norm(record.dipole_debye)) if record and record.dipole_debye else None]


def _model_moment(smiles: str) -> list[float | None]:
    return [report_on_structure(smiles).dipole_model.moment_debye]


def _model_angles(smiles: str, of: str) -> list[float]:
    """Return the model's angles of one kind, as the page has them."""
    report = report_on_structure(smiles)
    return [
        row.degrees.model
        for centre in report.centres
        for row in centre.angles
        if _kind(report.molecule, row.atoms) == _sorted_kind(of) and row.degrees.model is not None
    ]


def _calculated(
    molecule: Molecule, record: CalculationRecord | None, of: str, wanted: list[float]
) -> list[float | None]:
    if record is None:
        return [None] * len(wanted)
    there = settled(molecule)
    points = record.coordinates_angstrom
    found = sorted(
        angle_degrees(points[i], points[centre], points[j])
        for centre in range(len(points))
        for i, j in combinations(there.neighbours(centre), 2)
        if _kind(there, (i, centre, j)) == _sorted_kind(of)
    )
    rows: list[list[float]] = []
    for angle in found:
        if rows and angle - rows[-1][-1] <= APART_DEGREES:
            rows[-1].append(angle)
        else:
            rows.append([angle])
    return _matched([float(np.mean(row)) for row in rows], wanted)


def _matched(found: list[float], wanted: list[float]) -> list[float | None]:
    """Return the found angles nearest to the wanted ones, each used once while they last."""
    if not found:
        return [None] * len(wanted)
    supply = found * -(-len(wanted) // len(found))
    gaps = np.abs(np.subtract.outer(wanted, supply))
    _, taken = linear_sum_assignment(gaps)
    return [supply[k] for k in taken]


def _kind(molecule: Molecule, atoms: tuple[int, int, int]) -> tuple[str, ...]:
    return _sorted_kind("-".join(molecule.atoms[atom].element for atom in atoms))


def _sorted_kind(of: str) -> tuple[str, ...]:
    first, centre, last = of.split("-")
    return (centre, *sorted((first, last)))


def _text(quantity: str, value: float | None) -> str:
    digits = 1 if quantity == "angle" else 2
    return "" if value is None else f"{value:.{digits}f}"


def _print_averages(rows: list[dict[str, object]], quantity: str, most_atoms: int) -> None:
    chosen = [
        row
        for row in rows
        if row["quantity"] == quantity and row["counts"] == "yes" and row["atoms"] <= most_atoms
    ]
    print(f"\n{quantity}, up to {most_atoms} atoms")
    for method in ("model", "xtb", "dft"):
        pairs = [
            (row, float(row[method]) - float(row["measured"])) for row in chosen if row[method]
        ]
        if not pairs:
            continue
        molecules = len({row["smiles"] for row, _ in pairs})
        print(f"  {method:6}{len(pairs):4} values of {molecules:3} molecules: ", end="")
        print(_spread([error for _, error in pairs]))
        for row, error in sorted(pairs, key=lambda pair: -abs(pair[1]))[:8]:
            print(f"         {row['name']:28}{row['of']:10}{row['measured']:>8}{error:+8.2f}")


if __name__ == "__main__":
    main()
