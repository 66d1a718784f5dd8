// Worksheet files: saved, reopened, dropped, refused, and never lost by leaving.
import assert from "node:assert/strict";
import {readFileSync, writeFileSync} from "node:fs";
import {join} from "node:path";
import {test} from "node:test";
import {cell, withBrowser} from "./support.mjs";

const browser = withBrowser();
const EQUATION = "H2 + Cl2 -> 2 HCl";

/** @param {import("playwright-core").Page} page */
async function fillIn(page) {
  await cell(page, "header.title").click();
  await page.keyboard.type("Chlorine burner");
  await page.keyboard.press("Enter");
  await cell(page, "r1.equation").click();
  await page.keyboard.type(EQUATION);
  await page.keyboard.press("Enter");
}

/**
 * @param {import("playwright-core").Page} page
 * @returns {Promise<{name: string, path: string}>}
 */
async function saveByDownload(page) {
  const [download] = await Promise.all([page.waitForEvent("download"), page.keyboard.press("Control+s")]);
  const path = join(browser.folder(), download.suggestedFilename());
  await download.saveAs(path);
  return {name: download.suggestedFilename(), path};
}

/** @param {import("playwright-core").Page} page */
const shown = (page) => page.locator("#sheet").evaluate((node) => /** @type {HTMLElement} */ (node).innerText);

test("a saved sheet opens again as the same sheet", async () => {
  const page = await browser.open();
  await fillIn(page);
  assert.match((await page.locator("#bar .state").textContent()) ?? "", /not saved/);
  const before = await shown(page);
  const file = await saveByDownload(page);
  assert.equal(file.name, "chlorine-burner.heatledger.json");
  assert.equal(JSON.parse(readFileSync(file.path, "utf8")).format, "heatledger-worksheet");
  assert.match((await page.locator("#bar .state").textContent()) ?? "", /^saved /);

  const other = await browser.open();
  const waiting = other.waitForEvent("filechooser");
  // One round trip, so that the driver listens for the chooser before the key asks for it.
  await other.evaluate(() => 0);
  await other.keyboard.press("Control+o");
  const chooser = await waiting;
  await chooser.setFiles(file.path);
  await cell(other, "r1.gas_298").waitFor();
  assert.equal(await shown(other), before);
  assert.match((await other.locator("#bar .file").textContent()) ?? "", /chlorine-burner/);
});

test("Save writes in place where the browser lets a page do that", async () => {
  const page = await browser.open({pickers: true});
  await page.evaluate(() => {
    const written = /** @type {string[]} */ ([]);
    const handle = {name: "burner.heatledger.json", createWritable: async () => ({write: async (/** @type {string} */ text) => written.push(text), close: async () => {}})};
    Object.assign(window, {written, asked: 0, showSaveFilePicker: async () => (Object.assign(window, {asked: /** @type {any} */ (window).asked + 1}), handle)});
  });
  await fillIn(page);
  await page.keyboard.press("Control+s");
  await page.waitForFunction(() => /** @type {any} */ (window).written.length === 1);
  await cell(page, "header.subtitle").click();
  await page.keyboard.type("Revised");
  await page.keyboard.press("Control+s");
  await page.waitForFunction(() => /** @type {any} */ (window).written.length === 2);
  assert.equal(await page.evaluate(() => /** @type {any} */ (window).asked), 1);
  // The text still in the field when Ctrl+S was pressed is in the file.
  assert.match(await page.evaluate(() => /** @type {any} */ (window).written[1]), /Revised/);
  assert.match((await page.locator("#bar .file").textContent()) ?? "", /burner\.heatledger\.json/);
});

/**
 * @param {import("playwright-core").Page} page
 * @param {string} name
 * @param {string} text
 */
async function drop(page, name, text) {
  const transfer = await page.evaluateHandle(
    ([fileName, content]) => {
      const data = new DataTransfer();
      data.items.add(new File([content], fileName, {type: "application/json"}));
      return data;
    },
    [name, text],
  );
  await page.dispatchEvent("#sheet", "drop", {dataTransfer: transfer});
}

test("a dropped file is opened", async () => {
  const page = await browser.open();
  await fillIn(page);
  const file = await saveByDownload(page);
  const other = await browser.open();
  await drop(other, file.name, readFileSync(file.path, "utf8"));
  await cell(other, "r1.gas_298").waitFor();
  assert.equal(await cell(other, "header.title").locator(".text").textContent(), "Chlorine burner");
});

test("a file that is no worksheet is refused in plain words and the sheet stays", async () => {
  const page = await browser.open();
  await fillIn(page);
  await saveByDownload(page);
  for (const [name, text] of [["list.json", "[1, 2"], ["other.json", '{"format": "something-else"}'], ["newer.json", '{"format": "heatledger-worksheet", "version": 9999}']]) {
    await drop(page, name, text);
    await page.waitForFunction((wanted) => document.getElementById("message")?.textContent?.includes(wanted), `${name} was not opened.`);
    assert.equal(await cell(page, "header.title").locator(".text").textContent(), "Chlorine burner");
  }
  // The next edit clears the message.
  await cell(page, "header.subtitle").click();
  await page.keyboard.type("x");
  await page.keyboard.press("Enter");
  assert.equal(await page.locator("#message").textContent(), "");
});

test("edits that no file holds are not lost by opening another sheet", async () => {
  const page = await browser.open();
  await fillIn(page);
  writeFileSync(join(browser.folder(), "empty.json"), "");
  await page.locator('#bar [data-action="new"]').click();
  await page.locator("dialog.question").waitFor();
  await page.keyboard.press("Escape");
  assert.equal(await cell(page, "header.title").locator(".text").textContent(), "Chlorine burner");
  await page.locator('#bar [data-action="new"]').click();
  const [download] = await Promise.all([page.waitForEvent("download"), page.locator('dialog.question button[value="save"]').click()]);
  assert.match(download.suggestedFilename(), /^chlorine-burner/);
  await page.waitForFunction(() => !document.querySelector('[data-cell="r1.gas_298"]'));
  assert.match((await page.locator("#bar .file").textContent()) ?? "", /no file yet/);
});

test("leaving the page with edits that no file holds is asked about, without them it is not", async () => {
  const page = await browser.open();
  /** @type {string[]} */
  const asked = [];
  page.on("dialog", (dialog) => {
    asked.push(dialog.type());
    dialog.accept();
  });
  await page.reload();
  await page.waitForSelector("html[data-ready]");
  assert.deepEqual(asked, []);
  // The text is still in the field: leaving takes it over before asking.
  await cell(page, "r1.equation").click();
  await page.keyboard.type(EQUATION);
  await page.reload();
  assert.deepEqual(asked, ["beforeunload"]);
});

test("reports and tables are saved beside the sheet", async () => {
  const page = await browser.open();
  await fillIn(page);
  for (const [words, name, wanted] of [["report", "chlorine-burner.html", /<html/i], ["csv", "chlorine-burner.csv", /HCl/]]) {
    await page.keyboard.press("Control+k");
    await page.keyboard.type(/** @type {string} */ (words));
    const [download] = await Promise.all([page.waitForEvent("download"), page.keyboard.press("Enter")]);
    assert.equal(download.suggestedFilename(), name);
    const path = join(browser.folder(), download.suggestedFilename());
    await download.saveAs(path);
    assert.match(readFileSync(path, "utf8"), /** @type {RegExp} */ (wanted));
  }
});
