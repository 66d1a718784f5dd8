// The sheet on paper: A4 and Letter, without bar and margin, with the workings when they are asked for.
import assert from "node:assert/strict";
import {execFileSync} from "node:child_process";
import {writeFileSync} from "node:fs";
import {join} from "node:path";
import {test} from "node:test";
import {cell, withBrowser} from "./support.mjs";

const browser = withBrowser();

/**
 * @param {import("playwright-core").Page} page
 * @param {string} name
 * @param {"A4" | "Letter"} format
 */
async function printed(page, name, format) {
  const file = join(browser.folder(), name);
  writeFileSync(file, await page.pdf({format, preferCSSPageSize: false, printBackground: true}));
  const info = execFileSync("pdfinfo", [file], {encoding: "utf8"});
  return {
    pages: Number(/Pages:\s+(\d+)/.exec(info)?.[1]),
    size: /Page size:\s+([\d.]+) x ([\d.]+)/.exec(info)?.slice(1).map(Number) ?? [],
    text: execFileSync("pdftotext", ["-layout", file, "-"], {encoding: "utf8"}),
  };
}

/** @param {import("playwright-core").Page} page */
async function fillIn(page) {
  await cell(page, "header.title").click();
  await page.keyboard.type("Hydrogenation, R-204");
  await page.keyboard.press("Enter");
  await cell(page, "r1.equation").click();
  await page.keyboard.type("nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)");
  await page.keyboard.press("Enter");
}

for (const [format, width, height] of /** @type {const} */ ([["A4", 595, 842], ["Letter", 612, 792]])) {
  test(`a sheet with one reaction prints on ${format}`, async () => {
    const page = await browser.open();
    await fillIn(page);
    const paper = await printed(page, `${format}.pdf`, format);
    // Points, rounded by the printer to whole ones.
    assert.ok(Math.abs(paper.size[0] - width) <= 1 && Math.abs(paper.size[1] - height) <= 1, String(paper.size));
    assert.ok(paper.pages >= 1 && paper.pages <= 2, `${paper.pages} pages`);
    assert.match(paper.text, /Hydrogenation, R-204/);
    assert.match(paper.text, /Sum of bonds/);
    const total = ((await cell(page, "r1.gas_298").locator(".text").textContent()) ?? "").replaceAll("\u2009", "");
    assert.ok(paper.text.replace(/[\u2009 ]/g, "").includes(total), total);
    // Neither the bar, nor the margin, nor the prompts of empty cells.
    assert.doesNotMatch(paper.text, /Ctrl K|Select a figure|plant, purpose|an assumption this sheet/);
  });
}

test("the workings print as an appendix when asked for, and only then", async () => {
  const page = await browser.open();
  await fillIn(page);
  const plain = await printed(page, "plain.pdf", "A4");
  assert.doesNotMatch(plain.text, /^\s*WORKINGS\s*$/m);
  // The print dialog would wait for a person; the sheet is printed as it stands while it is up.
  await page.evaluate(() => {
    window.print = () => {};
  });
  await page.keyboard.press("Control+k");
  await page.keyboard.type("print with");
  await page.keyboard.press("Enter");
  const full = await printed(page, "full.pdf", "A4");
  assert.match(full.text, /^\s*WORKINGS\s*$/m);
  assert.ok(full.pages > plain.pages);
});
