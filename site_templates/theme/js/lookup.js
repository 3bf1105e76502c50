// The lookup page: the field, filters and ranges above a table, the whole state in the address.

import { has, none, put } from "./bits.js";
import { choiceForm } from "./choices.js";
import { CHOICES, columnsFor, comparison, factsAt } from "./columns.js";
import { loadData, pageAddress } from "./data.js";
import { filterBy, prepareFacets } from "./facets.js";
import { findItems } from "./find.js";
import { showGlyphs } from "./glyphs.js";
import { itemAt, loadIndex } from "./index.js";
import { copyTable, downloadTable } from "./lookup-output.js";
import { make } from "./nodes.js";
import { prepareLater } from "./parts.js";
import { compareAddress, keepPicks, MOST, pickedIds } from "./picks.js";
import { RANGE_KEYS, rangeSet } from "./ranges.js";
import { isFiltered, searchFor, stateFrom } from "./state.js";
import { AT_ONCE, drawMore, drawTable } from "./table.js";

const A_PAUSE_MS = 150;

export async function lookupPage(section) {
  if (!section) return;
  const page = partsOf(section);
  page.input.value = stateFrom(location.search).text;
  const loaded = await Promise.all([loadIndex(page.root), loadData(page.root, "lookup-facets")]).catch(() => null);
  if (!loaded) {
    page.status.textContent = "The index could not be read.";
    return;
  }
  open(page, ...loaded);
}

function partsOf(section) {
  const part = (name) => section.querySelector(`[data-part=${name}]`);
  return {
    section,
    root: section.dataset.lookup,
    input: section.querySelector("#ask"),
    status: part("status"),
    table: section.querySelector("table"),
    filters: part("filters"),
    ranges: part("ranges"),
    fold: part("fold"),
    columns: part("columns"),
    more: part("more"),
    compare: part("compare"),
    clear: part("clear"),
    copy: part("copy"),
    download: part("download"),
  };
}

function open(page, index, facets) {
  Object.assign(page, { index, facets, prepared: prepareFacets(index, facets), picks: pickedIds() });
  page.state = stateFrom(location.search);
  page.input.value = page.state.text;
  showGlyphs(index.data.glyphs);
  offerNuclei(page);
  page.choices = choiceForm(page.filters, page.prepared.values, () => changed(page));
  showRanges(page);
  offerColumns(page);
  listen(page);
  page.fold.open = matchMedia("(min-width: 64rem)").matches;
  answer(page);
  drawRows(page);
  showCounts(page);
  page.section.dataset.ready = "";
  prepareLater(index);
  prepareLater(facets);
}

function listen(page) {
  page.input.addEventListener("input", () => changed(page));
  page.input.form.addEventListener("submit", (event) => {
    event.preventDefault();
    keep(page);
    page.table.querySelector("tbody a")?.click();
  });
  page.ranges.addEventListener("input", () => changed(page));
  page.columns.addEventListener("change", () => changed(page));
  page.more.addEventListener("click", () => showMore(page));
  page.clear.addEventListener("click", () => clear(page));
  page.copy.addEventListener("click", () => copyTable(page));
  page.download.addEventListener("click", () => downloadTable(page));
  page.table.addEventListener("change", (event) => pick(page, event.target));
  for (const form of [page.filters, page.ranges]) form.addEventListener("submit", (event) => event.preventDefault());
  addEventListener("popstate", () => restore(page));
}

/** Read what stands in the fields and answer. */
function changed(page) {
  const asked = {};
  for (const key of RANGE_KEYS) {
    const text = page.ranges.elements[key]?.value.trim();
    if (text) asked[key] = text;
  }
  if (!asked.signals) delete asked.nucleus;
  page.state = {
    text: page.input.value,
    chosen: page.choices.read(),
    asked,
    columns: chosenColumns(page),
    sort: page.state.sort,
  };
  draw(page);
}

function keep({ state, pause }) {
  clearTimeout(pause);
  history.replaceState(null, "", location.pathname + searchFor(state) + location.hash);
}

function restore(page) {
  page.state = stateFrom(location.search);
  page.input.value = page.state.text;
  showRanges(page);
  draw(page);
}

/**
 * Answer at once, draw the rows with the next frame and the counts after them: typing never waits
 * for the table, the rows never for the counts, nothing for the address.
 */
function draw(page) {
  answer(page);
  clearTimeout(page.pause);
  page.pause = setTimeout(() => keep(page), A_PAUSE_MS);
  page.frame ??= requestAnimationFrame(() => {
    page.frame = null;
    drawRows(page);
    clearTimeout(page.counting);
    page.counting = setTimeout(() => showCounts(page));
  });
}

