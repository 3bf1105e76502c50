import { switchFace } from "./face-switch.js";
import { findField } from "./field.js";
import { lookupPage } from "./lookup.js";

switchFace(document.querySelector("[data-face-switch]"));
findField(document.querySelector("form.find"));
lookupPage(document.querySelector("[data-lookup]"));
