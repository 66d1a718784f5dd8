// The right margin: all about the selected cell. The same view prints the appendix of workings.

import {make} from "./dom.js";

/** @typedef {import("../types.js").Margin} Margin */

export class MarginView {
  /** @param {HTMLElement} node */
  constructor(node) {
    this.node = node;
  }

  /** @param {Margin | null} margin */
  show(margin) {
    const empty = !margin || !(margin.value || margin.subject || margin.steps?.length || margin.sections?.length);
    this.node.replaceChildren(
      ...(empty
        ? [make("h2", "", "Working"), make("p", "quiet", "Select a figure on the sheet: its working, where it comes from and what to beware of stand here.")]
        : workingNodes(/** @type {Margin} */ (margin), "h2")),
    );
  }
}

/**
 * @param {Margin} margin
 * @param {"h2" | "h3"} level
 * @returns {HTMLElement[]}
 */
export function workingNodes(margin, level) {
  const nodes = [];
  if (level === "h2") nodes.push(make(level, "", "Working"));
  if (margin.value) nodes.push(make("p", "value", margin.value));
  if (margin.subject) nodes.push(make("p", "subject", margin.subject));
  if (margin.steps?.length) {
    const list = make("ol", "steps");
    list.append(...margin.steps.map((step) => make("li", "", step)));
    nodes.push(list);
  }
  if (margin.sources?.length) {
    const list = make("ul", "sources");
    list.append(...margin.sources.map((source) => make("li", "", source)));
    nodes.push(list);
  }
  for (const section of margin.sections ?? []) {
    const node = make("section");
    node.append(make(level, "", section.heading), ...section.notes.map((note) => make("p", `note note-${note.kind ?? "info"}`, note.text)));
    nodes.push(node);
  }
  return nodes;
}

/**
 * Every working of the sheet, for the printed appendix.
 * @param {HTMLElement} node
 * @param {Margin[]} margins
 */
export function showAppendix(node, margins) {
  node.replaceChildren(
    make("h2", "", "Workings"),
    ...margins.map((margin) => {
      const entry = make("section", "working");
      entry.append(...workingNodes(margin, "h3"));
      return entry;
    }),
  );
}
