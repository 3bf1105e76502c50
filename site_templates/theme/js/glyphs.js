// The small drawings of shapes, each one picture however many rows show it.

const pictures = new Map();

/** Lay the drawings by; `glyphs` is our own markup from the index, by the name of the shape. */
export function showGlyphs(glyphs) {
  if (pictures.size) return;
  for (const [shape, markup] of Object.entries(glyphs)) {
    pictures.set(shape, `data:image/svg+xml,${encodeURIComponent(markup)}`);
  }
}

/** The drawing of a shape, or an empty place of the same size; the name stands beside it. */
export function glyph(shape) {
  const picture = pictures.get(shape);
  const node = document.createElement(picture ? "img" : "span");
  node.className = "glyph";
  if (picture) {
    node.alt = "";
    node.width = 26;
    node.height = 26;
    node.src = picture;
  }
  return node;
}
