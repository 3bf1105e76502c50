"""Forty and more queries with the answer expected first, filters, comparison, opened files."""

import csv
import gzip
import json
import shutil
from collections.abc import Callable, Iterator
from pathlib import Path
from typing import Any
from urllib.parse import urlsplit

import pytest
from axe_playwright_python.sync_playwright import Axe

from shapeshelf.plugin import build_site

DATA = Path(__file__).parents[1] / "data"
QUERIES = list(csv.DictReader((DATA / "queries.csv").read_text("utf-8").splitlines()))
DESK = {"width": 1440, "height": 900}
MOST_SCRIPT_BYTES = 60_000
"""All script of the site, compressed."""
LEAST_TARGET = 24
"""Pixels: WCAG 2.2, success criterion 2.5.8."""

FIND_ALL = """
  import { prepare } from "./js/index.js";
  import { find } from "./js/find.js";
  const index = prepare(given.index);
  tell(given.queries.map((query) => find(index, query, 1)[0] ?? null));
"""
FIND_WORDS = """
  import { prepare } from "./js/index.js";
  import { find } from "./js/find.js";
  import { foldedWords } from "./js/lines.js";
  const index = prepare(given.index);
  const words = foldedWords;
  const facts = ({ shape, group, polarity, tags }) => [shape, group, polarity, ...tags];
  const wordsOf = (one, also) => [
    ...[one.name, ...also].flatMap(words),
    ...facts(one).flatMap((text) => [...words(text), words(text).join("")]),
  ];
  const begun = (words, asked) =>
    asked.split(" ").every((start) => words.some((word) => word.startsWith(start)));
  const { columns } = index;
  const all = columns.id.map((id) => find(index, id, 1)[0]);
  tell(given.queries.map((asked) => [
    all.filter((one, at) => begun(wordsOf(one, columns.also[at] || []), asked)).map(({ id }) => id),
    find(index, asked).filter(({ kind }) => kind === "compound").map(({ id }) => id),
  ]));
"""
FILTER_ALL = """
  import { all } from "./js/bits.js";
  import { filterBy, prepareFacets } from "./js/facets.js";
  import { itemAt, prepare } from "./js/index.js";
  import { rangeSet } from "./js/ranges.js";
  import { has } from "./js/bits.js";
  const index = prepare(given.index);
  const prepared = prepareFacets(index, given.facets);
  tell(given.cases.map(({ chosen, asked }) => {
    const { left } = filterBy(prepared, chosen, rangeSet(prepared, asked));
    return Array.from({ length: index.compounds }, (_, at) => at)
      .filter((at) => has(left, at)).map((at) => itemAt(index, at).id);
  }));
"""
COUNTS = """
  import { all, size } from "./js/bits.js";
  import { filterBy, GROUPS, prepareFacets } from "./js/facets.js";
  import { prepare } from "./js/index.js";
  const prepared = prepareFacets(prepare(given.index), given.facets);
  const every = all(prepared.size);
  const wrong = [];
  for (const { key, mode } of GROUPS) {
    const { counts } = filterBy(prepared, given.chosen, every);
    for (const [value, count] of counts[key]) {
      const others = given.chosen[key] ?? [];
      const chosen = { ...given.chosen, [key]: mode === "every" ? [...others, value] : [value] };
      const found = size(filterBy(prepared, chosen, every).left);
      if (found !== count) wrong.push([key, value, count, found]);
    }
  }
  tell(wrong);
"""
TERMS = """
  import { CHOICES } from "./js/columns.js";
  import { ROW_TERMS } from "./js/compare-rows.js";
  import { GROUPS } from "./js/facets.js";
  const named = [...CHOICES, ...GROUPS].map(({ term }) => term).filter(Boolean);
  tell([...Object.values(ROW_TERMS), ...named]);
"""
FILTERS: list[tuple[dict[str, list[str]], dict[str, str], list[str]]] = [
    ({"shape": ["see-saw"]}, {}, ["sf4", "tecl4", "xeo2f2"]),
    ({"shape": ["T-shaped"], "element": ["Cl"]}, {}, ["clf3"]),
    ({"neighbours": ["4"], "pairs": ["2"]}, {}, ["tetrachloroiodate", "xef4"]),
    ({"element": ["Xe"], "polarity": ["polar"], "shape": ["square pyramidal"]}, {}, ["xeof4"]),
    ({"group": ["D3h"], "element": ["B"]}, {}, ["bcl3", "bf3"]),
    ({}, {"angle-from": "101.5", "angle-to": "101.7", "end": "F", "middle": "S"}, ["sf4"]),
    ({"shape": ["square planar"]}, {"near": "90", "within": "0.2", "middle": "Xe"}, ["xef4"]),
    ({"element": ["O"]}, {"mass-to": "20"}, ["h2o"]),
    ({"element": ["S", "F"]}, {"signals": "1", "nucleus": "19F", "stretches": "1"}, ["sf6"]),
]  # fmt: skip
"""Sets that follow from the demo catalogue's structures: shapes, elements and the measured
angles of its entries."""


