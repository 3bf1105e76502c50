"""Records made by hand, and a catalogue folder of a few small molecules."""

from collections.abc import Callable
from pathlib import Path

import pytest

from shapeshelf.calculation.keys import structure_key
from shapeshelf.calculation.model import CalculationRecord, Level, Mode, Outcome
from shapeshelf.domains.analysis import analyse
from shapeshelf.structure.reading import read_smiles

WATER = ((0.0, 0.757, -0.521), (0.0, -0.757, -0.521), (0.0, 0.0, 0.0656))


@pytest.fixture
def record_of() -> Callable[..., CalculationRecord]:
    """Return a function that makes a record of a SMILES, water's geometry unless told."""

    def make(smiles: str = "O", **changes: object) -> CalculationRecord:
        molecule = read_smiles(smiles)
        values: dict[str, object] = {
            "key": structure_key(molecule, analyse(molecule)[0].multiplicity),
            "level": Level.DFT,
            "method": "PBE0/def2-TZVP",
            "engines": (("pyscf", "2.14.0"),),
            "settings": (("functional", "PBE0"),),
            "outcome": Outcome.MINIMUM,
            "elements": ("H", "H", "O"),
            "coordinates_angstrom": WATER,
            "energy_hartree": -76.377357,
            "dipole_debye": (0.0, 0.0, -1.86),
            "modes": (Mode(1623.4, 81.9), Mode(3852.2, 6.5), Mode(3960.3, 50.2)),
            "point_group": "C2v",
        }
        return CalculationRecord(**{**values, **changes})  # type: ignore[arg-type]

    return make


@pytest.fixture
def folder(tmp_path: Path) -> Callable[[dict[str, str]], Path]:
    """Return a function that writes one entry an id and SMILES, and gives the folder."""

    def make(entries: dict[str, str]) -> Path:
        root = tmp_path / "compounds"
        root.mkdir(exist_ok=True)
        for entry_id, smiles in entries.items():
            text = f"id: {entry_id}\nname: Compound {entry_id}\nstructure: '{smiles}'\n"
            (root / f"{entry_id}.yml").write_text(text, "utf-8")
        return root

    return make
