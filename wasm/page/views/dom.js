// Small helpers over the DOM. Text goes in as text only; nothing here parses markup.

/**
 * @template {keyof HTMLElementTagNameMap} Tag
 * @param {Tag} tag
 * @param {string} [className]
 * @param {string} [text]
 * @returns {HTMLElementTagNameMap[Tag]}
 */
export function make(tag, className, text) {
  const node = document.createElement(tag);
  if (className) node.className = className;
  if (text) node.textContent = text;
  return node;
}

/**
 * An element as it should be. Every shape of one tag under one parent names the same attributes.
 * @typedef {{tag: string, attributes?: Record<string, string>, text?: string, children?: Shape[]}} Shape
 */

const SVG = "http://www.w3.org/2000/svg";

/**
 * Makes the children of `parent` those wanted. Elements that are there already are written over where they differ, which
 * costs far less than new ones: those would be styled, boxed and laid out from nothing.
 * @param {Element} parent
 * @param {Shape[]} wanted
 */
export function setShapes(parent, wanted) {
  let at = parent.firstElementChild;
  for (const shape of wanted) {
    let node = at;
    if (!node || node.localName !== shape.tag) {
      node = document.createElementNS(shape.tag === "svg" ? SVG : parent.namespaceURI, shape.tag);
      if (at) at.replaceWith(node);
      else parent.append(node);
    }
    at = node.nextElementSibling;
    const {attributes = {}, children, text = ""} = shape;
    for (const name in attributes) setAttribute(node, name, attributes[name]);
    if (children) setShapes(node, children);
    else setText(node, text);
  }
  while (at) {
    const next = at.nextElementSibling;
    at.remove();
    at = next;
  }
}

/**
 * @param {string} tag
 * @param {string} className
 * @param {string | Shape[]} content
 * @returns {Shape}
 */
export function shape(tag, className, content) {
  /** @type {Record<string, string>} */
  const attributes = className ? {class: className} : {};
  return typeof content === "string" ? {tag, attributes, text: content} : {tag, attributes, children: content};
}

/**
 * Sets, changes or removes an attribute.
 * @param {Element} node
 * @param {string} name
 * @param {string | null} value
 */
export function setAttribute(node, name, value) {
  if (value === null) {
    if (node.hasAttribute(name)) node.removeAttribute(name);
  } else if (node.getAttribute(name) !== value) {
    node.setAttribute(name, value);
  }
}

/**
 * Written only when it differs: even the same class anew makes the browser match every rule again.
 * @param {Element} node
 * @param {string} className
 */
export function setClass(node, className) {
  if (node.className !== className) node.className = className;
}

/**
 * Changes the text in place: a new text node would be boxed and laid out from nothing.
 * @param {Element} node
 * @param {string} text
 */
export function setText(node, text) {
  const only = node.childNodes.length === 1 ? node.firstChild : null;
  if (only instanceof Text && text) {
    if (only.data !== text) only.data = text;
  } else if (node.textContent !== text) {
    node.textContent = text;
  }
}

/**
 * Makes the children of `parent` exactly `wanted`, moving as little as possible.
 * @param {Element} parent
 * @param {Element[]} wanted
 */
export function setChildren(parent, wanted) {
  let at = parent.firstElementChild;
  for (const node of wanted) {
    if (node === at) {
      at = at.nextElementSibling;
    } else {
      parent.insertBefore(node, at);
    }
  }
  while (at) {
    const next = at.nextElementSibling;
    at.remove();
    at = next;
  }
}
