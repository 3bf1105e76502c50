"""NMR signals to expect: sets of alike spin-1/2 nuclei and their first-order multiplicities.

Coupling is counted through at most three bonds, between sets of abundant spin-1/2 nuclei; n alike
partners split a signal into n + 1. Hydrogen on oxygen or nitrogen exchanges in most samples and
is left uncoupled; quadrupolar neighbours (14N, 35Cl, 11B) are not counted.

Source: the usual first-order rules, H. Guenther, NMR Spectroscopy (1995), recalled from memory.
"""

from collections import Counter, deque
from collections.abc import Sequence

from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.geometry.model import Symmetry
from shapeshelf.properties.equivalence import alike_sets
from shapeshelf.properties.model import NmrSignal
from shapeshelf.reference.nuclei import ABUNDANT_SPIN_HALF
from shapeshelf.structure.molecule import Molecule

LONGEST_COUPLING_BONDS = 3
NAMES = {
    1: "doublet",
    2: "triplet",
    3: "quartet",
    4: "quintet",
    5: "sextet",
    6: "septet",
    7: "octet",
    8: "nonet",
    9: "decet",
}
EXCHANGING_HOSTS = ("O", "N")


def nmr_signals(
    molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre], symmetry: Symmetry
) -> tuple[NmrSignal, ...]:
    """Return one signal a set of alike abundant spin-1/2 nuclei, heavier sets of a nucleus last."""
    sets = [
        group
        for group in alike_sets(molecule, lewis, centres, symmetry)
        if molecule.atoms[group[0]].element in ABUNDANT_SPIN_HALF
        and molecule.atoms[group[0]].isotope == 0
    ]
    set_of = {atom: number for number, group in enumerate(sets) for atom in group}
    signals = [_signal(molecule, group, sets, set_of) for group in sets]
    return tuple(sorted(signals, key=lambda signal: (signal.nucleus, signal.atoms)))


def _signal(
    molecule: Molecule,
    group: tuple[int, ...],
    sets: Sequence[tuple[int, ...]],
    set_of: dict[int, int],
) -> NmrSignal:
    atom = group[0]
    reached = _bonds_away(molecule, atom)
    counts = Counter(
        (distance, set_of[other])
        for other, distance in reached.items()
        if other in set_of
        and set_of[other] != set_of[atom]
        and not (_exchanges(molecule, atom) or _exchanges(molecule, other))
    )
    ranked = sorted(counts.items())
    return NmrSignal(
        nucleus=ABUNDANT_SPIN_HALF[molecule.atoms[atom].element].name,
        atoms=group,
        multiplicity=_multiplicity([count for _, count in ranked]),
        partners=tuple(
            f"{count} {molecule.atoms[sets[other][0]].element} ({distance}J)"
            for (distance, other), count in ranked
        ),
    )


def _bonds_away(molecule: Molecule, start: int) -> dict[int, int]:
    """Return atoms within reach of coupling and how many bonds away they are."""
    distance = {start: 0}
    queue = deque([start])
    while queue:
        atom = queue.popleft()
        if distance[atom] == LONGEST_COUPLING_BONDS:
            continue
        for neighbour in molecule.neighbours(atom):
            if neighbour not in distance:
                distance[neighbour] = distance[atom] + 1
                queue.append(neighbour)
    del distance[start]
    return distance


def _exchanges(molecule: Molecule, atom: int) -> bool:
    if molecule.atoms[atom].element != "H":
        return False
    return any(
        molecule.atoms[host].element in EXCHANGING_HOSTS for host in molecule.neighbours(atom)
    )


def _multiplicity(counts: Sequence[int]) -> str:
    if not counts:
        return "singlet"
    names = [NAMES.get(count, f"{count + 1}-line multiplet") for count in counts]
    return " of ".join([names[0], *(f"{name}s" for name in names[1:])])
