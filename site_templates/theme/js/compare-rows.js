// Rows of several compounds lined up by their keys, and whether they differ.

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

/** Words differ where they are not the same; numbers where they are further apart than ± allows. */
export function differs(cells) {
  const [first, ...others] = cells;
  return others.some((cell) => unlike(first, cell)) || others.some((a, at) => others.slice(at + 1).some((b) => unlike(a, b)));
}

function unlike(left, right) {
  if (left.length !== right.length) return true;
  return left.some((row, at) => rowsDiffer(row, right[at]));
}

function rowsDiffer(a, b) {
  if (a.value === null || b.value === null) return a.text !== b.text;
  return Math.abs(a.value - b.value) > Math.hypot(a.uncertainty ?? 0, b.uncertainty ?? 0);
}
