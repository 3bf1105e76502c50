"""What a page prints of the quantum-chemistry record: how, which placement wins, conformers."""

from dataclasses import dataclass

from shapeshelf.calculation.model import CalculationRecord, ConformerResult, PlacementResult
from shapeshelf.pages.typesetting import NO_BREAK, number_text


@dataclass(frozen=True, slots=True)
class PlacementLine:
    """One placement that was calculated."""

    shape: str
    energy: str
    wins: bool


@dataclass(frozen=True, slots=True)
class CalculationView:
    """One record in words."""

    method: str
    programs: str
    failure: str
    """Why there is no value; empty where there is one."""
    placements: tuple[PlacementLine, ...]
    conformers: str
    """One sentence; empty for a molecule with one conformer."""
    spin: str
    warnings: tuple[str, ...]
    settings: tuple[tuple[str, str], ...]


def calculation_view(record: CalculationRecord | None) -> CalculationView | None:
    """Return the record as it is printed, ``None`` where there is none."""
    if record is None:
        return None
    return CalculationView(
        method=record.method,
        programs=", ".join(f"{name}{NO_BREAK}{version}" for name, version in record.engines),
        failure=f"{record.outcome.value}: {record.failure}" if record.failure else "",
        placements=tuple(_placement(record, one) for one in record.placements),
        conformers=_conformers(record.conformers) if record.conformers else "",
        spin="" if record.spin_squared is None else number_text(record.spin_squared, 3),
        warnings=record.warnings,
        settings=record.settings,
    )


def _placement(record: CalculationRecord, one: PlacementResult) -> PlacementLine:
    sites = f", {one.sites}" if one.sites else ""
    return PlacementLine(one.shape + sites, _energy(record, one), one.wins)


def _energy(record: CalculationRecord, one: PlacementResult) -> str:
    end = record.placements[one.ends_as]
    if end is not one:
        return f"becomes {end.shape}{', ' + end.sites if end.sites else ''}"
    if one.energy_kj_mol is None:
        return "no minimum found"
    return f"{number_text(one.energy_kj_mol, 1)}{NO_BREAK}kJ/mol"


def _conformers(found: ConformerResult) -> str:
    many = "one conformer" if found.count == 1 else f"{found.count} conformers"
    temperature = number_text(found.temperature_kelvin, 2)
    return (
        f"{many} within {found.window_kj_mol:g}{NO_BREAK}kJ/mol, the lowest "
        f"{found.lowest_share:.0%} at {temperature}{NO_BREAK}K; dipole moment "
        f"{number_text(found.mean_dipole_debye, 2)}{NO_BREAK}D on average, "
        f"{number_text(found.least_dipole_debye, 2)} to "
        f"{number_text(found.most_dipole_debye, 2)}{NO_BREAK}D (GFN2-xTB)"
    )
