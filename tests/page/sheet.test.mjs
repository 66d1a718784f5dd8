// Working on a sheet as an engineer does: with keys, with the mouse, with mistakes.
import assert from "node:assert/strict";
import {test} from "node:test";
import {cell, withBrowser} from "./support.mjs";

const browser = withBrowser();

/**
 * @param {import("playwright-core").Page} page
 * @param {string} equation
 */
async function typeEquation(page, equation) {
  await cell(page, "r1.equation").click();
  await page.keyboard.type(equation);
  await page.keyboard.press("Enter");
}

/**
 * @param {import("playwright-core").Page} page
 * @param {string} id
 */
const textOf = (page, id) => cell(page, id).locator(".text").textContent();

/** A printed figure as a number: true minus, thin spaces. @param {string | null} text */
const figure = (text) => Number((text ?? "").replace("\u2212", "-").replace(/[\u2009\s]/g, ""));

test("an equation typed as text becomes a ledger whose columns add up", async () => {
  const page = await browser.open();
  await typeEquation(page, "nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)");
  assert.equal(await textOf(page, "r1.equation"), "nitrobenzene(l) + 3 H\u2082 \u2192 aniline(l) + 2 H\u2082O(l)");
  assert.match((await textOf(page, "r1.balance")) ?? "", /C 6, H 11, N 1, O 2/);
  const broken = figure(await textOf(page, "r1.row.0.broken")) + figure(await textOf(page, "r1.row.1.broken"));
  const formed = figure(await textOf(page, "r1.row.2.formed")) + figure(await textOf(page, "r1.row.3.formed"));
  // Printed figures are rounded each for itself: one unit of the last digit per term.
  assert.ok(Math.abs(broken - figure(await textOf(page, "r1.sum.broken"))) <= 1);
  assert.ok(Math.abs(formed - figure(await textOf(page, "r1.sum.formed"))) <= 1);
  assert.ok(Math.abs(broken - formed - figure(await textOf(page, "r1.gas_298"))) <= 2);
  assert.ok(figure(await textOf(page, "r1.gas_298")) < 0);
});

test("a coefficient edited in the ledger changes the row, the sum and the balance", async () => {
  const page = await browser.open();
  await typeEquation(page, "2 H2 + O2 -> 2 H2O");
  const before = figure(await textOf(page, "r1.row.0.broken"));
  await cell(page, "r1.row.0.times").click();
  await page.keyboard.type("3");
  await page.keyboard.press("Enter");
  assert.match((await textOf(page, "r1.equation")) ?? "", /^3 H\u2082/);
  assert.match((await textOf(page, "r1.balance")) ?? "", /not balanced.*H 6 \u2192 4/);
  await page.keyboard.press("Control+z");
  assert.equal(figure(await textOf(page, "r1.row.0.broken")), before);
  await page.keyboard.press("Control+y");
  assert.match((await textOf(page, "r1.equation")) ?? "", /^3 H\u2082/);
});

test("a row unfolds to its bonds and folds again, by mouse and by key", async () => {
  const page = await browser.open();
  await typeEquation(page, "CH4 + 2 O2 -> CO2 + 2 H2O");
  const row = page.locator('tr[data-fold="r1.row.0"]');
  assert.equal(await row.getAttribute("aria-expanded"), "false");
  await cell(page, "r1.row.0.species").click();
  assert.equal(await row.getAttribute("aria-expanded"), "true");
  assert.match((await page.locator("tr.row-detail").first().textContent()) ?? "", /C.H/);
  await page.keyboard.press("Enter");
  assert.equal(await row.getAttribute("aria-expanded"), "false");
  assert.equal(await page.locator("tr.row-detail").count(), 0);
});

test("the margin shows the working of the selected figure", async () => {
  const page = await browser.open();
  await typeEquation(page, "H2 + Cl2 -> 2 HCl");
  await cell(page, "r1.gas_298").click();
  const shown = await textOf(page, "r1.gas_298");
  const margin = page.locator("#margin");
  assert.ok(((await margin.textContent()) ?? "").includes(shown ?? "?"));
  assert.ok((await margin.locator("ol.steps li").count()) >= 1);
});

test("an equation that cannot be read stays in its cell, with its error beside it", async () => {
  const page = await browser.open();
  await typeEquation(page, "H2 + unobtainium -> H2O");
  assert.equal(await textOf(page, "r1.equation"), "H2 + unobtainium -> H2O");
  const field = cell(page, "r1.equation");
  assert.equal(await field.getAttribute("aria-invalid"), "true");
  const note = page.locator(`[id="${await field.getAttribute("aria-describedby")}"]`);
  assert.match((await note.textContent()) ?? "", /unobtainium/);
  await typeEquation(page, "");
  await cell(page, "r1.equation").click();
  await page.keyboard.press("Control+a");
  await page.keyboard.type("2 H2 + O2 -> 2 H2O");
  await page.keyboard.press("Enter");
  assert.equal(await cell(page, "r1.equation").getAttribute("aria-invalid"), null);
  assert.equal(await page.locator(".note-error").count(), 0);
});

