/**
 * What a gauge shows of a finding, and to what scale. No chemistry: only distances between figures that the
 * engine gave.
 *
 * @typedef {import('../types.js').Finding} Finding
 * @typedef {{kind: 'turns', d: number, leeway: number, u: number, off: 'above' | 'below', unit: string, reading: number, turn: number} | {kind: 'no turn'} | {kind: 'absent'} | {kind: 'no data'}} Figure
 */

/** The turning point nearest to the reading. @param {number[]} points @param {number} reading */
export const nearest = (points, reading) => points.reduce((best, p) => (Math.abs(p - reading) < Math.abs(best - reading) ? p : best), points[0]);

/** @param {Finding} finding @param {string} lever @returns {Figure} */
export function figureOf(finding, lever) {
  if (finding.standing === 'no data' || finding.dG_kJ === null) return { kind: 'no data' };
  if (lever === 'kJ') {
    return { kind: 'turns', d: finding.dG_kJ, leeway: finding.leeway_kJ ?? 0, u: finding.u_dG_kJ ?? 0, off: finding.wish === 'avoid' ? 'below' : 'above', unit: 'kJ', reading: finding.dG_kJ, turn: 0 };
  }
  const found = finding.levers.find((l) => l.lever === lever);
  if (!found) return { kind: 'absent' };
  if (found.leeway === null || found.turning_points.length === 0) return { kind: 'no turn' };
  const turn = nearest(found.turning_points, found.reading);
  return { kind: 'turns', d: found.reading - turn, leeway: found.leeway, u: found.u ?? 0, off: found.off_side === 'below' ? 'below' : 'above', unit: found.unit, reading: found.reading, turn };
}

/** Sizes of units against each other, for distances on a common scale. @type {Record<string, number>} */
const SIZES = { '%': 1e-2, ppm: 1e-6, ppb: 1e-9, fraction: 1, bar: 1e5, mbar: 100, kPa: 1e3, Pa: 1, C: 1, K: 1, F: 5 / 9 };

/** The unit of a row: that of its first figure that turns. @param {Finding[]} findings @param {string} lever */
export function unitOf(findings, lever) {
  for (const f of findings) {
    const v = figureOf(f, lever);
    if (v.kind === 'turns') return v.unit;
  }
  return null;
}

/** A figure's distances in the unit of its row: one zone may be read in ppm and its neighbour in per cent. @template {Figure} F @param {F} figure @param {string | null} unit @returns {F} */
export function inUnit(figure, unit) {
  if (figure.kind !== 'turns' || unit === null || figure.unit === unit) return figure;
  const by = SIZES[figure.unit] / SIZES[unit];
  // Units that do not compare (a share beside a pressure) keep their own figures.
  return Number.isFinite(by) ? { ...figure, d: figure.d * by, u: figure.u * by } : figure;
}

/** The next of 1, 2, 3, 5 times a power of ten. @param {number} x */
export function nice(x) {
  if (!(x > 0)) return 1;
  const power = 10 ** Math.floor(Math.log10(x) + 1e-12);
  const step = [1, 2, 3, 5, 10].find((m) => m * power >= x * (1 - 1e-9)) ?? 10;
  return Number((step * power).toPrecision(3));
}

/**
 * Scale common to a row: room for whatever is off side or close with its doubt, and for the nearer half of the rest;
 * what lies beyond sits at the edge.
 * @param {Finding[]} findings @param {string} lever @param {number} k
 */
export function scaleOf(findings, lever, k) {
  const unit = unitOf(findings, lever);
  const reach = findings.map((f) => ({ f, v: inUnit(figureOf(f, lever), unit) })).flatMap(({ f, v }) => (v.kind === 'turns' ? [{ urgent: f.standing === 'off side' || f.standing === 'too close to call', r: Math.abs(v.d) + k * v.u }] : []));
  if (reach.length === 0) return null;
  const all = reach.map((x) => x.r).sort((a, b) => a - b);
  const middle = all[Math.floor((all.length - 1) / 2)];
  const urgent = reach.filter((x) => x.urgent).map((x) => x.r);
  const least = all[0];
  const wanted = Math.max(middle, ...urgent.map((r) => Math.min(r, 8 * least)));
  return nice(wanted);
}

/** Levers a line's findings can be read in, the most common first, with the engine's label. @param {Finding[]} findings */
export function leversOf(findings) {
  /** @type {Map<string, {lever: string, label: string, count: number, turns: number}>} */
  const all = new Map();
  for (const f of findings) {
    for (const l of f.levers) {
      if (l.lever.startsWith('activity')) continue;
      const seen = all.get(l.lever) ?? { lever: l.lever, label: l.label, count: 0, turns: 0 };
      seen.count += 1;
      if (l.leeway !== null) seen.turns += 1;
      all.set(l.lever, seen);
    }
  }
  const order = ['dew_point', 'temperature', 'pressure'];
  const rank = (/** @type {string} */ l) => (order.includes(l) ? order.indexOf(l) : 9);
  return [...all.values()].sort((a, b) => rank(a.lever) - rank(b.lever) || b.turns - a.turns);
}

/** The lever to begin with: the dew point where it turns most findings, else the one that turns most. @param {Finding[]} findings */
export function firstLever(findings) {
  const levers = leversOf(findings);
  const most = Math.max(0, ...levers.map((l) => l.turns));
  const dew = levers.find((l) => l.lever === 'dew_point');
  if (dew && dew.turns >= most * 0.6 && dew.turns > 0) return 'dew_point';
  return levers.find((l) => l.turns === most && most > 0)?.lever ?? 'kJ';
}
