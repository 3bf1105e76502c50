"""A raw RDKit molecule, its hydrogens counted, to the normalised Molecule."""

from rdkit import Chem

from shapeshelf.errors import StructureError
from shapeshelf.structure.bridging import Stereo, drawing_of, mol_of_drawing, stereo_of
from shapeshelf.structure.checking import check_electrons, check_size, check_state
from shapeshelf.structure.colouring import colour_classes
from shapeshelf.structure.drawing import Drawing, is_metal
from shapeshelf.structure.formulas import formula_of
from shapeshelf.structure.molecule import Atom, Bond, Molecule, Vector
from shapeshelf.structure.naming import canonical_smiles, inchikey
from shapeshelf.structure.normalising import normalise


def assemble(
    given: str,
    mol: Chem.RWMol,
    charge: int | None,
    multiplicity: int | None,
    coordinates: tuple[Vector, ...] | None = None,
) -> Molecule:
    """Normalise ``mol`` and return the finished record.

    ``mol`` is unsanitised, with a hydrogen count at every atom; ``coordinates`` (ångström) stand
    in the order of its atoms, added hydrogens after them. Raises StructureError.
    """
    full = _explicit(given, _kekulised(given, mol))
    check_size(given, full.GetNumAtoms())
    drawing = drawing_of(full)
    Chem.SetBondStereoFromDirections(full)
    stereo = stereo_of(full)
    isotopes = [atom.GetIsotope() for atom in full.GetAtoms()]
    return finish(given, drawing, isotopes, stereo, charge, multiplicity, coordinates)


def finish(
    given: str,
    drawing: Drawing,
    isotopes: list[int],
    stereo: Stereo,
    charge: int | None,
    multiplicity: int | None,
    coordinates: tuple[Vector, ...] | None,
) -> Molecule:
    """Normalise and check a drawing and return the finished record. Raises StructureError."""
    normalise(drawing)
    check_electrons(given, drawing)
    check_state(given, drawing, charge, multiplicity)
    clean = mol_of_drawing(drawing, isotopes, stereo)
    kept = stereo_of(clean)
    atoms = tuple(
        Atom(element, drawn, isotope)
        for element, drawn, isotope in zip(drawing.elements, drawing.charges, isotopes, strict=True)
    )
    bonds = tuple(Bond(bond.begin, bond.end, bond.order, bond.dative) for bond in drawing.bonds)
    return Molecule(
        atoms=atoms,
        bonds=bonds,
        charge=sum(drawing.charges),
        multiplicity=multiplicity,
        coordinates_angstrom=coordinates,
        tetrahedral_stereo=kept.tetrahedral,
        double_bond_stereo=kept.double_bonds,
        formula=formula_of(atoms, bonds),
        smiles=canonical_smiles(clean),
        inchikey=inchikey(clean),
        classes=colour_classes(atoms, bonds),
    )


def _kekulised(given: str, mol: Chem.RWMol) -> Chem.RWMol:
    """Return a Kekulé form; on a first failure ring nitrogens at metals become donors."""
    _open_ring_oxides(mol)
    for attempt in (mol, _with_donors(mol)):
        kekule = Chem.RWMol(attempt)
        kekule.UpdatePropertyCache(strict=False)
        try:
            Chem.Kekulize(kekule, clearAromaticFlags=True)
        except (Chem.KekulizeException, Chem.AtomKekulizeException, ValueError):
            continue
        return kekule
    raise StructureError(
        given,
        "the aromatic ring has no arrangement of double bonds; "
        "a hydrogen at nitrogen ([nH]) or a charge may be missing",
    )


def _open_ring_oxides(mol: Chem.RWMol) -> None:
    """Rule N4 inside aromatic rings, where it has to come before the Kekulé form: n=O."""
    for bond in mol.GetBonds():
        if bond.GetBondType() != Chem.BondType.DOUBLE:
            continue
        for ring, oxide in (
            (bond.GetBeginAtom(), bond.GetEndAtom()),
            (bond.GetEndAtom(), bond.GetBeginAtom()),
        ):
            if ring.GetIsAromatic() and ring.GetSymbol() == "N" and ring.GetFormalCharge() == 0:
                bond.SetBondType(Chem.BondType.SINGLE)
                ring.SetFormalCharge(1)
                oxide.SetFormalCharge(oxide.GetFormalCharge() - 1)


def _with_donors(mol: Chem.RWMol) -> Chem.RWMol:
    copy = Chem.RWMol(mol)
    for bond in mol.GetBonds():
        for ring, metal in (
            (bond.GetBeginAtom(), bond.GetEndAtom()),
            (bond.GetEndAtom(), bond.GetBeginAtom()),
        ):
            if ring.GetIsAromatic() and ring.GetSymbol() == "N" and is_metal(metal.GetSymbol()):
                copy.RemoveBond(ring.GetIdx(), metal.GetIdx())
                copy.AddBond(ring.GetIdx(), metal.GetIdx(), Chem.BondType.DATIVE)
    return copy


def _explicit(given: str, mol: Chem.RWMol) -> Chem.RWMol:
    total = mol.GetNumAtoms() + sum(atom.GetNumExplicitHs() for atom in mol.GetAtoms())
    check_size(given, total)
    return Chem.RWMol(Chem.AddHs(mol))
