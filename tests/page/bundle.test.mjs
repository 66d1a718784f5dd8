// The one file that is shipped: its size, what it asks of the network, what its policy lets run.
import assert from "node:assert/strict";
import {readFileSync, statSync} from "node:fs";
import {test} from "node:test";
import {pageFile, withBrowser} from "./support.mjs";

const browser = withBrowser();

test("the page file with every kind of step stays within 2.5 MB", () => {
  const bytes = statSync(pageFile).size;
  console.log(`page file: ${bytes} bytes`);
  assert.ok(bytes <= 2_500_000, `${bytes} bytes`);
});

test("the page file is pure ASCII, which the browser parses in half the time", () => {
  const bytes = readFileSync(pageFile);
  const at = bytes.findIndex((byte) => byte > 0x7f);
  assert.equal(at, -1, `${bytes.subarray(at - 40, at + 4)}`);
});

test("the page opens from disk and asks for nothing but itself", async () => {
  const page = await browser.open();
  /** @type {string[]} */
  const asked = [];
  page.on("request", (request) => asked.push(request.url()));
  await page.reload();
  await page.waitForSelector("html[data-ready]");
  await page.waitForLoadState("networkidle");
  assert.deepEqual(asked, [page.url()]);
  assert.match(page.url(), /^file:/);
});

test("the file names no address that a browser could load from", () => {
  const text = readFileSync(pageFile, "utf8").replaceAll("http://www.w3.org/2000/svg", "");
  assert.doesNotMatch(text, /https?:\/\/(?!www\.w3\.org)/);
  assert.doesNotMatch(text, /\b(src|href)="/);
});

test("the policy refuses requests and scripts from elsewhere", async () => {
  const page = await browser.open();
  const refused = await page.evaluate(async () => {
    /** @type {string[]} */
    const violations = [];
    document.addEventListener("securitypolicyviolation", (event) => violations.push(event.effectiveDirective));
    await fetch("https://example.invalid/").catch(() => {});
    const script = document.createElement("script");
    script.textContent = "document.documentElement.dataset.injected = 'yes'";
    document.body.append(script);
    const image = document.createElement("img");
    image.src = "https://example.invalid/x.png";
    await new Promise((resolve) => setTimeout(resolve, 100));
    return {violations, injected: document.documentElement.dataset.injected ?? ""};
  });
  assert.equal(refused.injected, "");
  assert.deepEqual(refused.violations.sort(), ["connect-src", "img-src", "script-src-elem"]);
});
