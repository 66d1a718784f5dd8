// One drawing of the page as inline SVG. Coordinates come in points; roles become classes, ink is the style sheet's.

import {make, makeSvg} from "./dom.js";

/** @typedef {import("../types.js").DrawingBlock} DrawingBlock */

const anchors = {left: "start", right: "end", centre: "middle"};

export class DrawingView {
  /** @param {string} id */
  constructor(id) {
    this.node = make("figure", "block drawing-block");
    this.node.dataset.block = id;
    this.title = make("figcaption");
  }

  /** @param {DrawingBlock} drawing */
  show(drawing) {
    this.title.textContent = drawing.title ?? "";
    const svg = makeSvg("svg", {
      viewBox: `0 0 ${drawing.width} ${drawing.height}`,
      width: `${drawing.width}pt`,
      height: `${drawing.height}pt`,
      role: "img",
      "aria-label": [drawing.title, ...(drawing.words ?? []).map((words) => words.text)].filter(Boolean).join("; "),
    });
    for (const fill of drawing.fills ?? []) {
      svg.append(makeSvg("polygon", {class: `fill-${fill.ink ?? "band"}`, points: fill.xy.join(" ")}));
    }
    for (const stroke of drawing.strokes ?? []) svg.append(...drawStroke(stroke));
    for (const words of drawing.words ?? []) {
      const text = makeSvg("text", {
        class: `ink-${words.ink ?? "text"}`,
        x: words.x,
        y: words.y,
        "text-anchor": anchors[words.anchor ?? "left"],
        "font-size": words.size ?? 11,
      });
      text.textContent = words.text;
      svg.append(text);
    }
    this.node.replaceChildren(...(drawing.title ? [this.title] : []), svg);
  }
}

/**
 * @param {import("../types.js").Stroke} stroke
 * @returns {SVGElement[]}
 */
function drawStroke(stroke) {
  const width = stroke.width ?? 1;
  const ink = stroke.ink ?? "plain";
  const line = makeSvg("polyline", {class: `stroke-${ink}${stroke.dashed ? " dashed" : ""}`, points: stroke.xy.join(" "), "stroke-width": width});
  const n = stroke.xy.length;
  if (!stroke.arrow || n < 4) return [line];
  // The head is drawn at the last point, along the last segment.
  const [x0, y0, x1, y1] = stroke.xy.slice(n - 4);
  const length = Math.hypot(x1 - x0, y1 - y0) || 1;
  const [dx, dy] = [(x1 - x0) / length, (y1 - y0) / length];
  const size = 4 + 2 * width;
  const [bx, by] = [x1 - dx * size, y1 - dy * size];
  const half = size / 2;
  const points = [x1, y1, bx - dy * half, by + dx * half, bx + dy * half, by - dx * half];
  return [line, makeSvg("polygon", {class: `fill-${ink}`, points: points.join(" ")})];
}
