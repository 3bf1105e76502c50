"""GFN2-xTB on the rows the domain model is fitted on: the same angles, the same measures.

    python tests/benchmarks/compare_with_xtb.py

Needs the PyPI packages ``tblite`` and ``ase``. Every molecule is optimised from the structure
that Shapeshelf assembles; where that fails to converge the row is left out for both and counted.
"""

import numpy as np
from angle_rows import FITTED_ON, AngleRow, read_rows
from ase import Atoms
from ase.optimize import BFGS
from fit_domain_model import cross_validated, summary
from tblite.ase import TBLite

from shapeshelf.domains.analysis import analyse
from shapeshelf.domains.parameters import FITTED, Parameters
from shapeshelf.geometry.assembly import assemble
from shapeshelf.structure.reading import read_smiles

FORCE_EV_ANGSTROM = 0.005
STEPS = 500
SHAKE_ANGSTROM = 0.01


def main() -> None:
    """Optimise every molecule and print both models' errors on the same rows."""
    rows = read_rows(FITTED_ON)
    names = tuple(Parameters.__dataclass_fields__)
    held_back = cross_validated(rows, FITTED, names)[2]
    optimised: dict[str, Atoms | None] = {}
    for row in rows:
        if row.smiles not in optimised:
            optimised[row.smiles] = optimise(row.smiles)
    kept = [k for k, row in enumerate(rows) if optimised[row.smiles] is not None]
    errors = np.array([error_degrees(rows[k], optimised[rows[k].smiles]) for k in kept])
    print(f"{len(rows) - len(kept)} rows without a converged structure")
    print("GFN2-xTB                      ", summary(errors))
    print("domain model, cross-validated ", summary(held_back[kept]))
    for k in np.argsort(-np.abs(errors))[:10]:
        print(f"    {rows[kept[k]].molecule:10}{rows[kept[k]].of:12}{errors[k]:+.1f}")


def optimise(smiles: str) -> Atoms | None:
    """Return the structure that GFN2-xTB relaxes to, or ``None`` where it does not converge."""
    molecule = read_smiles(smiles)
    lewis, centres = analyse(molecule)
    start = np.array(assemble(molecule, lewis, centres).coordinates_angstrom)
    # Shaken, so that a symmetric start does not end on a saddle.
    start += SHAKE_ANGSTROM * np.random.default_rng(0).normal(size=start.shape)
    atoms = Atoms([atom.element for atom in molecule.atoms], start)
    atoms.calc = TBLite(
        method="GFN2-xTB",
        charge=molecule.charge,
        multiplicity=lewis.multiplicity,
        verbosity=0,
    )
    try:
        done = BFGS(atoms, logfile=None).run(fmax=FORCE_EV_ANGSTROM, steps=STEPS)
    except RuntimeError:
        return None
    return atoms if done else None


def error_degrees(row: AngleRow, atoms: Atoms) -> float:
    """Return model minus measured for the angle that the domain model is tried on."""
    return float(atoms.get_angle(*row.atoms)) - row.measured_degrees


if __name__ == "__main__":
    main()
