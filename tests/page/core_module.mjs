// The shipped WebAssembly core under node, without a browser.
import {readFileSync} from "node:fs";
import {createRequire} from "node:module";
import {coreFile} from "./support.mjs";

/** @returns {Promise<import("../../wasm/page/core.js").Core>} */
export async function startNodeCore() {
  const {startCore} = await import("../../wasm/page/core.js");
  const create = createRequire(import.meta.url)(coreFile);
  return startCore(create, WebAssembly.compile(readFileSync(coreFile.replace(/\.js$/, ".wasm"))));
}

/**
 * @param {import("../../wasm/page/core.js").Core} core
 * @param {Record<string, unknown>} request
 * @returns {any} the answer's value
 */
export function ask(core, request) {
  const answer = core.request(request);
  if (!answer.ok) throw new Error(`${answer.error.code}: ${answer.error.message}`);
  return answer.value;
}
