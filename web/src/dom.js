/**
 * Elements made and brought up to date. A view builds its whole picture anew; `morph` carries what differs
 * into the page, so focus, scrolling and what is half typed stay where they are.
 */

const SVG = 'http://www.w3.org/2000/svg';

/** @typedef {Node | string | number | null | undefined | boolean | readonly any[]} Kid a list holds more of the same */

/** @param {Element} el @param {Record<string, any>} props @param {boolean} svg */
function dress(el, props, svg) {
  for (const [name, value] of Object.entries(props)) {
    if (value === null || value === undefined || value === false) continue;
    if (name.startsWith('on')) /** @type {any} */ (el)[name] = value;
    else if (name === 'value' && !svg) /** @type {any} */ (el).value = value;
    else if (name === 'css') /** @type {any} */ (el).style.cssText = value;
    else el.setAttribute(name, value === true ? '' : String(value));
  }
}

/** @param {Element} el @param {Kid[]} kids @param {Document} doc */
function fill(el, kids, doc) {
  for (const kid of kids) {
    if (kid === null || kid === undefined || typeof kid === 'boolean') continue;
    if (Array.isArray(kid)) fill(el, kid, doc);
    else el.appendChild(typeof kid === 'object' ? /** @type {Node} */ (kid) : doc.createTextNode(String(kid)));
  }
}

/**
 * An element. Names that begin with `on` are handlers, `css` is a style text.
 * @param {string} tag @param {Record<string, any> | null} [props] @param {...Kid} kids @returns {HTMLElement}
 */
export function h(tag, props, ...kids) {
  const el = document.createElement(tag);
  fill(el, kids, document);
  dress(el, props ?? {}, false);
  return el;
}

/**
 * A drawing element, in a document that is passed in so that charts run without a browser.
 * @param {Document} doc @param {string} tag @param {Record<string, any> | null} [props] @param {...Kid} kids @returns {SVGElement}
 */
export function s(doc, tag, props, ...kids) {
  const el = doc.createElementNS(SVG, tag);
  fill(/** @type {any} */ (el), kids, doc);
  dress(/** @type {any} */ (el), props ?? {}, true);
  return /** @type {any} */ (el);
}

const HANDLERS = ['onclick', 'oninput', 'onchange', 'onkeydown', 'onsubmit', 'onpointermove', 'onpointerleave', 'onblur', 'onfocus'];

/** @param {Element} node */
const keyOf = (node) => (node.nodeType === 1 ? node.getAttribute('data-key') || node.id || '' : '');

/** Brings `was` to look and act like `now`. @param {any} was @param {any} now @returns {Node} */
export function morph(was, now) {
  if (was.nodeType !== now.nodeType || was.nodeName !== now.nodeName || keyOf(was) !== keyOf(now)) {
    was.replaceWith(now);
    return now;
  }
  if (was.nodeType === 3) {
    if (was.data !== now.data) was.data = now.data;
    return was;
  }
  for (const { name } of [...was.attributes]) if (!now.hasAttribute(name) && name !== 'style' && !(name === 'open' && was.nodeName === 'DETAILS')) was.removeAttribute(name);
  for (const { name, value } of [...now.attributes]) if (name !== 'style' && was.getAttribute(name) !== value) was.setAttribute(name, value);
  if (was.style && was.style.cssText !== now.style.cssText) was.style.cssText = now.style.cssText;
  for (const name of HANDLERS) if (was[name] !== now[name]) was[name] = now[name];
  kids(was, now);
  if ((was.nodeName === 'INPUT' || was.nodeName === 'SELECT' || was.nodeName === 'TEXTAREA') && was.value !== now.value) was.value = now.value;
  if (was.nodeName === 'INPUT' && was.checked !== now.checked) was.checked = now.checked;
  return was;
}

/** @param {Element} was @param {Element} now */
function kids(was, now) {
  /** @type {Map<string, ChildNode>} */
  const keyed = new Map();
  for (const child of [...was.childNodes]) {
    const key = keyOf(/** @type {any} */ (child));
    if (key) keyed.set(key, child);
  }
  let at = was.firstChild;
  for (const wanted of [...now.childNodes]) {
    const key = keyOf(/** @type {any} */ (wanted));
    const match = key ? keyed.get(key) : at && !keyOf(/** @type {any} */ (at)) ? at : null;
    if (!match) {
      was.insertBefore(wanted, at);
      continue;
    }
    if (match !== at) was.insertBefore(match, at);
    const after = match.nextSibling;
    const done = morph(match, wanted);
    at = /** @type {any} */ (done).nextSibling ?? after;
  }
  while (at) {
    const next = at.nextSibling;
    at.remove();
    at = next;
  }
}
