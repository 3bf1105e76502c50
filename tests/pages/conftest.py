"""Reports made by hand, so that the pages are tested apart from the chemistry."""

from collections.abc import Callable
from dataclasses import replace
from pathlib import Path

import pytest

from shapeshelf.catalogue.model import (
    Catalogue,
    Entry,
    Measurement,
    Protocol,
    Quantity,
    Source,
    SourceKind,
    StructureInput,
)
from shapeshelf.domains.model import (
    Centre,
    Departure,
    Domain,
    DomainKind,
    LewisAtom,
    LewisCount,
    Placement,
    ResonanceForm,
    TraceStep,
)
from shapeshelf.geometry.model import Structure, StructureBasis, Symmetry, SymmetryOperation
from shapeshelf.properties.model import (
    BondPolarity,
    DipoleModel,
    ExpectedSpectra,
    Hybrid,
    Hybridisation,
    ModeSpecies,
    NmrSignal,
)
from shapeshelf.report.model import (
    AngleRow,
    Basis,
    Caution,
    CentreReport,
    CompoundReport,
    LengthRow,
    Value,
)
from shapeshelf.structure.molecule import Atom, Bond, Molecule

IDENTITY = ((1.0, 0.0, 0.0), (0.0, 1.0, 0.0), (0.0, 0.0, 1.0))
XYZ = (
    (0.0, 1.642, 0.1),
    (0.0, 0.0, 0.0),
    (1.2, 0.0, -0.97),
    (-1.2, 0.0, -0.97),
    (0.0, -1.642, 0.1),
)


@pytest.fixture
def sources() -> dict[str, Source]:
    return {
        "handbook": Source(
            "handbook",
            "A handbook",
            "A. Author and B. Other",
            1991,
            SourceKind.RECALLED,
            where="A publisher",
            doi="10.0000/invented",
        )
    }


@pytest.fixture
def sf4(measurement: Measurement) -> CompoundReport:
    """Sulfur tetrafluoride, its values rounded by hand; only their handling is tested."""
    return _sulfur_tetrafluoride(measurement)


@pytest.fixture
def measurement() -> Measurement:
    return Measurement(
        Quantity.ANGLE,
        "F(ax)-S-F(ax)",
        173.1,
        "degree",
        0.5,
        "gas",
        "microwave",
        "handbook",
        None,
        9,
    )


@pytest.fixture
def catalogue_of(tmp_path: Path, sources: dict[str, Source]) -> Callable[..., Catalogue]:
    def make(*reports: CompoundReport) -> Catalogue:
        entries = tuple(report.entry for report in reports if report.entry)
        return Catalogue(tmp_path, entries, sources, {"p1": Protocol("p1", "Gas cell")})

    return make


@pytest.fixture
def renamed() -> Callable[..., CompoundReport]:
    """Return a report under another id and name, with other entry fields."""

    def make(report: CompoundReport, **fields: object) -> CompoundReport:
        assert report.entry is not None
        entry = replace(report.entry, **fields)
        return replace(report, id=entry.id, name=entry.name, entry=entry)

    return make


def _sulfur_tetrafluoride(measurement: Measurement) -> CompoundReport:
    return CompoundReport(
        id="sf4",
        name="Sulfur tetrafluoride",
        entry=_entry(measurement),
        molecule=_molecule(),
        lewis=_lewis(),
        structure=Structure(XYZ, StructureBasis.MODEL, "assembled from the electron-domain model"),
        symmetry=_symmetry(),
        centres=(_centre_report(measurement),),
        shape="see-saw",
        point_group="C2v",
        point_group_basis=Basis.MODEL,
        lengths=(
            _length("S-F(ax)", ((1, 0), (1, 4)), _value(1.64, 0.02)),
            _length("S-F(eq)", ((1, 2), (1, 3)), _value(1.55, 0.02)),
        ),
        dipole_model=_dipole_model(),
        dipole_debye=_value(0.9, 0.4),
        spectra=_spectra(),
        molar_mass_g_mol=108.06,
        topological_polar_surface_area=None,
        crippen_log_p=None,
        cautions=(Caution("H330", "Fatal if inhaled"), Caution(None, "Sets HF free with water")),
    )


def _entry(measurement: Measurement) -> Entry:
    return Entry(
        id="sf4",
        name="Sulfur tetrafluoride",
        structure=StructureInput("FS(F)(F)F", None),
        file=Path("sf4.yml"),
        formerly=("sulfur-four",),
        also=("sulfur(IV) fluoride",),
        cas="7783-60-0",
        code="TB-017",
        kept="Cage 2",
        owner="gas desk",
        tags=("fluoride",),
        start_here="The see-saw everyone meets first",
        hazards=("H330",),
        used_in=("p1",),
        notes="Keep dry",
        measured=(measurement,),
    )


