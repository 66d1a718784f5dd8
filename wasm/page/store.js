// What is on the screen now, and who wants to know. Views read `view` and call the verbs below; only this file
// sends requests to core.

/**
 * @typedef {import("./types.js").Page} Page
 * @typedef {import("./types.js").Margin} Margin
 * @typedef {import("./types.js").CoreError} CoreError
 *
 * @typedef {object} FileState
 * @property {string} name                           as shown in the bar; empty until the sheet has one
 * @property {FileSystemFileHandle | null} handle
 * @property {string} savedAt                        time of day of the last save or opening, "" before that
 *
 * @typedef {object} Message
 * @property {"info" | "error"} kind
 * @property {string} text
 * @property {string} [hint]
 *
 * @typedef {object} View
 * @property {Page} page
 * @property {string} selected       id of the selected cell; empty when there is none
 * @property {Margin | null} margin  all about the selected cell
 * @property {boolean} changed       edits that no file holds yet
 * @property {FileState} file
 * @property {Message | null} message
 *
 * @typedef {{text: string, name: string, remark: string}} Suggestion  text: what stands before the caret, completed
 */

/** @type {Page} */
const emptyPage = {title: "", revision: 0, blocks: [], commands: []};

export const FILE_ENDING = ".heatledger.json";

export class Store {
  /** @param {import("./core.js").Core} core */
  constructor(core) {
    this.core = core;
    /** @type {number | null} */
    this.sheet = null;
    /** @type {View} */
    this.view = {page: emptyPage, selected: "", margin: null, changed: false, file: {name: "", handle: null, savedAt: ""}, message: null};
    /** @type {((view: View, before: View) => void)[]} */
    this.listeners = [];
  }

  /** @param {(view: View, before: View) => void} listener  called at once after every change */
  subscribe(listener) {
    this.listeners.push(listener);
  }

  /** @param {Partial<View>} change */
  update(change) {
    const before = this.view;
    this.view = {...before, ...change};
    for (const listener of this.listeners) listener(this.view, before);
  }

  /**
   * A request about the present sheet. An error becomes the message of the view.
   * @param {string} verb
   * @param {Record<string, unknown>} [fields]
   * @returns {any} the answer's value; undefined after an error
   */
  ask(verb, fields = {}) {
    const answer = this.core.request({do: verb, sheet: this.sheet, ...fields});
    if (answer.ok) return answer.value;
    this.showError(answer.error);
    return undefined;
  }

  /** @param {CoreError} error */
  showError(error) {
    const place = error.where ? ` (${error.where})` : "";
    this.update({message: {kind: "error", text: error.message + place, hint: error.hint}});
  }

  /** An empty sheet in place of the present one. */
  startNew() {
    const answer = this.core.request({do: "new"});
    if (!answer.ok) return this.showError(answer.error);
    this.#takeSheet(answer.value.sheet, {name: "", handle: null, savedAt: ""});
  }

  /**
   * @param {{name: string, text: string, handle: FileSystemFileHandle | null}} file
   * @returns {boolean} whether the sheet was replaced; after an error the present one stays
   */
  open(file) {
    const answer = this.core.request({do: "open", text: file.text});
    if (!answer.ok && answer.error.code === "file.is_site_table" && this.sheet !== null) {
      // Its rows go into the sheet that is open, which keeps its name and place.
      this.command("import_site_table", {text: file.text});
      return false;
    }
    if (!answer.ok) {
      this.showError({...answer.error, message: `${file.name} was not opened. ${answer.error.message}`});
      return false;
    }
    this.#takeSheet(answer.value.sheet, {name: file.name, handle: file.handle, savedAt: timeOfDay()});
    return true;
  }

  /**
   * @param {number} sheet
   * @param {FileState} file
   */
  #takeSheet(sheet, file) {
    if (this.sheet !== null) this.core.request({do: "close", sheet: this.sheet});
    this.sheet = sheet;
    const page = this.ask("page");
    if (page) this.update({page, selected: "", margin: null, changed: false, file, message: null});
  }

  /**
   * @param {string} cell
   * @param {string} text
   */
  edit(cell, text) {
    this.#takeChanges(this.ask("edit", {cell, text, since: this.view.page.revision}));
  }

  /**
   * @param {string} name
   * @param {Record<string, string>} [argumentsOf]
   */
  command(name, argumentsOf = {}) {
    this.#takeChanges(this.ask("command", {name, arguments: argumentsOf, since: this.view.page.revision}));
  }

  /**
   * Blocks that did not change stay the very same objects: a view knows by that what it need not look at.
   * @param {import("./types.js").PageChanges | undefined} changes
   */
  #takeChanges(changes) {
    if (!changes) return;
    /** @type {Map<string, import("./types.js").Block>} */
    const blocks = new Map(this.view.page.blocks.map((block) => [block.id, block]));
    for (const block of changes.blocks) blocks.set(block.id, block);
    const order = changes.order ?? this.view.page.blocks.map((block) => block.id);
    const page = {
      title: changes.title,
      revision: changes.revision,
      blocks: order.flatMap((id) => blocks.get(id) ?? []),
      commands: changes.commands,
    };
    const state = this.ask("state");
    this.update({page, margin: this.#marginOf(this.view.selected), changed: Boolean(state?.changed), message: null});
  }

  /** @param {string} cell */
  #marginOf(cell) {
    if (!cell) return null;
    const answer = this.core.request({do: "margin", sheet: this.sheet, cell});
    return answer.ok ? answer.value : null;
  }

  /** @param {string} cell  empty: nothing is selected */
  select(cell) {
    if (cell !== this.view.selected) this.update({selected: cell, margin: this.#marginOf(cell)});
  }

  /**
   * Workings of all cells that have one, in reading order, for the printed appendix.
   * @returns {Margin[]}
   */
  workings() {
    const found = [];
    for (const block of this.view.page.blocks) {
      if (block.block !== "table") continue;
      for (const row of block.rows) {
        for (const cell of row.cells) {
          const margin = cell.has_working && cell.id ? this.#marginOf(cell.id) : null;
          if (margin?.steps?.length) found.push(margin);
        }
      }
    }
    return found;
  }

  /**
   * @param {string} cell
   * @param {string} text  what stands before the caret
   * @returns {Suggestion[]}
   */
  suggest(cell, text) {
    const answer = this.core.request({do: "suggest", sheet: this.sheet, cell, text, limit: 8});
    return answer.ok ? answer.value : [];
  }

  /** Text of the worksheet file. @returns {string | undefined} */
  fileText() {
    return this.ask("save");
  }

  /** A file name for the present sheet. */
  fileName() {
    return this.view.file.name || fileNameFor(this.view.page.title);
  }

  /**
   * The sheet now stands in a file.
   * @param {string} name
   * @param {FileSystemFileHandle | null} handle
   */
  markSaved(name, handle) {
    this.update({changed: false, file: {name, handle, savedAt: timeOfDay()}, message: null});
  }
}

function timeOfDay() {
  return new Date().toLocaleTimeString([], {hour: "2-digit", minute: "2-digit"});
}

/**
 * A file name that every system takes, from the title of a sheet.
 * @param {string} title
 */
function fileNameFor(title) {
  const stem = title.normalize("NFKD").toLowerCase().replace(/[^a-z0-9]+/g, "-").replace(/^-+|-+$/g, "").slice(0, 60);
  return (stem || "worksheet") + FILE_ENDING;
}
