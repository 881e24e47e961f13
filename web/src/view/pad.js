/** The keypad beside the zone that is being changed: what is typed stays as typed and is read back in full. */
import { h } from '../dom.js';
import { difference, reading, unit, value, withUnit } from '../format.js';
import { zonesOf } from '../line.js';
import { button, glyph, say, trouble } from './frame.js';

/** @typedef {import('../types.js').State} State */
/** @typedef {import('../main.js').Act} Act */

/** Units a field offers on keys; others may be typed. @type {Record<string, string[]>} */
export const UNITS = {
  temperature: ['C', 'F', 'K'], leaving: ['C', 'F', 'K'], acts_above: ['C', 'F', 'K'], dew_point: ['C', 'F', 'ppm'], gas: ['%', 'ppm', 'mbar'], pressure: ['bar', 'mbar', 'kPa'],
  oxygen_cell: ['mV', 'V'], rate: ['K/s', 'K/min', 'K/h'], allowed: ['s', 'min'], share_wt: ['%', 'ppm'],
};
/** @type {Record<string, string>} */
const EXAMPLES = {
  dew_point: '“-48 F” and “75 ppm” are understood.', gas: '“35 ppm” and “< 0,1 %” are understood.', temperature: '“1 922 F” and “1050 ± 4” are understood.', leaving: '“80 ± 10” is understood.',
  pressure: '“12,5 psi” and “1025 mbar” are understood.', oxygen_cell: '“1,136 V” is understood.', rate: '“38 K/s” and “200 K/h” are understood.',
};

/** Field as the engine names it. @param {import('../types.js').Target} t */
export const fieldOf = (t) => (t.kind === 'channel' ? 'gas' : t.kind === 'cell' ? (t.field === 'temperature' ? 'temperature' : 'pressure') : t.kind === 'dew' ? 'pressure' : t.field);

