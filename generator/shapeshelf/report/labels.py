"""Names for atoms, ligands and angles, as pages print them and measured values refer to them.

The rules, in order:

* L1  an atom's own label is its element and ordinal among that element: ``C2``;
* L2  a centre goes by its bare element where every centre of that element is equivalent,
  else by its own label;
* L3  a ligand goes by its bare element where the ligands of that element at the centre are
  equivalent and no other centre has to be told apart;
* L4  inequivalent ligands of one element take the site in brackets, ``F(ax)``, where the sites
  differ, else their own label.
"""

from collections import Counter, defaultdict
from collections.abc import Iterable, Mapping, Sequence

from shapeshelf.domains.model import Centre
from shapeshelf.structure.molecule import Molecule


def atom_labels(molecule: Molecule) -> tuple[str, ...]:
    """Return ``C1``, ``C2``, ``O1`` ... for every atom (rule L1)."""
    seen: Counter[str] = Counter()
    labels = []
    for atom in molecule.atoms:
        seen[atom.element] += 1
        labels.append(f"{atom.element}{seen[atom.element]}")
    return tuple(labels)


def centre_names(molecule: Molecule, centres: Sequence[Centre]) -> dict[int, str]:
    """Return the printed name of every centre, by atom (rule L2)."""
    kinds: defaultdict[str, set[int]] = defaultdict(set)
    for centre in centres:
        kinds[centre.element].add(molecule.classes[centre.atom])
    return {
        centre.atom: centre.element if len(kinds[centre.element]) == 1 else centre.label
        for centre in centres
    }


def ligand_names(
    molecule: Molecule,
    centre: Centre,
    names_of_centres: Mapping[int, str],
    ligand_sets: Iterable[frozenset[int]],
) -> dict[int, str]:
    """Return the printed name of every neighbour of ``centre`` (rules L3 and L4).

    ``ligand_sets`` are the sets of neighbours that are equivalent as seen from the centre.
    """
    labels = atom_labels(molecule)
    sites = {
        domain.neighbour: site
        for domain, site in zip(centre.domains, _sites(centre), strict=True)
        if domain.neighbour is not None
    }
    by_element: defaultdict[str, list[frozenset[int]]] = defaultdict(list)
    for group in ligand_sets:
        by_element[molecule.atoms[min(group)].element].append(group)
    names: dict[int, str] = {}
    for element, groups in by_element.items():
        names.update(_name_groups(element, groups, sites, labels, names_of_centres))
    return names


def angle_label(names: Mapping[int, str], centre_name: str, first: int, last: int) -> str:
    """Return ``F(ax)-S-F(eq)``, the two ends in alphabetical order."""
    ends = sorted((names[first], names[last]), key=lambda name: (name[0] == "H", name))
    return f"{ends[0]}-{centre_name}-{ends[1]}"


def bond_ends(
    molecule: Molecule,
    begin: int,
    end: int,
    names_of_centres: Mapping[int, str],
    ligands: Mapping[int, Mapping[int, str]],
) -> tuple[str, str]:
    """Return the printed names of a bond's two ends, the centre first: ``S``, ``F(ax)``."""
    if begin in names_of_centres and end in names_of_centres:
        return names_of_centres[begin], names_of_centres[end]
    if begin in names_of_centres:
        return names_of_centres[begin], ligands[begin][end]
    if end in names_of_centres:
        return names_of_centres[end], ligands[end][begin]
    return molecule.atoms[begin].element, molecule.atoms[end].element


def same_label(left: str, right: str) -> bool:
    """Tell whether two labels name the same thing: read from either end, any dash."""
    return _parts(left) in (_parts(right), _parts(right)[::-1])


def _sites(centre: Centre) -> tuple[str, ...]:
    if centre.placements:
        return centre.placements[0].sites
    return ("",) * len(centre.domains)


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
