/** A substance's property over temperature, one pen stroke per phase, with a reading line. */
import { s } from '../dom.js';
import { dressed, number } from '../format.js';
import { ticks } from './gauge.js';

/**
 * @param {Document} doc
 * @param {{title: string, curves: {name: string, x: number[], y: number[], main: boolean}[], at: number | null, width: number}} p
 */
export function curve(doc, { title, curves, at, width }) {
  const W = Math.max(180, width);
  const H = 206;
  const left = 2;
  const right = W - 62;
  const top = 12;
  const base = H - 26;
  const xs = curves.flatMap((c) => [c.x[0], c.x[c.x.length - 1]]);
  const ys = curves.flatMap((c) => c.y);
  const [a, z] = [Math.min(...xs), Math.max(...xs)];
  let [lo, hi] = [Math.min(...ys), Math.max(...ys)];
  const pad = (hi - lo || Math.abs(hi) || 1) * 0.08;
  lo -= pad;
  hi += pad;
  const X = (/** @type {number} */ v) => Number((left + ((v - a) / (z - a || 1)) * (right - left)).toFixed(1));
  const Y = (/** @type {number} */ v) => Number((base - ((v - lo) / (hi - lo)) * (base - top)).toFixed(1));
  /** @type {any[]} */
  const out = [];
  for (const v of ticks(lo, hi, 4)) out.push(s(doc, 'path', { d: `M${left} ${Y(v)}H${right + 6}`, class: 'grid' }), s(doc, 'text', { x: right + 11, y: Y(v) + 4.5, class: 'q' }, dressed(String(v))));
  out.push(s(doc, 'path', { d: `M${left} ${base}H${right}`, class: 'axis' }), s(doc, 'path', { d: `M${left} ${top - 6}V${base}M${right} ${top - 6}V${base}`, class: 'turnline' }));
  for (const c of curves) {
    const d = c.x.map((v, i) => `${i ? 'L' : 'M'}${X(v)} ${Y(c.y[i])}`).join('');
    out.push(s(doc, 'path', { d, class: c.main ? 'pen' : 'olddash', fill: 'none' }));
  }
  out.push(s(doc, 'text', { x: left, y: H - 8, class: 'q' }, dressed(String(Math.round(a)))), s(doc, 'text', { x: right, y: H - 8, 'text-anchor': 'end', class: 'q' }, `${dressed(String(Math.round(z)))} K`));
  if (at !== null) {
    const c = curves.find((k) => k.main && at >= k.x[0] - 1e-6 && at <= k.x[k.x.length - 1] + 1e-6);
    if (c) {
      let i = c.x.findIndex((v) => v >= at);
      if (i < 1) i = 1;
      const f = (at - c.x[i - 1]) / (c.x[i] - c.x[i - 1] || 1);
      const v = c.y[i - 1] + f * (c.y[i] - c.y[i - 1]);
      out.push(s(doc, 'path', { d: `M${X(at)} ${top - 4}V${base}`, class: 'cut' }), s(doc, 'circle', { cx: X(at), cy: Y(v), r: 5, class: 'was' }));
      const toLeft = X(at) > (left + right) / 2;
      const up = Y(v) > (top + base) / 2;
      out.push(s(doc, 'text', { x: X(at) + (toLeft ? -9 : 9), y: Y(v) + (up ? -10 : 20), 'text-anchor': toLeft ? 'end' : 'start', class: 'b halo' }, number(v, 5)));
    }
  }
  return s(doc, 'svg', { viewBox: `0 0 ${W} ${H}`, width: W, height: H, class: 'curve', role: 'img', 'aria-label': `${title} from ${Math.round(a)} to ${Math.round(z)} K, from ${number(Math.min(...ys), 5)} to ${number(Math.max(...ys), 5)}` }, out);
}
