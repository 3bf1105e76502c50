// One line of an answer, made of nodes: text from an entry never becomes markup.

/** The parts of a result: formula or count, name, shape, angle and polarity. */
export function resultParts(row) {
  if (row.kind === "shape") {
    const count = row.count === 1 ? "1 compound" : `${row.count} compounds`;
    return [part("result__formula", "shape"), part("result__name", row.name), part("result__facts", count)];
  }
  const facts = [row.shape, row.angle, row.polarity].filter(Boolean).join(" · ");
  return [
    part("result__formula", row.formula),
    part("result__name", row.name),
    part("result__facts", facts),
  ];
}

export function part(className, text) {
  const span = document.createElement("span");
  span.className = className;
  span.textContent = text;
  return span;
}
