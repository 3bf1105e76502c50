// Which items answer a query, best first. An exact identifier always stands before any likeness.

import { readFormula } from "./formula.js";
import { formulasOf, itemAt, keyAt } from "./index.js";
import { casDigits, foldCode, foldName } from "./normalise.js";
import { misspelt } from "./slips.js";

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
  facts(index, query, give);
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
  const { codes, smiles } = index.exact;
  for (const item of codes.get(query.code) ?? []) give(item, EXACT);
  const plain = /^[A-Za-z0-9]*$/.test(query.text);
  for (const item of smiles.get(query.text) ?? []) give(item, plain ? PLAIN_SMILES : EXACT);
  starting(index.digits, query.digits, give);
  if (query.code.length > 1) {
    for (const [code, items] of codes) {
      if (code.startsWith(query.code)) for (const item of items) give(item, IDENTIFIER_START);
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
  if (!query.formulas.length) return;
  const held = formulasOf(index);
  for (const { key, charge } of query.formulas) {
    for (const [item, its] of held.get(key) ?? []) {
      give(item, (charge ?? 0) === its ? FORMULA : FORMULA_OTHER_CHARGE);
    }
  }
}

function names(index, { name, words, close }, give) {
  if (!name) return;
  const lines = index.names;
  const tight = lines.close;
  eachAt(lines, `\n${name}`, (item, end, length) => {
    give(item, lines.text[end] === "\n" ? NAME : NAME_START - Math.min(length, LONGEST));
  });
  eachAt(tight, `\n${close}`, (item, end, length) => {
    give(item, tight.text[end] === "\n" ? NAME - 1 : NAME_START - 1 - Math.min(length, LONGEST));
  });
  everyWord(lines, words, (item, length) => give(item, WORD_START - Math.min(length, LONGEST)));
  if (close.length < 3) return;
  eachAt(tight, close, (item, _, length) => give(item, INSIDE - Math.min(length, 40)));
}

function facts(index, { words }, give) {
  everyWord(index.facts, words, (item) => give(item, FACTS));
}

/** Calls `visit(item, end, lineLength)` for every line that holds `piece`, at its first place. */
function eachAt({ text, items, starts }, piece, visit) {
  const shift = piece[0] === "\n" ? 1 : 0;
  let line = 0;
  for (let at = text.indexOf(piece); at >= 0; at = text.indexOf(piece, starts[line + 1] - 1)) {
    line = lineAt(starts, at + shift, line);
    visit(items[line], at + piece.length, starts[line + 1] - starts[line] - 1);
  }
}

/** Calls `visit(item, lineLength)` for every line in which each word begins a word. */
function everyWord({ text, items, starts }, words, visit) {
  if (!words.length) return;
  const longest = words.reduce((a, b) => (b.length > a.length ? b : a));
  const others = words.filter((word) => word !== longest);
  let line = 0;
  for (let at = text.indexOf(longest); at >= 0; at = text.indexOf(longest, at + 1)) {
    if (text[at - 1] !== " " && text[at - 1] !== "\n") continue;
    line = lineAt(starts, at, line);
    const end = starts[line + 1] - 1;
    if (others.length && !everyStarts(` ${text.slice(starts[line], end)}`, others)) continue;
    visit(items[line], end - starts[line]);
    at = end - 1;
  }
}

function everyStarts(line, words) {
  return words.every((word) => line.includes(` ${word}`));
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
