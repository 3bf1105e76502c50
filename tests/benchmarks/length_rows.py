"""Measured bond lengths, each tied to the bonds of a molecule that it speaks of.

tests/data/lengths.csv names bonds as ``S-F(ax)``: two elements, the bond order between them
(``-`` about 1, ``:`` up to 2, ``=`` from 2, ``#`` from 3), and the site where two kinds differ.
The bonds of ase.data.g2 (L. A. Curtiss et al., J. Chem. Phys. 106 (1997) 1063) are taken from the
molecules without carbon, element pair by element pair where all bonds of a pair have one order.
"""

import csv
import re
from collections import defaultdict
from collections.abc import Iterator
from dataclasses import dataclass
from itertools import combinations
from pathlib import Path

import numpy as np
from ase.build import molecule as ase_molecule

from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.geometry.site_lengths import kind_length_angstrom, length_terms
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.reading import read_smiles

DATA = Path(__file__).parent.parent / "data"
LABEL = re.compile(r"([A-Z][a-z]?)([-:=#])([A-Z][a-z]?)(?:\((\w+)\))?")
ORDERS = {"-": (0.9, 1.05), ":": (1.05, 1.9), "=": (1.9, 2.9), "#": (2.9, 3.1)}


@dataclass(frozen=True, slots=True)
class LengthRow:
    """One measured length, and what the model has for those bonds before its site terms."""

    molecule: str
    bond: str
    measured_angstrom: float
    kind_angstrom: float
    terms: dict[str, float]
    family: str
    """``hydrogen``, ``metal`` or ``main group``."""


def read_length_rows() -> list[LengthRow]:
    """Return the rows of the table and of ase.data.g2."""
    return [*_from_table(), *_from_g2()]


def _from_table() -> Iterator[LengthRow]:
    with (DATA / "lengths.csv").open(encoding="utf-8") as file:
        for row in csv.DictReader(file):
            molecule = read_smiles(row["smiles"])
            lewis, centres = analyse(molecule)
            bonds = _named_bonds(molecule, lewis, centres, row["bond"])
            if not bonds:
                raise ValueError(f"{row['name']} has no bond {row['bond']}")
            measured = float(row["length_angstrom"])
            yield _row(row["name"], row["bond"], measured, bonds, (molecule, lewis, centres))


def _from_g2() -> Iterator[LengthRow]:
    with (DATA / "g2_smiles.csv").open(encoding="utf-8") as file:
        for row in csv.DictReader(file):
            stated = int(row["multiplicity"]) if row["multiplicity"] else None
            molecule = read_smiles(row["smiles"], multiplicity=stated)
            if not any(atom.element == "C" for atom in molecule.atoms):
                lewis, centres = analyse(molecule)
                atoms = ase_molecule(row["name"])
                found = _distances(atoms.get_chemical_symbols(), atoms.positions)
                for pair, bonds in _pairs_of_one_order(molecule, lewis).items():
                    mean = float(np.mean(sorted(found[pair])[: len(bonds)]))
                    label = "-".join(pair)
                    yield _row(row["name"], label, mean, bonds, (molecule, lewis, centres))


def _row(
    name: str,
    label: str,
    measured: float,
    bonds: list[int],
    known: tuple[Molecule, LewisCount, tuple[Centre, ...]],
) -> LengthRow:
    molecule, lewis, centres = known
    terms: defaultdict[str, float] = defaultdict(float)
    weights = length_terms(molecule, lewis, centres)
    for bond in bonds:
        for term, weight in weights[bond].items():
            terms[term] += weight / len(bonds)
    kind = float(np.mean([kind_length_angstrom(molecule, lewis, bond) for bond in bonds]))
    return LengthRow(
        name, label, measured, kind, dict(terms), _family(_elements(molecule, bonds[0]))
    )


def _family(elements: tuple[str, str]) -> str:
    if "H" in elements:
        return "hydrogen"
    groups = [ELEMENTS[element].group for element in elements]
    metal = any(group is None or 3 <= group <= 12 for group in groups)
    return "metal" if metal else "main group"


def _elements(molecule: Molecule, bond: int) -> tuple[str, str]:
    first, last = sorted(
        molecule.atoms[atom].element
        for atom in (molecule.bonds[bond].begin, molecule.bonds[bond].end)
    )
    return first, last


def _named_bonds(
    molecule: Molecule, lewis: LewisCount, centres: tuple[Centre, ...], label: str
) -> list[int]:
    parts = LABEL.fullmatch(label)
    if parts is None:
        raise ValueError(f"no label of a bond: {label}")
    first, mark, last, site = parts.groups()
    low, high = ORDERS[mark]
    return [
        bond
        for bond, order in enumerate(lewis.bond_orders)
        if _elements(molecule, bond) == tuple(sorted((first, last)))
        and low <= order < high
        and (site is None or site == _site_name(molecule, centres, bond))
    ]


def _site_name(molecule: Molecule, centres: tuple[Centre, ...], bond: int) -> str:
    ends = {molecule.bonds[bond].begin, molecule.bonds[bond].end}
    for centre in centres:
        for domain, site in zip(centre.domains, centre.placements[0].sites, strict=True):
            if ends == {centre.atom, domain.neighbour} and site:
                return site
    return ""


def _pairs_of_one_order(molecule: Molecule, lewis: LewisCount) -> dict[tuple[str, str], list[int]]:
    pairs: defaultdict[tuple[str, str], list[int]] = defaultdict(list)
    for bond in range(len(molecule.bonds)):
        pairs[_elements(molecule, bond)].append(bond)
    return {
        pair: bonds
        for pair, bonds in pairs.items()
        if len({round(lewis.bond_orders[bond], 2) for bond in bonds}) == 1
    }


def _distances(elements: list[str], points: np.ndarray) -> dict[tuple[str, str], list[float]]:
    """Distances of each pair of elements; bonded atoms are the nearest of them."""
    found: defaultdict[tuple[str, str], list[float]] = defaultdict(list)
    for i, j in combinations(range(len(elements)), 2):
        first, last = sorted((elements[i], elements[j]))
        found[first, last].append(float(np.linalg.norm(points[i] - points[j])))
    return found
