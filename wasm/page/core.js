// The only file that touches the WebAssembly module: JSON text in, JSON text out.

/**
 * @typedef {object} CoreModule
 * @property {Uint8Array} HEAPU8
 * @property {(size: number) => number} _heatledger_allocate
 * @property {(at: number) => void} _heatledger_release
 * @property {(at: number, size: number) => number} _heatledger_handle_request
 * @property {() => number} _heatledger_answer_size
 *
 * @typedef {(imports: WebAssembly.Imports, receive: (instance: WebAssembly.Instance) => void) => object} InstantiateWasm
 * @typedef {(options: {instantiateWasm: InstantiateWasm}) => Promise<CoreModule>} CreateModule
 *
 * @typedef {{ok: true, value: any} | {ok: false, error: import("./types.js").CoreError}} Answer
 */

const encoder = new TextEncoder();
const decoder = new TextDecoder();

export class Core {
  /** @param {CoreModule} module */
  constructor(module) {
    this.module = module;
  }

  /**
   * @param {Record<string, unknown>} request  see core/page/requests.hpp
   * @returns {Answer}
   */
  request(request) {
    try {
      return JSON.parse(this.requestText(JSON.stringify(request)));
    } catch (error) {
      // Core stops at a broken invariant rather than go on with wrong figures; nothing it holds can be trusted then.
      console.error(error);
      return {
        ok: false,
        error: {
          code: "page.core_stopped",
          message: "The calculation stopped on an internal error; the sheet shows its last good state.",
          hint: "Reload the page and open the file as last saved. Please report the entry that led here.",
        },
      };
    }
  }

  /**
   * @param {string} request
   * @returns {string}
   */
  requestText(request) {
    const module = this.module;
    const bytes = encoder.encode(request);
    const at = module._heatledger_allocate(bytes.length);
    module.HEAPU8.set(bytes, at);
    const answer = module._heatledger_handle_request(at, bytes.length);
    module._heatledger_release(at);
    // Memory may have grown during the call: HEAPU8 is read again, never kept.
    return decoder.decode(module.HEAPU8.subarray(answer, answer + module._heatledger_answer_size()));
  }
}

/**
 * @param {CreateModule} createModule  emscripten's start-up function
 * @param {Promise<WebAssembly.Module> | WebAssembly.Module} compiled
 */
export async function startCore(createModule, compiled) {
  const module = await compiled;
  return new Core(
    await createModule({
      instantiateWasm: (imports, receive) => {
        WebAssembly.instantiate(module, imports).then(receive);
        return {};
      },
    }),
  );
}

/**
 * Compiles the deflated module that the page carries in base64, in pieces. What is inflated is compiled while the rest
 * still inflates, and the whole is never held twice.
 * @param {string[]} pieces
 * @returns {Promise<WebAssembly.Module>}
 */
export function compileCarried(pieces) {
  /** @type {ReadableStream<Uint8Array<ArrayBuffer>>} */
  const packed = new ReadableStream({
    start(controller) {
      for (const piece of pieces) controller.enqueue(decodeBase64(piece));
      controller.close();
    },
  });
  const bytes = packed.pipeThrough(new DecompressionStream("deflate"));
  return WebAssembly.compileStreaming(new Response(bytes, {headers: {"Content-Type": "application/wasm"}}));
}

/**
 * @param {string} text
 * @returns {Uint8Array<ArrayBuffer>}
 */
function decodeBase64(text) {
  const native = /** @type {{fromBase64?: (text: string) => Uint8Array<ArrayBuffer>}} */ (/** @type {unknown} */ (Uint8Array));
  if (native.fromBase64) return native.fromBase64(text);
  const characters = atob(text);
  const bytes = new Uint8Array(characters.length);
  for (let i = 0; i < characters.length; ++i) bytes[i] = characters.charCodeAt(i);
  return bytes;
}
