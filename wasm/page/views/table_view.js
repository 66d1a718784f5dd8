// One table of the page: cells are kept and only what changed is written.

import {make, setAttribute, setChildren, setClass, setText} from "./dom.js";

/**
 * @typedef {import("../types.js").TableBlock} TableBlock
 * @typedef {import("../types.js").Cell} Cell
 * @typedef {import("../types.js").Row} Row
 * @typedef {import("../types.js").Column} Column
 * @typedef {{node: HTMLTableCellElement, text: HTMLElement, shown: Cell, first: number, folds: boolean}} CellView
 * @typedef {{node: HTMLTableRowElement, cells: CellView[]}} RowView
 */

/** A bracketed state after a species, as in "H2O(l)"; set lower and lighter, the text itself stays as it came. */
const STATE_MARK = /(?<=\S)\([a-z][^()]*\)/g;

/** @type {WeakMap<Element, Cell>} */
const cells = new WeakMap();

/**
 * What core sent for a cell of the sheet.
 * @param {Element} node
 * @returns {Cell | undefined}
 */
export function cellData(node) {
  return cells.get(node);
}

export class TableView {
  /** @param {string} id */
  constructor(id) {
    this.node = make("div", "block table-block");
    this.node.dataset.block = id;
    this.table = make("table");
    this.columns = make("colgroup");
    this.head = make("thead");
    this.body = make("tbody");
    this.table.append(this.columns, this.head, this.body);
    this.node.append(this.table);
    /** @type {Map<string, RowView>} */
    this.rows = new Map();
    this.shownColumns = "";
  }

  /** @param {TableBlock} block */
  show(block) {
    const look = block.look ?? "list";
    const folds = block.rows.some((row) => row.fold_id);
    setClass(this.table, look);
    setClass(this.node, `block table-block look-${look}${block.rows.some(hasWords) ? "" : " unprinted"}`);
    setAttribute(this.table, "role", folds ? "treegrid" : "grid");
    this.#showColumns(block);
    /** @type {Map<string, RowView>} */
    const rows = new Map();
    block.rows.forEach((row, index) => {
      const key = row.id || `#${index}`;
      rows.set(key, this.#showRow(this.rows.get(key), row, block.columns, folds));
    });
    this.rows = rows;
    setChildren(this.body, [...rows.values()].map((row) => row.node));
  }

  /** @param {TableBlock} block */
  #showColumns(block) {
    const shown = JSON.stringify(block.columns);
    if (shown === this.shownColumns) return;
    this.shownColumns = shown;
    this.rows.clear();
    this.columns.replaceChildren(
      ...block.columns.map((column) => {
        const node = make("col");
        if (column.width) node.style.width = `${column.width * 100}%`;
        return node;
      }),
    );
    const heading = make("tr");
    for (const column of block.columns) {
      const node = make("th", `align-${column.align ?? "left"}${column.spine_after ? " spine" : ""}`, column.heading);
      node.scope = "col";
      heading.append(node);
    }
    this.head.replaceChildren(...(block.columns.some((column) => column.heading) ? [heading] : []));
  }

  /**
   * @param {RowView | undefined} before
   * @param {Row} row
   * @param {Column[]} columns
   * @param {boolean} inTree  some row of the table unfolds
   * @returns {RowView}
   */
  #showRow(before, row, columns, inTree) {
    const node = before?.node ?? make("tr");
    const role = row.role ?? "body";
    setClass(node, `row-${role}${row.fold_id ? " folds" : ""}${hasWords(row) ? "" : " unprinted"}`);
    setAttribute(node, "role", "row");
    setAttribute(node, "data-fold", row.fold_id || null);
    setAttribute(node, "aria-expanded", row.fold_id ? String(Boolean(row.open)) : null);
    setAttribute(node, "aria-level", inTree ? (role === "detail" ? "2" : "1") : null);
    const kept = before?.cells ?? [];
    let column = 0;
    const views = row.cells.map((cell, index) => {
      const view = showCell(kept[index], cell, columns, column, Boolean(row.fold_id) && index === 0);
      column += cell.span ?? 1;
      return view;
    });
    setChildren(node, views.map((view) => view.node));
    return {node, cells: views};
  }
}

