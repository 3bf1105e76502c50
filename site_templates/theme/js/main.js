import { comparePage } from "./compare.js";
import { linkButtons } from "./copy-link.js";
import { switchFace } from "./face-switch.js";
import { findField } from "./field.js";
import { lookupPage } from "./lookup.js";
import { explainTerms } from "./terms.js";
import { turnDrawing } from "./turn.js";

switchFace(document.querySelector("[data-face-switch]"));
findField(document.querySelector("form.find"));
linkButtons(document.querySelector("article.compound"));
turnDrawing(document.querySelector(".sheet__drawing"));
lookupPage(document.querySelector("[data-lookup]"));
comparePage(document.querySelector("[data-compare]"));
explainTerms(`${document.querySelector("form.find").dataset.root.replace(/\/$/, "")}/`);
