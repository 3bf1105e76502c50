// The lookup's index: read once, when it is first wanted, and made ready to be asked.

import { loadData } from "./data.js";
import { formulaKey, readFormula, weightOf } from "./formula.js";
import { foldedWords, linesOf } from "./lines.js";
import { lazily } from "./parts.js";
import { slipsOf } from "./slips.js";
import { wordsIn } from "./words.js";

const USUAL_KEY_END = "-UHFFFAOYSA-N";
const FACTS = ["shape", "group", "polarity", "tags"];
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

/** What queries are held against, each part made when it is first wanted. */
const PARTS = {
  names: namesOf,
  codes: codesOf,
  smiles: smilesOf,
  digits: ({ columns }) => columns.cas.map((cas) => cas.replace(/-/g, "")),
  formulas: formulasOf,
  facts: factsOf,
  vocabulary: ({ names }) => wordsIn(names.marked),
  slips: slipsOf,
};

/** Compounds and all other entries numbered through, with what each is found by. */
export function prepare(data) {
  const columns = data.compounds;
  const compounds = columns.id.length;
  const index = { data, columns, words: data.words, compounds, total: compounds + data.entries.length };
  return lazily(index, PARTS);
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

/** A weight for every compound's composition, and the names that are formulas by their keys. */
function formulasOf({ columns, compounds }) {
  const names = new Map();
  for (let item = 0; item < compounds; item += 1) {
    for (const name of columns.also[item] || []) {
      if (LIKE_A_FORMULA.test(name)) for (const { key } of readFormula(name)) hold(names, key, item);
    }
  }
  return { weights: Float64Array.from(columns.formula, weightOf), names };
}

/** The compounds of a composition, by its key. */
export function compoundsOf({ formulas: { weights, names }, columns }, key) {
  const found = new Set(names.get(key));
  const weight = weightOf(key);
  weights.forEach((its, item) => {
    if (its === weight && formulaKey(columns.formula[item]) === key) found.add(item);
  });
  return found;
}

/** Every name of every item, one a line; whose each is. */
function namesOf({ columns, compounds, data, total }) {
  const texts = [];
  const items = [];
  for (let item = 0; item < total; item += 1) {
    const entry = data.entries[item - compounds];
    const name = entry ? entry.name : columns.name[item];
    for (const text of [name, ...((entry ? entry.also : columns.also[item]) || [])]) {
      texts.push(text);
      items.push(item);
    }
  }
  return { items, ...linesOf(texts) };
}

/** How every shape, point group, polarity and tag may begin, in the order of the index's lists. */
function factsOf({ words }) {
  return Object.fromEntries(FACTS.map((key) => [key, words[key].map(beginnings)]));
}

/** `see-saw`: see, saw and seesaw. */
function beginnings(text) {
  const words = foldedWords(text);
  return [...words, words.join("")];
}

/** Ids, codes and symbols, one a line, nothing but letters and digits; whose each is. */
function codesOf({ columns, compounds, data }) {
  const every = columns.id.map((_, item) => item);
  const others = data.entries.flatMap(({ kind, also }, at) =>
    kind === "term" ? [] : also.map((text) => [text, compounds + at]),
  );
  return {
    items: [...every, ...every, ...others.map(([, item]) => item)],
    ...linesOf([...columns.id, ...columns.code, ...others.map(([text]) => text)]),
  };
}

/** Compounds by SMILES, as the entry spells it and canonical. */
function smilesOf({ columns, compounds }) {
  const found = new Map();
  for (let item = 0; item < compounds; item += 1) {
    for (const text of new Set([columns.smiles[item], columns.spelling[item]])) if (text) hold(found, text, item);
  }
  return found;
}

function hold(map, key, item) {
  const held = map.get(key);
  if (held) held.push(item);
  else map.set(key, [item]);
}
