"""The elements: numbers, Pauling electronegativities and covalent radii.

Read from the package ``mendeleev`` 1.3 (PyPI), which carries:

* standard atomic weights: IUPAC Commission on Isotopic Abundances and Atomic Weights;
* electronegativities after Pauling (dimensionless): CRC Handbook of Chemistry and
  Physics, 95th ed. (2014), ISBN 978-1-4822-0868-9; ``None`` where none is tabulated;
* single-bond radii: P. Pyykkö and M. Atsumi, Chem. Eur. J. 15 (2009) 186,
  doi:10.1002/chem.200800987;
* double-bond radii: the same authors, Chem. Eur. J. 15 (2009) 12770,
  doi:10.1002/chem.200901472;
* triple-bond radii: P. Pyykkö, S. Riedel and M. Patzschke, Chem. Eur. J. 11 (2005) 3511,
  doi:10.1002/chem.200401299.

Radii in ångström, atomic weights in g/mol. ``group`` is ``None`` for f-block elements.
"""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Element:
    """One row of the periodic table."""

    symbol: str
    name: str
    atomic_number: int
    period: int
    group: int | None
    atomic_weight: float
    electronegativity: float | None
    single_radius_angstrom: float | None
    double_radius_angstrom: float | None
    triple_radius_angstrom: float | None


