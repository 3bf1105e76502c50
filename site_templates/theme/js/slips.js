// Names with slips of the pen: asked only where nothing answers as it is written.

const BEST = 100;
const A_SLIP = 12;
const A_WORD_LEFT = 1;

/** Gives items whose words, or whose name written as one word, are within a slip or two. */
export function misspelt(index, { words, close }, give) {
  if (close.length < 4) return;
  byWords(index, words, give);
  byWhole(index, close, give);
}

/** What misspelt names are held against: the letters of every word, and names without spaces. */
export function slipsOf({ vocabulary, names }) {
  const wholes = names.plain.slice(1, -1).split("\n");
  return { masks: masksOf(vocabulary.list), wholes, wholeMasks: masksOf(wholes) };
}

function slipsFor(word) {
  if (word.length < 4) return 0;
  return word.length < 8 ? 1 : 2;
}

/** Every query word must be like a word of the same line; the fewer slips the better. */
function byWords({ vocabulary, names, slips: { masks } }, words, give) {
  const { list, from, lines, sizes } = vocabulary;
  let open = null;
  for (const word of words) {
    const best = new Map();
    eachLike(word, list, masks, (n, slips) => {
      for (let at = from[n]; at < from[n + 1]; at += 1) {
        const line = lines[at];
        if (open && !open.has(line)) continue;
        const sum = slips + (open ? open.get(line) : 0);
        if (sum < (best.get(line) ?? Infinity)) best.set(line, sum);
      }
    });
    open = best;
  }
  for (const [line, slips] of open ?? []) give(names.items[line], scoreOf(slips, sizes[line] - words.length));
}

/** The query without its spaces against names without theirs, for words run together or parted. */
function byWhole({ names, slips: { wholes, wholeMasks } }, close, give) {
  eachLike(close, wholes, wholeMasks, (line, slips) => {
    give(names.items[line], scoreOf(slips, Math.max(0, wholes[line].length - close.length)));
  });
}

/** Calls `visit(n, slips)` for each text of a list that begins like `typed`, a slip or two aside. */
function eachLike(typed, list, masks, visit) {
  const limit = slipsFor(typed);
  const mask = maskOf(typed);
  for (let n = 0; n < list.length; n += 1) {
    if (list[n].length < typed.length - limit || bits(mask & ~masks[n]) > limit) continue;
    const slips = distance(typed, list[n], limit);
    if (slips <= limit) visit(n, slips);
  }
}

function scoreOf(slips, left) {
  return Math.max(1, BEST - A_SLIP * slips - A_WORD_LEFT * Math.min(left, 8));
}

function masksOf(texts) {
  return Int32Array.from(texts, maskOf);
}

/** One bit a letter, digits sharing six, so that hopeless words are passed over quickly. */
function maskOf(word) {
  let mask = 0;
  for (let at = 0; at < word.length; at += 1) {
    const code = word.charCodeAt(at);
    mask |= 1 << (code >= 97 ? code - 97 : 26 + (code % 6));
  }
  return mask;
}

function bits(mask) {
  let count = 0;
  for (let rest = mask; rest; rest &= rest - 1) count += 1;
  return count;
}

const ROWS = [new Uint8Array(256), new Uint8Array(256), new Uint8Array(256)];
const LONGEST = 250;

/**
 * Insertions, deletions, changes and swaps of neighbours between two texts, the longer one's end
 * left out; gives up above `limit`. Only places within `limit` of each other are compared.
 */
export function distance(typed, held, limit) {
  const length = Math.min(typed.length, LONGEST);
  const width = Math.min(held.length, length + limit);
  let [before, previous, row] = ROWS;
  for (let j = 0; j <= Math.min(width, limit); j += 1) previous[j] = j;
  for (let i = 1; i <= length; i += 1) {
    const from = Math.max(1, i - limit);
    const to = Math.min(width, i + limit);
    if (from > to) return limit + 1;
    row[from - 1] = from === 1 ? i : limit + 1;
    let least = row[from - 1];
    for (let j = from; j <= to; j += 1) {
      const same = typed.charCodeAt(i - 1) === held.charCodeAt(j - 1);
      let best = previous[j - 1] + (same ? 0 : 1);
      if (j < i + limit && previous[j] + 1 < best) best = previous[j] + 1;
      if (row[j - 1] + 1 < best) best = row[j - 1] + 1;
      if (!same && swapped(typed, held, i, j) && before[j - 2] + 1 < best) best = before[j - 2] + 1;
      row[j] = best;
      if (best < least) least = best;
    }
    if (least > limit) return limit + 1;
    [before, previous, row] = [previous, row, before];
  }
  return leastOf(previous, Math.max(0, length - limit), width, limit);
}

function swapped(typed, held, i, j) {
  return (
    i > 1 && j > 1 && typed.charCodeAt(i - 1) === held.charCodeAt(j - 2) && typed.charCodeAt(i - 2) === held.charCodeAt(j - 1)
  );
}

function leastOf(row, from, to, limit) {
  let least = limit + 1;
  for (let j = from; j <= to; j += 1) if (row[j] < least) least = row[j];
  return least;
}
