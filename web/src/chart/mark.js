/** The marks of the five standings: shape, word and colour together. */
import { s } from '../dom.js';

/** @type {Record<string, {word: string, short: string, tone: string, meaning: string}>} */
export const STANDINGS = {
  'on side': { word: 'on side', short: 'on side', tone: 'on', meaning: 'what you wish for holds' },
  'off side': { word: 'off side', short: 'off side', tone: 'off', meaning: 'it does not hold' },
  'too close to call': { word: 'too close to call', short: 'too close', tone: 'close', meaning: 'the doubt spans the turning point' },
  'on paper': { word: 'on paper', short: 'on paper', tone: 'paperonly', meaning: 'driving force, but known too slow' },
  'no data': { word: 'no data', short: 'no data', tone: 'nodata', meaning: 'the data do not reach here; says why' },
};

/** @param {string} standing */
export const standing = (standing) => STANDINGS[standing] ?? STANDINGS['no data'];

/** @param {Document} doc @param {string} name @param {number} x @param {number} y @param {number} [k] size @returns {SVGElement} */
export function mark(doc, name, x, y, k = 1) {
  const X = Number(x.toFixed(1));
  switch (standing(name).tone) {
    case 'on': return s(doc, 'circle', { cx: X, cy: y, r: 6 * k, class: 'f-on' });
    case 'off': return s(doc, 'rect', { x: X - 7.5 * k, y: y - 7.5 * k, width: 15 * k, height: 15 * k, class: 'f-off' });
    case 'close': {
      const r = 9 * k;
      return s(doc, 'g', null, s(doc, 'path', { d: `M${X} ${y - r}l${r} ${r}l${-r} ${r}l${-r} ${-r}z`, class: 'ground l-close', 'stroke-width': 2 }), s(doc, 'path', { d: `M${X} ${y - r}v${2 * r}l${-r} ${-r}z`, class: 'f-close' }));
    }
    case 'paperonly':
      return s(doc, 'g', null, s(doc, 'path', { d: `M${X - 13 * k} ${y}h${8 * k}`, class: 'l-paperonly', 'stroke-width': 2.2 }), s(doc, 'circle', { cx: X, cy: y, r: 5 * k, class: 'ground l-paperonly', 'stroke-width': 2.2 }));
    default: return s(doc, 'circle', { cx: X, cy: y, r: 6 * k, class: 'ground l-nodata', 'stroke-width': 2, 'stroke-dasharray': '1.5 3' });
  }
}