/** @param {State} state @param {Act} act @param {{f: any, col: number, n: number}} at */
export function pad(state, act, { f, col, n }) {
  const edit = /** @type {import('../types.js').Edit} */ (state.edit);
  const { target, entry, problem, old } = edit;
  const field = fieldOf(target);
  const zones = zonesOf(state.doc.line);
  const zone = target.zones.length === 1 ? target.zones[0] : null;
  const units = UNITS[field] ?? [];
  const dew = field === 'dew_point' && edit.unit !== 'ppm';
  const beside = !f.tablet && f.page >= 1100;
  const shownUnit = entry && typeof entry.quantity === 'object' ? String(entry.quantity.unit) : edit.unit;
  const refused = zone !== null && edit.tentative && state.shownLine === edit.tentative ? state.shown?.zones[zone]?.refused : null;
  const keep = entry && edit.tentative && typeof entry.quantity === 'object' ? `Keep ${reading(entry.quantity.value)}` : 'Keep';
  const others = zone === null ? 'Every zone.' : `${zones[zone].name} only.`;
  // Another kind of reading brings no tolerance along: ± 2 K of a frost point says nothing about ppm.
  const other = entry && entry.field && entry.field !== target.field && target.field === 'dew_point';
  const tolerance = entry && typeof entry.quantity === 'object' && entry.quantity.tolerance !== undefined ? `± ${withUnit(reading(entry.quantity.tolerance), difference(shownUnit))}` : other ? 'none' : old?.instrument ? String(old.instrument) : old?.tolerance !== undefined ? `± ${withUnit(reading(old.tolerance), difference(old.unit))}` : 'none';
  const key = (/** @type {string} */ c, name = c, cls = '') => h('button', { type: 'button', class: cls, 'aria-label': name === c ? null : name, onclick: () => act.press(c) }, c === '⌫' ? glyph('M8 5h12v12H8L2 11zM11 8l6 6M17 8l-6 6') : c);

  // Never over the zone being changed: the side of the board with more room beyond that zone's column.
  let css = '';
  if (beside) {
    const z = zone ?? 0;
    const right = (n - 1 - z) * col;
    const left = f.label + z * col;
    const most = 640;
    if (zone === null) css = `right:0;width:${Math.min(most, n * col - 20)}px`;
    else if (right >= left || right >= 520) css = `left:${(f.label + (z + 1) * col).toFixed(0)}px;width:${Math.max(430, Math.min(most, right)).toFixed(0)}px`;
    else {
      // The names of the rows stay in sight where the columns before the zone leave room.
      const wide = Math.max(430, Math.min(most, left - f.label));
      css = `left:${Math.max(0, left - wide).toFixed(0)}px;width:${wide.toFixed(0)}px`;
    }
  }
  return h('div', {
    class: `pad${beside ? ' beside' : ' below'}`, css, role: 'dialog', 'aria-label': `${zone === null ? 'All zones' : zones[zone].name}: ${target.label}`, 'data-key': 'pad',
    onkeydown: (/** @type {KeyboardEvent} */ e) => {
      if (e.key === 'Enter' && !(e.target instanceof HTMLButtonElement)) { e.preventDefault(); act.keep(); }
      if (e.key === 'Escape') { e.preventDefault(); e.stopPropagation(); act.takeBack(); }
    },
  },
  h('div', { class: 'pad-head' }, h('span', { class: 'tabname' }, zone === null ? 'All zones' : `${zone + 1} ${zones[zone].name}`), h('b', null, target.label), h('span', { class: 'was-text' }, old ? `was ${value(old.value, old.unit)}${old.tolerance !== undefined ? ` ± ${withUnit(reading(old.tolerance), difference(old.unit))}` : ''}` : 'not read yet')),
  h('div', { class: 'in' },
    h('input', { id: 'pad-input', class: `field${problem ? ' bad' : ''}`, type: 'text', inputmode: 'none', autocomplete: 'off', spellcheck: 'false', 'aria-label': `${target.label}, new value`, 'aria-invalid': problem ? 'true' : null, value: edit.text, oninput: (/** @type {any} */ e) => act.type(e.target.value) }),
    h('button', { type: 'button', class: 'tol', onclick: () => act.press('±'), 'aria-label': `Tolerance ${tolerance}: type another` }, h('span', null, 'tolerance'), h('b', null, tolerance))),
  h('div', { class: 'readback', 'aria-live': 'polite' },
    problem ? trouble(problem, (text) => act.type(text)) : entry ? [h('p', null, h('b', null, `${say(entry.read_back)}${entry.consequence ? ':' : '.'} `), entry.consequence ? h('span', null, `${say(entry.consequence)}.`) : null), refused ? trouble(refused) : null] : null,
    h('p', { class: 'q' }, problem ? 'The gauges still show the value before.' : `${others}`),
    h('p', { class: 'hint' }, h('b', null, 'Enter'), ' keeps, ', h('b', null, 'Esc'), ' takes back. ', EXAMPLES[field] ?? '')),
  h('div', { class: 'keys' }, key('7'), key('8'), key('9'), key('⌫', 'Delete the last sign'), key('4'), key('5'), key('6'), key('−', 'Minus'), key('1'), key('2'), key('3'), key('±', 'Plus or minus, a tolerance'), key('0', '0', 'two'), key(',', 'Comma'), key('.', 'Point')),
  h('div', { class: 'units' },
    units.map((u) => h('button', { type: 'button', class: shownUnit === u ? 'set' : '', 'aria-pressed': String(shownUnit === u), onclick: () => act.unit(u) }, unit(u))),
    dew ? ['ice', 'water'].map((o) => h('button', { type: 'button', class: `w${(entry?.quantity?.over ?? edit.over) === o ? ' set' : ''}`, 'aria-pressed': String((entry?.quantity?.over ?? edit.over) === o), onclick: () => act.over(o) }, `over ${o}`)) : null,
    field === 'gas' ? h('button', { type: 'button', class: `w${entry?.quantity?.bound === 'upper' ? ' set' : ''}`, 'aria-pressed': String(entry?.quantity?.bound === 'upper'), onclick: () => act.bound() }, 'detection limit') : null),
  h('div', { class: 'act' },
    button(old ? `Take back ${reading(old.value)}` : 'Leave it', act.takeBack, ''),
    h('button', { type: 'button', class: 'main', onclick: act.keep, disabled: !edit.tentative }, keep)));
}
