from shapeshelf.figures.model import Lettering, Role, Stroke
from shapeshelf.figures.to_scale import PIXELS_AN_ANGSTROM, scaled_drawing
from shapeshelf.report.building import report_on_structure

PERSPECTIVE = 0.25
"""A bond in the paper's plane, but nearer or farther than the middle, is drawn so much off."""


def longest_bond_pixels(smiles: str) -> float:
    drawing = scaled_drawing(report_on_structure(smiles))
    symbols = [m for m in drawing.marks if isinstance(m, Lettering) and m.role is Role.SYMBOL]
    ends = [(m.x, m.y) for m in symbols]
    return max(((a - c) ** 2 + (b - d) ** 2) ** 0.5 for a, b in ends for c, d in ends)


def test_two_molecules_share_the_scale():
    """Across linear molecules the drawn length is the real one; none is fitted to the paper.

    Chlorine ends of BeCl2 and oxygen ends of CO2 stand twice the model's bond length apart.
    """
    for smiles, ends in (("O=C=O", (0, 2)), ("Cl[Be]Cl", (0, 2))):
        report = report_on_structure(smiles)
        first, last = (report.structure.coordinates_angstrom[k] for k in ends)
        angstrom = sum((a - b) ** 2 for a, b in zip(first, last, strict=True)) ** 0.5
        drawn = longest_bond_pixels(smiles) / PIXELS_AN_ANGSTROM
        assert abs(drawn / angstrom - 1) < PERSPECTIVE


def test_the_drawing_has_marks_and_room():
    """Atoms are inside the paper."""
    drawing = scaled_drawing(report_on_structure("FS(F)(F)F"))
    strokes = [mark for mark in drawing.marks if isinstance(mark, Stroke)]
    assert all(0 <= x <= drawing.width for mark in strokes for x, _ in mark.points)
