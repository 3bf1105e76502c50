"""Characters of the cubic and icosahedral groups, from the class of each operation.

Source: E. B. Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations (1955), appendix X,
recalled from memory.
"""

from collections.abc import Iterator

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]
GOLDEN = (1 + 5**0.5) / 2

ROTATION_CLASSES: dict[str, tuple[str, ...]] = {
    "T": ("E", "C3", "C2"),
    "O": ("E", "C3", "C2", "C4", "C2'"),
    "I": ("E", "C5", "C5^2", "C3", "C2"),
}
CHARACTERS: dict[str, dict[str, tuple[float, ...]]] = {
    "T": {"A": (1, 1, 1), "E": (2, -1, 2), "T": (3, 0, -1)},
    "O": {
        "A1": (1, 1, 1, 1, 1),
        "A2": (1, 1, 1, -1, -1),
        "E": (2, -1, 2, 0, 0),
        "T1": (3, 0, -1, 1, -1),
        "T2": (3, 0, -1, -1, 1),
    },
    "I": {
        "A": (1, 1, 1, 1, 1),
        "T1": (3, GOLDEN, 1 - GOLDEN, 0, -1),
        "T2": (3, 1 - GOLDEN, GOLDEN, 0, -1),
        "G": (4, -1, -1, 1, 0),
        "H": (5, 0, 0, -1, 1),
    },
}


def cubic_species(symbol: str, matrices: Array) -> Iterator[tuple[str, int, Array]]:
    """Yield (name, degeneracy, characters (k,)) for T, Td, Th, O, Oh, I or Ih.

    Td has the characters of O: its S4 and mirror planes stand where C4 and C2' stand there.
    """
    improper = np.linalg.det(matrices) < 0
    rotations = np.where(improper[:, None, None], -matrices, matrices)
    family = {"Td": "O"}.get(symbol, symbol[0])
    classes = [_rotation_class(family, rotation) for rotation in rotations]
    for name, row in CHARACTERS[family].items():
        column = dict(zip(ROTATION_CLASSES[family], row, strict=True))
        characters = np.array([column[label] for label in classes])
        if symbol in ("Th", "Oh", "Ih"):
            yield f"{name}g", int(row[0]), characters
            yield f"{name}u", int(row[0]), np.where(improper, -characters, characters)
        else:
            yield name, int(row[0]), characters


def _rotation_class(family: str, rotation: Array) -> str:
    """Return the class of a proper rotation by its angle; C2 and C2' of O by their axes.

    In the standard frame the fourfold axes of O (and the S4 axes of Td) lie along x, y and z,
    so a half turn about one of them is a diagonal matrix.
    """
    turn = round(float(np.degrees(np.arccos(np.clip((np.trace(rotation) - 1) / 2, -1, 1)))))
    if family == "O" and turn == 180:
        on_axis = np.allclose(np.abs(np.diag(rotation)), 1.0, atol=1e-3)
        return "C2" if on_axis else "C2'"
    return {0: "E", 72: "C5", 144: "C5^2", 120: "C3", 90: "C4", 180: "C2"}[turn]
