/** The product's one sign: a heavy line, hatched where you must not stand, and a dot where you are. */
import { s } from '../dom.js';
import { mark, standing } from './mark.js';
import { difference, dressed, leeway, turn as turnText, unit, withUnit } from '../format.js';
import { THIN } from '../format.js';

/** @typedef {import('./figure.js').Figure} Figure */

/**
 * Where things stand on a small gauge, in pixels.
 * @param {Extract<Figure, {kind: 'turns'}>} f @param {number} span @param {number} width @param {number} k
 */
export function place(f, span, width, k) {
  const middle = width / 2;
  const unit = (middle - 12) / span;
  const x = (/** @type {number} */ d) => middle + Math.max(-span, Math.min(span, d)) * unit;
  return { middle, x, dot: x(f.d), beyond: Math.abs(f.d) > span * 1.0001, bar: Math.min(k * f.u * unit, width) };
}

/**
 * @param {Document} doc
 * @param {{figure: Figure, before: Figure | null, standing: string, span: number | null, width: number, k: number}} p
 */
export function gauge(doc, { figure, before, standing: name, span, width, k }) {
  const H = 26;
  const y = 13;
  const W = Math.max(60, width);
  const { tone } = standing(name);
  /** @type {any[]} */
  const out = [];
  if (figure.kind !== 'turns' || !span) {
    out.push(s(doc, 'path', { d: `M0 ${y}H${W}`, class: 'axis', 'stroke-dasharray': figure.kind === 'no turn' ? null : '2 4' }));
    if (figure.kind !== 'no data') out.push(mark(doc, name, W / 2, y));
    if (figure.kind === 'no data') out.push(mark(doc, 'no data', W / 2, y));
    return s(doc, 'svg', { viewBox: `0 0 ${W} ${H}`, 'aria-hidden': 'true', class: 'gauge' }, out);
  }
  const { middle: m, x, dot, beyond, bar } = place(figure, span, W, k);
  const above = figure.off === 'above';
  out.push(s(doc, 'rect', { x: above ? m : 0, y: 1, width: m, height: 24, class: 'hatch' }));
  out.push(s(doc, 'path', { d: `M${above ? 0 : m} ${y}h${m}`, class: 'axis' }));
  for (const t of [1 / 3, 2 / 3, 1]) out.push(s(doc, 'path', { d: `M${x(above ? -t * span : t * span).toFixed(1)} ${y - 3}v6`, class: 'axis' }));
  const lo = Math.max(2, dot - bar);
  const hi = Math.min(W - 2, dot + bar);
  const clear = (/** @type {number} */ a, /** @type {number} */ e) => {
    const from = above ? Math.max(a, m) : Math.max(a, 0);
    const to = above ? Math.min(e, W) : Math.min(e, m);
    if (to > from) out.push(s(doc, 'rect', { x: from.toFixed(1), y: 3, width: (to - from).toFixed(1), height: 20, class: 'clear' }));
  };
  if (beyond) clear(dot - 14, dot + 14);
  else clear(Math.min(lo, dot - 8) - 4, Math.max(hi, dot + 8) + 4);
  if (before && before.kind === 'turns' && Math.abs(before.d) <= span && Math.abs(x(before.d) - dot) > 12) {
    const at = x(before.d);
    // Inside the doubt bar the old mark drops to the lower edge so that both can be seen.
    const drop = !beyond && at > lo && at < hi ? 8 : 0;
    clear(at - 8, at + 8);
    out.push(s(doc, 'circle', { cx: at.toFixed(1), cy: y + drop, r: 4, class: 'was' }));
  }
  out.push(s(doc, 'path', { d: `M${m} 0V${H}`, class: 'turnline' }));
  if (beyond) {
    const e = figure.d < 0 ? 4 : W - 4;
    const g = figure.d < 0 ? 5 : -5;
    out.push(s(doc, 'path', { d: `M${e + g} ${y - 6}L${e} ${y}L${e + g} ${y + 6}`, class: `l-${tone}`, fill: 'none', 'stroke-width': 2 }));
  } else {
    const ends = `${dot - bar >= 2 ? `M${lo.toFixed(1)} ${y - 6}v12` : ''}${dot + bar <= W - 2 ? `M${hi.toFixed(1)} ${y - 6}v12` : ''}`;
    // A doubt smaller than the mark is not drawn: it would only fray its edge.
    if (bar > 7) out.push(s(doc, 'path', { d: `M${lo.toFixed(1)} ${y}H${hi.toFixed(1)}${ends}`, class: `l-${tone}`, 'stroke-width': 2 }));
  }
  out.push(mark(doc, name, beyond ? dot + (figure.d < 0 ? 6 : -6) : dot, y));
  return s(doc, 'svg', { viewBox: `0 0 ${W} ${H}`, 'aria-hidden': 'true', class: 'gauge' }, out);
}

