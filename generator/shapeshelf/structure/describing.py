"""Descriptors that bench chemists ask of organic compounds."""

from rdkit import Chem
from rdkit.Chem import rdMolDescriptors

from shapeshelf.structure.bridging import to_rdkit
from shapeshelf.structure.molecule import Molecule
from shapeshelf.structure.naming import without_hydrogens

ORGANIC_ELEMENTS = frozenset({"H", "B", "C", "N", "O", "F", "Si", "P", "S", "Cl", "Se", "Br", "I"})
ORGANIC_PARTNERS = frozenset({"H", "C", "F", "Cl", "Br", "I"})


def topological_polar_surface_area(molecule: Molecule) -> float:
    """Return the topological polar surface area in Å².

    P. Ertl, B. Rohde and P. Selzer, J. Med. Chem. 43 (2000) 3714, doi:10.1021/jm000942e
    (nitrogen and oxygen only).
    """
    return float(rdMolDescriptors.CalcTPSA(_plain(molecule)))


def crippen_log_p(molecule: Molecule) -> float:
    """Return the logarithm of the octanol-water partition coefficient.

    S. A. Wildman and G. M. Crippen, J. Chem. Inf. Comput. Sci. 39 (1999) 868,
    doi:10.1021/ci990307l.
    """
    return float(rdMolDescriptors.CalcCrippenDescriptors(_plain(molecule))[0])


def rotatable_bonds(molecule: Molecule) -> int:
    """Return the number of single bonds outside rings that join two branched or longer parts.

    Amide and ester C-N and C-O bonds are left out.
    """
    return int(
        rdMolDescriptors.CalcNumRotatableBonds(
            _plain(molecule), rdMolDescriptors.NumRotatableBondsOptions.Strict
        )
    )


def is_organic(molecule: Molecule) -> bool:
    """Tell whether the compound holds C-H, C-C or C-halogen bonds and only nonmetals."""
    elements = [atom.element for atom in molecule.atoms]
    if not set(elements) <= ORGANIC_ELEMENTS:
        return False
    return any(
        "C" in pair and set(pair) <= ORGANIC_PARTNERS
        for pair in ((elements[bond.begin], elements[bond.end]) for bond in molecule.bonds)
    )


def _plain(molecule: Molecule) -> Chem.Mol:
    """Return the molecule as descriptors want it: aromatic, hydrogens folded in."""
    mol = without_hydrogens(to_rdkit(molecule))
    Chem.GetSymmSSSR(mol)
    mol.UpdatePropertyCache(strict=False)
    return mol
