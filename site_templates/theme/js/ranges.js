// Ranges and observations: angles, dipole moment, molar mass, infrared stretches, NMR signals.

import { all, none, put } from "./bits.js";

/** The fields of a range, their names as they stand in the address. */
export const RANGE_KEYS = [
  "angle-from", "angle-to", "end", "middle", "other-end", "dipole-from", "dipole-to", "mass-from",
  "mass-to", "stretches", "nucleus", "signals", "near", "within",
];

const USUAL_TOLERANCE_DEGREES = 1;

/** The compounds that all ranges and observations leave; `asked` holds the fields' texts. */
export function rangeSet(prepared, asked) {
  const tests = [angleTest, nearTest, cornerTest, dipoleTest, massTest, stretchTest, signalTest]
    .map((make) => make(prepared.facets, asked))
    .filter(Boolean);
  if (!tests.length) return all(prepared.size);
  const set = none(prepared.size);
  for (let item = 0; item < prepared.size; item += 1) {
    if (tests.every((test) => test(item))) put(set, item);
  }
  return set;
}

/** A number as people type it, with comma or point; `null` for what is none. */
export function numberIn(text) {
  const plain = (text ?? "").trim().replace(",", ".").replace("\u2212", "-").replace(/°$/, "");
  if (plain === "" || !Number.isFinite(Number(plain))) return null;
  return Number(plain);
}

function angleTest(facets, asked) {
  const span = spanOf(asked["angle-from"], asked["angle-to"]);
  return span && angleWithin(facets, asked, span);
}

function nearTest(facets, asked) {
  const near = numberIn(asked.near);
  if (near === null) return null;
  const within = Math.abs(numberIn(asked.within) ?? USUAL_TOLERANCE_DEGREES);
  return angleWithin(facets, asked, [near - within, near + within]);
}

/** Elements alone, without a number: has such an angle at all. */
function cornerTest(facets, asked) {
  const named = asked.end || asked.middle || asked["other-end"];
  return named ? angleWithin(facets, asked, [0, 180]) : null;
}

function angleWithin(facets, asked, [from, to]) {
  const wanted = facets.words.corners.map((corner) => cornerFits(corner, asked));
  const least = Math.round(from * 10);
  const most = Math.round(to * 10);
  const { from: first, kind, tenths } = facets.angles;
  return (item) => {
    for (let at = first[item]; at < first[item + 1]; at += 1) {
      if (wanted[kind[at]] && tenths[at] >= least && tenths[at] <= most) return true;
    }
    return false;
  };
}

function cornerFits(corner, asked) {
  const [first, middle, last] = corner.split("-");
  const fits = (want, have) => !want || want.toLowerCase() === have.toLowerCase();
  if (!fits(asked.middle, middle)) return false;
  const one = asked.end;
  const other = asked["other-end"];
  return (fits(one, first) && fits(other, last)) || (fits(one, last) && fits(other, first));
}

function dipoleTest(facets, asked) {
  const span = spanOf(asked["dipole-from"], asked["dipole-to"]);
  const held = facets.compounds.dipole;
  return span && ((item) => held[item] !== null && held[item] >= span[0] && held[item] <= span[1]);
}

function massTest(facets, asked) {
  const span = spanOf(asked["mass-from"], asked["mass-to"]);
  const held = facets.compounds.mass;
  return span && ((item) => held[item] >= span[0] && held[item] <= span[1]);
}

function stretchTest(facets, asked) {
  const count = numberIn(asked.stretches);
  return count === null ? null : (item) => facets.compounds.stretches[item] === count;
}

function signalTest(facets, asked) {
  const count = numberIn(asked.signals);
  const nucleus = facets.words.nuclei.indexOf(asked.nucleus || facets.words.nuclei[0]);
  if (count === null || nucleus < 0) return null;
  return (item) => signalsOf(facets, item, nucleus) === count;
}

function signalsOf(facets, item, nucleus) {
  const held = facets.compounds.signals[item] || [];
  for (let at = 0; at < held.length; at += 2) if (held[at] === nucleus) return held[at + 1];
  return 0;
}

function spanOf(fromText, toText) {
  const from = numberIn(fromText);
  const to = numberIn(toText);
  return from === null && to === null ? null : [from ?? -Infinity, to ?? Infinity];
}
