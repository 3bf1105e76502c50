// How what is typed and what is stored are brought to one spelling.

const GREEK = {
  α: "alpha", β: "beta", γ: "gamma", δ: "delta", ε: "epsilon", ζ: "zeta", η: "eta", θ: "theta",
  κ: "kappa", λ: "lambda", μ: "mu", µ: "mu", ν: "nu", ξ: "xi", π: "pi", ρ: "rho", σ: "sigma",
  τ: "tau", φ: "phi", χ: "chi", ψ: "psi", ω: "omega",
};

const ASCII = /^[\0-\x7f]*$/;
const OUTSIDE_ASCII = /[^\0-\x7f]+/g;

const SPELLINGS = [
  [/sulph/g, "sulf"],
  [/aluminum/g, "aluminium"],
  [/cesium/g, "caesium"],
  [/oxid\b/g, "oxide"],
  [/fluorid\b/g, "fluoride"],
  [/chlorid\b/g, "chloride"],
];

/** Names: lower case, no accents, Greek letters spelled out, one spelling, words apart. */
export function foldName(text) {
  return foldLines(text.replace(/\n/g, " ")).trim();
}

/** Many names at once, one a line: the same as each folded alone, but for its outer spaces. */
export function foldLines(text) {
  let folded = text.replace(OUTSIDE_ASCII, foldLetters).toLowerCase();
  for (const [from, to] of SPELLINGS) folded = folded.replace(from, to);
  return folded.replace(/'/g, "").replace(/[^a-z0-9\n]+/g, " ");
}

/** Letters beyond ASCII in plain ones; most text has none and is spared this. */
function foldLetters(letters) {
  const spelled = letters.toLowerCase().replace(/[α-ωµ]/gu, (letter) => GREEK[letter] ?? letter);
  return plainDigits(spelled).normalize("NFKD").replace(/[\p{M}\u2019\u2032]/gu, "");
}

/** Digits above or below the line become plain ones, every dash and minus a hyphen. */
export function plainDigits(text) {
  if (ASCII.test(text)) return text;
  return text
    .normalize("NFKC")
    .replace(/[\u2010-\u2015\u2212]/g, "-")
    .replace(/∞/g, "inf");
}

/** Codes and identifiers: letters and digits alone. */
export function foldCode(text) {
  return plainDigits(text).toLowerCase().replace(/[^a-z0-9]/g, "");
}

/** The digits of a CAS number, with or without its hyphens; empty where it cannot be one. */
export function casDigits(text) {
  const plain = plainDigits(text.trim()).replace(/^cas\s*(no\.?|number)?\s*:?\s*/i, "");
  if (!/^\d[\d-]*$/.test(plain)) return "";
  const digits = plain.replace(/-/g, "");
  return digits.length >= 4 && digits.length <= 10 ? digits : "";
}
