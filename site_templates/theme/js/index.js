// The lookup's index: fetched once, when it is first wanted, and made ready to be asked.

import { readFormula } from "./formula.js";
import { casDigits, foldCode, foldName } from "./normalise.js";

let pending = null;

/** The prepared index, the same promise however often it is asked for. */
export function loadIndex(root) {
  pending ??= fetch(new URL(`${root}lookup-index.json`, document.baseURI))
    .then((answer) => {
      if (!answer.ok) throw new Error(`lookup index: ${answer.status}`);
      return answer.json();
    })
    .then(prepare)
    .catch((error) => {
      pending = null;
      throw error;
    });
  return pending;
}

/** Rows of compounds and shapes with their folded spellings beside them. */
export function prepare(data) {
  return [...rows(data.compounds).map(compound), ...rows(data.shapes).map(shape)];
}

function rows(columns) {
  const names = Object.keys(columns);
  const length = names.length ? columns[names[0]].length : 0;
  return Array.from({ length }, (_, at) =>
    Object.fromEntries(names.map((name) => [name, columns[name][at]])),
  );
}

function compound(row) {
  const names = [row.name, ...row.also];
  return {
    ...row,
    kind: "compound",
    address: `compounds/${encodeURIComponent(row.id)}/`,
    folded: names.map(foldName),
    codes: [row.id, row.code].filter(Boolean).map(foldCode),
    digits: casDigits(row.cas),
    formulas: [row.formula, ...row.also].flatMap(readFormula),
    shapes: foldName(row.shape),
    labels: row.tags.map(foldName),
  };
}

function shape(row) {
  return {
    ...row,
    kind: "shape",
    folded: [foldName(row.name), foldName(row.name).replace(/ /g, "")],
    codes: [],
    digits: "",
    formulas: [],
    shapes: "",
    labels: [],
  };
}
