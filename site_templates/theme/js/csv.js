// Tables as text: CSV (RFC 4180) to download, tab-separated to paste.

const PLAIN_NUMBER = /^[+-]?\d+(\.\d+)?$/;
const STARTS_A_FORMULA = /^[=+\-@\t\r]/;

/** CSV with a byte-order mark, so that spreadsheet programs read it as UTF-8. */
export function csvText(rows) {
  return `\ufeff${rows.map((row) => row.map(csvCell).join(",")).join("\r\n")}\r\n`;
}

/** Tab-separated lines. */
export function tabText(rows) {
  return rows.map((row) => row.map((cell) => guarded(cell.replace(/[\t\r\n]+/g, " "))).join("\t")).join("\n");
}

function csvCell(text) {
  const safe = guarded(text);
  return /[",\r\n]/.test(safe) ? `"${safe.replace(/"/g, '""')}"` : safe;
}

/** A cell that a spreadsheet would run as a formula gets an apostrophe; numbers stay numbers. */
function guarded(text) {
  return STARTS_A_FORMULA.test(text) && !PLAIN_NUMBER.test(text) ? `'${text}` : text;
}
