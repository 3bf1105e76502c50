"""What a spectrum of the compound should show, from symmetry alone."""

from collections.abc import Iterable, Sequence

import numpy as np

from shapeshelf.domains.model import Centre, LewisCount
from shapeshelf.geometry.model import Symmetry
from shapeshelf.properties.model import ExpectedSpectra, ModeSpecies
from shapeshelf.properties.modes import mode_species
from shapeshelf.properties.nmr import nmr_signals
from shapeshelf.reference.elements import ELEMENTS
from shapeshelf.structure.molecule import Molecule

ALONG_AXIS = 1e-3
"""Part of a unit vector left by the group's average, above which a component is allowed."""


def expect_spectra(
    molecule: Molecule, lewis: LewisCount, centres: Sequence[Centre], symmetry: Symmetry
) -> ExpectedSpectra:
    """Return vibrational, rotational and NMR expectations for a molecule of two atoms or more."""
    modes = mode_species(molecule, symmetry)
    return ExpectedSpectra(
        modes=modes,
        infrared_bands=sum(mode.count for mode in modes if mode.infrared),
        raman_bands=sum(mode.count for mode in modes if mode.raman),
        coincidences=sum(mode.count for mode in modes if mode.infrared and mode.raman),
        infrared_stretches=_stretches(mode for mode in modes if mode.infrared),
        raman_stretches=_stretches(mode for mode in modes if mode.raman),
        microwave_axes=_microwave_axes(molecule, symmetry),
        nmr=nmr_signals(molecule, lewis, centres, symmetry),
        fluxional_note=_fluxional_note(centres),
    )


def _stretches(modes: Iterable[ModeSpecies]) -> int:
    return sum(mode.stretches for mode in modes)


def _microwave_axes(molecule: Molecule, symmetry: Symmetry) -> tuple[str, ...]:
    """Return the inertial axes along which symmetry allows a dipole moment.

    The mean of all operations projects onto the directions that none of them changes.
    """
    if molecule.charge:
        return ()
    allowed = np.mean([np.array(op.matrix) for op in symmetry.operations], axis=0)
    return tuple(
        name
        for name, axis in zip("abc", _inertial_axes(molecule, symmetry), strict=True)
        if np.linalg.norm(allowed @ axis) > ALONG_AXIS
    )


def _inertial_axes(molecule: Molecule, symmetry: Symmetry) -> np.ndarray:
    """Return the unit vectors a, b, c (3, 3), smallest moment of inertia first."""
    masses = np.array([ELEMENTS[atom.element].atomic_weight for atom in molecule.atoms])
    xyz = np.array(symmetry.coordinates_angstrom)
    xyz -= masses @ xyz / masses.sum()
    spread = np.einsum("n,ni,nj->ij", masses, xyz, xyz)
    _, vectors = np.linalg.eigh(np.trace(spread) * np.eye(3) - spread)
    return np.asarray(vectors.T)


def _fluxional_note(centres: Sequence[Centre]) -> str | None:
    moving = [centre for centre in centres if centre.fluxional]
    if not moving:
        return None
    names = ", ".join(f"{centre.label} ({centre.shape})" for centre in moving)
    return (
        f"Ligands exchange sites quickly at {names}: a warm sample shows fewer, averaged NMR "
        "signals; those listed are for the frozen structure."
    )
