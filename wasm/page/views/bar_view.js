// The bar above the sheet: the sheet's file and the commands that belong to it.

import {make} from "./dom.js";

/** @typedef {import("./palette.js").Action} Action */

export class BarView {
  /**
   * @param {HTMLElement} node
   * @param {Action[]} actions  those that get a button
   */
  constructor(node, actions) {
    this.file = make("span", "file");
    this.state = make("span", "state");
    this.buttons = actions.map((action) => {
      const button = make("button", "", action.text);
      button.type = "button";
      button.dataset.action = action.id;
      if (action.key) {
        button.title = action.key;
        if (action.id === "commands") button.append(make("kbd", "", action.key));
        button.setAttribute("aria-keyshortcuts", action.key.replace("Ctrl", "Control"));
      }
      button.addEventListener("click", action.run);
      return button;
    });
    node.append(make("strong", "name", "Heatledger"), this.file, this.state, make("span", "gap"), ...this.buttons);
  }

  /** @param {import("../store.js").View} view */
  show(view) {
    this.file.textContent = view.file.name || "no file yet";
    this.state.textContent = view.changed ? "changes not saved" : view.file.savedAt ? `saved ${view.file.savedAt}` : "";
  }
}