/**
 * Whether paper has any use for a row: one that only waits for input or only offers buttons has none.
 * @param {Row} row
 */
function hasWords(row) {
  return row.cells.some((cell) => cell.text && cell.kind !== "button");
}

/**
 * Whether two cells differ in nothing but their words, and both have some: all that an edit changes of most cells.
 * @param {Cell} a
 * @param {Cell} b
 */
function alikeButForWords(a, b) {
  return (
    a.id === b.id && a.kind === b.kind && a.tone === b.tone && a.origin === b.origin && a.editable === b.editable &&
    a.span === b.span && a.hint === b.hint && Boolean(a.text) === Boolean(b.text)
  );
}

/**
 * @param {CellView | undefined} before  in the same place of the same columns
 * @param {Cell} cell
 * @param {Column[]} all  columns of the table
 * @param {number} first  column that it begins at
 * @param {boolean} folds  it carries the mark that unfolds its row
 * @returns {CellView}
 */
function showCell(before, cell, all, first, folds) {
  if (before && before.first === first && before.folds === folds && alikeButForWords(before.shown, cell)) {
    if (cell.text && before.shown.text !== cell.text) {
      if (cell.kind === "equation") setEquation(before.text, cell.text);
      else setText(before.text, cell.text);
    }
    before.shown = cell;
    cells.set(before.node, cell);
    return before;
  }
  const columns = all.slice(first, first + (cell.span ?? 1));
  const node = before?.node ?? make("td");
  const text = before?.text ?? node.appendChild(make("span", "text"));
  const kind = cell.kind ?? "label";
  const last = columns[columns.length - 1];
  // Words that run over several columns begin at the left of them, figures end at the right.
  const align = (columns.length > 1 && kind !== "number" ? columns[0].align : last?.align) ?? "left";
  const classes = ["cell", `kind-${kind}`, `align-${align}`];
  if (cell.tone && cell.tone !== "plain") classes.push(`tone-${cell.tone}`);
  if (cell.origin && cell.origin !== "none") classes.push(`origin-${cell.origin}`);
  if (cell.editable && kind !== "button") classes.push("editable");
  if (last?.spine_after) classes.push("spine");
  if (node.classList.contains("editing")) classes.push("editing");
  if (folds) classes.push("fold-mark");
  const words = cell.text || (cell.editable && kind !== "button" ? cell.hint : "") || "";
  if (!cell.text && words) classes.push("empty");
  if (!words && !cell.id) classes.push("blank");
  setClass(node, classes.join(" "));
  if (kind === "equation" && cell.text) setEquation(text, words);
  else setText(text, words);
  const span = cell.span ?? 1;
  setAttribute(node, "colspan", span > 1 ? String(span) : null);
  setAttribute(node, "role", "gridcell");
  setAttribute(node, "data-cell", cell.id || null);
  setAttribute(node, "tabindex", cell.id || folds ? node.getAttribute("tabindex") ?? "-1" : null);
  setAttribute(node, "aria-readonly", cell.id ? String(!cell.editable || kind === "button") : null);
  setAttribute(node, "aria-haspopup", kind === "choice" && cell.editable ? "listbox" : null);
  setAttribute(node, "title", cell.hint && cell.text ? cell.hint : null);
  cells.set(node, cell);
  return {node, text, shown: cell, first, folds};
}

/**
 * @param {HTMLElement} node
 * @param {string} equation
 */
function setEquation(node, equation) {
  if (node.textContent === equation) return;
  /** @type {(Node | string)[]} */
  const parts = [];
  let from = 0;
  for (const match of equation.matchAll(STATE_MARK)) {
    parts.push(equation.slice(from, match.index), make("span", "phase-mark", match[0]));
    from = match.index + match[0].length;
  }
  node.replaceChildren(...parts, equation.slice(from));
}