@pytest.fixture(scope="session")
def found(in_node: Callable[..., Any], demo: Path) -> dict[str, Any]:
    queries = [case["query"] for case in QUERIES]
    answers = in_node(FIND_ALL, {"index": _data(demo, "lookup-index"), "queries": queries})
    return dict(zip(queries, answers, strict=True))


@pytest.mark.parametrize("case", QUERIES, ids=lambda case: case["query"])
def test_the_expected_answer_stands_first(found: dict[str, Any], case: dict[str, str]) -> None:
    """Identifiers, names, misspellings, formulas, shapes, groups, terms and pages."""
    answer = found[case["query"]]
    assert answer is not None
    last = answer.get("id") or answer["address"].rstrip("/").replace("=", "/").replace("#", "/")
    assert (answer["kind"], last.split("/")[-1]) == (case["kind"], case["expected"])


def test_each_word_may_begin_a_name_or_a_fact(in_node: Callable[..., Any], demo: Path) -> None:
    """Names, shape, point group, polarity and tags together, held against a plain search."""
    queries = ["fluoride gas", "tetrahedral polar chlor", "nonpolar fluor", "seesaw nonpolar"]
    given = {"index": _data(demo, "lookup-index"), "queries": queries}
    answers = in_node(FIND_WORDS, given)
    assert [sorted(found) for _, found in answers] == [sorted(plain) for plain, _ in answers]
    assert [len(plain) > 1 for plain, _ in answers] == [True, True, True, False]


def test_filters_leave_the_compounds_that_fit(in_node: Callable[..., Any], demo: Path) -> None:
    """Choices of a group together, groups at one and the same centre, ranges on top."""
    cases = [{"chosen": chosen, "asked": asked} for chosen, asked, _ in FILTERS]
    left = in_node(FILTER_ALL, {**_both(demo), "cases": cases})
    assert [sorted(ids) for ids in left] == [sorted(ids) for _, _, ids in FILTERS]


@pytest.mark.parametrize(
    "chosen",
    [{}, {"element": ["F"]}, {"neighbours": ["4"], "polarity": ["polar"]}, {"pairs": ["1", "2"]}],
)
def test_the_count_beside_a_choice_is_what_it_leaves(
    in_node: Callable[..., Any], demo: Path, chosen: dict[str, list[str]]
) -> None:
    """Every count of every group, by making the choice."""
    assert in_node(COUNTS, {**_both(demo), "chosen": chosen}) == []


def test_all_script_is_small(three: Path) -> None:
    """The one script and the two that are loaded apart."""
    packed = sum(len(gzip.compress(path.read_bytes(), 9)) for path in (three / "js").glob("*.js"))
    assert packed < MOST_SCRIPT_BYTES


def test_a_filtered_list_is_made_by_keyboard_and_kept_in_the_address(page: Any, home: str) -> None:
    """Type, tick a choice with the space bar, sort with Enter; the address opens the same list."""
    page.goto(f"{home}lookup/")
    page.locator("[data-ready]").wait_for()
    page.locator("#ask").press_sequentially("fluoride")
    page.locator("input[name=element][value=Xe]").focus()
    page.keyboard.press("Space")
    page.get_by_role("button", name="Key angle, °").focus()
    page.keyboard.press("Enter")
    page.locator("th[aria-sort=ascending]").wait_for()
    names = page.locator("tbody th").all_inner_texts()
    assert len(names) > 2
    assert page.url.partition("?")[2] == "q=fluoride&element=Xe&sort=angle"
    page.goto(page.url)
    page.locator("[data-ready]").wait_for()
    assert page.locator("tbody th").all_inner_texts() == names


def test_the_table_is_downloaded_as_csv(page: Any, home: str) -> None:
    """The columns shown, all rows, a byte-order mark first."""
    page.goto(f"{home}lookup/?shape=see-saw&columns=formula,cas")
    page.locator("[data-ready]").wait_for()
    with page.expect_download() as download:
        page.get_by_role("button", name="CSV").click()
    lines = Path(download.value.path()).read_text("utf-8").splitlines()
    assert lines[0] == "\ufeffName,Formula,CAS"
    assert "Sulfur tetrafluoride,SF4,7783-60-0" in lines
    assert len(lines) == 4


