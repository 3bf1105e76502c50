// Which items answer a query, best first. An exact identifier always stands before any likeness.

import { readFormula } from "./formula.js";
import { itemAt, keyAt } from "./index.js";
import { casDigits, foldCode, foldName } from "./normalise.js";
import { misspelt } from "./slips.js";
import { beginning, eachLineWith } from "./words.js";

const EXACT = 1000;
const FORMULA = 900;
const PLAIN_SMILES = 890;
const NAME = 800;
const FORMULA_OTHER_CHARGE = 700;
const IDENTIFIER_START = 500;
const NAME_START = 400;
const WORD_START = 300;
const INSIDE = 200;
const FACTS = 150;
const LONGEST = 90;
const LONGEST_AROUND = 40;
const LEAST_INSIDE = 3;
const LEAST_KEY_LETTERS = 6;

/** Items that answer as plain objects, best first, at most `most`. */
export function find(index, text, most = Infinity) {
  return findItems(index, text).slice(0, most).map((item) => itemAt(index, item));
}

/** Numbers of the items that answer, best first; every item in its own order for no query. */
export function findItems(index, text) {
  const query = read(text);
  if (query.empty) return Array.from({ length: index.total }, (_, item) => item);
  const scores = new Uint16Array(index.total);
  const give = (item, score) => {
    if (score > scores[item]) scores[item] = score;
  };
  identifiers(index, query, give);
  formulas(index, query, give);
  names(index, query, give);
  words(index, query, give);
  const found = ordered(scores);
  if (found.length) return found;
  misspelt(index, query, give);
  return ordered(scores);
}

function read(text) {
  const name = foldName(text);
  return {
    empty: text.trim() === "",
    text: text.trim(),
    name,
    words: name.split(" ").filter(Boolean),
    close: name.replace(/ /g, ""),
    code: foldCode(text),
    digits: casDigits(text),
    formulas: readFormula(text),
  };
}

/** Highest score first, equal ones in their own order: scores are small whole numbers. */
function ordered(scores) {
  const piles = [];
  for (let item = 0; item < scores.length; item += 1) {
    const score = scores[item];
    if (score) (piles[score] ??= []).push(item);
  }
  return piles.reverse().flat();
}

function identifiers(index, query, give) {
  const { codes, codeList, smiles } = index.exact;
  for (const item of codes.get(query.code) ?? []) give(item, EXACT);
  const plain = /^[A-Za-z0-9]*$/.test(query.text);
  for (const item of smiles.get(query.text) ?? []) give(item, plain ? PLAIN_SMILES : EXACT);
  starting(index.digits, query.digits, give);
  if (query.code.length > 1) {
    for (const code of codeList.slice(...beginning(codeList, query.code))) {
      for (const item of codes.get(code)) give(item, IDENTIFIER_START);
    }
  }
  keys(index, query.text.toUpperCase(), give);
}

function starting(column, start, give) {
  if (!start) return;
  column.forEach((held, item) => {
    if (held.startsWith(start)) give(item, held === start ? EXACT : IDENTIFIER_START);
  });
}

function keys(index, start, give) {
  if (start.length < LEAST_KEY_LETTERS || !/^[A-Z]{6,14}(-[A-Z]{0,10}(-[A-Z]?)?)?$/.test(start)) return;
  const block = start.slice(0, 14);
  index.columns.key.forEach((held, item) => {
    if (!held.startsWith(block)) return;
    const key = keyAt(index, item);
    if (key === start) give(item, EXACT);
    else if (key.startsWith(start)) give(item, IDENTIFIER_START);
  });
}

function formulas(index, query, give) {
  for (const { key, charge } of query.formulas) {
    for (const [item, its] of index.formulas.get(key) ?? []) {
      give(item, (charge ?? 0) === its ? FORMULA : FORMULA_OTHER_CHARGE);
    }
  }
}

/** Names that begin with what is typed or hold it, spaces left out; best with its spaces right. */
function names({ names: { spaced, close: tight, items } }, { name, close }, give) {
  if (!close) return;
  eachAt(tight, close.length < LEAST_INSIDE ? `\n${close}` : close, (line, isBeginning) => {
    const size = lengthOf(tight, line);
    if (!isBeginning) {
      give(items[line], INSIDE - Math.min(size, LONGEST_AROUND));
      return;
    }
    const score = size === close.length ? NAME : NAME_START - Math.min(size, LONGEST);
    give(items[line], spaced.text.startsWith(name, spaced.starts[line]) ? score : score - 1);
  });
}

/** Calls `visit(line, isBeginning)` for every line that holds `piece`, at its first place. */
function eachAt({ text, starts }, piece, visit) {
  const shift = piece[0] === "\n" ? 1 : 0;
  let line = 0;
  for (let at = text.indexOf(piece); at >= 0; at = text.indexOf(piece, starts[line + 1] - 1)) {
    line = lineAt(starts, at + shift, line);
    visit(line, at + shift === starts[line]);
  }
}

/** Items of which every word typed begins a word: of one name, or else of all names and facts. */
function words(index, query, give) {
  if (!query.words.length) return;
  const { spaced, items } = index.names;
  const metByLine = new Uint16Array(items.length);
  const metByItem = new Uint16Array(index.total);
  query.words.forEach((word, nth) => {
    eachLineWith(index.vocabulary, word, (line) => {
      step(metByLine, line, nth);
      step(metByItem, items[line], nth);
    });
    eachWithFact(index, word, (item) => step(metByItem, item, nth));
  });
  const all = query.words.length;
  metByLine.forEach((met, line) => {
    if (met === all) give(items[line], WORD_START - Math.min(lengthOf(spaced, line), LONGEST));
  });
  metByItem.forEach((met, item) => met === all && give(item, FACTS));
}

/** Calls `visit(item)` for every compound whose shape, point group, polarity or tag has such a word. */
function eachWithFact({ facts, columns }, word, visit) {
  for (const [key, texts] of Object.entries(facts)) {
    const fits = texts.map((parts) => parts.some((part) => part.startsWith(word)));
    if (!fits.includes(true)) continue;
    const has = key === "tags" ? (tags) => tags && tags.some((tag) => fits[tag]) : (fact) => fits[fact];
    columns[key].forEach((held, item) => has(held) && visit(item));
  }
}

/** One more word met, where all before it were. */
function step(met, at, nth) {
  if (met[at] === nth) met[at] = nth + 1;
}

function lengthOf({ starts }, line) {
  return starts[line + 1] - starts[line] - 1;
}

/** The line that an offset is in; offsets only grow, so the search goes on from `line`. */
function lineAt(starts, at, line) {
  let step = 1;
  let low = line;
  while (low + step < starts.length - 1 && starts[low + step] <= at) {
    low += step;
    step *= 2;
  }
  let high = Math.min(low + step, starts.length - 1);
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (starts[middle] <= at) low = middle;
    else high = middle;
  }
  return low;
}
