// Whole numbers from the short text that the index keeps them in: leading digits `]` to `y` in
// base 29 without a nought, one last digit `$` to `[` in base 56.

const LAST = 36;
const LEADING = 93;

/** The numbers of a text, in order. */
export function unpacked(text) {
  const numbers = [];
  let leading = 0;
  for (let at = 0; at < text.length; at += 1) {
    const code = text.charCodeAt(at);
    if (code >= LEADING) {
      leading = leading * 29 + code - LEADING + 1;
    } else {
      numbers.push(leading * 56 + code - LAST);
      leading = 0;
    }
  }
  return numbers;
}
