// A list that hangs under a text field: completions while typing, or the choices of a cell.

import {make, setAttribute} from "./dom.js";

/** @typedef {{text: string, remark?: string, value: string}} ListItem */

let count = 0;

export class ChoiceList {
  /**
   * @param {HTMLInputElement} field
   * @param {(item: ListItem) => void} onTake
   */
  constructor(field, onTake) {
    this.field = field;
    this.onTake = onTake;
    /** @type {ListItem[]} */
    this.items = [];
    this.active = -1;
    this.node = make("ul", "choice-list");
    this.node.id = `choice-list-${++count}`;
    this.node.setAttribute("role", "listbox");
    this.node.hidden = true;
    // The field keeps the focus: a press in the list must not end the edit.
    this.node.addEventListener("pointerdown", (event) => event.preventDefault());
    this.node.addEventListener("click", (event) => {
      const option = event.target instanceof Element ? event.target.closest("li") : null;
      if (option) this.onTake(this.items[[...this.node.children].indexOf(option)]);
    });
    field.setAttribute("role", "combobox");
    field.setAttribute("aria-autocomplete", "list");
    field.setAttribute("aria-controls", this.node.id);
    field.setAttribute("aria-expanded", "false");
  }

  get open() {
    return !this.node.hidden;
  }

  /**
   * @param {ListItem[]} items  none: the list closes
   * @param {number} [active]   index of the marked item; -1 for none
   */
  show(items, active = -1) {
    this.items = items;
    this.node.hidden = items.length === 0;
    setAttribute(this.field, "aria-expanded", String(this.open));
    this.node.replaceChildren(
      ...items.map((item, index) => {
        const option = make("li", "");
        option.id = `${this.node.id}-${index}`;
        option.setAttribute("role", "option");
        option.append(make("span", "", item.text));
        if (item.remark) option.append(make("span", "remark", item.remark));
        return option;
      }),
    );
    this.mark(active);
  }

  close() {
    this.show([]);
  }

  /** @param {number} index */
  mark(index) {
    this.active = index;
    [...this.node.children].forEach((option, at) => setAttribute(option, "aria-selected", String(at === index)));
    const option = this.node.children[index];
    setAttribute(this.field, "aria-activedescendant", option ? option.id : null);
    option?.scrollIntoView({block: "nearest"});
  }

  /** @param {1 | -1} step */
  move(step) {
    const n = this.items.length;
    if (n > 0) this.mark(this.active < 0 ? (step > 0 ? 0 : n - 1) : (this.active + step + n) % n);
  }

  /** Takes the marked item. @returns {boolean} whether there was one */
  take() {
    const item = this.items[this.active];
    if (item) this.onTake(item);
    return Boolean(item);
  }
}
