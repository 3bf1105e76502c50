"""Projection and the choice of where to look from."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from shapeshelf.figures.bench import Stage, choose_view
from shapeshelf.figures.frames import left_of, principal_frames, shown_true, top_of
from shapeshelf.figures.projection import (
    looking_along,
    orthographic,
    perspective,
    sphere_directions,
)
from shapeshelf.figures.scene import build_scene

EXACT = 1e-9
"""Rounding of double precision in a few products."""

unit = st.tuples(*[st.floats(-1, 1)] * 3).filter(lambda v: np.linalg.norm(v) > 0.1)


@given(toward=unit, up=unit)
def test_a_view_is_a_proper_rotation(toward, up):
    """Rows are right, up and towards the viewer, a right-handed frame."""
    back, upright = np.array(toward) / np.linalg.norm(toward), np.array(up) / np.linalg.norm(up)
    if np.linalg.norm(np.cross(back, upright)) < 1e-3:
        return
    view = looking_along(np.array(toward), np.array(up))
    assert np.allclose(view @ view.T, np.eye(3), atol=1e-9)
    assert np.linalg.det(view) == pytest.approx(1.0)
    assert view[1] @ np.array(up) >= 0


def test_orthographic_views_keep_what_lies_in_the_paper():
    """A length across the line of sight is drawn true, one along it vanishes."""
    seen = orthographic(np.array([[0, 0, 0], [2.0, 0, 0], [0, 0, 3.0]]), np.eye(3))
    assert np.linalg.norm(seen[1, :2] - seen[0, :2]) == pytest.approx(2.0, abs=EXACT)
    assert np.linalg.norm(seen[2, :2] - seen[0, :2]) == pytest.approx(0.0, abs=EXACT)


def test_perspective_draws_near_things_larger():
    """From 10 Å a thing 5 Å nearer is drawn twice as large (similar triangles)."""
    drawn = perspective(np.array([[1.0, 0, 0], [1.0, 0, 5.0]]), np.eye(3), 10.0)
    assert drawn[0, 0] == pytest.approx(1.0, abs=EXACT)
    assert drawn[1, 0] == pytest.approx(2.0, abs=EXACT)


def test_directions_cover_the_sphere_evenly():
    """No direction is farther than 6 degrees from one that is tried."""
    tried = sphere_directions()
    asked = np.random.default_rng(1).normal(size=(200, 3))
    asked /= np.linalg.norm(asked, axis=1)[:, None]
    nearest = np.degrees(np.arccos(np.clip((asked @ tried.T).max(axis=1), -1, 1)))
    assert nearest.max() < 6.0


def test_no_atom_hides_another(reports):
    """In every bench view the rings stand clear of one another."""
    for name, report in reports.items():
        stage = Stage(build_scene(report))
        for one in range(len(stage.atoms)):
            for other in range(one):
                apart = np.hypot(*(stage.atoms[one, :2] - stage.atoms[other, :2]))
                assert apart > stage.radii[one] + stage.radii[other], name


def test_the_view_does_not_depend_on_how_a_molecule_lies(reports):
    """The scene is in the principal frame; the same report gives the same view."""
    first, second = (choose_view(build_scene(reports["sf4"])) for _ in range(2))
    assert np.array_equal(first, second)


def test_first_angle_views_belong_together():
    """From above one looks down; from the left the front lies to the right (ISO 5456-2)."""
    front = np.eye(3)
    up, nearer, left = np.array([0, 1.0, 0]), np.array([0, 0, 1.0]), np.array([-1.0, 0, 0])
    assert top_of(front)[2] @ up == 1
    assert top_of(front)[1] @ nearer == -1
    assert left_of(front)[2] @ left == 1
    assert left_of(front)[0] @ nearer == 1
    assert np.linalg.det(top_of(front)) == pytest.approx(1)
    assert np.linalg.det(left_of(front)) == pytest.approx(1)


@pytest.mark.parametrize(
    ("name", "true_rows"), [("sf4", 2), ("clf3", 2), ("pf5", 3), ("bf3", 1), ("cf4", 1), ("nh3", 0)]
)
def test_principal_views_show_what_can_be_shown(reports, name, true_rows):
    """Counted by hand: NH3's angle lies in no principal plane, all of PF5's do."""
    report = reports[name]
    scene, rows = build_scene(report), list(report.centres[0].angles)
    frames = principal_frames(scene, rows, False)
    shown = [
        any(shown_true(scene.points, f, trio) for f in frames.values() for trio in row.members)
        for row in rows
    ]
    assert sum(shown) == true_rows