/** Round numbers for an axis. @param {number} from @param {number} to @param {number} most */
export function ticks(from, to, most) {
  const rough = (to - from) / Math.max(1, most);
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((m) => m * power).find((v) => v >= rough * 0.999) ?? 10 * power;
  const list = [];
  for (let i = Math.ceil(from / step - 1e-9); i * step <= to + step * 1e-9; i += 1) list.push(Number((i * step).toPrecision(12)));
  return list;
}

/** Words for the two ends of a lever's axis. @param {string} lever @returns {[string, string]} */
export function ends(lever) {
  if (lever === 'dew_point') return ['drier', 'wetter'];
  if (lever === 'temperature') return ['colder', 'hotter'];
  if (lever === 'kJ') return ['goes', 'does not go'];
  return ['less', 'more'];
}

/**
 * The large gauge of a cell, with the lever's own axis.
 * @param {Document} doc
 * @param {{figure: Figure, before: Figure | null, beforeWord: string, standing: string, lever: string, width: number, k: number}} p
 */
export function bigGauge(doc, { figure, before, beforeWord, standing: name, lever, width, k }) {
  const W = Math.max(300, width);
  const H = 88;
  const y = 44;
  const st = standing(name);
  if (figure.kind !== 'turns') {
    const says = figure.kind === 'no turn' ? 'no turn in the range searched' : figure.kind === 'absent' ? 'this zone has no such reading' : 'no data';
    return s(doc, 'svg', { viewBox: `0 0 ${W} ${H}`, width: W, height: H, class: 'big', role: 'img', 'aria-label': says },
      s(doc, 'path', { d: `M0 ${y}H${W}`, class: 'axis' }), mark(doc, name, W / 2, y, 1.35), s(doc, 'text', { x: W / 2, y: 18, 'text-anchor': 'middle', class: 'q halo' }, says));
  }
  const { reading, turn, u, off, unit: own } = figure;
  const bar = k * u;
  const marks = [reading, turn, reading - Math.min(bar, 4 * Math.abs(reading - turn) + bar * 0.5), reading + Math.min(bar, 4 * Math.abs(reading - turn) + bar * 0.5)];
  const old = before && before.kind === 'turns' ? before.reading : null;
  if (old !== null && Math.abs(old - reading) < 6 * Math.max(Math.abs(reading - turn), bar, 1e-12)) marks.push(old);
  let a = Math.min(...marks);
  let z = Math.max(...marks);
  const room = (z - a || Math.abs(reading) * 0.1 || 1) * 0.55;
  a -= room;
  z += room;
  const x = (/** @type {number} */ v) => 10 + ((v - a) / (z - a)) * (W - 20);
  const X = x(reading);
  const T = x(turn);
  const above = off === 'above';
  const lo = Math.max(4, x(reading - bar));
  const hi = Math.min(W - 4, x(reading + bar));
  /** @type {any[]} */
  const out = [];
  out.push(s(doc, 'rect', { x: above ? T : 0, y: 24, width: Math.max(0, above ? W - T : T), height: 40, class: 'hatch' }));
  out.push(s(doc, 'path', { d: above ? `M0 ${y}H${T}` : `M${T} ${y}H${W}`, class: 'axis' }));
  const from = above ? Math.max(T, lo - 12) : Math.max(0, lo - 12);
  const to = above ? Math.min(W, hi + 12) : Math.min(T, hi + 12);
  if (to > from) out.push(s(doc, 'rect', { x: from, y: 28, width: to - from, height: 32, class: 'clear' }));
  out.push(s(doc, 'path', { d: `M0 64H${W}`, class: 'axis' }));
  const [less, more] = ends(lever);
  const list = ticks(a, z, Math.max(3, Math.floor(W / 130)));
  list.forEach((v, i) => {
    const px = x(v);
    const words = i === 1 || list.length < 3 ? withUnit(dressed(String(v)), unit(own)) : dressed(String(v));
    const half = words.length * 4;
    if (px - half < 8 + less.length * 7.5 || px + half > W - 8 - more.length * 7.5) return out.push(s(doc, 'path', { d: `M${px.toFixed(1)} 64v6`, class: 'axis' }));
    out.push(s(doc, 'path', { d: `M${px.toFixed(1)} 64v6`, class: 'axis' }), s(doc, 'text', { x: px.toFixed(1), y: 83, 'text-anchor': 'middle', class: 'q' }, words));
  });
  out.push(s(doc, 'path', { d: `M${T} 2V70`, class: 'turnline' }));
  if (old !== null && old >= a && old <= z && Math.abs(x(old) - X) > 14) {
    const drop = x(old) > lo && x(old) < hi ? 12 : 0;
    out.push(s(doc, 'circle', { cx: x(old), cy: y + drop, r: 6, class: 'was' }));
    if (!drop && Math.abs(x(old) - T) > 60) out.push(s(doc, 'text', { x: x(old), y: y - 10, 'text-anchor': 'middle', class: 'q halo' }, `${beforeWord === 'as recipe' ? 'recipe' : 'was'} ${turnText(old, own)}`));
  }
  const capped = `${lo > 4 ? `M${lo} ${y - 10}v20` : ''}${hi < W - 4 ? `M${hi} ${y - 10}v20` : ''}`;
  out.push(s(doc, 'path', { d: `M${lo} ${y}H${hi}${capped}`, class: `l-${st.tone}`, 'stroke-width': 2.5 }), mark(doc, name, X, y, 1.35));
  // The leeway as a dimension, from the line to the dot.
  const rightwards = X > T;
  const says = withUnit(leeway(figure.leeway, own), difference(own));
  const around = `± ${turnText(bar, own === 'C' ? 'K' : own).replace(/−/, '')}`;
  const long = `${st.word}, ${turnText(reading, own)} ${around} (k = ${k})`;
  const outside = rightwards ? X + 10 : X - 10;
  const turnLabel = `turns at ${turnText(turn, own)}`;
  const fits = Math.abs(X - T) > 90;
  if (fits) {
    const mid = (X + T) / 2;
    const way = rightwards ? 1 : -1;
    out.push(s(doc, 'path', { d: `M${X} 2V28M${T} 9H${mid - way * 30}M${mid + way * 30} 9H${X}M${T + way * 9} 5.5l${-7 * way} 3.5l${7 * way} 3.5M${X - way * 8} 5.5l${7 * way} 3.5l${-7 * way} 3.5`, class: `l-${st.tone}`, fill: 'none' }));
    out.push(s(doc, 'text', { x: mid, y: 14, 'text-anchor': 'middle', class: `b t-${st.tone}` }, says));
  }
  const wide = (/** @type {string} */ t) => t.length * 7.2;
  const text = fits ? long : `${says}, ${long}`;
  // Beside the dot where there is room, else shortened to what the table repeats.
  const space = rightwards ? W - outside : outside;
  const label = wide(text) < space ? text : `${fits ? '' : `${says}, `}${st.word}`;
  out.push(s(doc, 'text', { x: outside, y: 14, 'text-anchor': rightwards ? 'start' : 'end', class: `b t-${st.tone} halo` }, label));
  const turnX = rightwards ? T - 10 : T + 10;
  const turnSpace = rightwards ? T : W - T;
  out.push(s(doc, 'text', { x: wide(turnLabel) < turnSpace ? turnX : rightwards ? 2 : W - 2, y: 14, 'text-anchor': wide(turnLabel) < turnSpace ? (rightwards ? 'end' : 'start') : rightwards ? 'start' : 'end', class: 'b halo' }, turnLabel));
  out.push(s(doc, 'text', { x: 0, y: 83, class: 'q halo' }, less), s(doc, 'text', { x: W, y: 83, 'text-anchor': 'end', class: 'q halo' }, more));
  const told = `${turnLabel}; reading ${turnText(reading, own)}, leeway ${says}, doubt ${turnText(bar, own === 'C' ? 'K' : own)} to each side (k${THIN}=${THIN}${k}); ${st.word}`;
  return s(doc, 'svg', { viewBox: `0 0 ${W} ${H}`, width: W, height: H, class: 'big', role: 'img', 'aria-label': told }, out);
}
