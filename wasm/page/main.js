// Puts the page together: core, store, views, keys.

import {compileCarried, startCore} from "./core.js";
import {chooseFile, download, droppedFile, saveFile} from "./files.js";
import {Store} from "./store.js";
import {BarView} from "./views/bar_view.js";
import {CellEditor} from "./views/cell_editor.js";
import {make} from "./views/dom.js";
import {MarginView, showAppendix} from "./views/margin_view.js";
import {Navigation} from "./views/navigation.js";
import {Palette} from "./views/palette.js";
import {askToLeave} from "./views/question.js";
import {SheetView} from "./views/sheet_view.js";
import {cellData} from "./views/table_view.js";

/** @typedef {import("./views/palette.js").Action} Action */

/** @type {{createHeatledgerCore: import("./core.js").CreateModule}} */
const {createHeatledgerCore: createModule} = /** @type {any} */ (globalThis);

/** @param {string} id */
function part(id) {
  const node = document.getElementById(id);
  if (!node) throw new Error(`the page has lost its part ${id}`);
  return node;
}

const core = await startCore(createModule, compileCarried([...document.querySelectorAll("script.core")].map((piece) => piece.textContent ?? "")));
const store = new Store(core);
const sheetNode = part("sheet");
const sheet = new SheetView(sheetNode);
const margin = new MarginView(part("margin"));
const appendix = part("appendix");
const message = part("message");

const navigation = new Navigation(sheetNode, (cell) => store.select(cell));
const editor = new CellEditor({
  commit: (cell, text) => store.edit(cell, text),
  // The edit may have redrawn its cell: the selection goes on from the one that now stands there.
  move: (cell, move) => navigation.move(cell.isConnected ? cell : sheet.cell(cell.dataset.cell ?? "") ?? cell, move),
  suggest: (cell, text) => store.suggest(cell, text),
});

/** Goes on once the present sheet may be replaced. */
async function mayReplace() {
  editor.finish("leave");
  if (!store.view.changed) return true;
  const answer = await askToLeave();
  return answer === "leave" || (answer === "save" && (await save(false)));
}

/**
 * @param {boolean} elsewhere  ask for a place even if the sheet has one
 * @returns {Promise<boolean>} whether the sheet stands in a file now
 */
async function save(elsewhere) {
  editor.finish("stay");
  const text = store.fileText();
  if (text === undefined) return false;
  const {name, handle} = store.view.file;
  try {
    const saved = await saveFile(text, name || store.fileName(), elsewhere ? null : handle);
    if (saved) store.markSaved(saved.name, saved.handle);
    return saved !== null;
  } catch (error) {
    store.showError({code: "page.not_saved", message: `The sheet was not saved: ${error instanceof Error ? error.message : error}.`, hint: "Save it under another name or in another folder."});
    return false;
  }
}

/** @param {() => Promise<import("./files.js").OpenedFile | null>} choose */
async function open(choose) {
  try {
    const file = await choose();
    if (file && (await mayReplace())) store.open(file);
  } catch (error) {
    store.showError({code: "page.not_opened", message: `The file was not opened: ${error instanceof Error ? error.message : error}.`});
  }
}

/** @param {boolean} withWorkings */
function print(withWorkings) {
  editor.finish("stay");
  if (withWorkings) showAppendix(appendix, store.workings());
  window.print();
}
window.addEventListener("afterprint", () => appendix.replaceChildren());

/**
 * @param {string} verb
 * @param {string} ending
 * @param {string} type
 */
function saveCopy(verb, ending, type) {
  editor.finish("stay");
  const text = store.ask(verb);
  if (typeof text === "string") download(text, store.fileName().replace(/(\.heatledger)?\.json$/, "") + ending, type);
}

/** Writes how this sheet differs from a chosen file, which may be an older state of it. */
async function compareWithFile() {
  editor.finish("stay");
  try {
    const file = await chooseFile();
    const text = file && store.ask("compare", {text: file.text});
    if (typeof text === "string") download(text, store.fileName().replace(/(\.heatledger)?\.json$/, "") + "-compared.html", "text/html");
  } catch (error) {
    store.showError({code: "page.not_opened", message: `The file was not opened: ${error instanceof Error ? error.message : error}.`});
  }
}

/** What the page itself can do; core's own commands are added from the page. */
/** @type {Action[]} */
const pageActions = [
  {id: "new", text: "New", run: async () => void ((await mayReplace()) && store.startNew())},
  {id: "open", text: "Open", key: "Ctrl+O", run: () => open(chooseFile)},
  {id: "save", text: "Save", key: "Ctrl+S", run: () => save(false)},
  {id: "save_as", text: "Save under another name", key: "Ctrl+Shift+S", run: () => save(true)},
  {id: "print", text: "Print", key: "Ctrl+P", run: () => print(false)},
  {id: "print_workings", text: "Print with all workings", run: () => print(true)},
  {id: "report", text: "Save a report (HTML)", run: () => saveCopy("report", ".html", "text/html")},
  {id: "compare", text: "Compare with another file (HTML)", run: compareWithFile},
  {id: "markdown", text: "Save the sheet as Markdown", run: () => saveCopy("markdown", ".md", "text/markdown")},
  {id: "csv", text: "Save the tables (CSV)", run: () => saveCopy("csv", ".csv", "text/csv")},
];

