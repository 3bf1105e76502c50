// The small drawings of shapes: put into the page once, shown wherever a row has one.

const SPRITE = "shape-glyphs";

/** Lay the drawings by; `glyphs` is our own markup from the index, by the name of the shape. */
export function showGlyphs(glyphs) {
  if (document.getElementById(SPRITE)) return;
  const holder = document.createElement("div");
  holder.id = SPRITE;
  holder.hidden = true;
  for (const [shape, markup] of Object.entries(glyphs)) {
    const drawn = document.createElement("div");
    drawn.innerHTML = markup;
    const svg = drawn.firstElementChild;
    const group = document.createElementNS(svg.namespaceURI, "symbol");
    group.id = glyphId(shape);
    group.setAttribute("viewBox", svg.getAttribute("viewBox"));
    group.append(...svg.childNodes);
    svg.removeAttribute("class");
    svg.replaceChildren(group);
    holder.append(svg);
  }
  document.body.append(holder);
}

/** The drawing of a shape, or an empty place of the same size. */
export function glyph(shape) {
  const svg = document.createElementNS("http://www.w3.org/2000/svg", "svg");
  svg.setAttribute("class", "glyph");
  svg.setAttribute("aria-hidden", "true");
  if (shape && document.getElementById(glyphId(shape))) {
    const use = document.createElementNS(svg.namespaceURI, "use");
    use.setAttribute("href", `#${glyphId(shape)}`);
    svg.append(use);
  }
  return svg;
}

function glyphId(shape) {
  return `glyph-${shape.toLowerCase().replace(/[^a-z0-9]+/g, "-")}`;
}
