"""Groups of atoms known for hazard, and the usual caution for each.

Recalled from memory: P. G. Urben (ed.), Bretherick's Handbook of Reactive Chemical Hazards,
7th ed. (2007), ISBN 978-0-12-372563-9, and N. N. Greenwood and A. Earnshaw, Chemistry of the
Elements, 2nd ed. (1997), ISBN 978-0-7506-3365-9. Cautions name the danger; they do not replace
the safety data sheet, local rules or licensed practice.
"""

from dataclasses import dataclass

BRETHERICK = "Bretherick's Handbook of Reactive Chemical Hazards (recalled)"
GREENWOOD = "Greenwood and Earnshaw, Chemistry of the Elements (recalled)"


@dataclass(frozen=True, slots=True)
class HazardGroup:
    """One group of atoms that calls for a caution whatever the label says."""

    key: str
    name: str
    caution: str
    source: str


HAZARD_GROUPS: dict[str, HazardGroup] = {
    group.key: group
    for group in (
        HazardGroup(
            "azide",
            "azide",
            "Azide: may explode on heating, shock or friction; acids set free hydrazoic acid; "
            "keep away from heavy metals, their salts and halogenated solvents.",
            BRETHERICK,
        ),
        HazardGroup(
            "peroxide",
            "peroxide",
            "Peroxide: may decompose violently on heating, shock or contact with metals "
            "or reducing agents.",
            BRETHERICK,
        ),
        HazardGroup(
            "perchlorate",
            "perchlorate",
            "Perchlorate: strong oxidiser; mixtures with organic or other combustible matter "
            "may explode.",
            BRETHERICK,
        ),
        HazardGroup(
            "n-halogen",
            "nitrogen-halogen bond",
            "Nitrogen-halogen bond: strong oxidiser; several such compounds explode "
            "on concentration, warming or contact with organic matter.",
            BRETHERICK,
        ),
        HazardGroup(
            "hydride-gas",
            "volatile hydride",
            "Volatile hydride: toxic or pyrophoric gas, or both; closed system, gas detection "
            "and a scrubber are customary.",
            BRETHERICK,
        ),
        HazardGroup(
            "volatile-fluoride",
            "reactive fluoride",
            "Reactive fluoride: moisture sets free hydrogen fluoride, which burns deeply and "
            "poisons through the skin; have calcium gluconate and trained help within reach.",
            BRETHERICK,
        ),
        HazardGroup(
            "halogen-fluoride",
            "halogen fluoride",
            "Halogen fluoride: ignites many organic materials, and reacts explosively with "
            "water; passivated metal lines only.",
            BRETHERICK,
        ),
        HazardGroup(
            "xenon",
            "xenon compound",
            "Xenon compound: the oxides may detonate, and moisture turns the fluorides into "
            "explosive oxides.",
            GREENWOOD,
        ),
        HazardGroup(
            "metal-carbonyl",
            "metal carbonyl",
            "Metal carbonyl: toxic, and sets free carbon monoxide on heating, light or air.",
            BRETHERICK,
        ),
        HazardGroup(
            "metal-alkyl",
            "main-group metal alkyl",
            "Metal alkyl: ignites in air and reacts violently with water.",
            BRETHERICK,
        ),
        HazardGroup(
            "acid-cyanide",
            "cyanide",
            "Cyanide: acids may set free hydrogen cyanide, a fast poison.",
            BRETHERICK,
        ),
    )
}
