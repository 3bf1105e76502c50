// Which compounds a set of filters leaves, and how many each further choice would leave.

import { all, common, either, none, put, shared } from "./bits.js";
import { cornersOf } from "./corners.js";
import { lazily } from "./parts.js";

/**
 * The groups of choices. Choices of one group widen it (`any`) or narrow it (`every`); groups
 * `at` a site must be met at one and the same centre.
 */
export const GROUPS = [
  { key: "element", label: "Element", mode: "every" },
  { key: "shape", label: "Shape", mode: "any", site: 0 },
  { key: "neighbours", label: "Neighbours", mode: "any", site: 1, term: "neighbours" },
  { key: "pairs", label: "Lone pairs", mode: "any", site: 2, term: "lone-pair" },
  { key: "hybrid", label: "Hybridisation", mode: "any", site: 3, term: "hybridisation" },
  { key: "group", label: "Point group", mode: "any", term: "point-group" },
  { key: "polarity", label: "Polarity", mode: "any", term: "polar" },
  { key: "basis", label: "Basis of a value", mode: "any", term: "basis" },
  { key: "tag", label: "Tag", mode: "every" },
  { key: "hazard", label: "H-statement", mode: "every" },
];
const SITE_GROUPS = GROUPS.filter((group) => group.site !== undefined);
const OTHER_GROUPS = GROUPS.filter((group) => group.site === undefined);
const SYMBOL = /[A-Z][a-z]?/g;
const BASIS_ORDER = ["measured", "calculated", "supplied", "model"];

/** The sets of compounds behind every choice: `prepareFacets(index, facets)`. */
export function prepareFacets(index, facets) {
  const size = index.compounds;
  const { columns, words } = index;
  const held = Object.fromEntries(GROUPS.map(({ key }) => [key, new Map()]));
  const add = (key, value, item) => {
    const set = held[key].get(value);
    put(set ?? held[key].set(value, none(size)).get(value), item);
  };
  const kinds = facets.words.sites.map(() => none(size));
  for (let item = 0; item < size; item += 1) {
    for (const [symbol] of columns.formula[item].matchAll(SYMBOL)) add("element", symbol, item);
    add("group", words.group[columns.group[item]], item);
    add("polarity", words.polarity[columns.polarity[item]], item);
    for (const tag of columns.tags[item] || []) add("tag", words.tags[tag], item);
    for (const code of facets.compounds.hazards[item] || []) add("hazard", facets.words.hazards[code], item);
    for (const basis of facets.compounds.bases[item]) add("basis", facets.words.bases[basis], item);
    for (const site of facets.compounds.sites[item]) put(kinds[site], item);
  }
  const sites = facets.words.sites.map((site) => site.map(siteText));
  lazily(facets, { angles: cornersOf });
  return { size, held, kinds, sites, facets, values: valuesOf(held, sites) };
}

/** Compounds left and counts: `{ left, counts: { key: Map(value → number) } }`. */
export function filterBy(prepared, chosen, base) {
  const others = new Map(OTHER_GROUPS.map((group) => [group.key, selected(prepared, group, chosen)]));
  const siteSet = siteSelection(prepared, chosen, null);
  const left = common([base, siteSet, ...others.values()]);
  const counts = {};
  for (const group of OTHER_GROUPS) {
    const rest = [...others].filter(([key]) => key !== group.key || group.mode === "every");
    counts[group.key] = countsOf(prepared.held[group.key], common([base, siteSet, ...rest.map(([, set]) => set)]));
  }
  const beside = common([base, ...others.values()]);
  for (const group of SITE_GROUPS) counts[group.key] = siteCounts(prepared, chosen, group, beside);
  return { left, counts };
}

function selected({ held, size }, { key, mode }, chosen) {
  const sets = (chosen[key] ?? []).map((value) => held[key].get(value) ?? none(size));
  if (!sets.length) return all(size);
  return mode === "every" ? common(sets) : either(sets, size);
}

function siteSelection(prepared, chosen, leftOut) {
  const asked = SITE_GROUPS.filter((group) => group !== leftOut && chosen[group.key]?.length);
  if (!asked.length) return all(prepared.size);
  return either(prepared.kinds.filter((_, kind) => fits(prepared.sites[kind], asked, chosen)), prepared.size);
}

function siteCounts(prepared, chosen, group, beside) {
  const asked = SITE_GROUPS.filter((other) => other !== group && chosen[other.key]?.length);
  const sets = new Map();
  prepared.sites.forEach((site, kind) => {
    const value = site[group.site];
    if (!sets.has(value)) sets.set(value, []);
    if (fits(site, asked, chosen)) sets.get(value).push(prepared.kinds[kind]);
  });
  return new Map(
    [...sets].map(([value, found]) => [value, shared(either(found, prepared.size), beside)]),
  );
}

function fits(site, asked, chosen) {
  return asked.every((group) => chosen[group.key].includes(site[group.site]));
}

function countsOf(sets, within) {
  return new Map([...sets].map(([value, set]) => [value, shared(set, within)]));
}

/** Every value of each group in the order in which it is offered. */
function valuesOf(held, sites) {
  const values = Object.fromEntries(OTHER_GROUPS.map(({ key }) => [key, [...held[key].keys()]]));
  for (const { key, site } of SITE_GROUPS) values[key] = [...new Set(sites.map((one) => one[site]))];
  const plain = new Intl.Collator("en", { numeric: true });
  for (const list of Object.values(values)) list.sort(plain.compare);
  values.basis.sort((a, b) => BASIS_ORDER.indexOf(a) - BASIS_ORDER.indexOf(b));
  return values;
}

function siteText(value) {
  if (value === null) return "not counted";
  return value === "" ? "none" : String(value);
}
