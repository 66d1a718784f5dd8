// How quick the page is in headless Chromium: opening the file, and an edit on a sheet of twenty reactions.
//   node tests/bench/page_bench.mjs [heatledger.html]      after: cmake --build --preset wasm --target heatledger_page
// Prints median and 95th percentile in milliseconds. Inputs are fixed: EQUATIONS below, four to a family.
import {statSync} from "node:fs";
import {loadavg} from "node:os";
import {pathToFileURL} from "node:url";
import {ask, startNodeCore} from "../page/core_module.mjs";
import {launch, pageFile} from "../page/support.mjs";

const file = process.argv[2] ?? pageFile;
const OPENINGS = 15;
const EDITS = 60;

/** Twenty reactions over some sixty species, as the figures to reach ask for. */
const EQUATIONS = [
  "nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)", "benzene(l) + Cl2 -> chlorobenzene(l) + HCl",
  "toluene(l) + Cl2 -> benzyl chloride(l) + HCl", "acetic acid(l) + ethanol(l) -> ethyl acetate(l) + H2O(l)",
  "CH4 + 2 O2 -> CO2 + 2 H2O", "2 CO + O2 -> 2 CO2", "2 H2 + O2 -> 2 H2O", "H2 + Cl2 -> 2 HCl",
  "N2 + 3 H2 -> 2 NH3", "CO + 2 H2 -> methanol(l)", "ethylene + H2 -> ethane", "propylene + H2 -> propane",
  "acetone(l) + H2 -> isopropanol(l)", "2 methanol(l) -> dimethyl ether + H2O(l)", "ethylene + H2O -> ethanol(l)",
  "cyclohexane(l) -> benzene(l) + 3 H2", "phenol(l) + 3 H2 -> cyclohexanol(l)", "acetylene + 2 H2 -> ethane",
  "formaldehyde + H2 -> methanol(l)", "2 NO + O2 -> 2 NO2",
];

/** @param {number[]} times */
function summary(times) {
  const sorted = [...times].sort((a, b) => a - b);
  const at = (/** @type {number} */ share) => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))];
  return `median ${at(0.5).toFixed(1)} ms, 95 % ${at(0.95).toFixed(1)} ms (${sorted.length} times)`;
}

async function twentyReactions() {
  const core = await startNodeCore();
  const {sheet} = ask(core, {do: "new"});
  EQUATIONS.forEach((text, index) => {
    if (index > 0) ask(core, {do: "command", sheet, name: "add_reaction"});
    ask(core, {do: "edit", sheet, cell: `r${index + 1}.equation`, text});
  });
  return ask(core, {do: "save", sheet});
}

const browser = await launch();
const url = pathToFileURL(file).href;
const load = () => `load average ${loadavg()[0].toFixed(1)}`;
console.log(`page file: ${statSync(file).size} bytes; ${load()}`);

const usable = [];
const painted = [];
for (let i = 0; i < OPENINGS; ++i) {
  const context = await browser.newContext({viewport: {width: 1280, height: 900}});
  const page = await context.newPage();
  // The page keeps its own times. The driver leaves it alone meanwhile: its helper is a script of 300 kB that would be
  // compiled in the page's thread just then.
  await page.goto(url, {waitUntil: "commit"});
  await new Promise((resolve) => setTimeout(resolve, 1500));
  await page.waitForSelector("html[data-ready]");
  const times = await page.evaluate(() => ({
    usable: performance.getEntriesByName("usable")[0].startTime,
    painted: performance.getEntriesByName("first-contentful-paint")[0].startTime,
  }));
  usable.push(times.usable);
  painted.push(times.painted);
  await context.close();
}
console.log(`from opening the file to a usable sheet: ${summary(usable)}`);
console.log(`  and to the first frame that shows something: ${summary(painted)}`);

const page = await browser.newPage({viewport: {width: 1280, height: 900}});
await page.goto(url);
await page.waitForSelector("html[data-ready]");
const transfer = await page.evaluateHandle((text) => {
  const data = new DataTransfer();
  data.items.add(new File([text], "twenty.heatledger.json", {type: "application/json"}));
  return data;
}, await twentyReactions());
await page.dispatchEvent("#sheet", "drop", {dataTransfer: transfer});
await page.waitForSelector('td[data-cell="r20.equation"]');

await page.evaluate(() => {
  /** @type {number[]} */
  const times = [];
  Object.assign(window, {times});
  /** @type {KeyboardEvent | null} */
  let key = null;
  window.addEventListener("keydown", (event) => (key = event.key === "Enter" ? event : key), {capture: true});
  // Called when the handlers of the key have changed the page, before anything else runs; it asks for the layout and so
  // waits until that is done. The last change of an edit counts, its working in the margin included.
  new MutationObserver(() => {
    if (!key) return;
    void document.body.offsetHeight;
    times[0] = performance.now() - key.timeStamp;
  }).observe(document.body, {subtree: true, childList: true, attributes: true, characterData: true});
});
/**
 * Types two spellings of one reaction in turn; each is a new ledger.
 * @param {string} id
 * @param {string[]} equations
 */
async function editTimes(id, equations) {
  const cell = page.locator(`td[data-cell="${id}"]`);
  await cell.scrollIntoViewIfNeeded();
  for (let i = 0; i < EDITS; ++i) {
    await cell.focus();
    await page.keyboard.press("F2");
    await page.keyboard.press("Control+a");
    await page.keyboard.insertText(equations[i % 2]);
    // Enter comes when the page has shown the last letter and rests, as it does for a person.
    await page.evaluate(() => new Promise((resolve) => requestAnimationFrame(() => requestIdleCallback(resolve))));
    await page.evaluate(() => void (/** @type {any} */ (window).times.length = 0));
    await page.keyboard.press("Enter");
    await page.evaluate(() => new Promise((resolve) => requestAnimationFrame(() => setTimeout(resolve, 0))));
    all.push(await page.evaluate(() => /** @type {any} */ (window).times[0]));
  }
}
/** @type {number[]} */
const all = [];
for (const [index, doubled] of /** @type {const} */ ([[0, "2 nitrobenzene(l) + 6 H2 -> 2 aniline(l) + 4 H2O(l)"], [9, "2 CO + 4 H2 -> 2 methanol(l)"], [19, "4 NO + 2 O2 -> 4 NO2"]])) {
  await editTimes(`r${index + 1}.equation`, [doubled, EQUATIONS[index]]);
}
console.log(`from Enter in an equation to the end of layout, twenty reactions: ${summary(all)}; ${load()}`);
await browser.close();
