// The marks of the bench view, without wedges: what is near is drawn heavier, and a nearer bond
// leaves a gap in what it crosses.
import { projected } from "./turn-view.js";

const NAMESPACE = "http://www.w3.org/2000/svg";
const [LINE, RING, LOBE_EDGE, DOT] = [3, 2.6, 1.2, 2.7];
const WEIGHT = 3; // power of the perspective growth by which lines gain weight
const GAP = 3.4;
const RIM = 6;
const OFFSETS = { 1: [0], 2: [-1, 1], 3: [-1.9, 0, 1.9] };
const WHOLE = 0.2;
const SYMBOL = { share: 0.78, largest: 26, room: 1.6, letter: 0.62 }; // shares of the radius, px, em

export function turningMarks(data) {
  // Elements for every atom, bond and lobe, and the function that sets them for a view.
  const layer = made("g");
  const items = [
    ...data.bonds.map((bond) => bondItem(bond)),
    ...data.lobes.map((lobe) => lobeItem(lobe, data)),
    ...data.atoms.map((atom, index) => atomItem(atom, index)),
  ];
  layer.append(...items.map((item) => item.group));
  return { layer, set: (view) => setAll(items, layer, stage(data, view)) };
}

function setAll(items, layer, scene) {
  for (const item of items) item.depth = item.set(scene);
  const order = [...items].sort((one, other) => one.depth - other.depth);
  order.forEach((item, place) => {
    if (layer.children[place] !== item.group) layer.insertBefore(item.group, layer.children[place]);
  });
}

function stage(data, view) {
  const place = (point) => {
    const [x, y, z, growth] = projected(point, view, data.eye);
    return {
      x: data.size[0] / 2 + x * data.scale,
      y: data.size[1] / 2 - y * data.scale,
      z,
      growth,
    };
  };
  const atoms = data.atoms.map(([, point, radius]) => {
    const at = place(point);
    return { ...at, r: radius * data.scale * at.growth };
  });
  return { atoms, place, scale: data.scale };
}

function atomItem([letters, , , colour], index) {
  const group = made("g");
  const ring = made("circle", { fill: paint("paper"), stroke: paint(colour) });
  const text = made("text", { fill: paint("ink"), "text-anchor": "middle", "font-weight": 700 });
  text.textContent = letters;
  if (letters) group.append(ring, text);
  return {
    group,
    set({ atoms }) {
      const { x, y, z, r, growth } = atoms[index];
      const share = Math.min(SYMBOL.share, SYMBOL.room / (SYMBOL.letter * letters.length));
      const size = Math.min(SYMBOL.largest * growth, r * share);
      set(ring, { cx: x, cy: y, r, "stroke-width": weight(RING, growth) });
      set(text, { x, y: y + 0.36 * size, "font-size": size });
      return z;
    },
  };
}

function bondItem([begin, end, order, dative, ring]) {
  const group = made("g");
  const rim = made("path", { fill: "none", stroke: paint("paper") });
  const solid = made("path", { fill: paint("ink") });
  const broken = made("path", { fill: "none", stroke: paint("ink"), "stroke-dasharray": "5 4" });
  group.append(rim, solid, broken);
  return {
    group,
    set({ atoms }) {
      const [one, other] = [atoms[begin], atoms[end]];
      const depth = (one.z + other.z) / 2;
      const segment = visible(one, other);
      group.style.display = segment ? "" : "none";
      if (!segment) return depth;
      const rimWidth = (segment.from.w + segment.to.w) / 2 + RIM;
      set(rim, { d: path([along(segment, 0.14), along(segment, 0.86)]), "stroke-width": rimWidth });
      const inside = ring.length ? middle(ring.map((atom) => atoms[atom])) : null;
      drawLines(segment, order, dative, inside, solid, broken);
      return depth;
    },
  };
}

function visible(one, other) {
  const [dx, dy] = [other.x - one.x, other.y - one.y];
  const length = Math.hypot(dx, dy);
  const [start, stop] = [one.r && one.r + 1, other.r && other.r + 1];
  if (length <= start + stop + 1) return null;
  const [ux, uy] = [dx / length, dy / length];
  const end = (at, way, gone) => ({
    x: at.x + way * ux * gone,
    y: at.y + way * uy * gone,
    w: weight(LINE, at.growth),
  });
  return { from: end(one, 1, start), to: end(other, -1, stop), nx: -uy, ny: ux, length };
}

function drawLines(segment, order, dative, inside, solid, broken) {
  const lines = dative ? [[0, 0.8, 0]] : linesOf(segment, order, inside);
  const shared = !dative && Math.abs(order - Math.round(order)) > WHOLE;
  const dashed = shared ? lines.pop() : null;
  const shaft = dative ? shortened(segment, 0, 8 / Math.max(16, segment.length)) : segment;
  const drawn = lines.map(([offset, thin, gone]) => taper(shortened(shaft, gone, gone), offset, thin));
  set(solid, { d: drawn.join("") + (dative ? arrowhead(segment) : "") });
  set(broken, dashed ? dashes(segment, dashed) : { d: "" });
}

