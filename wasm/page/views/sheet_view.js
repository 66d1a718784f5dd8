// The sheet: blocks in order, each shown by a view that is kept as long as its block id is.

import {make, setAttribute, setChildren, setClass, setShapes, shape} from "./dom.js";
import {DrawingView} from "./drawing_view.js";
import {TableView} from "./table_view.js";

/**
 * @typedef {import("../types.js").Block} Block
 * @typedef {{node: HTMLElement, show: (block: any) => void}} BlockView
 */

/** Marks in front of a note, so that its kind does not rest on colour. */
const noteMarks = {info: "", assumption: "", caution: "Caution", disagreement: "Differs", error: "Not understood"};

class HeadingView {
  /** @param {string} id */
  constructor(id) {
    this.node = make("header", "block heading-block");
    this.node.dataset.block = id;
  }

  /** @param {import("../types.js").HeadingBlock} block */
  show(block) {
    const level = block.level ?? 2;
    setAttribute(this.node, "data-level", String(level));
    const heading = shape(level === 1 ? "h1" : "h2", "", block.text);
    setShapes(this.node, [heading, shape("span", "rule", ""), ...(block.aside ? [shape("span", "aside", block.aside)] : [])]);
  }
}

class NoteView {
  /** @param {string} id */
  constructor(id) {
    this.node = make("div", "block note-block");
    this.node.dataset.block = id;
    this.node.id = `note:${id}`;
  }

  /** @param {import("../types.js").NoteBlock} block */
  show(block) {
    const kind = block.kind ?? "info";
    setClass(this.node, `block note-block note-${kind}`);
    setAttribute(this.node, "role", kind === "error" ? "alert" : "note");
    const mark = noteMarks[kind];
    setShapes(this.node, [...(mark ? [shape("strong", "mark", mark)] : []), shape("span", "", block.text)]);
  }
}

/**
 * Blocks that belong together lie in one part: a reaction, the title block, the assumptions. A part is laid out by
 * itself, so an edit costs what its own reaction costs, however long the sheet.
 * @param {string} blockId
 */
function partOf(blockId) {
  const stem = blockId.split(".", 1)[0];
  return stem === "sheet" || stem === "header" ? "title" : stem;
}

/** @typedef {{kind: string, shown: Block, view: BlockView, part: string}} BlockEntry */

export class SheetView {
  /** @param {HTMLElement} node */
  constructor(node) {
    this.node = node;
    /** @type {Map<string, BlockEntry>} */
    this.blocks = new Map();
    /** @type {Map<string, HTMLElement>} */
    this.parts = new Map();
    /** @type {Set<HTMLElement>} */
    this.marked = new Set();
  }

  /** @param {import("../types.js").Page} page */
  show(page) {
    /** @type {typeof this.blocks} */
    const blocks = new Map();
    let sameNodes = page.blocks.length === this.blocks.size;
    const old = this.blocks.keys();
    for (const block of page.blocks) {
      const before = this.blocks.get(block.id);
      const entry =
        before && before.kind === block.block ? before : {kind: block.block, shown: block, view: viewFor(block), part: partOf(block.id)};
      if (entry !== before || entry.shown !== block) entry.view.show(block);
      sameNodes = sameNodes && entry === before && old.next().value === block.id;
      entry.shown = block;
      blocks.set(block.id, entry);
    }
    this.blocks = blocks;
    if (!sameNodes) this.#arrange();
    this.#markCells(page);
  }

  /** Puts the blocks into their parts and the parts into the sheet. */
  #arrange() {
    /** @type {Map<string, HTMLElement[]>} */
    const contents = new Map();
    for (const entry of this.blocks.values()) {
      const found = contents.get(entry.part);
      if (found) found.push(entry.view.node);
      else contents.set(entry.part, [entry.view.node]);
    }
    /** @type {typeof this.parts} */
    const parts = new Map();
    for (const [name, nodes] of contents) {
      const part = this.parts.get(name) ?? make("section", "part");
      part.dataset.part = name;
      // A short part is not worth the guess at its height that leaving it out takes.
      part.classList.toggle("long", nodes.length > 6);
      setChildren(part, nodes);
      parts.set(name, part);
    }
    this.parts = parts;
    setChildren(this.node, [...parts.values()]);
  }

  /**
   * Ties error notes to the cells they speak of.
   * @param {import("../types.js").Page} page
   */
  #markCells(page) {
    /** @type {Set<HTMLElement>} */
    const marked = new Set();
    for (const block of page.blocks) {
      if (block.block !== "note" || block.kind !== "error") continue;
      for (const id of block.cells ?? []) {
        const cell = this.cell(id);
        if (!cell) continue;
        setAttribute(cell, "aria-invalid", "true");
        setAttribute(cell, "aria-describedby", `note:${block.id}`);
        marked.add(cell);
      }
    }
    for (const cell of this.marked) {
      if (marked.has(cell)) continue;
      cell.removeAttribute("aria-invalid");
      cell.removeAttribute("aria-describedby");
    }
    this.marked = marked;
  }

  /**
   * @param {string} id
   * @returns {HTMLTableCellElement | null}
   */
  cell(id) {
    return this.node.querySelector(`[data-cell="${CSS.escape(id)}"]`);
  }
}

/**
 * @param {Block} block
 * @returns {BlockView}
 */
function viewFor(block) {
  switch (block.block) {
    case "heading":
      return new HeadingView(block.id);
    case "table":
      return new TableView(block.id);
    case "drawing":
      return new DrawingView(block.id);
    case "note":
      return new NoteView(block.id);
  }
}
