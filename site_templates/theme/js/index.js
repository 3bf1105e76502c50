// The lookup's index: read once, when it is first wanted, and made ready to be asked.

import { loadData } from "./data.js";
import { formulaKey, readFormula } from "./formula.js";
import { foldCode, foldLines, foldName } from "./normalise.js";
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
  vocabulary: ({ names }) => wordsIn(names.spaced.text.slice(1, -1)),
  exact: exactOf,
  facts: factsOf,
  digits: ({ columns }) => columns.cas.map((cas) => cas.replace(/-/g, "")),
  formulas: formulasOf,
  slips: slipsOf,
};

/** Compounds and all other entries numbered through, with what each is found by. */
export function prepare(data) {
  const columns = data.compounds;
  const compounds = columns.id.length;
  const index = { data, columns, words: data.words, compounds, total: compounds + data.entries.length };
  for (const [name, make] of Object.entries(PARTS)) {
    Object.defineProperty(index, name, {
      configurable: true,
      get() {
        const value = make(index);
        Object.defineProperty(index, name, { value });
        return value;
      },
    });
  }
  return index;
}

/** Make every part in a quiet moment of its own, before a query asks for it. */
export function prepareLater(index) {
  const idle = globalThis.requestIdleCallback ?? setTimeout;
  for (const name of Object.keys(PARTS)) idle(() => index[name]);
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

/** Compounds by composition. */
function formulasOf({ columns, compounds }) {
  const found = new Map();
  const add = (key, item, charge) => {
    const held = found.get(key);
    if (held) held.push([item, charge]);
    else found.set(key, [[item, charge]]);
  };
  for (let item = 0; item < compounds; item += 1) {
    add(formulaKey(columns.formula[item]), item, columns.charge[item]);
    for (const name of columns.also[item] || []) {
      if (LIKE_A_FORMULA.test(name)) for (const { key } of readFormula(name)) add(key, item, columns.charge[item]);
    }
  }
  return found;
}

/** Every name of every item, one a line, with spaces between words and without; whose each is. */
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
  const count = items.length;
  return { items, spaced: linesIn(text, count), close: linesIn(text.replace(/ /g, ""), count) };
}

/** How every shape, point group, polarity and tag may begin, in the order of the index's lists. */
function factsOf({ words }) {
  return Object.fromEntries(FACTS.map((key) => [key, words[key].map(beginnings)]));
}

/** `see-saw`: see, saw and seesaw. */
function beginnings(text) {
  const words = foldName(text).split(" ");
  return [...words, words.join("")];
}

/** Text with a line end before and after every line, and where each begins. */
function linesIn(text, count) {
  const starts = new Int32Array(count + 1);
  let at = 0;
  for (let line = 0; line <= count; line += 1) {
    starts[line] = at + 1;
    at = text.indexOf("\n", at + 1);
  }
  return { text, starts };
}

/** Identifiers that are asked for whole: codes, ids, symbols, SMILES. */
function exactOf({ columns, compounds, data }) {
  const codes = new Map();
  const smiles = new Map();
  const add = (map, text, item) => {
    const held = map.get(text);
    if (held) held.push(item);
    else if (text) map.set(text, [item]);
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
  return { codes, codeList: [...codes.keys()].sort(), smiles };
}
