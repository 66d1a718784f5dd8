// Worksheet files in and out of the browser: pickers where there are any, an upload field and a download elsewhere.

import {FILE_ENDING} from "./store.js";

/**
 * @typedef {object} OpenedFile
 * @property {string} name
 * @property {string} text
 * @property {FileSystemFileHandle | null} handle  where Save writes again without asking
 */


const pickers = /** @type {{
  showOpenFilePicker?: (options: object) => Promise<FileSystemFileHandle[]>,
  showSaveFilePicker?: (options: object) => Promise<FileSystemFileHandle>,
}} */ (/** @type {unknown} */ (window));

const fileTypes = [{description: "Heatledger worksheet", accept: {"application/json": [FILE_ENDING, ".json"]}}];

/** @param {unknown} error */
function isCancelled(error) {
  return error instanceof DOMException && error.name === "AbortError";
}

/**
 * Lets the user choose a file; null when nothing was chosen.
 * @returns {Promise<OpenedFile | null>}
 */
export async function chooseFile() {
  if (pickers.showOpenFilePicker) {
    try {
      const [handle] = await pickers.showOpenFilePicker({types: fileTypes});
      return await readHandle(handle);
    } catch (error) {
      if (isCancelled(error)) return null;
      throw error;
    }
  }
  const field = document.createElement("input");
  field.type = "file";
  field.accept = `${FILE_ENDING},.json,application/json`;
  const chosen = await new Promise((resolve) => {
    field.addEventListener("change", () => resolve(field.files?.[0] ?? null), {once: true});
    field.addEventListener("cancel", () => resolve(null), {once: true});
    field.click();
  });
  return chosen ? {name: chosen.name, text: await chosen.text(), handle: null} : null;
}

/**
 * @param {FileSystemFileHandle} handle
 * @returns {Promise<OpenedFile>}
 */
async function readHandle(handle) {
  const file = await handle.getFile();
  return {name: file.name, text: await file.text(), handle};
}

/**
 * The first file of a drop; null when there is none. Must be called inside the drop event.
 * @param {DataTransfer} transfer
 * @returns {Promise<OpenedFile | null>}
 */
export async function droppedFile(transfer) {
  const item = /** @type {(DataTransferItem & {getAsFileSystemHandle?: () => Promise<FileSystemHandle | null>}) | undefined} */ (
    [...transfer.items].find((entry) => entry.kind === "file")
  );
  if (!item) return null;
  const file = item.getAsFile();
  const handle = await Promise.resolve(item.getAsFileSystemHandle?.()).catch(() => null);
  if (handle?.kind === "file") return readHandle(/** @type {FileSystemFileHandle} */ (handle));
  return file ? {name: file.name, text: await file.text(), handle: null} : null;
}

/**
 * Writes the text to where the file came from, or asks for a place; null when the user changed their mind.
 * @param {string} text
 * @param {string} name
 * @param {FileSystemFileHandle | null} handle
 * @returns {Promise<{name: string, handle: FileSystemFileHandle | null} | null>}
 */
export async function saveFile(text, name, handle) {
  try {
    let target = handle;
    if (!target && pickers.showSaveFilePicker) {
      target = await pickers.showSaveFilePicker({suggestedName: name, types: fileTypes});
    }
    if (target) {
      const stream = await target.createWritable();
      await stream.write(text);
      await stream.close();
      return {name: target.name, handle: target};
    }
  } catch (error) {
    if (isCancelled(error)) return null;
    throw error;
  }
  download(text, name, "application/json");
  return {name, handle: null};
}

/**
 * @param {string} text
 * @param {string} name
 * @param {string} type
 */
export function download(text, name, type) {
  const url = URL.createObjectURL(new Blob([text], {type}));
  const link = document.createElement("a");
  link.href = url;
  link.download = name;
  link.click();
  // The browser reads the blob after this turn; a minute is ample and the text is small.
  setTimeout(() => URL.revokeObjectURL(url), 60000);
}
