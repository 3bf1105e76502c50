"""Cautions of a compound: its H-statements, and the groups in its structure known for hazard."""

from collections.abc import Callable, Iterator

from shapeshelf.catalogue.model import Entry
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.reference.ghs import H_STATEMENTS
from shapeshelf.reference.hazard_groups import HAZARD_GROUPS
from shapeshelf.report.model import Caution
from shapeshelf.structure.molecule import Molecule

HALOGENS = frozenset({"F", "Cl", "Br", "I"})
HYDRIDE_FORMERS = frozenset({"B", "Si", "Ge", "Sn", "P", "As", "Sb", "S", "Se", "Te"})
FLUORIDE_FORMERS = frozenset(
    {"H", "B", "Al", "Si", "Ge", "P", "As", "Sb", "S", "Se", "Te", "Cl", "Br", "I", "Xe", "Kr"}
) | frozenset({"Ti", "V", "Nb", "Ta", "Cr", "Mo", "W", "Re", "Os", "Ir", "Pt", "U"})
ALKYL_FORMERS = frozenset({"Li", "Na", "K", "Be", "Mg", "Zn", "Cd", "B", "Al", "Ga", "In"})


def cautions_of(molecule: Molecule, entry: Entry | None) -> tuple[Caution, ...]:
    """Return H-statements of the entry, then the cautions that the structure calls for."""
    codes = entry.hazards if entry else ()
    statements = tuple(Caution(code, H_STATEMENTS[code]) for code in codes)
    groups = tuple(Caution(None, HAZARD_GROUPS[key].caution) for key in hazard_groups(molecule))
    return statements + groups


def hazard_groups(molecule: Molecule) -> tuple[str, ...]:
    """Return the keys of ``HAZARD_GROUPS`` whose rule the molecule meets, in table order."""
    return tuple(key for key in HAZARD_GROUPS if RULES[key](molecule))


def _azide(molecule: Molecule) -> bool:
    return any(
        len(ends) == 2
        and all(molecule.atoms[end].element == "N" for end in ends)
        and any(len(molecule.neighbours(end)) == 1 for end in ends)
        for middle in _atoms_of(molecule, "N")
        if (ends := molecule.neighbours(middle))
    )


def _peroxide(molecule: Molecule) -> bool:
    """O-O with both oxygens bonded on, so that neither O2 nor ozone counts."""
    return any(
        _elements_of(molecule, bond.begin, bond.end) == {"O"}
        and all(len(molecule.neighbours(atom)) > 1 for atom in (bond.begin, bond.end))
        for bond in molecule.bonds
    )


def _perchlorate(molecule: Molecule) -> bool:
    return any(
        [molecule.atoms[n].element for n in molecule.neighbours(atom)].count("O") == 4
        for atom in _atoms_of(molecule, "Cl")
    )


def _n_halogen(molecule: Molecule) -> bool:
    return any(
        "N" in pair and pair & HALOGENS
        for bond in molecule.bonds
        if (pair := _elements_of(molecule, bond.begin, bond.end))
    )


def _hydride_gas(molecule: Molecule) -> bool:
    heavy = [atom.element for atom in molecule.atoms if atom.element != "H"]
    return (
        molecule.charge == 0
        and 1 <= len(heavy) <= 2
        and set(heavy) <= HYDRIDE_FORMERS
        and len(heavy) < len(molecule.atoms)
    )


def _volatile_fluoride(molecule: Molecule) -> bool:
    """Neutral, free of carbon, with a bond that water splits; SF6 and its like are inert."""
    if molecule.charge or _atoms_of(molecule, "C"):
        return False
    return any(
        _elements_of(molecule, bond.begin, bond.end) - {"F"} & FLUORIDE_FORMERS
        and not _inert_sulfur(molecule, bond.begin, bond.end)
        for bond in molecule.bonds
        if "F" in _elements_of(molecule, bond.begin, bond.end)
    )


def _inert_sulfur(molecule: Molecule, *atoms: int) -> bool:
    return any(
        molecule.atoms[atom].element == "S" and len(molecule.neighbours(atom)) == 6
        for atom in atoms
    )


def _halogen_fluoride(molecule: Molecule) -> bool:
    return any(
        pair < HALOGENS and "F" in pair and len(pair) == 2
        for bond in molecule.bonds
        if (pair := _elements_of(molecule, bond.begin, bond.end))
    )


def _xenon(molecule: Molecule) -> bool:
    return bool(_atoms_of(molecule, "Xe"))


def _metal_carbonyl(molecule: Molecule) -> bool:
    return any(
        set(_neighbour_elements(molecule, carbon) - {"O"}) and _is_metal(molecule, carbon)
        for carbon in _atoms_of(molecule, "C")
        if len(molecule.neighbours(carbon)) == 2 and _has_terminal(molecule, carbon, "O")
    )


def _metal_alkyl(molecule: Molecule) -> bool:
    return molecule.charge == 0 and any(
        "C" in pair and pair & ALKYL_FORMERS and _only_carbon_and_hydrogen(molecule, bond.begin)
        for bond in molecule.bonds
        if (pair := _elements_of(molecule, bond.begin, bond.end))
    )


def _acid_cyanide(molecule: Molecule) -> bool:
    """A C-N group on hydrogen, on a metal or alone; organic nitriles do not count."""
    return any(
        _has_terminal(molecule, carbon, "N")
        and (
            len(molecule.neighbours(carbon)) == 1
            or "H" in _neighbour_elements(molecule, carbon)
            or _is_metal(molecule, carbon)
        )
        for carbon in _atoms_of(molecule, "C")
    )


def _only_carbon_and_hydrogen(molecule: Molecule, atom: int) -> bool:
    """The metal end of a bond carries alkyl groups or hydrogen alone."""
    ends = (atom, *molecule.neighbours(atom))
    metal = next((a for a in ends if molecule.atoms[a].element in ALKYL_FORMERS), None)
    return metal is not None and _neighbour_elements(molecule, metal) <= {"C", "H"}


def _is_metal(molecule: Molecule, carbon: int) -> bool:
    """Tell whether a neighbour is a d-block metal."""
    return any(
        3 <= (ELEMENTS[molecule.atoms[n].element].group or 3) <= 12
        for n in molecule.neighbours(carbon)
    )


def _has_terminal(molecule: Molecule, atom: int, element: str) -> bool:
    return any(
        molecule.atoms[n].element == element and len(molecule.neighbours(n)) == 1
        for n in molecule.neighbours(atom)
    )


def _neighbour_elements(molecule: Molecule, atom: int) -> set[str]:
    return {molecule.atoms[n].element for n in molecule.neighbours(atom)}


def _elements_of(molecule: Molecule, *atoms: int) -> set[str]:
    return {molecule.atoms[atom].element for atom in atoms}


def _atoms_of(molecule: Molecule, element: str) -> tuple[int, ...]:
    return tuple(_indices(molecule, element))


def _indices(molecule: Molecule, element: str) -> Iterator[int]:
    return (index for index, atom in enumerate(molecule.atoms) if atom.element == element)


RULES: dict[str, Callable[[Molecule], bool]] = {
    "azide": _azide,
    "peroxide": _peroxide,
    "perchlorate": _perchlorate,
    "n-halogen": _n_halogen,
    "hydride-gas": _hydride_gas,
    "volatile-fluoride": _volatile_fluoride,
    "halogen-fluoride": _halogen_fluoride,
    "xenon": _xenon,
    "metal-carbonyl": _metal_carbonyl,
    "metal-alkyl": _metal_alkyl,
    "acid-cyanide": _acid_cyanide,
}
