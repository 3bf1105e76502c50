"""Vertices of the IUPAC polyhedra, as polar angles of unit vectors from the central atom.

Polyhedral symbols: IUPAC, Nomenclature of Inorganic Chemistry: Recommendations 2005 (the
"Red Book"), ISBN 0-85404-438-8, tables IR-9.2 and IR-9.3, recalled from memory.

A vertex is (polar angle from +z, azimuth from +x), both in degrees; all vertices are equally far
from the centre. Where symmetry leaves an angle free it is settled so:

* A-2, TPY-3: tetrahedral angles, as for a tetrahedron with vertices left out. TS-3: an
  octahedron less three vertices. SS-4: a trigonal bipyramid less an equatorial vertex.
  SPY-4: SPY-5 less its apex, the central atom above the square.
* TPR-6, TPRT-8, TPRS-8: the prism of equal edges; caps over the centres of its faces.
  SAPR-8: the antiprism of equal edges.
* SPY-5: apical-basal angle 104.08 degrees, where point charges on a sphere balance.
* OCF-7, TPRS-7, TPRS-9: stationary points on the sphere of a repulsion falling off with the
  sixth power of distance (the energy of D. L. Kepert, Inorganic Stereochemistry, 1982).
* DD-8: angles 36.85 and 69.46 degrees of the hard-sphere dodecahedron of J. L. Hoard and
  J. V. Silverton, Inorg. Chem. 2 (1963) 235 (recalled from memory).
"""

Vertex = tuple[float, float]

_TETRAHEDRAL = 109.47122063449069
_PRISM = 49.10660535086909
"""Polar angle of the vertices of the uniform prism: tan = 2/sqrt(3)."""

_SQUARE = ((90.0, 0.0), (90.0, 90.0), (90.0, 180.0), (90.0, 270.0))
_BASE = (
    (104.07554455, 0.0),
    (104.07554455, 90.0),
    (104.07554455, 180.0),
    (104.07554455, 270.0),
)
_POLES = ((0.0, 0.0), (180.0, 0.0))
_TRIANGLE = ((90.0, 0.0), (90.0, 120.0), (90.0, 240.0))
_PENTAGON = ((90.0, 0.0), (90.0, 72.0), (90.0, 144.0), (90.0, 216.0), (90.0, 288.0))
_HEXAGON = (*_TRIANGLE, (90.0, 60.0), (90.0, 180.0), (90.0, 300.0))
_HEPTAGON = (
    (90.0, 0.0),
    (90.0, 360.0 / 7),
    (90.0, 720.0 / 7),
    (90.0, 1080.0 / 7),
    (90.0, 1440.0 / 7),
    (90.0, 1800.0 / 7),
    (90.0, 2160.0 / 7),
)
_UNIFORM_PRISM = (
    (_PRISM, 0.0),
    (_PRISM, 120.0),
    (_PRISM, 240.0),
    (180.0 - _PRISM, 0.0),
    (180.0 - _PRISM, 120.0),
    (180.0 - _PRISM, 240.0),
)
_PRISM_SIDES = ((90.0, 60.0), (90.0, 180.0), (90.0, 300.0))
_UPPER_FACE = ((54.735610317245346, 0.0), (54.735610317245346, 120.0), (54.735610317245346, 240.0))
_LOWER_FACE = (
    (125.26438968275465, 60.0),
    (125.26438968275465, 180.0),
    (125.26438968275465, 300.0),
)

POLYHEDRA: dict[int, dict[str, tuple[Vertex, ...]]] = {
    2: {
        "L-2": _POLES,
        "A-2": ((0.0, 0.0), (_TETRAHEDRAL, 0.0)),
    },
    3: {
        "TP-3": _TRIANGLE,
        "TPY-3": ((_TETRAHEDRAL, 0.0), (_TETRAHEDRAL, 120.0), (_TETRAHEDRAL, 240.0)),
        "TS-3": (*_POLES, (90.0, 0.0)),
    },
    4: {
        "T-4": (
            (0.0, 0.0),
            (_TETRAHEDRAL, 0.0),
            (_TETRAHEDRAL, 120.0),
            (_TETRAHEDRAL, 240.0),
        ),
        "SP-4": _SQUARE,
        "SPY-4": _BASE,
        "SS-4": (*_POLES, (90.0, 0.0), (90.0, 120.0)),
    },
    5: {
        "TBPY-5": (*_POLES, *_TRIANGLE),
        "SPY-5": ((0.0, 0.0), *_BASE),
    },
    6: {
        "OC-6": (*_POLES, *_SQUARE),
        "TPR-6": _UNIFORM_PRISM,
    },
    7: {
        "PBPY-7": (*_POLES, *_PENTAGON),
        "OCF-7": (
            (0.0, 0.0),
            (74.62564042, 0.0),
            (74.62564042, 120.0),
            (74.62564042, 240.0),
            (130.25431154, 60.0),
            (130.25431154, 180.0),
            (130.25431154, 300.0),
        ),
        "TPRS-7": (
            (0.0, 0.0),
            (79.38258659, 41.27323142),
            (79.38258659, -41.27323142),
            (79.38258659, 138.72676858),
            (79.38258659, 221.27323142),
            (143.29956937, 90.0),
            (143.29956937, 270.0),
        ),
    },
    8: {
        "CU-8": (
            (54.735610317245346, 0.0),
            (54.735610317245346, 90.0),
            (54.735610317245346, 180.0),
            (54.735610317245346, 270.0),
            (125.26438968275465, 0.0),
            (125.26438968275465, 90.0),
            (125.26438968275465, 180.0),
            (125.26438968275465, 270.0),
        ),
        "SAPR-8": (
            (59.26413290, 0.0),
            (59.26413290, 90.0),
            (59.26413290, 180.0),
            (59.26413290, 270.0),
            (120.73586710, 45.0),
            (120.73586710, 135.0),
            (120.73586710, 225.0),
            (120.73586710, 315.0),
        ),
        "DD-8": (
            (36.85, 0.0),
            (36.85, 180.0),
            (143.15, 90.0),
            (143.15, 270.0),
            (69.46, 90.0),
            (69.46, 270.0),
            (110.54, 0.0),
            (110.54, 180.0),
        ),
        "HBPY-8": (*_POLES, *_HEXAGON),
        "OCT-8": (*_POLES, *_UPPER_FACE, *_LOWER_FACE),
        "TPRT-8": (*_POLES, *_UNIFORM_PRISM),
        "TPRS-8": (*_UNIFORM_PRISM, *_PRISM_SIDES[:2]),
    },
    9: {
        "TPRS-9": (
            *_PRISM_SIDES,
            (44.69222993, 0.0),
            (44.69222993, 120.0),
            (44.69222993, 240.0),
            (135.30777007, 0.0),
            (135.30777007, 120.0),
            (135.30777007, 240.0),
        ),
        "HBPY-9": (*_POLES, *_HEPTAGON),
    },
}
"""Vertices by number of neighbours and by IUPAC polyhedral symbol."""