# fmt: off
ELEMENTS: dict[str, Element] = {
    "H": Element("H", "hydrogen", 1, 1, 1, 1.008, 2.2, 0.32, None, None),
    "He": Element("He", "helium", 2, 1, 18, 4.002602, None, 0.46, None, None),
    "Li": Element("Li", "lithium", 3, 2, 1, 6.94, 0.98, 1.33, 1.24, None),
    "Be": Element("Be", "beryllium", 4, 2, 2, 9.0121831, 1.57, 1.02, 0.9, 0.85),
    "B": Element("B", "boron", 5, 2, 13, 10.81, 2.04, 0.85, 0.78, 0.73),
    "C": Element("C", "carbon", 6, 2, 14, 12.011, 2.55, 0.75, 0.67, 0.6),
    "N": Element("N", "nitrogen", 7, 2, 15, 14.007, 3.04, 0.71, 0.6, 0.54),
    "O": Element("O", "oxygen", 8, 2, 16, 15.999, 3.44, 0.63, 0.57, 0.53),
    "F": Element("F", "fluorine", 9, 2, 17, 18.998403, 3.98, 0.64, 0.59, 0.53),
    "Ne": Element("Ne", "neon", 10, 2, 18, 20.1797, None, 0.67, 0.96, None),
    "Na": Element("Na", "sodium", 11, 3, 1, 22.989769, 0.93, 1.55, 1.6, None),
    "Mg": Element("Mg", "magnesium", 12, 3, 2, 24.305, 1.31, 1.39, 1.32, 1.27),
    "Al": Element("Al", "aluminium", 13, 3, 13, 26.981538, 1.61, 1.26, 1.13, 1.11),
    "Si": Element("Si", "silicon", 14, 3, 14, 28.085, 1.9, 1.16, 1.07, 1.02),
    "P": Element("P", "phosphorus", 15, 3, 15, 30.973762, 2.19, 1.11, 1.02, 0.94),
    "S": Element("S", "sulfur", 16, 3, 16, 32.06, 2.58, 1.03, 0.94, 0.95),
    "Cl": Element("Cl", "chlorine", 17, 3, 17, 35.45, 3.16, 0.99, 0.95, 0.93),
    "Ar": Element("Ar", "argon", 18, 3, 18, 39.948, None, 0.96, 1.07, 0.96),
    "K": Element("K", "potassium", 19, 4, 1, 39.0983, 0.82, 1.96, 1.93, None),
    "Ca": Element("Ca", "calcium", 20, 4, 2, 40.078, 1.0, 1.71, 1.47, 1.33),
    "Sc": Element("Sc", "scandium", 21, 4, 3, 44.955908, 1.36, 1.48, 1.16, 1.14),
    "Ti": Element("Ti", "titanium", 22, 4, 4, 47.867, 1.54, 1.36, 1.17, 1.08),
    "V": Element("V", "vanadium", 23, 4, 5, 50.9415, 1.63, 1.34, 1.12, 1.06),
    "Cr": Element("Cr", "chromium", 24, 4, 6, 51.9961, 1.66, 1.22, 1.11, 1.03),
    "Mn": Element("Mn", "manganese", 25, 4, 7, 54.938044, 1.55, 1.19, 1.05, 1.03),
    "Fe": Element("Fe", "iron", 26, 4, 8, 55.845, 1.83, 1.16, 1.09, 1.02),
    "Co": Element("Co", "cobalt", 27, 4, 9, 58.933194, 1.88, 1.11, 1.03, 0.96),
    "Ni": Element("Ni", "nickel", 28, 4, 10, 58.6934, 1.91, 1.1, 1.01, 1.01),
    "Cu": Element("Cu", "copper", 29, 4, 11, 63.546, 1.9, 1.12, 1.15, 1.2),
    "Zn": Element("Zn", "zinc", 30, 4, 12, 65.38, 1.65, 1.18, 1.2, None),
    "Ga": Element("Ga", "gallium", 31, 4, 13, 69.723, 1.81, 1.24, 1.17, 1.21),
    "Ge": Element("Ge", "germanium", 32, 4, 14, 72.63, 2.01, 1.21, 1.11, 1.14),
    "As": Element("As", "arsenic", 33, 4, 15, 74.921595, 2.18, 1.21, 1.14, 1.06),
    "Se": Element("Se", "selenium", 34, 4, 16, 78.971, 2.55, 1.16, 1.07, 1.07),
    "Br": Element("Br", "bromine", 35, 4, 17, 79.904, 2.96, 1.14, 1.09, 1.1),
    "Kr": Element("Kr", "krypton", 36, 4, 18, 83.798, None, 1.17, 1.21, 1.08),
    "Rb": Element("Rb", "rubidium", 37, 5, 1, 85.4678, 0.82, 2.1, 2.02, None),
    "Sr": Element("Sr", "strontium", 38, 5, 2, 87.62, 0.95, 1.85, 1.57, 1.39),
    "Y": Element("Y", "yttrium", 39, 5, 3, 88.90584, 1.22, 1.63, 1.3, 1.24),
    "Zr": Element("Zr", "zirconium", 40, 5, 4, 91.224, 1.33, 1.54, 1.27, 1.21),
    "Nb": Element("Nb", "niobium", 41, 5, 5, 92.90637, 1.6, 1.47, 1.25, 1.16),
    "Mo": Element("Mo", "molybdenum", 42, 5, 6, 95.95, 2.16, 1.38, 1.21, 1.13),
    "Tc": Element("Tc", "technetium", 43, 5, 7, 97.90721, 2.1, 1.28, 1.2, 1.1),
    "Ru": Element("Ru", "ruthenium", 44, 5, 8, 101.07, 2.2, 1.25, 1.14, 1.03),
    "Rh": Element("Rh", "rhodium", 45, 5, 9, 102.9055, 2.28, 1.25, 1.1, 1.06),
    "Pd": Element("Pd", "palladium", 46, 5, 10, 106.42, 2.2, 1.2, 1.17, 1.12),
    "Ag": Element("Ag", "silver", 47, 5, 11, 107.8682, 1.93, 1.28, 1.39, 1.37),
    "Cd": Element("Cd", "cadmium", 48, 5, 12, 112.414, 1.69, 1.36, 1.44, None),
    "In": Element("In", "indium", 49, 5, 13, 114.818, 1.78, 1.42, 1.36, 1.46),
    "Sn": Element("Sn", "tin", 50, 5, 14, 118.71, 1.96, 1.4, 1.3, 1.32),
    "Sb": Element("Sb", "antimony", 51, 5, 15, 121.76, 2.05, 1.4, 1.33, 1.27),
    "Te": Element("Te", "tellurium", 52, 5, 16, 127.6, 2.1, 1.36, 1.28, 1.21),
    "I": Element("I", "iodine", 53, 5, 17, 126.90447, 2.66, 1.33, 1.29, 1.25),
    "Xe": Element("Xe", "xenon", 54, 5, 18, 131.293, 2.6, 1.31, 1.35, 1.22),
    "Cs": Element("Cs", "caesium", 55, 6, 1, 132.90545, 0.79, 2.32, 2.09, None),
    "Ba": Element("Ba", "barium", 56, 6, 2, 137.327, 0.89, 1.96, 1.61, 1.49),
    "La": Element("La", "lanthanum", 57, 6, None, 138.90547, 1.1, 1.8, 1.39, 1.39),
    "Ce": Element("Ce", "cerium", 58, 6, None, 140.116, 1.12, 1.63, 1.37, 1.31),
    "Pr": Element("Pr", "praseodymium", 59, 6, None, 140.90766, 1.13, 1.76, 1.38, 1.28),
    "Nd": Element("Nd", "neodymium", 60, 6, None, 144.242, 1.14, 1.74, 1.37, None),
    "Pm": Element("Pm", "promethium", 61, 6, None, 144.91276, None, 1.73, 1.35, None),
    "Sm": Element("Sm", "samarium", 62, 6, None, 150.36, 1.17, 1.72, 1.34, None),
    "Eu": Element("Eu", "europium", 63, 6, None, 151.964, None, 1.68, 1.34, None),
    "Gd": Element("Gd", "gadolinium", 64, 6, None, 157.25, 1.2, 1.69, 1.35, 1.32),
    "Tb": Element("Tb", "terbium", 65, 6, None, 158.92535, None, 1.68, 1.35, None),
    "Dy": Element("Dy", "dysprosium", 66, 6, None, 162.5, 1.22, 1.67, 1.33, None),
    "Ho": Element("Ho", "holmium", 67, 6, None, 164.93033, 1.23, 1.66, 1.33, None),
    "Er": Element("Er", "erbium", 68, 6, None, 167.259, 1.24, 1.65, 1.33, None),
    "Tm": Element("Tm", "thulium", 69, 6, None, 168.93422, 1.25, 1.64, 1.31, None),
    "Yb": Element("Yb", "ytterbium", 70, 6, None, 173.045, None, 1.7, 1.29, None),
    "Lu": Element("Lu", "lutetium", 71, 6, 3, 174.9668, 1.0, 1.62, 1.31, 1.31),
    "Hf": Element("Hf", "hafnium", 72, 6, 4, 178.49, 1.3, 1.52, 1.28, 1.22),
    "Ta": Element("Ta", "tantalum", 73, 6, 5, 180.94788, 1.5, 1.46, 1.26, 1.19),
    "W": Element("W", "tungsten", 74, 6, 6, 183.84, 1.7, 1.37, 1.2, 1.15),
    "Re": Element("Re", "rhenium", 75, 6, 7, 186.207, 1.9, 1.31, 1.19, 1.1),
    "Os": Element("Os", "osmium", 76, 6, 8, 190.23, 2.2, 1.29, 1.16, 1.09),
    "Ir": Element("Ir", "iridium", 77, 6, 9, 192.217, 2.2, 1.22, 1.15, 1.07),
    "Pt": Element("Pt", "platinum", 78, 6, 10, 195.084, 2.2, 1.23, 1.12, 1.1),
    "Au": Element("Au", "gold", 79, 6, 11, 196.96657, 2.4, 1.24, 1.21, 1.23),
    "Hg": Element("Hg", "mercury", 80, 6, 12, 200.592, 1.9, 1.33, 1.42, None),
    "Tl": Element("Tl", "thallium", 81, 6, 13, 204.38, 1.8, 1.44, 1.42, 1.5),
    "Pb": Element("Pb", "lead", 82, 6, 14, 207.2, 1.8, 1.44, 1.35, 1.37),
    "Bi": Element("Bi", "bismuth", 83, 6, 15, 208.9804, 1.9, 1.51, 1.41, 1.35),
    "Po": Element("Po", "polonium", 84, 6, 16, 209, 2.0, 1.45, 1.35, 1.29),
    "At": Element("At", "astatine", 85, 6, 17, 210, 2.2, 1.47, 1.38, 1.38),
    "Rn": Element("Rn", "radon", 86, 6, 18, 222, None, 1.42, 1.45, 1.33),
    "Fr": Element("Fr", "francium", 87, 7, 1, 223, 0.7, 2.23, 2.18, None),
    "Ra": Element("Ra", "radium", 88, 7, 2, 226, 0.9, 2.01, 1.73, 1.59),
    "Ac": Element("Ac", "actinium", 89, 7, None, 227, 1.1, 1.86, 1.53, 1.4),
    "Th": Element("Th", "thorium", 90, 7, None, 232.0377, 1.3, 1.75, 1.43, 1.36),
    "Pa": Element("Pa", "protactinium", 91, 7, None, 231.03588, 1.5, 1.69, 1.38, 1.29),
    "U": Element("U", "uranium", 92, 7, None, 238.02891, 1.7, 1.7, 1.34, 1.18),
    "Np": Element("Np", "neptunium", 93, 7, None, 237, 1.3, 1.71, 1.36, 1.16),
    "Pu": Element("Pu", "plutonium", 94, 7, None, 244, 1.3, 1.72, 1.35, None),
    "Am": Element("Am", "americium", 95, 7, None, 243, None, 1.66, 1.35, None),
    "Cm": Element("Cm", "curium", 96, 7, None, 247, None, 1.66, 1.36, None),
}
# fmt: on
