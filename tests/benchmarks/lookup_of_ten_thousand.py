"""The lookup with ten thousand compounds in headless Chromium: sizes, readiness, keystrokes.

    python tests/benchmarks/lookup_of_ten_thousand.py [COMPOUNDS] [REPORTS]

Names, CAS numbers, formulas, SMILES and InChIKeys are those of real compounds, from the
identifiers that the PyPI package ``chemicals`` carries (PubChem). Shapes, angles, dipole
moments and spectra come from real reports on REPORTS of them (300 unless told), shared out to
the rest with every angle moved a little, so that repetition does not flatter the compression.
Codes, tags and H-statements are invented. ``tests/data/queries.csv`` is asked of the demo's
compounds among them, by opening what stands first in the header's field.
"""

import csv
import gzip
import random
import re
import statistics
import sys
import tempfile
import time
from dataclasses import replace
from pathlib import Path
from typing import Any

from browsing import launched, served
from chemicals.identifiers import pubchem_db

from shapeshelf.catalogue.model import Entry, StructureInput
from shapeshelf.errors import ShapeshelfError
from shapeshelf.pages.finding import entries
from shapeshelf.pages.lookup_index import lookup_facets, lookup_index, lookup_rows
from shapeshelf.pages.lookup_rows import LookupRow, lookup_row
from shapeshelf.plugin import build_site
from shapeshelf.report.building import report_on_structure
from shapeshelf.report.checking import report_on_catalogue

ROOT = Path(__file__).parents[2]
COMPOUNDS, REPORTS, SEED = 10_000, 300, 20262
MOST_LETTERS = 60
CONFIG = """\
site_name: Ten thousand
docs_dir: compounds
theme: {name: material, font: false}
plugins: [shapeshelf]
"""
TAGS = [
    "gas",
    "liquid",
    "solid",
    "solvent",
    "ligand",
    "precursor",
    "standard",
    "aromatic",
    "fluoride",
    "ion",
    "toxic",
]
HAZARDS = [
    "H225",
    "H280",
    "H290",
    "H301",
    "H302",
    "H311",
    "H314",
    "H315",
    "H318",
    "H319",
    "H330",
    "H331",
    "H335",
    "H350",
    "H410",
]
TYPED_SLIPS = ("tolune", "cyclohexnae", "benzadehyde", "acetnoitrile", "dimethylformamid")
TYPED_OTHERS = ("C6H6", "C2H6O", "67-64-1", "benzoic acid", "methyl", "tetrahedral", "C2v", "polar")

TYPE_ON_LOOKUP = """async (words) => {
  const input = document.querySelector("#ask"), table = document.querySelector("table");
  const answered = [], drawn = [], counted = [];
  for (const word of words) for (let n = 1; n <= word.length; n += 1) {
    input.value = word.slice(0, n);
    const start = performance.now();
    input.dispatchEvent(new Event("input", { bubbles: true }));
    answered.push(performance.now() - start);
    await new Promise((done) => requestAnimationFrame(() => setTimeout(done)));
  }
  const real = requestAnimationFrame;
  let run = null;
  globalThis.requestAnimationFrame = (callback) => (run = callback);
  for (const word of words) for (let n = 1; n <= word.length; n += 3) {
    input.value = word.slice(0, n);
    input.dispatchEvent(new Event("input", { bubbles: true }));
    await new Promise((done) => setTimeout(done));
    const start = performance.now();
    const later = setTimeout;
    let count = null;
    globalThis.setTimeout = (callback) => (count = callback);
    run();
    globalThis.setTimeout = later;
    table.getBoundingClientRect();
    const rows = performance.now();
    count();
    table.getBoundingClientRect();
    if (table.tBodies[0].rows.length !== 50) continue;
    drawn.push(rows - start);
    counted.push(performance.now() - rows);
  }
  globalThis.requestAnimationFrame = real;
  return [answered, drawn, counted];
}"""
TYPE_IN_FIELD = """async (words) => {
  const input = document.querySelector("#find"), list = document.querySelector("#find-answers");
  const times = [];
  for (const word of words) for (let n = 1; n <= word.length; n += 1) {
    input.value = word.slice(0, n);
    const start = performance.now();
    const answered = new Promise((done) => {
      const watch = new MutationObserver(() => {
        watch.disconnect();
        list.getBoundingClientRect();
        done(performance.now());
      });
      watch.observe(list, { childList: true });
    });
    input.dispatchEvent(new Event("input", { bubbles: true }));
    times.push((await answered) - start);
    await new Promise((done) => setTimeout(done));
  }
  return times;
}"""
MORE_ROWS = """async () => {
  const more = document.querySelector("[data-part=more]"), table = document.querySelector("table");
  const times = [];
  for (let n = 0; n < 20; n += 1) {
    const start = performance.now();
    more.click();
    table.getBoundingClientRect();
    times.push(performance.now() - start);
    await new Promise((done) => setTimeout(done));
  }
  return times;
}"""
CHOICES = """async () => {
  const times = [];
  const boxes = [...document.querySelectorAll(".choices input")];
  for (const box of boxes.filter((_, at) => at % 7 === 0)) {
    for (const state of [true, false]) {
      box.checked = state;
      const start = performance.now();
      box.dispatchEvent(new Event("change", { bubbles: true }));
      times.push(performance.now() - start);
      await new Promise((done) => setTimeout(done));
    }
  }
  return times;
}"""
READY = """() => new Promise((done) => {
  const section = document.querySelector("[data-lookup]");
  const tell = () => done(performance.now());
  if (section.dataset.ready !== undefined) tell();
  new MutationObserver(tell).observe(section, { attributes: true });
})"""


