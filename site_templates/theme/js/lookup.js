// The lookup page: a field above the table of all compounds, the query kept in the address.

import { loadIndex } from "./index.js";
import { find } from "./rank.js";
import { part } from "./results.js";

const MOST = 200;

export async function lookupPage(section) {
  if (!section) return;
  const input = section.querySelector("input");
  const root = section.dataset.lookup;
  input.value = new URLSearchParams(location.search).get("q") ?? "";
  const index = await loadIndex(root).catch(() => null);
  const status = section.querySelector("[role=status]");
  if (!index) {
    status.textContent = "The index could not be read.";
    return;
  }
  const draw = () => drawRows(section, index, input.value, root, status);
  input.addEventListener("input", () => {
    keep(input.value);
    draw();
  });
  section.querySelector("form").addEventListener("submit", (event) => {
    event.preventDefault();
    section.querySelector("tbody a")?.click();
  });
  draw();
  if (!("ontouchstart" in window)) input.focus();
}

function drawRows(section, index, text, root, status) {
  const rows = find(index, text).filter((row) => row.kind === "compound");
  section.querySelector("tbody").replaceChildren(...rows.slice(0, MOST).map((row) => line(row, root)));
  status.textContent = rows.length === 1 ? "1 compound" : `${rows.length} compounds`;
}

function line(row, root) {
  const tr = document.createElement("tr");
  const name = document.createElement("th");
  name.scope = "row";
  const link = document.createElement("a");
  link.href = new URL(root + row.address, document.baseURI).href;
  link.textContent = row.name;
  name.append(link);
  tr.append(name, ...["formula", "shape", "angle", "polarity", "group", "cas", "code"].map((key) => cell(row, key)));
  return tr;
}

function cell(row, key) {
  const td = document.createElement("td");
  td.dataset.column = key;
  td.append(part("", row[key] || "–"));
  return td;
}

function keep(text) {
  const address = new URL(location.href);
  if (text) address.searchParams.set("q", text);
  else address.searchParams.delete("q");
  history.replaceState(null, "", address);
}
