// The lookup's index: read once, when it is first wanted, and made ready to be asked.

import { loadData } from "./data.js";
import { formulaKey, readFormula } from "./formula.js";
import { foldCode, foldLines, foldName } from "./normalise.js";

const USUAL_KEY_END = "-UHFFFAOYSA-N";
const LIKE_A_FORMULA = /^(?:[A-Z][a-z]?\d*|[()[\]]\d*)+$/;

let pending = null;

/** The prepared index, the same promise however often it is asked for. */
export function loadIndex(root) {
  pending ??= loadData(root, "lookup-index").then(prepare);
  pending.catch(() => {
    pending = null;
  });
  return pending;
}

/** Compounds and all other entries numbered through, with what each is found by beside them. */
export function prepare(data) {
  const columns = data.compounds;
  const compounds = columns.id.length;
  const total = compounds + data.entries.length;
  const index = { data, columns, words: data.words, compounds, total, formulas: null, slips: null };
  index.names = namesOf(index);
  index.facts = factsOf(index, index.names);
  index.exact = exactOf(index);
  index.digits = columns.cas.map((cas) => cas.replace(/-/g, ""));
  return index;
}

/** One compound or other entry as a plain object. */
export function itemAt(index, item) {
  if (item >= index.compounds) return index.data.entries[item - index.compounds];
  const { columns, words } = index;
  return {
    kind: "compound",
    id: columns.id[item],
    name: columns.name[item],
    address: `compounds/${encodeURIComponent(columns.id[item])}/`,
    formula: columns.formula[item],
    charge: columns.charge[item],
    cas: columns.cas[item],
    code: columns.code[item],
    shape: words.shape[columns.shape[item]],
    glyph: words.glyph[columns.glyph[item]],
    group: words.group[columns.group[item]],
    angle: columns.angle[item],
    polarity: words.polarity[columns.polarity[item]],
    tags: (columns.tags[item] || []).map((tag) => words.tags[tag]),
  };
}

/** The full InChIKey of a compound; the end that most keys share is left out of the index. */
export function keyAt(index, item) {
  const key = index.columns.key[item];
  return key.length === 14 ? key + USUAL_KEY_END : key;
}

/** Compounds by composition, made when a formula is first asked for. */
export function formulasOf(index) {
  index.formulas ??= readFormulas(index);
  return index.formulas;
}

function readFormulas({ columns, compounds }) {
  const found = new Map();
  const add = (key, item, charge) => {
    if (!found.has(key)) found.set(key, []);
    found.get(key).push([item, charge]);
  };
  for (let item = 0; item < compounds; item += 1) {
    add(formulaKey(columns.formula[item]), item, columns.charge[item]);
    for (const name of columns.also[item] || []) {
      if (LIKE_A_FORMULA.test(name)) for (const { key } of readFormula(name)) add(key, item, columns.charge[item]);
    }
  }
  return found;
}

/** Every name of every item, one a line. */
function namesOf({ columns, compounds, data, total }) {
  const texts = [];
  const items = [];
  for (let item = 0; item < total; item += 1) {
    const entry = data.entries[item - compounds];
    const name = entry ? entry.name : columns.name[item];
    for (const text of [name, ...((entry ? entry.also : columns.also[item]) || [])]) {
      texts.push(text.includes("\n") ? text.replace(/\n/g, " ") : text);
      items.push(item);
    }
  }
  const text = `\n${foldLines(texts.join("\n"))}\n`.replace(/ *\n */g, "\n");
  return { ...linesIn(text, items), close: linesIn(text.replace(/ /g, ""), items) };
}

/** One line an item: all its names, then shape, point group, polarity and tags. */
function factsOf({ columns, compounds, words, total }, { text, items }) {
  const folded = Object.fromEntries(Object.entries(words).map(([key, list]) => [key, list.map(foldName)]));
  const parts = Array.from({ length: total }, () => []);
  text.slice(1, -1).split("\n").forEach((line, at) => parts[items[at]].push(line));
  for (let item = 0; item < compounds; item += 1) {
    for (const key of ["shape", "group", "polarity"]) parts[item].push(folded[key][columns[key][item]]);
    for (const tag of columns.tags[item] || []) parts[item].push(folded.tags[tag]);
  }
  return linesIn(`\n${parts.map((part) => part.join(" ")).join("\n")}\n`, parts.map((_, item) => item));
}

/** Text with a line end before and after every line, where each begins, and whose each is. */
function linesIn(text, items) {
  const starts = new Int32Array(items.length + 1);
  let at = 0;
  for (let line = 0; line <= items.length; line += 1) {
    starts[line] = at + 1;
    at = text.indexOf("\n", at + 1);
  }
  return { text, items, starts };
}

/** Identifiers that are asked for whole: codes, ids, symbols, SMILES. */
function exactOf({ columns, compounds, data }) {
  const codes = new Map();
  const smiles = new Map();
  const add = (map, text, item) => {
    if (!text) return;
    if (!map.has(text)) map.set(text, []);
    map.get(text).push(item);
  };
  for (let item = 0; item < compounds; item += 1) {
    add(codes, foldCode(columns.id[item]), item);
    add(codes, foldCode(columns.code[item]), item);
    add(smiles, columns.smiles[item], item);
    add(smiles, columns.spelling[item], item);
  }
  data.entries.forEach((entry, at) => {
    if (entry.kind === "term") return;
    for (const text of entry.also) add(codes, foldCode(text), compounds + at);
  });
  return { codes, smiles };
}
