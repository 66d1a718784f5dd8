// Moving about the sheet: one cell is in the tab order at a time, arrows reach every cell, Tab the ones to fill in.

import {setAttribute} from "./dom.js";
import {cellData} from "./table_view.js";

/** @typedef {import("./cell_editor.js").Move} Move */

export class Navigation {
  /**
   * @param {HTMLElement} sheet
   * @param {(cell: string) => void} onSelect
   */
  constructor(sheet, onSelect) {
    this.sheet = sheet;
    /** @type {HTMLTableCellElement | null} */
    this.current = null;
    /** Where a walk up or down began sideways, so that a narrow row on the way does not bend it. @type {number | null} */
    this.walk = null;
    sheet.addEventListener("pointerdown", () => (this.walk = null));
    sheet.addEventListener("focusin", (event) => {
      const cell = event.target instanceof Element ? event.target.closest("td[tabindex]") : null;
      if (!cell) return;
      this.#enter(/** @type {HTMLTableCellElement} */ (cell));
      onSelect(/** @type {HTMLElement} */ (cell).dataset.cell ?? "");
    });
  }

  /** @param {HTMLTableCellElement} cell */
  #enter(cell) {
    if (this.current === cell) return;
    this.current?.setAttribute("tabindex", "-1");
    if (this.current) setAttribute(this.current, "aria-selected", null);
    this.current = cell;
    cell.setAttribute("tabindex", "0");
    cell.setAttribute("aria-selected", "true");
  }

  /** Every cell that can be pointed at, in reading order. @returns {HTMLTableCellElement[]} */
  cells() {
    return [...this.sheet.querySelectorAll("td")].filter((cell) => cell.hasAttribute("tabindex"));
  }

  /** After the sheet was redrawn: some cell stays in the tab order, and a lost focus comes back to the sheet. */
  keep() {
    if (this.current?.isConnected) return;
    const hadFocus = this.current !== null && document.activeElement === document.body;
    this.current = null;
    const first = this.cells()[0];
    if (!first) return;
    if (hadFocus) this.focus(first);
    else first.setAttribute("tabindex", "0");
  }

  /** @param {HTMLTableCellElement | undefined} cell */
  focus(cell) {
    if (!cell) return;
    cell.focus({preventScroll: true});
    cell.scrollIntoView({block: "nearest", inline: "nearest"});
  }

  /**
   * @param {HTMLTableCellElement} from
   * @param {Move} move
   */
  move(from, move) {
    if (move === "leave") return;
    if (move === "stay") this.focus(from);
    else if (move === "next" || move === "previous") this.focus(this.stop(from, move === "next" ? 1 : -1) ?? from);
    else {
      const below = this.vertical(from, move === "down" ? 1 : -1);
      this.focus(below && below.closest("table") === from.closest("table") && cellData(below)?.editable ? below : from);
    }
  }

  /**
   * The next cell that wants something: to be filled in, chosen, pressed or unfolded.
   * @param {HTMLTableCellElement} from
   * @param {1 | -1} step
   */
  stop(from, step) {
    const cells = this.cells();
    for (let at = cells.indexOf(from) + step; at >= 0 && at < cells.length; at += step) {
      const cell = cells[at];
      if (cellData(cell)?.editable || cellData(cell)?.kind === "button" || cell.classList.contains("fold-mark")) return cell;
    }
    return undefined;
  }

  /**
   * @param {HTMLTableCellElement} from
   * @param {1 | -1} step
   * @returns {HTMLTableCellElement | undefined}
   */
  horizontal(from, step) {
    const row = [...(from.parentElement?.querySelectorAll("td") ?? [])].filter((cell) => cell.hasAttribute("tabindex"));
    return row[row.indexOf(from) + step];
  }

  /**
   * The cell above or below, the nearest sideways.
   * @param {HTMLTableCellElement} from
   * @param {1 | -1} step
   * @returns {HTMLTableCellElement | undefined}
   */
  vertical(from, step) {
    const rows = [...this.sheet.querySelectorAll("tr")];
    const x = this.walk ?? reading(from);
    for (let at = rows.indexOf(/** @type {HTMLTableRowElement} */ (from.parentElement)) + step; at >= 0 && at < rows.length; at += step) {
      const cells = [...rows[at].querySelectorAll("td")].filter((cell) => cell.hasAttribute("tabindex"));
      if (cells.length === 0) continue;
      return cells.reduce((best, cell) => (aside(cell, x) < aside(best, x) ? cell : best));
    }
    return undefined;
  }

  /**
   * @param {KeyboardEvent} event
   * @returns {HTMLTableCellElement | undefined} where the key leads; undefined when it leads nowhere
   */
  target(event) {
    const from = this.current;
    if (!from) return undefined;
    if (event.key === "ArrowUp" || event.key === "ArrowDown") this.walk ??= reading(from);
    else this.walk = null;
    const cells = () => this.cells();
    const row = () => [...(from.parentElement?.querySelectorAll("td") ?? [])].filter((cell) => cell.hasAttribute("tabindex"));
    switch (event.key) {
      case "ArrowUp":
        return this.vertical(from, -1);
      case "ArrowDown":
        return this.vertical(from, 1);
      case "ArrowLeft":
        return this.horizontal(from, -1);
      case "ArrowRight":
        return this.horizontal(from, 1);
      case "Home":
        return event.ctrlKey ? cells()[0] : row()[0];
      case "End":
        return event.ctrlKey ? cells().pop() : row().pop();
      case "Tab":
        return this.stop(from, event.shiftKey ? -1 : 1);
      default:
        return undefined;
    }
  }
}

/**
 * Where the eye stands in a cell: at the end of a figure, at the beginning of words.
 * @param {Element} cell
 */
function reading(cell) {
  const box = cell.getBoundingClientRect();
  return cell.classList.contains("align-right") ? box.right - 8 : box.left + 8;
}

/**
 * How far a cell lies to the side of x; nothing when it stands above or below.
 * @param {Element} cell
 * @param {number} x
 */
function aside(cell, x) {
  const box = cell.getBoundingClientRect();
  return Math.max(box.left - x, x - box.right, 0);
}
