"""Units between the engines and the records.

CODATA 2018 recommended values: E. Tiesinga, P. J. Mohr, D. B. Newell and B. N. Taylor,
Rev. Mod. Phys. 93 (2021) 025010; read from ``scipy.constants``.
"""

from scipy import constants

BOHR_ANGSTROM: float = constants.value("Bohr radius") * 1e10
HARTREE_KJ_MOL: float = constants.value("Hartree energy") * constants.N_A / 1000
DALTON_ELECTRON_MASSES: float = constants.value("atomic mass constant") / constants.m_e
DEBYE_PER_ATOMIC_UNIT: float = (
    constants.value("atomic unit of electric dipole mom.") * constants.c * 1e21
)
"""One debye is 1e-21/c coulomb metre."""
WAVENUMBER_PER_ROOT: float = constants.value("hartree-inverse meter relationship") / 100
"""Wavenumber (1/cm) of an angular frequency of one atomic unit."""
GAS_CONSTANT_KJ_MOL_KELVIN: float = constants.R / 1000
INTENSITY_KM_MOL: float = (
    constants.N_A
    * constants.value("atomic unit of charge") ** 2
    / (12 * constants.epsilon_0 * constants.c**2 * constants.m_e)
    / 1000
)
"""Integrated absorption of a mode with (dipole derivative)² of one atomic unit, mass-weighted
by electron masses: N_A |dμ/dQ|² / (12 ε0 c²), in km/mol (harmonic, double-harmonic)."""
