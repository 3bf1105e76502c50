// A drawing that can be turned, in place of the still one, which stands wherever no script runs.
import { turningMarks } from "./turn-marks.js";
import { turned } from "./turn-view.js";

const STEP = Math.PI / 18;
const FINE = Math.PI / 180;
const EASE_MS = 140;
const WAYS = {
  ArrowLeft: ["←", "Turn left", -1, 0],
  ArrowRight: ["→", "Turn right", 1, 0],
  ArrowUp: ["↑", "Turn up", 0, 1],
  ArrowDown: ["↓", "Turn down", 0, -1],
};

export function turnDrawing(figure) {
  const holder = figure?.querySelector("script[data-turn]");
  if (!holder) return;
  const still = figure.querySelector("svg");
  const tools = element("div", "turn");
  const start = element("button", "turn__start", "Turn");
  start.setAttribute("aria-pressed", "false");
  tools.append(start);
  figure.append(tools);
  let turning = null;
  const show = (on) => {
    turning ??= picture(JSON.parse(holder.textContent), still, tools);
    still.toggleAttribute("data-away", on);
    turning.svg.toggleAttribute("data-away", !on);
    turning.keys.hidden = !on;
    start.setAttribute("aria-pressed", String(on));
  };
  start.addEventListener("click", () => {
    show(start.getAttribute("aria-pressed") === "false");
    if (start.getAttribute("aria-pressed") === "true") turning.svg.focus({ preventScroll: true });
  });
  figure.addEventListener("keydown", (event) => {
    if (event.key !== "Escape" || start.getAttribute("aria-pressed") === "false") return;
    show(false);
    start.focus();
  });
}

function picture(data, still, tools) {
  const svg = document.createElementNS("http://www.w3.org/2000/svg", "svg");
  const marks = turningMarks(data);
  svg.append(marks.layer);
  name(svg, still, data.size);
  const state = { view: data.view, first: data.view, set: marks.set };
  marks.set(state.view);
  still.after(svg);
  const keys = buttons(state);
  tools.append(keys);
  svg.addEventListener("keydown", (event) => byKey(event, state));
  byPointer(svg, state);
  return { svg, keys };
}

function name(svg, still, [width, height]) {
  const title = still.querySelector("title").textContent;
  const attributes = {
    viewBox: `0 0 ${width} ${height}`,
    class: "fig fig-turn",
    role: "application",
    tabindex: "0",
    "aria-label": `${title}, to be turned`,
    "aria-roledescription": "drawing",
    "aria-describedby": still.querySelector("desc").id,
    "aria-keyshortcuts": `${Object.keys(WAYS).join(" ")} Home Escape`,
    "font-family": still.getAttribute("font-family"),
  };
  for (const [key, value] of Object.entries(attributes)) svg.setAttribute(key, value);
}

function buttons(state) {
  const group = element("div", "turn__keys");
  group.setAttribute("role", "group");
  group.setAttribute("aria-label", "Turn the drawing");
  for (const [sign, label, right, up] of Object.values(WAYS)) {
    const button = element("button", "", sign);
    button.setAttribute("aria-label", label);
    button.addEventListener("click", () => ease(state, right * STEP, up * STEP));
    group.append(button);
  }
  const reset = element("button", "", "Reset");
  reset.addEventListener("click", () => restore(state));
  group.append(reset);
  return group;
}

function byKey(event, state) {
  if (event.ctrlKey || event.altKey || event.metaKey) return;
  const way = WAYS[event.key];
  if (!way && event.key !== "Home") return;
  event.preventDefault();
  if (!way) restore(state);
  else if (event.shiftKey) turn(state, way[2] * FINE, way[3] * FINE);
  else ease(state, way[2] * STEP, way[3] * STEP);
}

function byPointer(svg, state) {
  let last = null;
  svg.addEventListener("pointerdown", (event) => {
    if (event.button || !event.isPrimary) return;
    svg.setPointerCapture(event.pointerId);
    last = [event.clientX, event.clientY];
  });
  svg.addEventListener("pointermove", (event) => {
    if (!last || !event.isPrimary) return;
    const radius = Math.min(svg.clientWidth, svg.clientHeight) / 2;
    turn(state, (event.clientX - last[0]) / radius, (last[1] - event.clientY) / radius);
    last = [event.clientX, event.clientY];
  });
  for (const end of ["pointerup", "pointercancel"]) {
    svg.addEventListener(end, () => {
      last = null;
    });
  }
}

function turn(state, right, up) {
  state.view = turned(state.view, right, up);
  state.set(state.view);
}

function restore(state) {
  state.view = state.first;
  state.set(state.view);
}

function ease(state, right, up) {
  if (matchMedia("(prefers-reduced-motion: reduce)").matches) {
    turn(state, right, up);
    return;
  }
  let [begun, done] = [null, 0];
  const frame = (now) => {
    begun ??= now;
    const share = Math.min(1, (now - begun) / EASE_MS);
    turn(state, right * (share - done), up * (share - done));
    done = share;
    if (share < 1) requestAnimationFrame(frame);
  };
  requestAnimationFrame(frame);
}

function element(tag, className, text = "") {
  const made = document.createElement(tag);
  made.className = className;
  made.textContent = text;
  if (tag === "button") made.type = "button";
  return made;
}