/** @returns {Action[]} */
function actions() {
  const known = new Set(pageActions.map((action) => action.id));
  const fromCore = store.view.page.commands
    .filter((command) => !known.has(command.id))
    .map((command) => ({...command, run: () => store.command(command.id)}));
  return [...pageActions, ...fromCore];
}

const palette = new Palette(actions);
/** @type {Action} */
const paletteAction = {id: "commands", text: "Commands", key: "Ctrl+K", run: () => palette.open()};
const onBar = ["new", "open", "save", "print"];
const bar = new BarView(part("bar"), [...pageActions.filter((action) => onBar.includes(action.id)), paletteAction]);

store.subscribe((view, before) => {
  if (view.page !== before.page) {
    sheet.show(view.page);
    navigation.keep();
    document.title = `${view.page.title || "Untitled sheet"} – Heatledger`;
  }
  if (view.margin !== before.margin) margin.show(view.margin);
  if (view.changed !== before.changed || view.file !== before.file) bar.show(view);
  if (view.message !== before.message) {
    message.className = view.message ? `message-${view.message.kind}` : "";
    message.replaceChildren(
      ...(view.message ? [make("span", "", view.message.text), ...(view.message.hint ? [make("span", "hint", view.message.hint)] : [])] : []),
    );
  }
});

/** @param {HTMLTableCellElement} cell */
function activate(cell) {
  const data = cellData(cell);
  const row = /** @type {HTMLElement | null} */ (cell.closest("tr[data-fold]"));
  if (data?.kind === "button" && data.id) store.edit(data.id, "");
  else if (data?.editable) editor.start(cell);
  else if (row) store.edit(row.dataset.fold ?? "", row.getAttribute("aria-expanded") === "true" ? "closed" : "open");
}

sheetNode.addEventListener("click", (event) => {
  const cell = event.target instanceof Element ? event.target.closest("td") : null;
  if (!cell || !(event.target instanceof Element) || event.target.closest("input, .choice-list")) return;
  const data = cellData(cell);
  if (cell.hasAttribute("tabindex")) navigation.focus(cell);
  if (data?.kind === "button" || cell.classList.contains("fold-mark")) activate(cell);
  else if (data?.editable) editor.start(cell, {selectAll: data.kind === "number"});
});

sheetNode.addEventListener("keydown", (event) => {
  const cell = navigation.current;
  if (!cell || editor.active || event.altKey) return;
  const data = cellData(cell);
  const typing = data?.editable && data.kind !== "button";
  const plain = !event.ctrlKey && !event.metaKey;
  if (event.key === "Enter" || event.key === "F2") activate(cell);
  else if (event.key === " " && !typing) activate(cell);
  else if ((event.key === "Delete" || event.key === "Backspace") && typing && data.id && data.kind !== "choice") store.edit(data.id, "");
  else if (event.key.length === 1 && plain && typing) {
    // The key itself goes on into the field that now has the focus.
    editor.start(cell, {typed: data.kind !== "choice"});
    return;
  } else {
    const target = navigation.target(event);
    if (!target) return;
    navigation.focus(target);
  }
  event.preventDefault();
});

document.addEventListener("keydown", (event) => {
  if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
  const key = `Ctrl+${event.shiftKey ? "Shift+" : ""}${event.key.length === 1 ? event.key.toUpperCase() : event.key}`;
  // While text is edited, undo and redo belong to the field.
  if (editor.active && (key === "Ctrl+Z" || key === "Ctrl+Y" || key === "Ctrl+Shift+Z")) return;
  const action = key === "Ctrl+K" ? paletteAction : actions().find((candidate) => candidate.key === key);
  if (!action) return;
  event.preventDefault();
  if (action.enabled !== false) action.run();
}, {capture: true});

document.addEventListener("copy", (event) => {
  const text = navigation.current === document.activeElement ? navigation.current?.querySelector(".text")?.textContent : "";
  if (!text || String(getSelection())) return;
  event.clipboardData?.setData("text/plain", text);
  event.preventDefault();
});

document.addEventListener("paste", (event) => {
  const cell = navigation.current;
  const data = cell && cell === document.activeElement ? cellData(cell) : undefined;
  const text = event.clipboardData?.getData("text/plain").trim().split(/[\r\n]+/)[0];
  if (!data?.editable || data.kind === "button" || !data.id || !text) return;
  store.edit(data.id, text);
  event.preventDefault();
});

// A file dropped anywhere on the page is opened by the page; the browser would leave for it.
window.addEventListener("dragover", (event) => event.preventDefault());
window.addEventListener("drop", (event) => {
  event.preventDefault();
  const transfer = event.dataTransfer;
  if (transfer) open(() => droppedFile(transfer));
});

window.addEventListener("beforeunload", (event) => {
  editor.finish("leave");
  if (store.view.changed) event.preventDefault();
});

const carried = part("carried").textContent?.trim() ?? "";
if (!carried || !store.open({name: "", text: carried, handle: null})) store.startNew();
bar.show(store.view);
margin.show(null);
document.documentElement.dataset.ready = "yes";
performance.mark("usable");
