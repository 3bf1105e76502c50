// A value as a link, in the forms a protocol is written in.

export const FORMS = ["Markdown", "HTML", "Text"];

export function linkText(form, { name, of, value, basis, address }) {
  const said = `${name}, ${of}: ${plain(value)} (${basis})`;
  if (form === "Markdown") return `[${said.replace(/[\\[\]*_`<]/g, "\\$&")}](${address})`;
  if (form === "HTML") return `<a href="${markup(address)}">${markup(said)}</a>`;
  return `${said}, ${address}`;
}

function plain(value) {
  return value.replace(/[\s\u00a0\u2009\u202f]+/g, " ").trim();
}

function markup(text) {
  const entities = { "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;" };
  return text.replace(/[&<>"]/g, (character) => entities[character]);
}