def main() -> None:
    """Make the catalogue, build a small site, put the large index into it, measure."""
    given = [int(text) for text in sys.argv[1:]]
    count, reports = (*given, *(COMPOUNDS, REPORTS)[len(given) :])
    chance = random.Random(SEED)
    rows = rows_of(count, reports, chance)
    index, facets = lookup_index(rows), lookup_facets(rows)
    for name, data in (("index", index), ("facets", facets)):
        packed = len(gzip.compress(data, 9))
        print(f"{name}: {len(data) / 1000:.0f} kB, {packed / 1000:.0f} kB compressed")
    with tempfile.TemporaryDirectory() as folder:
        site = small_site(Path(folder))
        script = len(gzip.compress((site / "js" / "site.js").read_bytes(), 9))
        print(f"script: {script / 1000:.1f} kB compressed")
        (site / "lookup-index.json").write_bytes(index)
        (site / "lookup-facets.json").write_bytes(facets)
        measure(site, [row.name for row in chance.sample(rows, 20)])
        (site / "lookup-index.json").write_bytes(index_with_demo(rows))
        ask(site)


def rows_of(count: int, reports: int, chance: random.Random) -> list[LookupRow]:
    """Return rows of real compounds, in the order of their names."""
    pubchem_db.finish_loading()
    known = sorted({one.smiles: one for one in pubchem_db.CAS_index.values()}.values(), key=_cas)
    fitting = [one for one in known if "." not in one.smiles and len(one.smiles) < MOST_LETTERS]
    chosen = chance.sample(fitting, count)
    patterns = _patterns(chosen, reports)
    print(f"{count} compounds, {len(patterns)} reports")
    rows = [_row(one, number, patterns, chance) for number, one in enumerate(chosen)]
    return sorted(rows, key=lambda row: (row.name.casefold(), row.id))


def _cas(one: Any) -> int:
    return int(one.CAS)


def _patterns(chosen: list[Any], reports: int) -> list[LookupRow]:
    started, found = time.perf_counter(), []
    for one in chosen:
        if len(found) == reports:
            break
        try:
            report = report_on_structure(one.smiles)
        except ShapeshelfError:
            continue
        entry = Entry("x", "x", StructureInput(one.smiles, None), Path("x.yml"))
        found.append(lookup_row(replace(report, entry=entry)))
    print(f"reports took {time.perf_counter() - started:.0f} s")
    return found


