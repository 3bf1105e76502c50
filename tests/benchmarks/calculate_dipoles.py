"""Compute dipole moment vectors at PBE0/def2-SVPD for the fit of the dipole model.

    python tests/benchmarks/calculate_dipoles.py < list of SMILES, one a line

Appends to tests/data/dipoles_calculated.jsonl one line a molecule: SMILES, InChIKey, the model
structure (angstrom) and the moment computed there (debye, positive to negative). Molecules that
stand there already, ions, and molecules whose symmetry forbids a moment are passed over. Needs
PySCF (pip install pyscf); seconds to minutes a molecule.

Method: PBE0 (C. Adamo and V. Barone, J. Chem. Phys. 110 (1999) 6158) in def2-SVPD (D. Rappoport
and F. Furche, J. Chem. Phys. 133 (2010) 134105), density fitting; both recalled from memory.
"""

import json
import sys
from pathlib import Path

import numpy as np
from pyscf import dft, gto, lib

from shapeshelf.domains.analysis import analyse
from shapeshelf.errors import ShapeshelfError
from shapeshelf.geometry.assembly import assemble
from shapeshelf.geometry.symmetry import find_symmetry
from shapeshelf.properties.polarity import symmetry_projection
from shapeshelf.structure.reading import read_smiles

TABLE = Path(__file__).parents[1] / "data" / "dipoles_calculated.jsonl"
BASIS = "def2-svpd"
WITH_CORE_POTENTIAL = 36
"""def2 replaces the core electrons of the elements after krypton."""


def main():
    lib.num_threads(1)
    known = {json.loads(line).get("inchikey") for line in TABLE.read_text().splitlines()}
    with TABLE.open("a", encoding="utf-8") as table:
        for smiles in sys.stdin.read().split():
            try:
                record = computed(smiles, known)
            except ShapeshelfError as problem:
                print(f"{smiles}: {problem}", file=sys.stderr)
                continue
            if record:
                known.add(record["inchikey"])
                print(json.dumps(record), file=table, flush=True)


def computed(smiles, known):
    """Return the record of one molecule, or None where there is nothing to compute."""
    molecule = read_smiles(smiles)
    if molecule.charge or molecule.inchikey in known:
        return None
    lewis, centres = analyse(molecule)
    elements = [atom.element for atom in molecule.atoms]
    xyz = assemble(molecule, lewis, centres).coordinates_angstrom
    if np.abs(symmetry_projection(find_symmetry(elements, xyz))).max() < 1e-6:
        return None
    moment = moment_debye(elements, xyz, lewis.multiplicity)
    if moment is None:
        print(f"{smiles}: not converged", file=sys.stderr)
        return None
    return {
        "smiles": smiles,
        "inchikey": molecule.inchikey,
        "xyz": np.round(xyz, 4).tolist(),
        "dipole": np.round(moment, 4).tolist(),
    }


def moment_debye(elements, xyz, multiplicity):
    """Return the vector from positive to negative: chemists' sense, the opposite of physicists'."""
    molecule = gto.M(
        atom=list(zip(elements, xyz, strict=True)),
        basis=BASIS,
        ecp={e: BASIS for e in set(elements) if gto.charge(e) > WITH_CORE_POTENTIAL},
        spin=multiplicity - 1,
        verbose=0,
    )
    method = (dft.RKS if multiplicity == 1 else dft.UKS)(molecule).density_fit()
    method.xc = "pbe0"
    method.grids.level = 2
    method.conv_tol = 1e-7
    method.max_cycle = 80
    method.kernel()
    return -method.dip_moment(verbose=0) if method.converged else None


if __name__ == "__main__":
    main()
