// Rows of several compounds lined up by their keys, and whether they differ.

/** The terms of the glossary that rows are called by, by their keys. */
export const ROW_TERMS = {
  shape: "shape", neighbours: "neighbours", pairs: "lone-pair", notation: "axe-notation",
  hybrid: "hybridisation", group: "point-group", polarity: "polar", dipole: "dipole-moment",
  stretches: "infrared-active", infrared: "infrared-active", raman: "raman-active", cautions: "caution",
};

/** `[[group, [{ key, label, cells }]]]`; a cell holds the rows of one compound with that key. */
export function linedUp(compounds) {
  const groups = new Map();
  compounds.forEach(({ rows }, at) => {
    for (const row of rows) {
      if (!groups.has(row.group)) groups.set(row.group, new Map());
      const lines = groups.get(row.group);
      if (!lines.has(row.key)) {
        lines.set(row.key, { key: row.key, label: row.label, cells: compounds.map(() => []) });
      }
      lines.get(row.key).cells[at].push(row);
    }
  });
  return [...groups].map(([group, lines]) => [group, [...lines.values()]]);
}

/**
 * Whether any two of the cells that hold something differ: words where they are not the same,
 * numbers where they are further apart than their ± allow.
 */
export function differs(cells) {
  const held = cells.filter((rows) => rows.length);
  return held.some((left, at) => held.slice(at + 1).some((right) => unlike(left, right)));
}

function unlike(left, right) {
  return left.length !== right.length || left.some((row, at) => rowsDiffer(row, right[at]));
}

function rowsDiffer(a, b) {
  if (a.value === null || b.value === null) return a.text !== b.text;
  return Math.abs(a.value - b.value) > Math.hypot(a.uncertainty ?? 0, b.uncertainty ?? 0);
}
