// Two to six compounds side by side: drawings to one scale, differences marked.

import { formulaNode, groupNode, hybridNode } from "./chemistry.js";
import { loadData, pageAddress } from "./data.js";
import { addField } from "./compare-field.js";
import { differs, linedUp, ROW_TERMS } from "./compare-rows.js";
import { make } from "./nodes.js";
import { compareAddress, keepPicks, MOST } from "./picks.js";
import { passRepeatedBadges } from "./terms.js";

const ROOM = 300;
const ROOM_FOR_MANY = 215;
const MANY = 4;
const SHARE_OF_A_PHONE = 0.33;
const OWN = new Set(["cas", "code", "kept", "owner"]);
const SETTERS = { group: groupNode, hybrid: hybridNode, notation: (text) => formulaNode(text, 0) };
const LARGEST_FACTOR = 1.6;
const BADGES = { recalled: ["measured", "recalled"] };

export async function comparePage(section) {
  if (!section) return;
  const page = {
    section,
    root: section.dataset.compare,
    table: section.querySelector("table"),
    status: section.querySelector("[role=status]"),
    ids: idsFrom(location.search),
  };
  addField(section.querySelector("form"), page.root, (id) => change(page, [...page.ids, id]));
  addEventListener("popstate", () => {
    page.ids = idsFrom(location.search);
    show(page);
  });
  await show(page);
  section.dataset.ready = "";
}

/** The ids of an address, each once, six at most. */
export function idsFrom(search) {
  const given = (new URLSearchParams(search).get("ids") ?? "").split(",").map((id) => id.trim());
  return [...new Set(given.filter((id) => /^[a-z0-9-]+$/.test(id)))].slice(0, MOST);
}

function change(page, ids) {
  page.ids = [...new Set(ids)].slice(0, MOST);
  keepPicks(new Set(page.ids));
  const { search } = new URL(compareAddress(page.ids), location.href);
  history.pushState(null, "", location.pathname + (page.ids.length ? search : ""));
  return show(page);
}

async function show(page) {
  const asked = page.ids;
  const loaded = await Promise.all(asked.map((id) => loadData(page.root, `compounds/${id}/compare`).catch(() => id)));
  if (asked !== page.ids) return;
  const missing = loaded.filter((one) => typeof one === "string");
  const compounds = loaded.filter((one) => typeof one !== "string");
  page.status.textContent = words(compounds.length, missing);
  page.table.hidden = compounds.length === 0;
  drawHead(page, compounds);
  drawRows(page, compounds);
}

function words(count, missing) {
  const lost = missing.length ? ` No compound has the id ${missing.join(", ")}.` : "";
  if (count === 0) return `Nothing to compare yet.${lost}`;
  return `${count === 1 ? "1 compound" : `${count} compounds`}.${lost}`;
}

function drawHead(page, compounds) {
  const factor = factorFor(compounds);
  const cells = compounds.map((one) => {
    const remove = make("button", { type: "button", class: "compare__remove", "aria-label": `Take ${one.name} out` }, "×");
    remove.addEventListener("click", () => change(page, page.ids.filter((id) => id !== one.id)));
    const link = make("a", { href: pageAddress(page.root, one.address) }, one.name);
    const title = make("span", { class: "compare__name" }, link, " ", formulaNode(one.formula, one.charge));
    return make("th", { scope: "col" }, remove, drawing(one, factor), title);
  });
  const scale = make("span", { class: "note" }, compounds.length > 1 ? "Drawings to one scale" : "");
  page.table.tHead.replaceChildren(make("tr", {}, make("td", {}, scale), ...cells));
}

/** One factor for all drawings: the widest and highest still fit. */
function factorFor(compounds) {
  const largest = Math.max(1, ...compounds.map(({ width, height }) => Math.max(width, height)));
  const room = compounds.length < MANY ? ROOM : ROOM_FOR_MANY;
  return Math.min(LARGEST_FACTOR, Math.min(room, innerWidth * SHARE_OF_A_PHONE) / largest);
}

/** Our own markup, made with the site; its size is the only thing changed. */
function drawing(one, factor) {
  const holder = make("span", { class: "compare__drawing" });
  holder.innerHTML = one.drawing;
  const svg = holder.firstElementChild;
  svg.setAttribute("width", (one.width * factor).toFixed(1));
  svg.setAttribute("height", (one.height * factor).toFixed(1));
  return holder;
}

function drawRows({ table, root }, compounds) {
  const bodies = linedUp(compounds).map(([group, rows]) => {
    const head = make("th", { scope: "rowgroup", colspan: compounds.length + 1 }, group);
    return make("tbody", {}, make("tr", { class: "grid__group" }, head), ...rows.map((row) => line(row, root)));
  });
  for (const body of [...table.tBodies]) body.remove();
  table.append(...bodies);
  passRepeatedBadges();
}

/** What each compound has of its own, such as its CAS number, is no difference worth a mark. */
function line({ key, label, cells }, root) {
  const unlike = !OWN.has(key) && differs(cells);
  const mark = unlike ? make("span", { class: "unlike" }, "differs") : "";
  return make(
    "tr", { class: unlike ? "compare__unlike" : "compare__alike" },
    make("th", { scope: "row" }, ROW_TERMS[key] ? termNode(ROW_TERMS[key], label, root) : label, " ", mark),
    ...cells.map((rows) => make("td", {}, ...cellParts(rows, root))),
  );
}

function cellParts(rows, root) {
  if (!rows.length) return [make("span", { class: "nil" }, "–")];
  return rows.map(({ key, text, basis }) => {
    const badges = (BADGES[basis] ?? [basis]).filter(Boolean);
    const set = badges.flatMap((one) => [" ", termNode(one, one, root, `basis basis--${one}`)]);
    return make("span", { class: "compare__value" }, SETTERS[key]?.(text) ?? text, ...set);
  });
}

/** A link to the glossary that explains itself, as those that come with a page do. */
function termNode(term, text, root, looks = "") {
  return make("a", { class: `term ${looks}`.trim(), href: pageAddress(root, `glossary/#${term}`) }, text);
}
