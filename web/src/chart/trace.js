/** The line as it is built: bays in order of travel, the temperature across them, where the change turns, the charge. */
import { s } from '../dom.js';
import { THIN, celsius, dressed, withUnit } from '../format.js';
import { nearest } from './figure.js';
import { mark, standing } from './mark.js';
import { ticks } from './gauge.js';

/** @typedef {import('../types.js').Finding} Finding */
/** @typedef {{name: string, from: number, to: number | null, finding: Finding | null, before: Finding | null}} Bay temperatures in °C */

const ZERO = 273.15;

/** Turning temperature nearest to the reading, °C, and its off side. @param {Finding | null} f */
export function turnOf(f) {
  const lever = f?.levers.find((l) => l.lever === 'temperature');
  if (!lever || lever.leeway === null || lever.turning_points.length === 0) return null;
  return { at: nearest(lever.turning_points, lever.reading), off: lever.off_side === 'above' ? /** @type {const} */ ('above') : /** @type {const} */ ('below') };
}

/** Where along a bay, 0 to 1, a course has a temperature; `null` outside it. @param {Bay} bay @param {number} t */
export function along(bay, t) {
  if (bay.to === null || bay.to === bay.from) return null;
  const u = (t - bay.from) / (bay.to - bay.from);
  return u >= -1e-9 && u <= 1 + 1e-9 ? Math.min(1, Math.max(0, u)) : null;
}

/**
 * @param {Document} doc
 * @param {{bays: Bay[], change: string, charge: string, width: number, height: number, label: number, beforeWord: string}} p
 */
