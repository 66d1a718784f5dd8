// Makes the one file that is shipped: style, script, WebAssembly core and an empty place for a carried sheet inside one
// HTML page whose content security policy lets nothing else run and nothing be fetched.
//   node bundle.mjs --page wasm/page --core build/wasm/wasm/heatledger_core.js --out heatledger.html
import {createHash} from "node:crypto";
import {readFileSync, writeFileSync} from "node:fs";
import {dirname, join, resolve} from "node:path";
import {deflateSync} from "node:zlib";

/** @param {string[]} words */
function readOptions(words) {
  /** @type {Record<string, string>} */
  const options = {};
  for (let i = 0; i < words.length; i += 2) options[words[i].replace(/^--/, "")] = words[i + 1];
  for (const name of ["page", "core", "out"]) {
    if (!options[name]) {
      console.error("usage: node bundle.mjs --page FOLDER --core MODULE.js --out FILE.html");
      process.exit(2);
    }
  }
  return options;
}

const STYLES = ["style/frame.css", "style/sheet.css", "style/print.css"];
const IMPORT = /^import\s*\{[^}]*\}\s*from\s*"(\.[^"]+)";\n/gm;

/**
 * The modules behind `entry` as one script, each after those it needs. They share one scope, which is safe because
 * a name declared twice is a syntax error that the browser test of the page would meet at once.
 * @param {string} entry
 */
function joinModules(entry) {
  /** @type {Set<string>} */
  const seen = new Set();
  /** @type {string[]} */
  const parts = [];
  /** @param {string} file */
  const add = (file) => {
    if (seen.has(file)) return;
    seen.add(file);
    const text = readFileSync(file, "utf8");
    for (const match of text.matchAll(IMPORT)) add(resolve(dirname(file), match[1]));
    const body = text.replace(IMPORT, "").replace(/^export (?=(async )?(function|class|const|let) )/gm, "").replace(/^export \{\};\n/gm, "");
    const left = body.match(/^(import|export)\b.*$/m);
    if (left) throw new Error(`${file}: the bundler does not know "${left[0]}"`);
    parts.push(body);
  };
  add(resolve(entry));
  return parts.join("");
}

/**
 * Size of the pieces that the core is cut into [characters]. The parser gathers the text of one element in a buffer that
 * it grows by copying: one element with all of it costs twice as much time. A multiple of 4: each piece is base64 by itself.
 */
const PIECE = 1 << 16;

/** @param {string} base64 */
function corePieces(base64) {
  const pieces = [];
  for (let at = 0; at < base64.length; at += PIECE) {
    pieces.push(`<script class="core" type="application/octet-stream">${base64.slice(at, at + PIECE)}</script>`);
  }
  return pieces.join("\n");
}

/**
 * The page is pure ASCII: a single other character makes the browser hold and parse the whole megabyte in 16-bit
 * characters, 35 ms of every start.
 */
const asciiOf = {
  /** @param {string} text  strings, regular expressions and comments take this spelling; names are ASCII anyway */
  script: (text) => text.replace(/[^\0-\x7f]/g, (unit) => `\\u${unit.charCodeAt(0).toString(16).padStart(4, "0")}`),
  /** @param {string} text */
  style: (text) => text.replace(/[^\0-\x7f]/gu, (character) => `\\${character.codePointAt(0)?.toString(16)} `),
  /** @param {string} text */
  markup: (text) => text.replace(/[^\0-\x7f]/gu, (character) => `&#${character.codePointAt(0)};`),
};

/** @param {string} text */
const hashOf = (text) => `'sha256-${createHash("sha256").update(text, "utf8").digest("base64")}'`;

const options = readOptions(process.argv.slice(2));
const style = asciiOf.style(STYLES.map((file) => readFileSync(join(options.page, file), "utf8")).join(""));
const core = readFileSync(options.core, "utf8");
// emscripten's start-up declares one variable; the page's own modules find it as a global of their script.
const script = asciiOf.script(`${core}\nglobalThis.createHeatledgerCore = createHeatledgerCore;\n${joinModules(join(options.page, "main.js"))}`);
for (const [name, text] of Object.entries({style, script})) {
  if (/<\/(script|style)|<!--/i.test(text)) throw new Error(`the ${name} would end its own element`);
}
const wasm = deflateSync(readFileSync(options.core.replace(/\.js$/, ".wasm")), {level: 9}).toString("base64");

const policy = [
  "default-src 'none'",
  `script-src ${hashOf(script)} 'wasm-unsafe-eval'`,
  `style-src ${hashOf(style)}`,
  "img-src data: blob:",
  "base-uri 'none'",
  "form-action 'none'",
].join("; ");

/** @type {Record<string, string>} */
const fields = {policy, style, script, core: corePieces(wasm)};
// A function as replacement: the texts hold dollar signs.
const page = asciiOf.markup(readFileSync(join(options.page, "index.html"), "utf8")).replace(/\{\{(\w+)\}\}/g, (_, name) => fields[name]);
writeFileSync(options.out, page);
console.log(`${options.out}: ${Buffer.byteLength(page)} bytes (script ${script.length}, style ${style.length}, core ${wasm.length})`);
