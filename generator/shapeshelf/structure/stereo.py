"""Stereochemistry between RDKit's tags, which depend on bond order, and our records."""

from rdkit import Chem

from shapeshelf.structure.molecule import DoubleBondStereo, TetrahedralStereo

CLOCKWISE = Chem.ChiralType.CHI_TETRAHEDRAL_CW
COUNTER = Chem.ChiralType.CHI_TETRAHEDRAL_CCW
SAME_SIDE = (Chem.BondStereo.STEREOZ, Chem.BondStereo.STEREOCIS)
OPPOSITE = (Chem.BondStereo.STEREOE, Chem.BondStereo.STEREOTRANS)


def read_tetrahedral(mol: Chem.Mol) -> tuple[TetrahedralStereo, ...]:
    """Return the centres that carry a tetrahedral tag, neighbours in the atom's bond order."""
    return tuple(
        TetrahedralStereo(atom.GetIdx(), _neighbours(atom), atom.GetChiralTag() == CLOCKWISE)
        for atom in mol.GetAtoms()
        if atom.GetChiralTag() in (CLOCKWISE, COUNTER)
    )


def read_double_bonds(mol: Chem.Mol) -> tuple[DoubleBondStereo, ...]:
    """Return the double bonds whose sides are set."""
    found = []
    for bond in mol.GetBonds():
        ends = tuple(bond.GetStereoAtoms())
        if bond.GetStereo() in SAME_SIDE + OPPOSITE and len(ends) == 2:
            cis = bond.GetStereo() in SAME_SIDE
            found.append(
                DoubleBondStereo(
                    ends[0], bond.GetBeginAtomIdx(), bond.GetEndAtomIdx(), ends[1], cis
                )
            )
    return tuple(found)


def write_tetrahedral(mol: Chem.RWMol, centres: tuple[TetrahedralStereo, ...]) -> None:
    """Tag the centres in ``mol``, whatever order its bonds stand in."""
    for centre in centres:
        atom = mol.GetAtomWithIdx(centre.atom)
        odd = _is_odd(centre.neighbours, _neighbours(atom))
        atom.SetChiralTag(CLOCKWISE if centre.clockwise != odd else COUNTER)


def write_double_bonds(mol: Chem.RWMol, bonds: tuple[DoubleBondStereo, ...]) -> None:
    """Set the sides of the double bonds in ``mol``; a bond no longer double is left alone."""
    for stereo in bonds:
        bond = mol.GetBondBetweenAtoms(stereo.begin, stereo.end)
        if bond is None or bond.GetBondType() != Chem.BondType.DOUBLE:
            continue
        ends = (stereo.first, stereo.last)
        if bond.GetBeginAtomIdx() != stereo.begin:
            ends = (stereo.last, stereo.first)
        bond.SetStereoAtoms(*ends)
        bond.SetStereo(SAME_SIDE[1] if stereo.cis else OPPOSITE[1])


def _neighbours(atom: Chem.Atom) -> tuple[int, ...]:
    return tuple(bond.GetOtherAtomIdx(atom.GetIdx()) for bond in atom.GetBonds())


def _is_odd(first: tuple[int, ...], second: tuple[int, ...]) -> bool:
    """Tell whether an odd number of swaps turns one order into the other."""
    order = [first.index(item) for item in second]
    pairs = ((i, j) for j in range(len(order)) for i in range(j))
    return sum(order[i] > order[j] for i, j in pairs) % 2 == 1