def test_compounds_are_compared_to_one_scale(page: Any, home: str) -> None:
    """Rows line up, differences are marked, drawings share one number of pixels an ångström."""
    page.goto(f"{home}compare/?ids=sf4,tecl4")
    page.locator("[data-ready]").wait_for()
    shape = page.locator("tbody tr", has=page.get_by_role("rowheader", name="Shape", exact=True))
    assert shape.locator("td").all_inner_texts() == ["see-saw", "see-saw"]
    assert page.locator("tr.compare__unlike th", has_text="•-Cl(ax)").count() == 0
    assert page.locator("tr.compare__unlike th", has_text="Molar mass").count() == 1
    scales = page.locator(".compare__drawing svg").evaluate_all(
        "(all) => all.map((svg) => svg.width.baseVal.value / svg.viewBox.baseVal.width)"
    )
    assert scales[0] == pytest.approx(scales[1], rel=0.01)  # sizes are rounded to a tenth


def test_a_compound_is_added_and_taken_out(page: Any, home: str) -> None:
    """By the field and the button; the address follows."""
    page.goto(f"{home}compare/?ids=sf4")
    page.locator("[data-ready]").wait_for()
    page.locator("#add").fill("clf3")
    page.keyboard.press("Enter")
    page.get_by_role("columnheader", name="Chlorine trifluoride").wait_for()
    assert page.url.endswith("?ids=sf4,clf3")
    page.get_by_role("button", name="Take Sulfur tetrafluoride out").click()
    page.wait_for_url("**/compare/?ids=clf3")


def test_every_term_a_module_names_is_in_the_glossary(
    in_node: Callable[..., Any], demo: Path
) -> None:
    """Headings and filters of the lookup, rows of a comparison."""
    assert set(in_node(TERMS)) <= set(_data(demo, "glossary"))


def test_rows_and_badges_of_a_comparison_are_explained(page: Any, home: str) -> None:
    """As they are on a compound's page; a recalled value is a measured one as well."""
    page.goto(f"{home}compare/?ids=sf4,clf3")
    page.locator("[data-ready]").wait_for()
    page.get_by_role("link", name="Lone pairs").focus()
    assert page.get_by_role("tooltip").inner_text().startswith("Two valence electrons")
    angle = page.locator("tbody tr", has=page.get_by_role("rowheader", name="F(eq)-•-F(eq)"))
    badges = angle.locator("td").first.get_by_role("link")
    assert badges.all_inner_texts() == ["measured", "recalled"]


def test_the_sample_of_a_citation_is_what_the_button_copies(page: Any, home: str) -> None:
    """The newcomers' page shows one of the group's own values as its link."""
    page.goto(f"{home}start/")
    sample = page.locator(".sample").inner_text()
    path, anchor = sample.removesuffix(")").rpartition("(…/")[2].split("#")
    page.goto(home + path)
    name = page.locator("article.compound").get_attribute("data-name")
    held = page.locator(f"#{anchor}").evaluate("(row) => ({ ...row.dataset })")
    value = " ".join(held["value"].split())
    said = f"{name}, {held['of']}: {value} ({held['basis']})"
    assert " ".join(sample.split()) == f"[{said}](…/{path}#{anchor})"


def test_a_line_of_the_scale_leads_to_its_compound(page: Any, home: str) -> None:
    """By its name to a screen reader, by keyboard with a rim to see, by a target to tap."""
    page.goto(f"{home}shapes/see-saw/")
    link = page.locator(".scale").get_by_role("link", name="Sulfur tetrafluoride: 87")
    area = link.locator("rect")
    assert area.bounding_box()["height"] >= LEAST_TARGET
    bare = area.evaluate("(rect) => getComputedStyle(rect).stroke")
    page.locator(".scale").focus()
    page.keyboard.press("Tab")
    assert link.evaluate("(link) => link === document.activeElement")
    assert area.evaluate("(rect) => getComputedStyle(rect).stroke") != bare
    page.keyboard.press("Enter")
    page.wait_for_url("**/compounds/sf4/")


def test_a_badge_explains_itself(page: Any, home: str) -> None:
    """When the pointer rests on it; the tab key stops at the first of a kind."""
    page.emulate_media(reduced_motion="reduce")
    page.goto(f"{home}compounds/sf4/")
    badges = page.locator("a.basis--measured")
    assert badges.evaluate_all("(all) => all.filter((one) => one.tabIndex === 0).length") == 1
    badges.last.hover()
    note = page.get_by_role("tooltip")
    note.wait_for()
    assert note.inner_text().startswith("Published from an experiment")
    page.goto(f"{home}lookup/?columns=basis")
    page.locator("[data-ready]").wait_for()
    page.get_by_role("button", name="Basis").focus()
    note.wait_for()
    assert note.inner_text().startswith("What a value rests on")


