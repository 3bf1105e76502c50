// The search field in the header: a combobox with a list of answers below it.

import { pageAddress } from "./data.js";
import { find } from "./find.js";
import { showGlyphs } from "./glyphs.js";
import { loadIndex } from "./index.js";
import { prepareLater } from "./parts.js";
import { resultParts } from "./results.js";

const MOST = 8;

export function findField(form) {
  if (!form) return;
  const input = form.querySelector("input");
  const list = listFor(form);
  const state = { form, input, list, rows: [], active: -1, root: rootOf(form) };
  setRoles(state);
  input.addEventListener("focus", () => loadIndex(state.root).then(prepareLater, () => {}), { once: true });
  input.addEventListener("input", () => answer(state));
  input.addEventListener("keydown", (event) => onKey(event, state));
  form.addEventListener("submit", (event) => onSubmit(event, state));
  form.addEventListener("focusout", (event) => {
    if (!form.contains(event.relatedTarget)) close(state);
  });
  document.addEventListener("keydown", (event) => onSlash(event, input));
}

function rootOf(form) {
  return `${form.dataset.root.replace(/\/$/, "")}/`;
}

function listFor(form) {
  const list = document.createElement("ul");
  list.id = "find-answers";
  list.className = "find__answers";
  list.setAttribute("role", "listbox");
  list.setAttribute("aria-label", "Answers");
  list.hidden = true;
  form.append(list);
  return list;
}

function setRoles({ input, list }) {
  input.setAttribute("role", "combobox");
  input.setAttribute("aria-expanded", "false");
  input.setAttribute("aria-controls", list.id);
  input.setAttribute("aria-autocomplete", "list");
}

async function answer(state) {
  const text = state.input.value;
  if (!text.trim()) return close(state);
  const index = await loadIndex(state.root).catch(() => null);
  if (!index || text !== state.input.value) return undefined;
  showGlyphs(index.data.glyphs);
  show(state, find(index, text, MOST));
  return undefined;
}

function show(state, rows) {
  state.rows = rows;
  state.list.replaceChildren(...(rows.length ? rows.map((row, at) => option(row, at, state)) : [nothing()]));
  state.list.hidden = false;
  state.input.setAttribute("aria-expanded", "true");
  choose(state, rows.length ? 0 : -1);
}

function option(row, at, state) {
  const item = document.createElement("li");
  item.id = `find-answer-${at}`;
  item.className = "result";
  item.setAttribute("role", "option");
  item.setAttribute("aria-selected", "false");
  item.append(...resultParts(row));
  item.addEventListener("pointerdown", (event) => event.preventDefault());
  item.addEventListener("click", (event) => open(row, state, event.metaKey || event.ctrlKey));
  return item;
}

function nothing() {
  const item = document.createElement("li");
  item.className = "result result--none";
  item.setAttribute("role", "option");
  item.setAttribute("aria-disabled", "true");
  item.textContent = "Nothing in the catalogue answers to this.";
  return item;
}

/** Typing does not wait for the list to be laid out: it scrolls with the next frame. */
function choose(state, at) {
  state.active = at;
  const options = [...state.list.querySelectorAll(".result:not(.result--none)")];
  options.forEach((item, index) => item.setAttribute("aria-selected", String(index === at)));
  if (at < 0) {
    state.input.removeAttribute("aria-activedescendant");
    return;
  }
  state.input.setAttribute("aria-activedescendant", options[at].id);
  requestAnimationFrame(() => options[at].scrollIntoView({ block: "nearest" }));
}

function close(state) {
  state.list.hidden = true;
  state.rows = [];
  state.active = -1;
  state.input.setAttribute("aria-expanded", "false");
  state.input.removeAttribute("aria-activedescendant");
}

function onKey(event, state) {
  const { rows, active } = state;
  if (event.key === "Escape" && !state.list.hidden) {
    event.preventDefault();
    close(state);
  } else if (event.key === "ArrowDown" && rows.length) {
    event.preventDefault();
    choose(state, (active + 1) % rows.length);
  } else if (event.key === "ArrowUp" && rows.length) {
    event.preventDefault();
    choose(state, (active - 1 + rows.length) % rows.length);
  }
}

/** Enter opens the chosen answer; one typed faster than the index arrives is still answered. */
async function onSubmit(event, state) {
  event.preventDefault();
  const text = state.input.value.trim();
  if (!text) {
    location.assign(pageAddress(state.root, "lookup/"));
    return;
  }
  const index = await loadIndex(state.root).catch(() => null);
  const fresh = index ? find(index, text, MOST) : [];
  const chosen = state.rows[state.active];
  const row = fresh.find((found) => found.address === chosen?.address) ?? fresh[0];
  if (row) open(row, state, false);
  else location.assign(pageAddress(state.root, `lookup/?q=${encodeURIComponent(text)}`));
}

function open(row, state, apart) {
  const address = pageAddress(state.root, row.address);
  if (apart) window.open(address, "_blank", "noopener");
  else location.assign(address);
}

function onSlash(event, input) {
  if (event.key !== "/" || event.ctrlKey || event.metaKey || event.altKey) return;
  const target = event.target;
  if (target instanceof Element && target.closest("input, textarea, select, [contenteditable]")) return;
  event.preventDefault();
  input.focus();
  input.select();
}
