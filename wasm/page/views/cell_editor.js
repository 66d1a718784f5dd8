// The text field that lies over a cell while it is edited. What was typed is handed over on Enter, Tab, an arrow or a
// click elsewhere; Esc gives it up.

import {ChoiceList} from "./choice_list.js";
import {make} from "./dom.js";
import {cellData} from "./table_view.js";

/**
 * @typedef {"stay" | "next" | "previous" | "up" | "down" | "leave"} Move  where the selection goes after the edit
 * @typedef {object} EditorHost
 * @property {(cell: string, text: string) => void} commit
 * @property {(cell: HTMLTableCellElement, move: Move) => void} move
 * @property {(cell: string, text: string) => import("../store.js").Suggestion[]} suggest
 */

export class CellEditor {
  /** @param {EditorHost} host */
  constructor(host) {
    this.host = host;
    /** @type {{td: HTMLTableCellElement, id: string, field: HTMLInputElement, list: ChoiceList, before: string} | null} */
    this.at = null;
  }

  get active() {
    return this.at !== null;
  }

  /**
   * @param {HTMLTableCellElement} td
   * @param {{typed?: boolean, selectAll?: boolean}} [how]  typed: the edit starts with a key, which replaces the text
   */
  start(td, how = {}) {
    const cell = cellData(td);
    if (!cell?.id || !cell.editable || cell.kind === "button") return;
    this.finish("leave");
    const before = cell.edit_text ?? cell.text ?? "";
    const field = make("input", "cell-field");
    field.type = "text";
    field.spellcheck = false;
    field.autocomplete = "off";
    field.setAttribute("aria-label", cell.hint || "Cell text");
    field.placeholder = cell.hint ?? "";
    field.value = how.typed ? "" : before;
    const list = new ChoiceList(field, (item) => this.#take(item.value));
    this.at = {td, id: cell.id, field, list, before};
    td.classList.add("editing");
    td.append(field, list.node);
    field.addEventListener("keydown", (event) => this.#key(event));
    field.addEventListener("blur", () => this.finish("leave"));
    if (cell.kind === "choice" && cell.choices) {
      field.readOnly = true;
      field.value = before;
      list.show(cell.choices.map((text) => ({text, value: text})), cell.choices.indexOf(cell.text ?? ""));
    } else if (cell.kind === "equation") {
      field.addEventListener("input", () => this.#complete());
    }
    field.focus({preventScroll: true});
    if (how.selectAll) field.select();
    else field.setSelectionRange(field.value.length, field.value.length);
  }

  /**
   * Ends the edit and hands the text over.
   * @param {Move} move
   */
  finish(move) {
    const at = this.at;
    if (!at) return;
    const text = at.field.value;
    this.#close(move !== "leave");
    if (text !== at.before) this.host.commit(at.id, text);
    this.host.move(at.td, move);
  }

  cancel() {
    const at = this.at;
    if (!at) return;
    this.#close(true);
    this.host.move(at.td, "stay");
  }

  /** @param {boolean} focusCell  the cell takes the focus back */
  #close(focusCell) {
    const at = this.at;
    if (!at) return;
    // Cleared first: a field that loses the focus fires blur, which must find the edit over.
    this.at = null;
    at.td.classList.remove("editing");
    // Before the field goes: with nothing else changed yet this is cheap, and taking out what has the focus is not.
    if (focusCell) at.td.focus({preventScroll: true});
    at.field.remove();
    at.list.node.remove();
  }

  #complete() {
    const at = this.at;
    if (!at) return;
    const caret = at.field.selectionStart ?? at.field.value.length;
    const found = this.host.suggest(at.id, at.field.value.slice(0, caret));
    at.list.show(found.map((entry) => ({text: entry.name, remark: entry.remark, value: entry.text})));
  }

  /** @param {string} value */
  #take(value) {
    const at = this.at;
    if (!at) return;
    if (at.field.readOnly) {
      at.field.value = value;
      this.finish("stay");
      return;
    }
    const caret = at.field.selectionStart ?? at.field.value.length;
    at.field.value = value + at.field.value.slice(caret);
    at.field.setSelectionRange(value.length, value.length);
    at.list.close();
  }

  /** @param {KeyboardEvent} event */
  #key(event) {
    const at = this.at;
    if (!at || event.isComposing) return;
    event.stopPropagation();
    const {list, field} = at;
    /** @type {(() => void) | null} */
    let act = null;
    if (event.key === "Enter") act = () => list.take() || this.finish(cellData(at.td)?.kind === "number" ? "down" : "stay");
    else if (event.key === "Tab") act = () => this.finish(event.shiftKey ? "previous" : "next");
    else if (event.key === "Escape") act = () => (list.open && !field.readOnly ? list.close() : this.cancel());
    else if (event.key === "ArrowDown" || event.key === "ArrowUp") {
      const down = event.key === "ArrowDown";
      if (list.open) act = () => list.move(down ? 1 : -1);
      else if (cellData(at.td)?.kind === "number") act = () => this.finish(down ? "down" : "up");
    } else if (field.readOnly && event.key === " ") act = () => list.take();
    if (!act) return;
    event.preventDefault();
    act();
  }
}