test("a half-typed species is completed from the list", async () => {
  const page = await browser.open();
  await cell(page, "r1.equation").click();
  await page.keyboard.type("3 H2 + nitrob");
  const list = page.locator(".choice-list:visible");
  const names = await list.locator("li > span:first-child").allTextContents();
  const wanted = names.findIndex((name) => /^nitrobenz(ene|ol)$/.test(name));
  assert.ok(wanted >= 0, names.join(" | "));
  for (let i = 0; i <= wanted; ++i) await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Enter");
  assert.equal(await page.locator(".cell-field").inputValue(), `3 H2 + ${names[wanted]}`);
  await page.keyboard.type(" -> aniline + 2 water");
  await page.keyboard.press("Escape");
  await page.keyboard.press("Enter");
  assert.match((await textOf(page, "r1.balance")) ?? "", /^balanced/);
});

test("Esc gives an edit up and leaves the sheet as it was", async () => {
  const page = await browser.open();
  await typeEquation(page, "H2 + Cl2 -> 2 HCl");
  const before = await textOf(page, "r1.equation");
  await page.keyboard.press("F2");
  await page.keyboard.type(" and more");
  await page.keyboard.press("Escape");
  assert.equal(await textOf(page, "r1.equation"), before);
  assert.equal(await page.evaluate(() => document.activeElement?.getAttribute("data-cell")), "r1.equation");
});

test("the whole sheet is filled in with keys alone", async () => {
  const page = await browser.open();
  const focused = () => page.evaluate(() => document.activeElement?.getAttribute("data-cell") ?? document.activeElement?.tagName ?? "");
  for (let i = 0; i < 12 && (await focused()) !== "header.title"; ++i) await page.keyboard.press("Tab");
  assert.equal(await focused(), "header.title");
  await page.keyboard.type("Chlorine burner");
  await page.keyboard.press("Tab");
  assert.equal(await focused(), "header.subtitle");
  await page.keyboard.type("Duty, draft");
  for (let i = 0; i < 12 && (await focused()) !== "r1.equation"; ++i) await page.keyboard.press("Tab");
  assert.equal(await focused(), "r1.equation");
  await page.keyboard.type("H2 + Cl2 -> 2 HCl");
  await page.keyboard.press("Enter");
  assert.equal(await focused(), "r1.equation");
  assert.equal(await textOf(page, "header.title"), "Chlorine burner");
  assert.equal(await page.title(), "Chlorine burner \u2013 Heatledger");
  // Down to the ledger and along a row: every figure can be reached, and its working appears.
  for (let i = 0; i < 12 && (await focused()) !== "r1.row.0.species"; ++i) await page.keyboard.press("ArrowDown");
  assert.equal(await focused(), "r1.row.0.species");
  for (let i = 0; i < 8 && (await focused()) !== "r1.row.0.broken"; ++i) await page.keyboard.press("ArrowRight");
  assert.equal(await focused(), "r1.row.0.broken");
  assert.ok(((await page.locator("#margin .value").textContent()) ?? "").length > 0);
  await page.keyboard.press("ArrowLeft");
  await page.keyboard.press("Control+End");
  await page.keyboard.press("Control+Home");
  assert.equal(await focused(), "header.title");
  await page.keyboard.press("Shift+Tab");
  assert.equal(await page.evaluate(() => document.activeElement?.tagName), "BUTTON");
});

test("a choice is made from its list by keys", async () => {
  const page = await browser.open();
  await typeEquation(page, "2 H2 + O2 -> 2 H2O");
  const before = figure(await textOf(page, "r1.gas_298"));
  await cell(page, "r1.basis").focus();
  await page.keyboard.press("Enter");
  const options = await page.locator(".choice-list:visible li").allTextContents();
  const wanted = options.findIndex((text) => /per mol H/.test(text));
  assert.ok(wanted >= 0, options.join(" | "));
  const now = options.indexOf((await cell(page, "r1.basis").locator("input").inputValue()) ?? "");
  for (let i = now; i < wanted; ++i) await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Enter");
  assert.equal(await textOf(page, "r1.basis"), options[wanted]);
  // Half of two moles' heat; both printed to the same last digit.
  assert.ok(Math.abs(figure(await textOf(page, "r1.gas_298")) * 2 - before) <= 2);
});

test("the palette lists what can be done and does it", async () => {
  const page = await browser.open();
  await page.keyboard.press("Control+k");
  const items = await page.locator(".palette li").allTextContents();
  for (const wanted of ["New", "Open", "Save", "Print"]) assert.ok(items.some((item) => item.startsWith(wanted)), wanted);
  await page.keyboard.type("add reaction");
  await page.keyboard.press("Enter");
  assert.equal(await cell(page, "r2.equation").count(), 1);
  assert.equal(await page.locator("dialog[open]").count(), 0);
});
