// The list found, copied or downloaded: all its rows, the columns that are shown.

import { columnsFor } from "./columns.js";
import { csvText, tabText } from "./csv.js";
import { make } from "./nodes.js";

/** Put the whole list on the clipboard, ready for a spreadsheet. */
export async function copyTable(page) {
  try {
    await navigator.clipboard.writeText(tabText(textRows(page)));
    page.status.textContent = `${page.found.length} copied`;
  } catch {
    page.status.textContent = "The browser does not let a page copy";
  }
}

/** Hand the whole list over as a CSV file. */
export function downloadTable(page) {
  const link = make("a", { download: "compounds.csv" });
  link.href = URL.createObjectURL(new Blob([csvText(textRows(page))], { type: "text/csv;charset=utf-8" }));
  link.click();
  setTimeout(() => URL.revokeObjectURL(link.href), 1000);
}

function textRows(page) {
  const columns = columnsFor(page.state.columns);
  const rows = page.found.slice(0, page.found.length);
  return [columns.map(({ label }) => label), ...rows.map((one) => columns.map((column) => column.text(one)))];
}
