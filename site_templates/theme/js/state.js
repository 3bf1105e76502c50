// The whole state of the lookup page as an address, so that a filtered list can be linked to.

import { GROUPS } from "./facets.js";
import { RANGE_KEYS } from "./ranges.js";

/** The state that the part of an address behind `?` stands for. */
export function stateFrom(search) {
  const given = new URLSearchParams(search);
  const chosen = {};
  for (const { key } of GROUPS) {
    const values = given.getAll(key);
    if (values.length) chosen[key] = values;
  }
  const asked = {};
  for (const key of RANGE_KEYS) if (given.get(key)) asked[key] = given.get(key);
  return {
    text: given.get("q") ?? "",
    chosen,
    asked,
    columns: given.get("columns")?.split(",") ?? null,
    sort: given.get("sort") ?? "",
  };
}

/** The part of an address behind `?`; empty for the state in which the page opens. */
export function searchFor({ text, chosen, asked, columns, sort }) {
  const given = new URLSearchParams();
  if (text) given.set("q", text);
  for (const { key } of GROUPS) for (const value of chosen[key] ?? []) given.append(key, value);
  for (const key of RANGE_KEYS) if (asked[key]) given.set(key, asked[key]);
  if (columns) given.set("columns", columns.join(","));
  if (sort) given.set("sort", sort);
  const search = given.toString().replace(/%2C/g, ",");
  return search && `?${search}`;
}

/** Whether anything is asked beside the text. */
export function isFiltered({ chosen, asked }) {
  return Object.values(chosen).some((values) => values.length) || Object.values(asked).some(Boolean);
}
