// What the page tests share: a browser for each test file, a fresh page for each test, and the sheet's cells by id.
import {mkdtempSync, rmSync} from "node:fs";
import {tmpdir} from "node:os";
import {join} from "node:path";
import {after, before} from "node:test";
import {fileURLToPath, pathToFileURL} from "node:url";
import {chromium} from "playwright-core";

const root = fileURLToPath(new URL("../../", import.meta.url));

export const pageFile = process.env.HEATLEDGER_PAGE ?? join(root, "build/wasm/wasm/heatledger.html");
export const coreFile = process.env.HEATLEDGER_CORE ?? join(root, "build/wasm/wasm/heatledger_core.js");
export const worksheetFolder = join(root, "worksheets");

/** Without a GPU, a sandbox or any traffic of the browser's own. */
export const browserArguments = [
  "--headless", "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run",
  "--disable-background-networking", "--disable-component-update", "--disable-sync",
];

export function launch() {
  return chromium.launch({executablePath: process.env.HEATLEDGER_CHROMIUM ?? "/usr/bin/chromium", args: browserArguments});
}

/**
 * A page driver for the tests of one file.
 * @returns {{open: (how?: {pickers?: boolean, url?: string}) => Promise<import("playwright-core").Page>, folder: () => string}}
 */
export function withBrowser() {
  /** @type {import("playwright-core").Browser} */
  let browser;
  let folder = "";
  before(async () => {
    browser = await launch();
    folder = mkdtempSync(join(tmpdir(), "heatledger-page-"));
  });
  after(async () => {
    await browser?.close();
    rmSync(folder, {recursive: true, force: true});
  });
  return {
    folder: () => folder,
    /** Opens the page from disk; any error in it fails the test that meets it. */
    async open({pickers = false, url = pathToFileURL(pageFile).href} = {}) {
      const context = await browser.newContext({viewport: {width: 1280, height: 900}, acceptDownloads: true});
      const page = await context.newPage();
      page.on("pageerror", (error) => {
        throw error;
      });
      // The system's file pickers cannot be driven; without them the page uses an upload field and downloads.
      if (!pickers) {
        await page.addInitScript(() => {
          Reflect.deleteProperty(window, "showOpenFilePicker");
          Reflect.deleteProperty(window, "showSaveFilePicker");
        });
      }
      await page.goto(url);
      await page.waitForSelector("html[data-ready]");
      return page;
    },
  };
}

/**
 * @param {import("playwright-core").Page} page
 * @param {string} id
 */
export function cell(page, id) {
  return page.locator(`td[data-cell="${id}"]`);
}