export function trace(doc, { bays, change, charge, width, height, label: L, beforeWord }) {
  const W = Math.max(200, width);
  const H = height;
  const n = Math.max(1, bays.length);
  const w = (W - L) / n;
  const strip = 22;
  const top = 8;
  const base = H - strip - 12;
  const bx = (/** @type {number} */ i) => L + w * i;
  const acts = bays.map((b) => b.finding?.acts_above_K).find((a) => a != null);
  const actsC = acts == null ? null : acts - ZERO;
  const heats = bays.flatMap((b) => [b.from, ...(b.to === null ? [] : [b.to])]);
  let low = Math.min(...heats);
  let high = Math.max(...heats);
  const room = Math.max(60, (high - low) * 0.12);
  // A turning line a little outside the temperatures is worth its room; one far away is told in words.
  for (const b of bays) {
    const t = turnOf(b.finding);
    if (t && t.at > low - 3 * room && t.at < high + 3 * room) {
      low = Math.min(low, t.at);
      high = Math.max(high, t.at);
    }
  }
  low -= room * 0.6;
  high += room * 0.5;
  // Below the temperature it acts above nothing is decided: where that would take much of the height, its scale is shortened.
  const short = actsC !== null && actsC - low > 0.3 * (high - low) && actsC < high - 40 ? actsC : null;
  const tall = base - top - 6;
  const foot = short === null ? 0 : tall * 0.24;
  const y = (/** @type {number} */ t) => {
    const up = short === null ? ((t - low) / (high - low)) * tall : t < short ? ((t - low) / (short - low)) * foot : foot + ((t - short) / (high - short)) * (tall - foot);
    return Number((base - up).toFixed(1));
  };
  const inside = (/** @type {number} */ t) => t >= low && t <= high;
  /** @type {any[]} */
  const out = [];
  const text = (/** @type {number} */ px, /** @type {number} */ py, /** @type {string} */ words, /** @type {string} */ cls, anchor = 'start') => s(doc, 'text', { x: Number(px.toFixed(1)), y: Number(py.toFixed(1)), class: cls, 'text-anchor': anchor }, words);

  const scale = ticks(short ?? low, high, Math.max(2, Math.floor((base - top - foot) / 26)));
  if (L > 60) {
    out.push(text(0, y(scale.at(-1) ?? high) + 4.5, 'Temperature', 'q'));
    scale.forEach((t, i) => {
      out.push(s(doc, 'path', { d: `M${L} ${y(t)}H${W}`, class: 'grid' }), s(doc, 'path', { d: `M${L - 6} ${y(t)}h6`, class: 'axis' }));
      out.push(text(L - 10, y(t) + 4.5, i === scale.length - 1 ? withUnit(dressed(String(t)), '°C') : dressed(String(t)), 'q', 'end'));
    });
    out.push(s(doc, 'path', { d: short === null ? `M${L} ${top}V${base}` : `M${L} ${top}V${base - foot + 6}M${L} ${base - foot + 12}V${base}M${L - 5} ${base - foot + 9}l10 -5M${L - 5} ${base - foot + 14}l10 -5`, class: 'axis' }));
  }
  if (actsC !== null && inside(actsC)) out.push(s(doc, 'path', { d: `M${L} ${y(actsC)}H${W}`, class: 'l-paperonly', 'stroke-width': 1.2, 'stroke-dasharray': '10 4 2 4' }));

  // Where the selected change turns: heavy, hatched on the side where the wish fails.
  /** @type {{a: number, b: number, v: number, at: number, off: string}[]} */
  const runs = [];
  bays.forEach((b, i) => {
    const t = turnOf(b.finding);
    if (!t || !inside(t.at)) return;
    const v = y(t.at);
    const last = runs.at(-1);
    if (last && last.b === bx(i) && Math.abs(last.v - v) < 0.6 && last.off === t.off) last.b = bx(i + 1);
    else runs.push({ a: bx(i), b: bx(i + 1), v, at: t.at, off: t.off });
  });
  for (const r of runs) out.push(s(doc, 'rect', { x: r.a, y: r.off === 'below' ? r.v : r.v - 13, width: r.b - r.a, height: 13, class: 'hatch' }));
  bays.forEach((b, i) => {
    const t = turnOf(b.before);
    const now = turnOf(b.finding);
    if (t && inside(t.at) && (!now || Math.abs(y(t.at) - y(now.at)) > 1)) out.push(s(doc, 'path', { d: `M${bx(i)} ${y(t.at)}H${bx(i + 1)}`, class: 'olddash' }));
  });

  // Temperature as it travels, each piece in the colour of its standing.
  /** @type {{d: string, tone: string, dash: boolean}[]} */
  const pieces = [];
  const leave = (/** @type {Bay} */ b) => b.to ?? b.from;
  const tones = bays.map((b) => (b.finding ? standing(b.finding.standing).tone : 'plain'));
  bays.forEach((b, i) => {
    const x0 = bx(i);
    const x1 = bx(i + 1);
    if (b.to !== null) {
      const points = b.finding?.course ?? [];
      if (points.length > 1) {
        for (let j = 1; j < points.length; j += 1) {
          const [t0, t1] = [points[j - 1].temperature_K - ZERO, points[j].temperature_K - ZERO];
          const [u0, u1] = [along(b, t0), along(b, t1)];
          if (u0 === null || u1 === null) continue;
          const tone = standing(points[j].standing).tone;
          pieces.push({ d: `M${(x0 + u0 * w).toFixed(1)} ${y(t0)}L${(x0 + u1 * w).toFixed(1)} ${y(t1)}`, tone, dash: tone === 'paperonly' || (actsC !== null && Math.max(t0, t1) <= actsC + 0.01) });
        }
        const from = points[0].temperature_K - ZERO;
        const till = points[points.length - 1].temperature_K - ZERO;
        const [uf, ut] = [along(b, from), along(b, till)];
        if (uf !== null && uf > 0.005) pieces.push({ d: `M${x0} ${y(b.from)}L${(x0 + uf * w).toFixed(1)} ${y(from)}`, tone: 'paperonly', dash: true });
        if (ut !== null && ut < 0.995) pieces.push({ d: `M${(x0 + ut * w).toFixed(1)} ${y(till)}L${x1} ${y(b.to)}`, tone: 'paperonly', dash: true });
      } else pieces.push({ d: `M${x0} ${y(b.from)}L${x1} ${y(b.to)}`, tone: tones[i], dash: false });
      return;
    }
    const mid = x0 + w / 2;
    const before = i > 0 ? leave(bays[i - 1]) : b.from;
    const after = i + 1 < bays.length ? bays[i + 1].from : b.from;
    const flat = y(b.from);
    // The step between two zones is shared: each half in its own zone's colour.
    const y0 = i === 0 ? flat : bays[i - 1].to !== null ? y(before) : (y(before) + flat) / 2;
    const y1 = i + 1 >= bays.length ? flat : bays[i + 1].to !== null ? y(after) : (y(after) + flat) / 2;
    const q = w * 0.3;
    pieces.push({ d: `M${x0.toFixed(1)} ${y0.toFixed(1)}C${(x0 + q * 0.6).toFixed(1)} ${(y0 + (flat - y0) * 0.55).toFixed(1)} ${(mid - q).toFixed(1)} ${flat} ${mid.toFixed(1)} ${flat}C${(mid + q).toFixed(1)} ${flat} ${(x1 - q * 0.6).toFixed(1)} ${(y1 + (flat - y1) * 0.55).toFixed(1)} ${x1.toFixed(1)} ${y1.toFixed(1)}`, tone: tones[i], dash: tones[i] === 'paperonly' });
  });
  for (const p of pieces) out.push(s(doc, 'path', { d: p.d, class: 'under', 'stroke-width': 7, fill: 'none' }));
  for (const r of runs) out.push(s(doc, 'path', { d: `M${r.a} ${r.v}H${r.b}`, class: 'turnline' }));
  runs.forEach((r, i) => {
    const last = runs[i - 1];
    if (last && last.b === r.a) out.push(s(doc, 'path', { d: `M${r.a} ${last.v}V${r.v}`, class: 'turnline' }));
  });
  for (const p of pieces) out.push(s(doc, 'path', { d: p.d, class: p.tone === 'plain' ? 'l-plain' : `l-${p.tone}`, 'stroke-width': 2.4, fill: 'none', 'stroke-dasharray': p.dash ? '7 4' : null }));

  // Words on the drawing, kept clear of each other: what is taken is remembered as boxes.
  /** @type {[number, number, number, number][]} */
  const taken = [];
  const free = (/** @type {number} */ px, /** @type {number} */ py, /** @type {number} */ len) => {
    const box = /** @type {[number, number, number, number]} */ ([px, py - 12, px + len, py + 4]);
    if (py < top + 8 || py > base + 4 || px < L || px + len > W) return false;
    if (taken.some(([a, b, c, d]) => box[0] < c && box[2] > a && box[1] < d && box[3] > b)) return false;
    taken.push(box);
    return true;
  };
  const put = (/** @type {[number, number][]} */ places, /** @type {string} */ words, /** @type {string} */ cls) => {
    const len = words.length * (cls.startsWith('b') ? 8 : 7.3);
    for (const [px, py] of places) {
      const at = Math.min(px, W - len - 2);
      if (free(at, py, len)) return out.push(text(at, py, words, cls));
    }
    return 0;
  };
  const dots = bays.map((b, i) => {
    const t = b.finding && b.to !== null ? b.finding.judged_at_K - ZERO : b.from;
    const u = b.to === null ? 0.5 : along(b, t) ?? 0.5;
    return { x: bx(i) + u * w, y: y(t), t, b, i };
  });
  for (const d of dots) taken.push([d.x - 12, d.y - 12, d.x + 12, d.y + 12]);
  bays.forEach((b, i) => {
    if (b.to === null) taken.push([bx(i) + w * 0.2, y(b.from) - 4, bx(i + 1) - w * 0.2, y(b.from) + 4]);
    else for (let j = 0; j < 12; j += 1) taken.push([bx(i) + (w * j) / 12, y(b.from + ((b.to - b.from) * (j + 0.5)) / 12) - 5, bx(i) + (w * (j + 1)) / 12, y(b.from + ((b.to - b.from) * (j + 0.5)) / 12) + 5]);
  });
  for (const r of runs) taken.push([r.a, r.v - 1, r.b, r.v + 1]);
  for (const d of dots) if (actsC !== null && d.b.to !== null && d.b.finding?.allowed_s != null) taken.push([d.x - 4, d.y, d.x + 4, base + 2], [d.x, base - 14, bx(d.i) + (along(d.b, actsC) ?? 0) * w, base + 4]);
  const longest = [...runs].sort((a, b) => b.b - b.a - (a.b - a.a))[0];
  for (const r of longest ? [longest, ...runs.filter((q) => q !== longest)] : []) {
    const where = celsius(r.at + ZERO);
    const long = `${change} turns at ${where}`;
    const words = r === longest && long.length * 8 < r.b - r.a - 12 ? long : where;
    const dy = r.off === 'below' ? [r.v + 28, r.v - 6] : [r.v - 18, r.v + 17];
    const size = words.length * 8;
    const xs = [r.a + 8, r.b - size - 8, r.a + (r.b - r.a) / 2 - size / 2, r.a + (r.b - r.a) / 4, r.a + (r.b - r.a) * 0.7 - size / 2].filter((px) => px + size <= r.b + 4 || r !== longest);
    put(xs.flatMap((px) => dy.map((py) => /** @type {[number, number]} */ ([px, py]))), words, 'b halo');
  }
  for (const d of dots) if (d.b.finding && d.b.to !== null) put([[d.x + 10, d.y - 12], [d.x - 130, d.y + 16], [d.x + 12, d.y + 18]], w < 150 ? celsius(d.t + ZERO) : `judged at ${celsius(d.t + ZERO)}`, 'halo');
  if (actsC !== null && inside(actsC)) put([0, 1, 2, 3].filter((i) => i < n).flatMap((i) => /** @type {[number, number][]} */ ([[bx(i) + 9, y(actsC) + 17], [bx(i) + 9, y(actsC) - 7]])), w < 120 ? 'too slow below' : `below ${celsius(actsC + ZERO)} on paper: too slow`, 'q halo');
  const oldRun = bays.map((b, i) => ({ t: turnOf(b.before), now: turnOf(b.finding), i })).find((o) => o.t && inside(o.t.at) && (!o.now || Math.abs(y(o.t.at) - y(o.now.at)) > 14));
  if (oldRun?.t) put([[bx(oldRun.i) + 8, y(oldRun.t.at) - 5], [bx(oldRun.i) + 8, y(oldRun.t.at) + 16]], `${beforeWord} ${celsius(oldRun.t.at + ZERO)}`, 'q halo');

  // A time allowed past the turn, as a dimension.
  for (const d of dots) {
    const f = d.b.finding;
    if (!f || f.allowed_s == null || d.b.to === null || actsC === null || f.judged_why === '' || !/s before/.test(f.judged_why)) continue;
    const u = along(d.b, actsC);
    if (u === null) continue;
    const x1 = bx(d.i) + u * w;
    const dy = base - 4;
    const words = withUnit(dressed(String(f.allowed_s)), 's');
    const way = x1 > d.x ? 1 : -1;
    if (Math.abs(x1 - d.x) > 24) out.push(s(doc, 'path', { d: `M${d.x} ${d.y + 12}V${dy + 5}M${x1} ${y(actsC) + 4}V${dy + 5}M${d.x} ${dy}H${x1}m${-6 * way} -3.5l${6 * way} 3.5l${-6 * way} 3.5M${d.x + 6 * way} ${dy - 3.5}l${-6 * way} 3.5l${6 * way} 3.5`, class: 'dim' }), text((d.x + x1) / 2, dy + 4.5, words, 'halo', 'middle'));
  }
  for (const d of dots) out.push(d.b.finding ? mark(doc, d.b.finding.standing, d.x, d.y) : s(doc, 'circle', { cx: d.x.toFixed(1), cy: d.y, r: 4, class: 'plaindot' }));

  // The charge and the way it travels.
  const sy = H - strip - 3;
  const left = L > 60 ? L - 14 : 0;
  out.push(s(doc, 'path', { d: `M${left} ${sy}H${W - 20}v-4L${W} ${sy + strip / 2}L${W - 20} ${H + 1}v-4H${left}z`, class: 'charge' }), text(left + 23, sy + 15.5, charge, 'instrip'));

  const told = bays.map((b) => `${b.name} ${b.to === null ? `at ${Math.round(b.from)}` : `from ${Math.round(b.from)} to ${Math.round(b.to)}`}${b.finding ? `, ${standing(b.finding.standing).word}` : ''}${turnOf(b.finding) ? `, turns at ${Math.round(turnOf(b.finding)?.at ?? 0)}` : ''}`).join('; ');
  return s(doc, 'svg', { viewBox: `0 0 ${W} ${H}`, width: W, height: H, class: 'trace', role: 'img', 'aria-label': `${change}: the line in order of travel, degrees Celsius. ${told}. The charge runs left to right.${THIN}` }, out);
}
