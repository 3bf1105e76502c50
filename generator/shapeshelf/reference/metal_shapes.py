"""Shapes of metal centres of the d and f block, by coordination and d electrons.

Sources, all recalled from memory:

* N. N. Greenwood and A. Earnshaw, Chemistry of the Elements, 2nd ed. (1997);
* D. L. Kepert, Inorganic Stereochemistry (1982);
* M. Hargittai, Molecular structure of metal halides, Chem. Rev. 100 (2000) 2233;
* M. Kaupp, "Non-VSEPR" structures and bonding in d0 systems, Angew. Chem. Int. Ed. 40 (2001) 3534.

Names of polyhedra: IUPAC, Nomenclature of Inorganic Chemistry: Recommendations 2005, tables
IR-9.2 and IR-9.3, recalled from memory.
"""

GREENWOOD = "Greenwood and Earnshaw, Chemistry of the Elements (1997), recalled from memory"
KEPERT = "Kepert, Inorganic Stereochemistry (1982), recalled from memory"
HARGITTAI = "Hargittai, Chem. Rev. 100 (2000) 2233, recalled from memory"
KAUPP = "Kaupp, Angew. Chem. Int. Ed. 40 (2001) 3534, recalled from memory"

SHAPE_NAMES: dict[str, str] = {
    "L-2": "linear",
    "A-2": "bent",
    "TP-3": "trigonal planar",
    "TPY-3": "trigonal pyramidal",
    "TS-3": "T-shaped",
    "T-4": "tetrahedral",
    "SP-4": "square planar",
    "TBPY-5": "trigonal bipyramidal",
    "SPY-5": "square pyramidal",
    "OC-6": "octahedral",
    "TPR-6": "trigonal prismatic",
    "PBPY-7": "pentagonal bipyramidal",
    "OCF-7": "capped octahedral",
    "TPRS-7": "capped trigonal prismatic",
    "SAPR-8": "square antiprismatic",
    "DD-8": "dodecahedral",
    "HBPY-8": "hexagonal bipyramidal",
    "TPRS-9": "tricapped trigonal prismatic",
}
"""Shape by polyhedral symbol."""

HIGH_COORDINATION: dict[tuple[str, str, int, int], tuple[str, str]] = {
    ("Re", "F", 7, 7): ("PBPY-7", GREENWOOD),
    ("Os", "F", 7, 7): ("PBPY-7", GREENWOOD),
    ("Zr", "F", 4, 7): ("PBPY-7", KEPERT),
    ("Hf", "F", 4, 7): ("PBPY-7", KEPERT),
    ("U", "F", 5, 7): ("PBPY-7", KEPERT),
    ("U", "F", 4, 7): ("PBPY-7", KEPERT),
    ("Nb", "F", 5, 7): ("TPRS-7", GREENWOOD),
    ("Ta", "F", 5, 7): ("TPRS-7", GREENWOOD),
    ("Mo", "F", 6, 7): ("OCF-7", GREENWOOD),
    ("W", "F", 6, 7): ("OCF-7", GREENWOOD),
    ("V", "C", 3, 7): ("PBPY-7", KEPERT),
    ("Mo", "C", 2, 7): ("PBPY-7", KEPERT),
    ("Mo", "C", 3, 7): ("PBPY-7", KEPERT),
    ("Re", "C", 3, 7): ("PBPY-7", KEPERT),
    ("Ta", "F", 5, 8): ("SAPR-8", GREENWOOD),
    ("Re", "F", 7, 8): ("SAPR-8", GREENWOOD),
    ("Re", "F", 6, 8): ("SAPR-8", KEPERT),
    ("W", "F", 6, 8): ("SAPR-8", KEPERT),
    ("Mo", "F", 6, 8): ("SAPR-8", KEPERT),
    ("Zr", "F", 4, 8): ("SAPR-8", KEPERT),
    ("Mo", "C", 4, 8): ("DD-8", KEPERT),
    ("Mo", "C", 5, 8): ("DD-8", KEPERT),
    ("W", "C", 4, 8): ("DD-8", KEPERT),
    ("W", "C", 5, 8): ("DD-8", KEPERT),
    ("Re", "H", 7, 9): ("TPRS-9", GREENWOOD),
    ("Tc", "H", 7, 9): ("TPRS-9", GREENWOOD),
}
"""Polyhedron and source by metal, the one kind of donor atom, oxidation state and coordination.

Where crystals of different salts differ (the octacyanides), the polyhedron of the commonest one.
"""
