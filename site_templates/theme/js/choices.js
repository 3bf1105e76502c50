// The filters beside the table: one field set a group, a count beside every choice.

import { groupNode, hybridNode } from "./chemistry.js";
import { GROUPS } from "./facets.js";
import { make } from "./nodes.js";

const OPEN = new Set(["element", "shape"]);
const MODES = { any: "any of", every: "all of" };

/** Fill `form` with the groups; `changed()` is called after every choice. Returns `{ show }`. */
export function choiceForm(form, values, changed) {
  const groups = GROUPS.filter(({ key }) => values[key].length).map((group) => fieldFor(group, values[group.key]));
  form.append(...groups.map(({ fold }) => fold));
  form.addEventListener("change", changed);
  return {
    show: (chosen, counts) => groups.forEach((field) => showField(field, chosen[field.key] ?? [], counts[field.key])),
    read: () => readChoices(groups),
  };
}

function fieldFor(group, values) {
  const lines = values.map((value) => lineFor(group, value));
  const chosen = make("span", { class: "choices__chosen" });
  const set = make(
    "fieldset", { class: "choices__set" },
    make("legend", { class: "unseen" }, `${group.label}, ${MODES[group.mode]}`),
    ...lines.map(({ label }) => label),
  );
  const summary = make("summary", { "data-term": group.term }, group.label, " ", make("small", {}, MODES[group.mode]), chosen);
  const fold = make("details", { class: "choices__fold", "data-group": group.key, open: OPEN.has(group.key) }, summary, set);
  return { key: group.key, fold, lines, chosen };
}

function lineFor(group, value) {
  const box = make("input", { type: "checkbox", name: group.key, value });
  const count = make("span", { class: "choices__count" });
  return { value, box, count, label: make("label", { class: "choice" }, box, make("span", {}, worded(group, value)), count) };
}

function worded({ key }, value) {
  if (key === "group") return groupNode(value);
  return key === "hybrid" ? hybridNode(value) : value;
}

function showField({ lines, chosen, fold }, values, counts) {
  for (const { value, box, count, label } of lines) {
    const number = counts.get(value) ?? 0;
    box.checked = values.includes(value);
    if (count.textContent !== String(number)) count.textContent = String(number);
    label.classList.toggle("choice--none", number === 0 && !box.checked);
  }
  if (chosen.textContent !== values.join(", ")) chosen.textContent = values.join(", ");
  if (values.length) fold.open = true;
}

function readChoices(groups) {
  const chosen = {};
  for (const { key, lines } of groups) {
    const values = lines.filter(({ box }) => box.checked).map(({ value }) => value);
    if (values.length) chosen[key] = values;
  }
  return chosen;
}