function drawRows(page) {
  drawTable(page.table, drawing(page));
  tell(page);
}

function showCounts(page) {
  page.choices.show(page.state.chosen, page.counts);
}

function answer(page) {
  const { index, prepared, state } = page;
  const items = findItems(index, state.text).filter((item) => item < index.compounds);
  const base = none(prepared.size);
  for (const item of items) put(base, item);
  const ranged = rangeSet(prepared, state.asked);
  for (let at = 0; at < base.length; at += 1) base[at] &= ranged[at];
  const { left, counts } = filterBy(prepared, state.chosen, base);
  page.counts = counts;
  page.found = sorted(page, items.filter((item) => has(left, item)));
}

/** The compounds found as rows are drawn, each made when it is wanted. */
function sorted({ index, facets, state }, items) {
  const compound = (item) => ({ row: itemAt(index, item), facts: factsAt(facets, item) });
  if (!state.sort) return { length: items.length, slice: (from, to) => items.slice(from, to).map(compound) };
  const down = state.sort.startsWith("-");
  const column = columnsFor(CHOICES.map(({ key }) => key)).find(({ key }) => key === state.sort.replace(/^-/, ""));
  const rows = items.map(compound);
  return column ? rows.sort(comparison(column, down)) : rows;
}

function drawing(page) {
  return {
    columns: columnsFor(page.state.columns),
    sort: page.state.sort,
    compounds: page.found,
    root: page.root,
    picks: page.picks,
    sortBy: (key) => sortBy(page, key),
  };
}

function sortBy(page, key) {
  const next = { [key]: `-${key}`, [`-${key}`]: "" };
  page.state.sort = page.state.sort in next ? next[page.state.sort] : key;
  keep(page);
  answer(page);
  drawRows(page);
  page.table.tHead.rows[0].cells[1 + columnsFor(page.state.columns).findIndex((one) => one.key === key)]
    ?.querySelector("button").focus();
}

function tell(page) {
  const { length } = page.found;
  page.status.textContent = length === 1 ? "1 compound" : `${length} compounds`;
  const drawn = page.table.tBodies[0].rows.length;
  page.more.hidden = drawn >= length;
  const left = length - drawn;
  page.more.textContent = left > AT_ONCE ? `Show ${AT_ONCE} more of ${left}` : `Show ${left} more`;
  page.clear.hidden = !isFiltered(page.state) && !page.state.text;
  tellPicks(page);
}

function showMore(page) {
  const from = page.table.tBodies[0].rows.length;
  drawMore(page.table, drawing(page));
  tell(page);
  page.table.tBodies[0].rows[from]?.querySelector("a").focus();
}

function pick(page, box) {
  if (box.checked && page.picks.size >= MOST) {
    box.checked = false;
    page.compare.textContent = "Six at most";
    return;
  }
  if (box.checked) page.picks.add(box.value);
  else page.picks.delete(box.value);
  keepPicks(page.picks);
  tellPicks(page);
}

function tellPicks({ compare, picks, root }) {
  compare.hidden = picks.size === 0;
  compare.textContent = `Compare ${picks.size}`;
  compare.href = pageAddress(root, compareAddress(picks));
}

function clear(page) {
  page.state = { text: "", chosen: {}, asked: {}, columns: page.state.columns, sort: "" };
  page.input.value = "";
  showRanges(page);
  keep(page);
  draw(page);
  page.input.focus();
}

function showRanges({ ranges, state }) {
  for (const key of RANGE_KEYS) {
    const input = ranges.elements[key];
    if (input) input.value = state.asked[key] ?? (input.tagName === "SELECT" ? input.options[0]?.value ?? "" : "");
  }
}

function offerNuclei({ ranges, facets }) {
  const offered = [...facets.words.nuclei].sort((a, b) => parseInt(a, 10) - parseInt(b, 10));
  ranges.elements.nucleus.replaceChildren(...offered.map((nucleus) => make("option", { value: nucleus }, nucleus)));
}

function offerColumns({ columns, state }) {
  const shown = new Set(columnsFor(state.columns).map(({ key }) => key));
  columns.append(
    ...CHOICES.map(({ key, label }) => {
      const box = make("input", { type: "checkbox", value: key, checked: shown.has(key) });
      return make("label", { class: "choice" }, box, make("span", {}, label));
    }),
  );
}

/** The columns ticked, `null` where they are the usual ones. */
function chosenColumns({ columns }) {
  const ticked = [...columns.querySelectorAll("input:checked")].map((box) => box.value);
  const usual = columnsFor(null).slice(1).map(({ key }) => key);
  return ticked.length === usual.length && ticked.every((key) => usual.includes(key)) ? null : ticked;
}
