// The table of compounds found: fifty rows at a time, sorted by any column.

import { cellContent } from "./columns.js";
import { pageAddress } from "./data.js";
import { glyph } from "./glyphs.js";
import { make } from "./nodes.js";

export const AT_ONCE = 50;

/** Draw the first rows, and the head where it is another. `picks` is a set of ids; `sortBy(key)` is called by a heading. */
export function drawTable(table, { columns, sort, compounds, root, picks, sortBy }) {
  const headed = `${columns.map(({ key }) => key)} ${sort}`;
  if (table.dataset.headed !== headed) table.tHead.replaceChildren(headLine(columns, sort, sortBy));
  table.dataset.headed = headed;
  table.tBodies[0].replaceChildren();
  drawMore(table, { columns, compounds, root, picks });
}

/** Draw the next rows; returns how many are drawn. */
export function drawMore(table, { columns, compounds, root, picks }, most = AT_ONCE) {
  const body = table.tBodies[0];
  const from = body.rows.length;
  body.append(...compounds.slice(from, from + most).map((one) => line(one, columns, root, picks)));
  return body.rows.length;
}

function headLine(columns, sort, sortBy) {
  const cells = columns.map(({ key, label, term }) => {
    const button = make("button", { type: "button", class: "sorter", "data-term": term }, label);
    button.addEventListener("click", () => sortBy(key));
    return make("th", { scope: "col", "aria-sort": sortState(key, sort) }, button);
  });
  return make("tr", {}, make("th", { scope: "col", class: "pick" }, make("span", { class: "unseen" }, "Compare")), ...cells);
}

function sortState(key, sort) {
  if (sort === key) return "ascending";
  return sort === `-${key}` ? "descending" : null;
}

function line(compound, columns, root, picks) {
  const { row } = compound;
  const box = make("input", { type: "checkbox", value: row.id, "aria-label": `Compare ${row.name}` });
  box.checked = picks.has(row.id);
  const link = make("a", { href: pageAddress(root, row.address) }, row.name);
  const name = make("th", { scope: "row" }, make("span", { class: "named" }, glyph(row.glyph), link));
  const cells = columns.slice(1).map((column) => make("td", { "data-column": column.key }, cellContent(column, compound)));
  return make("tr", {}, make("td", { class: "pick" }, box), name, ...cells);
}
