"""Words by which a text says what a number is: of this kind or another, exact, rough or a bound.

English, as far as protocols need it; common practice, no source.
"""

import re

SENTENCE_END = re.compile(r"(?<=[.!?])[\"')\]*_]*\s+(?=[\"'(\[*_]*[A-Z\ufffc])")
ABBREVIATION = re.compile(
    r"(?:\b(?:ca|cf|e\.g|i\.e|vs|resp|approx|no|nos|fig|figs|ref|refs|eq|al))\.$", re.I
)
TIES = re.compile(
    r"[\s,]*(?:\(|\[|(?:is\s+)?(?:for|in|of|from|by|at|see|cf\.|according to|taken from|as in)\b)"
    r"[\s(\[]*(?:see|the|our|gaseous|gas-phase|free|solid|liquid|from|page of|entry for)?[\s:]*",
    re.IGNORECASE,
)
WORD_START = re.compile(r"(?<![\w-])(?=\S)")
WORD_END = re.compile(r"(?<=\S)(?![\w-])")
FORMULA = re.compile(r"(?<![\w(-])(?:[A-Z][a-z]?\d*){2,}(?![\w-])")
SYMBOL = re.compile(r"[A-Z][a-z]?")
NOT_THIS = re.compile(
    r"\b(?:ideal|textbook|tetrahedral|octahedral|expected|usual|instead|rather|than|above|below"
    r"|under|over|exceed\w*|least|most|less|more|not|never|no|nor|formerly|previously|up to|once"
    r"|old|older|within|short of)\b|[<>≤≥]|\b(?:by|difference of)\s*$",
    re.IGNORECASE,
)
OTHER_KIND_BEFORE = re.compile(
    r"\b(?:turn\w*|rotat\w*|tilt\w*|rock\w*|inclin\w*|quarter|valve|theta|cone|bite|dihedral"
    r"|torsion\w*|twist\w*|contact|Bragg|flip|pulse|incidence|scattering|phase|sieve\w*|pore\w*"
    r"|mesh|lattice|cell|wavelength|resolution|radius|radii|diameter|cut-?off|distance to"
    r"|hydrogen bonds?|intermolecular|optical|specific|latitude|longitude|steps? of)\b|2θ|\[α\]",
    re.IGNORECASE,
)
OTHER_KIND_AFTER = re.compile(
    r"\s*(?:[-\s]*(?:molecular\s+)?sieves?|[-\s]*MS\b|[-\s]*(?:NMR|printer|printed|view|drawing"
    r"|scans?|images?|maps?|spectr\w+|pulse|bend|elbow|turn|rotation|cone|pores?|resolution)\b)",
    re.IGNORECASE,
)
NO_VALUE_BEFORE = re.compile(
    r"(?:\b(?:section|sect|table|fig(?:ure)?|step|eq(?:uation)?|ref|no|nr|version|chapter|page"
    r"|scheme|entry|note|part|protocol|appendix|day|rev(?:ision)?)\b\.?|[§#v])\s*$",
    re.IGNORECASE,
)
BOUND_BEFORE = re.compile(
    r"(?:[<>≤≥]|\b(?:more|less|greater|smaller|larger|wider|narrower) than|\b(?:over|above|below"
    r"|under|up to|at least|at most))\s*$",
    re.IGNORECASE,
)
ABOUT = re.compile(
    r"(?:\b(?:about|approx\w*\.?|ca\.?|circa|roughly|around|near(?:ly)?|close to|some)|[~≈∼])"
    r"[\s(]*$",
    re.IGNORECASE,
)
CONTRAST = re.compile(
    r"\b(?:while|whereas|but|unlike|versus|vs|compared|against|instead|and not)\b", re.IGNORECASE
)
ANGLE_WORDS = re.compile(r"\bangles?\b|\bangular\b", re.IGNORECASE)
THREE_ATOMS = re.compile(r"\b[A-Z][a-z]?\d*(?:\(\w+\))?(?:[-–‐‑−][A-Z][a-z]?\d*(?:\(\w+\))?){2}")
DIPOLE_WORDS = re.compile(r"\bdipoles?\b|\bmoments?\b|\bpolar\b|\bpolarity\b", re.IGNORECASE)
FAR = 600
"""Characters from a link beyond which a number is not beside it, in whatever sentence."""
NEAR = 40
"""Characters before a number in which a word is next to it."""
