// Formulas in any order and script: SF4, F4S, SF₄, (CH3)3N and C3H9N, NO3- and [NO3]−.

import { plainDigits } from "./normalise.js";

const ELEMENTS = new Set(
  (
    "H He Li Be B C N O F Ne Na Mg Al Si P S Cl Ar K Ca Sc Ti V Cr Mn Fe Co Ni Cu Zn Ga Ge As Se Br Kr " +
    "Rb Sr Y Zr Nb Mo Tc Ru Rh Pd Ag Cd In Sn Sb Te I Xe Cs Ba La Ce Pr Nd Pm Sm Eu Gd Tb Dy Ho Er Tm Yb " +
    "Lu Hf Ta W Re Os Ir Pt Au Hg Tl Pb Bi Po At Rn Fr Ra Ac Th Pa U Np Pu Am Cm Bk Cf Es Fm Md No Lr D T"
  ).split(" "),
);

const MOST_READINGS = 32;

/**
 * Every reading of a text as a formula: [{ key, charge }], the charge null where none is written.
 * Text as it is written is read first; small letters alone may be read in several ways.
 */
export function readFormula(text) {
  const marked = text.trim().replace(/(?:([⁰¹²³⁴-⁹]*)([⁺⁻])|\s+(\d*[+\-\u2212]))$/, "^$1$2$3");
  const plain = plainDigits(marked).replace(/[\s\u00b7.]/g, "");
  return splitCharge(plain).flatMap(({ body, charge }) => readBody(body, charge));
}

function readBody(body, charge) {
  if (!/^[A-Za-z0-9()[\]]+$/.test(body) || !/[A-Za-z]/.test(body)) return [];
  const strict = readings(body, exactSymbols);
  const found = strict.length || /[A-Z]/.test(body) ? strict : readings(body, looseSymbols);
  return found.map((counts) => ({ key: keyOf(counts), charge }));
}

/** The key of a formula of the index, which is plain: symbols and numbers alone. */
export function formulaKey(formula) {
  const counts = new Map();
  for (const [, symbol, digits] of formula.matchAll(/([A-Z][a-z]?)(\d*)/g)) {
    counts.set(symbol, (counts.get(symbol) ?? 0) + (digits ? Number(digits) : 1));
  }
  return keyOf(counts);
}

/** A number for a composition, whatever the order of a plain formula; few others share it. */
export function weightOf(formula) {
  let [sum, element, count] = [0, 0, 0];
  for (let at = 0; at < formula.length; at += 1) {
    const code = formula.charCodeAt(at);
    if (code < 65) {
      count = 10 * count + code - 48;
    } else if (code < 97) {
      sum += spread(element) * (count || 1);
      [element, count] = [code, 0];
    } else {
      element = 128 * element + code;
    }
  }
  return sum + spread(element) * (count || 1);
}

/** Multiplicative hashing by the golden ratio. */
function spread(element) {
  return Math.imul(element, 0x9e3779b1) >>> 0;
}

/** One spelling for a composition: elements in alphabetical order with their numbers. */
export function keyOf(counts) {
  return [...counts.entries()]
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([element, count]) => element + count)
    .join("");
}

/** Charges as people write them; SO42- may be SO4 with 2- or SO42 with -, so both are read. */
function splitCharge(text) {
  const marked =
    /^\[(.+)\](\d*)([+-])$/.exec(text) ??
    /^(.+?)\^(\d*)([+-])$/.exec(text) ??
    /^(.+?)\((\d*)([+-])\)$/.exec(text);
  if (marked) return [{ body: marked[1], charge: signed(marked[2], marked[3]) }];
  const signs = /^(.+?)([+-]+)$/.exec(text);
  if (!signs) return [{ body: text, charge: null }];
  const [, body, run] = signs;
  const found = [{ body, charge: run.length * signed("", run[0]) }];
  const digit = /^(.*[A-Za-z)\]]\d*)(\d)$/.exec(body);
  if (digit && run.length === 1) found.push({ body: digit[1], charge: signed(digit[2], run) });
  return found;
}

function signed(digits, sign) {
  return (digits ? Number(digits) : 1) * (sign === "+" ? 1 : -1);
}

function readings(text, symbolsAt) {
  return groupAt(text, 0, symbolsAt, 0)
    .filter(([, end]) => end === text.length)
    .map(([counts]) => counts)
    .slice(0, MOST_READINGS);
}

/** Readings of a run of units from `start`: [counts, end], stopping at a closing bracket or the end. */
function groupAt(text, start, symbolsAt, depth) {
  if (depth > 4) return [];
  let open = [[new Map(), start]];
  const closed = [];
  while (open.length && closed.length < MOST_READINGS) {
    const next = [];
    for (const [counts, at] of open) {
      if (at === text.length || ")]".includes(text[at])) {
        closed.push([counts, at]);
        continue;
      }
      for (const [unit, end] of unitsAt(text, at, symbolsAt, depth)) {
        next.push([merged(counts, unit), end]);
      }
    }
    open = next.slice(0, MOST_READINGS);
  }
  return closed;
}

function unitsAt(text, at, symbolsAt, depth) {
  const opener = "([".indexOf(text[at]);
  if (opener < 0) {
    return symbolsAt(text, at).map(([symbol, end]) => counted(new Map([[symbol, 1]]), text, end));
  }
  return groupAt(text, at + 1, symbolsAt, depth + 1)
    .filter(([, end]) => text[end] === ")]"[opener])
    .map(([inner, end]) => counted(inner, text, end + 1));
}

function counted(unit, text, at) {
  const digits = /^\d{0,3}/.exec(text.slice(at))[0];
  const times = digits ? Number(digits) : 1;
  return [new Map([...unit].map(([symbol, count]) => [symbol, count * times])), at + digits.length];
}

function merged(left, right) {
  const sum = new Map(left);
  for (const [symbol, count] of right) sum.set(symbol, (sum.get(symbol) ?? 0) + count);
  return sum;
}

function exactSymbols(text, at) {
  const two = /^[A-Z][a-z]/.exec(text.slice(at, at + 2))?.[0];
  if (two) return ELEMENTS.has(two) ? [[two, at + 2]] : [];
  return ELEMENTS.has(text[at]) ? [[text[at], at + 1]] : [];
}

function looseSymbols(text, at) {
  const found = [];
  for (const length of [1, 2]) {
    const piece = text.slice(at, at + length);
    const symbol = piece[0].toUpperCase() + piece.slice(1);
    if (piece.length === length && ELEMENTS.has(symbol)) found.push([symbol, at + length]);
  }
  return found;
}
