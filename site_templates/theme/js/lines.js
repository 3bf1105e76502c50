// Many texts, one a line, in letters and digits alone, so that one search runs over all of them.

import { folded } from "./normalise.js";

const LINE_END = 10;
const MARKED_WORD = /[A-Z!-*][a-z0-9]*/g;
const MARKED = /[A-Z!-*]/g;
const LETTER_MARK = 32;
const DIGIT_MARK = 15;

/** The mark of every byte that may begin a word, nought for all others. */
const MARKS = new Uint8Array(256);
MARKS.fill(LETTER_MARK, 97, 123);
MARKS.fill(DIGIT_MARK, 48, 58);

/**
 * `{ plain, marked, starts }` of many texts: both have a line end before and after every line, and
 * line `n` begins at `starts[n]`. In `marked` a word begins with a capital letter, or a sign for
 * its digit: searched for a beginning, there is next to nothing to pass over.
 */
export function linesOf(texts) {
  const lines = texts.map((text) => (text.includes("\n") ? text.replace(/\n/g, " ") : text));
  const bytes = new TextEncoder().encode(`\n${folded(lines.join("\n"))}\n`);
  const marked = new Uint8Array(bytes.length);
  const plain = new Uint8Array(bytes.length);
  const starts = new Uint32Array(lines.length + 1);
  let [line, size, apart] = [0, 0, true];
  for (let at = 0; at < bytes.length; at += 1) {
    const byte = bytes[at];
    const mark = MARKS[byte];
    if (mark || byte === LINE_END) {
      plain[size] = byte;
      marked[size] = apart ? byte - mark : byte;
      size += 1;
      if (!mark) starts[line++] = size;
    }
    apart = !mark;
  }
  const textOf = (letters) => new TextDecoder().decode(letters.subarray(0, size));
  return { plain: textOf(plain), marked: textOf(marked), starts };
}

/** The words of a marked text, marked; none where it is empty. */
export function markedWords(marked) {
  return marked.match(MARKED_WORD) ?? [];
}

/** Marked text without its marks. */
export function unmarked(marked) {
  return marked.replace(MARKED, (sign) => (sign < "A" ? String.fromCharCode(sign.charCodeAt(0) + DIGIT_MARK) : sign.toLowerCase()));
}

/** The words of one text: lower case, Greek letters spelled out, one spelling. */
export function foldedWords(text) {
  return markedWords(linesOf([text]).marked).map(unmarked);
}

export function lengthOf(starts, line) {
  return starts[line + 1] - starts[line] - 1;
}

/**
 * Calls `visit(line, isBeginning)` for every line of `text` that holds `piece`, at its first place;
 * a piece with a line end before it is found at the beginning alone.
 */
export function eachLineWith(text, starts, piece, visit) {
  const shift = piece[0] === "\n" ? 1 : 0;
  let line = 0;
  for (let at = text.indexOf(piece); at >= 0; at = text.indexOf(piece, starts[line + 1] - 1)) {
    line = lineAt(starts, at + shift, line);
    visit(line, at + shift === starts[line]);
  }
}

/** The line that an offset is in; offsets only grow, so the search goes on from `line`. */
function lineAt(starts, at, line) {
  let step = 1;
  let low = line;
  while (low + step < starts.length - 1 && starts[low + step] <= at) {
    low += step;
    step *= 2;
  }
  let high = Math.min(low + step, starts.length - 1);
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (starts[middle] <= at) low = middle;
    else high = middle;
  }
  return low;
}
