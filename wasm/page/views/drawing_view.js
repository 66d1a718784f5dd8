// One drawing of the page as inline SVG. Coordinates come in points; roles become classes, ink is the style sheet's.

import {make, setShapes, shape} from "./dom.js";

/**
 * @typedef {import("../types.js").DrawingBlock} DrawingBlock
 * @typedef {import("./dom.js").Shape} Shape
 */

const anchors = {left: "start", right: "end", centre: "middle"};

export class DrawingView {
  /** @param {string} id */
  constructor(id) {
    this.node = make("figure", "block drawing-block");
    this.node.dataset.block = id;
  }

  /** @param {DrawingBlock} drawing */
  show(drawing) {
    const texts = drawing.words ?? [];
    /** @type {Shape} */
    const svg = {
      tag: "svg",
      attributes: {
        viewBox: `0 0 ${drawing.width} ${drawing.height}`,
        width: `${drawing.width}pt`,
        height: `${drawing.height}pt`,
        role: "img",
        "aria-label": [drawing.title, ...texts.map((words) => words.text)].filter(Boolean).join("; "),
      },
      children: [
        ...(drawing.fills ?? []).map((fill) => polygon(fill.ink ?? "band", fill.xy)),
        ...(drawing.strokes ?? []).flatMap(drawStroke),
        ...texts.map((words) => ({
          tag: "text",
          attributes: {
            class: `ink-${words.ink ?? "text"}`,
            x: String(words.x),
            y: String(words.y),
            "text-anchor": anchors[words.anchor ?? "left"],
            "font-size": String(words.size ?? 11),
          },
          text: words.text,
        })),
      ],
    };
    setShapes(this.node, drawing.title ? [shape("figcaption", "", drawing.title), svg] : [svg]);
  }
}

/**
 * @param {string} ink
 * @param {number[]} points
 * @returns {Shape}
 */
function polygon(ink, points) {
  return {tag: "polygon", attributes: {class: `fill-${ink}`, points: points.join(" ")}};
}

/**
 * @param {import("../types.js").Stroke} stroke
 * @returns {Shape[]}
 */
function drawStroke(stroke) {
  const width = stroke.width ?? 1;
  const ink = stroke.ink ?? "plain";
  /** @type {Shape} */
  const line = {
    tag: "polyline",
    attributes: {class: `stroke-${ink}${stroke.dashed ? " dashed" : ""}`, points: stroke.xy.join(" "), "stroke-width": String(width)},
  };
  const n = stroke.xy.length;
  if (!stroke.arrow || n < 4) return [line];
  // The head is drawn at the last point, along the last segment.
  const [x0, y0, x1, y1] = stroke.xy.slice(n - 4);
  const length = Math.hypot(x1 - x0, y1 - y0) || 1;
  const [dx, dy] = [(x1 - x0) / length, (y1 - y0) / length];
  const size = 4 + 2 * width;
  const [bx, by] = [x1 - dx * size, y1 - dy * size];
  const half = size / 2;
  return [line, polygon(ink, [x1, y1, bx - dy * half, by + dx * half, bx + dy * half, by - dx * half])];
}
