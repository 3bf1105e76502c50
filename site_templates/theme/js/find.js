// Which items answer a query, best first. An exact identifier always stands before any likeness.

import { readFormula } from "./formula.js";
import { compoundsOf, itemAt, keyAt } from "./index.js";
import { eachLineWith, lengthOf, linesOf, markedWords, unmarked } from "./lines.js";
import { casDigits } from "./normalise.js";
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
  const { marked, plain } = linesOf([text]);
  const marks = markedWords(marked);
  return {
    empty: text.trim() === "",
    text: text.trim(),
    marked: marked.trim(),
    close: plain.trim(),
    marks,
    words: marks.map(unmarked),
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
  codes(index.codes, query.close, give);
  const plain = /^[A-Za-z0-9]*$/.test(query.text);
  for (const item of index.smiles.get(query.text) ?? []) give(item, plain ? PLAIN_SMILES : EXACT);
  starting(index.digits, query.digits, give);
  keys(index, query.text.toUpperCase(), give);
}

function codes({ plain, starts, items }, code, give) {
  if (!code) return;
  eachLineWith(plain, starts, `\n${code}`, (line) => {
    if (lengthOf(starts, line) === code.length) give(items[line], EXACT);
    else if (code.length > 1) give(items[line], IDENTIFIER_START);
  });
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
    for (const item of compoundsOf(index, key)) {
      give(item, (charge ?? 0) === index.columns.charge[item] ? FORMULA : FORMULA_OTHER_CHARGE);
    }
  }
}

/** Names that begin with what is typed or hold it, spaces left out; best with its words right. */
function names({ names: { plain, marked, starts, items } }, query, give) {
  const { close } = query;
  if (!close) return;
  eachLineWith(plain, starts, close.length < LEAST_INSIDE ? `\n${close}` : close, (line, isBeginning) => {
    const size = lengthOf(starts, line);
    if (!isBeginning) {
      give(items[line], INSIDE - Math.min(size, LONGEST_AROUND));
      return;
    }
    const score = size === close.length ? NAME : NAME_START - Math.min(size, LONGEST);
    give(items[line], marked.startsWith(query.marked, starts[line]) ? score : score - 1);
  });
}

/** Items of which every word typed begins a word: of one name, or else of all names and facts. */
function words(index, query, give) {
  if (!query.words.length) return;
  const { marked, starts, items } = index.names;
  const metByLine = new Uint16Array(items.length);
  const metByItem = new Uint16Array(index.total);
  query.words.forEach((word, nth) => {
    eachLineWith(marked, starts, query.marks[nth], (line) => {
      step(metByLine, line, nth);
      step(metByItem, items[line], nth);
    });
    eachWithFact(index, word, (item) => step(metByItem, item, nth));
  });
  const all = query.words.length;
  metByLine.forEach((met, line) => {
    if (met === all) give(items[line], WORD_START - Math.min(lengthOf(starts, line), LONGEST));
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
