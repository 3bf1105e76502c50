// The lookup's index: read once, when it is first wanted, and made ready to be asked.

import { loadData } from "./data.js";
import { formulaKey, readFormula } from "./formula.js";
import { casDigits, foldCode, foldLines } from "./normalise.js";

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
  index.names = linesOf(total, (item) => namesOf(index, item));
  index.facts = linesOf(total, (item) => [factsOf(index, item)]);
  index.exact = exactOf(index);
  index.digits = columns.cas.map(casDigits);
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

function namesOf({ columns, compounds, data }, item) {
  if (item < compounds) return [columns.name[item], ...(columns.also[item] || [])];
  const entry = data.entries[item - compounds];
  return [entry.name, ...entry.also];
}

function factsOf(index, item) {
  const names = namesOf(index, item).join(" ");
  if (item >= index.compounds) return names;
  const { columns, words } = index;
  const tags = (columns.tags[item] || []).map((tag) => words.tags[tag]);
  return [
    names,
    words.shape[columns.shape[item]],
    words.group[columns.group[item]],
    words.polarity[columns.polarity[item]],
    ...tags,
  ].join(" ");
}

/** Folded text with a line end before and after every line, and which item each line is of. */
function linesOf(total, textsOf) {
  const texts = [];
  const items = [];
  for (let item = 0; item < total; item += 1) {
    for (const text of textsOf(item)) {
      texts.push(text.replace(/\n/g, " "));
      items.push(item);
    }
  }
  const folded = `\n${foldLines(texts.join("\n"))}\n`.replace(/ *\n */g, "\n");
  return { text: folded, items, close: folded.replace(/ /g, "") };
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
