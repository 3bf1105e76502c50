"""Which atoms the bond graph cannot tell apart: colour refinement."""

from collections.abc import Sequence

from shapeshelf.structure.molecule import Atom, Bond


def colour_classes(atoms: Sequence[Atom], bonds: Sequence[Bond]) -> tuple[int, ...]:
    """Return one number an atom, equal where elements, isotopes and neighbourhoods agree.

    Bond orders and formal charges are left out, so that the three oxygens of nitrate share a
    class. The numbers do not depend on the order of the atoms.
    """
    around: list[list[int]] = [[] for _ in atoms]
    for bond in bonds:
        around[bond.begin].append(bond.end)
        around[bond.end].append(bond.begin)
    colours = _numbered(
        [(atom.element, atom.isotope, len(around[i])) for i, atom in enumerate(atoms)]
    )
    while True:
        finer = _numbered(
            [(colours[i], *sorted(colours[j] for j in around[i])) for i in range(len(atoms))]
        )
        if len(set(finer)) == len(set(colours)):
            return tuple(finer)
        colours = finer


def _numbered(signatures: Sequence[tuple[object, ...]]) -> list[int]:
    ranks = {signature: rank for rank, signature in enumerate(sorted(set(signatures)))}
    return [ranks[signature] for signature in signatures]
