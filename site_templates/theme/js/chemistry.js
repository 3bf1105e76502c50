// How formulas and point groups are set, made of nodes: text from an entry never becomes markup.

const MINUS = "\u2212";

/** A formula with its numbers below the line and its charge above. */
export function formulaNode(formula, charge) {
  const node = document.createElement("span");
  node.className = "formula";
  for (const [piece, digits] of formula.matchAll(/(\d+)|[^\d]+/g)) {
    if (digits) node.append(raised("sub", piece));
    else node.append(piece);
  }
  if (charge) node.append(raised("sup", chargeText(charge)));
  return node;
}

/** A point group with its letters in place: `Dinfh` as D with ∞h below. */
export function groupNode(group) {
  const node = document.createElement("span");
  node.className = "pg";
  const letter = document.createElement("i");
  letter.textContent = group.slice(0, 1);
  const below = group.slice(1).replace("inf", "∞");
  node.append(letter, ...(below ? [raised("sub", below)] : []));
  return node;
}

/** `sp3d2` with its numbers above the line. */
export function hybridNode(label) {
  const node = document.createElement("span");
  for (const [piece, digits] of label.matchAll(/(\d+)|[^\d]+/g)) {
    node.append(digits ? raised("sup", piece) : piece);
  }
  return node;
}

/** A formula as plain text, to copy: `SO₄2−` would mislead, so the charge stands apart. */
export function formulaText(formula, charge) {
  return charge ? `${formula} ${chargeText(charge)}` : formula;
}

/** `2−` for -2, `+` for 1. */
export function chargeText(charge) {
  const size = Math.abs(charge);
  return `${size > 1 ? size : ""}${charge > 0 ? "+" : MINUS}`;
}


function raised(tag, text) {
  const node = document.createElement(tag);
  node.textContent = text;
  return node;
}
