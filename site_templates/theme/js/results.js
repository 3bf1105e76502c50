// One line of an answer, made of nodes: text from an entry never becomes markup.

import { formulaNode } from "./chemistry.js";
import { glyph } from "./glyphs.js";

const KINDS = { shape: "shape", group: "point group", term: "term", page: "page", protocol: "protocol" };

/** The parts of a result: drawing, formula or kind, name, then shape, angle and polarity. */
export function resultParts(row) {
  if (row.kind !== "compound") return entryParts(row);
  const angle = row.angle && `${row.angle}°`;
  const facts = [row.shape, angle, row.polarity, row.code].filter(Boolean).join(" · ");
  const formula = formulaNode(row.formula, row.charge);
  formula.className = "result__formula";
  return [glyph(row.glyph), formula, part("result__name", row.name), part("result__facts", facts)];
}

function entryParts(row) {
  return [
    glyph(row.kind === "shape" ? row.name : ""),
    part("result__kind", KINDS[row.kind]),
    part("result__name", row.name),
    part("result__facts", row.note),
  ];
}

export function part(className, text) {
  const span = document.createElement("span");
  if (className) span.className = className;
  span.textContent = text;
  return span;
}