def _row(one: Any, number: int, patterns: list[LookupRow], chance: random.Random) -> LookupRow:
    pattern = patterns[number % len(patterns)]
    name = one.common_name or one.iupac_name
    others = dict.fromkeys([one.iupac_name, *one.synonyms])
    also = [text for text in others if text and text != name and not text[:3].isdigit()][
        : chance.randint(1, 2)
    ]
    jitter = chance.randint(-5, 5)
    return replace(
        pattern,
        id=f"c{number:05d}",
        name=name,
        also=tuple(also),
        formula=one.formula.rstrip("+-0123456789") if one.charge else one.formula,
        charge=one.charge,
        cas=one.CASs,
        code=f"TB-{number:05d}",
        spelling="",
        smiles=one.smiles,
        inchikey=one.InChI_key,
        tags=tuple(chance.sample(TAGS, chance.randint(0, 3))),
        hazards=tuple(sorted(chance.sample(HAZARDS, chance.randint(0, 4)))),
        corners=tuple((corner, min(1800, tenths + jitter)) for corner, tenths in pattern.corners),
        dipole_debye=None if one.charge else round(chance.uniform(0, 5), 2),
        molar_mass_g_mol=round(one.MW, 2),
    )


def index_with_demo(rows: list[LookupRow]) -> bytes:
    """Return the index of the demo among ``rows``, those that it holds itself left out."""
    catalogue, reports = report_on_catalogue(ROOT / "compounds")
    own = lookup_rows(reports)
    keys = {row.inchikey for row in own}
    mixed = [*own, *(row for row in rows if row.inchikey not in keys)]
    mixed.sort(key=lambda row: (row.name.casefold(), row.id))
    return lookup_index(mixed, entries(catalogue, reports))


def ask(site: Path) -> None:
    """Print how many queries open what is expected, and those that do not."""
    cases = list(csv.DictReader((ROOT / "tests/data/queries.csv").read_text("utf-8").splitlines()))
    missed = []
    with served(site) as home, launched() as browser:
        page = browser.new_page()
        for case in cases:
            page.goto(f"{home}compounds/water/")
            page.locator("#find").fill(case["query"])
            with page.expect_navigation(wait_until="commit"):
                page.locator("#find").press("Enter")
            last = re.split(r"[/=#]", page.url.rstrip("/"))[-1]
            if last != case["expected"]:
                missed.append(f"{case['query']}: {page.url}")
    print(f"{len(cases) - len(missed)} of {len(cases)} queries open what is expected", *missed)


def small_site(folder: Path) -> Path:
    """Build a site of one compound and return its folder."""
    (folder / "compounds").mkdir()
    (folder / "mkdocs.yml").write_text(CONFIG)
    (folder / "compounds" / "water.yml").write_text("id: water\nname: Water\nstructure: O\n")
    build_site(folder / "mkdocs.yml")
    return folder / "site"


def measure(site: Path, names: list[str]) -> None:
    """Print what the browser needs."""
    words = [*names, *TYPED_SLIPS, *TYPED_OTHERS]
    with served(site) as home, launched() as browser:
        page = browser.new_page()
        ready = []
        for _ in range(9):
            page.goto(f"{home}lookup/", wait_until="commit")
            page.wait_for_selector("[data-lookup]", state="attached")
            ready.append(page.evaluate(READY))
        print(f"lookup page ready: {statistics.median(ready):.0f} ms, at most {max(ready):.0f} ms")
        answered, drawn, counted = page.evaluate(TYPE_ON_LOOKUP, words)
        tell("keystroke on the lookup page answered and counted", answered)
        tell("50 rows drawn", drawn)
        tell("counts beside all choices drawn after them", counted)
        page.goto(f"{home}lookup/")
        page.wait_for_selector("[data-ready]")
        tell("50 more rows", page.evaluate(MORE_ROWS))
        tell("a choice among the filters", page.evaluate(CHOICES))
        page.goto(f"{home}compounds/water/")
        page.locator("#find").focus()
        page.wait_for_load_state("networkidle")
        tell(
            "keystroke in the header's field answered and laid out",
            page.evaluate(TYPE_IN_FIELD, words),
        )


def tell(what: str, milliseconds: list[float]) -> None:
    """Print median, 95th percentile and largest."""
    ordered = sorted(milliseconds)
    most = ordered[int(0.95 * (len(ordered) - 1))]
    print(
        f"{what}: median {statistics.median(ordered):.1f} ms, 95 % {most:.1f} ms,"
        f" at most {ordered[-1]:.1f} ms ({len(ordered)})"
    )


if __name__ == "__main__":
    main()
