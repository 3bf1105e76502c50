// The words of many lines in alphabetical order, and which lines each is in.

/**
 * `{ list, from, lines, sizes }` of a text, line by line: word `n` of the list is in the lines
 * `lines[from[n]]` up to `lines[from[n + 1]]`; `sizes` are the numbers of words of the lines.
 */
export function wordsIn(text) {
  const numbers = new Map();
  const said = [];
  const sizes = text.split("\n").map((line) => {
    const words = line.split(" ");
    for (const word of words) said.push(numberOf(word, numbers));
    return words.length;
  });
  const list = [...numbers.keys()].sort();
  const ranks = new Uint32Array(list.length);
  list.forEach((word, rank) => {
    ranks[numbers.get(word)] = rank;
  });
  return { list, ...sortedOut(said.map((number) => ranks[number]), sizes, list.length), sizes };
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

/** Calls `visit(line)` for every line with a word that begins so, once each time it is there. */
export function eachLineWith({ list, from, lines }, start, visit) {
  const [first, last] = beginning(list, start);
  for (let at = from[first]; at < from[last]; at += 1) visit(lines[at]);
}

/** Where the texts that begin so stand in a sorted list: the first, and the one after the last. */
export function beginning(list, start) {
  return [firstNotBefore(list, start), firstNotBefore(list, `${start}\uffff`)];
}

function firstNotBefore(list, text) {
  let low = 0;
  let high = list.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (list[middle] < text) low = middle + 1;
    else high = middle;
  }
  return low;
}
