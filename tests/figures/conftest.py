"""Reports made by hand from plain geometry, so that figures are tested without the chemistry."""

from collections.abc import Callable, Sequence
from itertools import combinations

import numpy as np
import pytest

from shapeshelf.domains.model import (
    Centre,
    Domain,
    DomainKind,
    LewisAtom,
    LewisCount,
    Placement,
    ResonanceForm,
)
from shapeshelf.geometry.model import Structure, StructureBasis
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.properties.model import DipoleModel, ExpectedSpectra
from shapeshelf.report.model import (
    AngleRow,
    Basis,
    CentreReport,
    CompoundReport,
    LengthRow,
    Value,
)
from shapeshelf.structure.molecule import Atom, Bond, Molecule

ReportMaker = Callable[..., CompoundReport]


def value(number: float, basis: Basis = Basis.MODEL, plus_minus: float | None = None) -> Value:
    """Return a value that rests on ``basis`` alone, with the model's beside it."""
    return Value(
        value=number,
        uncertainty=plus_minus,
        basis=basis,
        model=number,
        model_uncertainty=1.5,
        calculated=number if basis is Basis.CALCULATED else None,
        calculated_uncertainty=None,
        measured=number if basis is Basis.MEASURED else None,
        measured_uncertainty=plus_minus if basis is Basis.MEASURED else None,
        source=None,
    )


def make_report(
    name: str,
    centre: str,
    ligands: Sequence[tuple[str, float, Sequence[float], float]],
    pairs: Sequence[Sequence[float]] = (),
    charge: int = 0,
    shape: str = "see-saw",
    dipole: float | None = 0.6,
) -> CompoundReport:
    """Return the report of one centre with ligands (element, length, direction, bond order)."""
    elements = [centre] + [ligand[0] for ligand in ligands]
    unit = [np.array(ligand[2]) / np.linalg.norm(ligand[2]) for ligand in ligands]
    xyz = [np.zeros(3)] + [ligand[1] * way for ligand, way in zip(ligands, unit, strict=True)]
    symmetry = find_symmetry(elements, np.array(xyz))
    count = len(ligands)
    molecule = Molecule(
        atoms=tuple(Atom(element, charge if element == centre else 0) for element in elements),
        bonds=tuple(
            Bond(0, index + 1, max(1, round(ligand[3]))) for index, ligand in enumerate(ligands)
        ),
        charge=charge,
        multiplicity=None,
        coordinates_angstrom=None,
        tetrahedral_stereo=(),
        double_bond_stereo=(),
        formula=centre + "".join(elements[1:]),
        smiles="",
        inchikey=None,
        classes=tuple(range(count + 1)),
    )
    ways = (*(tuple(way) for way in unit), *(tuple(np.array(p) / np.linalg.norm(p)) for p in pairs))
    record = Centre(
        atom=0,
        element=centre,
        label=centre + "1",
        domains=(
            *(Domain(DomainKind.BOND, i + 1, ligands[i][3]) for i in range(count)),
            *(Domain(DomainKind.LONE_PAIR) for _ in pairs),
        ),
        bonded=count,
        lone_pairs=len(pairs),
        single_electrons=0,
        notation=f"AX{count}",
        arrangement=None,
        shape=shape,
        polyhedral_symbol="SS-4",
        placements=(Placement(shape, None, ways, ways, ("",) * len(ways), 0.0),),
        angles=(),
        departure=None,
        trace=(),
    )
    coordinates = tuple(tuple(float(x) for x in row) for row in symmetry.coordinates_angstrom)
    structure = Structure(coordinates, StructureBasis.MODEL, "electron-domain model")
    return CompoundReport(
        id=name.lower().replace(" ", "-"),
        name=name,
        entry=None,
        molecule=molecule,
        lewis=LewisCount(
            atoms=(
                LewisAtom(len(pairs), 0, charge),
                *(LewisAtom(0 if ligand[0] == "H" else 3, 0, 0) for ligand in ligands),
            ),
            bond_orders=tuple(ligand[3] for ligand in ligands),
            forms=(
                ResonanceForm(
                    tuple(max(1, round(ligand[3])) for ligand in ligands),
                    (charge,) + (0,) * count,
                ),
            ),
            multiplicity=1,
        ),
        structure=structure,
        symmetry=symmetry,
        centres=(
            CentreReport(
                centre=record,
                atom_label=centre,
                ligand_labels={i + 1: ligands[i][0] for i in range(count)},
                shape=shape,
                polyhedral_symbol="SS-4",
                angles=tuple(_angle_rows(np.array(coordinates), elements)),
                hybridisation=None,
                deviation=None,
                equivalent=(0,),
            ),
        ),
        shape=shape,
        point_group=symmetry.point_group,
        point_group_basis=Basis.MODEL,
        lengths=tuple(_length_rows(np.array(coordinates), elements)),
        dipole_model=DipoleModel(
            dipole,
            tuple(dipole * x for x in symmetry.axes[2]) if dipole else None,
            0.3,
            bool(dipole),
            "",
            (0.0,) * (count + 1),
            (),
        ),
        dipole_debye=value(dipole) if dipole is not None and not charge else None,
        spectra=ExpectedSpectra((), 0, 0, 0, 0, 0, (), (), None),
        molar_mass_g_mol=100.0,
        topological_polar_surface_area=None,
        crippen_log_p=None,
        cautions=(),
    )


