// The right margin: all about the selected cell. The same view prints the appendix of workings.

import {setShapes, shape} from "./dom.js";

/**
 * @typedef {import("../types.js").Margin} Margin
 * @typedef {import("./dom.js").Shape} Shape
 */

export class MarginView {
  /** @param {HTMLElement} node */
  constructor(node) {
    this.node = node;
  }

  /** @param {Margin | null} margin */
  show(margin) {
    const empty = !margin || !(margin.value || margin.subject || margin.steps?.length || margin.sections?.length);
    setShapes(
      this.node,
      empty
        ? [shape("h2", "", "Working"), shape("p", "quiet", "Select a figure on the sheet: its working, where it comes from and what to beware of stand here.")]
        : workingShapes(/** @type {Margin} */ (margin), "h2"),
    );
  }
}

/**
 * @param {Margin} margin
 * @param {"h2" | "h3"} level
 * @returns {Shape[]}
 */
function workingShapes(margin, level) {
  const shapes = [];
  if (level === "h2") shapes.push(shape(level, "", "Working"));
  if (margin.value) shapes.push(shape("p", "value", margin.value));
  if (margin.subject) shapes.push(shape("p", "subject", margin.subject));
  if (margin.steps?.length) shapes.push(shape("ol", "steps", margin.steps.map((step) => shape("li", "", step))));
  if (margin.sources?.length) shapes.push(shape("ul", "sources", margin.sources.map((source) => shape("li", "", source))));
  for (const section of margin.sections ?? []) {
    const notes = section.notes.map((note) => shape("p", `note note-${note.kind ?? "info"}`, note.text));
    shapes.push(shape("section", "", [shape(level, "", section.heading), ...notes]));
  }
  return shapes;
}

/**
 * Every working of the sheet, for the printed appendix.
 * @param {HTMLElement} node
 * @param {Margin[]} margins
 */
export function showAppendix(node, margins) {
  setShapes(node, [shape("h2", "", "Workings"), ...margins.map((margin) => shape("section", "working", workingShapes(margin, "h3")))]);
}
