// A term explained where it stands: its definition beside it on hover and on focus.

import { loadData } from "./data.js";
import { make } from "./nodes.js";

const NOTE = "term-note";
const TERMS = "a.term, [data-term]";
const REST_MS = 250;
const ROOM = 8;

/** Watches everything that stands for a term of the glossary; `root` is the way to the site's root. */
export function explainTerms(root) {
  const state = { root, note: null, place: null, resting: null };
  passRepeatedBadges();
  document.addEventListener("pointerover", ({ target, pointerType }) => pointerType === "mouse" && rest(state, target));
  document.addEventListener("focusin", ({ target }) => {
    const place = target.closest(TERMS);
    if (place?.matches(":focus-visible")) show(state, place);
    else hide(state);
  });
  document.addEventListener("keydown", (event) => event.key === "Escape" && hide(state));
  addEventListener("scroll", () => stand(state), { passive: true, capture: true });
}

/** A page has many badges of one kind: the tab key stops at the first. */
export function passRepeatedBadges() {
  const met = new Set();
  for (const badge of document.querySelectorAll("a.basis")) {
    if (met.has(badge.hash)) badge.tabIndex = -1;
    met.add(badge.hash);
  }
}

/** The pointer has to rest, so that nothing flashes up on its way across a page. */
function rest(state, target) {
  clearTimeout(state.resting);
  if (target.closest?.(`#${NOTE}`)) return;
  const place = target.closest?.(TERMS);
  if (place !== state.place) hide(state);
  if (place) state.resting = setTimeout(() => show(state, place), REST_MS);
}

async function show(state, place) {
  if (state.place === place) return;
  hide(state);
  state.place = place;
  const texts = await loadData(state.root, "glossary").catch(() => ({}));
  const text = texts[place.dataset.term ?? place.hash.slice(1)];
  if (!text || state.place !== place) return;
  state.note = make("div", { id: NOTE, class: "term-note", role: "tooltip" }, text);
  document.body.append(state.note);
  stand(state);
  place.setAttribute("aria-describedby", NOTE);
}

function hide(state) {
  clearTimeout(state.resting);
  state.note?.remove();
  state.place?.removeAttribute("aria-describedby");
  state.note = null;
  state.place = null;
}

/** Above the term wherever that scrolls, clear of what is read next; below it where there is no room. */
function stand({ note, place }) {
  if (!note) return;
  const at = place.getBoundingClientRect();
  const { width, height } = note.getBoundingClientRect();
  const left = Math.max(ROOM, Math.min(at.left, document.documentElement.clientWidth - width - ROOM));
  const above = at.top - height - 2;
  note.style.left = `${left}px`;
  note.style.top = `${above >= ROOM ? above : at.bottom + 2}px`;
}