function linesOf(segment, order, inside) {
  // [offset in pixels, share of the full weight, share left off at each end]
  const whole = Math.abs(order - Math.round(order)) <= WHOLE ? Math.round(order) : Math.ceil(order);
  if (whole === 2 && inside) {
    const { x, y } = along(segment, 0.5);
    const side = Math.sign((inside.x - x) * segment.nx + (inside.y - y) * segment.ny) || 1;
    return [[0, 1, 0], [2 * GAP * side, 0.8, 0.13]];
  }
  const offsets = OFFSETS[Math.max(1, Math.min(3, whole))];
  return offsets.map((offset) => [offset * GAP, offsets.length > 1 ? 0.8 : 1, 0]);
}

function dashes(segment, [offset, thin, gone]) {
  const { from, to } = shortened(segment, gone, gone);
  return {
    d: path([beside(segment, from, offset), beside(segment, to, offset)]),
    "stroke-width": ((from.w + to.w) / 2) * thin,
  };
}

function shortened(segment, start, stop) {
  return { ...segment, from: along(segment, start), to: along(segment, 1 - stop) };
}

function taper(segment, offset, share) {
  const { from, to } = segment;
  const [f, t] = [(from.w * share) / 2, (to.w * share) / 2];
  const corners = [[from, offset + f], [to, offset + t], [to, offset - t], [from, offset - f]];
  return `${path(corners.map(([at, side]) => beside(segment, at, side)))}Z`;
}

function arrowhead(segment) {
  const back = along(segment, 1 - 13 / Math.max(16, segment.length));
  const half = 2.2 * (segment.to.w / LINE);
  return `${path([segment.to, beside(segment, back, half), beside(segment, back, -half)])}Z`;
}

function lobeItem([atom, point, electrons], data) {
  const group = made("g");
  const outline = made("path", { fill: paint("lobe"), stroke: paint("line") });
  const dots = Array.from({ length: electrons }, () => made("circle", { fill: paint("ink") }));
  group.append(outline, ...dots);
  return {
    group,
    set({ atoms, place, scale }) {
      const [host, end] = [atoms[atom], place(point)];
      const apex = rim(data.atoms[atom], point, place);
      const r = data.lobe * scale * end.growth;
      const heading = Math.atan2(end.y - host.y, end.x - host.x);
      const near = end.z > host.z;
      // A lobe that points at the viewer is glass: the symbol behind it can still be read.
      set(outline, {
        d: lobePath(near ? apex : host, end, r, heading),
        "stroke-width": weight(LOBE_EDGE, end.growth),
        "fill-opacity": near ? 0.55 : 1,
      });
      dots.forEach((dot, index) => {
        const aside = electrons === 1 ? 0 : (2 * index - 1) * r * 0.34;
        const [cx, cy] = [end.x - aside * Math.sin(heading), end.y + aside * Math.cos(heading)];
        set(dot, { cx, cy, r: DOT * end.growth });
      });
      return near && Math.hypot(end.x - host.x, end.y - host.y) < host.r + r
        ? end.z
        : Math.min(end.z, host.z - 0.01);
    },
  };
}

function lobePath(apex, end, r, heading) {
  const distance = Math.hypot(end.x - apex.x, end.y - apex.y);
  const on = (angle) => `${round(end.x + r * Math.cos(angle))} ${round(end.y + r * Math.sin(angle))}`;
  if (distance <= 1.05 * r) {
    return `M${on(0)}A${round(r)} ${round(r)} 0 1 1 ${on(Math.PI)}A${round(r)} ${round(r)} 0 1 1 ${on(0)}Z`;
  }
  const half = Math.acos(r / distance);
  const [one, other] = [heading + Math.PI + half, heading + Math.PI - half];
  return `M${round(apex.x)} ${round(apex.y)}L${on(one)}A${round(r)} ${round(r)} 0 1 1 ${on(other)}Z`;
}

function rim([, centre, radius], point, place) {
  // Where a lobe leaves the ball of its atom.
  const away = point.map((number, k) => number - centre[k]);
  const share = radius / Math.hypot(...away);
  return place(centre.map((number, k) => number + share * away[k]));
}

function middle(places) {
  const mean = (name) => places.reduce((sum, at) => sum + at[name], 0) / places.length;
  return { x: mean("x"), y: mean("y") };
}

function along({ from, to }, share) {
  return {
    x: from.x + share * (to.x - from.x),
    y: from.y + share * (to.y - from.y),
    w: from.w + share * (to.w - from.w),
  };
}

function beside({ nx, ny }, at, side) {
  return { x: at.x + nx * side, y: at.y + ny * side };
}

function path(points) {
  return `M${points.map(({ x, y }) => `${round(x)} ${round(y)}`).join("L")}`;
}

function weight(width, growth) {
  return width * growth ** WEIGHT;
}

function paint(name) {
  return `var(--fig-${name})`;
}

function made(name, fields = {}) {
  const element = document.createElementNS(NAMESPACE, name);
  set(element, fields);
  return element;
}

function set(element, fields) {
  for (const [name, value] of Object.entries(fields)) {
    element.setAttribute(name, typeof value === "number" ? round(value) : value);
  }
}

function round(number) {
  return Math.round(number * 100) / 100;
}
