"""Names for atoms, ligands and angles, as pages print them and measured values refer to them.

The rules, in order:

* L1  an atom's own label is its element and ordinal among that element: ``C2``;
* L2  a centre goes by its bare element where all centres of that element are equivalent and none
  of them stands beside another atom of that element on one centre; else by its own label;
* L3  a ligand that is no centre goes by its bare element where all ligands of that element at
  its centre are equivalent;
* L4  inequivalent ligands of one element take the site in brackets, ``F(ax)``, where the sites
  differ, else their own label. In an octahedron with one unlike ligand ``ax`` is the site
  opposite to it.
"""

from collections import Counter, defaultdict
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass

from shapeshelf.domains.model import Centre
from shapeshelf.structure.molecule import Molecule

OCTAHEDRAL = 6


@dataclass(frozen=True, slots=True)
class Names:
    """Every name in one molecule."""

    own: tuple[str, ...]
    """Element and ordinal of each atom."""
    centres: dict[int, str]
    """Printed name of each centre, by its atom."""
    ligands: dict[int, dict[int, str]]
    """Printed name of each neighbour, by centre and neighbour."""


def atom_labels(molecule: Molecule) -> tuple[str, ...]:
    """Return ``C1``, ``C2``, ``O1`` ... for every atom (rule L1)."""
    seen: Counter[str] = Counter()
    labels = []
    for atom in molecule.atoms:
        seen[atom.element] += 1
        labels.append(f"{atom.element}{seen[atom.element]}")
    return tuple(labels)


def name_everything(
    molecule: Molecule, centres: Sequence[Centre], sets: Mapping[int, Sequence[frozenset[int]]]
) -> Names:
    """Return all names; ``sets`` gives the alike ligands of each centre, by its atom."""
    own = atom_labels(molecule)
    named = _centre_names(molecule, centres, own)
    ligands = {
        centre.atom: _ligand_names(molecule, centre, named, sets[centre.atom]) for centre in centres
    }
    return Names(own, named, ligands)


def _centre_names(
    molecule: Molecule, centres: Sequence[Centre], own: Sequence[str]
) -> dict[int, str]:
    """Return the printed name of every centre, by atom (rule L2)."""
    kinds: defaultdict[str, set[int]] = defaultdict(set)
    beside: set[str] = set()
    held = {centre.atom for centre in centres}
    for centre in centres:
        kinds[centre.element].add(molecule.classes[centre.atom])
        beside |= _confusable(molecule, centre.atom, held)
    return {
        centre.atom: (
            centre.element
            if len(kinds[centre.element]) == 1 and centre.element not in beside
            else own[centre.atom]
        )
        for centre in centres
    }


def _confusable(molecule: Molecule, atom: int, centres: set[int]) -> set[str]:
    """Return elements that stand on ``atom`` both as a centre and as something else."""
    neighbours = molecule.neighbours(atom)
    return {
        molecule.atoms[one].element
        for one in neighbours
        for other in neighbours
        if one in centres
        and molecule.atoms[one].element == molecule.atoms[other].element
        and molecule.classes[one] != molecule.classes[other]
    }


def _ligand_names(
    molecule: Molecule,
    centre: Centre,
    names_of_centres: Mapping[int, str],
    ligand_sets: Iterable[frozenset[int]],
) -> dict[int, str]:
    """Return the printed name of every neighbour of ``centre`` (rules L3 and L4).

    ``ligand_sets`` are the sets of neighbours that are equivalent as seen from the centre.
    """
    labels = atom_labels(molecule)
    by_element: defaultdict[str, list[frozenset[int]]] = defaultdict(list)
    for group in ligand_sets:
        by_element[molecule.atoms[min(group)].element].append(group)
    names: dict[int, str] = {}
    for element, groups in by_element.items():
        sites = _sites(centre, groups)
        names.update(_name_groups(element, groups, sites, labels, names_of_centres))
    return names


def angle_label(names: Mapping[int, str], centre_name: str, first: int, last: int) -> str:
    """Return ``F(ax)-S-F(eq)``, the two ends in alphabetical order."""
    ends = sorted((names[first], names[last]), key=lambda name: (name[0] == "H", name))
    return f"{ends[0]}-{centre_name}-{ends[1]}"


def bond_label(molecule: Molecule, names: Names, begin: int, end: int) -> str:
    """Return ``S-F(ax)``: the centre first, each end by its printed name."""
    if begin in names.centres and end in names.centres:
        return f"{names.centres[begin]}-{names.centres[end]}"
    if begin in names.centres:
        return f"{names.centres[begin]}-{names.ligands[begin][end]}"
    if end in names.centres:
        return f"{names.centres[end]}-{names.ligands[end][begin]}"
    return f"{molecule.atoms[begin].element}-{molecule.atoms[end].element}"


def same_label(left: str, right: str) -> bool:
    """Tell whether two labels name the same thing: read from either end, any dash."""
    return _parts(left) in (_parts(right), _parts(right)[::-1])


def _sites(centre: Centre, groups: Sequence[frozenset[int]]) -> dict[int, str]:
    """Return the site of each neighbour, empty where the arrangement names none."""
    if not centre.placements:
        return {}
    named = {
        domain.neighbour: site
        for domain, site in zip(centre.domains, centre.placements[0].sites, strict=True)
        if domain.neighbour is not None
    }
    if any(named.values()) or sorted(map(len, groups)) != [1, 4] or centre.bonded != OCTAHEDRAL:
        return named
    return {atom: "ax" if len(group) == 1 else "eq" for group in groups for atom in group}


def _name_groups(
    element: str,
    groups: list[frozenset[int]],
    sites: Mapping[int, str],
    labels: tuple[str, ...],
    names_of_centres: Mapping[int, str],
) -> dict[int, str]:
    if len(groups) == 1:
        return {atom: names_of_centres.get(atom, element) for atom in groups[0]}
    marks = [frozenset(sites.get(atom, "") for atom in group) for group in groups]
    told_apart = len(set(marks)) == len(groups) and all(
        len(mark) == 1 and "" not in mark for mark in marks
    )
    if told_apart and not any(atom in names_of_centres for group in groups for atom in group):
        return {atom: f"{element}({sites[atom]})" for group in groups for atom in group}
    return {
        atom: names_of_centres.get(atom, labels[atom]) if len(group) > 1 else labels[atom]
        for group in groups
        for atom in group
    }


def _parts(label: str) -> list[str]:
    for dash in "\u2010\u2011\u2012\u2013\u2014\u2212":
        label = label.replace(dash, "-")
    return [part.strip() for part in label.split("-")]
