"""A handful of published values made by hand, so that checks are tested apart from chemistry."""

import pytest

from shapeshelf.linking.published import Published, PublishedCompound, PublishedValue

SITE = "https://shapes.example.org/bench/"
SECTIONS = ("shape", "angles", "lengths", "polarity", "hybridisation", "symmetry", "sources")


def value(quantity, of, number, spread=None, *, labels=(), calculated=None, model=None):
    """Return a measured value; the numbers are invented where they need not be right."""
    return PublishedValue(
        quantity=quantity,
        of=of,
        labels=(of, *labels),
        value=number,
        uncertainty=spread,
        basis="measured",
        source="book",
        measured=number,
        calculated=calculated,
        model=model,
    )


def compound(name, formula, values, names=(), formerly=()):
    return PublishedCompound(
        name=name,
        formula=formula,
        structure="0" * 16,
        names=names,
        formerly=formerly,
        anchors=SECTIONS,
        used_in=("p1",),
        facts={"shape": "bent", "point group": "C2v", "polarity": "polar"},
        values=values,
    )


@pytest.fixture
def published() -> Published:
    """Five compounds and one withdrawn, on a site with an address."""
    sf4 = {
        "angle-f-ax-s-f-ax": value(
            "angle",
            "F(ax)-S-F(ax)",
            173.1,
            0.5,
            labels=("F1-S1-F4",),
            calculated=172.5,
            model=171.8,
        ),
        "angle-f-eq-s-f-eq": value("angle", "F(eq)-S-F(eq)", 101.6, 0.5),
        "length-s-f-ax": value("length", "S-F(ax)", 1.646, 0.003),
        "length-s-f-eq": value("length", "S-F(eq)", 1.545, 0.003),
        "dipole": value("dipole", "dipole moment", 0.632, 0.003),
    }
    h2o = {
        "angle-h-o-h": value("angle", "H-O-H", 104.48, 0.05),
        "length-o-h": value("length", "O-H", 0.9575, 0.0005),
        "dipole": value("dipole", "dipole moment", 1.855, 0.001),
    }
    nh3 = {
        "angle-h-n-h": value("angle", "H-N-H", 106.7, 0.3),
        "length-n-h": value("length", "N-H", 1.012, 0.002),
        "dipole": value("dipole", "dipole moment", 1.47, 0.01),
    }
    bf3 = {
        "angle-f-b-f": value("angle", "F-B-F", 120.0),
        "length-b-f": value("length", "B-F", 1.313, 0.003),
    }
    so2f2 = {
        "angle-o-s-o": value("angle", "O-S-O", 124.0, 0.3),
        "angle-f-s-f": value("angle", "F-S-F", 96.1, 0.3),
        "length-s-o": value("length", "S-O", 1.405, 0.003),
        "length-s-f": value("length", "S-F", 1.530, 0.003),
        "frequency-so2-stretch": value("frequency", "SO2 stretch", 1502.0),
    }
    return Published(
        compounds={
            "sf4": compound(
                "Sulfur tetrafluoride", "SF4", sf4, ("TB-017",), ("sulfur-iv-fluoride",)
            ),
            "h2o": compound("Water", "H2O", h2o),
            "nh3": compound("Ammonia", "NH3", nh3),
            "bf3": compound("Boron trifluoride", "BF3", bf3),
            "so2f2": compound("Sulfuryl fluoride", "SO2F2", so2f2),
        },
        withdrawn={"sf5cl": compound("Sulfur chloride pentafluoride", "SF5Cl", {})},
        site=SITE,
        code="0" * 16,
        shapes=("see-saw", "bent"),
    )
