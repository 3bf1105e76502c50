"""The compound page in a real Chromium: the drawing that turns, weight, print, accessibility."""

import gzip
import json
from collections.abc import Callable, Iterator
from pathlib import Path
from typing import Any

import pytest
from axe_playwright_python.sync_playwright import Axe

MODULES = Path(__file__).parents[2] / "site_templates" / "theme" / "js"
MOST_BYTES = 150_000
"""A page with all its figures, compressed."""
FIGURES = ("bench", "lewis", "strip", "nmr", "sheet")
PHONE = {"width": 390, "height": 844}
EXACT = 1e-9
"""Rounding of double precision over some hundred turns."""
A4_POINTS = (595, 842)
POINT = 1.0

PAGES = ("sf4", "sf6", "sulfate", "dppe", "acac")
"""Small, octahedral, an ion, an organic ligand of many atoms, supplied coordinates."""


@pytest.fixture(scope="module")
def home(serve: Callable[[Path], str], demo: Path) -> str:
    return serve(demo)


@pytest.fixture
def page(browser: Any) -> Iterator[Any]:
    context = browser.new_context(viewport={"width": 1440, "height": 900})
    yield context.new_page()
    context.close()


def turn(page: Any, address: str) -> Any:
    """Open a page, switch to the turning picture and return it."""
    page.goto(address)
    page.get_by_role("button", name="Turn", exact=True).click()
    return page.get_by_role("application")


def marks(picture: Any) -> str:
    return str(picture.evaluate("svg => svg.innerHTML"))


def test_arrow_keys_turn_and_home_resets(page: Any, home: str) -> None:
    """Each key changes the picture, its opposite undoes it, Home brings the first view back."""
    page.emulate_media(reduced_motion="reduce")
    picture = turn(page, f"{home}compounds/sf4/")
    first = marks(picture)
    for there, back in (("ArrowLeft", "ArrowRight"), ("ArrowUp", "ArrowDown")):
        page.keyboard.press(there)
        assert marks(picture) != first
        page.keyboard.press(back)
        assert places(picture) == pytest.approx(places(picture, first), abs=0.02)
    page.keyboard.press("Shift+ArrowLeft")
    page.keyboard.press("Home")
    assert marks(picture) == first


def places(picture: Any, markup: str | None = None) -> list[float]:
    """Return the middles of all rings, in the order of their letters."""
    return list(
        picture.evaluate(
            """(svg, markup) => {
              const holder = markup ? svg.cloneNode() : svg;
              if (markup) holder.innerHTML = markup;
              return [...holder.querySelectorAll("circle")]
                .map((ring) => [+ring.getAttribute("cx"), +ring.getAttribute("cy")])
                .sort((a, b) => a[0] - b[0] || a[1] - b[1]).flat();
            }""",
            markup,
        )
    )


def test_drag_turns_and_motion_eases(page: Any, home: str) -> None:
    """A drag turns at once; a key eases, and ends where it ends without motion."""
    picture = turn(page, f"{home}compounds/sf4/")
    first = marks(picture)
    box = picture.bounding_box()
    x, y = box["x"] + box["width"] / 2, box["y"] + box["height"] / 2
    page.mouse.move(x, y)
    page.mouse.down()
    page.mouse.move(x + 60, y + 20)
    page.mouse.up()
    assert marks(picture) != first
    page.keyboard.press("Home")
    page.keyboard.press("ArrowLeft")
    page.wait_for_timeout(400)
    eased = places(picture)
    page.emulate_media(reduced_motion="reduce")
    page.keyboard.press("Home")
    page.keyboard.press("ArrowLeft")
    assert places(picture) == pytest.approx(eased, abs=0.02)


def test_touch_turns_on_a_phone(browser: Any, home: str) -> None:
    """A finger drawn over the picture turns it and does not scroll the page."""
    context = browser.new_context(viewport=PHONE, has_touch=True, color_scheme="dark")
    page = context.new_page()
    picture = turn(page, f"{home}compounds/sf4/")
    picture.scroll_into_view_if_needed()
    first, scrolled = marks(picture), page.evaluate("scrollY")
    box = picture.bounding_box()
    x, y = box["x"] + box["width"] / 2, box["y"] + box["height"] / 2
    session = context.new_cdp_session(page)
    for kind, points in (
        ("touchStart", [{"x": x, "y": y}]),
        ("touchMove", [{"x": x + 40, "y": y - 50}]),
        ("touchEnd", []),
    ):
        session.send("Input.dispatchTouchEvent", {"type": kind, "touchPoints": points})
    page.wait_for_timeout(100)
    assert marks(picture) != first
    assert page.evaluate("scrollY") == scrolled
    assert page.evaluate("document.documentElement.scrollWidth") == PHONE["width"]
    context.close()


