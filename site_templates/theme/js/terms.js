// A term explained where it stands: its definition beside it on hover and on focus.

import { loadData } from "./data.js";
import { make } from "./nodes.js";

const NOTE = "term-note";

/** Watches every link to a term of the glossary; `root` is the way to the site's root. */
export function explainTerms(root) {
  const state = { root, note: null, link: null };
  for (const kind of ["mouseover", "focusin"]) {
    document.addEventListener(kind, (event) => {
      const link = event.target.closest?.("a.term");
      if (link) show(state, link);
      else if (kind === "focusin" || !event.target.closest?.(`#${NOTE}`)) hide(state);
    });
  }
  document.addEventListener("keydown", (event) => event.key === "Escape" && hide(state));
  addEventListener("scroll", () => hide(state), { passive: true, capture: true });
}

async function show(state, link) {
  if (state.link === link) return;
  hide(state);
  state.link = link;
  const texts = await loadData(state.root, "glossary").catch(() => ({}));
  const text = texts[link.hash.slice(1)];
  if (!text || state.link !== link) return;
  state.note = make("div", { id: NOTE, class: "term-note", role: "tooltip" }, text);
  document.body.append(state.note);
  place(state.note, link.getBoundingClientRect());
  link.setAttribute("aria-describedby", NOTE);
}

function hide(state) {
  state.note?.remove();
  state.link?.removeAttribute("aria-describedby");
  state.note = null;
  state.link = null;
}

/** Below the term, within the window; above it where there is no room below. */
function place(note, at) {
  const room = 8;
  const { width, height } = note.getBoundingClientRect();
  const left = Math.max(room, Math.min(at.left, document.documentElement.clientWidth - width - room));
  const below = at.bottom + height + room <= innerHeight;
  note.style.left = `${left}px`;
  note.style.top = `${below ? at.bottom + 2 : Math.max(room, at.top - height - 2)}px`;
}
