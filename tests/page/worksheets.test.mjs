// The shipped module under node: every example worksheet prints the text that the native build prints.
// The texts in tests/data/worksheets are the native ones; tests/core/page/examples_test.cpp holds the native build to them.
import assert from "node:assert/strict";
import {readFileSync, readdirSync} from "node:fs";
import {join} from "node:path";
import {test} from "node:test";
import {fileURLToPath} from "node:url";
import {ask, startNodeCore} from "./core_module.mjs";
import {worksheetFolder} from "./support.mjs";

const texts = fileURLToPath(new URL("../data/worksheets/", import.meta.url));
const ENDING = ".heatledger.json";
const names = readdirSync(worksheetFolder).filter((name) => name.endsWith(ENDING));

test("there are example worksheets", () => assert.ok(names.length >= 4));

for (const name of names) {
  test(`${name} prints the native text`, async () => {
    const core = await startNodeCore();
    const file = readFileSync(join(worksheetFolder, name), "utf8");
    const {sheet} = ask(core, {do: "open", text: file});
    const native = readFileSync(join(texts, name.replace(ENDING, ".txt")), "utf8");
    assert.equal(ask(core, {do: "text", sheet}), native);
    // Saved again it is the same file, byte for byte.
    assert.equal(ask(core, {do: "save", sheet}), file);
  });
}

test("malformed requests get an error, never a stop", async () => {
  const core = await startNodeCore();
  for (const text of ["", "{", "[]", '{"do": 1}', '{"do": "page", "sheet": 99}', '{"do": "edit"}', "\u0000", "{}".repeat(1000), "[".repeat(200000)]) {
    const answer = JSON.parse(core.requestText(text));
    assert.equal(answer.ok, false, text.slice(0, 40));
    assert.ok(answer.error.code && answer.error.message, text.slice(0, 40));
  }
  assert.equal(core.request({do: "new"}).ok, true);
});