def test_escape_gives_the_still_picture_back(page: Any, home: str) -> None:
    """The button tells its state; Escape returns to it; keys to turn by are there for a mouse."""
    turn(page, f"{home}compounds/sf4/")
    button = page.get_by_role("button", name="Turn", exact=True)
    assert button.get_attribute("aria-pressed") == "true"
    assert not page.locator(".fig-bench").is_visible()
    for name in ("Turn left", "Turn right", "Turn up", "Turn down", "Reset"):
        assert page.get_by_role("button", name=name).is_visible()
    page.keyboard.press("Escape")
    assert button.get_attribute("aria-pressed") == "false"
    assert page.locator(".fig-bench").is_visible()
    assert page.evaluate("document.activeElement.textContent") == "Turn"
    assert not page.get_by_role("button", name="Reset").is_visible()


def test_turning_bends_nothing(page: Any, home: str, serve: Callable[[Path], str]) -> None:
    """After a few hundred turns every distance is what it was, so bond lengths keep their ratios;
    what is near the eye is drawn larger by just the rule of perspective."""
    page.goto(f"{home}compounds/sf4/")
    data = json.loads(page.locator("script[data-turn]").text_content())
    page.goto(f"{serve(MODULES)}turn-view.js")
    found = page.evaluate(
        """async (data) => {
          const { turned, projected } = await import("./turn-view.js");
          let view = data.view;
          for (let k = 0; k < 400; k++) view = turned(view, 0.37 * Math.sin(k), 0.21);
          return data.bonds.map(([one, other]) => {
            const seen = [one, other].map((atom) => projected(data.atoms[atom][1], view, data.eye));
            const flat = seen.map(([x, y, z, growth]) => [x / growth, y / growth, z]);
            const length = (a, b) => Math.hypot(...a.map((number, k) => number - b[k]));
            const growths = seen.map(([, , z, growth]) => growth * (data.eye - z) / data.eye);
            return [length(...flat), length(data.atoms[one][1], data.atoms[other][1]), ...growths];
          });
        }""",
        data,
    )
    assert len(found) == 4
    for drawn, real, *growths in found:
        assert drawn == pytest.approx(real, abs=EXACT)
        assert growths == pytest.approx([1.0, 1.0], abs=EXACT)


def test_the_first_picture_needs_no_script(browser: Any, home: str) -> None:
    """Without JavaScript every figure stands, and no button that would do nothing."""
    context = browser.new_context(java_script_enabled=False)
    page = context.new_page()
    page.goto(f"{home}compounds/sf4/")
    assert page.locator(".sheet__drawing svg").first.is_visible()
    for kind in FIGURES:
        assert page.locator(f".fig-{kind}").first.is_visible()
    assert page.locator(".turn").count() == 0
    context.close()


@pytest.mark.parametrize("name", PAGES)
def test_a_page_is_light(page: Any, home: str, name: str) -> None:
    """All that a page loads, as a server would compress it."""
    sizes: dict[str, int] = {}

    def weigh(response: Any) -> None:
        sizes[response.url] = len(gzip.compress(response.body(), 6))

    page.on("response", weigh)
    page.goto(f"{home}compounds/{name}/")
    page.wait_for_load_state("networkidle")
    assert any(address.endswith(".css") for address in sizes)
    assert sum(sizes.values()) <= MOST_BYTES, sizes


@pytest.mark.parametrize("name", ["sf4", "h2o", "sulfate", "sf6"])
def test_a_small_molecule_prints_on_one_sheet(page: Any, home: str, name: str) -> None:
    """A4 upright, one page, whatever face the screen has."""
    page.emulate_media(color_scheme="dark")
    page.goto(f"{home}compounds/{name}/")
    printed = page.pdf(prefer_css_page_size=True)
    boxes = _page_boxes(printed)
    assert len(boxes) == 1
    assert boxes[0] == pytest.approx(A4_POINTS, abs=POINT)


def _page_boxes(printed: bytes) -> list[tuple[float, float]]:
    """Return width and height in points of each page of an uncompressed PDF directory."""
    boxes = []
    for part in printed.split(b"/Type /Page\n")[1:]:
        numbers = part.split(b"/MediaBox [", 1)[1].split(b"]", 1)[0].split()
        boxes.append((float(numbers[2]), float(numbers[3])))
    return boxes


@pytest.mark.parametrize(
    ("name", "scheme"), [*((name, "light") for name in PAGES), ("sf4", "dark"), ("dppe", "dark")]
)
def test_axe_finds_nothing(browser: Any, home: str, name: str, scheme: str) -> None:
    """WCAG 2.2 AA and the common good practice, with the drawing turned too."""
    axe = Axe()
    width = 390 if scheme == "dark" else 1440
    context = browser.new_context(
        bypass_csp=True, color_scheme=scheme, viewport={"width": width, "height": 900}
    )
    page = context.new_page()
    turn(page, f"{home}compounds/{name}/")
    results = axe.run(page)
    found = [(one["id"], one["nodes"][0]["html"][:120]) for one in results.response["violations"]]
    assert found == []
    context.close()
