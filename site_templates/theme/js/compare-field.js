// The field that puts one more compound into a comparison.

import { find } from "./find.js";
import { loadIndex } from "./index.js";
import { make } from "./nodes.js";

const OFFERED = 12;

/** Offers compounds while one types; `add(id)` is called with the one meant. */
export function addField(form, root, add) {
  const input = form.querySelector("input");
  const list = form.querySelector("datalist");
  input.addEventListener("focus", () => loadIndex(root).catch(() => {}), { once: true });
  input.addEventListener("input", async () => {
    const rows = await answers(root, input.value);
    list.replaceChildren(...rows.map((row) => make("option", { value: row.name }, row.formula)));
  });
  form.addEventListener("submit", async (event) => {
    event.preventDefault();
    const [row] = await answers(root, input.value);
    if (!row) return;
    input.value = "";
    await add(row.id);
    input.focus();
  });
}

async function answers(root, text) {
  if (!text.trim()) return [];
  const index = await loadIndex(root).catch(() => null);
  return index ? find(index, text).filter((row) => row.kind === "compound").slice(0, OFFERED) : [];
}
