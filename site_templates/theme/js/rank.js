// Which rows answer a query, best first. An exact identifier always stands before any likeness.

import { readFormula } from "./formula.js";
import { casDigits, foldCode, foldName } from "./normalise.js";

const EXACT = 1000;
const FORMULA = 900;
const NAME = 800;
const FORMULA_OTHER_CHARGE = 700;
const CODE_START = 500;
const NAME_START = 400;
const WORD_START = 300;
const INSIDE = 200;
const SHAPE = 150;
const TAG = 120;
const MISSPELT = 60;

/** Rows that answer, best first, at most `most`; every row in its own order for an empty query. */
export function find(index, text, most = Infinity) {
  const query = read(text);
  if (query.empty) return index.slice(0, most);
  const scored = [];
  for (const row of index) {
    const score = scoreOf(row, query);
    if (score > 0) scored.push({ row, score });
  }
  if (!scored.length) misspelt(index, query, scored);
  scored.sort((a, b) => b.score - a.score || compare(a.row, b.row));
  return scored.slice(0, most).map(({ row }) => row);
}

function read(text) {
  const name = foldName(text);
  return {
    empty: text.trim() === "",
    name,
    words: name.split(" ").filter(Boolean),
    code: foldCode(text),
    digits: casDigits(text),
    formulas: readFormula(text),
  };
}

function scoreOf(row, query) {
  return Math.max(identifierScore(row, query), formulaScore(row, query), nameScore(row, query));
}

function identifierScore(row, { code, digits }) {
  if (digits && row.digits) {
    if (row.digits === digits) return EXACT;
    if (row.digits.startsWith(digits)) return CODE_START;
  }
  if (!code) return 0;
  if (row.codes.includes(code)) return EXACT;
  return row.codes.some((held) => held.startsWith(code)) ? CODE_START : 0;
}

function formulaScore(row, { formulas }) {
  let best = 0;
  for (const asked of formulas) {
    for (const held of row.formulas) {
      if (held.key !== asked.key) continue;
      const same = (asked.charge ?? 0) === (held.charge ?? 0);
      best = Math.max(best, same ? FORMULA : FORMULA_OTHER_CHARGE);
    }
  }
  return best;
}

function nameScore(row, { name, words }) {
  if (!name) return 0;
  if (row.folded.includes(name)) return NAME;
  let best = 0;
  for (const held of row.folded) best = Math.max(best, likeness(held, name, words));
  if (best) return best;
  if (everyWordStarts(row.shapes, words)) return SHAPE;
  return row.labels.some((label) => label.startsWith(name)) ? TAG : 0;
}

function likeness(held, name, words) {
  if (held.startsWith(name)) return NAME_START - Math.min(held.length, 90);
  if (everyWordStarts(held, words)) return WORD_START - Math.min(held.length, 90);
  return name.length > 2 && held.includes(name) ? INSIDE - Math.min(held.length, 40) : 0;
}

function everyWordStarts(held, words) {
  const parts = held.split(" ");
  return words.length > 0 && words.every((word) => parts.some((part) => part.startsWith(word)));
}

/** Only where nothing answers: names within a slip or two of the pen. */
function misspelt(index, { name }, scored) {
  if (name.length < 4) return;
  const slips = name.length < 8 ? 1 : 2;
  for (const row of index) {
    const least = Math.min(...row.folded.map((held) => distance(name, held, slips)));
    if (least <= slips) scored.push({ row, score: MISSPELT - least });
  }
}

/**
 * Insertions, deletions, changes and swaps of neighbours between two texts, the longer one's end
 * left out; gives up above `limit`.
 */
export function distance(typed, held, limit) {
  const width = Math.min(held.length, typed.length + limit);
  let before = [];
  let previous = Array.from({ length: width + 1 }, (_, at) => at);
  for (let i = 1; i <= typed.length; i += 1) {
    const row = [i];
    for (let j = 1; j <= width; j += 1) {
      const cost = typed[i - 1] === held[j - 1] ? 0 : 1;
      row[j] = Math.min(previous[j] + 1, row[j - 1] + 1, previous[j - 1] + cost);
      if (i > 1 && j > 1 && typed[i - 1] === held[j - 2] && typed[i - 2] === held[j - 1]) {
        row[j] = Math.min(row[j], before[j - 2] + 1);
      }
    }
    if (Math.min(...row) > limit) return limit + 1;
    before = previous;
    previous = row;
  }
  return Math.min(...previous);
}

function compare(a, b) {
  if (a.kind !== b.kind) return a.kind === "compound" ? -1 : 1;
  return a.name.localeCompare(b.name, "en");
}
