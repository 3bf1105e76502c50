"""The numbers that the turning picture of a compound page is drawn from."""

from markupsafe import Markup

from shapeshelf.figures.turning import TurnScene, turn_scene
from shapeshelf.pages.script_data import script_data
from shapeshelf.report.model import CompoundReport


def turn_data(report: CompoundReport) -> Markup | None:
    """Return the turning picture's data, ``None`` where there is nothing to turn."""
    return script_data(turn_values(turn_scene(report))) if len(report.molecule.atoms) > 1 else None


def turn_values(scene: TurnScene) -> dict[str, object]:
    """Return a scene as JSON values; lengths in ångström, ``scale`` in pixels an ångström."""
    return {
        "size": [scene.width, scene.height],
        "scale": scene.scale,
        "eye": scene.eye_angstrom,
        "view": scene.view,
        "lobe": scene.lobe_radius_angstrom,
        "atoms": [[a.letters, a.place, a.radius_angstrom, a.colour] for a in scene.atoms],
        "bonds": [
            [bond.begin, bond.end, round(bond.order, 2), int(bond.dative), ring]
            for bond, ring in zip(scene.bonds, scene.rings, strict=True)
        ],
        "lobes": [[one.atom, one.place, one.electrons] for one in scene.lobes],
    }
