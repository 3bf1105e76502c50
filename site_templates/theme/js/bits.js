// Sets of compounds as bits, so that counts beside every choice cost next to nothing.

/** An empty set among `size` compounds. */
export function none(size) {
  return new Uint32Array(Math.ceil(size / 32));
}

/** Every one of `size` compounds. */
export function all(size) {
  const set = none(size).fill(0xffffffff);
  if (size % 32) set[set.length - 1] = (1 << size % 32) - 1;
  return set;
}

export function put(set, at) {
  set[at >> 5] |= 1 << (at & 31);
}

export function has(set, at) {
  return (set[at >> 5] >>> (at & 31)) & 1;
}

/** What is in every one of the sets. */
export function common(sets) {
  const [first, ...others] = sets;
  const result = first.slice();
  for (const other of others) for (let i = 0; i < result.length; i += 1) result[i] &= other[i];
  return result;
}

/** What is in any of the sets. */
export function either(sets, size) {
  const result = none(size);
  for (const other of sets) for (let i = 0; i < result.length; i += 1) result[i] |= other[i];
  return result;
}

/** How many the two sets have in common. */
export function shared(a, b) {
  let count = 0;
  for (let i = 0; i < a.length; i += 1) count += ones(a[i] & b[i]);
  return count;
}

export function size(set) {
  return shared(set, set);
}

function ones(word) {
  let n = word - ((word >>> 1) & 0x55555555);
  n = (n & 0x33333333) + ((n >>> 2) & 0x33333333);
  return Math.imul((n + (n >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
}
