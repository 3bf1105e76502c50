// The words of many lines, each once, and which lines each is in.

import { markedWords, unmarked } from "./lines.js";

/**
 * `{ list, from, lines, sizes }` of a marked text of `linesOf`: word `n` of the list is in the
 * lines `lines[from[n]]` up to `lines[from[n + 1]]`; `sizes` are the numbers of words of the lines.
 */
export function wordsIn(marked) {
  const numbers = new Map();
  const said = [];
  const sizes = marked.slice(1, -1).split("\n").map((line) => {
    const words = markedWords(line);
    for (const word of words) said.push(numberOf(word, numbers));
    return words.length;
  });
  return { list: [...numbers.keys()].map(unmarked), ...sortedOut(said, sizes, numbers.size), sizes };
}

function numberOf(word, numbers) {
  const number = numbers.get(word);
  if (number === undefined) numbers.set(word, numbers.size);
  return number ?? numbers.size - 1;
}

/** Lines word by word, from words line by line. */
function sortedOut(words, sizes, count) {
  const from = new Uint32Array(count + 1);
  for (const word of words) from[word + 1] += 1;
  for (let word = 0; word < count; word += 1) from[word + 1] += from[word];
  const next = from.slice();
  const lines = new Uint32Array(words.length);
  let at = 0;
  sizes.forEach((size, line) => {
    for (const end = at + size; at < end; at += 1) {
      lines[next[words[at]]] = line;
      next[words[at]] += 1;
    }
  });
  return { from, lines };
}
