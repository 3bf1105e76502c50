"""Hydrogens that a SMILES leaves out.

The valences of the organic subset are those of the OpenSMILES specification 1.0 (2007, 2016),
section 3.1.5, recalled from memory.
"""

from rdkit import Chem

from shapeshelf.structure.drawing import is_metal

ORDINARY_VALENCES = {
    "B": (3,),
    "C": (4,),
    "N": (3, 5),
    "O": (2,),
    "P": (3, 5),
    "S": (2, 4, 6),
    "F": (1,),
    "Cl": (1,),
    "Br": (1,),
    "I": (1,),
}


def fill_hydrogens(mol: Chem.RWMol) -> None:
    """Give every atom written without brackets its hydrogens, in place."""
    for atom in mol.GetAtoms():
        if not atom.GetNoImplicit():
            atom.SetNumExplicitHs(_missing(atom))
            atom.SetNoImplicit(True)


def _missing(atom: Chem.Atom) -> int:
    valences = ORDINARY_VALENCES.get(atom.GetSymbol(), ())
    bonds = atom.GetBonds()
    used = sum(_cost(bond, atom) for bond in bonds)
    if atom.GetIsAromatic():
        # Only carbon is written without its hydrogen in a ring; it keeps one electron for pi.
        return max(0, 4 - used - 1) if atom.GetSymbol() == "C" else 0
    if any(is_metal(bond.GetOtherAtom(atom).GetSymbol()) for bond in bonds):
        # A ligand atom beyond its lowest valence is a donor drawn with a plain bond.
        valences = valences[:1]
    fitting = [valence for valence in valences if valence >= used]
    if atom.GetSymbol() == "N" and used == 4:
        # Four bonds without a charge are a mistake, to be refused, and no NH(V).
        return 0
    return fitting[0] - used if fitting else 0


def _cost(bond: Chem.Bond, atom: Chem.Atom) -> int:
    kind = bond.GetBondType()
    if kind == Chem.BondType.DATIVE:
        return int(bond.GetEndAtomIdx() == atom.GetIdx())
    return {Chem.BondType.DOUBLE: 2, Chem.BondType.TRIPLE: 3}.get(kind, 1)
