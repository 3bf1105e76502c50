import { linkButtons } from "./copy-link.js";
import { switchFace } from "./face-switch.js";
import { findField } from "./field.js";
import { lookupPage } from "./lookup.js";

switchFace(document.querySelector("[data-face-switch]"));
findField(document.querySelector("form.find"));
linkButtons(document.querySelector("article.compound"));
lookupPage(document.querySelector("[data-lookup]"));
