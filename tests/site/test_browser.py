"""The site in a real Chromium: the demo site as a chemist uses it, by keyboard and on a phone."""

import json
from collections.abc import Callable, Iterator
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any
from urllib.parse import urlsplit

import pytest

PHONE = {"width": 390, "height": 844}
DESK = {"width": 1440, "height": 900}


@dataclass
class Visit:
    """A page of the browser with everything it complained of or asked of other hosts."""

    page: Any
    home: str
    complaints: list[str] = field(default_factory=list)
    outside: list[str] = field(default_factory=list)


@pytest.fixture
def visit(browser: Any, serve: Callable[[Path], str], three: Path) -> Iterator[Visit]:
    yield from _visit(browser, serve(three))


@pytest.fixture
def demo_visit(browser: Any, serve: Callable[[Path], str], demo: Path) -> Iterator[Visit]:
    yield from _visit(browser, serve(demo))


@pytest.mark.parametrize(
    ("typed", "name"),
    [
        ("7783-60-0", "Sulfur tetrafluoride"),
        ("7783600", "Sulfur tetrafluoride"),
        ("SF4", "Sulfur tetrafluoride"),
        ("F4S", "Sulfur tetrafluoride"),
        ("SF₄", "Sulfur tetrafluoride"),
        ("sulphur tetra", "Sulfur tetrafluoride"),
    ],
)
def test_a_compound_of_the_demo_is_found_and_opened(
    demo_visit: Visit, typed: str, name: str
) -> None:
    """By CAS number, by formula in any order and script, by the start of its name."""
    page = demo_visit.page
    page.goto(demo_visit.home)
    page.keyboard.press("/")
    page.keyboard.type(typed)
    page.locator("#find-answers [role=option]").first.wait_for()
    page.keyboard.press("Enter")
    page.wait_for_url("**/compounds/sf4/")
    assert page.locator("h1").inner_text() == name
    assert demo_visit.complaints == []
    assert demo_visit.outside == []


def test_every_kind_of_page_of_the_demo_is_quiet(demo_visit: Visit) -> None:
    """No console error, no request to another host, no sideways scrolling on a phone."""
    page = demo_visit.page
    page.set_viewport_size(PHONE)
    for path in (
        "", "lookup/", "shapes/", "shapes/see-saw/", "compounds/", "compounds/sf4/",
        "compounds/dppe/", "compounds/nitrate/", "compounds/s2f10/",
        "compounds/oxidohexafluorotellurate/", "sources/", "protocols/", "protocols/tb-p01/",
        "methods/",
        "start/", "glossary/", "compare/?ids=sf4,clf3,xef4", "lookup/?shape=see-saw",
    ):  # fmt: skip
        page.goto(demo_visit.home + path)
        page.wait_for_load_state("networkidle")
        width = page.evaluate("document.documentElement.scrollWidth")
        assert (path, width) == (path, PHONE["width"])
    assert demo_visit.complaints == []
    assert demo_visit.outside == []


def test_the_field_is_a_combobox_worked_by_keyboard(visit: Visit) -> None:
    """Roles and states follow what is typed; arrows move, Escape closes, Enter opens."""
    page = visit.page
    page.goto(visit.home + "compounds/water/")
    field_ = page.get_by_role("combobox", name="Find a compound or a shape")
    assert field_.get_attribute("aria-expanded") == "false"
    page.keyboard.press("/")
    page.keyboard.type("t")
    page.locator("#find-answers [role=option]").first.wait_for()
    assert field_.get_attribute("aria-expanded") == "true"
    first = field_.get_attribute("aria-activedescendant")
    page.keyboard.press("ArrowDown")
    assert field_.get_attribute("aria-activedescendant") != first
    page.keyboard.press("Escape")
    assert field_.get_attribute("aria-expanded") == "false"
    page.keyboard.press("Control+a")
    page.keyboard.type("tb017")
    page.locator("#find-answers [role=option]").first.wait_for()
    page.keyboard.press("Enter")
    page.wait_for_url("**/compounds/sf4/")


def test_a_shape_and_nothing_are_answered_too(visit: Visit) -> None:
    """A shape's name leads to its page; what is not there is said so."""
    page = visit.page
    page.goto(visit.home)
    page.keyboard.press("/")
    page.keyboard.type("qqqqqq")
    page.get_by_text("Nothing in the catalogue answers to this.").wait_for()
    page.keyboard.press("Control+a")
    page.keyboard.type("seesaw")
    page.locator("#find-answers [role=option]", has_text="see-saw").first.wait_for()
    page.keyboard.press("Enter")
    page.wait_for_url("**/shapes/see-saw/")


def test_an_earlier_address_keeps_the_anchor(visit: Visit) -> None:
    """Links in protocols outlive a change of id."""
    visit.page.goto(visit.home + "compounds/sulfur-four/#angles")
    visit.page.wait_for_url("**/compounds/sf4/#angles")
    assert visit.complaints == []


def test_the_lookup_page_takes_its_query_from_the_address(visit: Visit) -> None:
    """So that a list can be linked to."""
    page = visit.page
    page.goto(visit.home + "lookup/?q=no3-")
    page.locator("tbody tr").first.wait_for()
    assert page.locator("tbody tr th").all_inner_texts() == ["Nitrate ion"]
    assert page.get_by_role("status").inner_text() == "1 compound"


def test_the_chosen_face_is_kept(visit: Visit) -> None:
    """Dark after one press, and still on the next page."""
    page = visit.page
    page.goto(visit.home)
    page.get_by_role("button", name="Dark face").click()
    page.goto(visit.home + "shapes/")
    assert page.evaluate("document.documentElement.dataset.face") == "blueprint"


def _visit(browser: Any, home: str) -> Iterator[Visit]:
    context = browser.new_context(viewport=DESK, color_scheme="light")
    visit = Visit(context.new_page(), home)
    host = urlsplit(home).netloc
    visit.page.on(
        "console",
        lambda message: (
            message.type in ("error", "warning") and visit.complaints.append(message.text)
        ),
    )
    visit.page.on("pageerror", lambda error: visit.complaints.append(str(error)))
    visit.page.on(
        "request",
        lambda request: urlsplit(request.url).netloc != host and visit.outside.append(request.url),
    )
    yield visit
    context.close()


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("7783-60-0", "sf4"),
        ("7783600", "sf4"),
        ("CAS 7783-60-0", "sf4"),
        ("TB-017", "sf4"),
        ("tb017", "sf4"),
        ("Sulphur tetrafluoride", "sf4"),
        ("sulfur(IV) fluoride", "sf4"),
        ("sulfer tetraflouride", "sf4"),
        ("H2O", "water"),
        ("OH2", "water"),
        ("wat", "water"),
        ("nitrate", "nitrate"),
        ("NO3", "nitrate"),
        ("[NO3]-", "nitrate"),
    ],
)
def test_the_compound_meant_stands_first(
    in_node: Callable[..., Any], three: Path, text: str, expected: str
) -> None:
    """Identifiers in full, names with slips, formulas with and without their charge."""
    script = """
      import { prepare } from "./js/index.js";
      import { find } from "./js/find.js";
      tell(find(prepare(given.index), given.text, 1).map((row) => row.id));
    """
    index = json.loads((three / "lookup-index.json").read_text("utf-8"))
    assert in_node(script, {"index": index, "text": text}) == [expected]