def test_a_term_is_explained_where_it_stands(page: Any, home: str) -> None:
    """On focus, told to a screen reader, gone with Escape."""
    page.goto(f"{home}compounds/sf4/")
    link = page.locator("a.term", has_text="Point group").first
    link.focus()
    note = page.get_by_role("tooltip")
    note.wait_for()
    assert note.inner_text().startswith("The set of all symmetry operations")
    assert link.get_attribute("aria-describedby") == note.get_attribute("id")
    page.keyboard.press("Escape")
    assert note.count() == 0


@pytest.mark.parametrize("width", [1440, 390])
@pytest.mark.parametrize("scheme", ["light", "dark"])
@pytest.mark.parametrize(
    "path",
    [
        "lookup/?shape=see-saw",
        "compare/?ids=sf4,clf3",
        "start/",
        "glossary/",
        "shapes/",
        "shapes/see-saw/",
        "methods/",
    ],
)
def test_axe_finds_nothing(browser: Any, home: str, path: str, scheme: str, width: int) -> None:
    """WCAG 2.2 AA and the common good practice; no sideways scrolling."""
    context = browser.new_context(
        bypass_csp=True, color_scheme=scheme, viewport={"width": width, "height": 900}
    )
    page = context.new_page()
    page.goto(home + path)
    page.wait_for_load_state("networkidle")
    results = Axe().run(page).response
    assert len(results["passes"]) > 10
    assert [(one["id"], one["nodes"][0]["html"][:120]) for one in results["violations"]] == []
    assert page.evaluate("document.documentElement.scrollWidth") == width
    context.close()


def test_a_site_for_files_works_without_a_server(browser: Any, three_for_files: Path) -> None:
    """Search, links, lookup and comparison from ``file://``; nothing complains."""
    page = browser.new_page()
    complaints: list[str] = []
    page.on("console", lambda message: complaints.append(message.text))
    page.on("pageerror", lambda error: complaints.append(str(error)))
    page.goto((three_for_files / "index.html").as_uri())
    page.keyboard.press("/")
    page.keyboard.type("sf4")
    page.locator("#find-answers [role=option]").first.wait_for()
    page.keyboard.press("Enter")
    page.wait_for_url("**/compounds/sf4/index.html")
    page.get_by_role("link", name="Lookup").click()
    page.locator("[data-ready]").wait_for()
    assert page.locator("tbody th").count() == 3
    page.locator("input[name=element][value=F]").check()
    page.wait_for_url("**/lookup/index.html?element=F")
    assert page.locator("tbody th").all_inner_texts() == ["Sulfur tetrafluoride"]
    page.goto((three_for_files / "compare" / "index.html").as_uri() + "?ids=sf4,water")
    page.get_by_role("columnheader", name="Water").get_by_role("link").wait_for()
    page.get_by_role("link", name="Point group").focus()
    page.get_by_role("tooltip").wait_for()
    page.locator("#add").fill("nitrate")
    page.keyboard.press("Enter")
    page.wait_for_url("**/compare/index.html?ids=sf4,water,nitrate")
    page.goto((three_for_files / "shapes" / "bent" / "index.html").as_uri())
    page.locator(".scale").get_by_role("link", name="Water").focus()
    page.keyboard.press("Enter")
    page.wait_for_url("**/compounds/water/index.html")
    assert complaints == []
    page.close()


def test_the_option_builds_what_the_command_builds(three_for_files: Path, tmp_path: Path) -> None:
    """``for_files`` of the plugin and ``--for-files`` of the command, byte for byte."""
    shutil.copytree(three_for_files.parent, tmp_path / "files")
    config = tmp_path / "files" / "mkdocs.yml"
    option = "  - shapeshelf:\n      for_files: true\n"
    config.write_text(config.read_text().replace("  - shapeshelf\n", option))
    build_site(config)
    assert _contents(tmp_path / "files" / "site") == _contents(three_for_files)


@pytest.fixture(scope="module")
def home(serve: Callable[[Path], str], demo: Path) -> str:
    return serve(demo)


@pytest.fixture
def page(browser: Any, home: str) -> Iterator[Any]:
    context = browser.new_context(viewport=DESK, color_scheme="light", accept_downloads=True)
    page = context.new_page()
    outside: list[str] = []
    host = urlsplit(home).netloc
    page.on("request", lambda asked: _outside(asked.url, host) and outside.append(asked.url))
    yield page
    context.close()
    assert outside == []


def _outside(url: str, host: str) -> bool:
    return not url.startswith(("data:", "blob:")) and urlsplit(url).netloc != host


def _contents(site: Path) -> dict[str, bytes]:
    files = (path for path in site.rglob("*") if path.is_file() and path.suffix != ".gz")
    return {str(path.relative_to(site)): path.read_bytes() for path in files}


def _both(site: Path) -> dict[str, Any]:
    return {"index": _data(site, "lookup-index"), "facets": _data(site, "lookup-facets")}


def _data(site: Path, name: str) -> Any:
    return json.loads((site / f"{name}.json").read_text("utf-8"))