def _molecule() -> Molecule:
    return Molecule(
        atoms=tuple(Atom(element, 0) for element in ("F", "S", "F", "F", "F")),
        bonds=tuple(Bond(1, ligand, 1) for ligand in (0, 2, 3, 4)),
        charge=0,
        multiplicity=None,
        coordinates_angstrom=None,
        tetrahedral_stereo=(),
        double_bond_stereo=(),
        formula="SF4",
        smiles="FS(F)(F)F",
        inchikey="QHMQWEPBXSHHLH-UHFFFAOYSA-N",
        classes=(0, 1, 0, 0, 0),
    )


def _lewis() -> LewisCount:
    fluorine, sulfur = LewisAtom(3, 0, 0), LewisAtom(1, 0, 0)
    return LewisCount(
        atoms=(fluorine, sulfur, fluorine, fluorine, fluorine),
        bond_orders=(1.0,) * 4,
        forms=(ResonanceForm((1,) * 4, (0,) * 5),),
        multiplicity=1,
    )


def _symmetry() -> Symmetry:
    operations = tuple(
        SymmetryOperation(label, IDENTITY, (0, 1, 2, 3, 4))
        for label in ("E", "C2", "sigma", "sigma")
    )
    return Symmetry(
        "C2v", 0.05, operations, 2, False, ((0, 4), (1,), (2, 3)), (0.0, 0.0, 0.0), IDENTITY, XYZ
    )


def _centre_report(measurement: Measurement) -> CentreReport:
    directions = XYZ[:1] + XYZ[2:] + ((0.0, 0.0, 1.0),)
    domains = tuple(Domain(DomainKind.BOND, n, 1.0) for n in (0, 2, 3, 4))
    centre = Centre(
        atom=1,
        element="S",
        label="S1",
        domains=(*domains, Domain(DomainKind.LONE_PAIR)),
        bonded=4,
        lone_pairs=1,
        single_electrons=0,
        notation="AX4E",
        arrangement="trigonal bipyramidal",
        shape="see-saw",
        polyhedral_symbol="SS-4",
        placements=(
            Placement(
                "see-saw", "SS-4", directions, directions, ("ax", "eq", "eq", "ax", "eq"), 9.0
            ),
            Placement("trigonal pyramid of four", None, directions, directions, ("eq",) * 5, 9.2),
        ),
        angles=(),
        departure=Departure("It does as the rule says. Author 1991.", "Author 1991"),
        trace=(TraceStep("R1", "Six valence electrons"), TraceStep("R2", "Five domains")),
    )
    return CentreReport(
        centre=centre,
        atom_label="S",
        ligand_labels={0: "F(ax)", 4: "F(ax)", 2: "F(eq)", 3: "F(eq)"},
        shape="see-saw",
        polyhedral_symbol="SS-4",
        angles=(
            _row("F(ax)-S-F(ax)", (0, 1, 4), 180.0, _measured(measurement)),
            _row("F(eq)-S-F(eq)", (2, 1, 3), 120.0, _value(103.0, 3.1)),
        ),
        hybridisation=Hybridisation(
            1, "sp3d", True, (Hybrid(0, 0.1), Hybrid(4, 0.1), Hybrid(None, 0.5)), None, None
        ),
        deviation=None,
        equivalent=(1,),
    )


def _row(of: str, atoms: tuple[int, int, int], ideal: float, value: Value) -> AngleRow:
    return AngleRow(of, atoms, (atoms,), ideal, value, (of,))


def _length(of: str, members: tuple[tuple[int, int], ...], value: Value) -> LengthRow:
    return LengthRow(of, members[0], members, 1.0, value, (of,))


def _value(number: float, uncertainty: float) -> Value:
    return Value(
        number, uncertainty, Basis.MODEL, number, uncertainty, None, None, None, None, "the model"
    )


def _measured(item: Measurement) -> Value:
    return Value(
        item.value,
        item.uncertainty,
        Basis.MEASURED,
        172.0,
        3.0,
        None,
        None,
        item.value,
        item.uncertainty,
        item.source,
        item,
    )


def _dipole_model() -> DipoleModel:
    bonds = tuple(BondPolarity(1, ligand, 1.4) for ligand in (0, 2, 3, 4))
    return DipoleModel(
        0.9,
        (0.0, 0.0, -0.9),
        0.4,
        True,
        "C2v allows a moment along z",
        (-0.3, 1.2) * 2 + (0.0,),
        bonds,
    )


def _spectra() -> ExpectedSpectra:
    return ExpectedSpectra(
        modes=(ModeSpecies("A1", 1, 4, 2, True, True), ModeSpecies("A2", 1, 1, 0, False, True)),
        infrared_bands=8,
        raman_bands=9,
        coincidences=8,
        infrared_stretches=4,
        raman_stretches=4,
        microwave_axes=("c",),
        nmr=(NmrSignal("19F", (0, 4), "triplet", ("2 F (2J)",)),),
        fluxional_note="One signal at room temperature",
    )