def _angle_rows(xyz: np.ndarray, elements: list[str]) -> list[AngleRow]:
    rows: dict[tuple[str, int], list[tuple[tuple[int, int, int], float]]] = {}
    for a, b in combinations(range(1, len(xyz)), 2):
        one, other = xyz[a] - xyz[0], xyz[b] - xyz[0]
        cosine = one @ other / np.linalg.norm(one) / np.linalg.norm(other)
        angle = float(np.degrees(np.arccos(np.clip(cosine, -1, 1))))
        names = "-".join([elements[a], elements[0], elements[b]])
        rows.setdefault((names, round(angle)), []).append(((a, 0, b), angle))
    return [
        AngleRow(key[0], m[0][0], tuple(t for t, _ in m), float(key[1]), value(m[0][1]), (key[0],))
        for key, m in rows.items()
    ]


def _length_rows(xyz: np.ndarray, elements: list[str]) -> list[LengthRow]:
    rows: dict[tuple[str, int], list[tuple[tuple[int, int], float]]] = {}
    for a in range(1, len(xyz)):
        length = float(np.linalg.norm(xyz[a] - xyz[0]))
        rows.setdefault((f"{elements[0]}-{elements[a]}", round(length * 200)), []).append(
            ((0, a), length)
        )
    return [
        LengthRow(key[0], m[0][0], tuple(t for t, _ in m), 1.0, value(m[0][1]), (key[0],))
        for key, m in rows.items()
    ]


def _ring(count: int, height: float = 0.0, start: float = 0.0) -> list[tuple[float, float, float]]:
    turns = [start + 2 * np.pi * k / count for k in range(count)]
    return [(float(np.cos(t)), float(np.sin(t)), height) for t in turns]


def _polar(degrees: float, turn: float) -> tuple[float, float, float]:
    t, p = np.radians(degrees), np.radians(turn)
    return (float(np.sin(t) * np.cos(p)), float(np.sin(t) * np.sin(p)), float(np.cos(t)))


UP, DOWN = (0.0, 0.0, 1.0), (0.0, 0.0, -1.0)
TETRAHEDRON = [(1, 1, 1), (-1, -1, 1), (-1, 1, -1), (1, -1, -1)]


def hand_made() -> dict[str, CompoundReport]:
    """Return one report for each shape; lengths and angles are only plausible."""
    f = lambda ways, length=1.55, e="F", order=1.0: [(e, length, way, order) for way in ways]  # noqa: E731
    seesaw = [("F", 1.646, _polar(93.5, 0), 1.0), ("F", 1.646, _polar(93.5, 180), 1.0)]
    seesaw += [("F", 1.545, _polar(129.2, 90), 1.0), ("F", 1.545, _polar(129.2, 270), 1.0)]
    tee = [("F", 1.698, _polar(87.5, 0), 1.0), ("F", 1.698, _polar(87.5, 180), 1.0)]
    tee += [("F", 1.598, UP, 1.0)]
    five = [("F", 1.577, UP, 1.0), ("F", 1.577, DOWN, 1.0)]
    five += f(_ring(3), 1.534)
    square = [("F", 1.69, UP, 1.0), *f([_polar(84.8, 90 * k) for k in range(4)], 1.77)]
    return {
        "sf4": make_report("Sulfur tetrafluoride", "S", seesaw, [UP], shape="see-saw"),
        "h2o": make_report(
            "Water",
            "O",
            f([_polar(127.7, 0), _polar(127.7, 180)], 0.958, "H"),
            [_polar(55, 90), _polar(55, 270)],
            shape="bent",
            dipole=1.855,
        ),
        "nh3": make_report(
            "Ammonia",
            "N",
            f([_polar(112.1, 120 * k) for k in range(3)], 1.012, "H"),
            [UP],
            shape="trigonal pyramidal",
            dipole=1.47,
        ),
        "clf3": make_report(
            "Chlorine trifluoride", "Cl", tee, [_polar(120, 90), _polar(120, 270)], shape="T-shaped"
        ),
        "sf6": make_report(
            "Sulfur hexafluoride", "S", f([UP, DOWN, *_ring(4)], 1.561), (), 0, "octahedral", 0.0
        ),
        "pf5": make_report(
            "Phosphorus pentafluoride", "P", five, (), 0, "trigonal bipyramidal", 0.0
        ),
        "brf5": make_report(
            "Bromine pentafluoride", "Br", square, [DOWN], 0, "square pyramidal", 1.5
        ),
        "bf3": make_report(
            "Boron trifluoride", "B", f(_ring(3), 1.307), (), 0, "trigonal planar", 0.0
        ),
        "nitrate": make_report(
            "Nitrate ion", "N", f(_ring(3), 1.24, "O", 4 / 3), (), -1, "trigonal planar", None
        ),
        "cf4": make_report(
            "Tetrafluoromethane", "C", f(TETRAHEDRON, 1.323), (), 0, "tetrahedral", 0.0
        ),
        "xef4": make_report(
            "Xenon tetrafluoride", "Xe", f(_ring(4), 1.953), [UP, DOWN], 0, "square planar", 0.0
        ),
        "xef2": make_report(
            "Xenon difluoride", "Xe", f([UP, DOWN], 1.977), _ring(3), 0, "linear", 0.0
        ),
        "if7": make_report(
            "Iodine heptafluoride",
            "I",
            f([UP, DOWN, *_ring(5)], 1.83),
            (),
            0,
            "pentagonal bipyramidal",
            0.0,
        ),
    }


@pytest.fixture(scope="session")
def reports() -> dict[str, CompoundReport]:
    """Reports of one centre each, from two to seven ligands, by a short name."""
    return hand_made()
