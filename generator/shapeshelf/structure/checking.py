"""What makes a drawing unreadable: said in one line, before anything is computed from it."""

from rdkit import Chem

from shapeshelf.errors import StructureError
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.bridge_rules import (
    bridging_bonds,
    is_electron_poor,
    is_three_centre_bridge,
    shared_debt,
)
from shapeshelf.structure.drawing import (
    Drawing,
    free_electrons,
    given_pairs,
    is_metal,
    shell_electrons,
)

MOST_ATOMS = 1000
MOST_CHARACTERS = 20_000
READABLE_BONDS = {
    Chem.BondType.SINGLE: 1,
    Chem.BondType.DOUBLE: 2,
    Chem.BondType.TRIPLE: 3,
    Chem.BondType.AROMATIC: 1,
    Chem.BondType.DATIVE: 1,
}


def check_parts(given: str, mol: Chem.Mol) -> None:
    """Refuse what no molecule of ours can hold: wildcards, several parts, unusual bonds.

    Raises StructureError.
    """
    if mol.GetNumAtoms() == 0:
        raise StructureError(given, "the structure is empty; give at least one atom")
    check_size(given, mol.GetNumAtoms())
    for atom in mol.GetAtoms():
        _check_atom(given, atom)
    for bond in mol.GetBonds():
        _check_bond(given, bond)
    parts = len(Chem.GetMolFrags(mol))
    if parts > 1:
        raise StructureError(
            given, f"{parts} separate parts; one molecule or ion at a time is wanted"
        )


def check_size(given: str, atoms: int) -> None:
    """Refuse more than ``MOST_ATOMS`` atoms, hydrogens counted. Raises StructureError."""
    if atoms > MOST_ATOMS:
        raise StructureError(given, f"{atoms} atoms; at most {MOST_ATOMS} can be handled")


def check_electrons(given: str, drawing: Drawing) -> None:
    """Refuse atoms with more bonds or charges than their electrons allow.

    Raises StructureError.
    """
    # Hydrogens first: a bridging one is the cause where its neighbours have too many bonds.
    order = sorted(enumerate(drawing.elements), key=lambda item: item[1] != "H")
    for atom, element in order:
        reason = _electron_problem(drawing, atom, element)
        if reason:
            raise StructureError(given, f"atom {atom} ({element}) {reason}")


def check_state(given: str, drawing: Drawing, charge: int | None, spin: int | None) -> None:
    """Refuse a charge or multiplicity that the drawing's electrons contradict.

    Raises StructureError.
    """
    drawn = sum(drawing.charges)
    if charge is not None and charge != drawn:
        raise StructureError(given, f"charge {charge} is stated, but the structure has {drawn}")
    if spin is None:
        return
    electrons = sum(ELEMENTS[element].atomic_number for element in drawing.elements) - drawn
    if spin < 1 or spin > electrons + 1 or (electrons - spin + 1) % 2:
        wanted = "odd" if electrons % 2 == 0 else "even"
        raise StructureError(
            given,
            f"multiplicity {spin} does not fit {electrons} electrons; it must be {wanted}",
        )


def _check_atom(given: str, atom: Chem.Atom) -> None:
    if atom.GetAtomicNum() == 0:
        raise StructureError(
            given, f"atom {atom.GetIdx()} is a wildcard; every atom needs an element"
        )
    if atom.GetSymbol() not in ELEMENTS:
        raise StructureError(
            given,
            f"atom {atom.GetIdx()} ({atom.GetSymbol()}) is an element beyond curium, "
            "for which no tables are kept",
        )


def _check_bond(given: str, bond: Chem.Bond) -> None:
    if bond.GetBondType() not in READABLE_BONDS:
        ends = f"{bond.GetBeginAtomIdx()} and {bond.GetEndAtomIdx()}"
        kind = str(bond.GetBondType()).lower()
        raise StructureError(
            given,
            f"the bond between atoms {ends} is {kind}; single, double, triple, "
            "aromatic and dative bonds can be read",
        )


def _electron_problem(drawing: Drawing, atom: int, element: str) -> str | None:
    bonds = drawing.at[atom]
    if element == "H":
        return _hydrogen_problem(drawing, atom)
    free = free_electrons(drawing, atom)
    if is_three_centre_bridge(drawing, atom):
        return None
    if free < -shared_debt(drawing, atom):
        orders = sum(bond.order for bond in bonds if not bond.dative)
        return (
            f"has bonds of total order {orders} and charge {drawing.charges[atom]}; "
            f"that takes {-free} more electrons than it has"
        )
    if max(free, 0) < 2 * given_pairs(drawing, atom) and not any(bond.order > 1 for bond in bonds):
        return "gives away a lone pair that it does not have"
    return _shell_problem(drawing, atom, element, free)


def _shell_problem(drawing: Drawing, atom: int, element: str, free: int) -> str | None:
    if is_metal(element):
        return _metal_charge_problem(drawing, atom, element, free)
    shell = shell_electrons(drawing, atom)
    limit = 8 if ELEMENTS[element].period <= 2 else 18
    if element == "He":
        limit = 2
    if shell > limit:
        hint = "; a charge may be missing" if drawing.charges[atom] == 0 else ""
        return f"has {shell} electrons around it, more than the {limit} it can hold{hint}"
    if free > 8:
        return f"has charge {drawing.charges[atom]}, more electrons than it can hold"
    return None


def _metal_charge_problem(drawing: Drawing, atom: int, element: str, free: int) -> str | None:
    """Refuse more electrons of its own than a filled s, or s and d, shell."""
    most = 2 if ELEMENTS[element].group in (1, 2) else 12
    if free <= most:
        return None
    return f"has charge {drawing.charges[atom]}, more electrons than it can hold"


def _hydrogen_problem(drawing: Drawing, atom: int) -> str | None:
    count = len(drawing.at[atom])
    if count == 2 and _is_shared_hydrogen(drawing, atom):
        return None
    if count > 1 or any(bond.order > 1 or bond.dative for bond in drawing.at[atom]):
        return f"has {count} bonds or a multiple one; hydrogen takes one single bond"
    if abs(drawing.charges[atom]) > 1 or (count and drawing.charges[atom]):
        return f"has charge {drawing.charges[atom]}, which its bonds do not allow"
    return None


def _is_shared_hydrogen(drawing: Drawing, atom: int) -> bool:
    """Tell whether two atoms hold the hydrogen: B-H-B without charge, F-H-F with its electrons."""
    bonds = drawing.at[atom]
    if any(bond.order > 1 or bond.dative for bond in bonds):
        return False
    if drawing.charges[atom] == 0:
        return len(bridging_bonds(drawing, atom)) == 2
    ends = [bond.other(atom) for bond in bonds]
    return drawing.charges[atom] == -1 and not any(
        is_electron_poor(drawing, end) or drawing.elements[end] == "H" for end in ends
    )
