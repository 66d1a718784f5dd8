// Everything the page can do, by name: Ctrl+K.

import {ChoiceList} from "./choice_list.js";
import {make} from "./dom.js";

/** @typedef {{id: string, text: string, key?: string, enabled?: boolean, run: () => void}} Action */

export class Palette {
  /** @param {() => Action[]} actions  what can be done now */
  constructor(actions) {
    this.actions = actions;
    this.node = make("dialog", "palette");
    this.node.setAttribute("aria-label", "Commands");
    this.field = make("input", "palette-field");
    this.field.type = "text";
    this.field.placeholder = "Type what you want to do";
    this.field.setAttribute("aria-label", "Command");
    this.field.autocomplete = "off";
    this.list = new ChoiceList(this.field, (item) => this.#run(item.value));
    this.node.append(this.field, this.list.node);
    document.body.append(this.node);
    this.field.addEventListener("input", () => this.#filter());
    this.field.addEventListener("keydown", (event) => {
      if (event.key === "Enter") this.list.take();
      else if (event.key === "ArrowDown") this.list.move(1);
      else if (event.key === "ArrowUp") this.list.move(-1);
      else return;
      event.preventDefault();
    });
    this.node.addEventListener("click", (event) => {
      if (event.target === this.node) this.node.close();
    });
  }

  open() {
    this.field.value = "";
    this.#filter();
    this.node.showModal();
    this.field.focus();
  }

  #filter() {
    const words = this.field.value.toLowerCase().split(/\s+/).filter(Boolean);
    const found = this.actions().filter(
      (action) => action.enabled !== false && words.every((word) => action.text.toLowerCase().includes(word)),
    );
    this.list.show(found.map((action) => ({text: action.text, remark: action.key, value: action.id})), found.length > 0 ? 0 : -1);
  }

  /** @param {string} id */
  #run(id) {
    this.node.close();
    this.actions().find((action) => action.id === id)?.run();
  }
}
