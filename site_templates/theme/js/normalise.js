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
  [/'/g, ""],
];

/** Lower case, no accents, Greek letters spelled out, one spelling of what has several. */
export function folded(text) {
  const plain = text.replace(OUTSIDE_ASCII, foldLetters).toLowerCase();
  return SPELLINGS.reduce((spelled, [from, to]) => spelled.replace(from, to), plain);
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

/** The digits of a CAS number, with or without its hyphens; empty where it cannot be one. */
export function casDigits(text) {
  const plain = plainDigits(text.trim()).replace(/^cas\s*(no\.?|number)?\s*:?\s*/i, "");
  if (!/^\d[\d-]*$/.test(plain)) return "";
  const digits = plain.replace(/-/g, "");
  return digits.length >= 4 && digits.length <= 10 ? digits : "";
}
