// Beside each value a button that copies a link to it.
import { FORMS, linkText } from "./link-text.js";

export function linkButtons(article) {
  if (!article) return;
  const status = element("p", { className: "unseen" });
  status.setAttribute("role", "status");
  article.append(status);
  for (const holder of article.querySelectorAll("[data-value]")) {
    const place = holder.querySelector("th") ?? holder;
    place.append(" ", menu(holder, article, status));
  }
  document.addEventListener("click", (event) => closeOthers(article, event.target));
  article.addEventListener("keydown", closeOnEscape);
}

function menu(holder, article, status) {
  const details = element("details", { className: "copy" });
  const summary = element("summary", { textContent: "link" });
  summary.setAttribute("aria-label", `Link to ${holder.dataset.of}`);
  const forms = element("span", { className: "copy__forms" });
  for (const form of FORMS) {
    const button = element("button", { type: "button", textContent: form });
    button.addEventListener("click", async () => {
      const done = await copy(linkText(form, facts(holder, article)));
      status.textContent = done ? `${form} link copied` : "The browser does not let a page copy";
      details.open = false;
      summary.focus();
    });
    forms.append(button);
  }
  details.append(summary, forms);
  return details;
}

function facts(holder, article) {
  const { of, value, basis } = holder.dataset;
  const address = new URL(article.dataset.address ?? location.href);
  address.search = "";
  address.hash = holder.id;
  return { name: article.dataset.name, of, value, basis, address: address.href };
}

async function copy(text) {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return copyBySelecting(text); // a page served without TLS has no clipboard of its own
  }
}

function copyBySelecting(text) {
  const field = element("textarea", { value: text, readOnly: true, className: "unseen" });
  document.body.append(field);
  field.select();
  const done = document.execCommand("copy");
  field.remove();
  return done;
}

function closeOthers(article, target) {
  for (const open of article.querySelectorAll("details.copy[open]")) {
    if (!open.contains(target)) open.open = false;
  }
}

function closeOnEscape(event) {
  const open = event.key === "Escape" && event.target.closest("details.copy[open]");
  if (open) {
    open.open = false;
    open.querySelector("summary").focus();
  }
}

function element(name, fields) {
  const made = document.createElement(name);
  for (const [field, value] of Object.entries(fields)) made[field] = value;
  return made;
}
