// The one question the page asks: what becomes of edits that no file holds yet.

import {make} from "./dom.js";

/** @returns {Promise<"save" | "leave" | "stay">} */
export function askToLeave() {
  const node = make("dialog", "question");
  const words = make("p", "", "This sheet has changes that no file holds yet.");
  words.id = "question-words";
  node.setAttribute("aria-labelledby", words.id);
  const form = make("form");
  form.method = "dialog";
  for (const [value, text] of [["save", "Save first"], ["leave", "Go on without them"], ["stay", "Stay here"]]) {
    const button = make("button", "", text);
    button.value = value;
    form.append(button);
  }
  node.append(words, form);
  document.body.append(node);
  return new Promise((resolve) => {
    node.addEventListener("close", () => {
      node.remove();
      resolve(node.returnValue === "save" || node.returnValue === "leave" ? node.returnValue : "stay");
    });
    node.showModal();
  });
}
