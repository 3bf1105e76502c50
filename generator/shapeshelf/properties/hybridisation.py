"""Hybridisation of a centre: the customary label and the numbers behind it.

The label counts electron domains. The labels with d (sp3d, sp3d2, sp3d3) are customary names
only: calculations find no such part of d orbitals (W. Kutzelnigg, Angew. Chem. Int. Ed. 23 (1984)
272; recalled from memory), and the numbers here use s and p alone.
Rules H1 to H5: coulson.py; H6 and H7: hypervalent.py.
"""

from collections.abc import Sequence

import numpy as np

from shapeshelf.domains.model import Centre, DomainKind, LewisCount
from shapeshelf.geometry.vectors import Array, unit
from shapeshelf.properties.bent_rule import bent_rule
from shapeshelf.properties.coulson import s_characters
from shapeshelf.properties.hypervalent import hypervalent_s_characters
from shapeshelf.properties.model import Hybrid, Hybridisation
from shapeshelf.structure.molecule import Molecule, Vector

LABELS = {2: "sp", 3: "sp2", 4: "sp3", 5: "sp3d", 6: "sp3d2", 7: "sp3d3"}
S_P_ORBITALS = 4
PI_AXIS_NEIGHBOURS = 3

FROM_ANGLES = "From the bond angles by Coulson's theorem."
ONE_ANGLE = "From the one bond angle by Coulson's theorem; it cannot tell the two bonds apart."
BENT_BONDS = (
    "From the bond angles outside the small ring by Coulson's theorem; the bonds of the ring are "
    "bent and share what is left."
)
UNKNOWN_SHARES = "No angle tells: the bonds of a small ring are bent, so s is shared equally."
THREE_CENTRES = (
    "A count in s and p alone: opposite ligands share one p orbital in a three-centre bond, the "
    "other domains share s; no part of d is implied."
)
BY_SYMMETRY = (
    "A count in s and p alone: every bond has an equal part of s; no part of d is implied."
)
S_ALONE = "Hydrogen bonds with its s orbital alone, shared by the bridge."


def hybridise(
    molecule: Molecule, lewis: LewisCount, centre: Centre, coordinates_angstrom: Sequence[Vector]
) -> Hybridisation:
    """Return the label, the s-character of every domain, Bent's rule and the pi-axis angle.

    ``coordinates_angstrom`` one row an atom. The hybrids stand in the order of
    ``centre.domains`` and add up to one; a transition metal has neither label nor hybrids, and a
    bridging hydrogen, with its s orbital alone, no label.
    Sources: Coulson (coulson.py), Bent (bent_rule.py), Haddon (``pyramidalisation_degrees``).
    """
    directions = _directions(centre, coordinates_angstrom)
    pyramid = (
        pyramidalisation_degrees(directions) if len(directions) == PI_AXIS_NEIGHBOURS else None
    )
    if centre.lone_pairs is None:
        return Hybridisation(centre.atom, None, False, (), None, pyramid)
    if centre.element == "H":
        shared = tuple(Hybrid(d.neighbour, 1 / len(centre.domains)) for d in centre.domains)
        return Hybridisation(centre.atom, None, False, shared, None, None, S_ALONE)
    bent = _in_small_ring(molecule, centre)
    hybrids = _hybrids(centre, directions, bent)
    count = len(centre.domains)
    return Hybridisation(
        atom=centre.atom,
        label=LABELS.get(count),
        customary_only=count > S_P_ORBITALS,
        hybrids=hybrids,
        bent_rule=bent_rule(molecule, centre, hybrids),
        pyramidalisation_degrees=pyramid,
        basis=_basis(centre, bent),
    )


def pyramidalisation_degrees(directions: Array) -> float:
    """Return the pi-orbital axis vector's angle with three bonds, less 90 degrees; 0 if planar.

    ``directions`` (3, 3) unit vectors. The vector makes equal angles with all three: it is the
    normal of the plane through their tips. R. C. Haddon, Acc. Chem. Res. 21 (1988) 243 (POAV1;
    recalled from memory).
    """
    first, second, third = directions
    axis = unit(np.cross(second - first, third - first))
    return float(np.degrees(np.arcsin(min(1.0, abs(float(axis @ first))))))


def _directions(centre: Centre, coordinates: Sequence[Vector]) -> Array:
    """Return the unit vectors (n, 3) to the neighbours, in the order of the bonding domains."""
    here = np.array(coordinates[centre.atom])
    bonded = [d.neighbour for d in centre.domains if d.neighbour is not None]
    return np.array([unit(np.array(coordinates[atom]) - here) for atom in bonded]).reshape(-1, 3)


def _hybrids(centre: Centre, directions: Array, bent: Sequence[bool]) -> tuple[Hybrid, ...]:
    lone = len(centre.domains) - len(directions)
    if len(centre.domains) > S_P_ORBITALS:
        bonds = hypervalent_s_characters(directions, lone)
    else:
        bonds = s_characters(directions, lone, bent)
    left = (1 - sum(bonds)) / lone if lone else 0.0
    shares = iter(bonds)
    return tuple(
        Hybrid(d.neighbour, next(shares) if d.kind is DomainKind.BOND else left)
        for d in centre.domains
    )


def _basis(centre: Centre, bent: list[bool]) -> str:
    lone = len(centre.domains) - len(bent)
    if len(centre.domains) > S_P_ORBITALS:
        return THREE_CENTRES if lone or len(bent) <= S_P_ORBITALS + 1 else BY_SYMMETRY
    if any(bent) and not lone:
        return BENT_BONDS if bent.count(False) > 1 else UNKNOWN_SHARES
    return ONE_ANGLE if len(bent) == 2 else FROM_ANGLES


def _in_small_ring(molecule: Molecule, centre: Centre) -> list[bool]:
    """Tell for every bond whether it lies in a ring of three or four atoms."""
    bonded = [d.neighbour for d in centre.domains if d.neighbour is not None]
    around = {atom: set(molecule.neighbours(atom)) - {centre.atom} for atom in bonded}
    return [
        any(
            other != atom and (other in around[atom] or around[atom] & around[other])
            for other in bonded
        )
        for atom in bonded
    ]
