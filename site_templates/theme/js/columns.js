// The columns of the lookup's table: what each shows, copies and is sorted by.

import { formulaNode, formulaText, groupNode, hybridNode } from "./chemistry.js";
import { make } from "./nodes.js";

const USUAL = ["formula", "shape", "angle", "polarity", "dipole", "group", "cas", "code"];
const NOTHING = "–";

/** Every column: `text` to copy and sort, `value` where a number sorts, `node` where it is set, its `term`. */
const COLUMNS = [
  { key: "name", label: "Name", text: ({ row }) => row.name },
  {
    key: "formula", label: "Formula", text: ({ row }) => formulaText(row.formula, row.charge),
    node: ({ row }) => formulaNode(row.formula, row.charge),
  },
  { key: "shape", label: "Shape", term: "shape", text: ({ row }) => row.shape },
  {
    key: "angle", label: "Key angle, °", term: "bond-angle", text: ({ row }) => row.angle,
    value: ({ row }) => number(row.angle),
  },
  { key: "polarity", label: "Polarity", term: "polar", text: ({ row }) => row.polarity },
  {
    key: "dipole", label: "Dipole, D", term: "dipole-moment", text: ({ facts }) => fixed(facts.dipole, 2),
    value: ({ facts }) => facts.dipole,
  },
  {
    key: "group", label: "Point group", term: "point-group", text: ({ row }) => row.group,
    node: ({ row }) => groupNode(row.group),
  },
  { key: "mass", label: "Molar mass, g/mol", text: ({ facts }) => fixed(facts.mass, 2), value: ({ facts }) => facts.mass },
  { key: "neighbours", label: "Neighbours", term: "neighbours", text: ({ facts }) => listed(facts.sites, 1) },
  { key: "pairs", label: "Lone pairs", term: "lone-pair", text: ({ facts }) => listed(facts.sites, 2) },
  {
    key: "hybrid", label: "Hybridisation", term: "hybridisation", text: ({ facts }) => listed(facts.sites, 3),
    node: ({ facts }) => hybridNode(listed(facts.sites, 3) || NOTHING),
  },
  {
    key: "stretches", label: "IR stretches", term: "infrared-active", text: ({ facts }) => String(facts.stretches),
    value: ({ facts }) => facts.stretches,
  },
  { key: "signals", label: "NMR signals", text: ({ facts }) => facts.signals.map(([n, count]) => `${n} ${count}`).join(", ") },
  {
    key: "basis", label: "Basis", term: "basis", text: ({ facts }) => facts.bases.join(", "),
    node: ({ facts }) => badgesNode(facts.bases),
  },
  { key: "cas", label: "CAS", text: ({ row }) => row.cas },
  { key: "code", label: "Code", text: ({ row }) => row.code },
  { key: "tags", label: "Tags", text: ({ row }) => row.tags.join(", ") },
  { key: "hazards", label: "H-statements", text: ({ facts }) => facts.hazards.join(" ") },
];

/** All columns but the name, which always stands first. */
export const CHOICES = COLUMNS.slice(1);

/** The columns of a state: those named, in the table's order, or the usual ones. */
export function columnsFor(names) {
  const shown = names ?? USUAL;
  return COLUMNS.filter(({ key }) => key === "name" || shown.includes(key));
}

/** What the table knows of one compound beside its row of the index. */
export function factsAt({ compounds, words }, item) {
  const pairs = compounds.signals[item] || [];
  return {
    sites: compounds.sites[item].map((site) => words.sites[site]),
    hazards: (compounds.hazards[item] || []).map((code) => words.hazards[code]),
    bases: compounds.bases[item].map((basis) => words.bases[basis]),
    dipole: compounds.dipole[item],
    mass: compounds.mass[item],
    stretches: compounds.stretches[item],
    signals: pairs.flatMap((nucleus, at) => (at % 2 ? [] : [[words.nuclei[nucleus], pairs[at + 1]]])),
  };
}

/** Compares two compounds by a column; what has no value comes last either way. */
export function comparison(column, down) {
  const turn = down ? -1 : 1;
  const plain = new Intl.Collator("en", { numeric: true });
  return (a, b) => {
    const [left, right] = [a, b].map(column.value ?? column.text);
    const missing = (value) => value === null || value === "" || Number.isNaN(value);
    if (missing(left) || missing(right)) return Number(missing(left)) - Number(missing(right));
    return turn * (column.value ? left - right : plain.compare(left, right));
  };
}

/** The node or text of a cell. */
export function cellContent(column, compound) {
  if (column.node) return column.node(compound);
  return column.text(compound) || NOTHING;
}

function badgesNode(bases) {
  const badges = bases.map((basis) => make("span", { class: `basis basis--${basis}`, "data-term": basis }, basis));
  return make("span", { class: "badges" }, ...badges);
}

function listed(sites, at) {
  const found = new Set(sites.map((site) => (site[at] === null ? "" : String(site[at]))));
  found.delete("");
  return [...found].sort().join(", ");
}

function fixed(value, decimals) {
  return value === null ? "" : value.toFixed(decimals);
}

function number(text) {
  return text === "" ? null : Number(text);
}
